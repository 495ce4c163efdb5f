import { sizing, TOLERANCE, type Sizing, type SizingEdge } from '../../solver/sizing.ts';
import { Asker } from '../design/ask.ts';
import { complaintLine, type Complaint } from '../design/complaint.ts';
import type { ReadRequirement } from '../design/requirements.ts';
import { requirementQuantity } from '../design/requirement-quantities.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { quoted } from '../quantity/wording.ts';
import { solveDesign } from '../result/solve-design.ts';
import type { RequirementResult } from '../result/types.ts';
import { isUsed } from './governed.ts';
import { exactText, readSizedVariable, shownText, type SizedVariable } from './sized-variable.ts';
import { SizingStudy, type Look } from './sizing-study.ts';
import type { Tolerances, Uncertainty } from './uncertainties.ts';
import { requirementWords } from './verdict.ts';
import { verifiedIntervals } from './verified-intervals.ts';
import { cornerWords, temperatureWriter } from './words.ts';
import type { Progress } from './worst-case.ts';

export interface SizeOptions {
  /** name of the variable */ variable: string;
  /** texts of the ends; by default the variable's own range */ from?: string;
  to?: string;
  /** default: decades for densities and wherever the range spans more than one, else even steps */ scale?: SizedVariable['scale'];
  /** values of the first scan; default 25 */ points?: number;
  /** edges are closed to this; default 1e-4, relative on a log scale, of the range on a linear one */ tolerance?: number;
  set?: Readonly<Record<string, string>>;
  tolerances?: Tolerances;
  /** points inside the tolerances that check each full judgement; default 16 */ samples?: number;
  seed?: number;
}

/** A value looked at, with the score of each requirement. While the search runs they are those of the corners known so far. */
export interface LookedAt {
  value: number;
  scores: (number | null)[];
}

/** The range that is searched, as it was read from the texts. */
export type SearchedRange = Pick<SizedAnswer, 'variable' | 'unit' | 'scale' | 'from' | 'to'>;

/** What a running search can tell: how far it is; at first the range, then each value just looked at. */
export interface SizeProgress extends Progress {
  seen?: SearchedRange | LookedAt;
}

/** Where an interval ends, and why. */
export interface SizedEdge {
  value: number;
  text: string;
  reason: SizingEdge['reason'];
  /** the requirement that ends it: its index among the judged ones, and in words */ requirement: { index: number; words: string } | null;
  /** the corner at which it ends: "-40 degC, Ncap -20 %" */ at: string | null;
  /** nearest value looked at beyond the edge */ beyond: number | null;
  /** the requirement that ends it as judged at the edge; null where it was not */ row: RequirementResult | null;
}

export interface SizedAnswer {
  kind: 'sized';
  variable: string;
  /** of every value of the variable here */ unit: string;
  scale: 'linear' | 'log';
  from: number;
  to: number;
  intervals: { from: SizedEdge; to: SizedEdge }[];
  /** where the least margin is largest; where nothing meets everything, the nearest miss */ best: { value: number; text: string; requirements: RequirementResult[]; /** that the figures carry there, with no tolerance moved */ cautions: string[] } | null;
  /** what stands against the nearest miss, and whether any value of the range meets it by itself */ blockers: { index: number; words: string; met_somewhere: boolean }[];
  /** the ends of the intervals, values inside them and the best point were judged in full, and no worse corner was left */ confirmed: boolean;
  /** values looked at, with the score of each requirement (0 at its limit, above where met; null without an answer) */ scan: LookedAt[];
  /** what is narrower than this share of the range can have been missed */ resolution: number;
  /** edges are closed to this: relative on a log scale, a share of the range on a linear one */ tolerance: number;
  /** solves */ evaluations: number;
  /** why some values have no answer; null where all have one */ refusal: string | null;
}

export type SizeResult = SizedAnswer | { kind: 'complaints'; complaints: Complaint[] };

/** Rounds of judging in full what the corners known so far gave. */
const MOST_ROUNDS = 5;
const SAMPLES = 16;

/** All intervals of a variable in which every requirement of the design is met in its worst case. */
export function size(design: Design, options: SizeOptions): SizeResult {
  const steps = sizeSteps(design, options);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

/** The same in small steps, so that progress can be shown and the work be left. */
export function* sizeSteps(design: Design, options: SizeOptions): Generator<SizeProgress, SizeResult> {
  const { set = {}, tolerances = 'all', points, tolerance, samples = SAMPLES, seed } = options;
  const setup = prepare(design, options);
  if ('complaints' in setup) return { kind: 'complaints', complaints: setup.complaints };
  const { variable, requirements } = setup;
  const study = new SizingStudy(design, set, variable, requirements, tolerances);
  const problem = { from: variable.from, to: variable.to, scale: variable.scale, ...(points === undefined ? {} : { points }), ...(tolerance === undefined ? {} : { tolerance }) };
  let expected = 500;
  const progress = (): Progress => {
    const done = study.evaluations;
    // The count of corners, and so of solves, is only known at the end.
    if (done >= expected) expected = Math.ceil(done * 1.25);
    return { done, of: expected };
  };
  const judgeAll = function* (values: Iterable<number>): Generator<Progress, boolean> {
    let grown = false;
    for (const value of values) {
      const steps = study.judge(value, { samples, ...(seed === undefined ? {} : { seed }) });
      let step = steps.next();
      for (; !step.done; step = steps.next()) yield progress();
      grown = step.value || grown;
    }
    return grown;
  };
  yield { ...progress(), seen: { variable: variable.name, unit: variable.unit, scale: variable.scale, from: variable.from, to: variable.to } };
  const middle = variable.scale === 'log' ? Math.sqrt(variable.from * variable.to) : (variable.from + variable.to) / 2;
  yield* judgeAll([variable.from, middle, variable.to]);
  let found: Sizing;
  let confirmed = false;
  for (let round = 0; ; round++) {
    const search = sizing(problem);
    let step = search.next();
    while (!step.done) {
      const { scores } = study.look(step.value);
      yield { ...progress(), seen: { value: step.value, scores } };
      step = search.next(scores);
    }
    found = step.value;
    confirmed = !(yield* judgeAll(toJudge(found)));
    if (confirmed || round + 1 >= MOST_ROUNDS) break;
  }
  const judge = function* (value: number): Generator<Progress, RequirementResult[] | null> {
    yield* judgeAll([value]);
    return study.rows(value);
  };
  found = { ...found, intervals: yield* verifiedIntervals(found, (value) => study.rows(value), judge) };
  const cautions = found.best === null ? [] : cautionsAt(design, { ...set, [variable.name]: exactText(variable, found.best.value) });
  return answerOf(found, study, { cautions, variable, requirements, confirmed, tolerance: tolerance ?? TOLERANCE, writeTemperature: temperatureWriter(design) });
}

/** What is judged in full: the ends of each interval, two values inside it, and the best. */
function toJudge({ intervals, nodes, best }: Sizing): Set<number> {
  const values = new Set<number>();
  for (const { from, to } of intervals) {
    const inside = nodes.filter(({ value }) => value >= from.value && value <= to.value);
    for (const share of [0, 1 / 3, 2 / 3, 1]) values.add(inside[Math.round(share * (inside.length - 1))].value);
  }
  if (best) values.add(best.value);
  return values;
}

function prepare(design: Design, { variable: name, from, to, scale, set = {} }: SizeOptions): { variable: SizedVariable; requirements: ReadRequirement[] } | { complaints: Complaint[] } {
  const reading = toStack(design, set);
  if (!reading.ok) return { complaints: reading.complaints };
  const { temperature: _, ...overrides } = set;
  const { scope } = readVariables(design.variables ?? [], overrides);
  const ask = new Asker(scope);
  const row = (design.variables ?? []).findIndex((v) => v.name === name);
  if (Object.hasOwn(overrides, name)) ask.wrong(`--set ${name}`, `gives ${name} a value, while it is to be sized; leave it out`);
  else if (row >= 0 && !isUsed(design, set, name)) ask.wrong(`variables[${row}]`, `is ${quoted(name)}, which nothing in this design uses: no value of it would change anything; write it where it belongs, such as in a thickness`);
  if (reading.requirements.length === 0) ask.wrong('requirements', 'there are none; a size is found for what the design has to meet, so give it a requirement');
  const variable = ask.complaints.length > 0 ? null : readSizedVariable(design, name, scope, { ...(from === undefined ? {} : { from }), ...(to === undefined ? {} : { to }), ...(scale === undefined ? {} : { scale }) }, ask);
  return variable === null ? { complaints: ask.complaints } : { variable, requirements: reading.requirements };
}

/** What a value that meets everything may still be: beyond what can be made, or where the laws are extrapolated. */
function cautionsAt(design: Design, set: Readonly<Record<string, string>>): string[] {
  const answer = solveDesign(design, { set });
  if (answer.kind === 'result') return answer.result.warnings;
  return [`there is no accepted answer with no tolerance moved: ${answer.kind === 'refused' ? answer.reason : complaintLine(answer.complaints[0])}`];
}

function answerOf(found: Sizing, study: SizingStudy, { cautions, variable, requirements, confirmed, tolerance, writeTemperature }: { cautions: string[]; variable: SizedVariable; requirements: readonly ReadRequirement[]; confirmed: boolean; tolerance: number; writeTemperature: (T: number) => string }): SizedAnswer {
  const words = (i: number): string => requirementWords({ ...requirements[i], unit: requirementQuantity(requirements[i].quantity).unit });
  const edge = ({ value, reason, binding, beyond }: SizingEdge): SizedEdge => {
    let at: string | null = null;
    if (binding !== null && beyond !== null) {
      // The edge itself was judged in full; where beyond it there is no answer, the point without one is told.
      const judged = reason === 'requirement' ? study.rows(value)?.[binding].at?.words : undefined;
      at = judged ?? cornerOf(study.look(beyond), binding, study.uncertainties, writeTemperature);
    }
    const row = binding === null ? null : (study.rows(value)?.[binding] ?? null);
    return { value, text: shownText(variable, value), reason, requirement: binding === null ? null : { index: binding, words: words(binding) }, at, beyond, row };
  };
  const { best } = found;
  let refusal: string | null = null;
  for (const node of found.nodes) if (refusal === null && node.scores.includes(null)) refusal = study.look(node.value).refusal;
  return {
    kind: 'sized', variable: variable.name, unit: variable.unit, scale: variable.scale, from: variable.from, to: variable.to,
    intervals: found.intervals.map(({ from, to }) => ({ from: edge(from), to: edge(to) })),
    best: best && { value: best.value, text: shownText(variable, best.value), requirements: study.rows(best.value) ?? [], cautions },
    blockers: found.blockers.map((index) => ({ index, words: words(index), met_somewhere: found.metSomewhere[index] })),
    confirmed,
    scan: found.nodes.map((node) => ({ value: node.value, scores: [...node.scores] })),
    resolution: found.resolution,
    tolerance,
    evaluations: study.evaluations,
    refusal,
  };
}

function cornerOf(look: Look, binding: number, uncertainties: readonly Uncertainty[], writeTemperature: (T: number) => string): string | null {
  const [point, corner] = [look.points[binding], look.corners[binding]];
  if (point === null || corner === null) return null;
  return cornerWords(point, uncertainties, writeTemperature, corner.effects);
}
