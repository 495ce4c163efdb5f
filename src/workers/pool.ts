import { allChunks, totalOf, type Job, type JobOptions, type JobOutcome } from '../batch/job.ts';
import type { JobSpec } from '../batch/spec.ts';
import type { PoolReply, PoolRequest } from './pool-messages.ts';

/** The side of a Worker that the pool uses; the page, the command line and the tests each give their own. */
export interface PoolSide {
  postMessage(message: PoolRequest): void;
  terminate(): void;
  onmessage: ((event: { data: PoolReply }) => void) | null;
  onerror: ((event: { message?: string }) => void) | null;
}

interface Run {
  number: number;
  spec: JobSpec;
  size(chunk: number): number;
  /** not yet handed out, in order */ waiting: number[];
  values: Map<number, unknown>;
  total: number;
  done: number;
  left: number;
  options: JobOptions<unknown>;
  settle(outcome: JobOutcome<unknown>): void;
  fail(error: Error): void;
  onAbort(): void;
}

interface Member {
  side: PoolSide;
  /** numbers of the jobs that it has opened */ opened: Set<number>;
  busy: { run: Run; chunk: number } | null;
}

/**
 * Spreads the chunks of jobs over workers, which start when they are first needed and then stay. Several jobs may run; earlier ones go first. An abort ends the
 * workers that are busy with that job (a worker cannot be interrupted) and settles it with the chunks that it has; nothing of it runs on.
 */
export class WorkerPool {
  readonly #start: () => PoolSide;
  readonly #size: number;
  readonly #members = new Set<Member>();
  #runs: Run[] = [];
  #number = 0;

  /** @param size  workers at most, at least 1 */
  constructor(start: () => PoolSide, size: number) {
    this.#start = start;
    this.#size = Math.max(1, Math.floor(size));
  }

  /** Workers that are there now. */
  get members(): number {
    return this.#members.size;
  }

  /**
   * Computes a job.
   *
   * @param spec  what the workers open
   * @param job   the same job on this side, for its count of chunks and their sizes
   * @returns rejects where the program itself fails; a stop is an outcome
   */
  run<V>(spec: JobSpec, job: Pick<Job<V>, 'chunks' | 'size'>, options: JobOptions<V> = {}): Promise<JobOutcome<V>> {
    return new Promise((settle, fail) => {
      const waiting = [...(options.chunks ?? allChunks(job))];
      const run: Run = {
        number: ++this.#number, spec, size: (chunk) => job.size(chunk), waiting, values: new Map(), total: totalOf(job, waiting), done: 0, left: waiting.length,
        options: options as JobOptions<unknown>, settle: settle as Run['settle'], fail, onAbort: () => this.#leave(run, () => run.settle({ values: run.values, stopped: true })),
      };
      if (options.signal?.aborted || waiting.length === 0) return run.settle({ values: run.values, stopped: options.signal?.aborted ?? false });
      options.signal?.addEventListener('abort', run.onAbort, { once: true });
      this.#runs.push(run);
      this.#handOut();
    });
  }

  /** Ends every worker; what runs settles as stopped. */
  close(): void {
    for (const run of [...this.#runs]) run.onAbort();
    for (const member of [...this.#members]) this.#end(member);
  }

  #handOut(): void {
    for (;;) {
      const run = this.#runs.find((r) => r.waiting.length > 0);
      if (!run) return;
      const member = [...this.#members].find((m) => m.busy === null) ?? (this.#members.size < this.#size ? this.#started() : null);
      if (!member) return;
      const chunk = run.waiting.shift() as number;
      member.busy = { run, chunk };
      if (!member.opened.has(run.number)) {
        member.opened.add(run.number);
        member.side.postMessage({ kind: 'open', job: run.number, spec: run.spec });
      }
      member.side.postMessage({ kind: 'run', job: run.number, chunk });
    }
  }

  #started(): Member {
    const member: Member = { side: this.#start(), opened: new Set(), busy: null };
    this.#members.add(member);
    member.side.onmessage = ({ data }) => this.#members.has(member) && this.#take(member, data);
    member.side.onerror = ({ message }) => this.#members.has(member) && this.#broke(member, message || 'a worker could not be loaded');
    return member;
  }

  #take(member: Member, reply: PoolReply): void {
    const { busy } = member;
    if (busy === null || reply.job !== busy.run.number || reply.chunk !== busy.chunk) return;
    member.busy = null;
    const { run, chunk } = busy;
    if (reply.kind === 'fault') return this.#leave(run, () => run.fail(new Error(reply.message)));
    run.values.set(chunk, reply.value);
    run.done += run.size(chunk);
    run.left--;
    run.options.onChunk?.(chunk, reply.value);
    run.options.onProgress?.({ done: run.done, total: run.total });
    // Whoever was told may have aborted.
    if (run.left === 0 && this.#runs.includes(run)) this.#leave(run, () => run.settle({ values: run.values, stopped: false }));
    else this.#handOut();
  }

  #broke(member: Member, message: string): void {
    const run = member.busy?.run;
    this.#end(member);
    if (run) this.#leave(run, () => run.fail(new Error(message)));
  }

  /** Takes a run out: its busy workers end, the idle ones forget it, and the others go on. */
  #leave(run: Run, then: () => void): void {
    if (!this.#runs.includes(run)) return;
    this.#runs = this.#runs.filter((r) => r !== run);
    run.options.signal?.removeEventListener('abort', run.onAbort);
    for (const member of [...this.#members]) {
      if (member.busy?.run === run) this.#end(member);
      else if (member.opened.delete(run.number)) member.side.postMessage({ kind: 'close', job: run.number });
    }
    then();
    this.#handOut();
  }

  #end(member: Member): void {
    this.#members.delete(member);
    member.side.onmessage = member.side.onerror = null;
    member.side.terminate();
  }
}
