import { isRefusal, solveBands, solveStack, type Profiles, type Refusal, type SolveOptions, type Stack } from '../../solver/index.ts';
import type { Complaint } from '../design/complaint.ts';
import { placeOf } from '../design/place.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { askedResult, type AskedResult } from './asked-result.ts';
import { resultOf } from './from-solution.ts';
import { provenanceOf } from './provenance.ts';
import type { Answer, Result } from './types.ts';

export interface SolveDesignOptions {
  /** values for this run: variables by name, and "temperature" */ set?: Readonly<Record<string, string>>;
  /** accepted estimate of the mesh error in psi, V; 1e-4 by default */ accuracy?: number;
  /** profiles of an earlier answer of a similar design */ warmStart?: Profiles;
}

type NoAnswer = Extract<Answer, { kind: 'complaints' | 'refused' }>;

/** An answer with the solver's own profiles, from which the next one can start. */
export type SolvedAnswer = NoAnswer | { kind: 'result'; result: Result; profiles: Profiles };

/**
 * From a checked document to its result: reads its quantities, solves the stack, and says where the figures come from.
 *
 * @returns a result; or what is wrong with the design and where; or why there is no accepted answer
 */
export function solveDesign(design: Design, options: SolveDesignOptions = {}): SolvedAnswer {
  return answered(design, options, (stack, asked, notes) => {
    const solution = solveStack(stack, asked);
    if (isRefusal(solution)) return solution;
    const result = resultOf(solution, design.title, provenanceOf(design, options.set ?? {}));
    result.warnings.push(...notes);
    return { kind: 'result', result, profiles: solution.profiles };
  });
}

/** The same for a run of many points: only what `read` reads of the answer is worked out, and it bears no provenance. */
export function solveFigures<T>(design: Design, options: SolveDesignOptions, read: (rows: AskedResult) => T): NoAnswer | { kind: 'figures'; figures: T; profiles: Profiles } {
  return answered(design, options, (stack, asked) => {
    const bands = solveBands(stack, asked);
    return isRefusal(bands) ? bands : { kind: 'figures', figures: read(askedResult(bands)), profiles: bands.profiles };
  });
}

function answered<A>(design: Design, { set = {}, accuracy, warmStart }: SolveDesignOptions, solve: (stack: Stack, options: SolveOptions, notes: readonly string[]) => A | Refusal): NoAnswer | A {
  const reading = toStack(design, set);
  if (!reading.ok) return { kind: 'complaints', complaints: reading.complaints };
  try {
    const answer = solve(reading.stack, { ...(accuracy === undefined ? {} : { accuracy }), ...(warmStart === undefined ? {} : { warmStart }) }, reading.notes);
    return isRefused(answer) ? { kind: 'refused', reason: answer.reason } : answer;
  } catch (error) {
    // What the solver refuses at its door is a fault of the design that only the physics shows: a gap that closes, a missing constant.
    if (!(error instanceof RangeError)) throw error;
    const complaints: Complaint[] = [{ path: placeOf(error.message, design), message: error.message }];
    return { kind: 'complaints', complaints };
  }
}

function isRefused<A>(answer: A | Refusal): answer is Refusal {
  return isRefusal(answer as object);
}
