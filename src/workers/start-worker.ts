import type { WorkerSide } from './client.ts';

/** Starts the worker that solves. The builder reads this very form of the address. */
export function startSolveWorker(): WorkerSide {
  return new Worker(new URL('./solve-worker.ts', import.meta.url), { type: 'module', name: 'solver' });
}
