import { ticks as evenTicks } from 'd3-array';
import { isoLines } from '../map/iso-lines.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import { polyline } from './curve.ts';
import { hatched } from './area-hatch.ts';
import { Labels, labelPlaces } from './line-labels.ts';
import { figureRuns } from './margin-axes.ts';
import { alongAxis, axisTitle, footAxis, sideAxis, sideRoom, type PlotArea, type PlotAxis } from './plot-frame.ts';
import { px, type Drawing, type Shape } from './shapes.ts';
import { mixed, styleOf, type Style, type StyleName } from './styles.ts';

export interface ContourPicture {
  /** runs to the right; values spaced evenly in its scale */ x: PlotAxis;
  /** runs up */ y: PlotAxis;
  columns: number;
  rows: number;
  figure: { label: string; unit: string; log: boolean; /** [rows x columns], row by row from the foot; null where there is none (yet) */ values: readonly (number | null)[] };
  gaps: readonly { index: number; reason: string }[];
  /** the design itself */ now: { x: number; y: number } | null;
}

export interface ContourMap extends Drawing {
  area: PlotArea;
  /** values of the lines, rising */ levels: number[];
}

/** Tint of the lowest and of the highest band. */
const TINTS = [0.04, 0.52] as const;

/**
 * A figure over two axes: bands of one tint between lines of equal value, darker where it is larger, each line with its figure; what has no answer is hatched.
 *
 * @throws {RangeError} no room, no range, or fewer than two values on an axis
 */
export function drawContourMap(picture: ContourPicture, options: { width: number; height: number; style?: StyleName; prefix?: string }): ContourMap {
  const { columns, rows, figure } = picture;
  const { width, height, prefix = 'contour' } = options;
  if (columns < 2 || rows < 2 || figure.values.length !== columns * rows) throw new RangeError('a map needs two values or more on each axis');
  const style = styleOf(options.style ?? 'light');
  const small = style.smallSize;
  const area = { left: 1.6 * small + sideRoom(picture.y, height - 6.2 * small, style), right: width - 1.2 * small, top: 2.6 * small, bottom: height - 3.6 * small };
  if (!(area.right - area.left >= 80 && area.bottom - area.top >= 80)) throw new RangeError(`no room for a map: ${width} by ${height} px`);
  const levels = contourLevels(figure.values, figure.log);
  const at = (c: number, r: number): { x: number; y: number } => ({ x: area.left + ((area.right - area.left) * c) / (columns - 1), y: area.bottom - ((area.bottom - area.top) * r) / (rows - 1) });
  const labels = new Labels(area, style);
  const lines = contourLines(picture, levels, at, labels, style, `${prefix}-area`);
  const nowAt = nowMark(picture, area, style, labels);
  return {
    width, height, background: style.ground, font: style.font, gradients: [], clips: [{ id: `${prefix}-area`, x: area.left, y: area.top, w: area.right - area.left, h: area.bottom - area.top }], area, levels,
    shapes: [
      { kind: 'text', role: 'contour-title', x: area.left, y: area.top - 0.8 * small, size: small, anchor: 'start', runs: axisTitle(figure.label, figure.unit), fill: style.ink, weight: 'bold' },
      ...bands(picture, levels, area, style, `${prefix}-area`),
      ...lines,
      ...footAxis(picture.x, area, style, 'contour'),
      ...sideAxis(picture.y, area, style, 'contour', axisTitle(picture.y.words, picture.y.unit)),
      ...labels.shapes,
      ...nowAt,
    ],
    title: `${figure.label} over ${picture.x.words} and ${picture.y.words}`,
    description: describe(picture),
  };
}

/** Values of the lines: even ones, or powers of ten (with 2 and 5 where there are few) for a figure of decades. */
export function contourLevels(values: readonly (number | null)[], log: boolean): number[] {
  const known = values.filter((v): v is number => v !== null && Number.isFinite(v));
  if (known.length === 0) return [];
  const [low, high] = [known.reduce((a, b) => Math.min(a, b)), known.reduce((a, b) => Math.max(a, b))];
  if (!(high > low)) return [];
  if (!log || low <= 0 || high / low < 8) return evenTicks(low, high, 8).filter((v) => v > low && v < high);
  const decades = Math.log10(high / low);
  const digits = decades > 4 ? [1] : decades > 2 ? [1, 3] : [1, 2, 5];
  const every = Math.max(1, Math.ceil(decades / 10));
  const out: number[] = [];
  for (let decade = Math.floor(Math.log10(low)); decade <= Math.log10(high); decade++) {
    if (decade % every !== 0) continue;
    for (const digit of digits) {
      const level = Number(`${digit}e${decade}`);
      if (level > low && level < high) out.push(level);
    }
  }
  return out;
}

/** Size of the pieces that bands are made of, px: between points the figure is taken as bilinear, as the lines take it. */
const PIECE = { w: 3, h: 2 } as const;

/** Areas between the lines. */
function bands({ columns, rows, figure, gaps }: ContourPicture, levels: readonly number[], area: PlotArea, style: Style, clip: string): Shape[] {
  const read = reader(figure, columns, rows);
  const wide = (area.right - area.left) / PIECE.w;
  const high = (area.bottom - area.top) / PIECE.h;
  const band = (i: number, j: number): number => {
    const value = read(((i + 0.5) / wide) * (columns - 1), ((j + 0.5) / high) * (rows - 1));
    return Number.isNaN(value) ? -1 : levels.filter((level) => value >= level).length;
  };
  const data = levels.concat(0).map(() => '');
  for (let j = 0; j < high; j++) {
    const foot = px(area.bottom - j * PIECE.h + 0.3);
    const top = px(area.bottom - (j + 1) * PIECE.h);
    for (let i = 0; i < wide; ) {
      const own = band(i, j);
      const from = i;
      while (i < wide && band(i, j) === own) i++;
      if (own < 0) continue;
      const [left, right] = [px(area.left + from * PIECE.w), px(area.left + i * PIECE.w)];
      data[own] += `M${left},${foot}L${right},${foot}L${right},${top}L${left},${top}Z`;
    }
  }
  const tint = (i: number): string => mixed(style.ground, style.occupancy, TINTS[0] + ((TINTS[1] - TINTS[0]) * i) / Math.max(1, levels.length));
  const shapes: Shape[] = data.flatMap((d, i): Shape[] => (d === '' ? [] : [{ kind: 'path', role: 'contour-band', d, fill: tint(i), clip }]));
  const blank = new Set(gaps.map(({ index }) => index));
  if (blank.size === 0) return shapes;
  const inside = (x: number, y: number): boolean => {
    const c = Math.round(((x - area.left) / (area.right - area.left)) * (columns - 1));
    const r = Math.round(((area.bottom - y) / (area.bottom - area.top)) * (rows - 1));
    return blank.has(r * columns + c);
  };
  shapes.push({ kind: 'path', role: 'contour-gap', title: `no answer at ${blank.size} of ${columns * rows} points: ${gaps[0].reason}`, d: hatched(area, 5, 1, inside), stroke: style.trouble, width: 1, clip });
  return shapes;
}

/** The figure between its points, NaN beside one that has none; of decades its logarithm is what is straight. */
function reader({ log, values }: ContourPicture['figure'], columns: number, rows: number): (c: number, r: number) => number {
  const straight = log && values.every((v) => v === null || v > 0);
  const field = values.map((v) => (v === null ? NaN : straight ? Math.log(v) : v));
  return (c, r) => {
    const [left, low] = [Math.min(columns - 2, Math.max(0, Math.floor(c))), Math.min(rows - 2, Math.max(0, Math.floor(r)))];
    const [u, v] = [c - left, r - low];
    const i = low * columns + left;
    const value = (1 - v) * ((1 - u) * field[i] + u * field[i + 1]) + v * ((1 - u) * field[i + columns] + u * field[i + columns + 1]);
    return straight ? Math.exp(value) : value;
  };
}

function contourLines({ columns, rows, figure }: ContourPicture, levels: readonly number[], at: (c: number, r: number) => { x: number; y: number }, labels: Labels, style: Style, clip: string): Shape[] {
  const straight = figure.log && figure.values.every((v) => v === null || v > 0);
  const values = figure.values.map((v) => (v === null ? NaN : straight ? Math.log(v) : v));
  return levels.flatMap((level) =>
    isoLines(values, columns, rows, straight ? Math.log(level) : level).map((line): Shape => {
      const points = line.map(({ x, y }) => at(x, y));
      const [xs, ys] = [points.map((p) => p.x), points.map((p) => p.y)];
      const size = Math.max(...xs) - Math.min(...xs) + Math.max(...ys) - Math.min(...ys);
      if (size > 40) labels.put('contour-figure', labelPlaces(points), figureRuns(level));
      return { kind: 'path', role: 'contour-line', title: `${writeNumber(level, 4)} ${figure.unit}`.trim(), d: polyline({ x: xs, y: ys }, 'M'), stroke: style.ink, width: 1, clip, join: 'round' };
    }),
  );
}

function nowMark({ now, x, y }: ContourPicture, area: PlotArea, style: Style, labels: Labels): Shape[] {
  if (now === null || now.x < x.from || now.x > x.to || now.y < y.from || now.y > y.to) return [];
  const at = { x: alongAxis(x, area.left, area.right)(now.x), y: alongAxis(y, area.bottom, area.top)(now.y) };
  labels.put('contour-now-word', [{ x: at.x, y: at.y - 16 }, { x: at.x, y: at.y + 16 }, { x: at.x + 30, y: at.y }, { x: at.x - 30, y: at.y }], [{ text: 'now' }], { bold: true });
  return [{ kind: 'path', role: 'contour-now', title: 'the design as it is', d: diamond(at.x, at.y, 6), fill: style.ground, stroke: style.choice, width: 2 }];
}

export const diamond = (x: number, y: number, size: number): string => `M${px(x)},${px(y - size)}L${px(x + size)},${px(y)}L${px(x)},${px(y + size)}L${px(x - size)},${px(y)}Z`;

function describe({ x, y, figure, gaps, columns }: ContourPicture): string {
  const known = figure.values.flatMap((v, i) => (v === null ? [] : [{ v, i }]));
  const unit = figure.unit === '' ? '' : ` ${figure.unit}`;
  const back = (axis: PlotAxis, share: number): string => `${writeNumber(axis.scale === 'log' ? axis.from * (axis.to / axis.from) ** share : axis.from + (axis.to - axis.from) * share, 4)}${axis.unit === '' ? '' : ` ${axis.unit}`}`;
  const rows = figure.values.length / columns;
  const place = (i: number): string => `${x.words} ${back(x, (i % columns) / (columns - 1))} and ${y.words} ${back(y, Math.floor(i / columns) / (rows - 1))}`;
  const text = (v: number): string => `${writeNumber(v, 4)}${unit}`;
  if (known.length === 0) return `${figure.label} over ${x.words} and ${y.words}: no figures.`;
  const [low, high] = [known.reduce((a, b) => (b.v < a.v ? b : a)), known.reduce((a, b) => (b.v > a.v ? b : a))];
  return `${figure.label} over ${x.words} and ${y.words}: smallest ${text(low.v)} at ${place(low.i)}, largest ${text(high.v)} at ${place(high.i)}.${gaps.length > 0 ? ` ${gaps.length} of ${figure.values.length} points have no answer.` : ''}`;
}
