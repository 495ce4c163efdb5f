import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { isRefusal, solveStack } from '../../solver/index.ts';
import { faultsOf } from '../solver/soundness.ts';

export type Outcome = { kind: 'accepted'; nodes: number } | { kind: 'refused'; reason: string } | { kind: 'wrong'; faults: string[] } | { kind: 'not sensible'; reason: string };

/** Solves one design and checks an accepted answer by sums of its own. A gap that closes under narrowing or a mixed crystal is no sensible design. */
export function tryDesign(design: Design): Outcome {
  const reading = toStack(design);
  if (!reading.ok) return { kind: 'wrong', faults: reading.complaints.map((c) => `${c.path}: ${c.message}`) };
  let answer;
  try {
    answer = solveStack(reading.stack);
  } catch (error) {
    if (error instanceof RangeError && /gap/.test(error.message)) return { kind: 'not sensible', reason: error.message };
    return { kind: 'wrong', faults: [error instanceof Error ? (error.stack ?? error.message) : String(error)] };
  }
  if (isRefusal(answer)) return { kind: 'refused', reason: answer.reason };
  const faults = faultsOf(answer);
  return faults.length > 0 ? { kind: 'wrong', faults } : { kind: 'accepted', nodes: answer.quality.meshNodes };
}
