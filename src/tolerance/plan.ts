import type { Stack } from '../../solver/index.ts';
import type { Complaint } from '../design/complaint.ts';
import { requirementQuantity } from '../design/requirement-quantities.ts';
import type { ReadRequirement } from '../design/requirements.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { quoted } from '../quantity/wording.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import { findFigures, type Figure } from '../sweep/figures.ts';
import type { Distribution } from './draw.ts';
import { variedInputs, withChosenTolerances, type InputChoices, type VariedInput } from './inputs.ts';
import { MovedStacks } from './moved-stacks.ts';

export interface VariationRequest {
  /** variations, 1 to MOST_VARIATIONS */ count: number;
  /** whole number, 0 to 2^53 - 1 */ seed: number;
  /** "normal" by default */ distribution?: Distribution;
  /** which tolerances count; "all" by default */ tolerances?: Tolerances;
  /** other tolerances and distributions of some inputs, for this run, by their labels */ inputs?: InputChoices;
  /** paths (figures.ts); none gives the usual ones */ figures?: readonly string[];
  set?: Readonly<Record<string, string>>;
}

/** A column of the answer: a figure of the result at the design's temperature, or what a requirement is about where it is nearest to its limit. */
export type VariedFigure = { kind: 'figure'; figure: Figure } | { kind: 'requirement'; requirement: ReadRequirement; words: string; unit: string };

/** A tolerance run that has been read and found possible. */
export interface VariationPlan {
  design: Design;
  /** the design with the tolerances of this run in its variables */ varied: Design;
  request: VariationRequest & { distribution: Distribution };
  set: Readonly<Record<string, string>>;
  stack: Stack;
  uncertainties: VariedInput[];
  columns: VariedFigure[];
  /** K: the design's own first, then the ends of its range where a requirement is held over it */ temperatures: number[];
}

const MOST_VARIATIONS = 200_000;

/**
 * Reads a tolerance run and says all that is wrong with it before anything is solved; a tolerance whose own ends the design does not take is wrong as well. Complaints have the paths "count", "seed", "figure",
 * "inputs.LABEL", or those of the design.
 */
export function planVariations(design: Design, request: VariationRequest): { ok: true; plan: VariationPlan } | { ok: false; complaints: Complaint[] } {
  const { count, seed, distribution = 'normal', tolerances = 'all', set = {}, inputs: choices = {} } = request;
  const varied = withChosenTolerances(design, choices);
  const complaints: Complaint[] = [];
  if (!Number.isInteger(count) || count < 1 || count > MOST_VARIATIONS) complaints.push({ path: 'count', message: `is ${Number.isNaN(count) ? 'no number' : String(count)}; a whole number from 1 to ${MOST_VARIATIONS} would do, such as 1000` });
  if (!Number.isSafeInteger(seed) || seed < 0) complaints.push({ path: 'seed', message: `is ${Number.isNaN(seed) ? 'no number' : String(seed)}; a whole number from 0 up would do, such as 1` });
  const reading = toStack(varied, set);
  if (!reading.ok) return { ok: false, complaints: [...complaints, ...reading.complaints.map((c) => ofInput(design, choices, c))] };
  const figures = findFigures(design, request.figures ?? []);
  if (!figures.ok) complaints.push(...figures.complaints);
  const { inputs: uncertainties, complaints: wrongChoices } = variedInputs(varied, set, reading.stack, { tolerances, distribution, choices });
  complaints.push(...wrongChoices);
  if (uncertainties.length === 0 && wrongChoices.length === 0) complaints.push({ path: 'variables', message: 'nothing has a tolerance here; give a variable a "tolerance", such as "10 %", or let the default tolerances count' });
  complaints.push(...endComplaints(varied, set, uncertainties, reading.stack));
  if (complaints.length > 0 || !figures.ok) return { ok: false, complaints };
  const { stack, requirements, temperatureRange } = reading;
  const ends = requirements.some((r) => r.over === 'temperatureRange') && temperatureRange ? temperatureRange : [];
  const columns: VariedFigure[] = [
    ...figures.figures.map((figure): VariedFigure => ({ kind: 'figure', figure })),
    ...requirements.map((requirement): VariedFigure => ({ kind: 'requirement', requirement, ...requirementText(requirement) })),
  ];
  return { ok: true, plan: { design, varied, request: { ...request, distribution }, set, stack, uncertainties, columns, temperatures: [...new Set([stack.temperature, ...ends])] } };
}

/** Where a tolerance of this run stands in place of the design's, it is the run that is wrong. */
function ofInput(design: Design, choices: InputChoices, complaint: Complaint): Complaint {
  const row = /^variables\[(\d+)\]\.tolerance$/.exec(complaint.path);
  const name = row ? design.variables?.[Number(row[1])]?.name : undefined;
  return name !== undefined && Object.hasOwn(choices, name) && choices[name].tolerance !== undefined ? { ...complaint, path: `inputs.${name}` } : complaint;
}

/** Each tolerance at its two ends, the others nominal: what the design does not take there (a thickness below zero) no draw should find out. */
function endComplaints(design: Design, set: Readonly<Record<string, string>>, inputs: readonly VariedInput[], stack: Stack): Complaint[] {
  const stacks = new MovedStacks(design, set, inputs, stack);
  return inputs.flatMap((input, i) => {
    for (const end of [-1, 1]) {
      const there = stacks.at(inputs.map((_, other) => (other === i ? end : 0)));
      if (typeof there === 'string') return [{ path: `inputs.${input.label}`, message: `${quoted(input.tolerance)} is too wide: at its ${end < 0 ? 'lower' : 'upper'} end, ${there}; make it smaller` }];
    }
    return [];
  });
}

function requirementText(r: ReadRequirement): { words: string; unit: string } {
  const { words, unit, kind, marginUnit } = requirementQuantity(r.quantity);
  const limit = typeof r.limit === 'boolean' ? String(r.limit) : `${writeNumber(r.limit)}${unit === '' ? '' : ` ${unit}`}`;
  return { words: `${words} of ${r.of}, ${r.bound} ${limit}`, unit: kind === 'flag' ? marginUnit : unit };
}
