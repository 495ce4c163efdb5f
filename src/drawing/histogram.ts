import type { Histogram } from '../tolerance/statistics.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import { axisShapes, figureAxis, type FigureAxis } from './figure-axis.ts';
import { hatched } from './hatch.ts';
import { fitted, textWidth } from './glyph-widths.ts';
import { unitRuns } from './margin-axes.ts';
import type { Clip, Drawing, Shape } from './shapes.ts';
import { mixed, styleOf, type Style, type StyleName } from './styles.ts';

/** How one figure is spread over the variations. */
export interface HistogramPicture {
  /** "cap: sheet resistance" */ label: string;
  unit: string;
  histogram: Histogram;
  /** of the design as it stands */ nominal: number | null;
  /** 95 of 100 variations lie between them */ middle: readonly [number, number] | null;
  /** where a requirement ends */ limit: { value: number; bound: 'max' | 'min' } | null;
}

export interface SpreadOptions {
  width: number;
  height: number;
  style?: StyleName;
  /** of the ids in this drawing */ prefix?: string;
}

/** A limit farther from the values than this, of their span, stands outside the picture, and an arrow says so. */
const FAR = 1.5;

/**
 * A histogram: bars of counts, the nominal value dotted, the middle 95 % bracketed, and a limit as a heavy line with the side that does not meet it hatched.
 *
 * @throws {RangeError} no room, or no values
 */
export function drawHistogram(picture: HistogramPicture, options: SpreadOptions): Drawing {
  const { width, height, prefix = 'histogram' } = options;
  const style = styleOf(options.style ?? 'light');
  const small = style.smallSize;
  const { histogram, nominal, middle, limit } = picture;
  const area = { left: 3.6 * small, right: width - 0.8 * small, top: 4.4 * small, bottom: height - 3.4 * small };
  if (!(area.right - area.left >= 60 && area.bottom - area.top >= 40)) throw new RangeError(`no room for a histogram: ${width} by ${height} px`);
  const { edges, counts } = histogram;
  const inside = [edges[0], edges[edges.length - 1], ...(nominal === null ? [] : [nominal])];
  const near = limit !== null && isNear(limit.value, inside, histogram.log);
  const axis = figureAxis(near ? [...inside, limit.value] : inside, histogram.log ? 'log' : 'linear', [area.left, area.right], small);
  const most = Math.max(...counts);
  const y = (count: number): number => area.bottom - (count / most) * (area.bottom - area.top);
  const beyond = limit === null ? null : beyondLimit(axis, area, limit, style, `${prefix}-beyond`);
  return {
    width, height, background: style.ground, font: style.font, gradients: [], clips: beyond?.clips ?? [],
    shapes: [
      ...(beyond?.shapes ?? []),
      ...bars(axis, counts, edges, y, area, style),
      ...(beyond?.words ?? []),
      ...countAxis(most, y, area, style),
      ...(middle === null ? [] : bracket(axis, middle, area, style)),
      ...(nominal === null ? [] : upright(axis.x(nominal), area, { role: 'histogram-nominal', text: `nominal ${writeNumber(nominal)}`, row: 1 }, style)),
      ...(limit === null ? [] : limitMark(axis, limit, near, area, style)),
      ...axisShapes(axis, area, titleRuns(picture), style),
    ],
    title: `Spread of ${picture.label}`,
    description: describe(picture),
  };
}

type Area = { left: number; right: number; top: number; bottom: number };

function titleRuns({ label, unit }: HistogramPicture) {
  return unit === '' ? [{ text: label }] : [{ text: `${label} (` }, ...unitRuns(unit), { text: ')' }];
}

function isNear(limit: number, values: readonly number[], log: boolean): boolean {
  if (log && limit <= 0) return false;
  const on = (value: number): number => (log ? Math.log(value) : value);
  const [low, high] = [Math.min(...values.map(on)), Math.max(...values.map(on))];
  const span = Math.max(high - low, 1e-3 * Math.max(1e-12, Math.abs(high)));
  return on(limit) > low - FAR * span && on(limit) < high + FAR * span;
}

function bars(axis: FigureAxis, counts: readonly number[], edges: readonly number[], y: (count: number) => number, area: Area, style: Style): Shape[] {
  return counts.flatMap((count, i): Shape[] => {
    if (count === 0) return [];
    let [left, right] = [axis.x(edges[i]), axis.x(edges[i + 1])];
    // One value for all: a bar that can be seen.
    if (right - left < 3) [left, right] = [left - 4, right + 4];
    return [{
      kind: 'rect', role: 'histogram-bar', title: `${count} from ${writeNumber(edges[i])} to ${writeNumber(edges[i + 1])}`, x: left, y: y(count), w: right - left, h: area.bottom - y(count),
      fill: mixed(style.ground, style.occupancy, 0.3), stroke: style.ink, width: style.thinWidth,
    }];
  });
}

function countAxis(most: number, y: (count: number) => number, area: Area, style: Style): Shape[] {
  const small = style.smallSize;
  const half = Math.round(most / 2);
  const marks = [...new Set([0, ...(half > 0 && half < most ? [half] : []), most])];
  return [
    { kind: 'line', role: 'histogram-counts', x1: area.left, x2: area.left, y1: area.top, y2: area.bottom, stroke: style.faint, width: style.thinWidth },
    ...marks.map((count): Shape => ({ kind: 'text', role: 'histogram-count', x: area.left - 5, y: y(count) + 0.36 * small, size: small, anchor: 'end', runs: [{ text: String(count) }], fill: style.ink })),
  ];
}

/** The middle 95 % as a bracket under the bars' top. */
function bracket(axis: FigureAxis, [low, high]: readonly [number, number], area: Area, style: Style): Shape[] {
  const [left, right] = [axis.x(low), axis.x(high)];
  const y = area.top - 6;
  const end = (x: number): Shape => ({ kind: 'line', role: 'histogram-middle', x1: x, x2: x, y1: y - 4, y2: y + 4, stroke: style.ink, width: 1.2 });
  return [{ kind: 'line', role: 'histogram-middle', title: `95 % from ${writeNumber(low)} to ${writeNumber(high)}`, x1: left, x2: right, y1: y, y2: y, stroke: style.ink, width: 1.2 }, end(left), end(right)];
}

/** Rows of words above the picture: the limit highest, the nominal value under it. */
function upright(x: number, area: Area, { role, text, row }: { role: string; text: string; row: 0 | 1 }, style: Style): Shape[] {
  const small = style.smallSize;
  const base = row === 0 ? area.top - 2.9 * small : area.top - 1.5 * small;
  const word = fitted(text, small, area.right - area.left);
  const half = textWidth(word, small) / 2;
  const middle = Math.min(Math.max(x, area.left + half), area.right - half);
  const heavy = role === 'histogram-limit';
  return [
    { kind: 'line', role, title: text, x1: x, x2: x, y1: base + 3, y2: area.bottom, stroke: style.ink, width: heavy ? 2.4 : 1.3, ...(heavy ? {} : { dash: '2 3' }) },
    { kind: 'text', role: `${role}-word`, x: middle, y: base, size: small, anchor: 'middle', runs: [{ text: word }], fill: style.ink, ...(heavy ? { weight: 'bold' as const } : {}) },
  ];
}

function limitText({ value, bound }: NonNullable<HistogramPicture['limit']>): string {
  return `${bound === 'max' ? 'at most' : 'at least'} ${writeNumber(value)}`;
}

function limitMark(axis: FigureAxis, limit: NonNullable<HistogramPicture['limit']>, near: boolean, area: Area, style: Style): Shape[] {
  if (near) return upright(axis.x(limit.value), area, { role: 'histogram-limit', text: limitText(limit), row: 0 }, style);
  const right = limit.value > axis.to;
  const text = right ? `${limitText(limit)} →` : `← ${limitText(limit)}`;
  return [{ kind: 'text', role: 'histogram-limit-far', x: right ? area.right : area.left, y: area.top - 2.9 * style.smallSize, size: style.smallSize, anchor: right ? 'end' : 'start', runs: [{ text }], fill: style.ink, weight: 'bold' }];
}

/** The part of the picture where the requirement is not met. */
function beyondLimit(axis: FigureAxis, area: Area, { value, bound }: NonNullable<HistogramPicture['limit']>, style: Style, clip: string): { shapes: Shape[]; words: Shape[]; clips: Clip[] } | null {
  const at = axis.log && value <= 0 ? area.left : Math.min(Math.max(axis.x(value), area.left), area.right);
  const box = { x: bound === 'max' ? at : area.left, y: area.top, w: bound === 'max' ? area.right - at : at - area.left, h: area.bottom - area.top };
  if (box.w < 1) return null;
  const hatch = hatched(box, { role: 'histogram-beyond', title: 'not met here', stroke: mixed(style.ground, style.trouble, 0.55), width: 0.9 }, clip);
  const small = style.smallSize;
  // In the outer corner, where bars are lowest.
  const wide = textWidth('not met', small) + 6;
  const left = bound === 'max' ? box.x + box.w - wide - 2 : box.x + 2;
  const word: Shape[] = box.w < wide + 6 ? [] : [
    { kind: 'rect', role: 'histogram-beyond-ground', x: left, y: area.top + 3, w: wide, h: 1.4 * small, fill: style.ground },
    { kind: 'text', role: 'histogram-beyond-word', x: left + wide / 2, y: area.top + 3 + 1.05 * small, size: small, anchor: 'middle', runs: [{ text: 'not met' }], fill: style.trouble },
  ];
  return { shapes: [hatch.shape], words: word, clips: [hatch.clip] };
}

function describe({ label, unit, histogram, nominal, middle, limit }: HistogramPicture): string {
  const { edges, counts } = histogram;
  const with_ = (value: number): string => `${writeNumber(value)}${unit === '' ? '' : ` ${unit}`}`;
  const count = counts.reduce((sum, n) => sum + n, 0);
  return [
    `Histogram of ${label}: ${count} values from ${with_(edges[0])} to ${with_(edges[edges.length - 1])}`,
    ...(middle === null ? [] : [`95 % between ${with_(middle[0])} and ${with_(middle[1])}`]),
    ...(nominal === null ? [] : [`nominal ${with_(nominal)}`]),
    ...(limit === null ? [] : [`required ${limit.bound === 'max' ? 'at most' : 'at least'} ${with_(limit.value)}`]),
  ].join('; ');
}
