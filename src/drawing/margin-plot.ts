import { thinned, polyline } from './curve.ts';
import { fitted, runsWidth, textWidth } from './glyph-widths.ts';
import { differenceTicks, ratioTicks, scoreWindow, unitRuns, valueTicks, type MarginMeasure, type Tick } from './margin-axes.ts';
import { px, type Drawing, type Shape, type TextRun, type TextShape } from './shapes.ts';
import { mixed, styleOf, type Style, type StyleName } from './styles.ts';

/** The margin of one requirement against the variable. */
export interface MarginCurve {
  /** "contact resistivity of top" */ label: string;
  measure: MarginMeasure;
  /** values rising; score 0 at the limit, above where met, null without an answer */ points: readonly { value: number; score: number | null }[];
  /** the one that is asked about: drawn heavier */ strong?: boolean;
}

export interface PlotMark {
  value: number;
  /** as it is written at the mark */ text: string;
}

export interface MarginPicture {
  /** of the variable */ name: string;
  unit: string;
  scale: 'linear' | 'log';
  from: number;
  to: number;
  curves: readonly MarginCurve[];
  /** where all are met; an end closed by a curve has its index */ intervals: readonly { from: PlotMark & { curve: number | null }; to: PlotMark & { curve: number | null } }[];
  /** where the least score is largest */ best: (PlotMark & { score: number }) | null;
  /** the value in the design */ now: PlotMark | null;
}

export interface MarginPlotOptions {
  width: number;
  height: number;
  style?: StyleName;
  prefix?: string;
}

/** Line codes: a dash and a weight each, so that they are told apart without colour. */
const CODES: readonly { dash?: string; width: number; color: 'ink' | 'conduction' | 'valence' | 'occupancy' }[] = [
  { width: 1.8, color: 'conduction' },
  { dash: '8 4', width: 1.8, color: 'valence' },
  { dash: '2 3', width: 2.2, color: 'occupancy' },
  { dash: '10 3 2 3', width: 1.6, color: 'ink' },
  { dash: '4 2', width: 1.2, color: 'conduction' },
  { dash: '16 4', width: 1.2, color: 'valence' },
  { dash: '6 2 2 2 2 2', width: 1.6, color: 'occupancy' },
];

/** The line of curve number `index`, for a key beside the picture. */
export function lineCode(index: number, style: Style): { dash?: string; width: number; color: string } {
  const { dash, width, color } = CODES[index % CODES.length];
  return { ...(dash === undefined ? {} : { dash }), width, color: style[color] };
}

/** Below this width the curves' ends bear numbers and no words, px. */
const NARROW = 620;
/** Half the diamond at the best point, with its line, px: at the end of the range it reaches so far beyond the axis. */
const DIAMOND = 7;
/** Room for the axis on the right, of the text size. */
const SECOND = 5.8;

/**
 * Margins against a variable: every requirement a curve, the limit a line, the intervals in which all are met shaded, the best point a diamond. Factors
 * and differences share the height by their scores, each with an axis of its own.
 *
 * @throws {RangeError} no room, or a range that is none
 */
export function drawMarginPlot(picture: MarginPicture, options: MarginPlotOptions): Drawing {
  const { width, height, prefix = 'margin' } = options;
  const style = styleOf(options.style ?? 'light');
  const { curves, from, to, scale } = picture;
  if (!(to > from) || (scale === 'log' && !(from > 0))) throw new RangeError('a picture of margins needs a range');
  const small = style.smallSize;
  const narrow = width < NARROW * (style.textSize / 12);
  const measures = axesOf(curves);
  const labelRoom = narrow ? 2.2 * small + DIAMOND : Math.min(0.28 * width, 20 * small);
  const area = { left: 5.2 * small, right: width - labelRoom - (measures.length > 1 ? SECOND * small : 0.6 * small), top: (0.6 + 1.35 * rowsOver(narrow)) * small, bottom: height - 3.6 * small };
  if (!(area.right - area.left >= 60 && area.bottom - area.top >= 60)) throw new RangeError(`no room for a picture of margins: ${width} by ${height} px`);
  const scores = curves.flatMap(({ points }) => points.flatMap(({ score }) => (score === null ? [] : [score])));
  const window = scoreWindow(scores, picture.best?.score ?? null);
  const x = (value: number): number => area.left + (area.right - area.left) * (scale === 'log' ? Math.log(value / from) / Math.log(to / from) : (value - from) / (to - from));
  const y = (score: number): number => area.bottom - ((score - window[0]) / (window[1] - window[0])) * (area.bottom - area.top);
  const frame: Frame = { picture, style, small, area, x, y, window, clip: `${prefix}-area`, narrow, labelX: area.right + (measures.length > 1 ? SECOND * small + 4 : DIAMOND + 5), labelRoom: labelRoom - 8 - (measures.length > 1 ? 0 : DIAMOND - 1) };
  return {
    width, height, background: style.ground, font: style.font, gradients: [],
    clips: [{ id: frame.clip, x: area.left, y: area.top, w: area.right - area.left, h: area.bottom - area.top }],
    shapes: [...ground(frame), ...curves.map((curve, i) => curveShape(frame, curve, i)), ...gaps(frame), ...marks(frame), ...axes(frame, measures), ...labels(frame)],
    title: `Margins against ${picture.name}`,
    description: describe(picture),
  };
}

interface Frame {
  picture: MarginPicture;
  style: Style;
  small: number;
  /** px */ area: { left: number; right: number; top: number; bottom: number };
  x(value: number): number;
  y(score: number): number;
  window: readonly [number, number];
  clip: string;
  narrow: boolean;
  labelX: number;
  labelRoom: number;
}

/** One axis for factors, one for differences; where differences come in several units, that of the first. */
function axesOf(curves: readonly MarginCurve[]): MarginMeasure[] {
  const ratio = curves.find(({ measure }) => measure.kind === 'ratio');
  const difference = curves.find(({ measure }) => measure.kind === 'difference');
  const found = [ratio, difference].flatMap((curve) => (curve === undefined ? [] : [curve.measure]));
  return found.length > 0 ? found : [{ kind: 'ratio' }];
}

/** Intervals, the limit, and which side of it is which. */
function ground({ picture, style, small, area, x, y, narrow }: Frame): Shape[] {
  const zero = y(0);
  const side = (text: string, at: number, fill: string): TextShape => ({ kind: 'text', role: 'margin-side', x: area.left + 6, y: at, size: small, anchor: 'start', runs: [{ text }], fill });
  return [
    ...picture.intervals.map(({ from, to }): Shape => {
      const [left, right] = [x(from.value), x(to.value)];
      // An interval of one value is still seen.
      return { kind: 'rect', role: 'margin-interval', title: `all met from ${from.text} to ${to.text}`, x: left, y: area.top, w: Math.max(right - left, 2), h: area.bottom - area.top, fill: mixed(style.ground, style.choice, 0.2) };
    }),
    { kind: 'line', role: 'margin-limit', title: 'at the limit', x1: area.left, x2: area.right, y1: zero, y2: zero, stroke: style.ink, width: 1.4 },
    side(narrow ? 'met ↑' : 'met above this line', zero - 0.45 * small, style.ink),
    side(narrow ? 'not met ↓' : 'not met below it', zero + 1.15 * small, style.ink),
  ];
}

function curveShape({ style, x, y, clip }: Frame, { label, points, strong }: MarginCurve, i: number): Shape {
  const { dash, width, color } = lineCode(i, style);
  let d = '';
  let run: { x: number[]; y: number[] } = { x: [], y: [] };
  const close = (): void => {
    // A lone value between two without an answer is still drawn, as a dot of the line.
    if (run.x.length === 1) d += polyline({ x: [run.x[0] - 1, run.x[0] + 1], y: [run.y[0], run.y[0]] }, 'M');
    else if (run.x.length > 1) d += polyline(thinned(run), 'M');
    run = { x: [], y: [] };
  };
  for (const { value, score } of points) {
    if (score === null) close();
    else {
      run.x.push(x(value));
      // Margins without end would run out of what a path can hold.
      run.y.push(Math.min(Math.max(y(score), -1e4), 1e4));
    }
  }
  close();
  return { kind: 'path', role: 'margin-curve', title: `${i + 1} ${label}`, d, stroke: color, width: strong ? 1.7 * width : width, dash, clip, join: 'round' };
}

/** Bars along the foot where some figure has no answer. */
function gaps({ picture, style, small, area, x }: Frame): Shape[] {
  const shapes: Shape[] = [];
  const values = [...new Set(picture.curves.flatMap(({ points }) => points.map(({ value }) => value)))].sort((a, b) => a - b);
  const blank = new Set(picture.curves.flatMap(({ points }) => points.filter(({ score }) => score === null).map(({ value }) => value)));
  for (let i = 0; i < values.length; i++) {
    if (!blank.has(values[i])) continue;
    let last = i;
    while (last + 1 < values.length && blank.has(values[last + 1])) last++;
    const [left, right] = [x(values[i]) - 1, x(values[last]) + 1];
    shapes.push({ kind: 'rect', role: 'margin-no-answer', title: 'no answer', x: left, y: area.bottom - 6, w: right - left, h: 6, fill: style.trouble });
    if (right - left > textWidth('no answer', small)) shapes.push({ kind: 'text', role: 'margin-no-answer-word', x: (left + right) / 2, y: area.bottom - 9, size: small, anchor: 'middle', runs: [{ text: 'no answer' }], fill: style.trouble });
    i = last;
  }
  return shapes;
}

/** Upright lines at the best value, the ends of the intervals and the value in the design, their figures over the picture where there is room. */
function marks({ picture, style, small, area, x, y, narrow }: Frame): Shape[] {
  const { best, now, intervals } = picture;
  const shapes: Shape[] = [];
  const figures: Shape[] = [];
  const rows: { from: number; to: number }[][] = Array.from({ length: rowsOver(narrow) }, () => []);
  const figure = (role: string, at: number, text: string, fill: string, weight?: 'bold'): number => {
    const width = textWidth(text, small) * (weight ? 1.1 : 1);
    const middle = Math.min(Math.max(at, area.left + width / 2), area.right - width / 2);
    const row = rows.findIndex((taken) => taken.every((box) => middle + width / 2 + 8 < box.from || middle - width / 2 - 8 > box.to));
    if (row < 0) return area.top;
    rows[row].push({ from: middle - width / 2, to: middle + width / 2 });
    const base = area.top - 5 - row * 1.35 * small;
    // Lines of other figures that pass behind leave it legible.
    figures.push({ kind: 'rect', role: 'margin-figure-ground', x: middle - width / 2 - 2, y: base - small, w: width + 4, h: 1.25 * small, fill: style.ground });
    figures.push({ kind: 'text', role, x: middle, y: base, size: small, anchor: 'middle', runs: [{ text }], fill, ...(weight ? { weight } : {}) });
    return base + 3;
  };
  const upright = (role: string, value: number, top: number, paint: { stroke: string; dash?: string; width: number }): void => void shapes.push({ kind: 'line', role, x1: x(value), x2: x(value), y1: top, y2: area.bottom, ...paint });
  if (best !== null) {
    const [bx, by] = [x(best.value), y(best.score)];
    upright('margin-best-line', best.value, figure('margin-best-figure', bx, `${intervals.length > 0 ? 'best' : 'nearest'} ${best.text}`, style.ink, 'bold'), { stroke: style.choice, dash: '6 3', width: 1.4 });
    shapes.push({ kind: 'path', role: 'margin-best', title: `least margin largest at ${best.text}`, d: `M${px(bx)},${px(by - 6)}L${px(bx + 6)},${px(by)}L${px(bx)},${px(by + 6)}L${px(bx - 6)},${px(by)}Z`, fill: style.ground, stroke: style.choice, width: 2 });
  }
  for (const end of intervals.flatMap(({ from, to }) => (from.value === to.value ? [from] : [from, to]))) {
    // The end of the range is on the axis already.
    if (end.curve === null) continue;
    upright('margin-end', end.value, figure('margin-end-figure', x(end.value), end.text, style.ink), { stroke: style.ink, width: style.thinWidth });
    shapes.push({ kind: 'rect', role: 'margin-closed', title: `${end.curve + 1} ends the interval at ${end.text}`, x: x(end.value) - 3.5, y: y(0) - 3.5, w: 7, h: 7, fill: style.ground, stroke: style.ink, width: 1.5 });
    shapes.push({ kind: 'text', role: 'margin-closed-by', x: x(end.value) + 7, y: y(0) + 1.15 * small, size: small, anchor: 'start', runs: [{ text: String(end.curve + 1) }], fill: style.ink, weight: 'bold' });
  }
  if (now !== null && now.value >= picture.from && now.value <= picture.to) upright('margin-now', now.value, figure('margin-now-figure', x(now.value), `now ${now.text}`, style.ink), { stroke: style.ink, dash: '1 3', width: 1.2 });
  return [...shapes, ...figures];
}

/** Rows of figures over the picture: where it is narrow they lie closer and need more. */
function rowsOver(narrow: boolean): number {
  return narrow ? 4 : 3;
}

function axes({ picture, style, small, area, x, y, window }: Frame, measures: readonly MarginMeasure[]): Shape[] {
  const line = { role: 'margin-axis', stroke: style.faint, width: style.thinWidth } as const;
  const text = (role: string, at: { x: number; y: number }, anchor: TextShape['anchor'], runs: TextRun[], rotate?: number): TextShape => ({ kind: 'text', role, ...at, size: small, anchor, runs, fill: style.ink, ...(rotate === undefined ? {} : { rotate }) });
  const shapes: Shape[] = [{ kind: 'line', ...line, x1: area.left, x2: area.right, y1: area.bottom, y2: area.bottom }];
  const ticks = valueTicks(picture.from, picture.to, picture.scale, Math.max(2, Math.floor((area.right - area.left) / (7 * small))));
  let free = -Infinity;
  for (const tick of ticks) {
    const at = x(tick.at);
    shapes.push({ kind: 'line', ...line, x1: at, x2: at, y1: area.bottom, y2: area.bottom + (tick.runs.length > 0 ? 5 : 3) });
    const half = runsWidth(tick.runs, small) / 2;
    if (tick.runs.length === 0 || at - half < free) continue;
    free = at + half + 6;
    shapes.push(text('margin-value-tick', { x: at, y: area.bottom + 6 + small }, 'middle', tick.runs));
  }
  shapes.push(text('margin-value-title', { x: (area.left + area.right) / 2, y: area.bottom + 2.9 * small }, 'middle', [{ text: picture.name }, ...(picture.unit === '' ? [] : [{ text: ' (' }, ...unitRuns(picture.unit), { text: ')' }])]));
  measures.forEach((measure, i) => {
    const side = i === 0 ? area.left : area.right;
    const out = i === 0 ? -1 : 1;
    shapes.push({ kind: 'line', ...line, x1: side, x2: side, y1: area.top, y2: area.bottom });
    const own: Tick[] = measure.kind === 'ratio' ? ratioTicks(window) : differenceTicks(window, measure.step);
    for (const tick of own) {
      if (tick.at < window[0] || tick.at > window[1]) continue;
      const at = y(tick.at);
      shapes.push({ kind: 'line', ...line, x1: side, x2: side + 4 * out, y1: at, y2: at });
      shapes.push(text('margin-tick', { x: side + (DIAMOND + 3) * out, y: at + 0.36 * small }, out < 0 ? 'end' : 'start', tick.runs));
    }
    const title: TextRun[] = measure.kind === 'ratio' ? [{ text: 'margin, times' }] : [{ text: `margin${measure.unit === '' ? '' : ', '}` }, ...unitRuns(measure.unit)];
    shapes.push(text('margin-title', { x: i === 0 ? 1.1 * small : side + (SECOND - 0.6) * small, y: (area.top + area.bottom) / 2 }, 'middle', title, -90));
  });
  return shapes;
}

/** At the right end of each curve its number and, where there is room, its words; pushed apart; an arrow where it ends off the picture. */
function labels({ picture, style, small, area, y, window, narrow, labelX, labelRoom }: Frame): Shape[] {
  const least = 1.25 * small;
  const wanted = picture.curves.flatMap(({ label, points }, i) => {
    const last = [...points].reverse().find(({ score }) => score !== null);
    if (last === undefined) return [];
    const score = last.score as number;
    const arrow = score > window[1] ? '↑' : score < window[0] ? '↓' : '';
    return [{ i, text: `${arrow}${i + 1}${narrow ? '' : ` ${label}`}`, y: Math.min(Math.max(y(score), area.top + 0.5 * small), area.bottom - 0.5 * small) }];
  });
  wanted.sort((a, b) => a.y - b.y);
  for (let k = 1; k < wanted.length; k++) wanted[k].y = Math.max(wanted[k].y, wanted[k - 1].y + least);
  for (let k = wanted.length - 1; k >= 0; k--) wanted[k].y = Math.min(wanted[k].y, area.bottom - 0.5 * small - (wanted.length - 1 - k) * least);
  return wanted.map(({ i, text, y: at }): TextShape => ({ kind: 'text', role: 'margin-label', x: labelX, y: at + 0.36 * small, size: small, anchor: 'start', runs: [{ text: fitted(text, small, labelRoom) }], fill: lineCode(i, style).color }));
}

function describe({ name, curves, intervals, best }: MarginPicture): string {
  const found = intervals.length === 0 ? 'no value meets all of them' : `all are met from ${intervals.map(({ from, to }) => `${from.text} to ${to.text}`).join(', and from ')}`;
  return `Margins of ${curves.length === 1 ? 'one requirement' : `${curves.length} requirements`} against ${name}: ${found}${best === null ? '' : `; the least margin is largest at ${best.text}`}.`;
}
