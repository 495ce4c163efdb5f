import type { SizedAnswer, SizedEdge } from '../../src/requirements/size.ts';
import { standingWords, unansweredWords, verdictWords, worstWords } from '../../src/requirements/verdict.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';

/** What came out, in one sentence that is also spoken. */
export function outcomeWords({ variable, intervals, best, blockers }: SizedAnswer): string {
  if (intervals.length > 0) {
    const spans = intervals.map(({ from, to }) => (from.text === to.text ? `at ${from.text}` : `from ${from.text} to ${to.text}`));
    return `Everything is met with ${variable} ${spans.join(', and ')}.`;
  }
  if (best === null) return `There is no accepted answer at any value of ${variable} in this range.`;
  return `No value of ${variable} in this range meets everything. The nearest is ${best.text}, with ${blockers.length} not met.`;
}

/** Where an interval ends and why, from its lower or upper side. */
export function edgeWords({ text, reason, requirement, at }: SizedEdge, side: 'below' | 'above'): string {
  if (reason === 'range') return `${text} is the end of the range searched: it may go on ${side} it.`;
  const where = at === null ? '' : `, at ${at}`;
  if (reason === 'no answer') return `${side === 'below' ? 'Below' : 'Above'} ${text} there is no answer for ${requirement?.words ?? 'a requirement'}${where}.`;
  return `${side === 'below' ? 'Below' : 'Above'} ${text} it fails on ${requirement === null ? 'a requirement' : `requirement ${requirement.index + 1}`}${where}.`;
}

/** "met, margin 2.5 times; worst 4e-7 ohm cm^2 at -40 degC" of a requirement at a value. */
export function marginLine(row: RequirementResult): string {
  const at = row.at === null ? '' : `${row.blocks ? `: ${worstWords(row)}` : ''} at ${row.at.words}`;
  const blank = row.unanswered === null ? '' : `; ${unansweredWords(row, ['corner', 'corners'])}`;
  return `${verdictWords(row)}, ${standingWords(row)}${at}${blank}`;
}

/** What stands against the nearest miss, and by how much. */
export function blockerWords({ blockers, best }: SizedAnswer): { index: number; words: string }[] {
  return blockers.map(({ index, met_somewhere }) => {
    const row = best?.requirements[index];
    const elsewhere = met_somewhere ? 'Other values in the range meet it, but not together with the rest.' : 'No value in the range meets it.';
    return { index, words: `${row === undefined ? '' : lackWords(row)}${elsewhere}` };
  });
}

function lackWords({ margin, margin_kind, margin_unit }: RequirementResult): string {
  if (margin === null || !(margin_kind === 'ratio' ? margin > 0 && margin < 1 : margin < 0)) return '';
  return margin_kind === 'ratio' ? `It lacks a factor of ${writeNumber(1 / margin, 3)}. ` : `It lacks ${`${writeNumber(-margin, 3)} ${margin_unit}`.trim()}. `;
}
