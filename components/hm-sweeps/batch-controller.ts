import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { Job } from '../../src/batch/job.ts';
import type { JobSpec } from '../../src/batch/spec.ts';
import type { WorkerPool } from '../../src/workers/pool.ts';
import { startPool } from '../../src/workers/start-pool.ts';

/** What a panel needs of a pool; a test gives its own. */
export type Pool = Pick<WorkerPool, 'run' | 'close'>;

/**
 * One batch of a panel over a pool of workers. A newer start takes the place of what runs. Chunks are there as they come in, and stay after a stop. The pool is
 * begun with the first batch and ended with the element, unless it was lent.
 */
export class BatchController<V> implements ReactiveController {
  status: 'initial' | 'pending' | 'complete' | 'stopped' | 'error' = 'initial';
  /** chunks of the last batch, so far */ chunks: ReadonlyMap<number, V> = new Map();
  /** points */ progress: { done: number; total: number } | null = null;
  /** why the program itself failed, in words */ reason: string | null = null;
  readonly #host: ReactiveControllerHost;
  readonly #lent: () => Pool | null;
  readonly #workers: number | undefined;
  #own: Pool | null = null;
  #abort: AbortController | null = null;

  /**
   * @param lent     a pool of someone else, which is then used and left open
   * @param workers  at most, of an own pool; all cores by default
   */
  constructor(host: ReactiveControllerHost, lent: () => Pool | null, workers?: number) {
    this.#host = host;
    this.#lent = lent;
    this.#workers = workers;
    host.addController(this);
  }

  hostDisconnected(): void {
    this.stop();
    this.#own?.close();
    this.#own = null;
  }

  get pool(): Pool {
    return this.#lent() ?? (this.#own ??= startPool(this.#workers));
  }

  /** @returns when the batch has ended; never rejects */
  async start(spec: JobSpec, job: Pick<Job<V>, 'chunks' | 'size'>): Promise<void> {
    this.#abort?.abort();
    const abort = (this.#abort = new AbortController());
    const chunks = new Map<number, V>();
    const mine = (): boolean => this.#abort === abort;
    this.#become({ status: 'pending', chunks, progress: { done: 0, total: 1 }, reason: null });
    try {
      const { stopped } = await this.pool.run<V>(spec, job, {
        signal: abort.signal,
        onChunk: (chunk, value) => {
          if (!mine()) return;
          chunks.set(chunk, value);
          // A new map, so that whoever compares sees that there is more.
          this.#become({ chunks: new Map(chunks) });
        },
        onProgress: (progress) => mine() && this.#become({ progress }),
      });
      if (mine()) this.#become({ status: stopped ? 'stopped' : 'complete' });
    } catch (error) {
      if (mine()) this.#become({ status: 'error', reason: error instanceof Error ? error.message : String(error) });
    }
  }

  stop(): void {
    this.#abort?.abort();
  }

  #become(change: Partial<Pick<this, 'status' | 'chunks' | 'progress' | 'reason'>>): void {
    Object.assign(this, change);
    this.#host.requestUpdate();
  }
}
