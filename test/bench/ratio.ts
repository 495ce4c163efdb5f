/** What one call took. */
export interface Taken {
  /** of Math.exp in the same rounds */ timesExp: number;
  /** on this machine, as busy as it was */ ns: number;
}

/** Medians over some rounds of `calls` calls each in `body`, after some that are not counted. */
export type Ratio = (calls: number, body: () => void, rounds?: number, warming?: number) => Taken;

export interface BenchRow extends Taken {
  name: string;
  /** timesExp that the row should stay below */ goal?: number;
}
