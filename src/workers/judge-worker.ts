import { judging } from '../requirements/judge.ts';
import type { JudgeReply, JudgeRequest } from './messages.ts';

/** The part of a worker's global scope that is used; the page's types know only windows. */
interface Scope {
  postMessage(reply: JudgeReply): void;
  onmessage: ((event: MessageEvent<JudgeRequest>) => void) | null;
}

/** Progress is told this often at most, ms. */
const EVERY_MS = 100;

const scope = self as unknown as Scope;
scope.onmessage = ({ data: { number, design } }) => {
  try {
    let told = performance.now();
    const steps = judging(design);
    for (;;) {
      const step = steps.next();
      if (step.done) return scope.postMessage({ kind: 'judged', number, judgement: step.value });
      if (performance.now() - told < EVERY_MS) continue;
      told = performance.now();
      scope.postMessage({ kind: 'progress', number, ...step.value });
    }
  } catch (error) {
    scope.postMessage({ kind: 'fault', number, message: error instanceof Error ? error.message : String(error) });
  }
};
