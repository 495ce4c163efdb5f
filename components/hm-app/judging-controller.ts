import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { Design } from '../../src/design/types.ts';
import type { Session } from '../../src/state/session.ts';
import type { JobRun, RunJob } from '../../src/workers/job-client.ts';
import type { JobValue } from '../../src/workers/job-messages.ts';
import type { Verdicts } from '../hm-requirements/hm-requirements.ts';

/** Quiet time after a solved design before its requirements are judged: a drag is not followed by a hundred runs, ms. */
const QUIET_MS = 500;

/** Has the requirements of the session's design judged, each time it has been solved and rests. */
export class JudgingController implements ReactiveController {
  verdicts: Verdicts = { status: 'initial', rows: [], stale: false, progress: null, reason: null };
  readonly #host: ReactiveControllerHost;
  readonly #start: RunJob;
  #run: JobRun<JobValue<'judge'>> | null = null;
  #judged: Design | null = null;
  #timer: ReturnType<typeof setTimeout> | undefined;

  constructor(host: ReactiveControllerHost, start: RunJob) {
    this.#host = host;
    this.#start = start;
    host.addController(this);
  }

  hostDisconnected(): void {
    clearTimeout(this.#timer);
    this.stop();
  }

  /** To be told whenever the session's findings change. */
  follow({ design, findings }: Session): void {
    if (design === this.#judged) return;
    clearTimeout(this.#timer);
    this.stop();
    this.#judged = null;
    if ((design.requirements ?? []).length === 0) return this.#become({ status: 'initial', rows: [], stale: false, progress: null });
    this.#become({ stale: this.verdicts.rows.length > 0, progress: null, status: findings.status === 'error' ? 'error' : 'pending', reason: findings.status === 'error' ? 'The design has no result.' : null });
    if (findings.status === 'complete') this.#timer = setTimeout(() => void this.judge(design), QUIET_MS);
  }

  /** The person does not want to wait. */
  stop(): void {
    this.#run?.cancel();
  }

  async judge(design: Design): Promise<void> {
    this.#judged = design;
    this.#become({ status: 'pending', progress: { done: 0, of: 1 }, reason: null });
    this.#run?.cancel();
    const run = this.#start('judge', { design }, ({ done, of }) => this.#become({ progress: { done, of } }));
    this.#run = run;
    const outcome = await run.outcome;
    // Another run has taken its place.
    if (this.#run !== run || this.#judged !== design) return;
    if (outcome.kind === 'done' && outcome.value.kind === 'judged') return this.#become({ status: 'complete', rows: outcome.value.requirements, stale: false, progress: null });
    const reason = outcome.kind === 'fault' ? `The program itself failed while judging (${outcome.message}).` : outcome.kind === 'dropped' ? 'Judging was stopped.' : 'The design has no result.';
    this.#become({ status: 'error', progress: null, reason });
  }

  #become(change: Partial<Verdicts>): void {
    this.verdicts = { ...this.verdicts, ...change };
    this.#host.requestUpdate();
  }
}
