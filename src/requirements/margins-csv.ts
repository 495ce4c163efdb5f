import { numberCell, textCell } from '../export/text-cell.ts';
import type { Design } from '../design/types.ts';
import { limitWords, quantityOf, writtenLimits } from './limits.ts';
import type { SizedAnswer } from './size.ts';

/** Scores beyond this are margins without end, or none at all. */
const ENDLESS = 690;

/**
 * The margins of a sizing as CSV after RFC 4180: a row a value looked at, rising, a column a requirement. A margin is in times, met from 1 up, or a difference in the unit that its heading tells, met from 0 up; an
 * empty cell has no answer.
 */
export function marginsCsv({ variable, unit, scan }: Pick<SizedAnswer, 'variable' | 'unit' | 'scan'>, design: Design): string {
  const limits = writtenLimits(design).map((limit) => ({ limit, quantity: quantityOf(limit.requirement.quantity) }));
  const heading = [`${variable}${unit === '' ? '' : ` (${unit})`}`, ...limits.map(({ limit, quantity }) => `${limitWords(limit)}, margin (${quantity?.margin === 'difference' ? quantity.marginUnit || '1' : 'times'})`)];
  const rows = [...scan].sort((a, b) => a.value - b.value).map(({ value, scores }) => [
    numberCell(value),
    ...limits.map(({ quantity }, i) => {
      const score = scores[i] ?? null;
      if (score === null) return '';
      if (quantity?.margin === 'difference') return numberCell(score * quantity.step);
      return score > ENDLESS ? 'Infinity' : numberCell(score < -ENDLESS ? 0 : Math.exp(score));
    }),
  ]);
  return `${[heading.map(textCell), ...rows].map((cells) => cells.map(quoted).join(',')).join('\r\n')}\r\n`;
}

function quoted(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
