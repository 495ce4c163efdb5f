import { writeNumber } from '../quantity/write-quantity.ts';
import type { VariationResult, VariedFigureResult } from './result.ts';
import { strongestInputs } from './result.ts';
import type { Yield } from './statistics.ts';

/** Inputs that are named beside a figure: the strongest. */
const NAMED = 3;
/** An input that moves a figure by less than this share of it is not named. */
const LEAST_SHARE = 1e-3;

/** A tolerance run in lines for a terminal: each figure's spread, what moves it most, and the yield. */
export function variationReport(result: VariationResult): string {
  const { count, done, seed, distribution, figures, inputs, gaps } = result;
  const lines = [
    ...(result.partial ? ['partial: stopped before the end'] : []),
    `${result.title}: ${done}${done < count ? ` of ${count}` : ''} variations, seed ${seed}, ${distribution === 'normal' ? 'normal, tolerances are two standard deviations' : 'even within the tolerances'}`,
    `at ${result.temperatures_K.map((T) => `${writeNumber(T, 5)} K`).join(', ')}${result.temperatures_K.length > 1 ? ' (requirements over the range: the worst of these)' : ''}`,
    '', 'tolerances', ...inputs.map(({ label, tolerance, origin, span, distribution: own }) => `  ${label} ${tolerance}${origin === 'default' ? ' (default)' : ''}: ${span[0]} to ${span[1]}${own === distribution ? '' : `, ${own}`}`),
    '', ...table(figures),
    '', 'moved most by (low end to high end of the tolerance)', ...figures.flatMap((figure) => strongestLine(result, figure)),
  ];
  if (result.yield) {
    lines.push('', 'yield');
    for (const figure of figures) if (figure.yield) lines.push(`  ${yieldText(figure.yield)}  ${figure.words}`);
    lines.push(`  ${yieldText(result.yield)}  all requirements`);
  }
  if (gaps.length > 0) lines.push('', `${gaps.length} variations have no answer (not met in the yields, not in the spreads); the first, number ${gaps[0].index}: ${gaps[0].reason}`);
  if (result.notes.length > 0) lines.push('', ...result.notes);
  return `${lines.map((line) => line.replace(/[\r\n\u2028\u2029]+/g, ' ')).join('\n')}\n`;
}

const HEADINGS = ['figure', 'unit', 'nominal', 'mean', 'sd', '2.5 %', 'median', '97.5 %'];

function table(figures: readonly VariedFigureResult[]): string[] {
  const at = (figure: VariedFigureResult, p: number): number | null => figure.quantiles.find((q) => q.p === p)?.value ?? null;
  const rows = [HEADINGS, ...figures.map((f) => [f.words, f.unit, ...[f.nominal, f.mean, f.sd, at(f, 0.025), at(f, 0.5), at(f, 0.975)].map(text)])];
  const widths = HEADINGS.map((_, c) => Math.max(...rows.map((row) => row[c].length)));
  return rows.map((row) => row.map((cell, c) => (c < 2 ? cell.padEnd(widths[c]) : cell.padStart(widths[c]))).join('  ').trimEnd());
}

function strongestLine(result: VariationResult, figure: VariedFigureResult): string[] {
  const strong = strongestInputs(figure).filter(({ reach }) => reach > LEAST_SHARE * (figure.log ? 1 : Math.abs(figure.nominal ?? 1))).slice(0, NAMED);
  return strong.length === 0 ? [] : [`  ${figure.words}: ${strong.map(({ input, low, high }) => `${result.inputs[input].label} ${text(low)} to ${text(high)}`).join('; ')}`];
}

function yieldText({ share, low, high, met, of }: Yield): string {
  const percent = (x: number): string => `${(100 * x).toFixed(1)} %`;
  return `${percent(share).padStart(7)} (${percent(low)} to ${percent(high)}; ${met} of ${of})`;
}

/** Digits beyond the fourth are left out of large numbers as well. */
const text = (value: number | null): string => (value === null ? '-' : writeNumber(Number(value.toPrecision(4))));
