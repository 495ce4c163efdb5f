import { evaluate } from '../../src/workings/expression.ts';
import type { Known } from '../../src/workings/known.ts';
import { RESULT_DIGITS, readPrinted, shown, type Step } from '../../src/workings/step.ts';
import type { Workings } from '../../src/workings/workings.ts';

export const everyStep = (w: Workings): Step[] => [...w.steps, ...(w.simpler?.steps ?? [])];

/** What a formula gives for the numbers as they stand on the page. */
export function byHand(step: Exclude<Step, { kind: 'law' }>): { mine: number; its: number } {
  const page = shown(step);
  const values = new Map<Known, number>(page.symbols.map(({ known, value }) => [known, readPrinted(value) * known.scale]));
  const of = (known: Known): number => values.get(known)!;
  if (step.kind === 'equation') return { mine: evaluate(step.left, of), its: evaluate(step.right, of) };
  return { mine: evaluate(step.formula, of), its: readPrinted(page.result!.value) * step.result.scale };
}

/** The two agree to the printed digits: one unit of the last, since each may be rounded. */
export function closeToDigits(a: number, b: number): boolean {
  return a === b || Math.abs(a - b) <= 1.01 * 10 ** (1 - RESULT_DIGITS) * 10 ** Math.floor(Math.log10(Math.max(Math.abs(a), Math.abs(b))));
}

/** The figure that the last line gives, in the unit that is shown. */
export function lastOf(w: Workings): number | null {
  const last = w.steps.findLast((s) => s.kind !== 'law');
  return last === undefined ? null : last.result.value / last.result.scale;
}

/** Lines whose printed numbers do not give the printed result, in words. */
export function wrongLines(name: string, w: Workings): string[] {
  return everyStep(w).flatMap((step) => {
    if (step.kind === 'law') return [];
    const { mine, its } = byHand(step);
    return closeToDigits(mine, its) ? [] : [`${name}: ${w.title}: ${shown(step).text}: ${mine} against ${its}`];
  });
}
