import { METAL_BAND, WAVE, type BarrierShape } from './barrier-shape.ts';
import { GAUSS_3 } from './quadrature.ts';

/** The barrier as steps of a wave's way, from the metal inwards. Arrays [steps] but for `end`. */
export interface WaveSteps {
  /** h m, cm m0 */ drift: Float64Array;
  /** sqrt(3)/12 h^2 m WAVE (U1 - U2) */ skew: Float64Array;
  /** h WAVE mean U */ lift: Float64Array;
  /** h WAVE, eV^-1 cm^-1 */ span: Float64Array;
  /** first step of each cell, and their number at the end [cells + 1] */ first: Int32Array;
  /** U at the inner end of a cell, its slope, eV/cm, and the mass there [cells]; the last is that of the neutral layer */ after: Float64Array;
  slope: Float64Array;
  mass: Float64Array;
  /** whether the next cell begins as this one ends [cells] */ joined: Uint8Array;
  /** +1 for electrons, -1 for holes: the sign between the carrier's energy and the electron's in the metal */ sign: number;
}

const ROOT_3 = Math.sqrt(3);
const HUGE = 1e100;
const STEEP = 200;

/** Largest |skew| of one step before division: beyond it the Magnus series does not converge to speak of. */
const MOST_SKEW = 0.3;
const MOST_STEPS = 4000;

/**
 * @param division  steps a cell of gentle waves; where the wave is fast and the barrier slopes, cells are divided further
 */
export function waveSteps(shape: BarrierShape, division: number): WaveSteps {
  const cells = shape.layer.length;
  const parts = Array.from({ length: cells }, (_, k) => {
    const h = shape.edges[k + 1] - shape.edges[k];
    const skew = (ROOT_3 / 12) * h * h * shape.mass(shape.edges[k], k) * WAVE * Math.abs(shape.height[3 * k] - shape.height[3 * k + 2]);
    return division * Math.min(MOST_STEPS / cells / division, Math.ceil(Math.sqrt(skew / MOST_SKEW)) || 1);
  }).map(Math.ceil);
  const steps = parts.reduce((sum, n) => sum + n, 0);
  const out: WaveSteps = {
    drift: new Float64Array(steps), skew: new Float64Array(steps), lift: new Float64Array(steps), span: new Float64Array(steps),
    first: new Int32Array(cells + 1), after: new Float64Array(cells), slope: new Float64Array(cells), mass: new Float64Array(cells), joined: new Uint8Array(cells),
    sign: shape.carrier === 'electron' ? 1 : -1,
  };
  for (let k = 0, i = 0; k < cells; k++) {
    const from = shape.edges[k];
    const h = (shape.edges[k + 1] - from) / parts[k];
    out.first[k] = i;
    out.first[k + 1] = i + parts[k];
    out.after[k] = shape.after[k];
    out.slope[k] = endSlope(shape.height[3 * k + 1], shape.height[3 * k + 2], shape.after[k]) / (shape.edges[k + 1] - from);
    out.mass[k] = shape.mass(shape.edges[k + 1], k);
    out.joined[k] = k + 1 < cells && shape.layer[k + 1] === shape.layer[k] ? 1 : 0;
    for (let j = 0; j < parts[k]; j++, i++) {
      const middle = from + (j + 0.5) * h;
      const near = shape.at(middle - (ROOT_3 / 6) * h, k);
      const far = shape.at(middle + (ROOT_3 / 6) * h, k);
      const mass = shape.mass(middle, k);
      out.drift[i] = h * mass;
      out.skew[i] = (ROOT_3 / 12) * h * h * mass * WAVE * (near - far);
      out.lift[i] = 0.5 * h * WAVE * (near + far);
      out.span[i] = h * WAVE;
    }
  }
  // The way ends at the neutral edge itself, flat.
  out.after[cells - 1] = shape.edge;
  out.slope[cells - 1] = 0;
  return out;
}

/** Slope at a cell's end, per cell, of the parabola through its middle, its third Gauss point and its end. */
function endSlope(middle: number, third: number, end: number): number {
  const u = GAUSS_3.nodes[2];
  return (middle * (1 - u)) / ((u - 0.5) * 0.5) - (third * 0.5) / ((u - 0.5) * (1 - u)) + (end * (1.5 - u)) / (0.5 * (1 - u));
}

/** Change of the wave's number over a wave, |k'|/k^2, below which it runs on by itself: what is thrown back is the square of it. */
export const GENTLE = 1.5e-3;

/** The cell behind which the wave runs into the neutral layer without being thrown back to speak of. */
function lastRough(steps: WaveSteps, energy: number): number {
  const { after, slope, mass, joined } = steps;
  let k = after.length - 1;
  while (k > 0 && joined[k - 1] === 1) {
    const free = energy - after[k - 1];
    if (!(free > 0) || slope[k - 1] ** 2 > 4 * GENTLE ** 2 * WAVE * mass[k - 1] * free ** 3) break;
    k--;
  }
  return k;
}

/**
 * Natural logarithm of the transmission from the metal to the neutral layer, by the wave equation of BenDaniel and Duke (Phys. Rev. 152, 683, 1966): psi and psi'/m
 * are continuous. -Infinity at and below the neutral edge.
 *
 * @param energy  the carrier's own, eV
 *
 * From where the bands bend little over a wavelength the wave runs on by itself; the calculation starts there, with the wave of slowly changing number. It is led back to the metal, the way on which it grows, by the fourth-order Magnus step
 * (Iserles and Norsett, Phil. Trans. R. Soc. A 357, 983, 1999), which needs no fine steps where the wave is fast. In the metal it is split into the coming and the returning
 * wave of a free electron (METAL_BAND). Motion along the contact is left out, as in WKB.
 */
export function waveTransmission(steps: WaveSteps, energy: number): number {
  const { drift, skew, lift, span } = steps;
  const neutral = steps.after.length - 1;
  if (!(energy > steps.after[neutral])) return -Infinity;
  const cell = lastRough(steps, energy);
  const free = energy - steps.after[cell];
  const leaving = Math.sqrt((WAVE * free) / steps.mass[cell]);
  // psi = 1, psi'/m = i v - k'/(2 k m): the real part starts as (1, -k'/2km), the imaginary one as (0, v); k'/k = -U'/2(E - U).
  let [re, dre, im, dim] = [1, steps.slope[cell] / (4 * free * steps.mass[cell]), 0, leaving];
  let scale = 0;
  for (let i = steps.first[cell + 1] - 1; i >= 0; i--) {
    const a = skew[i];
    const b = drift[i];
    const c = lift[i] - span[i] * energy;
    const square = a * a + b * c;
    let even: number;
    let odd: number;
    if (square > STEEP * STEEP) {
      // e^root itself would overflow: it goes to the scale, and e^-root is nothing beside it.
      even = 0.5;
      odd = 0.5 / Math.sqrt(square);
      scale += Math.sqrt(square);
    } else if (square > 1e-8) {
      const root = Math.sqrt(square);
      const e = Math.exp(root);
      even = 0.5 * (e + 1 / e);
      odd = (0.5 * (e - 1 / e)) / root;
    } else if (square < -1e-8) {
      const root = Math.sqrt(-square);
      even = Math.cos(root);
      odd = Math.sin(root) / root;
    } else {
      even = 1 + square / 2;
      odd = 1 + square / 6;
    }
    [re, dre] = [even * re - odd * (a * re + b * dre), even * dre - odd * (c * re - a * dre)];
    [im, dim] = [even * im - odd * (a * im + b * dim), even * dim - odd * (c * im - a * dim)];
    const size = Math.abs(re) + Math.abs(im);
    if (size > HUGE) {
      re /= size;
      dre /= size;
      im /= size;
      dim /= size;
      scale += Math.log(size);
    }
  }
  // A hole of energy E is an electron of energy -E; what lies below the metal's band has no wave there.
  const coming = Math.sqrt(WAVE * (METAL_BAND + steps.sign * energy));
  if (!(coming > 0)) return -Infinity;
  // A = (psi + psi'/(i v))/2.
  const real = 0.5 * (re + dim / coming);
  const imaginary = 0.5 * (im - dre / coming);
  return Math.log(leaving / coming) - Math.log(real * real + imaginary * imaginary) - 2 * scale;
}
