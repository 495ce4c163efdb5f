import type { Design } from '../design/types.ts';
import { KINDS, type KindName } from '../quantity/kinds.ts';
import { writeNumber, writeQuantity } from '../quantity/write-quantity.ts';
import type { SizedAnswer } from './size.ts';

/** A value that a sizing looked at, as text for the variable: the unit that people use, so many digits. */
export function valueText({ unit }: Pick<SizedAnswer, 'unit'>, value: number, digits = 4): string {
  const kind = (Object.keys(KINDS) as KindName[]).find((name) => KINDS[name].unit === unit);
  return kind === undefined ? `${writeNumber(value, digits)} ${unit}` : writeQuantity(value, kind, digits);
}

/** Digits of an exact number in print. */
const MOST_DIGITS = 15;

/** The same with as few digits as keep it within an interval: a rounded value must still be one that meets everything. */
export function textWithin(answer: Pick<SizedAnswer, 'unit'>, value: number, [low, high]: readonly [number, number]): string {
  for (let digits = 3; digits < MOST_DIGITS; digits++) {
    const rounded = Number(value.toPrecision(digits));
    if (rounded >= low && rounded <= high) return valueText(answer, value, digits);
  }
  return valueText(answer, value, MOST_DIGITS);
}

/** What sets the variable of a sizing to a value, exactly as the search did. */
export function sizingSet({ variable, unit }: Pick<SizedAnswer, 'variable' | 'unit'>, value: number): Record<string, string> {
  return { [variable]: unit === '' ? String(value) : `${value} ${unit}` };
}

/** What a sizing depends on, as text: the design without the values and the words that it does not look at. */
export function sizingBasis(design: Design, variable: string): string {
  const { title: _, notes: __, variables = [], ...rest } = design;
  return JSON.stringify({ ...rest, variables: variables.map(({ note: ___, range: ____, ...row }) => (row.name === variable ? { ...row, value: '' } : row)) });
}
