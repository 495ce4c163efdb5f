import type { Design } from '../design/types.ts';
import type { SolveOutcome } from '../state/session.ts';
import type { Reply, Request } from './messages.ts';

/** The side of a Worker that the client uses; tests give their own. */
export interface WorkerSide {
  postMessage(message: Request): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<Reply>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

interface SolveJob {
  design: Design;
  settle: (outcome: SolveOutcome) => void;
}

/** Time after which a newer question no longer waits for the running one but stops it, ms. Above what a typical stack takes, so that a drag reuses the last solution. */
export const PATIENCE_MS = 1500;

/**
 * Speaks with the worker. At most one solve runs and one waits: a newer question takes the place of the waiting one, which ends as dropped. A worker cannot be interrupted, so
 * cancelling ends it, and the next question starts another. Replies with an unknown number are dropped.
 */
export class SolverClient {
  /** none before the first question and after a failure */ #worker: WorkerSide | null = null;
  #number = 0;
  #running: (SolveJob & { number: number; since: number }) | null = null;
  #waiting: SolveJob | null = null;
  readonly #start: () => WorkerSide;
  readonly #now: () => number;
  #timer: ReturnType<typeof setTimeout> | undefined;

  constructor(start: () => WorkerSide, now: () => number = () => performance.now()) {
    this.#start = start;
    this.#now = now;
  }

  /** Solves a design; never rejects. */
  solve(design: Design): Promise<SolveOutcome> {
    return new Promise((settle) => {
      this.#waiting?.settle({ kind: 'dropped' });
      this.#waiting = { design, settle };
      if (this.#running === null) return this.#next();
      const left = this.#running.since + PATIENCE_MS - this.#now();
      if (left <= 0) return this.#overtake();
      this.#timer ??= setTimeout(() => this.#overtake(), left);
    });
  }

  /** Stops what is being solved and what waits; both end as dropped. */
  cancel(): void {
    const jobs = [this.#running, this.#waiting];
    this.#running = this.#waiting = null;
    this.#clearTimer();
    for (const job of jobs) job?.settle({ kind: 'dropped' });
    if (jobs[0] !== null) this.#stop();
  }

  /** Ends the worker for good. */
  close(): void {
    this.cancel();
    this.#stop();
  }

  #next(): void {
    this.#clearTimer();
    if (this.#waiting === null) return;
    const number = ++this.#number;
    this.#running = { ...this.#waiting, number, since: this.#now() };
    this.#waiting = null;
    this.#worker ??= this.#started();
    this.#worker.postMessage({ kind: 'solve', number, design: this.#running.design });
  }

  /** The running solve has had its time and a newer question waits. */
  #overtake(): void {
    this.#clearTimer();
    const late = this.#running;
    if (late === null || this.#waiting === null) return;
    this.#running = null;
    late.settle({ kind: 'dropped' });
    this.#stop();
    this.#next();
  }

  #stop(): void {
    this.#worker?.terminate();
    this.#worker = null;
  }

  #started(): WorkerSide {
    const worker = this.#start();
    // A message that was on its way when its worker was stopped means nothing any more.
    worker.onmessage = ({ data }) => worker === this.#worker && this.#take(data);
    worker.onerror = (event) => worker === this.#worker && this.#broke(event.message || 'the solver could not be loaded');
    return worker;
  }

  #take(reply: Reply): void {
    const running = this.#running;
    if (running === null || running.number !== reply.number) return;
    this.#running = null;
    if (reply.kind === 'answer') running.settle({ kind: 'answered', answer: reply.answer });
    else running.settle({ kind: 'fault', message: reply.message });
    this.#next();
  }

  /** The worker itself failed: everything in it is lost. The next question starts another; doing so at once would spin where it cannot be loaded. */
  #broke(message: string): void {
    const jobs = [this.#running, this.#waiting];
    this.#running = this.#waiting = null;
    this.#clearTimer();
    this.#stop();
    for (const job of jobs) job?.settle({ kind: 'fault', message });
  }

  #clearTimer(): void {
    clearTimeout(this.#timer);
    this.#timer = undefined;
  }
}
