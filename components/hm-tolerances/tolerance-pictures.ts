import type { HistogramPicture } from '../../src/drawing/histogram.ts';
import type { TornadoPicture } from '../../src/drawing/tornado.ts';
import { strongestInputs, type VariedFigureResult } from '../../src/tolerance/result.ts';
import type { Found } from './tolerance-run.ts';

/** Bars of a tornado at most; those below them move the figure least. */
const MOST_BARS = 10;
/** An input whose reach is less than this share of the strongest one's has no bar. */
const LEAST = 1e-3;
/** Figures drawn when nothing was chosen yet. */
const USUAL = 3;

/** Figures drawn when the person has chosen none: what is required, else the first that have values. */
export function usualShown(figures: readonly VariedFigureResult[]): string[] {
  const required = figures.filter((figure) => figure.yield !== null);
  return (required.length > 0 ? required : figures.filter(({ known }) => known > 0)).slice(0, USUAL).map(({ path }) => path);
}

/** @returns null for a figure that no variation has */
export function histogramOf({ plan, result }: Found, path: string): HistogramPicture | null {
  const at = result.figures.findIndex((figure) => figure.path === path);
  const figure = result.figures[at];
  if (figure === undefined || figure.histogram === null) return null;
  const quantile = (p: number): number => figure.quantiles.find((q) => q.p === p)!.value;
  return { label: shortLabel(figure.words), unit: figure.unit, histogram: figure.histogram, nominal: figure.nominal, middle: [quantile(0.025), quantile(0.975)], limit: limitOf(plan, at) };
}

/** @returns null where the nominal design has no such figure, or nothing moves it */
export function tornadoOf({ plan, result }: Found, path: string): (TornadoPicture & { left: number }) | null {
  const at = result.figures.findIndex((figure) => figure.path === path);
  const figure = result.figures[at];
  if (figure === undefined || figure.nominal === null) return null;
  const strong = strongestInputs(figure);
  const moving = strong.filter(({ reach, low, high }) => reach > LEAST * strong[0].reach || ((low === null || high === null) && reach > 0));
  if (moving.length === 0) return null;
  const shown = moving.slice(0, MOST_BARS);
  return {
    label: shortLabel(figure.words), unit: figure.unit, log: figure.log, nominal: figure.nominal, limit: limitOf(plan, at)?.value ?? null,
    bars: shown.map(({ input, low, high }) => ({ label: result.inputs[input].label, tolerance: result.inputs[input].tolerance, low, high })), left: strong.length - shown.length,
  };
}

/** The limit that a figure has, if it is a requirement's; of a flag the value at which it turns. */
function limitOf(plan: Found['plan'], at: number): HistogramPicture['limit'] {
  const column = plan.columns[at];
  if (column?.kind !== 'requirement') return null;
  const { limit, bound } = column.requirement;
  return typeof limit === 'number' ? { value: limit, bound } : { value: 0, bound: limit ? 'min' : 'max' };
}

/** A requirement's words end with its limit, which the picture shows. */
const shortLabel = (words: string): string => words.replace(/, (?:max|min) [^,]*$/, '');
