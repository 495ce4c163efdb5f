import { integrate } from './quadrature.ts';

/** An integrand exp(dear + cheap): a factor that is dear to compute but whose logarithm runs smoothly, and one that is cheap and may be sharp. */
export interface PeakedIntegrand {
  dear(x: number): number;
  cheap(x: number): number;
}

export interface PeakedResult {
  /** of exp(dear + cheap - shift) */ value: number;
  /** estimate, absolute */ error: number;
  /** of the dear factor */ evaluations: number;
}

interface Panel {
  from: number;
  to: number;
  value: number;
  error: number;
  split: boolean;
}

/** Points of a panel less one, first and after doubling. */
const FEW = 8;
const MANY = 16;
/** Coefficients at the end of the series that tell what is left out, and how much they count. */
const LAST = { [FEW]: 3, [MANY]: 5 };
const CAUTION = 6;
/** How much of the terms left out cancels at most. */
const WAVES = 5;
/** Nine points are enough when the end of their series is below this share of the accuracy. */
const ENOUGH = 0.3;
/** Share of the accuracy that the cheap part may lose. */
const CHEAP_SHARE = 0.1;
const CHEAP_PANELS = 40;

/** cos(pi j k/n) by [j][k], with the halves that the ends count. */
function cosines(n: number): Float64Array[] {
  return Array.from({ length: n + 1 }, (_, k) => Float64Array.from({ length: n + 1 }, (_x, j) => ((j === 0 || j === n ? 0.5 : 1) * (k === 0 || k === n ? 1 : 2) * Math.cos((Math.PI * j * k) / n)) / n));
}
const TO_COEFFICIENTS: Record<number, Float64Array[]> = { [FEW]: cosines(FEW), [MANY]: cosines(MANY) };
/** Length of the axis about each point, of a panel from -1 to 1: an estimate's weights, no rule's. */
const WEIGHTS = Float64Array.from({ length: MANY + 1 }, (_, j) => (Math.PI / MANY) * Math.sin((Math.PI * Math.max(0.25, Math.min(MANY - 0.25, j))) / MANY));
const NODES = Float64Array.from({ length: MANY + 1 }, (_, j) => Math.cos((Math.PI * j) / MANY));

/**
 * Integral of exp(dear + cheap - shift) over neighbouring panels. In a panel the dear logarithm is taken at Chebyshev's points and interpolated (Trefethen, Approximation Theory and
 * Approximation Practice, 2013, chapters 3 and 8), 9 or 17 of them; what is left out of its series is the panel's relative error. The panel of the largest error
 * is halved until the sum is below `accuracy` times the value and `known`, or `most` panels are there; the error that is left is reported either way.
 *
 * @param ends   rising, at least two
 * @param sharp  where the cheap factor bends, in any order
 * @param known  other integrals that are added to this one, on the same scale
 */
export function integratePeaked(f: PeakedIntegrand, ends: readonly number[], sharp: readonly number[], shift: number, accuracy: number, known = 0, most = 24): PeakedResult {
  const panels: Panel[] = [];
  let evaluations = 0;
  const dear = (x: number): number => {
    evaluations++;
    return f.dear(x);
  };
  const bends = [...sharp].sort((a, b) => a - b);

  const add = (from: number, to: number): void => {
    const centre = 0.5 * (from + to);
    const half = 0.5 * (to - from);
    const values = new Float64Array(MANY + 1);
    const take = (step: number, first: number): void => { for (let j = first; j <= MANY; j += step) values[j] = dear(centre + half * NODES[j]); };
    take(2, 0);
    let coefficients = seriesOf(values, FEW);
    let left = leftOut(coefficients);
    if (left > ENOUGH * accuracy) {
      take(2, 1);
      // How much the integral moved by with terms of the size of the first series' end; with those of the second's it moves in proportion, since waves cancel in part.
      let whole = 0;
      let moved = 0;
      let most = 0;
      for (let j = 0; j <= MANY; j++) {
        const share = WEIGHTS[j] * Math.exp(values[j] + f.cheap(centre + half * NODES[j]) - shift);
        whole += share;
        if (j % 2 === 0) continue;
        const off = share * (values[j] - sumOf(coefficients, NODES[j]));
        moved += off;
        most += Math.abs(off);
      }
      coefficients = seriesOf(values, MANY);
      const rest = leftOut(coefficients);
      const average = whole > 0 ? Math.max(Math.abs(moved), most / WAVES) / whole : Infinity;
      left = Math.min(rest, Math.max(rest / WAVES, CAUTION * average * (rest / left)));
    }
    const places = [from, ...bends.filter((x) => x > from && x < to), to];
    const sharpest = (x: number): number => Math.exp(sumOf(coefficients, (x - centre) / half) + f.cheap(x) - shift);
    const cheap = integrate(sharpest, places, CHEAP_SHARE * accuracy, CHEAP_SHARE * accuracy * known, CHEAP_PANELS);
    // Where an integrand dies within rounding, nothing is to be halved.
    panels.push({ from, to, value: cheap.value, error: cheap.value * left + cheap.error, split: half > 1e-9 * Math.abs(centre) });
  };

  for (let i = 0; i + 1 < ends.length; i++) if (ends[i + 1] > ends[i]) add(ends[i], ends[i + 1]);
  for (;;) {
    let value = 0;
    let error = 0;
    let worst = -1;
    panels.forEach((p, i) => {
      value += p.value;
      error += p.error;
      if (p.split && (worst < 0 || p.error > panels[worst].error)) worst = i;
    });
    if (error <= accuracy * (value + known) || worst < 0 || panels.length >= most) return { value, error, evaluations };
    const [{ from, to }] = panels.splice(worst, 1);
    add(from, 0.5 * (from + to));
    add(0.5 * (from + to), to);
  }
}

/** Chebyshev coefficients of the polynomial through every (MANY/n)-th value. */
function seriesOf(values: Float64Array, n: number): Float64Array {
  const stride = MANY / n;
  return Float64Array.from({ length: n + 1 }, (_, k) => {
    const row = TO_COEFFICIENTS[n][k];
    let sum = 0;
    for (let j = 0; j <= n; j++) sum += row[j] * values[j * stride];
    return sum;
  });
}

function leftOut(coefficients: Float64Array): number {
  let most = 0;
  for (let k = coefficients.length - (coefficients.length > MANY ? LAST[MANY] : LAST[FEW]); k < coefficients.length; k++) most = Math.max(most, Math.abs(coefficients[k]));
  return CAUTION * most;
}

/** Clenshaw's sum. */
function sumOf(coefficients: Float64Array, x: number): number {
  let b1 = 0;
  let b2 = 0;
  for (let k = coefficients.length - 1; k > 0; k--) {
    const b = coefficients[k] + 2 * x * b1 - b2;
    b2 = b1;
    b1 = b;
  }
  return coefficients[0] + x * b1 - b2;
}
