import { localBands } from './bands.ts';
import { tunnellingMass, type Carrier } from './carrier-constants.ts';
import { BOLTZMANN, ELECTRON_MASS, ELEMENTARY_CHARGE, EPSILON_0, PLANCK } from './constants.ts';
import type { ContactPath } from './contact-path.ts';
import { profileAt } from './profile.ts';
import { GAUSS_3 } from './quadrature.ts';
import type { Stack } from './stack.ts';
import { M_PER_CM } from './units.ts';

/** 2 m0 q/hbar^2, cm^-2 eV^-1: kappa^2 = WAVE m (U - E). */
export const WAVE = ((2 * ELECTRON_MASS * ELEMENTARY_CHARGE) / (PLANCK / (2 * Math.PI)) ** 2) * M_PER_CM ** 2;
/**
 * The metal: free electrons of mass m0, filled to this height above the bottom of their band, eV. Gold's 5.53 eV; Ashcroft and Mermin, Solid State Physics
 * (1976), table 2.1 (from memory). Only the exact transmission asks for it.
 */
export const METAL_BAND = 5.53;

/** Largest share of the barrier's height that one cell spans, and largest ratio of energies above the neutral edge. */
const CELL_SHARE = 0.04;
const CELL_RATIO = 2;
/** Largest ratio of distances from the metal that one cell spans where the image force counts. */
const IMAGE_RATIO = 1.6;
interface Cell {
  /** from the metal, cm */ from: number;
  to: number;
  /** cell of the path's nodes in which it begins */ mesh: number;
}

const MOST_HALVINGS = 40;

/**
 * A carrier's barrier, cut into cells of gentle shape. Energies are the carrier's own, eV, rising away from its band, zero at EF: U = Ec for electrons,
 * -Ev for holes. Cells run from the metal inwards and meet but for the step at an interface.
 */
export interface BarrierShape {
  carrier: Carrier;
  /** [cells + 1], cm */ edges: Float64Array;
  layer: Int32Array;
  /** U at both ends of a cell, inside it [cells] */ before: Float64Array;
  after: Float64Array;
  /** U at the Gauss points [3 cells] */ height: Float64Array;
  /** weight times 2 sqrt(WAVE m) there [3 cells], eV^-1/2 */ weight: Float64Array;
  /** highest point of the path */ top: number;
  /** where it lies, from the metal, cm */ topAt: number;
  /** band edge of the neutral layer: nothing passes below it */ edge: number;
  kT: number;
  /** tunnelling mass of the neutral layer where the way ends, m0; NaN where it is not known. The last cell may be another layer's: a neutral layer may begin where an insulator ends. */ massBehind: number;
  /** what is left of the bending where the way ends, eV, and the length in which it dies away, cm; zero where the way ends at the edge */ tail: { height: number; length: number; mass: number };
  /** U inside a cell, eV */ at(s: number, cell: number): number;
  /** dU/ds there, eV/cm */ slope(s: number, cell: number): number;
  /** tunnelling mass inside a cell, m0; NaN where it is not known */ mass(s: number, cell: number): number;
  /** gap inside a cell, eV */ gap(s: number, cell: number): number;
}

/** Highest band edge of a carrier over the path's nodes, its own energy, eV, without the image force. */
export function highestEdge(path: ContactPath, carrier: Carrier): number {
  const electron = carrier === 'electron';
  let highest = -Infinity;
  for (let i = 0; i < path.s.length; i++) highest = Math.max(highest, electron ? path.conduction[i] - path.psi[i] : path.psi[i] - path.valence[i]);
  return highest;
}

/**
 * @param imageForce  adds -q/(16 pi eps_hf s), with the permittivity of the layer at s
 * @param fineness    cells as many times finer than usual
 *
 * Between the mesh nodes psi is the cubic through both values and both fields. With the image force the path starts where it has pulled the band down to the
 * neutral edge (`deep`: to the bottom of the metal's band); nearer to the metal it is no barrier.
 */
export function barrierShape(stack: Stack, path: ContactPath, carrier: Carrier, imageForce: boolean, deep = false, fineness = 1): BarrierShape {
  const kT = BOLTZMANN * stack.temperature;
  const electron = carrier === 'electron';
  const edge = electron ? path.ecMinusEf : path.efMinusEv;
  const { s: z, psi, slope } = path;
  const last = z.length - 1;
  const flat = electron ? path.conduction : path.valence;
  const sign = electron ? 1 : -1;
  const places = layersOf(stack, path);
  const image = places.map((p) => (imageForce ? ELEMENTARY_CHARGE / (16 * Math.PI * p.bands(0).permittivityHighFrequency * EPSILON_0) : 0));

  // U without the image force in every mesh cell as a cubic in t from 0 to 1 [4 coefficients].
  const cubic = new Float64Array(4 * Math.max(0, last));
  for (let i = 0; i < last; i++) {
    const h = z[i + 1] - z[i];
    const [a, b, rise] = [h * slope[i], h * slope[i + 1], psi[i + 1] - psi[i]];
    cubic[4 * i] = sign * (flat[i] - psi[i]);
    cubic[4 * i + 1] = sign * (flat[i + 1] - flat[i] - a);
    cubic[4 * i + 2] = -sign * (3 * rise - 2 * a - b);
    cubic[4 * i + 3] = -sign * (a + b - 2 * rise);
  }
  /** U at s, in mesh cell i. */
  const heightAt = (s: number, i: number): number => {
    const t = (s - z[i]) / (z[i + 1] - z[i]);
    const c = image[path.layer[i]];
    return cubic[4 * i] + t * (cubic[4 * i + 1] + t * (cubic[4 * i + 2] + t * cubic[4 * i + 3])) - (c > 0 ? c / s : 0);
  };
  /** dU/ds there, eV/cm. */
  const slopeAt = (s: number, i: number): number => {
    const h = z[i + 1] - z[i];
    const t = (s - z[i]) / h;
    const c = image[path.layer[i]];
    return (cubic[4 * i + 1] + t * (2 * cubic[4 * i + 2] + t * 3 * cubic[4 * i + 3])) / h + (c > 0 ? c / (s * s) : 0);
  };

  const highest = highestEdge(path, carrier);
  const range = Math.max(highest - edge, kT);
  const start = last > 0 && imageForce ? image[path.layer[0]] / (deep ? Math.max(highest, 0) + METAL_BAND : range) : 0;

  const cells: Cell[] = [];
  const offset = 0.01 * kT;
  const share = CELL_SHARE / fineness;
  const ratio = CELL_RATIO ** (1 / fineness);
  const imageRatio = IMAGE_RATIO ** (1 / fineness);
  const smooth = (mesh: number, from: number, to: number): boolean => {
    const c = image[path.layer[mesh]];
    const pull = (s: number): number => (c > 0 ? c / s : 0);
    // Below the neutral edge nothing is ever in the way: how the band runs there is all the same.
    const least = edge - kT;
    const a = Math.max(least, heightAt(from, mesh) + pull(from));
    const b = Math.max(least, heightAt(to, mesh) + pull(to));
    const m = Math.max(least, heightAt(0.5 * (from + to), mesh) + pull(0.5 * (from + to)));
    if (a === least && b === least && m === least) return true;
    if (pull(from) - pull(to) > 0.1 * kT && to > imageRatio * from) return false;
    if (Math.abs(a - b) > share * range || Math.abs(m - 0.5 * (a + b)) > 0.5 * share * range) return false;
    const [low, high] = a < b ? [a, b] : [b, a];
    return high - edge + offset < ratio * Math.max(low - edge + offset, offset);
  };
  const divide = (mesh: number, from: number, to: number, depth: number): void => {
    if (depth >= MOST_HALVINGS || smooth(mesh, from, to)) {
      cells.push({ from, to, mesh });
      return;
    }
    const c = image[path.layer[mesh]];
    const middle = c > 0 && to > imageRatio * imageRatio * from ? Math.sqrt(from * to) : 0.5 * (from + to);
    divide(mesh, from, middle, depth + 1);
    divide(mesh, middle, to, depth + 1);
  };
  for (let i = 0; i < last; ) {
    if (path.layer[i + 1] !== path.layer[i]) {
      i++;
      continue;
    }
    // Between two nodes psi is one cubic; where two meet its second derivative may jump, and no cell goes across.
    if (z[i + 1] > start) divide(i, Math.max(z[i], start), z[i + 1], 0);
    i++;
  }

  const shape: BarrierShape = {
    carrier, edges: new Float64Array(0), layer: new Int32Array(0), before: new Float64Array(0), after: new Float64Array(0), height: new Float64Array(0), weight: new Float64Array(0),
    top: edge, topAt: z[last], edge, kT, massBehind: places[path.layer[last]].mass(z[last], carrier), tail: { height: 0, length: 0, mass: 0 },
    at: (s, cell) => heightAt(s, cells[cell].mesh),
    slope: (s, cell) => slopeAt(s, cells[cell].mesh),
    mass: (s, cell) => places[path.layer[cells[cell].mesh]].mass(s, carrier),
    gap: (s, cell) => places[path.layer[cells[cell].mesh]].bands(s).gap,
  };
  fill(shape, cells, path);
  if (splitAtExtrema(shape, cells)) fill(shape, cells, path);
  for (let k = 0; k < cells.length; k++) {
    if (shape.before[k] > shape.top) [shape.top, shape.topAt] = [shape.before[k], shape.edges[k]];
    if (shape.after[k] > shape.top) [shape.top, shape.topAt] = [shape.after[k], shape.edges[k + 1]];
  }
  if (cells.length > 0) shape.tail = tailOf(shape);
  return shape;
}

/** The bands settle exponentially, so the height and slope at the way's end tell the rest. */
function tailOf(shape: BarrierShape): BarrierShape['tail'] {
  const k = shape.layer.length - 1;
  const end = shape.edges[k + 1];
  const height = shape.after[k] - shape.edge;
  const length = -height / shape.slope(end, k);
  return height > 0 && height < shape.kT && length > 0 && length < end ? { height, length, mass: shape.mass(end, k) } : { height: 0, length: 0, mass: 0 };
}

interface Place {
  bands(s: number): ReturnType<typeof localBands>;
  mass(s: number, carrier: Carrier): number;
}

/** Bands and masses of the path's layers against the distance from the metal; worked out once where the composition does not move. */
function layersOf(stack: Stack, path: ContactPath): Place[] {
  const { temperature: T, assumptions } = stack;
  let total = 0;
  const tops = stack.layers.map((layer) => (total += layer.thickness) - layer.thickness);
  return stack.layers.map((layer, l) => {
    const xAt = (s: number): number => profileAt(layer.x, Math.min(layer.thickness, Math.max(0, (path.side === 'top' ? s : total - s) - tops[l])), layer.thickness);
    const moves = layer.x.kind !== 'constant';
    const x0 = moves ? NaN : xAt(0);
    const bandsOf = (x: number) => localBands(layer.material, x, T, { ...assumptions, narrowing: false }, { donors: 0, acceptors: 0 });
    let kept: ReturnType<typeof localBands> | null = null;
    const masses: Partial<Record<Carrier, number>> = {};
    return {
      bands: (s) => (moves ? bandsOf(xAt(s)) : (kept ??= bandsOf(x0))),
      mass: (s, carrier) => (moves ? (tunnellingMass(layer.material, xAt(s), carrier) ?? NaN) : (masses[carrier] ??= tunnellingMass(layer.material, x0, carrier) ?? NaN)),
    };
  });
}

function fill(shape: BarrierShape, cells: Cell[], path: ContactPath): void {
  const n = cells.length;
  shape.edges = new Float64Array(n + 1);
  shape.layer = new Int32Array(n);
  shape.before = new Float64Array(n);
  shape.after = new Float64Array(n);
  shape.height = new Float64Array(3 * n);
  shape.weight = new Float64Array(3 * n);
  cells.forEach(({ from, to, mesh }, k) => {
    shape.edges[k] = from;
    shape.edges[k + 1] = to;
    shape.layer[k] = path.layer[mesh];
    shape.before[k] = shape.at(from, k);
    shape.after[k] = shape.at(to, k);
    for (let g = 0; g < 3; g++) {
      const s = from + GAUSS_3.nodes[g] * (to - from);
      shape.height[3 * k + g] = shape.at(s, k);
      shape.weight[3 * k + g] = 2 * Math.sqrt(WAVE * shape.mass(s, k)) * GAUSS_3.weights[g] * (to - from);
    }
  });
}

const GOLDEN = (3 - Math.sqrt(5)) / 2;

/** Puts a cell's edge on every hill and dale inside a layer, so that the barrier rises or falls steadily within a cell. @returns whether there was one */
function splitAtExtrema(shape: BarrierShape, cells: Cell[]): boolean {
  const cuts: { cell: number; s: number }[] = [];
  /** Looks between two places of one cell for the highest (sense 1) or lowest place, by golden section. */
  const search = (cell: number, sense: number, from: number, to: number): void => {
    let [a, b] = [from, to];
    for (let i = 0; i < 60 && b - a > 1e-7 * to; i++) {
      const c = a + GOLDEN * (b - a);
      const d = b - GOLDEN * (b - a);
      if (sense * shape.at(c, cell) > sense * shape.at(d, cell)) b = d;
      else a = c;
    }
    const cut = 0.5 * (a + b);
    const margin = 1e-4 * (cells[cell].to - cells[cell].from);
    if (cut > cells[cell].from + margin && cut < cells[cell].to - margin) cuts.push({ cell, s: cut });
  };
  const scale = 1e-9 * shape.kT;
  const sense = (a: number, b: number, c: number): number => (b - a > scale && b - c > scale ? 1 : a - b > scale && c - b > scale ? -1 : 0);
  cells.forEach(({ from, to }, k) => {
    const h = [shape.before[k], shape.height[3 * k], shape.height[3 * k + 1], shape.height[3 * k + 2], shape.after[k]];
    const s = [from, ...GAUSS_3.nodes.map((u) => from + u * (to - from)), to];
    for (let g = 1; g < 4; g++) {
      const turn = sense(h[g - 1], h[g], h[g + 1]);
      if (turn !== 0) search(k, turn, s[g - 1], s[g + 1]);
    }
    // A hill on the border of two cells lies in one of them.
    if (k + 1 < cells.length && shape.layer[k + 1] === shape.layer[k]) {
      const turn = sense(h[3], h[4], shape.height[3 * (k + 1)]);
      if (turn === 0) return;
      search(k, turn, s[3], to);
      search(k + 1, turn, to, to + GAUSS_3.nodes[0] * (cells[k + 1].to - to));
    }
  });
  cuts.sort((a, b) => b.s - a.s);
  for (const { cell, s } of cuts) {
    const { from, to, mesh } = cells[cell];
    if (!(s > from && s < to)) continue;
    cells[cell].to = s;
    cells.splice(cell + 1, 0, { from: s, to, mesh });
  }
  return cuts.length > 0;
}
