import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { JobRun, RunJob } from '../../src/workers/job-client.ts';
import type { JobInput, JobKind, JobSeen, JobValue } from '../../src/workers/job-messages.ts';

/**
 * One job of a panel, in four states. A newer start takes the place of what runs; what comes late is dropped. A stopped job keeps what it has seen, and the
 * value of the one before stays until the next one is in: whoever shows it says which design it belongs to.
 */
export class JobController<K extends JobKind> implements ReactiveController {
  status: 'initial' | 'pending' | 'complete' | 'error' = 'initial';
  /** of the last job that came to its end, with what it was asked */ value: { input: JobInput<K>; value: JobValue<K> } | null = null;
  /** what is asked now, or was last */ input: JobInput<K> | null = null;
  progress: { done: number; of: number } | null = null;
  /** of the last job, so far */ seen: JobSeen<K>[] = [];
  /** why there is no newer value, in words */ reason: string | null = null;
  readonly #host: ReactiveControllerHost;
  readonly #kind: K;
  #run: JobRun<JobValue<K>> | null = null;

  constructor(host: ReactiveControllerHost, kind: K) {
    this.#host = host;
    this.#kind = kind;
    host.addController(this);
  }

  hostDisconnected(): void {
    this.stop();
  }

  async start(run: RunJob, input: JobInput<K>): Promise<void> {
    this.#run?.cancel();
    this.input = input;
    this.seen = [];
    const mine = run(this.#kind, input, ({ done, of, seen }) => {
      if (this.#run !== mine) return;
      this.seen = [...this.seen, ...seen];
      this.#become({ status: 'pending', progress: { done, of } });
    });
    this.#run = mine;
    this.#become({ status: 'pending', progress: { done: 0, of: 1 }, reason: null });
    const outcome = await mine.outcome;
    if (this.#run !== mine) return;
    this.#run = null;
    if (outcome.kind === 'done') {
      this.value = { input, value: outcome.value };
      return this.#become({ status: 'complete', progress: null });
    }
    this.#become({ status: 'error', progress: null, reason: outcome.kind === 'fault' ? `The program itself failed (${outcome.message}).` : 'Stopped.' });
  }

  stop(): void {
    this.#run?.cancel();
  }

  #become(change: Partial<Pick<this, 'status' | 'progress' | 'reason'>>): void {
    Object.assign(this, change);
    this.#host.requestUpdate();
  }
}
