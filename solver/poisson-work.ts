/**
 * What one answer costs: looks at a node's charge, and at a node's properties when a mesh is set up. Counted, not timed: a bound in seconds would
 * refuse on a slow machine what it accepts on a fast one.
 */
export class PoissonWork {
  /** looks so far */ spent = 0;
  private end: number;

  /** @param most  looks that the whole answer may cost */
  constructor(readonly most: number = Infinity) {
    this.end = most;
  }

  /** Sets how much of the whole may be gone by the end of the next stage, so that something is left for the stage behind it. */
  allow(share: number): void {
    this.end = share * this.most;
  }

  get exhausted(): boolean {
    return this.spent > this.end;
  }
}
