import type { Job } from '../batch/job.ts';
import { openJob, type JobSpec } from '../batch/spec.ts';
import type { PoolReply, PoolRequest } from './pool-messages.ts';

/** The worker's side of a pool: keeps the open jobs and computes their chunks. What throws inside becomes a reply, so that nobody waits for ever. */
export function poolReplies(open: (spec: JobSpec) => Job<unknown> = openJob): (request: PoolRequest) => PoolReply | null {
  const specs = new Map<number, JobSpec>();
  const jobs = new Map<number, Job<unknown>>();
  return (request) => {
    if (request.kind === 'open') {
      specs.set(request.job, request.spec);
      return null;
    }
    if (request.kind === 'close') {
      specs.delete(request.job);
      jobs.delete(request.job);
      return null;
    }
    const { job: number, chunk } = request;
    try {
      let job = jobs.get(number);
      if (!job) {
        const spec = specs.get(number);
        if (!spec) throw new Error(`job ${number} was not opened`);
        job = open(spec);
        jobs.set(number, job);
      }
      return { kind: 'chunk', job: number, chunk, value: job.run(chunk) };
    } catch (error) {
      return { kind: 'fault', job: number, chunk, message: error instanceof Error ? error.message : String(error) };
    }
  };
}
