import type { Design } from '../../src/design/types.ts';
import type { MarginCurve, MarginPicture, PlotMark } from '../../src/drawing/margin-plot.ts';
import { limitWords, quantityOf, quantityWords, writtenLimits, type WrittenLimit } from '../../src/requirements/limits.ts';
import type { LookedAt, SizedAnswer, SizedEdge } from '../../src/requirements/size.ts';
import { valueText } from '../../src/requirements/sized-value.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';
import { plainThickness, unitOf } from '../shared/typed-text.ts';

/** Lengths are shown in nm or um; all else in the solver's unit. */
export function shownUnit(unit: string, to: number): { unit: string; factor: number } {
  if (unit !== 'cm') return { unit, factor: 1 };
  return to < 1e-3 ? { unit: 'nm', factor: 1e7 } : { unit: 'um', factor: 1e4 };
}

/** A plain text in a unit of the solver; null for an expression, which is not worked out here, and for other units. */
export function plainValue(text: string, unit: string): number | null {
  if (unit === 'cm') {
    const nm = plainThickness(text);
    return nm === null ? null : nm * 1e-7;
  }
  const own = unitOf(text)?.trim() ?? '';
  const value = Number((own === '' ? text : text.trim().slice(0, -own.length)).trim() || 'nothing');
  if (!Number.isFinite(value)) return null;
  if (own === 'meV' && unit === 'eV') return value / 1000;
  return own === unit ? value : null;
}

/** What is known of a sizing: its answer, or as much as has been looked at. */
export type Known = Pick<SizedAnswer, 'variable' | 'unit' | 'scale' | 'from' | 'to' | 'scan'> & Partial<Pick<SizedAnswer, 'intervals' | 'best'>>;

/** The picture of a sizing, in the unit that people use. @param strong  index of the requirement that is asked about, in the design */
export function pictureOf(known: Known, design: Design, strong: number | null): MarginPicture {
  const { variable, scale, intervals = [], best = null, scan } = known;
  const { unit, factor } = shownUnit(known.unit, known.to);
  const limits = writtenLimits(design);
  const points = [...scan].sort((a, b) => a.value - b.value);
  const mark = (value: number): PlotMark => ({ value: value * factor, text: writeNumber(value * factor, 3) });
  const edge = ({ value, requirement, reason }: SizedEdge): PlotMark & { curve: number | null } => ({ ...mark(value), curve: reason === 'range' ? null : (requirement?.index ?? null) });
  const now = plainValue(design.variables?.find(({ name }) => name === variable)?.value ?? '', known.unit);
  return {
    name: variable, unit, scale, from: known.from * factor, to: known.to * factor,
    curves: limits.map((limit, i): MarginCurve => ({ label: curveLabel(limit, limits), measure: measureOf(limit), strong: limit.row === strong, points: points.map(({ value, scores }) => ({ value: value * factor, score: scores[i] ?? null })) })),
    intervals: intervals.map(({ from, to }) => ({ from: edge(from), to: edge(to) })),
    best: best === null ? null : { ...mark(best.value), score: leastAt(best.value, points) },
    now: now === null ? null : mark(now),
  };
}

function measureOf({ requirement }: WrittenLimit): MarginCurve['measure'] {
  const quantity = quantityOf(requirement.quantity);
  return quantity === null || quantity.margin === 'ratio' ? { kind: 'ratio' } : { kind: 'difference', step: quantity.step, unit: quantity.marginUnit };
}

/** Without its limit, unless the same quantity has two. */
function curveLabel(limit: WrittenLimit, limits: readonly WrittenLimit[]): string {
  const words = quantityWords(limit.requirement);
  const alone = limits.filter(({ requirement }) => requirement.quantity === limit.requirement.quantity && requirement.of === limit.requirement.of).length === 1;
  return alone ? words : `${words}, ${limit.bound === 'max' ? 'most' : 'least'}`;
}

function leastAt(value: number, points: readonly LookedAt[]): number {
  const scores = points.find((point) => point.value === value)?.scores ?? [];
  return scores.reduce<number>((least, score) => Math.min(least, score ?? -Infinity), Infinity);
}

/** The margins as rows of text: the value, then each requirement's margin. */
export function marginTable(known: Known, design: Design): { headings: string[]; rows: string[][] } {
  const limits = writtenLimits(design);
  const margin = (score: number | null | undefined, limit: WrittenLimit): string => {
    if (score === null || score === undefined) return 'no answer';
    const measure = measureOf(limit);
    if (measure.kind === 'difference') return `${writeNumber(score * measure.step, 3)} ${measure.unit}`.trim();
    return Math.abs(score) > 690 ? (score > 0 ? 'without end' : 'none') : `×${writeNumber(Math.exp(score), 3)}`;
  };
  return {
    headings: [known.variable, ...limits.map(limitWords)],
    rows: [...known.scan].sort((a, b) => a.value - b.value).map(({ value, scores }) => [valueText(known, value), ...limits.map((limit, i) => margin(scores[i], limit))]),
  };
}
