/**
 * Complete Fermi-Dirac integrals F_j(eta) = 1/Gamma(j + 1) Int_0^inf t^j/(1 + exp(t - eta)) dt of order -1/2, 1/2, 3/2, and the inverse
 * of order 1/2. All arguments and values are dimensionless.
 *
 * Method: piecewise polynomials, as in Fukushima, Appl. Math. Comput. 259, 708 (2015), with cells and coefficients of our own: cells of
 * width 1 and degree 13 on [-2, 40]; below, t + t^2 P(t) in t = exp(eta); above, Sommerfeld's expansion in 1/eta^2 (Dingle, Appl. Sci.
 * Res. B 6, 225, 1957), whose neglected part exp(-eta) is below 5e-18. Even and odd powers are summed apart: two short chains of
 * multiplications run side by side where Horner's one long chain waits for itself.
 * Checked against 25-digit values: test/solver/fermi-integral.test.ts.
 */
import {
  HALF_CELLS, HALF_TAIL, INVERSE_CELLS, INVERSE_HIGH, INVERSE_LOW, MINUS_HALF_CELLS, MINUS_HALF_TAIL, THREE_HALVES_CELLS, THREE_HALVES_TAIL,
} from './fermi-integral-coefficients.ts';

const LOW = -2;
const HIGH = 40;
const PER_CELL = 14;
/** Below this exp(eta) alone is exact to the last bit. */
const NONDEGENERATE = -38;

const SOMMERFELD_TERMS = 10;

/** Dirichlet's eta function sum (-1)^k/(k + 1)^s at s = 2, 4, .. : closed forms (Abramowitz and Stegun 23.2.24), from s = 8 on by its own sum. */
function dirichletEta(s: number): number {
  if (s === 2) return Math.PI ** 2 / 12;
  if (s === 4) return (7 * Math.PI ** 4) / 720;
  if (s === 6) return (31 * Math.PI ** 6) / 30240;
  let sum = 0;
  for (let k = 200; k >= 1; k--) sum += (k % 2 === 1 ? 1 : -1) * k ** -s;
  return sum;
}

/** Sommerfeld factor: F_j = eta^(j+1)/Gamma(j+2) [1 + sum_k 2 eta(2k) (j+1) j .. (j+2-2k) / eta^(2k)]. */
function sommerfeldCoefficients(j: number): Float64Array {
  const out = [1];
  let falling = 1;
  for (let k = 1; k <= SOMMERFELD_TERMS; k++) {
    falling *= (j + 3 - 2 * k) * (j + 2 - 2 * k);
    out.push(2 * dirichletEta(2 * k) * falling);
  }
  return Float64Array.from(out);
}

const SOMMERFELD = { minusHalf: sommerfeldCoefficients(-0.5), half: sommerfeldCoefficients(0.5), threeHalves: sommerfeldCoefficients(1.5) };
const ROOT_PI = Math.sqrt(Math.PI);

/** c[o] + c[o + 1] x + .. + c[o + 10] x^10. */
function degree10(c: Float64Array, o: number, x: number): number {
  const w = x * x;
  const even = ((((c[o + 10] * w + c[o + 8]) * w + c[o + 6]) * w + c[o + 4]) * w + c[o + 2]) * w + c[o];
  const odd = (((c[o + 9] * w + c[o + 7]) * w + c[o + 5]) * w + c[o + 3]) * w + c[o + 1];
  return even + x * odd;
}

/** F below LOW from t = exp(eta). */
function tail(c: Float64Array, t: number): number {
  return t + t * t * degree10(c, 0, t);
}

/** F in cell k of eta, u = 2 (eta - k) - 1. */
function cell(c: Float64Array, k: number, u: number): number {
  const o = (k - LOW) * PER_CELL;
  const w = u * u;
  const even = (((((c[o + 12] * w + c[o + 10]) * w + c[o + 8]) * w + c[o + 6]) * w + c[o + 4]) * w + c[o + 2]) * w + c[o];
  const odd = (((((c[o + 13] * w + c[o + 11]) * w + c[o + 9]) * w + c[o + 7]) * w + c[o + 5]) * w + c[o + 3]) * w + c[o + 1];
  return even + u * odd;
}

function sommerfeld(c: Float64Array, eta: number): number {
  const v = 1 / (eta * eta);
  let sum = c[SOMMERFELD_TERMS];
  for (let k = SOMMERFELD_TERMS - 1; k >= 0; k--) sum = sum * v + c[k];
  return sum;
}

/** F_-1/2(eta) = dF_1/2/deta; any finite eta. NaN gives NaN. */
export function fermiMinusHalf(eta: number): number {
  if (eta < LOW) return eta < NONDEGENERATE ? Math.exp(eta) : tail(MINUS_HALF_TAIL, Math.exp(eta));
  if (eta < HIGH) {
    const k = Math.floor(eta);
    return cell(MINUS_HALF_CELLS, k, 2 * (eta - k) - 1);
  }
  return ((2 / ROOT_PI) * Math.sqrt(eta)) * sommerfeld(SOMMERFELD.minusHalf, eta);
}

/** F_1/2(eta): n = Nc F_1/2((EF - Ec)/kT). */
export function fermiHalf(eta: number): number {
  if (eta < LOW) return eta < NONDEGENERATE ? Math.exp(eta) : tail(HALF_TAIL, Math.exp(eta));
  if (eta < HIGH) {
    const k = Math.floor(eta);
    return cell(HALF_CELLS, k, 2 * (eta - k) - 1);
  }
  return (4 / (3 * ROOT_PI)) * eta * Math.sqrt(eta) * sommerfeld(SOMMERFELD.half, eta);
}

/** F_3/2(eta), the kinetic energy density and the first integral of Poisson's equation. */
export function fermiThreeHalves(eta: number): number {
  if (eta < LOW) return eta < NONDEGENERATE ? Math.exp(eta) : tail(THREE_HALVES_TAIL, Math.exp(eta));
  if (eta < HIGH) {
    const k = Math.floor(eta);
    return cell(THREE_HALVES_CELLS, k, 2 * (eta - k) - 1);
  }
  return (8 / (15 * ROOT_PI)) * eta * eta * Math.sqrt(eta) * sommerfeld(SOMMERFELD.threeHalves, eta);
}

/** out[0] = F_1/2(eta), out[1] = F_-1/2(eta), its derivative, in one pass. */
export function fermiHalfInto(eta: number, out: Float64Array): void {
  if (eta < LOW) {
    const t = Math.exp(eta);
    if (eta < NONDEGENERATE) out[0] = out[1] = t;
    else {
      out[0] = tail(HALF_TAIL, t);
      out[1] = tail(MINUS_HALF_TAIL, t);
    }
  } else if (eta < HIGH) {
    const k = Math.floor(eta);
    const u = 2 * (eta - k) - 1;
    out[0] = cell(HALF_CELLS, k, u);
    out[1] = cell(MINUS_HALF_CELLS, k, u);
  } else {
    const root = Math.sqrt(eta);
    out[0] = (4 / (3 * ROOT_PI)) * eta * root * sommerfeld(SOMMERFELD.half, eta);
    out[1] = ((2 / ROOT_PI) * root) * sommerfeld(SOMMERFELD.minusHalf, eta);
  }
}

const INVERSE_LOWEST = 1 / 8;
const INVERSE_HIGHEST = 256;
const PER_INVERSE_CELL = 11;
/** Exponent and first three binary digits of 1/8, as they stand in its bits. */
const FIRST_INVERSE_CELL = (1023 - 3) << 3;
const bits = new DataView(new ArrayBuffer(8));

/**
 * eta with F_1/2(eta) = y, good to 4e-16 of max(1, |eta|); no iteration.
 *
 * @param y  > 0
 * @throws {RangeError} y not positive and finite
 *
 * Each binade of y is cut into eight cells, so that number and place of a cell are read off the bits of y and no logarithm is taken. Below 1/8
 * eta = ln y + y Q(y); above 256 the cube-root form of the degenerate limit, eta = w + R(1/w^2)/w with F_1/2 -> 4 w^(3/2)/(3 sqrt(pi)).
 */
export function inverseFermiHalf(y: number): number {
  if (y >= INVERSE_LOWEST && y < INVERSE_HIGHEST) {
    bits.setFloat64(0, y);
    const high = bits.getUint32(0);
    // The mantissa below the cell's three digits, as a number in [1, 1.125).
    bits.setUint32(0, (high & 0x1ffff) | 0x3ff00000);
    const u = 16 * (bits.getFloat64(0) - 1) - 1;
    return degree10(INVERSE_CELLS, ((high >>> 17) - FIRST_INVERSE_CELL) * PER_INVERSE_CELL, u);
  }
  if (!(y > 0) || !Number.isFinite(y)) throw new RangeError(`F_1/2 takes every value above 0, not ${y}`);
  if (y < INVERSE_LOWEST) return Math.log(y) + y * degree10(INVERSE_LOW, 0, y);
  const root = Math.cbrt(0.75 * ROOT_PI * y);
  const w = root * root;
  const v = 1 / (w * w);
  const r = ((((INVERSE_HIGH[5] * v + INVERSE_HIGH[4]) * v + INVERSE_HIGH[3]) * v + INVERSE_HIGH[2]) * v + INVERSE_HIGH[1]) * v + INVERSE_HIGH[0];
  return w + r / w;
}
