/** How a figure is spread over the variations that have it. */
export interface Spread {
  /** variations that have the figure */ known: number;
  mean: number | null;
  /** of the sample, n - 1; null of fewer than two */ sd: number | null;
  least: number | null;
  most: number | null;
  /** each between two neighbours of the sorted values */ quantiles: { p: number; value: number; below: number; above: number }[];
  histogram: Histogram | null;
}

export interface Histogram {
  /** [bins + 1], rising; even steps, of the logarithm where `log` */ edges: number[];
  /** [bins] */ counts: number[];
  log: boolean;
}

export const QUANTILES = [0.01, 0.025, 0.05, 0.25, 0.5, 0.75, 0.95, 0.975, 0.99] as const;
const FEWEST_BINS = 8;
const MOST_BINS = 60;

/**
 * Spread of the known values, in the order of the variations, so that sums are rounded alike whoever computed them.
 *
 * @param log  a figure that spans decades: bins are even in its logarithm where all values are positive
 */
export function spreadOf(values: readonly (number | null)[], log: boolean): Spread {
  const known = values.filter((v): v is number => v !== null);
  const n = known.length;
  if (n === 0) return { known: 0, mean: null, sd: null, least: null, most: null, quantiles: [], histogram: null };
  const mean = known.reduce((sum, v) => sum + v, 0) / n;
  const squares = known.reduce((sum, v) => sum + (v - mean) ** 2, 0);
  const sorted = Float64Array.from(known).sort();
  return {
    known: n, mean, sd: n > 1 ? Math.sqrt(squares / (n - 1)) : null, least: sorted[0], most: sorted[n - 1],
    quantiles: QUANTILES.map((p) => ({ p, value: quantile(sorted, p), ...neighbours(sorted, p) })),
    histogram: histogramOf(sorted, log && sorted[0] > 0),
  };
}

/** Straight between the order statistics: definition 7 of Hyndman and Fan, Am. Stat. 50, 361 (1996). @param sorted  rising, not empty */
export function quantile(sorted: ArrayLike<number>, p: number): number {
  const at = (sorted.length - 1) * p;
  const below = Math.floor(at);
  const above = Math.min(below + 1, sorted.length - 1);
  return sorted[below] + (at - below) * (sorted[above] - sorted[below]);
}

function neighbours(sorted: ArrayLike<number>, p: number): { below: number; above: number } {
  const below = Math.floor((sorted.length - 1) * p);
  return { below: sorted[below], above: sorted[Math.min(below + 1, sorted.length - 1)] };
}

/** Bins of 2 IQR n^(-1/3) (Freedman and Diaconis, Z. Wahrscheinlichkeitstheorie 57, 453, 1981), within FEWEST_BINS and MOST_BINS. One bin where all values are the same. */
export function histogramOf(sorted: ArrayLike<number>, log: boolean): Histogram {
  const n = sorted.length;
  const on = (v: number): number => (log ? Math.log(v) : v);
  const [from, to] = [on(sorted[0]), on(sorted[n - 1])];
  if (from === to) return { edges: [sorted[0], sorted[n - 1]], counts: [n], log };
  const width = (2 * (on(quantile(sorted, 0.75)) - on(quantile(sorted, 0.25)))) / Math.cbrt(n);
  const bins = Math.min(MOST_BINS, Math.max(FEWEST_BINS, width > 0 ? Math.ceil((to - from) / width) : FEWEST_BINS));
  const counts = new Array<number>(bins).fill(0);
  for (let i = 0; i < n; i++) counts[Math.min(bins - 1, Math.floor(((on(sorted[i]) - from) / (to - from)) * bins))]++;
  const edges = Array.from({ length: bins + 1 }, (_, b) => (b === 0 ? sorted[0] : b === bins ? sorted[n - 1] : log ? Math.exp(from + ((to - from) * b) / bins) : from + ((to - from) * b) / bins));
  return { edges, counts, log };
}

/** Share of those that meet it, with the range in which the true share lies in 95 of 100 cases: Wilson, J. Am. Stat. Assoc. 22, 209 (1927). */
export interface Yield {
  met: number;
  /** variations that were judged; one without an answer counts as not met */ of: number;
  share: number;
  low: number;
  high: number;
}

/** A share in per cent, one decimal: 999 of 1000 must not read as all of them. */
export function sharePercent(share: number): string {
  const text = (100 * share).toFixed(1);
  return text === '100.0' && share < 1 ? '99.9 %' : text === '0.0' && share > 0 ? '0.1 %' : `${text.replace(/\.0$/, '')} %`;
}

/** Two-sided 95 % of a normal distribution. */
const Z = 1.959963984540054;

export function yieldOf(met: number, of: number): Yield | null {
  if (of === 0) return null;
  const share = met / of;
  const middle = (share + (Z * Z) / (2 * of)) / (1 + (Z * Z) / of);
  const half = (Z * Math.sqrt((share * (1 - share)) / of + (Z * Z) / (4 * of * of))) / (1 + (Z * Z) / of);
  return { met, of, share, low: met === 0 ? 0 : middle - half, high: met === of ? 1 : middle + half };
}
