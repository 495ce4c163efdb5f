import type { DepthAxis } from '../../src/drawing/depth-axis.ts';

/** The part of the depth in view, nm; undefined is the whole stack. */
export type DepthWindow = [number, number] | undefined;

/** Narrowest part that can be looked at, nm: below the distance of atoms there is nothing to see. */
const NARROWEST = 0.5;

/** How far an end may move to stand on a neat figure, px of the axis: after a press of a key; while a wheel turns, where more would be felt. */
const NEAT = { step: 6, turn: 0.5 } as const;

/**
 * Nearer (factor above 1) or farther about a place that stays where it is. In px of the axis, so that it feels the same on an even-handed one.
 *
 * @param x  px
 */
export function zoomed(axis: DepthAxis, total_nm: number, x: number, factor: number): DepthWindow {
  const [left, right] = axis.range;
  const at = Math.min(Math.max(x, left), right);
  return neat(axis, held([axis.depth(at - (at - left) / factor), axis.depth(at + (right - at) / factor)], total_nm), total_nm, NEAT.turn);
}

/** Nearer or farther with a depth in the middle of the picture, as far as the ends of the stack allow it; the ends on neat figures. */
export function zoomedOnto(axis: DepthAxis, total_nm: number, depth_nm: number, factor: number): DepthWindow {
  const [left, right] = axis.range;
  // Not beyond the ends of the stack: there the picture would show less than was asked for.
  const [least, most] = [axis.x(0), axis.x(total_nm)];
  const width = Math.min((right - left) / factor, most - least);
  const start = Math.min(Math.max(axis.x(depth_nm) - width / 2, least), most - width);
  return neat(axis, held([axis.depth(start), axis.depth(start + width)], total_nm), total_nm, NEAT.step);
}

function neat(axis: DepthAxis, window: DepthWindow, total: number, slack_px: number): DepthWindow {
  if (window === undefined) return undefined;
  const [from, to] = window.map((z) => (z <= 0 || z >= total ? z : neatDepth(axis, z, slack_px)));
  return to - from < NARROWEST ? window : held([Math.max(from, 0), Math.min(to, total)], total);
}

/** The depth with the fewest digits that lies within so many px. */
function neatDepth(axis: DepthAxis, z: number, slack_px: number): number {
  for (let power = Math.ceil(Math.log10(z)); power > -6; power--) {
    for (const size of [5, 2, 1]) {
      const step = size * 10 ** power;
      const rounded = Number((Math.round(z / step) * step).toPrecision(12));
      if (Math.abs(axis.x(rounded) - axis.x(z)) <= slack_px) return rounded;
    }
  }
  return z;
}

/** Moved along by px of the axis; to the right shows what lies deeper. */
export function panned(axis: DepthAxis, total_nm: number, dx: number): DepthWindow {
  const [left, right] = axis.range;
  // Not beyond the ends: there the window would shrink.
  const most = axis.x(total_nm) - right;
  const least = axis.x(0) - left;
  const by = Math.min(Math.max(dx, Math.min(least, 0)), Math.max(most, 0));
  return held([axis.depth(left + by), axis.depth(right + by)], total_nm);
}

/** Within the stack, not narrower than can be seen; the whole stack is no window. */
function held([from, to]: [number, number], total: number): DepthWindow {
  const width = Math.min(Math.max(to - from, NARROWEST), total);
  const start = Math.min(Math.max((from + to - width) / 2, 0), total - width);
  // A window that misses the whole by less than its rounding is the whole.
  return start <= 1e-6 * total && start + width >= total * (1 - 1e-6) ? undefined : [start, start + width];
}

/** The energies in view, nearer or farther about one of them, eV. */
export function zoomedEnergies(domain: readonly [number, number], about: number, factor: number): [number, number] {
  return [about - (about - domain[0]) / factor, about + (domain[1] - about) / factor];
}
