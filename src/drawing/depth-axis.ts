import { bisectRight, ticks as niceTicks } from 'd3-array';
import type { Result } from '../result/types.ts';
import { textWidth } from './glyph-widths.ts';
import { layerZones } from './layer-zones.ts';

/** true: nm are even. even: "even-handed", each layer gets room by the bending that it holds, see layer-zones.ts. */
export type DepthMode = 'true' | 'even';

export interface DepthAxis {
  mode: DepthMode;
  /** px of the window's two ends */ range: [number, number];
  /** nm */ window: [number, number];
  /** nm -> px, strictly rising with z; goes on beyond the stack and the window */ x(z_nm: number): number;
  /** px -> nm */ depth(x: number): number;
  /** px of the layer boundaries [layers + 1], not clipped to the range */ edges: number[];
  ticks: { x: number; label: string }[];
  title: string;
}

/** Above this span a true axis counts in um. */
const LONGEST_IN_NM = 2000;
/** Between two tick labels, of the font size. */
const TICK_GAP = 0.9;

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
  const zones = mode === 'even' ? layerZones(result) : { z: [0, total], room: [0, 1] };
  const start = piecewise(zones.z, zones.room, window[0]);
  const span = piecewise(zones.z, zones.room, window[1]) - start;
  const scale = (range[1] - range[0]) / span;
  const x = (z: number): number => range[0] + (piecewise(zones.z, zones.room, z) - start) * scale;
  const depth = (at: number): number => piecewise(zones.room, zones.z, start + (at - range[0]) / scale);
  const inMicrometres = mode === 'true' && window[1] - window[0] > LONGEST_IN_NM;
  const title = mode === 'even' ? 'depth (nm), even-handed' : inMicrometres ? 'depth (µm)' : 'depth (nm)';
  const axis: DepthAxis = { mode, range, window, x, depth, edges: edges_nm.map(x), ticks: [], title };
  axis.ticks = mode === 'even' ? evenTicks(axis, edges_nm, zones.z, textSize) : trueTicks(axis, inMicrometres, textSize);
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

function trueTicks(axis: DepthAxis, inMicrometres: boolean, textSize: number): DepthAxis['ticks'] {
  const unit = inMicrometres ? 1000 : 1;
  const [from, to] = axis.window.map((z) => z / unit);
  const wanted = Math.max(2, Math.floor((axis.range[1] - axis.range[0]) / (8 * textSize)));
  return niceTicks(from, to, wanted).map((value) => ({ x: axis.x(value * unit), label: plainNumber(value) }));
}

/** Boundaries first, then round depths of each zone where there is room: on an uneven axis the reader needs the figures most at the layers' ends. */
function evenTicks(axis: DepthAxis, edges_nm: number[], zones: number[], textSize: number): DepthAxis['ticks'] {
  const [from, to] = axis.window;
  const inner: number[] = [];
  for (let i = 0; i + 1 < zones.length; i++) {
    const a = Math.max(zones[i], from);
    const b = Math.min(zones[i + 1], to);
    if (b > a) inner.push(...niceTicks(a, b, Math.floor((axis.x(b) - axis.x(a)) / (5.5 * textSize))));
  }
  const candidates = [from, to, ...edges_nm, ...inner].filter((z) => z >= from && z <= to);
  const placed: { x: number; label: string; half: number }[] = [];
  for (const z of candidates) {
    const label = depthLabel(z);
    const half = textWidth(label, textSize) / 2;
    const x = axis.x(z);
    if (placed.every((other) => Math.abs(other.x - x) >= other.half + half + TICK_GAP * textSize)) placed.push({ x, label, half });
  }
  return placed.sort((a, b) => a.x - b.x).map(({ x, label }) => ({ x, label }));
}

/** nm, or um with its unit written where nm would have five digits and more. */
function depthLabel(z_nm: number): string {
  return z_nm >= 1e4 ? `${plainNumber(z_nm / 1000)} µm` : plainNumber(z_nm);
}

/** Four significant digits, without trailing zeros or exponents. */
function plainNumber(value: number): string {
  return String(Number(value.toPrecision(4)) + 0);
}
