import { numberCell, textCell } from '../export/text-cell.ts';
import { strongestInputs, type VariationResult } from './result.ts';
import { QUANTILES } from './statistics.ts';

/** Inputs that have columns of their own in a figure's row: the strongest. */
const NAMED = 3;

/**
 * The summary of a tolerance run as CSV after RFC 4180: a row a figure with its unit, spread, quantiles, yield and strongest inputs; then the inputs; then
 * the variations without an answer. All digits; lines ended by CR LF.
 */
export function summaryCsv(result: VariationResult): string {
  const { figures, inputs, gaps, count, done, seed, distribution, yield: all } = result;
  const strong = Array.from({ length: NAMED }, (_, i) => [`input ${i + 1}`, `at its low end`, `at its high end`].map((words, k) => (k === 0 ? words : `${words} (${i + 1})`))).flat();
  const rows: string[][] = [
    ['variations', 'done', 'without an answer', 'seed', 'distribution', 'temperatures (K)', 'share that meets all', 'lower bound (95 %)', 'upper bound (95 %)'],
    [String(count), String(done), String(gaps.length), String(seed), distribution, result.temperatures_K.map(String).join(' '), numberCell(all?.share ?? null), numberCell(all?.low ?? null), numberCell(all?.high ?? null)],
    [],
    ['figure', 'path', 'unit', 'known', 'nominal', 'mean', 'sd', 'least', 'most', ...QUANTILES.map((p) => `${p} quantile`), 'met', 'of', 'share met', 'lower bound (95 %)', 'upper bound (95 %)', ...strong],
    ...figures.map((f) => [
      textCell(f.words), textCell(f.path), textCell(f.unit), String(f.known), ...[f.nominal, f.mean, f.sd, f.least, f.most].map(numberCell),
      ...QUANTILES.map((p) => numberCell(f.quantiles.find((q) => q.p === p)?.value ?? null)),
      ...(f.yield === null ? ['', '', '', '', ''] : [f.yield.met, f.yield.of, f.yield.share, f.yield.low, f.yield.high].map(numberCell)),
      ...strongestInputs(f).slice(0, NAMED).flatMap(({ input, low, high }) => [textCell(inputs[input].label), numberCell(low), numberCell(high)]),
    ]),
    [],
    ['input', 'tolerance', 'origin', 'distribution', 'low end', 'high end'],
    ...inputs.map(({ label, tolerance, origin, distribution: own, span }) => [textCell(label), textCell(tolerance), origin, own, textCell(span[0]), textCell(span[1])]),
    ...(gaps.length === 0 ? [] : [[], ['variation without an answer', 'reason'], ...gaps.map(({ index, reason }) => [String(index), textCell(reason)])]),
  ];
  return `${rows.map((row) => row.map(quoted).join(',')).join('\r\n')}\r\n`;
}

function quoted(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
