import { METAL_BAND, WAVE, type BarrierShape } from './barrier-shape.ts';
import { GAUSS_3 } from './quadrature.ts';

/** The barrier as steps of a wave's way, from the metal inwards. Arrays [steps] but for those of the cells. */
export interface WaveSteps {
  /** h m at the step's middle, and how it moves over it: cm m0 */ drift: Float64Array;
  driftSkew: Float64Array;
  driftBend: Float64Array;
  /** h WAVE U at the middle, and how that moves */ lift: Float64Array;
  liftSkew: Float64Array;
  liftBend: Float64Array;
  /** h WAVE, eV^-1 cm^-1 */ span: Float64Array;
  /** first step of each cell, and their number at the end [cells + 1] */ first: Int32Array;
  /** U at the inner end of a cell, its slope, eV/cm, and the mass there [cells]; the last is that of the neutral layer */ after: Float64Array;
  slope: Float64Array;
  mass: Float64Array;
  /** the cell behind which waves from `startEnergy` up run on by themselves */ start: number;
  startEnergy: number;
  /** +1 for electrons, -1 for holes: the sign between the carrier's energy and the electron's in the metal */ sign: number;
  /** relative error of the transmission by these steps at the energies they were made for; 0 where they were given outright */ error: number;
}

const ROOT_15 = Math.sqrt(15);
const HUGE = 1e100;
const STEEP = 200;
/** Up to this size of the exponent's square the series of cosh and sinh(x)/x end below rounding. */
const SERIES = 2;
/** Steps of one cell at most, and of the whole way. */
const MOST_PARTS = 256;
const MOST_STEPS = 8000;
/** Where one step and two halves differ by more, the order of the method does not show yet. */
const ASYMPTOTIC = 0.02;
const ORDER = 6;
/** Of waves below the lowest energy: the slowest looked at, as a share of it above the edge, and what all of them carry at most, as a share of the current. */
const SLOWEST = 0.01;
const SLOW_SHARE = 0.05;
const ROUNDING = 1e-9;

/** Steps of equal number in each cell, all the way. */
export function waveSteps(shape: BarrierShape, division: number): WaveSteps {
  return stepsOf(shape, new Array<number>(shape.layer.length).fill(division), 0, shape.layer.length - 1, -Infinity);
}

/**
 * Steps as fine, cell by cell, as the accuracy at the given energies asks for: one step of a cell against two halves tells the error, which falls with the sixth power.
 *
 * @param energies  of the wave, eV, above the neutral edge; the lowest tells where the way begins. One beginning for all keeps T(E) smooth.
 * @param accuracy  relative, of the transmission
 * @param slower    whether waves below the lowest energy are asked for too: those begin in the neutral layer, and carry little
 */
export function waveStepsFor(shape: BarrierShape, energies: readonly number[], accuracy: number, slower = false): WaveSteps {
  const cells = shape.layer.length;
  const lowest = Math.min(...energies);
  const start = lastRough(shape, lowest, accuracy);
  // ln T moves by twice as much as the wave.
  const tolerance = accuracy / 2 / cells;
  let error = 0;
  const slow = [lowest, shape.edge + SLOWEST * (lowest - shape.edge)];
  const parts = Array.from({ length: cells }, (_, k) => {
    if (k > start && !slower) return 1;
    let n = 1;
    let off = 0;
    for (;;) {
      off = halvingError(shape, k, n, k > start ? slow : energies);
      if (off <= ASYMPTOTIC || n >= MOST_PARTS / 4) break;
      n *= 4;
    }
    const share = k > start ? SLOW_SHARE : 1;
    const finer = Math.max(1, Math.ceil(((share * off) / tolerance) ** (1 / ORDER)));
    const most = Math.max(n, Math.min(MOST_PARTS, Math.floor(MOST_STEPS / cells)));
    const chosen = Math.min(most, n * finer);
    error += 2 * share * off * (n / chosen) ** ORDER;
    return chosen;
  });
  // An energy that is the lowest but for rounding begins there as well.
  return stepsOf(shape, parts, error, start, start < cells - 1 ? lowest - ROUNDING * (lowest - shape.edge) : -Infinity);
}

function emptySteps(steps: number, cells: number, sign: number, error: number): WaveSteps {
  const array = (n: number): Float64Array => new Float64Array(n);
  return {
    drift: array(steps), driftSkew: array(steps), driftBend: array(steps), lift: array(steps), liftSkew: array(steps), liftBend: array(steps), span: array(steps),
    first: new Int32Array(cells + 1), after: array(cells), slope: array(cells), mass: array(cells), start: cells - 1, startEnergy: -Infinity, sign, error,
  };
}

/** One step of a cell from `from` over h, its three Gauss points asked of the barrier. */
function fillStep(out: WaveSteps, i: number, shape: BarrierShape, cell: number, from: number, h: number, whole: boolean): void {
  const [u1, u2, u3] = GAUSS_3.nodes;
  const at = (g: number, u: number): number => (whole ? shape.height[3 * cell + g] : shape.at(from + u * h, cell));
  const [a, b, c] = [at(0, u1), at(1, u2), at(2, u3)];
  const [m1, m2, m3] = [shape.mass(from + u1 * h, cell), shape.mass(from + u2 * h, cell), shape.mass(from + u3 * h, cell)];
  out.drift[i] = h * m2;
  out.driftSkew[i] = (ROOT_15 / 3) * h * (m3 - m1);
  out.driftBend[i] = (10 / 3) * h * (m3 - 2 * m2 + m1);
  out.lift[i] = h * WAVE * b;
  out.liftSkew[i] = (ROOT_15 / 3) * h * WAVE * (c - a);
  out.liftBend[i] = (10 / 3) * h * WAVE * (c - 2 * b + a);
  out.span[i] = h * WAVE;
}

function stepsOf(shape: BarrierShape, parts: readonly number[], error: number, start: number, startEnergy: number): WaveSteps {
  const cells = shape.layer.length;
  const out = emptySteps(parts.reduce((sum, n) => sum + n, 0), cells, shape.carrier === 'electron' ? 1 : -1, error);
  out.start = start;
  out.startEnergy = startEnergy;
  for (let k = 0, i = 0; k < cells; k++) {
    const from = shape.edges[k];
    const h = (shape.edges[k + 1] - from) / parts[k];
    out.first[k] = i;
    out.first[k + 1] = i + parts[k];
    out.after[k] = shape.after[k];
    out.slope[k] = shape.slope(shape.edges[k + 1], k);
    out.mass[k] = shape.mass(shape.edges[k + 1], k);
    for (let j = 0; j < parts[k]; j++, i++) fillStep(out, i, shape, k, from + j * h, h, parts[k] === 1);
  }
  // The way ends at the neutral edge itself, flat.
  out.after[cells - 1] = shape.edge;
  out.slope[cells - 1] = 0;
  out.mass[cells - 1] = shape.massBehind;
  return out;
}

/** Two waves at once, (psi, psi'/m) each: the real and the imaginary part, without the factor exp(scale). */
interface Wave {
  re: number;
  dre: number;
  im: number;
  dim: number;
  scale: number;
}

/**
 * Leads both parts of a wave from the inner end of step `from` back to the outer end of step `to`, the way on which the wave grows, by Magnus steps of the sixth order, which
 * need not be fine where the wave is fast: Blanes, Casas and Ros, BIT 40, 434 (2000); Blanes et al., Phys. Rep. 470, 151 (2009), section 5.4; from memory, the order is
 * a test. A step's matrix [[0, m], [WAVE (U - E), 0]] is written as (a, b, c) for [[a, b], [c, -a]].
 */
function leadBack(steps: WaveSteps, energy: number, from: number, to: number, wave: Wave): void {
  const { drift, driftSkew, driftBend, lift, liftSkew, liftBend, span } = steps;
  let { re, dre, im, dim, scale } = wave;
  for (let i = from; i >= to; i--) {
    const b1 = drift[i];
    const b2 = driftSkew[i];
    const b3 = driftBend[i];
    const c1 = lift[i] - span[i] * energy;
    const c2 = liftSkew[i];
    const c3 = liftBend[i];
    const turn = b1 * c2 - b2 * c1;
    const pb = -20 * b1 - b3;
    const pc = -20 * c1 - c3;
    const qa = (b3 * c1 - b1 * c3) / 30;
    const qb = b2 + (turn * b1) / 30;
    const qc = c2 - (turn * c1) / 30;
    const a = (pb * qc - qb * pc) / 240;
    const b = b1 + b3 / 12 + (turn * qb - qa * pb) / 120;
    const c = c1 + c3 / 12 + (pc * qa - turn * qc) / 120;
    const x = a * a + b * c;
    let even: number;
    let odd: number;
    if (x < SERIES && x > -SERIES) {
      even = 1 + (x / 2) * (1 + (x / 12) * (1 + (x / 30) * (1 + (x / 56) * (1 + (x / 90) * (1 + (x / 132) * (1 + (x / 182) * (1 + x / 240)))))));
      odd = 1 + (x / 6) * (1 + (x / 20) * (1 + (x / 42) * (1 + (x / 72) * (1 + (x / 110) * (1 + (x / 156) * (1 + (x / 210) * (1 + x / 272)))))));
    } else if (x > STEEP * STEEP) {
      // e^root itself would overflow: it goes to the scale, and e^-root is nothing beside it.
      const root = Math.sqrt(x);
      even = 0.5;
      odd = 0.5 / root;
      scale += root;
    } else if (x > 0) {
      const root = Math.sqrt(x);
      const e = Math.exp(root);
      even = 0.5 * (e + 1 / e);
      odd = (0.5 * (e - 1 / e)) / root;
    } else {
      const root = Math.sqrt(-x);
      even = Math.cos(root);
      odd = Math.sin(root) / root;
    }
    const m11 = even - odd * a;
    const m12 = -odd * b;
    const m21 = -odd * c;
    const m22 = even + odd * a;
    const re0 = re;
    const im0 = im;
    re = m11 * re0 + m12 * dre;
    dre = m21 * re0 + m22 * dre;
    im = m11 * im0 + m12 * dim;
    dim = m21 * im0 + m22 * dim;
    const size = Math.abs(re) + Math.abs(im);
    if (size > HUGE) {
      re /= size;
      dre /= size;
      im /= size;
      dim /= size;
      scale += Math.log(size);
    }
  }
  wave.re = re;
  wave.dre = dre;
  wave.im = im;
  wave.dim = dim;
  wave.scale = scale;
}

const WHOLE = emptySteps(MOST_PARTS, 1, 1, 0);
const HALVES = emptySteps(2 * MOST_PARTS, 1, 1, 0);

/** How far n steps of a cell and 2n differ at the worst of the energies, relative: of both waves that start with psi alone and with its slope alone, each in its own measure. */
function halvingError(shape: BarrierShape, cell: number, n: number, energies: readonly number[]): number {
  const from = shape.edges[cell];
  const width = shape.edges[cell + 1] - from;
  for (let j = 0; j < n; j++) fillStep(WHOLE, j, shape, cell, from + (j * width) / n, width / n, n === 1);
  for (let j = 0; j < 2 * n; j++) fillStep(HALVES, j, shape, cell, from + (j * width) / (2 * n), width / (2 * n), false);
  const drift = width * shape.mass(from + 0.5 * width, cell);
  let worst = 0;
  for (const energy of energies) {
    const one = { re: 1, dre: 0, im: 0, dim: 1, scale: 0 };
    const two = { re: 1, dre: 0, im: 0, dim: 1, scale: 0 };
    leadBack(WHOLE, energy, n - 1, 0, one);
    leadBack(HALVES, energy, 2 * n - 1, 0, two);
    const shrink = Math.exp(one.scale - two.scale);
    // psi'/m is worth psi times the wave's number over its mass, or over the cell where that is less.
    const measure = Math.sqrt(Math.max(Math.abs(width * WAVE * (shape.height[3 * cell + 1] - energy)), 1 / drift) / drift);
    const off = Math.max(Math.abs(one.re * shrink - two.re), Math.abs(one.dre * shrink - two.dre) / measure, Math.abs(one.im * shrink - two.im) * measure, Math.abs(one.dim * shrink - two.dim));
    worst = Math.max(worst, off / Math.max(Math.abs(two.re), Math.abs(two.dre) / measure, Math.abs(two.im) * measure, Math.abs(two.dim)));
  }
  return worst;
}

/**
 * The cell behind which a wave runs into the neutral layer without being thrown back to speak of. A wave of slowly changing number k solves its equation but for k''/8k^3 of
 * itself, and k'' is k' over the length in which the band settles; or else so little is left of the band's bending that even a step of that height would not count.
 */
function lastRough(shape: BarrierShape, energy: number, accuracy: number): number {
  const { after, layer, edges, edge } = shape;
  let k = layer.length - 1;
  // A neutral layer that begins at the end of another throws back there.
  if (shape.mass(edges[k + 1], k) !== shape.massBehind) return k;
  for (; k > 0 && layer[k - 1] === layer[k]; k--) {
    const free = energy - after[k - 1];
    const left = Math.abs(after[k - 1] - edge);
    if (!(free > 0)) break;
    const number = Math.sqrt(WAVE * shape.mass(edges[k], k - 1) * free);
    const slope = Math.abs(shape.slope(edges[k], k - 1));
    const gentle = slope / (2 * free * number);
    const settling = slope / (left * number);
    if (gentle * Math.max(gentle, settling) > 2 * accuracy && left > accuracy * free) break;
  }
  return k;
}

/**
 * Natural logarithm of the transmission from the metal to the neutral layer, by the wave equation of BenDaniel and Duke (Phys. Rev. 152, 683, 1966): psi and psi'/m
 * are continuous. -Infinity at and below the neutral edge.
 *
 * @param energy  the carrier's own, eV
 *
 * From where the bands bend little over a wavelength the wave runs on by itself (`start`); the calculation starts there, with the wave of slowly changing number. In the metal it
 * is split into the coming and the returning wave of a free electron (METAL_BAND). Motion along the contact is left out, as in WKB.
 */
export function waveTransmission(steps: WaveSteps, energy: number): number {
  const neutral = steps.after.length - 1;
  if (!(energy > steps.after[neutral])) return -Infinity;
  const cell = energy >= steps.startEnergy ? steps.start : neutral;
  const free = energy - steps.after[cell];
  const leaving = Math.sqrt((WAVE * free) / steps.mass[cell]);
  // psi = 1, psi'/m = i v - k'/(2 k m): the real part starts as (1, -k'/2km), the imaginary one as (0, v); k'/k = -U'/2(E - U).
  const wave: Wave = { re: 1, dre: steps.slope[cell] / (4 * free * steps.mass[cell]), im: 0, dim: leaving, scale: 0 };
  leadBack(steps, energy, steps.first[cell + 1] - 1, 0, wave);
  // A hole of energy E is an electron of energy -E; what lies below the metal's band has no wave there.
  const coming = Math.sqrt(WAVE * (METAL_BAND + steps.sign * energy));
  if (!(coming > 0)) return -Infinity;
  // A = (psi + psi'/(i v))/2.
  const real = 0.5 * (wave.re + wave.dim / coming);
  const imaginary = 0.5 * (wave.im - wave.dre / coming);
  return Math.log(leaving / coming) - Math.log(real * real + imaginary * imaginary) - 2 * wave.scale;
}
