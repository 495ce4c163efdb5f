import { numberCell, textCell } from '../export/text-cell.ts';
import type { SweepPlan, SweepPoint } from './sweep.ts';

/** The heading row: each axis and figure with its unit; the last column says why a row has no figures. */
export function sweepCsvHeading(plan: SweepPlan): string {
  const axes = plan.axes.map(({ place, unit }) => withUnit(place.words, unit));
  const figures = plan.figures.map(({ words, unit }) => withUnit(words, unit));
  return record([...axes, ...figures, 'no figures because'].map(textCell));
}

/** Rows of the points in order of their index, after RFC 4180, numbers with all their digits; a gap has empty cells and its reason. */
export function sweepCsvRows(plan: SweepPlan, points: ReadonlyMap<number, SweepPoint>): string {
  return [...points].sort(([a], [b]) => a - b).map(([index, point]) => {
    let left = index;
    const axes = plan.axes.map(({ values }) => {
      const value = values[left % values.length];
      left = Math.floor(left / values.length);
      return numberCell(value);
    });
    const figures = plan.figures.map((_, f) => numberCell('gap' in point ? null : point.values[f]));
    return record([...axes, ...figures, 'gap' in point ? textCell(point.gap) : '']);
  }).join('');
}

const withUnit = (words: string, unit: string): string => (unit === '' ? words : `${words} (${unit})`);

function record(cells: readonly string[]): string {
  return `${cells.map((cell) => (/[",\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell)).join(',')}\r\n`;
}
