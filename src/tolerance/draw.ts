import type { Uncertainty } from '../requirements/uncertainties.ts';
import { evenPair } from './counter-random.ts';

/** How a quantity lies within its tolerance. */
export type Distribution = 'normal' | 'uniform';

/** A tolerance is two standard deviations of a normal quantity, as the expanded uncertainty of JCGM 100:2008, section 6.2 (coverage factor 2; from memory). */
const COUNTS_PER_SIGMA = 0.5;
/** Tails end at four standard deviations: 6e-5 of the draws, which are drawn anew. */
const MOST_COUNTS = 2;
/** A share of the value never takes all of it: the rest that is always left. */
const LEAST_LEFT = 0.05;

/** How far from nominal an input may be drawn, in counts of its tolerance. A share of 60 % cannot be taken off twice. */
export function reachOf(uncertainty: Uncertainty): number {
  const share = /^\D*(\d+\.?\d*|\.\d+)\s*%$/.exec(uncertainty.tolerance);
  return share ? Math.min(MOST_COUNTS, (1 - LEAST_LEFT) / (Number(share[1]) / 100)) : MOST_COUNTS;
}

/**
 * Where each input of one variation lies, in counts of its tolerance. Depends on seed, index and the input's place in the list only.
 *
 * @param reaches        of each input (reachOf)
 * @param distributions  of each input
 *
 * "normal": the tolerance is two standard deviations, by Box and Muller, Ann. Math. Stat. 29, 610 (1958). "uniform": even between the ends of the tolerance.
 */
export function drawCounts(seed: number, index: number, reaches: readonly number[], distributions: readonly Distribution[]): number[] {
  return reaches.map((reach, input) => {
    for (let attempt = 0; ; attempt++) {
      const [u, v] = evenPair(seed, index, input, attempt);
      if (distributions[input] === 'uniform') return 2 * u - 1;
      const count = COUNTS_PER_SIGMA * Math.sqrt(-2 * Math.log(u)) * Math.cos(2 * Math.PI * v);
      if (Math.abs(count) <= reach) return count;
    }
  });
}
