import type { Stack } from '../../solver/index.ts';
import type { Complaint } from '../design/complaint.ts';
import { requirementQuantity } from '../design/requirement-quantities.ts';
import type { ReadRequirement } from '../design/requirements.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import { uncertaintiesOf, type Tolerances, type Uncertainty } from '../requirements/uncertainties.ts';
import { findFigures, type Figure } from '../sweep/figures.ts';
import type { Distribution } from './draw.ts';

export interface VariationRequest {
  /** variations, 1 to MOST_VARIATIONS */ count: number;
  /** whole number, 0 to 2^53 - 1 */ seed: number;
  /** "normal" by default */ distribution?: Distribution;
  /** which tolerances count; "all" by default */ tolerances?: Tolerances;
  /** paths (figures.ts); none gives the usual ones */ figures?: readonly string[];
  set?: Readonly<Record<string, string>>;
}

/** A column of the answer: a figure of the result at the design's temperature, or what a requirement is about where it is nearest to its limit. */
export type VariedFigure = { kind: 'figure'; figure: Figure } | { kind: 'requirement'; requirement: ReadRequirement; words: string; unit: string };

/** A tolerance run that has been read and found possible. */
export interface VariationPlan {
  design: Design;
  request: VariationRequest & { distribution: Distribution };
  set: Readonly<Record<string, string>>;
  stack: Stack;
  uncertainties: Uncertainty[];
  columns: VariedFigure[];
  /** K: the design's own first, then the ends of its range where a requirement is held over it */ temperatures: number[];
}

export const MOST_VARIATIONS = 200_000;

/** Reads a tolerance run and says all that is wrong with it before anything is solved. Complaints have the paths "count", "seed", "figure", or those of the design. */
export function planVariations(design: Design, request: VariationRequest): { ok: true; plan: VariationPlan } | { ok: false; complaints: Complaint[] } {
  const { count, seed, distribution = 'normal', tolerances = 'all', set = {} } = request;
  const complaints: Complaint[] = [];
  if (!Number.isInteger(count) || count < 1 || count > MOST_VARIATIONS) complaints.push({ path: 'count', message: `is ${String(count)}; a whole number from 1 to ${MOST_VARIATIONS} would do, such as 1000` });
  if (!Number.isSafeInteger(seed) || seed < 0) complaints.push({ path: 'seed', message: `is ${String(seed)}; a whole number from 0 up would do, such as 1` });
  const reading = toStack(design, set);
  if (!reading.ok) return { ok: false, complaints: [...complaints, ...reading.complaints] };
  const figures = findFigures(design, request.figures ?? []);
  if (!figures.ok) complaints.push(...figures.complaints);
  const uncertainties = uncertaintiesOf(design, set, tolerances);
  if (uncertainties.length === 0) complaints.push({ path: 'variables', message: 'nothing has a tolerance here; give a variable a "tolerance", such as "10 %", or let the default tolerances count' });
  if (complaints.length > 0 || !figures.ok) return { ok: false, complaints };
  const { stack, requirements, temperatureRange } = reading;
  const ends = requirements.some((r) => r.over === 'temperatureRange') && temperatureRange ? temperatureRange : [];
  const columns: VariedFigure[] = [
    ...figures.figures.map((figure): VariedFigure => ({ kind: 'figure', figure })),
    ...requirements.map((requirement): VariedFigure => ({ kind: 'requirement', requirement, ...requirementText(requirement) })),
  ];
  return { ok: true, plan: { design, request: { ...request, distribution }, set, stack, uncertainties, columns, temperatures: [...new Set([stack.temperature, ...ends])] } };
}

function requirementText(r: ReadRequirement): { words: string; unit: string } {
  const { words, unit, kind, marginUnit } = requirementQuantity(r.quantity);
  const limit = typeof r.limit === 'boolean' ? String(r.limit) : `${writeNumber(r.limit)}${unit === '' ? '' : ` ${unit}`}`;
  return { words: `${words} of ${r.of}, ${r.bound} ${limit}`, unit: kind === 'flag' ? marginUnit : unit };
}
