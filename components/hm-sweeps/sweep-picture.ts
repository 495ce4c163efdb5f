import type { ContourPicture } from '../../src/drawing/contour-map.ts';
import type { PlotAxis } from '../../src/drawing/plot-frame.ts';
import type { SweepPicture } from '../../src/drawing/sweep-plot.ts';
import type { Design } from '../../src/design/types.ts';
import { readVariables } from '../../src/design/variables.ts';
import { readQuantity } from '../../src/quantity/read-quantity.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';
import type { Axis } from '../../src/sweep/axis.ts';
import { unitFactor } from '../../src/sweep/places.ts';
import type { SweepPlan, SweepResult } from '../../src/sweep/sweep.ts';
import { textAt } from './sweep-choices.ts';

export const plotAxis = ({ place, unit, scale, values }: Axis): PlotAxis => ({ words: place.words, unit, scale, from: values[0], to: values[values.length - 1] });

/** The value of an axis that the design has, in the axis' unit; null where it cannot be read. */
export function nowOn(design: Design, { place, unit }: Axis): { value: number; text: string } | null {
  const text = textAt(design, place.name);
  if (text === '') return null;
  const reading = readQuantity(place.kind === 'number' && Number.isFinite(Number(text)) ? Number(text) : text, place.kind, readVariables(design.variables ?? []).scope);
  if (!reading.ok) return null;
  const factor = unit === '' ? 1 : unitFactor(unit, place.kind);
  return factor === null ? null : { value: reading.value / factor, text: withUnit(reading.value / factor, unit) };
}

export function plotPicture(plan: SweepPlan, { figures, gaps }: SweepResult, design: Design): SweepPicture {
  const [axis] = plan.axes;
  return { axis: plotAxis(axis), values: axis.values, curves: figures.map(({ words, unit, log, values }) => ({ label: words, unit, log, values })), gaps, now: nowOn(design, axis) };
}

export function mapPicture(plan: SweepPlan, { figures, gaps }: SweepResult, shown: number, design: Design): ContourPicture {
  const [x, y] = plan.axes;
  const { words, unit, log, values } = figures[shown];
  const now = [nowOn(design, x), nowOn(design, y)];
  return { x: plotAxis(x), y: plotAxis(y), columns: x.values.length, rows: y.values.length, figure: { label: words, unit, log, values }, gaps, now: now[0] && now[1] ? { x: now[0].value, y: now[1].value } : null };
}

export const withUnit = (value: number, unit: string): string => `${writeNumber(value, 4)}${unit === '' ? '' : ` ${unit}`}`;

/** Digits that a point is read by; more only where its neighbours lie so near that it would move by more than this share of the way to them. */
const READ_DIGITS = 4;
const MOST_SHIFT = 0.05;

/**
 * A point of an axis as text for the design: an end as it was given, one between as the cursor reads it, with as many digits more as a fine sweep needs.
 */
export function putText({ values, unit, texts }: Pick<Axis, 'values' | 'unit' | 'texts'>, at: number): string {
  if (at === 0 || at === values.length - 1) return texts[at];
  const value = values[at];
  const nearest = Math.min(value - values[at - 1], values[at + 1] - value);
  let digits = READ_DIGITS;
  while (digits < 15 && Math.abs(Number(value.toPrecision(digits)) - value) > MOST_SHIFT * nearest) digits++;
  // Of 12 350 four digits are its value, five its text.
  return `${writeNumber(Number(value.toPrecision(digits)), Math.max(digits, 5))}${unit === '' ? '' : ` ${unit}`}`;
}

/** Where each axis stands at a point. */
export function placeOf(plan: SweepPlan, index: number): { axis: Axis; at: number }[] {
  let left = index;
  return plan.axes.map((axis) => {
    const at = left % axis.values.length;
    left = Math.floor(left / axis.values.length);
    return { axis, at };
  });
}

/** "temperature 77 K, Ncap 1e18 cm^-3" */
export function placeWords(plan: SweepPlan, index: number): string {
  return placeOf(plan, index).map(({ axis, at }) => `${axis.place.words} ${withUnit(axis.values[at], axis.unit)}`).join(', ');
}

/** What a figure is at a point, or why it is not. */
export function figureText({ figures, gaps }: SweepResult, figure: number, index: number): string {
  const value = figures[figure].values[index];
  if (value !== null && value !== undefined) return withUnit(value, figures[figure].unit);
  return gaps.some((gap) => gap.index === index) ? 'no answer' : 'none';
}

/** Gaps with the same reason in one line: "at 4 K and 6 K: …". */
export function gapLines(plan: SweepPlan, { gaps }: SweepResult): string[] {
  const byReason = new Map<string, number[]>();
  for (const { index, reason } of gaps) byReason.set(reason, [...(byReason.get(reason) ?? []), index]);
  return [...byReason].map(([reason, list]) => {
    const shown = list.slice(0, 3).map((index) => placeWords(plan, index));
    const more = list.length > 3 ? ` and ${list.length - 3} more` : '';
    return `No answer at ${shown.join('; ')}${more}: ${reason.replace(/^no accepted answer: /, '')}.`;
  });
}
