import type { JobSide } from './job-client.ts';

/** Starts a worker for one job after another. The builder reads this very form of the address. */
export function startJobWorker(): JobSide {
  return new Worker(new URL('./job-worker.ts', import.meta.url), { type: 'module', name: 'job' });
}
