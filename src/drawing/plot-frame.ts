import { ticks as evenTicks } from 'd3-array';
import { runsWidth } from './glyph-widths.ts';
import { figureRuns, unitRuns, valueTicks, type Tick } from './margin-axes.ts';
import type { Shape, TextRun, TextShape } from './shapes.ts';
import type { Style } from './styles.ts';

/** What runs along an axis of a plot. */
export interface PlotAxis {
  words: string;
  /** '' for a pure number */ unit: string;
  scale: 'linear' | 'log';
  from: number;
  /** above `from` */ to: number;
}

export interface PlotArea {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

/** Place of a value between two ends of an axis, px. */
export function alongAxis({ scale, from, to }: PlotAxis, start: number, end: number): (value: number) => number {
  return scale === 'log' ? (value) => start + ((end - start) * Math.log(value / from)) / Math.log(to / from) : (value) => start + ((end - start) * (value - from)) / (to - from);
}

/** Ticks of an axis; a logarithmic one of less than a decade has even ones, since 1, 2 and 5 may all lie outside. */
export function axisTicks({ scale, from, to }: PlotAxis, count: number): Tick[] {
  if (scale === 'log' && to / from < 10) return evenTicks(from, to, count).map((at) => ({ at, runs: figureRuns(at) }));
  return valueTicks(from, to, scale, count);
}

/** "temperature (K)" with the unit's exponents set high. */
export function axisTitle(words: string, unit: string): TextRun[] {
  return [{ text: words }, ...(unit === '' ? [] : [{ text: ' (' }, ...unitRuns(unit), { text: ')' }])];
}

const ink = (style: Style, role: string, x: number, y: number, anchor: TextShape['anchor'], runs: TextRun[], rotate?: number): TextShape => ({
  kind: 'text', role, x, y, size: style.smallSize, anchor, runs, fill: style.ink, ...(rotate === undefined ? {} : { rotate }),
});

/** The axis under an area: line, ticks whose figures keep clear of each other, title. */
export function footAxis(axis: PlotAxis, area: PlotArea, style: Style, role: string): Shape[] {
  const small = style.smallSize;
  const x = alongAxis(axis, area.left, area.right);
  const line = { role: `${role}-axis`, stroke: style.faint, width: style.thinWidth } as const;
  const shapes: Shape[] = [{ kind: 'line', ...line, x1: area.left, x2: area.right, y1: area.bottom, y2: area.bottom }];
  let free = -Infinity;
  for (const { at, runs } of axisTicks(axis, Math.max(2, Math.floor((area.right - area.left) / (7 * small))))) {
    const px = x(at);
    shapes.push({ kind: 'line', ...line, x1: px, x2: px, y1: area.bottom, y2: area.bottom + (runs.length > 0 ? 5 : 3) });
    const half = runsWidth(runs, small) / 2;
    if (runs.length === 0 || px - half < free) continue;
    free = px + half + 6;
    shapes.push(ink(style, `${role}-x-tick`, px, area.bottom + 6 + small, 'middle', runs));
  }
  shapes.push(ink(style, `${role}-x-title`, (area.left + area.right) / 2, area.bottom + 2.9 * small, 'middle', axisTitle(axis.words, axis.unit)));
  return shapes;
}

/** Ticks of an upright axis of a height, px. */
const uprightTicks = (axis: PlotAxis, height: number, style: Style): Tick[] => axisTicks(axis, Math.max(2, Math.floor(height / (3.2 * style.smallSize))));

/** Room on the left that the figures of an upright axis take, px. */
export function sideRoom(axis: PlotAxis, height: number, style: Style): number {
  return uprightTicks(axis, height, style).reduce((room, { runs }) => Math.max(room, runsWidth(runs, style.smallSize)), 2.6 * style.smallSize) + 10;
}

/** The axis on the left of an area: line and ticks; its title stands upright beside it where it is given. */
export function sideAxis(axis: PlotAxis, area: PlotArea, style: Style, role: string, title: TextRun[] | null = null): Shape[] {
  const small = style.smallSize;
  const y = alongAxis(axis, area.bottom, area.top);
  const line = { role: `${role}-axis`, stroke: style.faint, width: style.thinWidth } as const;
  const shapes: Shape[] = [{ kind: 'line', ...line, x1: area.left, x2: area.left, y1: area.top, y2: area.bottom }];
  let free = Infinity;
  for (const { at, runs } of uprightTicks(axis, area.bottom - area.top, style)) {
    const py = y(at);
    shapes.push({ kind: 'line', ...line, x1: area.left - (runs.length > 0 ? 4 : 2), x2: area.left, y1: py, y2: py });
    if (runs.length === 0 || py > free) continue;
    free = py - 1.3 * small;
    shapes.push(ink(style, `${role}-y-tick`, area.left - 7, py + 0.36 * small, 'end', runs));
  }
  if (title) shapes.push(ink(style, `${role}-y-title`, 1.1 * small, (area.top + area.bottom) / 2, 'middle', title, -90));
  return shapes;
}
