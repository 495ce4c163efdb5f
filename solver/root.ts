/** A sign change closed in, and why the search ended. */
export interface RootAnswer {
  /** the bracket: f has different signs at a < b */ a: number;
  b: number;
  fa: number;
  fb: number;
  /** the end of the bracket with the smaller |f| */ root: number;
  evaluations: number;
  reason: 'tolerance' | 'exact' | 'not enclosed' | 'no progress in floating point';
}

export interface Bracket {
  a: number;
  b: number;
  fa: number;
  fb: number;
  /** the bracket is closed to this width, in the unit of a and b, > 0 */ tolerance: number;
}

/** Truncation of the regula falsi point towards the middle: kappa1 (b - a)^kappa2 / (b0 - a0), as the paper recommends. */
const KAPPA_1 = 0.2;
const KAPPA_2 = 2;
/** Steps that may be lost against plain bisection. */
const SLACK = 1;

/**
 * Closes a sign change in by the ITP method (interpolate, truncate, project): fast as the secant where f is smooth, and never more than one step
 * slower than bisection. Oliveira and Takahashi, ACM Trans. Math. Softw. 47(1), 5 (2021), algorithm 1; from memory.
 *
 * The search asks: it yields where it wants f, and is given f there. So whoever computes f can show progress and leave. f may jump and may be infinite;
 * there the step is half the bracket. A zero counts as positive, except that the search ends at it.
 *
 * @throws {RangeError} a bracket or a tolerance that is no number
 */
export function* rootSearch(bracket: Bracket): Generator<number, RootAnswer, number> {
  let { a, b, fa, fb } = bracket;
  const { tolerance } = bracket;
  if (!(b > a) || !(tolerance > 0) || Number.isNaN(fa) || Number.isNaN(fb)) throw new RangeError('a root search needs a < b, a positive tolerance and numbers at both ends');
  const width0 = b - a;
  const most = Math.max(0, Math.ceil(Math.log2(width0 / tolerance))) + SLACK;
  let evaluations = 0;
  const answer = (reason: RootAnswer['reason']): RootAnswer => ({ a, b, fa, fb, root: Math.abs(fa) <= Math.abs(fb) ? a : b, evaluations, reason });
  if (fa === 0 || fb === 0) return answer('exact');
  if (fa > 0 === fb > 0) return answer('not enclosed');
  while (b - a > tolerance) {
    const middle = a + (b - a) / 2;
    if (middle <= a || middle >= b) return answer('no progress in floating point');
    let x = middle;
    if (Number.isFinite(fa) && Number.isFinite(fb)) {
      const falsi = (fb * a - fa * b) / (fb - fa);
      const side = Math.sign(middle - falsi);
      const truncation = KAPPA_1 * ((b - a) / width0) ** KAPPA_2 * width0;
      const truncated = truncation <= Math.abs(middle - falsi) ? falsi + side * truncation : middle;
      // How far from the middle the step may lie so that bisection's count of steps is still kept.
      // Rounding of x must not leave the last bracket a hair too wide.
      const rounding = 4 * Number.EPSILON * Math.max(Math.abs(a), Math.abs(b)) * 2 ** (most - evaluations);
      const room = Math.max(0, (tolerance / 2) * 2 ** (most - evaluations) - rounding - (b - a) / 2);
      x = Math.abs(truncated - middle) <= room ? truncated : middle - side * room;
      if (!(x > a && x < b)) x = middle;
    }
    const f = yield x;
    evaluations++;
    if (Number.isNaN(f)) throw new RangeError(`the function is no number at ${x}`);
    if (f > 0 === fb > 0) {
      b = x;
      fb = f;
    } else {
      a = x;
      fa = f;
    }
    if (f === 0) return answer('exact');
  }
  return answer('tolerance');
}

/** The same for a function that is at hand. */
export function findRoot(f: (x: number) => number, bracket: Omit<Bracket, 'fa' | 'fb'>): RootAnswer {
  const search = rootSearch({ ...bracket, fa: f(bracket.a), fb: f(bracket.b) });
  let step = search.next();
  while (!step.done) step = search.next(f(step.value));
  return step.value;
}
