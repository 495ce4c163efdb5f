import { writeNumber } from '../quantity/write-quantity.ts';
import { axisShapes, figureAxis, type FigureAxis } from './figure-axis.ts';
import { fitted, textWidth } from './glyph-widths.ts';
import { hatched } from './hatch.ts';
import type { SpreadOptions } from './histogram.ts';
import { unitRuns } from './margin-axes.ts';
import type { Clip, Drawing, Shape } from './shapes.ts';
import { mixed, styleOf, type Style } from './styles.ts';

/** What moves one figure, the strongest input first. */
export interface TornadoPicture {
  /** "cap: sheet resistance" */ label: string;
  unit: string;
  log: boolean;
  nominal: number;
  /** the figure at the low and the high end of each input's tolerance; null without an answer */ bars: readonly { label: string; tolerance: string; low: number | null; high: number | null }[];
  /** where a requirement ends */ limit: number | null;
}

/** Height of a row, px, for whoever makes room. */
export const TORNADO_ROW = 24;
const HEAD = 30;
const FOOT = 40;

export function tornadoHeight(bars: number): number {
  return HEAD + FOOT + Math.max(1, bars) * TORNADO_ROW;
}

/**
 * A tornado: a row an input, its bar from the figure at the low end of the tolerance (hatched) to that at the high end (full), parted at the nominal value.
 *
 * @throws {RangeError} no room, or a nominal value that is no number
 */
export function drawTornado(picture: TornadoPicture, options: SpreadOptions): Drawing {
  const { width, height, prefix = 'tornado' } = options;
  const style = styleOf(options.style ?? 'light');
  const small = style.smallSize;
  const { bars, nominal, log, limit } = picture;
  const area = { left: Math.min(0.42 * width, 15 * small), right: width - 0.8 * small, top: HEAD, bottom: height - FOOT };
  if (!(area.right - area.left >= 60 && area.bottom - area.top >= TORNADO_ROW)) throw new RangeError(`no room for a tornado: ${width} by ${height} px`);
  const ends = bars.flatMap(({ low, high }) => [low, high]).filter((end): end is number => end !== null);
  const axis = figureAxis([nominal, ...ends], log ? 'log' : 'linear', [area.left, area.right], small);
  const step = (area.bottom - area.top) / Math.max(1, bars.length);
  const shapes: Shape[] = [...key(area, style, prefix)];
  const clips: Clip[] = [keyClip(area, style, prefix)];
  bars.forEach((bar, i) => {
    const row = rowShapes(axis, bar, nominal, { y: area.top + i * step, h: step, left: area.left }, style, `${prefix}-${i}`);
    shapes.push(...row.shapes);
    clips.push(...row.clips);
  });
  const inside = limit !== null && limit >= axis.from && limit <= axis.to;
  if (inside) shapes.push({ kind: 'line', role: 'tornado-limit', title: `limit ${writeNumber(limit)}`, x1: axis.x(limit), x2: axis.x(limit), y1: area.top - 4, y2: area.bottom, stroke: style.ink, width: 2.4 });
  shapes.push({ kind: 'line', role: 'tornado-nominal', title: `nominal ${writeNumber(nominal)}`, x1: axis.x(nominal), x2: axis.x(nominal), y1: area.top - 4, y2: area.bottom, stroke: style.ink, width: 1.3, dash: '2 3' });
  const unit = picture.unit === '' ? [] : [{ text: ' (' }, ...unitRuns(picture.unit), { text: ')' }];
  return {
    width, height, background: style.ground, font: style.font, gradients: [], clips,
    shapes: [...shapes, ...axisShapes(axis, area, [{ text: picture.label }, ...unit], style)],
    title: `What moves ${picture.label}`, description: describe(picture),
  };
}

type Bar = TornadoPicture['bars'][number];

const paints = (style: Style) => ({ high: { fill: mixed(style.ground, style.ink, 0.55), stroke: style.ink, width: style.thinWidth }, hatch: { stroke: style.ink, width: 0.9 }, low: { fill: style.ground, stroke: style.ink, width: style.thinWidth } });

function rowShapes(axis: FigureAxis, { label, tolerance, low, high }: Bar, nominal: number, { y, h, left }: { y: number; h: number; left: number }, style: Style, clip: string): { shapes: Shape[]; clips: Clip[] } {
  const small = style.smallSize;
  const paint = paints(style);
  const middle = y + h / 2;
  const text = `${label} ±${tolerance.replace(/^±\s*/, '')}`;
  const shapes: Shape[] = [{ kind: 'text', role: 'tornado-input', title: text, x: left - 8, y: middle + 0.36 * small, size: small, anchor: 'end', runs: [{ text: fitted(text, small, left - 12) }], fill: style.ink }];
  const clips: Clip[] = [];
  // Both ends on one side of the nominal: half the height each, or the longer would hide the shorter.
  const sameSide = low !== null && high !== null && (low - nominal) * (high - nominal) > 0;
  const box = (value: number, half: 0 | 1) => ({
    x: Math.min(axis.x(value), axis.x(nominal)), w: Math.max(Math.abs(axis.x(value) - axis.x(nominal)), 1),
    y: y + 0.15 * h + (sameSide && half === 1 ? 0.35 * h : 0), h: (sameSide ? 0.35 : 0.7) * h,
  });
  if (low !== null) {
    const at = box(low, 0);
    const hatch = hatched(at, { role: 'tornado-hatch', ...paint.hatch }, clip);
    shapes.push({ kind: 'rect', role: 'tornado-low', title: `${label} at its low end: ${writeNumber(low)}`, ...at, ...paint.low }, hatch.shape);
    clips.push(hatch.clip);
  }
  if (high !== null) shapes.push({ kind: 'rect', role: 'tornado-high', title: `${label} at its high end: ${writeNumber(high)}`, ...box(high, 1), ...paint.high });
  const missing = [...(low === null ? ['low'] : []), ...(high === null ? ['high'] : [])];
  if (missing.length > 0) shapes.push({ kind: 'text', role: 'tornado-missing', x: axis.x(nominal) + 6, y: middle + 0.36 * small, size: small, anchor: 'start', runs: [{ text: `no answer at the ${missing.join(' and the ')} end` }], fill: style.trouble });
  return { shapes, clips };
}

const KEY_BOX = { w: 22, h: 10 } as const;

function keyClip(area: { left: number }, _style: Style, prefix: string): Clip {
  return { id: `${prefix}-key`, x: keyLeft(area), y: 6, ...KEY_BOX };
}

const keyLeft = ({ left }: { left: number }): number => left;

/** Which end is which, in the head of the picture. */
function key(area: { left: number; right: number }, style: Style, prefix: string): Shape[] {
  const small = style.smallSize;
  const paint = paints(style);
  const x = keyLeft(area);
  const word = (text: string, at: number): Shape => ({ kind: 'text', role: 'tornado-key-word', x: at, y: 15, size: small, anchor: 'start', runs: [{ text }], fill: style.ink });
  const second = x + KEY_BOX.w + 6 + textWidth('low end', small) + 14;
  return [
    { kind: 'rect', role: 'tornado-key', x, y: 6, ...KEY_BOX, ...paint.low },
    hatched({ x, y: 6, ...KEY_BOX }, { role: 'tornado-key', ...paint.hatch }, `${prefix}-key`).shape,
    word('low end', x + KEY_BOX.w + 6),
    { kind: 'rect', role: 'tornado-key', x: second, y: 6, ...KEY_BOX, ...paint.high },
    word('high end', second + KEY_BOX.w + 6),
  ];
}

function describe({ label, unit, nominal, bars }: TornadoPicture): string {
  const with_ = (value: number | null): string => (value === null ? 'no answer' : `${writeNumber(value)}${unit === '' ? '' : ` ${unit}`}`);
  return `What moves ${label}, nominal ${with_(nominal)}: ${bars.map((bar) => `${bar.label} ${with_(bar.low)} to ${with_(bar.high)}`).join('; ') || 'nothing'}`;
}
