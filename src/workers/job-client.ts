import type { JobInput, JobKind, JobProgress, JobReply, JobRequest, JobValue } from './job-messages.ts';

/** The side of a Worker that the client uses; tests give their own. */
export interface JobSide {
  postMessage(message: JobRequest): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<JobReply>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

export type JobOutcome<V> = { kind: 'done'; value: V } | /** cancelled */ { kind: 'dropped' } | { kind: 'fault'; message: string };

/** A job on its way. */
export interface JobRun<V> {
  /** never rejects */ outcome: Promise<JobOutcome<V>>;
  /** stops it at once; it ends as dropped. Nothing happens to one that has ended. */ cancel(): void;
}

/** How a panel starts a job. `told` hears of its progress until it has ended. */
export type RunJob = <K extends JobKind>(kind: K, input: JobInput<K>, told?: (progress: JobProgress<K>) => void) => JobRun<JobValue<K>>;

/**
 * Runs jobs in workers, each in one of its own, so that a long one holds up no other. A worker cannot be interrupted: cancelling ends it. One that has done
 * its job waits for the next. What comes in late from a job that was cancelled is dropped.
 */
export class JobClient {
  #number = 0;
  /** a worker that has nothing to do */ #idle: JobSide | null = null;
  readonly #running = new Set<() => void>();
  readonly #start: () => JobSide;

  constructor(start: () => JobSide) {
    this.#start = start;
  }

  readonly run: RunJob = <K extends JobKind>(kind: K, input: JobInput<K>, told: (progress: JobProgress<K>) => void = () => {}): JobRun<JobValue<K>> => {
    const number = ++this.#number;
    const worker = this.#idle ?? this.#start();
    this.#idle = null;
    let settle!: (outcome: JobOutcome<JobValue<K>>) => void;
    const outcome = new Promise<JobOutcome<JobValue<K>>>((resolve) => (settle = resolve));
    let open = true;
    const end = (with_: JobOutcome<JobValue<K>>, keep: boolean): void => {
      if (!open) return;
      open = false;
      this.#running.delete(cancel);
      worker.onmessage = worker.onerror = null;
      if (keep && this.#idle === null) this.#idle = worker;
      else worker.terminate();
      settle(with_);
    };
    const cancel = (): void => end({ kind: 'dropped' }, false);
    this.#running.add(cancel);
    worker.onmessage = ({ data }) => {
      if (data.number !== number) return;
      if (data.kind === 'progress') told(data as unknown as JobProgress<K>);
      else if (data.kind === 'done') end({ kind: 'done', value: data.value as JobValue<K> }, true);
      // What it holds after a bug of ours is not to be trusted.
      else end({ kind: 'fault', message: data.message }, false);
    };
    worker.onerror = (event) => end({ kind: 'fault', message: event.message || 'the worker could not be loaded' }, false);
    worker.postMessage({ kind, number, input } as JobRequest);
    return { outcome, cancel };
  };

  /** Ends every worker; what runs ends as dropped. */
  close(): void {
    for (const cancel of [...this.#running]) cancel();
    this.#idle?.terminate();
    this.#idle = null;
  }
}
