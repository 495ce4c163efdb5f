import type { Profiles, Stack } from '../../solver/index.ts';
import type { Complaint } from '../design/complaint.ts';
import { requirementQuantity } from '../design/requirement-quantities.ts';
import type { ReadRequirement } from '../design/requirements.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import type { RequirementResult } from '../result/types.ts';
import { absenceOf } from './absence.ts';
import { marginOf } from './margin.ts';
import { PointSolver } from './point.ts';
import { uncertaintiesOf, type Tolerances, type Uncertainty } from './uncertainties.ts';
import { cornerWords, temperatureWriter } from './words.ts';
import { worstCases, type Progress, type WorstCase, type WorstCaseOptions } from './worst-case.ts';

export interface JudgeOptions extends WorstCaseOptions {
  /** values for this run: variables by name, and "temperature" */ set?: Readonly<Record<string, string>>;
  /** which tolerances count; default "all" */ tolerances?: Tolerances;
  /** profiles of an accepted answer of this design */ warmStart?: Profiles;
}

/** Rows of the result, or what is wrong with the design. */
export type Judgement = { kind: 'judged'; requirements: RequirementResult[]; /** solves that it took */ evaluations: number } | { kind: 'complaints'; complaints: Complaint[] };

/** Judges the requirements of a design over their temperatures and all tolerances. */
export function judge(design: Design, options: JudgeOptions = {}): Judgement {
  const steps = judging(design, options);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

/** The same in steps of one solve each, so that progress can be shown and the work be left. */
export function* judging(design: Design, options: JudgeOptions = {}): Generator<Progress, Judgement> {
  const { set = {}, tolerances = 'all', warmStart } = options;
  const reading = toStack(design, set);
  if (!reading.ok) return { kind: 'complaints', complaints: reading.complaints };
  const { requirements, stack, temperatureRange } = reading;
  const solver = new PointSolver(design, set, requirements, uncertaintiesOf(design, set, tolerances), warmStart);
  const cases = yield* casesOf(solver, stack.temperature, temperatureRange, options);
  const words = temperatureWriter(design);
  return { kind: 'judged', requirements: requirements.map((r, i) => requirementResult(r, i, cases[i], stack, solver.uncertainties, words)), evaluations: solver.evaluations };
}

/** The worst case of every requirement of the solver's list, those at the design's own temperature first. */
export function* casesOf(solver: PointSolver, temperature: number, range: readonly [number, number] | null, options: WorstCaseOptions): Generator<Progress, WorstCase[]> {
  const out: WorstCase[] = [];
  let done = 0;
  for (const over of ['temperature', 'temperatureRange'] as const) {
    const rows = [...solver.requirements.keys()].filter((i) => solver.requirements[i].over === over);
    if (rows.length === 0) continue;
    const steps = worstCases(solver, rows, over === 'temperatureRange' && range ? range : [temperature], temperature, options);
    let step = steps.next();
    for (; !step.done; step = steps.next()) yield { done: done + step.value.done, of: done + step.value.of };
    done = solver.evaluations;
    rows.forEach((row, i) => { out[row] = (step.value as WorstCase[])[i]; });
  }
  return out;
}

/** A row of the result from the worst case that was found. @param stack  of the design with no tolerance moved */
export function requirementResult(requirement: ReadRequirement, index: number, found: WorstCase, stack: Stack, uncertainties: readonly Uncertainty[], writeTemperature: (T: number) => string): RequirementResult {
  const { quantity, of, bound, limit, over } = requirement;
  const { kind, unit, margin, marginUnit } = requirementQuantity(quantity);
  const { reading, unanswered } = found;
  const score = reading === null ? null : (reading.scores[index] as number);
  const figure = reading === null ? null : (reading.figures[index] as number);
  const blank = unanswered[0];
  return {
    quantity, of, bound, unit, limit, over,
    worst: figure === null || !Number.isFinite(figure) ? null : kind === 'flag' ? figure > 0 : figure,
    blocks: figure === Infinity,
    at: reading === null ? null : {
      temperature_K: reading.point.temperature,
      tolerances: reading.point.counts.flatMap((count, i) => (count === 0 ? [] : [{ name: uncertainties[i].label, count, words: uncertainties[i].words(count) }])),
      words: cornerWords(reading.point, uncertainties, writeTemperature, found.effects),
    },
    // What is not known everywhere is not met.
    met: score !== null && score >= 0 && unanswered.length === 0,
    judged: score !== null && (score < 0 || unanswered.length === 0),
    margin: score === null ? null : marginOf(requirement, score),
    margin_kind: margin,
    margin_unit: marginUnit,
    corners_sufficed: found.cornersSufficed,
    unanswered: blank === undefined ? null : {
      points: unanswered.length,
      temperature_K: blank.point.temperature,
      words: cornerWords(blank.point, uncertainties, writeTemperature),
      reason: blank.refusal ?? absenceOf(requirement, stack),
    },
  };
}
