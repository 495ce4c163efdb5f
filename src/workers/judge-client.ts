import type { Design } from '../design/types.ts';
import type { Judgement } from '../requirements/judge.ts';
import type { JudgeReply, JudgeRequest } from './messages.ts';

/** The side of a Worker that the client uses; tests give their own. */
export interface JudgeSide {
  postMessage(message: JudgeRequest): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<JudgeReply>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

export type JudgeOutcome = { kind: 'judged'; judgement: Judgement } | { kind: 'dropped' } | { kind: 'fault'; message: string };

/** Judges one design at a time, each run in a worker of its own: a new question, or cancelling, ends the run, which settles as dropped. */
export class JudgeClient {
  #number = 0;
  #run: { end(outcome: JudgeOutcome): void } | null = null;
  readonly #start: () => JudgeSide;

  constructor(start: () => JudgeSide) {
    this.#start = start;
  }

  /** @param progress  hears of the solves done and of how many are expected; never rejects */
  judge(design: Design, progress: (done: number, of: number) => void): Promise<JudgeOutcome> {
    this.cancel();
    const number = ++this.#number;
    return new Promise((settle) => {
      const worker = this.#start();
      const run = {
        end: (outcome: JudgeOutcome): void => {
          if (this.#run !== run) return;
          this.#run = null;
          worker.terminate();
          settle(outcome);
        },
      };
      this.#run = run;
      worker.onmessage = ({ data }) => {
        if (data.number !== number || this.#run !== run) return;
        if (data.kind === 'progress') progress(data.done, data.of);
        else if (data.kind === 'judged') run.end({ kind: 'judged', judgement: data.judgement });
        else run.end({ kind: 'fault', message: data.message });
      };
      worker.onerror = (event) => run.end({ kind: 'fault', message: event.message || 'the worker could not be loaded' });
      worker.postMessage({ kind: 'judge', number, design });
    });
  }

  cancel(): void {
    this.#run?.end({ kind: 'dropped' });
  }
}
