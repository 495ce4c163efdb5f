import { ticks as evenTicks, tickStep } from 'd3-array';
import { powerOfTen } from './figures.ts';
import { runsWidth } from './glyph-widths.ts';
import type { Shape, TextRun } from './shapes.ts';
import type { Style } from './styles.ts';

/** An axis along which one figure lies, even in its value or in its logarithm. */
export interface FigureAxis {
  from: number;
  to: number;
  log: boolean;
  x(value: number): number;
  ticks: { at: number; runs: TextRun[] }[];
}

/** Room at both ends, of the span. */
const ROOM = 0.06;
/** A figure that does not move at all gets this share of itself on both sides. */
const LEAST = 1e-3;

/**
 * An axis that holds the values.
 *
 * @param values  finite, at least one; an axis of the logarithm needs all of them positive, else it is even in the value
 * @param pixels  left and right end, px
 * @param size    of the ticks' text, px: as many as have room
 */
export function figureAxis(values: readonly number[], wish: 'linear' | 'log', pixels: readonly [number, number], size: number): FigureAxis {
  if (values.length === 0 || !values.every(Number.isFinite)) throw new RangeError('an axis needs finite values');
  const log = wish === 'log' && values.every((value) => value > 0);
  const on = (value: number): number => (log ? Math.log(value) : value);
  let [low, high] = [Math.min(...values.map(on)), Math.max(...values.map(on))];
  const least = log ? LEAST : LEAST * Math.max(Math.abs(low), Math.abs(high)) || LEAST;
  if (high - low <= 1e-12 * Math.max(Math.abs(high), Math.abs(low))) [low, high] = [low - least, high + least];
  const room = ROOM * (high - low);
  [low, high] = [low - room, high + room];
  const [left, right] = pixels;
  const off = (at: number): number => (log ? Math.exp(at) : at);
  const count = Math.max(2, Math.floor((right - left) / (6.5 * size)));
  return {
    from: off(low), to: off(high), log, ticks: ticksOf(off(low), off(high), log, count),
    x: (value) => left + ((on(value) - low) / (high - low)) * (right - left),
  };
}

function ticksOf(from: number, to: number, log: boolean, count: number): FigureAxis['ticks'] {
  if (log && Math.log10(to / from) >= 1.5) {
    const first = Math.ceil(Math.log10(from) - 1e-9);
    const last = Math.floor(Math.log10(to) + 1e-9);
    const every = Math.max(1, Math.ceil((last - first + 1) / count));
    return Array.from({ length: last - first + 1 }, (_, i) => first + i).map((decade) => ({ at: 10 ** decade, runs: (decade - first) % every === 0 ? powerOfTen(10 ** decade) : [] }));
  }
  const exponent = commonExponent(Math.max(Math.abs(from), Math.abs(to)));
  const step = tickStep(from, to, count) / 10 ** exponent;
  const decimals = Math.min(15, Math.max(0, -Math.floor(Math.log10(step) + 1e-9)));
  return evenTicks(from, to, count).map((at) => {
    const text = (at / 10 ** exponent).toFixed(decimals).replace(/^-(?=[0.]*$)/, '').replace('-', '−');
    return { at, runs: exponent === 0 || Number(at) === 0 ? [{ text }] : [{ text: `${text}\u2009×\u200910` }, { text: String(exponent).replace('-', '−'), script: 'super' }] };
  });
}

/** What figures of this size share, so that their digits tell them apart: "1.25 × 10^19" beside "1.30 × 10^19". */
function commonExponent(size: number): number {
  return size === 0 || (size >= 1e-3 && size < 1e5) ? 0 : Math.floor(Math.log10(size));
}

/** The axis drawn under an area: line, ticks and those of their figures that do not touch. */
export function axisShapes(axis: FigureAxis, area: { left: number; right: number; bottom: number }, title: TextRun[], style: Style): Shape[] {
  const small = style.smallSize;
  const line = { role: 'figure-axis', stroke: style.faint, width: style.thinWidth } as const;
  const shapes: Shape[] = [{ kind: 'line', ...line, x1: area.left, x2: area.right, y1: area.bottom, y2: area.bottom }];
  // Room to the right of the area, as the pictures leave it.
  const margin = 0.7 * small;
  let free = -Infinity;
  for (const { at, runs } of axis.ticks) {
    const x = axis.x(at);
    shapes.push({ kind: 'line', ...line, x1: x, x2: x, y1: area.bottom, y2: area.bottom + (runs.length > 0 ? 5 : 3) });
    const half = runsWidth(runs, small) / 2;
    if (runs.length === 0 || x - half < free || x + half > area.right + margin) continue;
    free = x + half + 6;
    shapes.push({ kind: 'text', role: 'figure-tick', x, y: area.bottom + 6 + small, size: small, anchor: 'middle', runs, fill: style.ink });
  }
  shapes.push({ kind: 'text', role: 'figure-title', x: Math.max(Math.min((area.left + area.right) / 2, area.right + margin - runsWidth(title, small) / 2), runsWidth(title, small) / 2), y: area.bottom + 2.8 * small, size: small, anchor: 'middle', runs: title, fill: style.ink });
  return shapes;
}
