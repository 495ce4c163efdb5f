import type { PoissonSystem } from './poisson-system.ts';
import { ACCEPTANCE } from './quality.ts';

export interface NewtonResult {
  converged: boolean;
  updates: number;
  /** V */ lastUpdate: number;
  reason: 'small update' | 'singular matrix' | 'no progress' | 'too many updates' | 'not finite' | 'work exhausted';
}

const MOST_UPDATES = 200;
const SMALLEST_STEP = 1e-7;
/** An update after which the charge need not be taken anew, V: at 4 K it moves by less than 1e-9 of itself. */
const NEGLIGIBLE = 1e-13;
/** A frozen layer's matrix can ask for 1e9 V; no sensible stack moves by more than this at once. */
const MOST_VOLTS = 2;
/** So many steps in a row below this share of what is allowed are a stall, though each passes its test: frozen layers between open ends ask for 1e11 V for ever. */
const STALLED_STEPS = 10;
const STALLED_SHARE = 1e-3;
/** After so many updates the search that always makes progress takes over, whatever the steps: most solutions take fewer than 20. */
const LONG_RUN = 60;

/**
 * Damped Newton iteration of Poisson's equation; `psi` [nodes], V, is changed in place. On return the system's residual and density are
 * those of `psi` when it converged.
 *
 * @param evaluated  residual and matrix in the system are already those of `psi`
 * @param tolerance  size of an update, V, that ends it; it is taken all the same, and leaves about its square over kT
 *
 * Steps are accepted by the natural monotonicity test on the same factors (Deuflhard, Numer. Math. 22, 289, 1974; Newton
 * Methods for Nonlinear Problems, 2004, algorithm NLEQ-RES/ERR). Should it stall, the problem's convexity gives a second way: the
 * residual is the gradient of a convex functional (charge never grows with psi), so a search on the directional derivative along a
 * Newton direction always makes progress (Bank and Rose, Numer. Math. 37, 279, 1981).
 */
export function newton(system: PoissonSystem, psi: Float64Array, evaluated = false, tolerance: number = ACCEPTANCE.update): NewtonResult {
  const n = psi.length;
  const memory = new Float64Array(3 * n);
  const step = memory.subarray(0, n);
  const next = memory.subarray(n, 2 * n);
  const trial = memory.subarray(2 * n);
  let updates = 0;
  let lambda = 1;
  let lastUpdate = Infinity;
  let convex = false;
  let stalled = 0;
  if (!evaluated) system.evaluate(psi, true);
  while (updates < MOST_UPDATES) {
    if (system.work.exhausted) return { converged: false, updates, lastUpdate, reason: 'work exhausted' };
    if (!system.factor()) return { converged: false, updates, lastUpdate, reason: 'singular matrix' };
    for (let i = 0; i < n; i++) step[i] = -system.residual[i];
    system.solve(step);
    const size = largest(step);
    updates++;
    if (!Number.isFinite(size)) return { converged: false, updates, lastUpdate: size, reason: 'not finite' };
    // The update itself decides, and it is taken in full: near the end Newton's error is far below its last step.
    if (size < tolerance) {
      for (let i = 0; i < n; i++) psi[i] += step[i];
      // Charge moves by update/kT of itself: below this nothing that is asked of it.
      if (size > NEGLIGIBLE) system.evaluate(psi, false);
      return { converged: true, updates, lastUpdate: size, reason: 'small update' };
    }
    const cap = Math.min(1, MOST_VOLTS / size);
    if (!convex) {
      const found = monotoneStep(system, psi, step, trial, next, Math.min(1, 4 * lambda), cap);
      stalled = found < STALLED_SHARE * cap ? stalled + 1 : 0;
      if (found > 0 && stalled < STALLED_STEPS && updates < LONG_RUN) lambda = found;
      else {
        // The factors were of this very matrix, but the residual is of the last trial: back to psi before the second way.
        convex = true;
        system.evaluate(psi, true);
      }
    }
    if (convex) {
      lambda = convexStep(system, psi, step, trial, dot(step, system.residual), cap);
      if (!(lambda > 0)) return { converged: false, updates, lastUpdate: size, reason: 'no progress' };
      for (let i = 0; i < n; i++) trial[i] = psi[i] + lambda * step[i];
      system.evaluate(trial, true);
    }
    psi.set(trial);
    lastUpdate = lambda * size;
  }
  return { converged: false, updates, lastUpdate, reason: 'too many updates' };
}

/**
 * Step length that passes the natural monotonicity test, 0 when none above SMALLEST_STEP does. Leaves the accepted point in
 * `trial` and its residual and matrix in the system (the factors stay those of the step).
 */
function monotoneStep(system: PoissonSystem, psi: Float64Array, step: Float64Array, trial: Float64Array, next: Float64Array, first: number, cap: number): number {
  const n = psi.length;
  const stepNorm = Math.sqrt(dot(step, step));
  for (let lambda = Math.min(first, cap); lambda > SMALLEST_STEP * cap; ) {
    for (let i = 0; i < n; i++) trial[i] = psi[i] + lambda * step[i];
    system.evaluate(trial, true);
    for (let i = 0; i < n; i++) next[i] = -system.residual[i];
    system.solve(next);
    const nextNorm = Math.sqrt(dot(next, next));
    if (nextNorm <= (1 - lambda / 4) * stepNorm) return lambda;
    let difference = 0;
    for (let i = 0; i < n; i++) difference += (next[i] - (1 - lambda) * step[i]) ** 2;
    const predicted = (0.5 * stepNorm * lambda * lambda) / Math.sqrt(difference);
    lambda = Number.isFinite(predicted) ? Math.max(Math.min(predicted, lambda / 2), lambda / 10) : lambda / 10;
  }
  return 0;
}

/** Step length at which the directional derivative has fallen to half or less in size (bracketing, then regula falsi with halving). */
function convexStep(system: PoissonSystem, psi: Float64Array, step: Float64Array, trial: Float64Array, slope0: number, cap: number): number {
  const slopeAt = (lambda: number): number => {
    for (let i = 0; i < psi.length; i++) trial[i] = psi[i] + lambda * step[i];
    system.evaluate(trial, false);
    return dot(step, system.residual);
  };
  let low = 0;
  let high = cap;
  for (let tries = 0; tries < 60; tries++) {
    const slope = slopeAt(high);
    if (Math.abs(slope) <= 0.5 * Math.abs(slope0)) return high;
    if (slope * slope0 > 0) {
      if (high >= cap) return high;
      low = high;
      high = Math.min(cap, low + 0.5 * (cap - low));
    } else {
      high = 0.5 * (low + high);
    }
    if (high - low < 1e-14 * cap) return low;
  }
  return low;
}

/** Largest size of an element; NaN where there is one. */
export function largest(v: Float64Array): number {
  let m = 0;
  for (let i = 0; i < v.length; i++) {
    const a = Math.abs(v[i]);
    if (a > m) m = a;
    else if (a !== a) return NaN;
  }
  return m;
}

function dot(a: Float64Array, b: Float64Array): number {
  let s = 0;
  for (let i = 0; i < a.length; i++) s += a[i] * b[i];
  return s;
}
