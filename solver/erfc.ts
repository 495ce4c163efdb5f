/**
 * Complementary error function for x >= 0; relative error below 1e-12 (worst just below 2, where 1 - erf x cancels).
 *
 * Series 7.6.2 below 2, continued fraction 7.9.1 (summed from its 120th term) above; NIST Digital Library of Mathematical Functions.
 */
export function erfc(x: number): number {
  if (x < 2) {
    // erf x = (2/sqrt pi) exp(-x^2) sum 2^n x^(2n+1)/(2n+1)!!: all terms positive.
    let term = x;
    let sum = x;
    for (let n = 1; n < 200 && term > 1e-17 * sum; n++) {
      term *= (2 * x * x) / (2 * n + 1);
      sum += term;
    }
    return 1 - (2 / Math.sqrt(Math.PI)) * Math.exp(-x * x) * sum;
  }
  // x + (1/2)/(x + (2/2)/(x + (3/2)/(x + ...))), from far enough in.
  let tail = x;
  for (let k = 120; k >= 1; k--) tail = x + k / 2 / tail;
  return Math.exp(-x * x) / (Math.sqrt(Math.PI) * tail);
}

/**
 * x >= 0 with erfc(x) = y, for 0 < y <= 1; Newton on the logarithm, which is concave.
 *
 * @throws {RangeError} y outside 0..1
 */
export function inverseErfc(y: number): number {
  if (!(y > 0 && y <= 1)) throw new RangeError(`erfc takes values in 0..1 for x >= 0: ${y}`);
  if (y === 1) return 0;
  const target = Math.log(y);
  let x = 0;
  for (let i = 0; i < 60; i++) {
    const value = erfc(x);
    const slope = ((-2 / Math.sqrt(Math.PI)) * Math.exp(-x * x)) / value;
    const step = (target - Math.log(value)) / slope;
    // From x = 0 the first step overshoots in a concave function; the next ones come back from above.
    x = Math.min(26, Math.max(0, x + step));
    if (Math.abs(step) < 1e-15 * Math.max(1, x)) break;
  }
  return x;
}
