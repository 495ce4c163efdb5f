import type { CloseUp } from '../contacts/close-up.ts';
import type { MetalRow, Ranking } from '../contacts/rank-metals.ts';
import type { BarrierValue } from '../contacts/barrier-values.ts';
import type { Design } from '../design/types.ts';
import { closeUpFigures } from '../drawing/contact-closeup-words.ts';
import type { PanelColumn } from '../quantity/panel-quantities.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import type { SizedAnswer } from '../requirements/size.ts';
import { sizingSet } from '../requirements/sized-value.ts';
import { BLOCKS, standingFigure, standingWords, worstWords } from '../requirements/verdict.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import { decimalText, figureText } from '../result/figure-text.ts';
import type { RequirementResult } from '../result/types.ts';
import { sharePercent } from '../tolerance/statistics.ts';
import type { VariationResult, VariedFigureResult } from '../tolerance/result.ts';
import type { MetalAsked } from './metal-workings.ts';
import type { NearContactAsked } from './near-contact-workings.ts';
import type { RequirementAsked } from './requirement-workings.ts';
import type { SizingAsked } from './sizing-workings.ts';
import type { SpreadAsked } from './spread-workings.ts';

export type PanelAsked = RequirementAsked | SizingAsked | MetalAsked | NearContactAsked | SpreadAsked;

/** One figure as a panel shows it, with what asks for its workings. A panel draws its figures from these lists and from nothing else. */
export interface PanelFigure<A extends PanelAsked = PanelAsked> {
  asked: A;
  /** as shown, its unit with it */ text: string;
  /** the number behind it in the unit shown; null of words */ value: number | null;
}

/** Figures of a judged requirement, the worst first. */
export function requirementFigures(design: Design, row: RequirementResult, index: number, tolerances: Tolerances = 'all', set: Readonly<Record<string, string>> = {}): PanelFigure<RequirementAsked>[] {
  const figure = (column: PanelColumn<'requirement'>, text: string, value: number | null): PanelFigure<RequirementAsked> => ({ asked: { table: 'requirement', column, design, row, index, tolerances, set }, text, value });
  const worst = worstWords(row, 3);
  return [
    ...(worst === null ? [] : [figure('worst', worst, typeof row.worst === 'number' ? row.worst : null), figure('margin', standingWords(row), standingFigure(row))]),
    ...(row.at === null ? [] : [figure('corner', row.at.words, null)]),
    figure('limit', typeof row.limit === 'boolean' ? (row.limit ? 'must be' : 'must not be') : `${writeNumber(row.limit, 6)} ${row.unit}`.trim(), typeof row.limit === 'number' ? row.limit : null),
  ];
}

/** The ends of each interval of a sizing, and the best value. Lengths are counted in nm. */
export function sizingFigures(design: Design, answer: SizedAnswer, tolerances: Tolerances = 'all'): PanelFigure<SizingAsked>[] {
  const factor = answer.unit === 'cm' ? 1e7 : 1;
  const figure = (column: PanelColumn<'sizing'>, index: number, text: string, value: number): PanelFigure<SizingAsked> => ({ asked: { table: 'sizing', column, design, answer, index, tolerances }, text, value: value * factor });
  return [
    ...answer.intervals.flatMap(({ from, to }, i) => [figure('from', i, from.text, from.value), figure('to', i, to.text, to.value)]),
    ...(answer.best === null ? [] : [figure('best', 0, answer.best.text, answer.best.value)]),
  ];
}

/** What the best value comes to, a list a requirement. */
export function bestFigures(design: Design, answer: SizedAnswer, tolerances: Tolerances = 'all'): PanelFigure<RequirementAsked>[][] {
  const { best } = answer;
  return best === null ? [] : best.requirements.map((row, i) => requirementFigures(design, row, i, tolerances, sizingSet(answer, best.value)));
}

/** Figures of a metal on a surface, and of each other value of its barrier. */
export function metalFigures(design: Design, { side, temperature_K }: Pick<Ranking, 'side' | 'temperature_K'>, row: MetalRow, value: BarrierValue | null = null, tolerances: Tolerances = 'all'): PanelFigure<MetalAsked>[] {
  const columns: PanelColumn<'metal'>[] = value === null ? ['barrierN', 'barrierP', 'rho', 'least', 'most', 'worst', 'e00OverKt'] : ['barrierN', 'barrierP'];
  return columns.flatMap((column) => {
    const number = metalFigure(column, row, value);
    const blocks = column === 'worst' && row.blocks !== null;
    if (number === null && !blocks) return [];
    const text = blocks ? BLOCKS : column === 'barrierN' || column === 'barrierP' ? `${decimalText(number)} eV` : column === 'e00OverKt' ? figureText(number, 2) : `${figureText(number, column === 'rho' || column === 'worst' ? 3 : 2)} Ω cm²`;
    return [{ asked: { table: 'metal' as const, column, design, side, temperature_K, row, value, tolerances }, text, value: blocks ? null : number }];
  });
}

/** Figures of a contact from near, as contact-closeup-words.ts lists them. */
export function nearContactFigures(design: Design, contact: CloseUp): (PanelFigure<NearContactAsked> & { name: string; note?: string })[] {
  return closeUpFigures(contact).map(({ column, name, text, value, note }) => ({ asked: { table: 'nearContact' as const, column, design, contact }, name, text, value, ...(note === undefined ? {} : { note }) }));
}

/** The contact resistivity by each kind of transmission that was compared: of the same design with another assumption. */
export function comparedFigures(design: Design, contact: CloseUp): PanelFigure<NearContactAsked>[] {
  return (contact.compared ?? []).map(({ transmission, rho_c_ohm_cm2: rho }) => ({ asked: { table: 'nearContact' as const, column: 'rhoC' as const, design: { ...design, assumptions: { ...design.assumptions, transmission } }, contact }, text: rho === null ? '–' : `${figureText(rho)} Ω cm²`, value: rho }));
}

/** Mean, deviation and percentiles of a figure over the variations. */
export function spreadFigures(result: VariationResult, figure: VariedFigureResult): PanelFigure<SpreadAsked>[] {
  const at = (p: number): number | null => figure.quantiles.find((q) => q.p === p)?.value ?? null;
  const list: [PanelColumn<'spread'>, number | null][] = [['mean', figure.mean], ['sd', figure.sd], ['low', at(0.025)], ['median', at(0.5)], ['high', at(0.975)]];
  return list.flatMap(([column, value]) => (value === null ? [] : [{ asked: { table: 'spread' as const, column, result, figure }, text: `${writeNumber(Number(value.toPrecision(4)))} ${figure.unit}`.trim(), value }]));
}

/** Share of the variations that meet a requirement, and the range of the true share. @param figure  null: all requirements together */
export function yieldFigures(result: VariationResult, figure: VariedFigureResult | null): PanelFigure<SpreadAsked>[] {
  const share = figure === null ? result.yield : figure.yield;
  if (share === null) return [];
  const list: [PanelColumn<'spread'>, number][] = [['yield', share.share], ['yieldLow', share.low], ['yieldHigh', share.high]];
  return list.map(([column, value]) => ({ asked: { table: 'spread', column, result, figure }, text: sharePercent(value), value: 100 * value }));
}

/** The number that the ranking shows; null without one. */
export function metalFigure(column: PanelColumn<'metal'>, row: MetalRow, value: BarrierValue | null = null): number | null {
  switch (column) {
    case 'barrierN':
      return (value ?? row).barrier_n_eV;
    case 'barrierP':
      return (value ?? row).barrier_p_eV;
    case 'rho':
      return row.rho_c_ohm_cm2;
    case 'least':
      return row.band_ohm_cm2?.[0] ?? null;
    case 'most':
      return row.band_ohm_cm2?.[1] ?? null;
    case 'worst':
      return row.worst_ohm_cm2;
    case 'e00OverKt':
      return row.e00_over_kT;
  }
}
