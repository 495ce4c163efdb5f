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
  /** lines that may be covered sooner, as the dashes of the Fermi level */ dashes: Points[];
  boxes: Box[];
  /** where a curve steps upright */ steps: Box[];
  /** px of upright lines */ uprights: number[];
}

/** Costs of a place; only their order counts. A place above LIMIT is no place. */
const COST = { rank: 1, side: 0.6, shift: 0.8, curve: 14, step: 9, dash: 8, upright: 5, line: 60, outside: 1000, label: 1000 };
const LIMIT = 13;
const GAP = 3;
/** Between the symbol and its value on one line, of the font size. */
export const SYMBOL_GAP = 0.5;

/**
 * Finds each dimension line its place, in the order given: of all its lines and positions of the figure the one that covers the least. One that finds none is
 * left out (null), unless it was moved by hand: then it stands where it was put. The same input gives the same picture.
 *
 * @param moved  dragged lines: offset from the place that would be found without it, px
 */
export function placeDimensions(frame: Frame, wanted: Dimension[], obstacles: Obstacles, moved: Record<string, [number, number]>): (PlacedDimension | null)[] {
  const placed: PlacedDimension[] = [];
  return wanted.map((dimension) => {
    let found: Candidate | null = null;
    let least = Infinity;
    eachCandidate(frame, dimension, (candidate) => {
      if (candidate.cost >= least) return;
      const cost = candidate.cost + cover(frame, dimension, candidate, obstacles, placed, least);
      if (cost < least) [least, found] = [cost, { ...candidate }];
    });
    const chosen = found as Candidate | null;
    let best: PlacedDimension | null = chosen && { ...dimension, x: chosen.lineX, stacked: chosen.stacked, box: { x: chosen.x, y: chosen.y, w: chosen.w, h: chosen.h } };
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

/** A place that a figure may take, with the px of its line. */
interface Candidate extends Box {
  lineX: number;
  stacked: boolean;
  cost: number;
}

/**
 * Figure beside, on, above and below each line that the dimension may take. There are some hundred for each dimension line and the picture is redrawn while a value is
 * dragged, so one object is lent to `consider` again and again.
 */
function eachCandidate(frame: Frame, d: Dimension, consider: (candidate: Candidate) => void): void {
  const { energy, small } = frame;
  const top = energy.y(d.high);
  const bottom = energy.y(d.low);
  const symbolWidth = runsWidth(d.symbol, small);
  const valueWidth = textWidth(d.value, small);
  const one = { w: symbolWidth + SYMBOL_GAP * small + valueWidth, h: 1.35 * small };
  const two = { w: Math.max(symbolWidth, valueWidth), h: 2.45 * small };
  const lent: Candidate = { lineX: 0, stacked: false, cost: 0, x: 0, y: 0, w: 0, h: 0 };
  const add = (x: number, size: { w: number; h: number }, boxX: number, boxY: number, stacked: boolean, cost: number): void => {
    lent.lineX = x;
    lent.x = boxX;
    lent.y = boxY;
    lent.w = size.w;
    lent.h = size.h;
    lent.stacked = stacked;
    lent.cost = cost;
    consider(lent);
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
}

/** What a place would cover. Stops counting beyond `enough`. */
function cover(frame: Frame, d: Dimension, at: Candidate, obstacles: Obstacles, placed: PlacedDimension[], enough: number): number {
  const { area, lanes, energy } = frame;
  const { lineX } = at;
  // A metal's figures stay in its lane, the others out of it.
  const inLane = lineX < area.left || lineX > area.right;
  const [left, right] = !inLane ? [area.left, area.right] : lineX < area.left ? [area.left - lanes.top, area.left] : [area.right, area.right + lanes.bottom];
  if (at.x < left + 1 || at.x + at.w > right - 1 || at.y < area.top + 1 || at.y + at.h > area.bottom - 1) return COST.outside;
  let cost = at.cost;
  for (const other of obstacles.boxes) if (overlap(at, other, GAP)) return COST.label;
  const own = span(energy.y(d.high), energy.y(d.low), lineX);
  for (const other of placed) {
    if (overlap(at, other.box, GAP)) return COST.label;
    const line = span(energy.y(other.high), energy.y(other.low), other.x);
    if (overlap(at, line, GAP)) cost += COST.line;
    if (overlap(own, other.box, GAP)) cost += COST.line;
    if (overlap(own, line, GAP)) cost += COST.line;
    if (cost >= enough) return cost;
  }
  for (const x of obstacles.uprights) if (x > at.x - 1 && x < at.x + at.w + 1) cost += COST.upright;
  for (const curve of obstacles.curves) {
    if (cost >= enough) return cost;
    cost += COST.curve * crossings(curve, at);
  }
  for (const step of obstacles.steps) if (overlap(at, step, 0)) cost += COST.step;
  for (const curve of obstacles.dashes) cost += COST.dash * crossings(curve, at);
  return cost - at.cost;
}

/** A line with its arrows. Cut at the ends, since two lines that meet at one level, as phi_Bn and phi_Bp do, are not in each other's way. */
function span(top: number, bottom: number, x: number): Box {
  const cut = Math.min(4, (bottom - top) / 2);
  return { x: x - 3, y: top + cut, w: 6, h: bottom - top - 2 * cut };
}

export function overlap(a: Box, b: Box, gap: number): boolean {
  return a.x < b.x + b.w + gap && b.x < a.x + a.w + gap && a.y < b.y + b.h + gap && b.y < a.y + a.h + gap;
}

/** Share of a box's width that a curve runs through, 0..1, from five upright cuts. */
function crossings(curve: Points, box: Box): number {
  const n = curve.x.length;
  if (n === 0 || box.x > curve.x[n - 1] || box.x + box.w < curve.x[0]) return 0;
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
