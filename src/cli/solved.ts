import { InputError } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { solveDesign } from '../result/solve-design.ts';
import type { Result } from '../result/types.ts';
import { type Streams } from './command.ts';

/**
 * The result of a design, or null after saying why there is no accepted answer.
 *
 * @throws {InputError} the design is wrong
 */
export function solved(design: Design, set: Record<string, string>, streams: Streams): Result | null {
  const answer = solveDesign(design, { set });
  if (answer.kind === 'complaints') throw new InputError(answer.complaints);
  if (answer.kind === 'refused') {
    streams.error(`halfmark: no accepted answer: ${answer.reason}\n`);
    return null;
  }
  return answer.result;
}
