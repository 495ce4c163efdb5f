import { decimalText, figureText } from '../result/figure-text.ts';
import type { TextRun } from './shapes.ts';

/** How figures are written in drawings. The minus is the true one, digits are those of the face. */

/** "1.2 × 10^17" as runs; "0" for 0. Two digits, without ".0". */
export function powerOfTen(value: number): TextRun[] {
  if (!(Math.abs(value) > 0) || !Number.isFinite(value)) return [{ text: String(value) }];
  const [mantissa, exponent] = value.toExponential(1).split('e');
  const short = mantissa.replace(/\.0$/, '').replace('-', '−');
  const power: TextRun[] = [{ text: '10' }, { text: String(Number(exponent)).replace('-', '−'), script: 'super' }];
  return short === '1' ? power : [{ text: `${short}\u2009×\u2009` }, ...power];
}

/** A density of carriers: plain where a power of ten would be the longer way to say it; what underflows is below every number, not nothing. */
export function densityRuns(value: number): TextRun[] {
  if (value === 0) return [{ text: '< ' }, ...powerOfTen(1e-300)];
  return value >= 0.01 && value < 1000 ? [{ text: figureText(value, 2) }] : powerOfTen(value);
}

/** Thickness with the unit that keeps it short. */
export function lengthText(nm: number): string {
  const [value, unit] = nm >= 1e6 ? [nm / 1e6, 'mm'] : nm >= 1000 ? [nm / 1000, 'µm'] : [nm, 'nm'];
  return `${Number(value.toPrecision(4))} ${unit}`;
}

/** eV with three decimals, or meV below 10 meV. */
export function energyText(eV: number): string {
  const small = Math.abs(eV) < 0.01;
  return small ? `${decimalText(eV * 1000, 2)} meV` : `${decimalText(eV, 3)} eV`;
}

/** A number in words for reading aloud: "1.2e+17" becomes "1.2e17". */
export function spoken(value: number): string {
  return Number(value.toPrecision(3)).toExponential().replace('e+', 'e');
}
