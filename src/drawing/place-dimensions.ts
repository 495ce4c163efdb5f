import type { Points } from './curve.ts';
import type { Dimension } from './dimensions.ts';
import type { Frame } from './frame.ts';
import { runsWidth, textWidth } from './glyph-widths.ts';

/** px, x and y of the upper left corner */
export interface Box {
  x: number;
  y: number;
  w: number;
  h: number;
}

export interface PlacedDimension extends Dimension {
  /** px of the line */ x: number;
  /** where the figure stands */ box: Box;
  /** the symbol above its value, or both on one line */ stacked: boolean;
}

/** Curves and lines that a figure should not cover. */
export interface Obstacles {
  curves: Points[];
  boxes: Box[];
  /** px of upright lines */ uprights: number[];
}

/** Costs of a place; only their order counts. A place above LIMIT is no place. */
const COST = { rank: 1, side: 0.6, shift: 0.8, curve: 14, upright: 5, line: 60, outside: 1000, label: 1000 };
const LIMIT = 90;
const GAP = 3;

/**
 * Finds each dimension line its place, in the order given: of all its lines and positions of the figure the one that covers the least. One that finds none is
 * left out (null), unless it was moved by hand: then it stands where it was put. The same input gives the same picture.
 *
 * @param moved  dragged lines: offset from the place that would be found without it, px
 */
export function placeDimensions(frame: Frame, wanted: Dimension[], obstacles: Obstacles, moved: Record<string, [number, number]>): (PlacedDimension | null)[] {
  const placed: PlacedDimension[] = [];
  return wanted.map((dimension) => {
    let best: PlacedDimension | null = null;
    let least = Infinity;
    for (const candidate of candidates(frame, dimension)) {
      if (candidate.cost >= least) continue;
      const cost = candidate.cost + cover(frame, candidate.at, obstacles, placed);
      if (cost < least) [least, best] = [cost, candidate.at];
    }
    const offset = Object.hasOwn(moved, dimension.id) ? moved[dimension.id] : undefined;
    if (!best || (least > LIMIT && !offset)) return null;
    if (offset) {
      const [dx, dy] = offset;
      best = { ...best, x: best.x + dx, box: { ...best.box, x: best.box.x + dx, y: best.box.y + dy } };
    }
    placed.push(best);
    return best;
  });
}

/** Figure beside, on, above and below each line that the dimension may take. */
function candidates(frame: Frame, d: Dimension): { at: PlacedDimension; cost: number }[] {
  const { energy, small } = frame;
  const top = energy.y(d.high);
  const bottom = energy.y(d.low);
  const symbolWidth = runsWidth(d.symbol, small);
  const valueWidth = textWidth(d.value, small);
  const one = { w: symbolWidth + 0.4 * small + valueWidth, h: 1.35 * small };
  const two = { w: Math.max(symbolWidth, valueWidth), h: 2.45 * small };
  const found: { at: PlacedDimension; cost: number }[] = [];
  const add = (x: number, size: { w: number; h: number }, boxX: number, boxY: number, stacked: boolean, cost: number): void => {
    found.push({ at: { ...d, x, stacked, box: { x: boxX, y: boxY, ...size } }, cost });
  };
  d.places.forEach((x, rank) => {
    for (const [stacked, size] of [[false, one], [true, two]] as const) {
      const rankCost = rank * COST.rank + (stacked ? 0.3 : 0);
      for (const share of [0.5, 0.3, 0.7]) {
        const y = top + share * (bottom - top) - size.h / 2;
        const shift = share === 0.5 ? 0 : COST.shift;
        // On the line, which the figure then interrupts: only where enough of the line is left to be seen.
        if (bottom - top > size.h + 26) add(x, size, x - size.w / 2, y, stacked, rankCost + shift + (stacked ? 0 : COST.side));
        add(x, size, x + GAP + 3, y, stacked, rankCost + shift + COST.side);
        add(x, size, x - GAP - 3 - size.w, y, stacked, rankCost + shift + COST.side);
      }
      // Past the ends of a short line.
      const past = bottom - top < 26 ? 14 : GAP + 1;
      add(x, size, x - size.w / 2, top - past - size.h, stacked, rankCost + 2 * COST.shift);
      add(x, size, x - size.w / 2, bottom + past, stacked, rankCost + 2 * COST.shift);
    }
  });
  return found;
}

function cover(frame: Frame, at: PlacedDimension, obstacles: Obstacles, placed: PlacedDimension[]): number {
  const { area, lanes, energy } = frame;
  const { box } = at;
  let cost = 0;
  if (box.x < area.left - lanes.top + 1 || box.x + box.w > area.right + lanes.bottom - 1 || box.y < area.top + 1 || box.y + box.h > area.bottom - 1) cost += COST.outside;
  const inLane = at.x < area.left || at.x > area.right;
  // A metal's figures stay in its lane, the others out of it.
  if (!inLane && (box.x < area.left + 1 || box.x + box.w > area.right - 1)) cost += COST.outside;
  for (const other of obstacles.boxes) if (overlap(box, other, GAP)) cost += COST.label;
  const own = span(energy.y(at.high), energy.y(at.low), at.x);
  for (const other of placed) {
    if (overlap(box, other.box, GAP)) cost += COST.label;
    const line = span(energy.y(other.high), energy.y(other.low), other.x);
    if (overlap(box, line, GAP)) cost += COST.line;
    if (overlap(own, other.box, GAP)) cost += COST.line;
    if (overlap(own, line, GAP)) cost += COST.line;
  }
  for (const x of obstacles.uprights) if (x > box.x - 1 && x < box.x + box.w + 1) cost += COST.upright;
  for (const curve of obstacles.curves) cost += COST.curve * crossings(curve, box);
  return cost;
}

function span(top: number, bottom: number, x: number): Box {
  return { x: x - 3, y: top, w: 6, h: bottom - top };
}

export function overlap(a: Box, b: Box, gap: number): boolean {
  return a.x < b.x + b.w + gap && b.x < a.x + a.w + gap && a.y < b.y + b.h + gap && b.y < a.y + a.h + gap;
}

/** Share of a box's width that a curve runs through, 0..1, from five upright cuts. */
function crossings(curve: Points, box: Box): number {
  let hits = 0;
  for (let i = 0; i < 5; i++) {
    const y = curveAt(curve, box.x + (i / 4) * box.w);
    if (y > box.y - 1 && y < box.y + box.h + 1) hits++;
  }
  return hits / 5;
}

function curveAt(curve: Points, x: number): number {
  const n = curve.x.length;
  if (n === 0 || x < curve.x[0] || x > curve.x[n - 1]) return Number.NaN;
  let low = 0;
  let high = n - 1;
  while (high - low > 1) {
    const mid = (low + high) >> 1;
    if (curve.x[mid] <= x) low = mid;
    else high = mid;
  }
  const width = curve.x[high] - curve.x[low];
  return width > 0 ? curve.y[low] + ((x - curve.x[low]) / width) * (curve.y[high] - curve.y[low]) : curve.y[low];
}
