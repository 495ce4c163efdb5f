import { CM_PER_NM } from '../../solver/units.ts';
import { printedUnits } from '../quantity/printed-units.ts';
import { requirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import type { Design } from '../design/types.ts';
import type { PanelColumn } from '../quantity/panel-quantities.ts';
import type { LookedAt, SizedAnswer, SizedEdge } from '../requirements/size.ts';
import { sizingSet } from '../requirements/sized-value.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import type { RequirementResult } from '../result/types.ts';
import type { Context } from './context.ts';
import { cornerContext } from './corner.ts';
import type { Expression } from './expression.ts';
import { formula } from './formula.ts';
import { mi, mn, mo, mrow, signOf, type MathNode } from './math.ts';
import { DESIGN, known, SOLVED, WORKED, type Known } from './known.ts';
import { requirementFigure } from './requirement-figure.ts';
import { limitOf } from './requirement-workings.ts';
import { law, printed, step, type Step } from './step.ts';
import type { Found } from './workings.ts';

/** A figure of a sizing, with the design that was sized. */
export interface SizingAsked {
  table: 'sizing';
  column: PanelColumn<'sizing'>;
  design: Design;
  answer: SizedAnswer;
  /** of the interval; 0 for the best value */ index: number;
  tolerances: Tolerances;
}

export function sizingWorkings(asked: SizingAsked): { found: Found; context: Context | null } {
  return asked.column === 'best' ? best(asked) : edge(asked);
}

/** A value of the variable in the unit that people use. */
function valueOf({ variable, unit }: SizedAnswer, sign: string, words: string, value: number, origin = SOLVED): Known {
  const isLength = unit === 'cm';
  return known(sign, words, value, isLength ? 'nm' : unit, origin, { scale: isLength ? CM_PER_NM : 1, path: `variables ${variable}` });
}

/** s(v) >= 0 for every requirement: what an interval is. */
const condition = (): MathNode => mrow(mi('min'), mo('('), signOf('s_1'), mo(','), mi('…'), mo(')'), mo('≥'), mn('0'));

const SCORE = 'The score of a requirement: the logarithm of limit over figure (of figure over limit, for a least one), or the difference in the quantity’s own steps. It is 0 at the limit, above where met, and taken at the worst corner of temperatures and tolerances.';

function edge({ column, design, answer, index, tolerances }: SizingAsked): { found: Found; context: Context | null } {
  const end: SizedEdge = answer.intervals[index][column as 'from' | 'to'];
  const v = valueOf(answer, 'v', `${answer.variable}, ${column === 'from' ? 'lower' : 'upper'} end of the interval`, end.value, WORKED);
  const at = valueOf(answer, 'v_in', `outermost value of ${answer.variable} at which everything is met`, end.value);
  const last = step(v, formula`${at}`);
  const start = law(condition(), SCORE);
  if (end.reason === 'range' || end.beyond === null) return { context: null, found: { steps: [start, step(v, formula`${valueOf(answer, 'v_range', 'end of the range that was searched', end.value, DESIGN)}`)], remarks: ['The range that was searched ends here, with everything met: the interval may go on beyond it.'], rests: [] } };
  const beyond = valueOf(answer, 'v_out', 'nearest value looked at on the other side', end.beyond);
  const gap = closing(answer, at, beyond);
  const remarks = [`Closed in by a bracketed root search (ITP: Oliveira and Takahashi, ACM Trans. Math. Softw. 47, 5, 2021), to ${answer.tolerance} ${answer.scale === 'log' ? 'of the value' : 'of the range'} at most. The value that is shown lies on the side where everything is met.`, answer.confirmed ? 'The end was judged in full, over all corners.' : 'Not confirmed: a worse corner turned up at the last judgement.'];
  if (end.reason === 'no answer' || end.row?.at == null) return { context: null, found: { steps: [start, gap, last], remarks: [`Beyond it there is no accepted answer for ${end.requirement?.words ?? 'a requirement'}${end.at === null ? '' : ` at ${end.at}`}.`, ...remarks], rests: [] } };
  const sides = [side(design, answer, end.row, end.requirement!.index, tolerances, { value: end.value, mark: 'in' }), side(design, answer, end.row, end.requirement!.index, tolerances, { value: end.beyond, mark: 'out' })];
  return {
    context: sides[0].context,
    found: { steps: [start, ...sides.flatMap((s) => s.steps), gap, last], remarks: [`${column === 'from' ? 'Below' : 'Above'} it ${end.requirement!.words} is missed, at ${end.at ?? end.row.at.words}. Both sides are verified at that corner: on the inner one the score is not below zero, on the outer one it is.`, ...remarks], rests: ['stack'], solved: true },
  };
}

/** How near the two sides are to each other. */
function closing(answer: SizedAnswer, at: Known, beyond: Known): Step {
  if (answer.scale === 'log') return step(known('w', 'width of the bracket, relative', Math.abs(beyond.value - at.value) / at.value, '', WORKED), formula`abs(${beyond} - ${at}) / ${at}`);
  const [a, b] = [valueOf(answer, 'v_1', 'lower end of the range', answer.from, DESIGN), valueOf(answer, 'v_2', 'upper end of the range', answer.to, DESIGN)];
  return step(known('w', 'width of the bracket, of the range', Math.abs(beyond.value - at.value) / (answer.to - answer.from), '', WORKED), formula`abs(${beyond} - ${at}) / (${b} - ${a})`);
}

/** The requirement at one side of an edge, at the corner that ends the interval: its figure, and the score that comes of it. */
function side(design: Design, answer: SizedAnswer, row: RequirementResult, index: number, tolerances: Tolerances, { value, mark }: { value: number; mark: 'in' | 'out' }): { steps: Step[]; context: Context | null } {
  const corner = cornerContext(design, row.at!, sizingSet(answer, value), tolerances);
  const v = valueOf(answer, `v_${mark}`, `${answer.variable} on the ${mark === 'in' ? 'inner' : 'outer'} side`, value);
  if (typeof corner === 'string') return { context: null, steps: [] };
  const figure = requirementFigure(corner.context, row);
  if (figure === null) return { context: corner.context, steps: [] };
  const x = known(`x_${mark}`, `${figure.figure.words} with ${answer.variable} = ${printed(v.value / v.scale, 9)} ${v.unit}`.trim(), figure.figure.value, figure.figure.unit, SOLVED, { scale: figure.figure.scale });
  return { context: corner.context, steps: [scoreStep(design, row, index, x, mark)] };
}

/** As src/requirements/margin.ts has it. */
function scoreStep(design: Design, row: RequirementResult, index: number, x: Known, mark: string): Step {
  const { margin, step: size, kind } = requirementQuantity(row.quantity as RequirementQuantityName);
  const unit = known('δ', 'difference that weighs as much as a factor e', size, row.margin_unit, WORKED, { scale: x.scale });
  const s = (value: number): Known => known(`s_${mark}`, mark === 'in' ? 'score on the inner side' : mark === 'out' ? 'score on the outer side' : `score of requirement ${mark}`, value, '', WORKED);
  if (kind === 'flag') return step(s((row.limit === true ? x.value : -x.value) / size), row.limit === true ? formula`${x} / ${unit}` : formula`-${x} / ${unit}`);
  const L = limitOf(design, row, index);
  const max = row.bound === 'max';
  if (margin === 'ratio') return step(s(max ? Math.log(L.value / x.value) : Math.log(x.value / L.value)), max ? formula`ln(${L} / ${x})` : formula`ln(${x} / ${L})`);
  const scaled = { ...unit, value: size * x.scale };
  return step(s((max ? L.value - x.value : x.value - L.value) / scaled.value), max ? formula`(${L} - ${x}) / ${scaled}` : formula`(${x} - ${L}) / ${scaled}`);
}

function best({ design, answer }: SizingAsked): { found: Found; context: Context | null } {
  const point = answer.best;
  if (point === null) return { context: null, found: { steps: [], remarks: ['There is no accepted answer at any value of the range.'], rests: [] } };
  const steps: Step[] = [law(condition(), SCORE)];
  const scores: Known[] = [];
  point.requirements.forEach((row, i) => {
    if (typeof row.worst !== 'number') return;
    const scale = row.unit === 'nm' ? CM_PER_NM : 1;
    const made = scoreStep(design, row, i, known(`x_${i + 1}`, `worst ${requirementQuantity(row.quantity as RequirementQuantityName).words} of ${row.of}${row.at === null ? '' : `, at ${row.at.words}`}`, row.worst * scale, row.unit, SOLVED, { scale }), String(i + 1));
    steps.push(made);
    if (made.kind === 'formula') scores.push(made.result);
  });
  if (scores.length > 1) steps.push(step(known('s', 'least score, the one to be made largest', Math.min(...scores.map(({ value }) => value)), '', WORKED), { kind: 'call', law: 'min', of: scores.map((k): Expression => ({ kind: 'known', of: k })) }));
  const [below, above] = neighbours(answer.scan, point.value);
  const beside = [below, above].filter((p) => p !== null).map((p, i) => known(`s_${i === 0 && below !== null ? 'below' : 'above'}`, `least score at the next value looked at, ${printed(p.value, 6)} ${printedUnits(answer.unit)}`.trim(), leastOf(p), '', SOLVED));
  const here = answer.scan.find(({ value }) => value === point.value);
  if (here !== undefined && beside.length > 0 && [leastOf(here), ...beside.map(({ value }) => value)].every(Number.isFinite)) {
    const mine = known('s_best', 'least score at the best value, in the corners that the search knew', leastOf(here), '', SOLVED);
    steps.push(step(known('s_most', 'largest of the three', Math.max(mine.value, ...beside.map(({ value }) => value)), '', WORKED), { kind: 'call', law: 'max', of: [mine, ...beside].map((k): Expression => ({ kind: 'known', of: k })) }));
  }
  const v = valueOf(answer, 'v', `best value of ${answer.variable}`, point.value, WORKED);
  const remarks = ['Golden sections about the best of all values looked at (Kiefer, Proc. Am. Math. Soc. 4, 502, 1953; from memory), until its neighbours are a five-hundredth of the range apart.', answer.intervals.length > 0 ? 'Everything is met there; the least margin is as large as it gets in the range.' : 'Nothing meets everything: this is the nearest miss.'];
  const others = point.requirements.filter(({ worst }) => typeof worst !== 'number').length;
  if (others > 0) remarks.push(`${others} of the requirements ask for yes or no, or have no figure there; they are judged as well.`);
  return { context: null, found: { steps: [...steps, step(v, formula`${valueOf(answer, 'v_s', 'value that was looked at', point.value)}`)], remarks, rests: [] } };
}

function neighbours(scan: readonly LookedAt[], value: number): [LookedAt | null, LookedAt | null] {
  let [below, above]: [LookedAt | null, LookedAt | null] = [null, null];
  for (const point of scan) {
    if (point.value < value && (below === null || point.value > below.value)) below = point;
    if (point.value > value && (above === null || point.value < above.value)) above = point;
  }
  return [below, above];
}

const leastOf = ({ scores }: LookedAt): number => scores.reduce<number>((least, s) => Math.min(least, s ?? -Infinity), Infinity);
