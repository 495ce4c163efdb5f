import type { Variable } from '../../src/design/types.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';

/** Where a variable stands in its range, for a slider. */
export interface Slider {
  unit: string;
  /** ends of the range, in the unit; from < to */ from: number;
  to: number;
  /** even steps of the logarithm: the range spans more than a decade */ log: boolean;
  /** 0..1; values outside the range lie at its ends */ at: number;
}

/** Positions of the slider from end to end: a step is a third of a percent of a decade where the range has three. */
export const STEPS = 600;

/** @returns null where there is no range, or where the range and the value are not plain numbers of one unit with from < to */
export function sliderOf(variable: Variable): Slider | null {
  const texts = variable.range === undefined ? null : [variable.value, ...variable.range].map(plain);
  if (texts === null) return null;
  const [value, from, to] = texts;
  if (value === null || from === null || to === null || value.unit !== from.unit || from.unit !== to.unit || !(from.number < to.number)) return null;
  const log = from.number > 0 && to.number > 10 * from.number;
  const scale = (x: number): number => (log ? Math.log(Math.max(x, from.number)) : x);
  const at = (scale(value.number) - scale(from.number)) / (scale(to.number) - scale(from.number));
  return { unit: from.unit, from: from.number, to: to.number, log, at: Math.min(Math.max(at, 0), 1) };
}

/** The text of a value at a position, 0..1, to three digits; the ends are the ends exactly. */
export function textAt({ unit, from, to, log }: Slider, at: number): string {
  const number = at <= 0 ? from : at >= 1 ? to : Number((log ? from * (to / from) ** at : from + (to - from) * at).toPrecision(3));
  return `${writeNumber(number, 6)}${unit === '' ? '' : ` ${unit}`}`;
}

function plain(text: string): { number: number; unit: string } | null {
  const found = /^\s*([+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?)\s*([^\d\s*/+.-].*)?$/i.exec(text);
  if (found === null) return null;
  return { number: Number(found[1]), unit: (found[2] ?? '').trim() };
}
