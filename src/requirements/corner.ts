import { isRefusal, solveStack } from '../../solver/index.ts';
import { complaintLine } from '../design/complaint.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { resultOf } from '../result/from-solution.ts';
import { provenanceOf } from '../result/provenance.ts';
import type { RequirementResult, Result } from '../result/types.ts';
import { requirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import { uncertaintiesOf, type Tolerances } from './uncertainties.ts';

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

/**
 * The stack at the worst case of a requirement: its temperature, and each tolerance moved as far as it was there.
 *
 * @param row  of a judgement of this very design with the same `set` and tolerances
 */
export function solveCorner(design: Design, row: RequirementResult, options: { set?: Readonly<Record<string, string>>; tolerances?: Tolerances } = {}): CornerAnswer {
  const { set = {}, tolerances = 'all' } = options;
  if (row.at === null) return { kind: 'none', reason: 'the requirement has no worst case' };
  const uncertainties = uncertaintiesOf(design, set, tolerances);
  // By label and words: a variable may be called as a tolerance of the stack is.
  const counts = row.at.tolerances.map(({ name, count, words }) => ({ count, of: uncertainties.find((u) => u.label === name && u.words(count) === words) }));
  if (counts.some(({ of }) => of === undefined)) return { kind: 'none', reason: 'the requirement was judged over other tolerances' };
  const moves = Object.fromEntries(counts.flatMap(({ of, count }) => (of!.variable === null ? [] : [[of!.variable, count]])));
  const reading = toStack(design, set, moves);
  if (!reading.ok) return { kind: 'none', reason: complaintLine(reading.complaints[0]) };
  const stack = counts.reduce((moved, { of, count }) => of!.apply(moved, count), { ...reading.stack, temperature: row.at.temperature_K });
  try {
    const solution = solveStack(stack);
    if (isRefusal(solution)) return { kind: 'none', reason: solution.reason };
    return { kind: 'corner', corner: { requirement: row, result: resultOf(solution, design.title, provenanceOf(design, set)) } };
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return { kind: 'none', reason: error.message };
  }
}
