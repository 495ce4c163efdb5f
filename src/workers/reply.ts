import type { Design } from '../design/types.ts';
import type { Answer } from '../result/types.ts';
import type { Reply, Request } from './messages.ts';

/** What the worker can do; handed in, so that the manner of replying is tested without a worker. */
export type Engine = (design: Design) => Answer;

/** @returns the reply to one request; what throws inside becomes a reply too, so that nobody waits for ever */
export function replyTo(request: Request, solve: Engine, now: () => number): Reply {
  const { number } = request;
  try {
    const start = now();
    const answer = solve(request.design);
    return { kind: 'answer', number, answer, took_ms: now() - start };
  } catch (error) {
    return { kind: 'fault', number, message: error instanceof Error ? error.message : String(error) };
  }
}
