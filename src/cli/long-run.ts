import { runHere, type Job, type JobOutcome, type Progress } from '../batch/job.ts';
import type { JobSpec } from '../batch/spec.ts';
import { WorkerPool } from '../workers/pool.ts';
import type { Streams } from './command.ts';

/** Least time between two lines of progress, ms. */
const BETWEEN_LINES = 200;

/**
 * Computes a job's chunks on the machine's threads, or in this one where there are none or the job has a single chunk. Progress goes to a terminal and is wiped in the end. After
 * Ctrl-C it comes back with the chunks that it has, and no thread is left.
 *
 * @param workers  threads at most; all cores by default
 */
export async function longRun<V>(spec: JobSpec, job: Job<V>, chunks: readonly number[], streams: Streams, workers?: number): Promise<JobOutcome<V>> {
  const signal = streams.stopSignal?.();
  let shown = -Infinity;
  const onProgress = ({ done, total }: Progress): void => {
    const now = performance.now();
    if (now - shown < BETWEEN_LINES) return;
    shown = now;
    streams.progress?.(`${done} of ${total} (${Math.floor((100 * done) / total)} %)`);
  };
  const size = Math.min(workers ?? streams.cores ?? 1, chunks.length);
  const pool = streams.startWorker && size > 1 ? new WorkerPool(streams.startWorker, size) : null;
  try {
    return pool ? await pool.run(spec, job, { chunks, onProgress, signal }) : await runHere(job, { chunks, onProgress, signal });
  } finally {
    pool?.close();
    if (shown > -Infinity) streams.progress?.('');
  }
}
