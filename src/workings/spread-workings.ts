import type { PanelColumn } from '../quantity/panel-quantities.ts';
import type { VariationResult, VariedFigureResult } from '../tolerance/result.ts';
import type { Yield } from '../tolerance/statistics.ts';
import { formula } from './formula.ts';
import { DESIGN, known, SOLVED, WORKED } from './known.ts';
import { mi, mn, mo, mrow, munderover, signOf, type MathNode } from './math.ts';
import { law, step } from './step.ts';
import type { Found } from './workings.ts';

/** A figure of a tolerance run: of one quantity, or of all requirements together. */
export interface SpreadAsked {
  table: 'spread';
  column: PanelColumn<'spread'>;
  result: VariationResult;
  /** null: all requirements together */ figure: VariedFigureResult | null;
}

/** Two-sided 95 % of a normal distribution, as the figure takes it. */
const Z = 1.959963984540054;

const sum = (of: MathNode): MathNode => mrow(munderover(mo('∑'), mrow(mi('i'), mo('='), mn('1')), mi('n')), of);

export function spreadWorkings({ column, result, figure }: SpreadAsked): Found {
  const common = { remarks: [runRemark(result)], rests: [] as const };
  const share = figure === null ? result.yield : figure.yield;
  if (column === 'yield' || column === 'yieldLow' || column === 'yieldHigh') return share === null ? { steps: [], remarks: ['No variation was judged.'], rests: [] } : { ...common, ...yieldSteps(column, share) };
  if (figure === null || figure.known === 0) return { steps: [], remarks: ['No variation has this figure.'], rests: [] };
  const { unit, words } = figure;
  const n = known('n', 'variations that have the figure', figure.known, '', SOLVED);
  const mean = known('x̄', `mean of ${words}`, figure.mean as number, unit, WORKED);
  const S = known('S', 'sum over them', (figure.mean as number) * figure.known, unit, SOLVED);
  const meanStep = step(mean, formula`${S} / ${n}`);
  const sumLaw = law(mrow(mi('S'), mo('='), sum(signOf('x_i'))), 'Over the variations that have the figure, in the order of their numbers.');
  if (column === 'mean') return { ...common, steps: [sumLaw, meanStep] };
  if (column === 'sd') {
    if (figure.sd === null) return { steps: [], remarks: ['One variation alone has no deviation.'], rests: [] };
    const Q = known('Q', 'sum of the squared distances from the mean', figure.sd ** 2 * (figure.known - 1), unit === '' ? '' : `(${unit})²`, SOLVED);
    return { ...common, steps: [sumLaw, meanStep, law(mrow(mi('Q'), mo('='), sum(mrow(mo('('), signOf('x_i'), mo('−'), mi('x̄'), signOf(')^2')))), 'Squared distances from the mean.'), step(known('s', `standard deviation of ${words}, of the sample`, figure.sd, unit, WORKED), formula`sqrt(${Q} / (${n} - 1))`)], simpler: null };
  }
  return { ...common, ...quantileSteps(figure, { low: 0.025, median: 0.5, high: 0.975 }[column]) };
}

function runRemark({ done, seed, distribution, gaps, inputs }: VariationResult): string {
  const others = inputs.filter((input) => input.distribution !== distribution).map(({ label, distribution: own }) => `${label} ${own}`);
  return `${done} variations with seed ${seed}, ${distribution === 'normal' ? 'normal: a tolerance is two standard deviations (JCGM 100:2008, 6.2, coverage factor 2; from memory)' : 'even between the ends of each tolerance'}${others.length > 0 ? ` (but ${others.join(', ')})` : ''}${gaps.length > 0 ? `; ${gaps.length} have no answer, stay out of the spreads and count as not met` : ''}.`;
}

function yieldSteps(column: 'yield' | 'yieldLow' | 'yieldHigh', { met, of, share, low, high }: Yield): Pick<Found, 'steps' | 'accuracy'> {
  const m = known('m', 'variations that meet it', met, '', SOLVED);
  const n = known('n', 'variations that were judged; one without an answer counts as not met', of, '', SOLVED);
  const p = known('p', 'share that meets it', share, '%', WORKED, { scale: 0.01 });
  const steps = [step(p, formula`${m} / ${n}`)];
  if (column === 'yield') return { steps, accuracy: `The true share lies between ${Number((100 * low).toPrecision(4))} and ${Number((100 * high).toPrecision(4))} % in 95 of 100 cases (Wilson, J. Am. Stat. Assoc. 22, 209, 1927).` };
  const z = known('z', 'two-sided 95 % of a normal distribution', Z, '', WORKED);
  const isLow = column === 'yieldLow';
  const end = known(isLow ? 'p_low' : 'p_high', isLow ? 'lower end of the true share' : 'upper end of the true share', isLow ? low : high, '%', WORKED, { scale: 0.01 });
  // With none or all met the formula comes to 0 or 1 but for rounding.
  if (isLow && met === 0) return { steps: [...steps, step(end, formula`${p}`, 'None meets it: the range begins at 0.')] };
  if (!isLow && met === of) return { steps: [...steps, step(end, formula`${p}`, 'All meet it: the range ends at 1.')] };
  const note = 'Wilson, J. Am. Stat. Assoc. 22, 209 (1927).';
  return { steps: [...steps, step(end, isLow
    ? formula`(${p} + ${z} ^ 2 / (2 * ${n})) / (1 + ${z} ^ 2 / ${n}) - ${z} * sqrt(${p} * (1 - ${p}) / ${n} + ${z} ^ 2 / (4 * ${n} ^ 2)) / (1 + ${z} ^ 2 / ${n})`
    : formula`(${p} + ${z} ^ 2 / (2 * ${n})) / (1 + ${z} ^ 2 / ${n}) + ${z} * sqrt(${p} * (1 - ${p}) / ${n} + ${z} ^ 2 / (4 * ${n} ^ 2)) / (1 + ${z} ^ 2 / ${n})`, note)] };
}

/** Straight between two values of the sorted list. */
function quantileSteps({ known: count, quantiles, unit, words }: VariedFigureResult, share: number): Pick<Found, 'steps'> {
  const found = quantiles.find(({ p }) => p === share)!;
  const p = known('p', 'share that lies below', share, '%', DESIGN, { scale: 0.01, path: 'of the table' });
  const n = known('n', 'variations that have the figure', count, '', SOLVED);
  const h = known('h', 'place in the sorted list, counted from 0', (count - 1) * share, '', WORKED);
  const k = known('k', 'whole part of it', Math.floor(h.value), '', WORKED);
  const below = known('x_k', `${words}: value number ${k.value} of the sorted list`, found.below, unit, SOLVED);
  const above = known('x_k+1', 'the next one', found.above, unit, SOLVED);
  return { steps: [step(h, formula`(${n} - 1) * ${p}`), step(known('q', `${words}: value below which ${100 * share} % lie`, found.value, unit, WORKED), formula`${below} + (${h} - ${k}) * (${above} - ${below})`, 'Definition 7 of Hyndman and Fan, Am. Stat. 50, 361 (1996).')] };
}
