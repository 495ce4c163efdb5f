import { isRefusal, solveStack, type Profiles } from '../../solver/index.ts';
import type { Complaint } from '../design/complaint.ts';
import { placeOf } from '../design/place.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { resultOf } from './from-solution.ts';
import { provenanceOf } from './provenance.ts';
import type { Answer, Result } from './types.ts';

export interface SolveDesignOptions {
  /** values for this run: variables by name, and "temperature" */ set?: Readonly<Record<string, string>>;
  /** accepted estimate of the mesh error in psi, V; 1e-4 by default */ accuracy?: number;
  /** profiles of an earlier answer of a similar design */ warmStart?: Profiles;
}

/** An answer with the solver's own profiles, from which the next one can start. */
export type SolvedAnswer = Extract<Answer, { kind: 'complaints' | 'refused' }> | { kind: 'result'; result: Result; profiles: Profiles };

/**
 * From a checked document to its result: reads its quantities, solves the stack, and says where the figures come from.
 *
 * @returns a result; or what is wrong with the design and where; or why there is no accepted answer
 */
export function solveDesign(design: Design, options: SolveDesignOptions = {}): SolvedAnswer {
  const { set = {}, accuracy, warmStart } = options;
  const reading = toStack(design, set);
  if (!reading.ok) return { kind: 'complaints', complaints: reading.complaints };
  let solution;
  try {
    solution = solveStack(reading.stack, { ...(accuracy === undefined ? {} : { accuracy }), ...(warmStart === undefined ? {} : { warmStart }) });
  } catch (error) {
    // What the solver refuses at its door is a fault of the design that only the physics shows: a gap that closes, a missing constant.
    if (!(error instanceof RangeError)) throw error;
    const complaints: Complaint[] = [{ path: placeOf(error.message, design), message: error.message }];
    return { kind: 'complaints', complaints };
  }
  if (isRefusal(solution)) return { kind: 'refused', reason: solution.reason };
  const result = resultOf(solution, design.title, provenanceOf(design, set));
  result.warnings.push(...reading.notes);
  return { kind: 'result', result, profiles: solution.profiles };
}
