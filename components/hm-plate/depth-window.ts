import type { DepthAxis } from '../../src/drawing/depth-axis.ts';

/** The part of the depth in view, nm; undefined is the whole stack. */
export type DepthWindow = [number, number] | undefined;

/** Narrowest part that can be looked at, nm: below the distance of atoms there is nothing to see. */
const NARROWEST = 0.5;

/**
 * Nearer (factor above 1) or farther about a place that stays where it is. In px of the axis, so that it feels the same on an even-handed one.
 *
 * @param x  px
 */
export function zoomed(axis: DepthAxis, total_nm: number, x: number, factor: number): DepthWindow {
  const [left, right] = axis.range;
  const at = Math.min(Math.max(x, left), right);
  return held([axis.depth(at - (at - left) / factor), axis.depth(at + (right - at) / factor)], total_nm);
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
