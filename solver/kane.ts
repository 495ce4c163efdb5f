import type { CarrierLog } from './carriers.ts';

/** 2/sqrt(pi). */
const NORM = 2 / Math.sqrt(Math.PI);
/** Above this eta nothing of the band's edge is within reach of the Fermi step's width. */
const DEGENERATE = 42;
/** Reach of the Fermi step's derivative and of the Boltzmann tail, in kT: exp(-40) is below double precision. */
const REACH = 40;
/** Exponent of the trapezoidal rule's error, exp(-TARGET). */
const TARGET = 37;

/** Step for the derivative of the Fermi step, whose poles lie at +-i pi. */
const STEP = (2 * Math.PI * Math.PI) / TARGET;
const HALF = Math.ceil(REACH / STEP);
/** STEP/(4 cosh^2(u/2)) at u = (j - HALF) STEP [2 HALF + 1]. */
const WEIGHTS = Float64Array.from({ length: 2 * HALF + 1 }, (_, j) => STEP / (4 * Math.cosh(0.5 * (j - HALF) * STEP) ** 2));

/**
 * Kane's band: F(eta) = (2/sqrt(pi)) Int_0^inf sqrt(x(1 + ax)) (1 + 2ax)/(1 + exp(x - eta)) dx, as ln F and d ln F/d eta.
 *
 * @param a  alpha kT, > 0
 *
 * The integral is done by the trapezoidal rule, which converges exponentially on analytic integrands (Trefethen and Weideman, SIAM Review 56,
 * 385, 2014): with x = t^2 over the whole line, and for strong degeneracy, where those poles come close, by parts over the derivative
 * of the Fermi step, whose weights are kept. No series is used. Dispersion: Kane, J. Phys. Chem. Solids 1, 249 (1957).
 */
export function kaneIntegral(eta: number, a: number, boltzmann: boolean, out: CarrierLog): void {
  if (!boltzmann && eta > DEGENERATE) {
    let filled = 0;
    let slope = 0;
    for (let j = 0; j < WEIGHTS.length; j++) {
      const x = eta + (j - HALF) * STEP;
      if (x <= 0) continue;
      const gamma = x * (1 + a * x);
      const root = Math.sqrt(gamma);
      filled += WEIGHTS[j] * gamma * root;
      slope += WEIGHTS[j] * root * (1 + 2 * a * x);
    }
    out.log = Math.log(((NORM * 2) / 3) * filled);
    out.slope = slope / ((2 / 3) * filled);
    return;
  }
  // Poles at t^2 = eta +- i pi, branch points at t = +-i/sqrt(a).
  // On the line Im t = c the integrand grows as exp(c^2), so the rule's error is exp(c^2 - 2 pi c/h) for the largest useful c.
  const pole = boltzmann ? Infinity : Math.sqrt(0.5 * poleDepth(eta));
  const strip = Math.min(pole, 1 / Math.sqrt(a), Math.sqrt(TARGET));
  const h = (2 * Math.PI * strip) / (TARGET + strip * strip);
  const tail = boltzmann ? -Infinity : eta;
  const end = Math.max(tail, 0) + REACH + 4;
  let sum = 0;
  let slope = 0;
  for (let t = h; t * t < end; t += h) {
    const x = t * t;
    const weight = x * Math.sqrt(1 + a * x) * (1 + 2 * a * x);
    if (tail > 0) {
      const f = 1 / (1 + Math.exp(x - eta));
      sum += weight * f;
      slope += weight * f * (1 - f);
    } else {
      // exp(eta) stays outside, so that nothing underflows.
      const e = Math.exp(-x);
      const empty = 1 / (1 + Math.exp(tail - x));
      sum += weight * e * empty;
      slope += weight * e * empty * empty;
    }
  }
  // The integrand is even in t: the half line's trapezoidal sum, times 2 from dx = 2 t dt.
  out.log = (tail > 0 ? 0 : eta) + Math.log(2 * NORM * h * sum);
  out.slope = slope / sum;
}

/** sqrt(eta^2 + pi^2) - eta without cancellation. */
function poleDepth(eta: number): number {
  const root = Math.hypot(eta, Math.PI);
  return eta > 0 ? (Math.PI * Math.PI) / (root + eta) : root - eta;
}
