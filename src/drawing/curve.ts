import { curveMonotoneX } from 'd3-shape';
import { px } from './shapes.ts';

/** Points of one curve in px, x rising strictly. */
export interface Points {
  x: number[];
  y: number[];
}

/** Largest error of a thinned curve, px: below what can be seen. */
export const THINNING = 0.15;
/** Nodes farther apart than this on average are joined by a smooth curve, px. */
const SPARSE = 3;

/**
 * Path data through the points: "M x y L ..." where nodes are dense, thinned by less than THINNING; where they are sparse, cubics that never leave
 * the range of their two ends, so that no extremum is invented (Steffen, Astron. Astrophys. 239, 443, 1990, as in d3's curveMonotoneX).
 * A value that is not finite breaks the line.
 */
export function curvePath(p: Points): string {
  return finiteRuns(p).map(runPath).join('');
}

/** The same, continuing a path that already stands at an earlier point: the first move becomes a line. */
export function continuedPath(p: Points): string {
  return curvePath(p).replace(/^M/, 'L');
}

function runPath(p: Points): string {
  const n = p.x.length;
  if (n === 0) return '';
  if (n > 2 && p.x[n - 1] - p.x[0] > SPARSE * (n - 1)) {
    return smooth(p);
  }
  return polyline(thinned(p), 'M');
}

/** The monotone cubics written as path data. d3 draws on a context: this one writes instead. */
function smooth(p: Points): string {
  let d = '';
  const writer = {
    moveTo: (x: number, y: number) => (d += `M${px(x)},${px(y)}`),
    lineTo: (x: number, y: number) => (d += `L${px(x)},${px(y)}`),
    bezierCurveTo: (x1: number, y1: number, x2: number, y2: number, x: number, y: number) => (d += `C${px(x1)},${px(y1)},${px(x2)},${px(y2)},${px(x)},${px(y)}`),
  };
  const curve = curveMonotoneX(writer as unknown as CanvasRenderingContext2D);
  curve.lineStart();
  for (let i = 0; i < p.x.length; i++) curve.point(p.x[i], p.y[i]);
  curve.lineEnd();
  return d;
}

/** Straight lines through the points in their order. */
export function polyline(p: Points, first: 'M' | 'L'): string {
  let d = '';
  for (let i = 0; i < p.x.length; i++) d += `${i === 0 ? first : 'L'}${px(p.x[i])},${px(p.y[i])}`;
  return d;
}

function finiteRuns(p: Points): Points[] {
  if (p.y.every(Number.isFinite)) return [p];
  const runs: Points[] = [];
  let run: Points | null = null;
  for (let i = 0; i < p.x.length; i++) {
    if (!Number.isFinite(p.y[i])) {
      run = null;
      continue;
    }
    if (!run) runs.push((run = { x: [], y: [] }));
    run.x.push(p.x[i]);
    run.y.push(p.y[i]);
  }
  return runs;
}

/** Leaves out points while the straight line stays within THINNING of them, measured along y. Douglas and Peucker, Cartographica 10, 112 (1973). */
export function thinned(p: Points): Points {
  const n = p.x.length;
  if (n < 3) return p;
  const keep = new Uint8Array(n);
  keep[0] = keep[n - 1] = 1;
  const open = [0, n - 1];
  while (open.length > 0) {
    const last = open.pop()!;
    const first = open.pop()!;
    const slope = (p.y[last] - p.y[first]) / (p.x[last] - p.x[first] || Infinity);
    let worst = THINNING;
    let at = -1;
    for (let i = first + 1; i < last; i++) {
      const error = Math.abs(p.y[i] - p.y[first] - slope * (p.x[i] - p.x[first]));
      if (error > worst) [worst, at] = [error, i];
    }
    if (at < 0) continue;
    keep[at] = 1;
    open.push(first, at, at, last);
  }
  const out: Points = { x: [], y: [] };
  for (let i = 0; i < n; i++) {
    if (!keep[i]) continue;
    out.x.push(p.x[i]);
    out.y.push(p.y[i]);
  }
  return out;
}
