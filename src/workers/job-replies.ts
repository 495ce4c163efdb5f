import { JOB_KINDS, type JobSteps } from './job-kinds.ts';
import type { JobInput, JobKind, JobReply, JobRequest, JobSeen } from './job-messages.ts';

/** Progress is told this often at most, ms. */
export const EVERY_MS = 100;

/** Runs one job to its end and tells of it; what throws inside is told too, so that nobody waits for ever. */
export function runJob(request: JobRequest, tell: (reply: JobReply) => void, now: () => number, kinds: typeof JOB_KINDS = JOB_KINDS): void {
  const { kind, number, input } = request;
  try {
    const begin = kinds[kind] as (input: JobInput<JobKind>) => JobSteps<JobKind>;
    const steps = begin(input);
    let told = now();
    let seen: JobSeen<JobKind>[] = [];
    for (;;) {
      const step = steps.next();
      if (step.done) return tell({ kind: 'done', number, value: step.value });
      if (step.value.seen !== undefined) seen.push(step.value.seen);
      if (now() - told < EVERY_MS) continue;
      told = now();
      tell({ kind: 'progress', number, done: step.value.done, of: step.value.of, seen });
      seen = [];
    }
  } catch (error) {
    tell({ kind: 'fault', number, message: error instanceof Error ? error.message : String(error) });
  }
}
