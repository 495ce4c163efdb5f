import { ticks as evenTicks } from 'd3-array';
import { writeNumber } from '../quantity/write-quantity.ts';
import { powerOfTen } from './figures.ts';
import type { TextRun } from './shapes.ts';

/** How the margin of a curve is told: as a factor, or as a difference in steps of its own that weigh as much as a factor e. */
export type MarginMeasure = { kind: 'ratio' } | { kind: 'difference'; /** in `unit` */ step: number; unit: string };

export interface Tick {
  /** in the axis' own measure */ at: number;
  /** empty for a mark without a figure */ runs: TextRun[];
}

/** Most decades that a factor is shown to: what lies farther off is off the picture, and said to be. */
const MOST = Math.log(1e3);
/** Least of the picture on both sides of the limit, so that a line near it is seen to be near. */
const LEAST = Math.log(2);

/**
 * The window of scores that a picture of margins shows: the limit (0) and as much of the scores as tells something.
 *
 * @param scores   finite ones of all curves
 * @param nearest  the best least score; a nearest miss is always in the picture
 */
export function scoreWindow(scores: readonly number[], nearest: number | null): [number, number] {
  let low = -LEAST;
  let high = LEAST;
  for (const score of scores) {
    low = Math.min(low, Math.max(score, -MOST));
    high = Math.max(high, Math.min(score, MOST));
  }
  if (nearest !== null) [low, high] = [Math.min(low, nearest), Math.max(high, nearest)];
  const room = 0.08 * (high - low);
  return [low - room, high + room];
}

/** Ticks of factors within a window of their logarithms. */
export function ratioTicks([low, high]: readonly [number, number], count = 7): Tick[] {
  const decades = (high - low) / Math.LN10;
  if (decades < 1.5) return evenTicks(Math.exp(low), Math.exp(high), count).filter((factor) => factor > 0).map((factor) => ({ at: Math.log(factor), runs: [{ text: `×${writeNumber(factor, 3)}` }] }));
  const every = Math.max(1, Math.ceil(decades / count));
  const out: Tick[] = [];
  for (let decade = Math.ceil(low / Math.LN10); decade <= high / Math.LN10; decade++) {
    // The limit itself is a tick whichever others are left out.
    if (decade % every === 0) out.push({ at: decade * Math.LN10, runs: decade === 0 ? [{ text: '×1' }] : [{ text: '×' }, ...figureRuns(10 ** decade)] });
  }
  return out;
}

/** Ticks of differences within a window of scores. */
export function differenceTicks([low, high]: readonly [number, number], step: number, count = 7): Tick[] {
  return evenTicks(low * step, high * step, count).map((margin) => ({ at: margin / step, runs: [{ text: `${margin > 0 ? '+' : ''}${writeNumber(margin, 3)}`.replace('-', '−') }] }));
}

/** Ticks of a variable between two values. */
export function valueTicks(from: number, to: number, scale: 'linear' | 'log', count = 6): Tick[] {
  if (scale === 'linear') return evenTicks(from, to, count).map((at) => ({ at, runs: figureRuns(at) }));
  const out: Tick[] = [];
  const decades = Math.log10(to / from);
  for (let decade = Math.floor(Math.log10(from)); decade <= Math.log10(to); decade++) {
    for (let digit = 1; digit < 10; digit++) {
      const at = digit * 10 ** decade;
      if (at < from * (1 - 1e-9) || at > to * (1 + 1e-9)) continue;
      const named = digit === 1 ? decade % Math.ceil(decades / count) === 0 : decades < 2.5 && (digit === 2 || digit === 5);
      out.push({ at, runs: named ? figureRuns(at) : [] });
    }
  }
  return out;
}

/** A number as it is set on an axis: plain where that is short. */
export function figureRuns(value: number): TextRun[] {
  const size = Math.abs(value);
  if (value === 0 || (size >= 1e-3 && size < 1e5)) return [{ text: writeNumber(value, 4).replace('-', '−') }];
  return powerOfTen(value);
}

/** "cm^-3" with its exponent set high. */
export function unitRuns(unit: string): TextRun[] {
  return unit.split(/(\^-?\d+)/).filter((part) => part !== '').map((part): TextRun => (part.startsWith('^') ? { text: part.slice(1).replace('-', '−'), script: 'super' } : { text: part }));
}
