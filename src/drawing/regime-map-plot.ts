import { isoLines } from '../map/iso-lines.ts';
import type { MapMark } from '../map/marks.ts';
import { DEGENERACIES, type RegimeMap } from '../map/regime-map.ts';
import { diamond } from './contour-map.ts';
import { polyline } from './curve.ts';
import { hatched } from './area-hatch.ts';
import { textWidth } from './glyph-widths.ts';
import { Labels, labelPlaces } from './line-labels.ts';
import { alongAxis, axisTitle, footAxis, sideAxis, type PlotArea, type PlotAxis } from './plot-frame.ts';
import { carrierClass, classTint, FROZEN_BELOW, HATCH, INTRINSIC_ABOVE, type CarrierClass } from './regime-look.ts';
import { px, type Drawing, type Shape } from './shapes.ts';
import { styleOf, type Style, type StyleName } from './styles.ts';

export interface RegimeMapPicture {
  /** "drift, n-type Si" */ layer: string;
  map: RegimeMap;
  marks: readonly MapMark[];
  /** lines of what the textbook is wrong by */ errors: boolean;
}

export interface RegimeMapPlot extends Drawing {
  area: PlotArea;
  /** of a doping, cm^-3, and a temperature, K */ x(doping: number): number;
  y(temperature: number): number;
}

/** Errors of the textbook's Fermi level that get a line, meV. */
export const ERROR_LEVELS = [-100, -25, -5, 5, 25, 100] as const;
const CLASSES: readonly CarrierClass[] = ['extrinsic', 'freeze-out', 'intrinsic'];
/** Distance of EF from its band in kT at which an area of degeneracy ends. */
const TRANSITIONAL_WITHIN = 3;

/**
 * Doping against temperature of one layer: where its carriers come from as tints with bounds and words, how degenerate it is as hatches of two densities with bounds
 * and words, the Mott density, lines of the textbook's error, and the design's own layers with their operating range.
 *
 * @throws {RangeError} no room
 */
export function drawRegimeMap(picture: RegimeMapPicture, options: { width: number; height: number; style?: StyleName; prefix?: string }): RegimeMapPlot {
  const { map, layer } = picture;
  const { width, height, prefix = 'map' } = options;
  const style = styleOf(options.style ?? 'light');
  const small = style.smallSize;
  const area = { left: 5.2 * small, right: width - 1.2 * small, top: 2.8 * small, bottom: height - 3.6 * small };
  if (!(area.right - area.left >= 120 && area.bottom - area.top >= 120)) throw new RangeError(`no room for a map: ${width} by ${height} px`);
  const axes = mapPlotAxes(map);
  const x = alongAxis(axes.x, area.left, area.right);
  const y = alongAxis(axes.y, area.bottom, area.top);
  const f: Frame = { picture, style, area, x, y, clip: `${prefix}-area`, labels: new Labels(area, style), columns: map.doping.length, rows: map.temperature.length };
  // In the order of who gets room first: the design's own layers, then the areas, then lines.
  const marks = layerMarks(f);
  areaLabels(f);
  const mott = mottLine(f);
  const errors = picture.errors ? errorLines(f) : [];
  return {
    width, height, background: style.ground, font: style.font, gradients: [], clips: [{ id: f.clip, x: area.left, y: area.top, w: area.right - area.left, h: area.bottom - area.top }], area, x, y,
    shapes: [
      { kind: 'text', role: 'map-title', x: area.left, y: area.top - 0.9 * small, size: small, anchor: 'start', runs: [{ text: layer }], fill: style.ink, weight: 'bold' },
      ...tints(f), ...hatches(f), ...bounds(f), ...errors, ...mott,
      ...footAxis(axes.x, area, style, 'map'), ...sideAxis(axes.y, area, style, 'map', axisTitle(axes.y.words, axes.y.unit)),
      ...f.labels.shapes, ...marks,
    ],
    title: `Regimes of ${layer} over doping and temperature`,
    description: describeMap(picture),
  };
}

export function mapPlotAxes({ doping, temperature }: RegimeMap): { x: PlotAxis; y: PlotAxis } {
  return {
    x: { words: 'active doping', unit: 'cm^-3', scale: 'log', from: doping[0], to: doping[doping.length - 1] },
    y: { words: 'temperature', unit: 'K', scale: 'linear', from: temperature[0], to: temperature[temperature.length - 1] },
  };
}

interface Frame {
  picture: RegimeMapPicture;
  style: Style;
  area: PlotArea;
  x(doping: number): number;
  y(temperature: number): number;
  clip: string;
  labels: Labels;
  columns: number;
  rows: number;
}

const at = ({ area, columns, rows }: Frame, c: number, r: number): { x: number; y: number } => ({ x: area.left + ((area.right - area.left) * c) / (columns - 1), y: area.bottom - ((area.bottom - area.top) * r) / (rows - 1) });

/** Index of the map's point nearest to a place of the picture. */
export function mapIndexAt(map: RegimeMap, area: PlotArea, x: number, y: number): number {
  const within = (share: number, count: number): number => Math.min(count - 1, Math.max(0, Math.round(share * (count - 1))));
  return within((area.bottom - y) / (area.bottom - area.top), map.temperature.length) * map.doping.length + within((x - area.left) / (area.right - area.left), map.doping.length);
}

function tints(f: Frame): Shape[] {
  const { picture: { map }, columns, rows, style, clip } = f;
  return CLASSES.flatMap((name): Shape[] => {
    let d = '';
    for (let r = 0; r < rows; r++) {
      for (let c = 0; c < columns; c++) {
        if (carrierClass(map, r * columns + c) !== name) continue;
        const from = c;
        while (c + 1 < columns && carrierClass(map, r * columns + c + 1) === name) c++;
        const [a, b] = [at(f, from - 0.5, r - 0.5), at(f, c + 0.5, r + 0.5)];
        // Half a pixel over the row below, or the ground would show between rows.
        d += `M${px(a.x)},${px(a.y + 0.5)}L${px(b.x)},${px(a.y + 0.5)}L${px(b.x)},${px(b.y)}L${px(a.x)},${px(b.y)}Z`;
      }
    }
    return d === '' ? [] : [{ kind: 'path', role: 'map-class', title: name, d, fill: classTint(name, style), clip }];
  });
}

function hatches({ picture: { map }, area, style, clip }: Frame): Shape[] {
  return DEGENERACIES.flatMap((name, code): Shape[] => {
    const spacing = HATCH[name];
    if (spacing === null) return [];
    const d = hatched(area, spacing, 1, (x, y) => map.degeneracy[mapIndexAt(map, area, x, y)] === code);
    return d === '' ? [] : [{ kind: 'path', role: 'map-hatch', title: name, d, stroke: style.faint, width: 0.8, clip }];
  });
}

function fieldLines(f: Frame, field: ArrayLike<number>, level: number): { x: number; y: number }[][] {
  return isoLines(field, f.columns, f.rows, level).map((line) => line.map(({ x, y }) => at(f, x, y)));
}

const pathOf = (line: readonly { x: number; y: number }[]): string => polyline({ x: line.map((p) => p.x), y: line.map((p) => p.y) }, 'M');

/** Bounds of the areas: carriers whole, degeneracy thin. */
function bounds(f: Frame): Shape[] {
  const { map } = f.picture;
  // Frozen out ends where intrinsic begins: there the share says nothing.
  const share = Float64Array.from(map.carrierShare, (v, i) => (map.minorityShare[i] > INTRINSIC_ABOVE ? NaN : v));
  const sets: [ArrayLike<number>, number, { width: number; dash?: string }][] = [
    [share, FROZEN_BELOW, { width: 1.6 }], [map.minorityShare, INTRINSIC_ABOVE, { width: 1.6 }],
    [map.bandDistance, 0, { width: 1, dash: '5 2' }], [map.bandDistance, TRANSITIONAL_WITHIN, { width: 1, dash: '5 2' }],
  ];
  return sets.flatMap(([field, level, paint]) => fieldLines(f, field, level).map((line): Shape => ({ kind: 'path', role: 'map-bound', d: pathOf(line), stroke: f.style.ink, ...paint, clip: f.clip, join: 'round' })));
}

function errorLines(f: Frame): Shape[] {
  return ERROR_LEVELS.flatMap((level) =>
    fieldLines(f, f.picture.map.boltzmannError, level).flatMap((line): Shape[] => {
      if (line.length < 4) return [];
      const words = `${level > 0 ? '+' : '−'}${Math.abs(level)} meV`;
      if (line.length > 16) f.labels.put('map-error-figure', labelPlaces(line), [{ text: words }], { fill: f.style.valence });
      return [{ kind: 'path', role: 'map-error', title: `textbook wrong by ${words}`, d: pathOf(line), stroke: f.style.valence, width: 1.5, dash: '1.5 3', cap: 'round', clip: f.clip }];
    }),
  );
}

function mottLine({ picture: { map }, x, area, style, labels }: Frame): Shape[] {
  const { mottDoping, doping } = map;
  if (mottDoping === null || mottDoping < doping[0] || mottDoping > doping[doping.length - 1]) return [];
  const mx = x(mottDoping);
  labels.put('map-mott-word', [0.12, 0.3, 0.88].flatMap((share) => [0, -45, 45].map((dx) => ({ x: mx + dx, y: area.top + share * (area.bottom - area.top) }))), [{ text: 'Mott density' }], { bold: true });
  return [{ kind: 'line', role: 'map-mott', title: `Mott density ${mottDoping.toExponential(2).replace('e+', 'e')} cm^-3`, x1: mx, x2: mx, y1: area.top, y2: area.bottom, stroke: style.ink, width: 1.6, dash: '10 3 2 3' }];
}

/** The words of each area where it is widest. */
function areaLabels({ picture: { map }, area, columns, rows, labels, style }: Frame): void {
  const kind = Int8Array.from({ length: columns * rows }, (_, i) => {
    const name = carrierClass(map, i);
    return name === null ? -1 : CLASSES.indexOf(name) * 3 + map.degeneracy[i];
  });
  const cellW = (area.right - area.left) / columns;
  const cellH = (area.bottom - area.top) / rows;
  for (const { code, index } of widest(kind, columns, cellW, cellH)) {
    const degeneracy = DEGENERACIES[code % 3];
    const name = CLASSES[Math.floor(code / 3)];
    const middle = { x: area.left + ((index % columns) + 0.5) * cellW, y: area.bottom - (Math.floor(index / columns) + 0.5) * cellH };
    const places = [0, -18, 18, -36, 36].map((dy) => ({ x: middle.x, y: middle.y + dy }));
    labels.put('map-class-word', places, [{ text: degeneracy === 'nondegenerate' ? name : `${name}, ${degeneracy}` }], { bold: degeneracy === 'nondegenerate', fill: style.ink });
  }
}

/** For each code the point farthest from any other, largest room first: a chessboard distance passed down and up the grid, sideways steps counted by px. */
function widest(kind: Int8Array, columns: number, cellW: number, cellH: number): { code: number; index: number }[] {
  const room = new Float64Array(kind.length);
  // Words are wider than high.
  const sideways = cellW / 3;
  const pass = (start: number, end: number, step: 1 | -1): void => {
    for (let i = start; i !== end; i += step) {
      const c = i % columns;
      const near = (j: number, inside: boolean, size: number): number => (!inside ? size : kind[j] === kind[i] ? room[j] + size : 0);
      const before = step === 1 ? c > 0 : c < columns - 1;
      const beside = near(i - step, before, sideways);
      const j = i - step * columns;
      const above = near(j, j >= 0 && j < kind.length, cellH);
      room[i] = step === 1 ? Math.min(beside, above) : Math.min(room[i], beside, above);
    }
  };
  pass(0, kind.length, 1);
  pass(kind.length - 1, -1, -1);
  const best = new Map<number, number>();
  kind.forEach((code, i) => {
    if (code >= 0 && room[i] > (best.has(code) ? room[best.get(code)!] : 9)) best.set(code, i);
  });
  return [...best].sort(([, a], [, b]) => room[b] - room[a]).map(([code, index]) => ({ code, index }));
}

/** Above and below a mark with its bar, then beside it at several heights. */
function labelPlacesAbout(x: number, y: number, [top, bottom]: [number, number], width: number): { x: number; y: number }[] {
  const beside = 0.55 * width + 14;
  return [{ x, y: Math.min(top, y) - 14 }, { x, y: Math.max(bottom, y) + 14 }, ...[0, -16, 16, -34, 34].flatMap((dy) => [{ x: x - beside, y: y + dy }, { x: x + beside, y: y + dy }])];
}

/** Own layer a filled diamond, one that the map holds for an open diamond, one of another recipe a square; the operating range an upright bar. */
function layerMarks({ picture: { marks, map }, x, y, style, area, labels }: Frame): Shape[] {
  const last = map.temperature.length - 1;
  const shapes: Shape[] = [];
  for (const { name, doping, temperature, range, same } of marks) {
    const mx = x(doping);
    if (!(mx >= area.left && mx <= area.right)) continue;
    if (range) {
      const ends = range.map((t) => y(t));
      labels.keep(mx, (ends[0] + ends[1]) / 2, 14, Math.abs(ends[0] - ends[1]) + 6);
      const [from, to] = range.map((t) => y(Math.min(Math.max(t, map.temperature[0]), map.temperature[last])));
      shapes.push({ kind: 'line', role: 'map-range', title: `${name}: operating range ${kelvin(range[0])} to ${kelvin(range[1])} K`, x1: mx, x2: mx, y1: from, y2: to, stroke: style.ink, width: 3, cap: 'round' });
      for (const end of [from, to]) shapes.push({ kind: 'line', role: 'map-range-end', x1: mx - 5, x2: mx + 5, y1: end, y2: end, stroke: style.ink, width: 2 });
    }
    const my = y(temperature);
    if (!(my >= area.top && my <= area.bottom)) continue;
    const title = `${name}: ${doping.toExponential(2).replace('e+', 'e')} cm^-3 at ${kelvin(temperature)} K${same ? '' : ', of another recipe: only a place on this map'}`;
    const d = same ? diamond(mx, my, 7) : `M${px(mx - 5)},${px(my - 5)}L${px(mx + 5)},${px(my - 5)}L${px(mx + 5)},${px(my + 5)}L${px(mx - 5)},${px(my + 5)}Z`;
    shapes.push({ kind: 'path', role: same ? 'map-layer' : 'map-other-layer', title, d, fill: same ? style.choice : style.ground, stroke: style.ink, width: 1.6 });
    labels.keep(mx, my, 16, 16);
    labels.put('map-layer-word', labelPlacesAbout(mx, my, range === null ? [my, my] : [y(range[1]), y(range[0])], textWidth(name, style.smallSize)), [{ text: name }], { bold: true });
  }
  return shapes;
}

const kelvin = (t: number): number => Number(t.toPrecision(5));

/** The design's own layers in words, and the Mott density. */
export function describeMap({ layer, map, marks }: RegimeMapPicture): string {
  const power = (v: number): string => v.toExponential(2).replace('e+', 'e').replace(/\.?0+e/, 'e');
  const own = marks.map((mark) => {
    const { name, doping, temperature, range, same } = mark;
    const where = `${name} stands at ${power(doping)} cm^-3 and ${kelvin(temperature)} K`;
    if (!same) return `${where}, of another recipe`;
    const words = ([temperature, ...(range ?? [])]).map((t) => wordsAt(map, doping, t));
    return `${where}: ${words[0] ?? 'off the map'}${range === null ? '' : `; from ${kelvin(range[0])} to ${kelvin(range[1])} K it goes from ${words[1] ?? 'off the map'} to ${words[2] ?? 'off the map'}`}`;
  });
  return `Regimes of ${layer}, doping from ${power(map.doping[0])} to ${power(map.doping[map.doping.length - 1])} cm^-3 and temperature from ${map.temperature[0]} to ${map.temperature[map.temperature.length - 1]} K. ${own.join('. ')}.${map.mottDoping === null ? '' : ` Mott density ${power(map.mottDoping)} cm^-3.`}`;
}

function wordsAt(map: RegimeMap, doping: number, temperature: number): string | null {
  const axes = mapPlotAxes(map);
  const u = alongAxis(axes.x, 0, 1)(doping);
  const v = alongAxis(axes.y, 0, 1)(temperature);
  if (!(u >= 0 && u <= 1 && v >= 0 && v <= 1)) return null;
  return regimeWords(map, Math.round(v * (map.temperature.length - 1)) * map.doping.length + Math.round(u * (map.doping.length - 1)));
}

/** "freeze-out, nondegenerate" */
export function regimeWords(map: RegimeMap, index: number): string {
  const name = carrierClass(map, index);
  return name === null ? 'the gap closes' : `${name}, ${DEGENERACIES[map.degeneracy[index]]}`;
}
