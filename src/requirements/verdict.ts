import { requirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import type { RequirementResult } from '../result/types.ts';

/** The verdict in a word: met, not met, or neither where some points have no answer. */
export function verdictWords(row: RequirementResult): 'met' | 'not met' | 'no answer' {
  return row.met ? 'met' : row.judged ? 'not met' : 'no answer';
}

/** "contact resistivity of top at most 1e-6 ohm cm^2" */
export function requirementWords({ quantity, of, bound, limit, unit }: Pick<RequirementResult, 'quantity' | 'of' | 'bound' | 'limit' | 'unit'>): string {
  const { words } = requirementQuantity(quantity as RequirementQuantityName);
  if (typeof limit === 'boolean') return `${of} ${limit ? '' : 'not '}${words}`;
  return `${words} of ${of} at ${bound === 'max' ? 'most' : 'least'} ${withUnit(limit, unit)}`;
}

/** How far a requirement is from its limit, as a cell under "margin": "1.5 times" or "0.12 eV" where it is met, "missed by a factor 6.0e4" or "missed by 0.12 eV" where it is not. */
export function marginWords(row: RequirementResult): string {
  const { margin, margin_kind, margin_unit, met, blocks } = row;
  if (blocks) return met ? 'without end' : 'none, however high the limit';
  if (margin === null) return met ? 'without end' : 'none';
  const missed = verdictWords(row) === 'not met';
  if (margin_kind === 'difference') return missed && margin < 0 ? `missed by ${withUnit(-margin, margin_unit, 3)}` : withUnit(margin, margin_unit, 3);
  if (missed && margin === 0) return 'missed by more than any factor';
  return missed && margin < 1 ? `missed by a factor ${rounded(1 / margin, 3)}` : `${rounded(margin, 3)} times`;
}

/** The same as a part of a sentence: "margin 1.5 times", "missed by 0.12 eV". */
export function standingWords(row: RequirementResult): string {
  const words = marginWords(row);
  return words.startsWith('missed') ? words : `margin ${words}`;
}

/** The number that standingWords tells, in its unit: what it is missed by where it is not met; null of words. */
export function standingFigure(row: RequirementResult): number | null {
  const { margin, margin_kind, blocks } = row;
  if (margin === null || blocks) return null;
  if (verdictWords(row) !== 'not met') return margin;
  if (margin_kind === 'difference') return Math.abs(margin);
  return margin === 0 ? null : margin < 1 ? 1 / margin : margin;
}

/** What a contact without a finite resistivity is said to do. */
export const BLOCKS = 'blocks; no finite resistivity';

/** The worst figure with its unit: "1.2e-7 ohm cm^2", "yes", "blocks; no finite resistivity"; null where there is none. */
export function worstWords({ worst, unit, blocks }: Pick<RequirementResult, 'worst' | 'unit' | 'blocks'>, digits = 4): string | null {
  if (blocks) return BLOCKS;
  if (worst === null) return null;
  return typeof worst === 'boolean' ? (worst ? 'yes' : 'no') : withUnit(worst, unit, digits);
}

/** "no answer at 3 points, first at -40 degC: ..."; null where every point has an answer. */
export function unansweredWords({ unanswered }: Pick<RequirementResult, 'unanswered'>, of: readonly [string, string] = ['point', 'points']): string | null {
  if (unanswered === null) return null;
  const { points, words, reason } = unanswered;
  return `no answer at ${points} ${of[points === 1 ? 0 : 1]}, ${points === 1 ? '' : 'first '}at ${words}: ${reason}`;
}

/** One line a requirement: verdict, limit, worst case and where it is, margin. */
export function verdictLine(row: RequirementResult): string {
  const parts = [`${verdictWords(row).padEnd(9)}  ${requirementWords(row)}`];
  const worst = worstWords(row);
  if (worst !== null && row.at !== null) parts.push(`worst ${worst} at ${row.at.words}`, standingWords(row));
  if (!row.corners_sufficed) parts.push('worse inside the ranges than at their corners');
  const blank = unansweredWords(row);
  if (blank !== null) parts.push(blank);
  return onOneLine(parts.join('; '));
}

/** Names come from the design's author: nothing of them breaks a line, or steers the terminal that it is read in. */
export function onOneLine(text: string): string {
  return text.replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029\u202a-\u202e\u2066-\u2069]+/g, ' ');
}

function withUnit(value: number, unit: string, digits = 4): string {
  return unit === '' ? rounded(value, digits) : `${rounded(value, digits)} ${unit}`;
}

/** Figures above the digits asked for are rounded as well: 72404 to three digits is 72400. */
function rounded(value: number, digits: number): string {
  return writeNumber(Number(value.toPrecision(digits)), Math.max(digits, 5));
}
