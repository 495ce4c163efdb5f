import { isRefusal, solveStack, type Profiles, type Solution, type Stack } from '../../solver/index.ts';
import { complaintLine } from '../design/complaint.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { resultOf } from '../result/from-solution.ts';
import { provenanceOf } from '../result/provenance.ts';
import type { RequirementResult, Result } from '../result/types.ts';
import { requirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import { CORNER_ACCURACY } from './point.ts';
import { uncertaintiesOf, type Tolerances, type Uncertainty } from './uncertainties.ts';

/** A requirement with the stack solved where it is at its worst. */
export interface Corner {
  requirement: RequirementResult;
  result: Result;
}

export type CornerAnswer = { kind: 'corner'; corner: Corner } | { kind: 'none'; reason: string };

/**
 * The requirement that is hardest to meet: one that is missed before any that is met, then the one of the least margin. Ratios are set beside differences by their logarithm and by
 * the quantity's own steps, as the search for the worst case does.
 *
 * @returns null where no row has a worst case
 */
export function hardest(rows: readonly RequirementResult[]): RequirementResult | null {
  const known = rows.filter((row) => row.at !== null);
  if (known.length === 0) return null;
  return known.reduce((a, b) => (difficulty(b) < difficulty(a) ? b : a));
}

/** Less is harder. */
function difficulty(row: RequirementResult): number {
  if (row.margin === null) return row.met ? Infinity : -Infinity;
  const score = row.margin_kind === 'ratio' ? Math.log(row.margin) : row.margin / requirementQuantity(row.quantity as RequirementQuantityName).step;
  return row.met ? score : Math.min(score, 0);
}

/** A temperature, and how far each tolerance is moved there as a signed count of its whole: what a judgement tells of a corner. */
export interface CornerPlace {
  temperature_K: number;
  tolerances: readonly { name: string; count: number; words?: string }[];
}

/** One tolerance that is moved at a corner, with the stack before and after it. */
export interface CornerMove {
  of: Uncertainty;
  count: number;
  before: Stack;
  after: Stack;
}

/**
 * The stack at a corner, its tolerances moved one after the other.
 *
 * @returns why there is none, in words
 */
export function cornerStack(design: Design, place: CornerPlace, set: Readonly<Record<string, string>>, tolerances: Tolerances): { stack: Stack; moves: CornerMove[] } | string {
  const left = uncertaintiesOf(design, set, tolerances);
  const moved: { of: Uncertainty; count: number }[] = [];
  for (const { name, count, words } of place.tolerances) {
    // A variable may be called as a tolerance of the stack is: the words tell them apart, else their order, and none is moved twice.
    const i = left.findIndex((u) => u.label === name && (words === undefined || u.words(count) === words));
    if (i < 0) return 'it was judged over other tolerances';
    moved.push({ of: left.splice(i, 1)[0], count });
  }
  const reading = toStack(design, set, Object.fromEntries(moved.flatMap(({ of, count }) => (of.variable === null ? [] : [[of.variable, count]]))));
  if (!reading.ok) return complaintLine(reading.complaints[0]);
  let stack: Stack = { ...reading.stack, temperature: place.temperature_K };
  const moves = moved.map(({ of, count }): CornerMove => {
    const before = stack;
    stack = of.apply(stack, count);
    return { of, count, before, after: stack };
  });
  return { stack, moves };
}

/**
 * A corner's stack, solved as exactly as the search for worst cases does.
 *
 * @returns why there is no accepted answer, in words
 */
export function solveCornerStack(stack: Stack, warmStart?: Profiles): Solution | string {
  try {
    let solution = solveStack(stack, { accuracy: CORNER_ACCURACY, ...(warmStart ? { warmStart } : {}) });
    if (isRefusal(solution) && warmStart) solution = solveStack(stack, { accuracy: CORNER_ACCURACY });
    return isRefusal(solution) ? solution.reason : solution;
  } catch (error) {
    // What the solver refuses at its door, such as a gap that closes at this temperature.
    if (!(error instanceof RangeError)) throw error;
    return error.message;
  }
}

/**
 * The result at the worst case of a requirement: its temperature, and each tolerance moved as far as it was there.
 *
 * @param row  of a judgement of this very design with the same `set` and tolerances
 */
export function solveCorner(design: Design, row: RequirementResult, options: { set?: Readonly<Record<string, string>>; tolerances?: Tolerances } = {}): CornerAnswer {
  const { set = {}, tolerances = 'all' } = options;
  if (row.at === null) return { kind: 'none', reason: 'the requirement has no worst case' };
  const at = cornerStack(design, row.at, set, tolerances);
  if (typeof at === 'string') return { kind: 'none', reason: at };
  const solution = solveCornerStack(at.stack);
  if (typeof solution === 'string') return { kind: 'none', reason: solution };
  return { kind: 'corner', corner: { requirement: row, result: resultOf(solution, design.title, provenanceOf(design, set)) } };
}
