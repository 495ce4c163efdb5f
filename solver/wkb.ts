import { WAVE, type BarrierShape } from './barrier-shape.ts';
import { GAUSS_3, GAUSS_5 } from './quadrature.ts';

export type Dispersion = 'one-band' | 'two-band';

/**
 * WKB exponent 2 Int kappa ds over all that lies above E; the transmission is its negative exponential.
 *
 * @param energy      the carrier's own, eV
 * @param dispersion  "one-band": kappa^2 = (2m/hbar^2)(U - E); "two-band": times 1 - (U - E)/Eg (Franz, in Handbuch der Physik 17, 155, 1956), which brings the
 *   other band near, and nothing decays beyond it
 * @param halved      every cell in two halves: the difference tells the rule's error
 *
 * Cells that lie above E as a whole have their Gauss points ready. Where the barrier crosses E the square root ends, and s = s_E + L u^2 makes the
 * integrand smooth; the neighbouring cell is taken along, for the root's end would be felt there too.
 */
export function wkbExponent(shape: BarrierShape, energy: number, dispersion: Dispersion = 'one-band', halved = false): number {
  const { before, after, height, weight, layer, edges } = shape;
  const cells = layer.length;
  let sum = 0;
  for (let k = 0; k < cells; k++) {
    const a = before[k] - energy;
    const b = after[k] - energy;
    if (a > 0 && b > 0) {
      // Falling into a crossing in the next cell of the layer: that one takes this one along.
      if (k + 1 < cells && layer[k + 1] === layer[k] && after[k + 1] <= energy) continue;
      if (halved) {
        const middle = 0.5 * (edges[k] + edges[k + 1]);
        sum += smoothPart(shape, energy, dispersion, k, edges[k], middle) + smoothPart(shape, energy, dispersion, k, middle, edges[k + 1]);
        continue;
      }
      for (let g = 3 * k; g < 3 * k + 3; g++) {
        const depth = height[g] - energy;
        if (depth > 0) sum += weight[g] * root(shape, depth, dispersion, k);
      }
    } else if (a > 0) {
      const at = crossing(shape, energy, k);
      const alone = k === 0 || layer[k - 1] !== layer[k] || before[k - 1] <= energy;
      sum += rootPart(shape, energy, dispersion, k, at, edges[alone ? k : k - 1], halved);
    } else if (b > 0) {
      const at = crossing(shape, energy, k);
      const next = k + 1;
      // The next cell is left to a crossing that follows upon it.
      const alone = next >= cells || layer[next] !== layer[k] || after[next] <= energy || (next + 1 < cells && layer[next + 1] === layer[k] && after[next + 1] <= energy);
      sum += rootPart(shape, energy, dispersion, k, at, edges[alone ? next : next + 1], halved);
      if (!alone) k = next;
    }
  }
  return sum + tailPart(shape, energy);
}

/** Behind the way's end U - edge = h exp(-s/l): 2 Int kappa ds in closed form; the other band is far. */
function tailPart({ tail, edge }: BarrierShape, energy: number): number {
  const free = energy - edge;
  const depth = tail.height - free;
  if (!(depth > 0)) return 0;
  const root = Math.sqrt(depth);
  return 4 * Math.sqrt(WAVE * tail.mass) * tail.length * (free > 0 ? root - Math.sqrt(free) * Math.atan(root / Math.sqrt(free)) : root);
}

function root(shape: BarrierShape, depth: number, dispersion: Dispersion, cell: number): number {
  if (dispersion === 'one-band') return Math.sqrt(depth);
  return Math.sqrt(Math.max(0, depth * (1 - depth / shape.gap(shape.edges[cell], cell))));
}

/** 2 sqrt(2 m0 q m)/hbar inside a cell: that of its Gauss points, by the middle one. */
function factor(shape: BarrierShape, cell: number): number {
  return shape.weight[3 * cell + 1] / (GAUSS_3.weights[1] * (shape.edges[cell + 1] - shape.edges[cell]));
}

function smoothPart(shape: BarrierShape, energy: number, dispersion: Dispersion, cell: number, from: number, to: number): number {
  let sum = 0;
  for (let g = 0; g < 3; g++) {
    const depth = shape.at(from + GAUSS_3.nodes[g] * (to - from), cell) - energy;
    if (depth > 0) sum += GAUSS_3.weights[g] * root(shape, depth, dispersion, cell);
  }
  return sum * factor(shape, cell) * (to - from);
}

/** From a crossing in `cell` to a place on its upper side, in this or a neighbouring cell of the layer. At the border of the two the barrier may bend, so each has points of its own. */
function rootPart(shape: BarrierShape, energy: number, dispersion: Dispersion, cell: number, crossingAt: number, to: number, halved: boolean): number {
  const length = to - crossingAt;
  // An energy within rounding of a cell's end crosses at that end, and nothing lies above it.
  if (length === 0) return 0;
  const part = (owner: number, from: number, width: number): number => {
    let sum = 0;
    for (let g = 0; g < GAUSS_5.nodes.length; g++) {
      const u = from + width * GAUSS_5.nodes[g];
      const depth = shape.at(crossingAt + length * u * u, owner) - energy;
      if (depth > 0) sum += GAUSS_5.weights[g] * 2 * u * root(shape, depth, dispersion, owner);
    }
    return sum * width * factor(shape, owner);
  };
  const over = (owner: number, from: number, upTo: number): number => {
    const width = upTo - from;
    return halved ? part(owner, from, 0.5 * width) + part(owner, from + 0.5 * width, 0.5 * width) : part(owner, from, width);
  };
  const inward = length > 0;
  const border = shape.edges[inward ? cell + 1 : cell];
  const share = (border - crossingAt) / length;
  if (share >= 1) return Math.abs(length) * over(cell, 0, 1);
  const u = Math.sqrt(Math.max(0, share));
  return Math.abs(length) * (over(cell, 0, u) + over(inward ? cell + 1 : cell - 1, u, 1));
}

/** Where U = E in a cell whose ends lie on both sides of it: secants kept inside the bracket (Illinois). */
function crossing(shape: BarrierShape, energy: number, cell: number): number {
  let [a, b] = [shape.edges[cell], shape.edges[cell + 1]];
  let fa = shape.before[cell] - energy;
  let fb = shape.after[cell] - energy;
  if (fb === 0) return b;
  if (fa === 0) return a;
  const enough = 1e-9 * shape.kT;
  for (let i = 0; i < 60; i++) {
    const s = b - (fb * (b - a)) / (fb - fa);
    const f = shape.at(s, cell) - energy;
    if (Math.abs(f) <= enough || Math.abs(b - a) <= 1e-13 * b) return s;
    if (f > 0 === fb > 0) fa *= 0.5;
    else [a, fa] = [b, fb];
    [b, fb] = [s, f];
  }
  return b;
}

/**
 * Exponent that runs smoothly over the top: above it, that of the energy mirrored at the top with the other sign, exact for a parabola
 * (Kemble, Phys. Rev. 48, 549, 1935); farther above than the barrier is high, straight on.
 *
 * The transmission is 1/(1 + exp(exponent)).
 */
export function kembleExponent(shape: BarrierShape, energy: number, dispersion: Dispersion = 'one-band'): number {
  const above = energy - shape.top;
  if (above <= 0) return wkbExponent(shape, energy, dispersion);
  const height = shape.top - shape.edge;
  if (above <= height) return -wkbExponent(shape, shape.top - above, dispersion);
  return (-wkbExponent(shape, shape.edge, dispersion) * above) / height;
}
