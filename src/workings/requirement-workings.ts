import { requirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import type { Design } from '../design/types.ts';
import { writtenLimits } from '../requirements/limits.ts';
import { standingFigure } from '../requirements/verdict.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import type { RequirementResult } from '../result/types.ts';
import type { PanelColumn } from '../quantity/panel-quantities.ts';
import type { Context } from './context.ts';
import { againWords, cornerContext } from './corner.ts';
import { formula } from './formula.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import { DESIGN, known, WORKED, type Known } from './known.ts';
import { requirementFigure } from './requirement-figure.ts';
import { lastResult, step, type Step } from './step.ts';
import type { Found } from './workings.ts';

/** A figure of a judged requirement, with the design that it is of. */
export interface RequirementAsked {
  table: 'requirement';
  column: PanelColumn<'requirement'>;
  design: Design;
  row: RequirementResult;
  /** place among the limits of the design */ index: number;
  tolerances: Tolerances;
  /** values that were in force, such as that of a variable that is sized */ set?: Readonly<Record<string, string>>;
}

/** What a requirement's figures rest on: the stack at its worst corner. */
export function requirementWorkings({ column, design, row, index, tolerances, set = {} }: RequirementAsked): { found: Found; context: Context | null } {
  if (column === 'limit') return { context: null, found: { steps: typeof row.limit === 'boolean' ? [] : [step(known('L', 'limit', row.limit * scaleOf(row), row.unit, WORKED, { scale: scaleOf(row) }), formula`${limitOf(design, row, index)}`)], remarks: [limitRemark(design, row, index)], rests: [] } };
  if (row.at === null) return { context: null, found: { steps: [], remarks: [`There is no figure: ${row.unanswered?.reason ?? 'no point has an answer'}.`], rests: [] } };
  const corner = cornerContext(design, row.at, set, tolerances, Object.keys(set).length === 0);
  if (typeof corner === 'string') return { context: null, found: { steps: [], remarks: [`The corner could not be solved once more: ${corner}.`], rests: [] } };
  const { context, steps } = corner;
  const remarks = cornerRemarks(row);
  if (column === 'corner') return { context, found: { steps, remarks: [...remarks, ...(steps.length === 0 ? ['No tolerance is moved there.'] : [])], rests: [] } };
  const figure = requirementFigure(context, row);
  if (figure === null) return { context, found: { steps, remarks: [...remarks, row.blocks ? 'The contact blocks there: what passes is too little for a finite resistivity. A largest limit is missed, whatever it is.' : 'There is no such figure there.'], rests: ['stack'] } };
  const { found } = figure;
  const accuracy = [found.accuracy ?? '', typeof row.worst === 'number' ? againWords(row.worst, figure.figure) : ''].filter((text) => text !== '').join(' ');
  const worst: Found = { ...found, steps: [...steps, ...found.steps], remarks: [...remarks, ...(found.remarks ?? [])], accuracy };
  if (column === 'worst') return { context, found: worst };
  return { context, found: { ...worst, steps: [...worst.steps, ...standingSteps(design, row, index, figure.figure)], remarks: [...(worst.remarks ?? []), row.margin_kind === 'ratio' ? 'Met from 1 up.' : 'Met from 0 up.'] } };
}

/** The margin, and what it is missed by where it is told so. */
function standingSteps(design: Design, row: RequirementResult, index: number, x: Known): Step[] {
  const steps = marginSteps(design, row, index, x);
  const told = standingFigure(row);
  const m = lastResult({ steps });
  if (m === null || told === null || told === row.margin) return steps;
  const missed = (value: number): Known => known('k', row.margin_kind === 'ratio' ? 'factor that it is missed by' : 'what it is missed by', value, m.unit, WORKED, { scale: m.scale });
  return [...steps, row.margin_kind === 'ratio' ? step(missed(1 / m.value), formula`1 / ${m}`) : step(missed(Math.abs(m.value)), formula`abs(${m})`)];
}

/** Limit against figure, as src/requirements/margin.ts sets them. */
function marginSteps(design: Design, row: RequirementResult, index: number, x: Known): Step[] {
  if (row.margin === null) return [];
  if (typeof row.limit === 'boolean') {
    const m = known('m', 'margin', row.limit ? x.value : -x.value, row.margin_unit, WORKED);
    return [step(m, row.limit ? formula`${x}` : formula`-${x}`, row.limit ? 'The flag is asked for.' : 'The flag is forbidden.')];
  }
  const L = limitOf(design, row, index);
  if (row.margin_kind === 'ratio') {
    const m = known('m', 'margin, in times', row.bound === 'max' ? L.value / x.value : x.value / L.value, '', WORKED);
    return [step(m, row.bound === 'max' ? formula`${L} / ${x}` : formula`${x} / ${L}`)];
  }
  const m = known('m', 'margin', row.bound === 'max' ? L.value - x.value : x.value - L.value, row.margin_unit, WORKED, { scale: L.scale });
  return [step(m, row.bound === 'max' ? formula`${L} - ${x}` : formula`${x} - ${L}`)];
}

const scaleOf = ({ unit }: RequirementResult): number => (unit === 'nm' ? CM_PER_NM : 1);

export function limitOf(design: Design, row: RequirementResult, index: number): Known {
  const written = writtenLimits(design)[index];
  return known('L', `${row.bound === 'max' ? 'largest' : 'least'} ${requirementQuantity(row.quantity as RequirementQuantityName).words} allowed`, (row.limit as number) * scaleOf(row), row.unit, DESIGN, { scale: scaleOf(row), path: written === undefined ? 'requirements' : `requirements[${written.row}].${written.bound}` });
}

function limitRemark(design: Design, row: RequirementResult, index: number): string {
  const written = writtenLimits(design)[index];
  if (typeof row.limit === 'boolean') return row.limit ? 'The design asks for it.' : 'The design forbids it.';
  return `The design writes ${written === undefined ? 'it' : `“${written.limit}”`}, ${row.bound === 'max' ? 'the largest' : 'the least'} allowed, ${row.over === 'temperatureRange' ? 'over its temperature range' : 'at its own temperature'}.`;
}

function cornerRemarks(row: RequirementResult): string[] {
  const out = [`Worst at ${row.at!.words}. Values of the design below are those at this corner.`];
  out.push(row.corners_sufficed ? 'Found among the corners of temperatures and tolerances; points drawn inside were no worse.' : 'Found inside the ranges by a search from the worst point that was drawn there: the corners did not suffice.');
  if (row.unanswered !== null) out.push(`Without an answer: ${row.unanswered.points} ${row.unanswered.points === 1 ? 'point' : 'points'}, ${row.unanswered.points === 1 ? '' : 'the first '}at ${row.unanswered.words} (${row.unanswered.reason}). What is not known is not met.`);
  return out;
}
