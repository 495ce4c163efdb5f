import { requirementQuantity } from '../design/requirement-quantities.ts';
import { mobilityNotes } from '../result/mobility-note.ts';
import { provenanceOf } from '../result/provenance.ts';
import type { Provenance } from '../result/types.ts';
import type { Distribution } from './draw.ts';
import type { VariationPlan } from './plan.ts';
import { spreadOf, yieldOf, type Spread, type Yield } from './statistics.ts';
import { chunkOf, variationChunks, type VariationRows } from './variations.ts';

/** One figure of a tolerance run. */
export interface VariedFigureResult extends Spread {
  /** path of the figure, or "requirements.0" */ path: string;
  words: string;
  unit: string;
  log: boolean;
  /** of the design as it stands */ nominal: number | null;
  /** the figure at both ends of each tolerance, the others nominal, in the order of `inputs` */ ends: { low: number | null; high: number | null }[];
  /** of a requirement: share of the variations that meet it */ yield: Yield | null;
}

/** What a tolerance run gives. */
export interface VariationResult {
  format: 'halfmark-variations/1';
  title: string;
  count: number;
  /** variations that were drawn and solved, or found to be gaps */ done: number;
  /** the run was stopped: some variations, or some ends of the tolerances, were not reached */ partial: boolean;
  seed: number;
  distribution: Distribution;
  /** K; requirements over the temperature range were held at each of them */ temperatures_K: number[];
  inputs: { label: string; tolerance: string; origin: 'stated' | 'default'; distribution: Distribution; /** values at its ends, or changes where it is no one number */ span: [low: string, high: string] }[];
  figures: VariedFigureResult[];
  /** variations that meet every requirement; null without requirements */ yield: Yield | null;
  /** variations without an answer: not in the spreads, not met in the yields */ gaps: { index: number; reason: string }[];
  /** what the figures leave out at their temperatures */ notes: string[];
  provenance: Provenance;
}

/** Puts the chunks of a run together, whoever computed them; the same chunks give the same document to the last digit. */
export function variationResult(plan: VariationPlan, chunks: ReadonlyMap<number, VariationRows>): VariationResult {
  const width = plan.columns.length;
  const requirements = plan.columns.filter((c) => c.kind === 'requirement').length;
  const drawn = [...chunks].filter(([chunk]) => chunkOf(plan, chunk).kind === 'draws').sort(([a], [b]) => a - b);
  const done = drawn.reduce((sum, [chunk]) => sum + chunkOf(plan, chunk).count, 0);
  const ends = plan.uncertainties.map((_, u) => chunks.get(1 + u)?.values ?? []);
  const met = drawn.flatMap(([, rows]) => rows.met);
  const nominal = chunks.get(0)?.values ?? [];
  let requirement = 0;
  const figures = plan.columns.map((column, c): VariedFigureResult => {
    const values = drawn.flatMap(([, rows]) => every(rows.values, c, width));
    const own = column.kind === 'requirement' ? every(met, requirement++, requirements) : null;
    const log = column.kind === 'figure' ? column.figure.log : requirementQuantity(column.requirement.quantity).margin === 'ratio';
    return {
      path: column.kind === 'figure' ? column.figure.path : `requirements.${requirement - 1}`,
      words: column.kind === 'figure' ? column.figure.words : column.words,
      unit: column.kind === 'figure' ? column.figure.unit : column.unit,
      log, nominal: nominal[c] ?? null, ...spreadOf(values, log),
      ends: ends.map((at) => ({ low: at[c] ?? null, high: at[width + c] ?? null })),
      yield: own && yieldOf(own.filter((m) => m === 1).length, own.length),
    };
  });
  let allMet = 0;
  for (let i = 0; i < done && requirements > 0; i++) if (met.slice(i * requirements, (i + 1) * requirements).every((m) => m === 1)) allMet++;
  return {
    format: 'halfmark-variations/1', title: plan.design.title, count: plan.request.count, done, partial: chunks.size < variationChunks(plan), seed: plan.request.seed, distribution: plan.request.distribution, temperatures_K: plan.temperatures,
    inputs: plan.uncertainties.map(({ label, tolerance, origin, distribution, span }) => ({ label, tolerance, origin, distribution, span })),
    figures,
    yield: requirements > 0 ? yieldOf(allMet, done) : null,
    gaps: drawn.flatMap(([, rows]) => rows.gaps),
    notes: mobilityNotes(plan.columns.map((column) => (column.kind === 'figure'
      ? { name: column.figure.path, temperatures_K: [plan.stack.temperature] }
      : { name: column.requirement.quantity, temperatures_K: column.requirement.over === 'temperatureRange' ? plan.temperatures : [plan.stack.temperature] }))),
    provenance: provenanceOf(plan.design, plan.set),
  };
}

/** Column `c` of a matrix laid out row by row. */
function every<T>(matrix: readonly T[], c: number, width: number): T[] {
  const out: T[] = [];
  for (let i = c; i < matrix.length; i += width) out.push(matrix[i]);
  return out;
}

/** A figure's inputs by how far their two ends move it, the strongest first: the bars of a tornado. */
export function strongestInputs(figure: Pick<VariedFigureResult, 'ends' | 'nominal' | 'log'>): { input: number; low: number | null; high: number | null; reach: number }[] {
  const on = (v: number): number => (figure.log && v > 0 ? Math.log(v) : v);
  return figure.ends.map(({ low, high }, input) => {
    const values = [low, high, figure.nominal].filter((v): v is number => v !== null).map(on);
    return { input, low, high, reach: values.length > 1 ? Math.max(...values) - Math.min(...values) : 0 };
  }).sort((a, b) => b.reach - a.reach || a.input - b.input);
}
