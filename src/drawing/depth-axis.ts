import { bisectRight, ticks as niceTicks } from 'd3-array';
import type { Result } from '../result/types.ts';
import { textWidth } from './glyph-widths.ts';
import { depthRoom } from './depth-room.ts';

/** true: nm are even. even: "even-handed", each layer gets room by the bending that it holds, see depth-room.ts. */
export type DepthMode = 'true' | 'even';

export interface DepthTick {
  /** nm */ z: number;
  /** px */ x: number;
  label: string;
}

export interface DepthAxis {
  mode: DepthMode;
  /** px of the window's two ends */ range: [number, number];
  /** nm */ window: [number, number];
  /** nm -> px, strictly rising with z; goes on beyond the stack and the window */ x(z_nm: number): number;
  /** px -> nm */ depth(x: number): number;
  /** px of the layer boundaries [layers + 1], not clipped to the range */ edges: number[];
  ticks: DepthTick[];
  /** px of ticks without a figure between them; none on a true axis */ marks: number[];
  title: string;
}

/** Above this span a true axis counts in um. */
const LONGEST_IN_NM = 2000;
/** Between two tick labels, of the font size. */
const TICK_GAP = 0.9;
/** Distance wished for between two tick labels of an uneven axis, of the font size. */
const SPACING = 6.5;
/** How far a tick may stray from its even place for a rounder figure, of that distance. */
const STRAY = 0.25;
/** Least distance of ticks without figures, px: nearer ones run into a bar. */
const CLOSEST = 4;

/**
 * @param options.range   px of the top and of the bottom of the window; the first must be the smaller
 * @param options.window  the part to show, nm from the top; by default the whole stack. Held within the stack, at least 1e-3 nm wide.
 * @param options.textSize of the tick labels, px: larger ones leave room for fewer
 */
export function depthAxis(result: Result, options: { mode: DepthMode; range: [number, number]; window?: [number, number]; textSize?: number }): DepthAxis {
  const { mode, range, textSize = 11 } = options;
  if (mode !== 'true' && mode !== 'even') throw new RangeError(`unknown depth mode: ${String(mode)}`);
  const edges_nm = layerEdges(result);
  const total = edges_nm[edges_nm.length - 1];
  const window = heldWindow(options.window, total);
  const table = mode === 'even' ? depthRoom(result) : { z: [0, total], room: [0, 1] };
  const start = piecewise(table.z, table.room, window[0]);
  const span = piecewise(table.z, table.room, window[1]) - start;
  const scale = (range[1] - range[0]) / span;
  const x = (z: number): number => range[0] + (piecewise(table.z, table.room, z) - start) * scale;
  const depth = (at: number): number => piecewise(table.room, table.z, start + (at - range[0]) / scale);
  const inMicrometres = mode === 'true' && window[1] - window[0] > LONGEST_IN_NM;
  const title = mode === 'even' ? 'depth (nm), even-handed' : inMicrometres ? 'depth (µm)' : 'depth (nm)';
  const axis: DepthAxis = { mode, range, window, x, depth, edges: edges_nm.map(x), ticks: [], marks: [], title };
  axis.ticks = mode === 'even' ? evenTicks(axis, edges_nm, textSize) : trueTicks(axis, inMicrometres, textSize);
  if (mode === 'even') axis.marks = subdivisions(axis);
  return axis;
}

/** Depths of the layer boundaries, nm [layers + 1]. */
export function layerEdges(result: Result): number[] {
  const edges = [0];
  for (const layer of result.layers) edges.push(edges[edges.length - 1] + layer.thickness_nm);
  return edges;
}

function heldWindow(window: [number, number] | undefined, total: number): [number, number] {
  if (!window) return [0, total];
  const least = Math.min(1e-3, total);
  const from = Math.min(Math.max(0, Math.min(...window)), total - least);
  const to = Math.max(Math.min(total, Math.max(...window)), from + least);
  if (!(to > from)) throw new RangeError(`no depth window: ${window.join(' to ')} nm`);
  return [from, to];
}

/** Straight between the points, straight on beyond the first and the last. Both lists rise strictly. */
function piecewise(from: number[], to: number[], value: number): number {
  const i = Math.min(Math.max(bisectRight(from, value) - 1, 0), from.length - 2);
  return to[i] + ((value - from[i]) * (to[i + 1] - to[i])) / (from[i + 1] - from[i]);
}

function trueTicks(axis: DepthAxis, inMicrometres: boolean, textSize: number): DepthTick[] {
  const unit = inMicrometres ? 1000 : 1;
  const [from, to] = axis.window.map((z) => z / unit);
  const wanted = Math.max(2, Math.floor((axis.range[1] - axis.range[0]) / (8 * textSize)));
  return niceTicks(from, to, wanted).map((value) => ({ z: value * unit, x: axis.x(value * unit), label: plainNumber(value) }));
}

/**
 * Ends and boundaries first, where the reader of an uneven axis needs the figures most; between each two of them round depths at even distances in the picture, as many as have room.
 */
function evenTicks(axis: DepthAxis, edges_nm: number[], textSize: number): DepthTick[] {
  const [from, to] = axis.window;
  const placed: (DepthTick & { half: number })[] = [];
  const place = (z: number): void => {
    const label = depthLabel(z);
    const half = textWidth(label, textSize) / 2;
    const x = axis.x(z);
    if (placed.some((other) => Math.abs(other.x - x) < other.half + half + TICK_GAP * textSize)) return;
    placed.push({ z, x, label, half });
  };
  // The ends of a part that was dragged into view are no round figures: as many digits as a thousandth of the part.
  const grain = 10 ** (Math.floor(Math.log10(to - from)) - 3);
  for (const end of [from, to]) place(edges_nm.includes(end) ? end : Math.min(Math.max(Math.round(end / grain) * grain, from), to));
  for (const z of edges_nm) if (z >= from && z <= to) place(z);
  const first = [...placed].sort((a, b) => a.x - b.x);
  for (let i = 0; i + 1 < first.length; i++) {
    const [left, right] = [first[i].x, first[i + 1].x];
    const parts = Math.round((right - left) / (SPACING * textSize));
    const share = (right - left) / parts;
    for (let k = 1; k < parts; k++) {
      const at = left + k * share;
      place(roundest(axis.depth(at - STRAY * share), axis.depth(at + STRAY * share)));
    }
  }
  return placed.sort((a, b) => a.x - b.x).map(({ z, x, label }) => ({ z, x, label }));
}

/** Depths at even steps between two labels, each a whole multiple of the step: how closely they stand shows how the axis is stretched there. */
function subdivisions(axis: DepthAxis): number[] {
  const marks: number[] = [];
  for (let i = 0; i + 1 < axis.ticks.length; i++) {
    const [a, b] = [axis.ticks[i].z, axis.ticks[i + 1].z];
    const between = stepsBetween(a, b).map(axis.x);
    const all = [axis.x(a), ...between, axis.x(b)];
    if (all.every((x, k) => k === 0 || x - all[k - 1] >= CLOSEST)) marks.push(...between);
  }
  return marks;
}

function stepsBetween(a: number, b: number): number[] {
  const tenth = (b - a) / 10;
  const power = 10 ** Math.floor(Math.log10(tenth));
  const step = [1, 2, 5, 10].map((size) => size * power).find((size) => size >= tenth * (1 - 1e-9))!;
  const found: number[] = [];
  for (let n = Math.floor(a / step + 1e-6) + 1; n * step < b - 1e-6 * step; n++) found.push(n * step);
  return found;
}

/** The number with the fewest digits between two depths: a multiple of the largest 1, 2 or 5 times a power of ten that has one there, nearest to their middle. */
function roundest(low: number, high: number): number {
  for (let power = Math.ceil(Math.log10(high)); power > -8; power--) {
    for (const step of [5, 2, 1]) {
      // Divided by a whole power where the step is below 1, so that 0.3 stays 0.3.
      const multiple = (n: number): number => (power < 0 ? (n * step) / 10 ** -power : n * step * 10 ** power);
      const n = Math.round((low + high) / 2 / multiple(1));
      if (multiple(n) >= low && multiple(n) <= high) return multiple(n);
    }
  }
  return (low + high) / 2;
}

/** nm, or um with its unit written where nm would have five digits and more. */
function depthLabel(z_nm: number): string {
  return z_nm >= 1e4 ? `${plainNumber(z_nm / 1000)} µm` : plainNumber(z_nm);
}

/** Seven significant digits tell 50 nm apart below a wafer of 300 µm; a round figure is as short as it is. Without trailing zeros or exponents. */
const DIGITS = 7;
function plainNumber(value: number): string {
  return String(Number(value.toPrecision(DIGITS)) + 0);
}
