/**
 * Factors of a tridiagonal matrix, kept so that several right-hand sides can be solved with them.
 *
 * Thomas' algorithm without pivoting: stable for the diagonally dominant matrices of the box scheme (Higham, Accuracy and
 * Stability of Numerical Algorithms, 2nd ed., 2002, section 9.6).
 *
 * Shapes: lower, diagonal, upper are Float64Array [n]; lower[0] and upper[n - 1] are not read.
 */
export class TridiagonalFactors {
  readonly size: number;
  private readonly pivotInverse: Float64Array;
  private readonly multiplier: Float64Array;
  private upper: Float64Array;

  constructor(size: number) {
    this.size = size;
    this.pivotInverse = new Float64Array(size);
    this.multiplier = new Float64Array(size);
    this.upper = this.multiplier;
  }

  /** Factors the matrix; false when a pivot vanishes or is not finite (a singular matrix). */
  factor(lower: Float64Array, diagonal: Float64Array, upper: Float64Array): boolean {
    const { size, pivotInverse, multiplier } = this;
    this.upper = upper;
    let pivot = diagonal[0];
    if (!(Math.abs(pivot) > 0)) return false;
    pivotInverse[0] = 1 / pivot;
    for (let i = 1; i < size; i++) {
      const m = lower[i] * pivotInverse[i - 1];
      multiplier[i] = m;
      pivot = diagonal[i] - m * upper[i - 1];
      // A pivot that is only the rounding of its own cancellation means that nothing fixes the level of the solution.
      if (!(Math.abs(pivot) > 4e-16 * Math.abs(diagonal[i]))) return false;
      pivotInverse[i] = 1 / pivot;
    }
    return true;
  }

  /** Solves in place: `rhs` [n] becomes the solution. */
  solve(rhs: Float64Array): void {
    const { size, pivotInverse, multiplier, upper } = this;
    for (let i = 1; i < size; i++) rhs[i] -= multiplier[i] * rhs[i - 1];
    rhs[size - 1] *= pivotInverse[size - 1];
    for (let i = size - 2; i >= 0; i--) rhs[i] = (rhs[i] - upper[i] * rhs[i + 1]) * pivotInverse[i];
  }

  /**
   * Diagonal of the inverse [n], of the matrix factored last. From the last row upwards
   * inverse(i, i) = 1/pivot(i) + upper(i) multiplier(i + 1) inverse(i + 1, i + 1)/pivot(i).
   */
  inverseDiagonal(): Float64Array {
    const { size, pivotInverse, multiplier, upper } = this;
    const out = new Float64Array(size);
    out[size - 1] = pivotInverse[size - 1];
    for (let i = size - 2; i >= 0; i--) out[i] = pivotInverse[i] * (1 + upper[i] * multiplier[i + 1] * out[i + 1]);
    return out;
  }
}
