import { solveDesign } from '../result/solve-design.ts';
import type { Profiles } from '../../solver/index.ts';
import type { Design } from '../design/types.ts';
import type { Answer } from '../result/types.ts';
import type { Reply, Request } from './messages.ts';
import { replyTo } from './reply.ts';

/** The part of a worker's global scope that is used; the page's types know only windows. */
interface Scope {
  postMessage(reply: Reply): void;
  onmessage: ((event: MessageEvent<Request>) => void) | null;
}

/** Profiles of the last answer: a design pulled a little further starts from them. */
let last: Profiles | undefined;

function solve(design: Design): Answer {
  let answer = solveDesign(design, last === undefined ? {} : { warmStart: last });
  // What came before must not decide whether there is an answer.
  if (answer.kind === 'refused' && last !== undefined) answer = solveDesign(design);
  if (answer.kind !== 'result') return answer;
  last = answer.profiles;
  return { kind: 'result', result: answer.result };
}

const scope = self as unknown as Scope;
scope.onmessage = ({ data }) => scope.postMessage(replyTo(data, solve, () => performance.now()));
