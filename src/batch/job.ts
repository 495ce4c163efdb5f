/**
 * A long computation cut into chunks that know nothing of each other, so that it makes no difference who computes which: one thread after another, the
 * workers of a browser, the tasks of an array job. A chunk's value survives a structured clone.
 */
export interface Job<V> {
  chunks: number;
  /** points of each chunk that count towards progress */ size(chunk: number): number;
  run(chunk: number): V;
}

/** Where a job stands. */
export interface Progress {
  /** points */ done: number;
  total: number;
}

export interface JobOptions<V> {
  signal?: AbortSignal;
  onProgress?(progress: Progress): void;
  /** each chunk as it comes, in no order */ onChunk?(chunk: number, value: V): void;
  /** only these; all by default */ chunks?: readonly number[];
}

/** Chunks by number; those that were not reached before a stop are missing. */
export interface JobOutcome<V> {
  values: Map<number, V>;
  /** the signal came before the end */ stopped: boolean;
}

export function totalOf(job: Pick<Job<unknown>, 'chunks' | 'size'>, chunks: readonly number[]): number {
  return chunks.reduce((sum, chunk) => sum + job.size(chunk), 0);
}

export const allChunks = (job: Pick<Job<unknown>, 'chunks'>): number[] => Array.from({ length: job.chunks }, (_, c) => c);

/** The job's chunks one by one, with the value of each: a step at a time for whoever wants to stop between them. */
export function* steps<V>(job: Job<V>, chunks: readonly number[] = allChunks(job)): Generator<{ chunk: number; value: V; progress: Progress }, void, void> {
  const total = totalOf(job, chunks);
  let done = 0;
  for (const chunk of chunks) {
    const value = job.run(chunk);
    done += job.size(chunk);
    yield { chunk, value, progress: { done, total } };
  }
}

/** Runs a job in this very thread, with a breath between chunks in which an abort or a signal of the system is heard. */
export async function runHere<V>(job: Job<V>, { signal, onProgress, onChunk, chunks }: JobOptions<V> = {}): Promise<JobOutcome<V>> {
  const values = new Map<number, V>();
  const walk = steps(job, chunks);
  for (;;) {
    if (signal?.aborted) return { values, stopped: true };
    const next = walk.next();
    if (next.done) return { values, stopped: false };
    values.set(next.value.chunk, next.value.value);
    onChunk?.(next.value.chunk, next.value.value);
    onProgress?.(next.value.progress);
    await new Promise((resolve) => setTimeout(resolve));
  }
}

/** Chunks of shard `index` of `count`, counted from 1: a run of neighbours, so that shards laid end to end are the whole in its order. */
export function shardChunks(chunks: number, index: number, count: number): number[] {
  const from = Math.floor(((index - 1) * chunks) / count);
  const to = Math.floor((index * chunks) / count);
  return Array.from({ length: to - from }, (_, i) => from + i);
}
