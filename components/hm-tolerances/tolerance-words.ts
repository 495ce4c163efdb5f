import { writeNumber } from '../../src/quantity/write-quantity.ts';
import type { VariationResult, VariedFigureResult } from '../../src/tolerance/result.ts';
import { strongestInputs } from '../../src/tolerance/result.ts';
import { sharePercent as percent } from '../../src/tolerance/statistics.ts';

export { percent };

/** An input that moves a figure by less than this share of it (of its logarithm, where it spans decades) is not named. */
const LEAST_SHARE = 1e-3;

/** A figure to four digits, a dash where there is none. */
export const figureWord = (value: number | null): string => (value === null ? '–' : writeNumber(Number(value.toPrecision(4))));

/** What the run came to, in one or two sentences. */
export function runWords(result: VariationResult, stopped: boolean): string {
  const { count, done, seed, distribution, gaps } = result;
  const met = result.yield === null ? '' : ` ${percent(result.yield.share)} meet every requirement.`;
  const without = gaps.length === 0 ? '' : ` ${gaps.length} have no answer and count as not met.`;
  return `${stopped ? `Stopped after ${done} of ${count}` : `${done}${done < count ? ` of ${count}` : ''}`} variations, seed ${seed}, ${distribution === 'normal' ? 'normal: a tolerance is two standard deviations' : 'uniform: even between the ends of each tolerance'}.${met}${without}`;
}

/** Reasons of variations without an answer, the most frequent first. */
export function gapReasons({ gaps }: VariationResult): { reason: string; count: number; first: number }[] {
  const by = new Map<string, { reason: string; count: number; first: number }>();
  for (const { index, reason } of gaps) {
    const row = by.get(reason);
    if (row === undefined) by.set(reason, { reason, count: 1, first: index });
    else row.count++;
  }
  return [...by.values()].sort((a, b) => b.count - a.count || a.first - b.first);
}

/** The input that moves a figure most, in words; empty where nothing moves it. */
export function strongestWords(figure: VariedFigureResult, inputs: VariationResult['inputs']): string {
  const [first] = strongestInputs(figure);
  if (first === undefined || !(first.reach > LEAST_SHARE * (figure.log ? 1 : Math.abs(figure.nominal ?? 1)))) return 'nothing by 0.1 %';
  return `${inputs[first.input].label}: ${figureWord(first.low)} to ${figureWord(first.high)}`;
}
