/**
 * Complete Fermi-Dirac integrals F_j(eta) = 1/Gamma(j + 1) Int_0^inf t^j/(1 + exp(t - eta)) dt of order -1/2, 1/2, 3/2, and the inverse
 * of order 1/2. All arguments and values are dimensionless.
 *
 * Method: piecewise polynomials, as in Fukushima, Appl. Math. Comput. 259, 708 (2015), with cells and coefficients of our own: cells of
 * width 1 and degree 13 on [-2, 40]; below, the series sum (-1)^k t^(k+1)/(k+1)^(j+1) in t = exp(eta); above, Sommerfeld's
 * expansion in 1/eta^2 (Dingle, Appl. Sci. Res. B 6, 225, 1957), whose neglected part exp(-eta) is below 5e-18.
 * Checked against 25-digit values: test/solver/fermi-integral.test.ts.
 */
import { HALF_CELLS, MINUS_HALF_CELLS, THREE_HALVES_CELLS } from './fermi-integral-coefficients.ts';

const LOW = -2;
const HIGH = 40;
const PER_CELL = 14;
const SERIES_TERMS = 18;

/** (-1)^k/(k + 1)^(j + 1), k = 0 .. SERIES_TERMS - 1. */
function seriesCoefficients(j: number): Float64Array {
  return Float64Array.from({ length: SERIES_TERMS }, (_, k) => (k % 2 === 0 ? 1 : -1) / (k + 1) ** (j + 1));
}

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

const SERIES = { minusHalf: seriesCoefficients(-0.5), half: seriesCoefficients(0.5), threeHalves: seriesCoefficients(1.5) };
const SOMMERFELD = { minusHalf: sommerfeldCoefficients(-0.5), half: sommerfeldCoefficients(0.5), threeHalves: sommerfeldCoefficients(1.5) };
const ROOT_PI = Math.sqrt(Math.PI);

function series(c: Float64Array, eta: number): number {
  const t = Math.exp(eta);
  // Far below, the first term alone is exact to the last bit and the others would only cost time.
  if (eta < -38) return t;
  let s = c[SERIES_TERMS - 1];
  for (let k = SERIES_TERMS - 2; k >= 0; k--) s = s * t + c[k];
  return s * t;
}

function cell(c: Float64Array, eta: number): number {
  const k = Math.floor(eta);
  const u = 2 * (eta - k) - 1;
  const o = (k - LOW) * PER_CELL;
  let s = c[o + 13];
  for (let m = 12; m >= 0; m--) s = s * u + c[o + m];
  return s;
}

function sommerfeld(c: Float64Array, eta: number): number {
  const v = 1 / (eta * eta);
  let sum = c[SOMMERFELD_TERMS];
  for (let k = SOMMERFELD_TERMS - 1; k >= 0; k--) sum = sum * v + c[k];
  return sum;
}

/** F_-1/2(eta) = dF_1/2/deta; any finite eta. NaN gives NaN. */
export function fermiMinusHalf(eta: number): number {
  if (eta < LOW) return series(SERIES.minusHalf, eta);
  if (eta < HIGH) return cell(MINUS_HALF_CELLS, eta);
  return ((2 / ROOT_PI) * Math.sqrt(eta)) * sommerfeld(SOMMERFELD.minusHalf, eta);
}

/** F_1/2(eta): n = Nc F_1/2((EF - Ec)/kT). */
export function fermiHalf(eta: number): number {
  if (eta < LOW) return series(SERIES.half, eta);
  if (eta < HIGH) return cell(HALF_CELLS, eta);
  return (4 / (3 * ROOT_PI)) * eta * Math.sqrt(eta) * sommerfeld(SOMMERFELD.half, eta);
}

/** F_3/2(eta), the kinetic energy density and the first integral of Poisson's equation. */
export function fermiThreeHalves(eta: number): number {
  if (eta < LOW) return series(SERIES.threeHalves, eta);
  if (eta < HIGH) return cell(THREE_HALVES_CELLS, eta);
  return (8 / (15 * ROOT_PI)) * eta * eta * Math.sqrt(eta) * sommerfeld(SOMMERFELD.threeHalves, eta);
}

/** out[0] = F_1/2(eta), out[1] = F_-1/2(eta). */
export function fermiHalfInto(eta: number, out: Float64Array): void {
  out[0] = fermiHalf(eta);
  out[1] = fermiMinusHalf(eta);
}

/**
 * eta with F_1/2(eta) = y.
 *
 * @param y  > 0
 * @throws {RangeError} y not positive and finite
 *
 * Newton in ln F from the approximation of Nilsson, Phys. Status Solidi A 19, K75 (1973) (form from memory, good to 1 %; only a starting guess).
 */
export function inverseFermiHalf(y: number): number {
  if (!(y > 0) || !Number.isFinite(y)) throw new RangeError(`F_1/2 takes every value above 0, not ${y}`);
  let eta: number;
  if (y < 0.1) eta = Math.log(y) + y / Math.SQRT2 / 2;
  else {
    const v = ((3 * ROOT_PI * y) / 4) ** (2 / 3);
    eta = (Math.abs(y - 1) < 1e-6 ? -0.5 : Math.log(y) / (1 - y * y)) + v / (1 + (0.24 + 1.08 * v) ** -2);
  }
  for (let i = 0; i < 8; i++) {
    const f = fermiHalf(eta);
    const step = ((f - y) / fermiMinusHalf(eta)) * (1 + (f - y) / (2 * (f + y)) * (eta < 0 ? -1 : 0));
    eta -= step;
    if (Math.abs(step) <= 1e-15 * Math.max(1, Math.abs(eta))) break;
  }
  return eta;
}
