import { METAL_BAND, WAVE, type BarrierShape } from './barrier-shape.ts';

/** The barrier as steps of a wave's way, from the metal inwards. Arrays [steps] but for `end`. */
export interface WaveSteps {
  /** h m, cm m0 */ drift: Float64Array;
  /** sqrt(3)/12 h^2 m WAVE (U1 - U2) */ skew: Float64Array;
  /** h WAVE mean U */ lift: Float64Array;
  /** h WAVE, eV^-1 cm^-1 */ span: Float64Array;
  /** U and mass where the way ends */ edge: number;
  mass: number;
  /** +1 for electrons, -1 for holes: the sign between the carrier's energy and the electron's in the metal */ sign: number;
}

const ROOT_3 = Math.sqrt(3);
const HUGE = 1e100;
const STEEP = 200;

/** Largest |skew| of one step before division: beyond it the Magnus series does not converge to speak of. */
const MOST_SKEW = 0.3;
const MOST_STEPS = 20000;

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
    edge: shape.edge, mass: cells > 0 ? shape.mass(shape.edges[cells], cells - 1) : NaN, sign: shape.carrier === 'electron' ? 1 : -1,
  };
  for (let k = 0, i = 0; k < cells; k++) {
    const from = shape.edges[k];
    const h = (shape.edges[k + 1] - from) / parts[k];
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
  return out;
}

/**
 * Natural logarithm of the transmission from the metal to the neutral layer, by the wave equation of BenDaniel and Duke (Phys. Rev. 152, 683, 1966): psi and psi'/m
 * are continuous. -Infinity at and below the neutral edge.
 *
 * @param energy  the carrier's own, eV
 *
 * The wave that leaves into the neutral layer is led back to the metal, the way on which it grows, by the fourth-order Magnus step
 * (Iserles and Norsett, Phil. Trans. R. Soc. A 357, 983, 1999), which needs no fine steps where the wave is fast. In the metal it is split into the coming and the returning
 * wave of a free electron (METAL_BAND). Motion along the contact is left out, as in WKB.
 */
export function waveTransmission(steps: WaveSteps, energy: number): number {
  const { drift, skew, lift, span } = steps;
  const out = energy - steps.edge;
  if (!(out > 0)) return -Infinity;
  const leaving = Math.sqrt((WAVE * out) / steps.mass);
  // psi = 1, psi'/m = i v: the real part starts as (1, 0), the imaginary one as (0, v).
  let [re, dre, im, dim] = [1, 0, 0, leaving];
  let scale = 0;
  for (let i = drift.length - 1; i >= 0; i--) {
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
