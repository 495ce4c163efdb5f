import { KINDS, type KindName } from './kinds.ts';

/**
 * Writes a number as an engineer would read it: digits without trailing zeros, an exponent where it is shorter.
 *
 * @param digits  significant digits
 */
export function writeNumber(value: number, digits = 4): string {
  if (!Number.isFinite(value)) return value > 0 ? 'infinite' : value < 0 ? '-infinite' : 'not a number';
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e5 || size < 1e-3) {
    const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
    return `${trimmed(mantissa)}e${Number(exponent)}`;
  }
  return trimmed(value.toPrecision(digits).includes('e') ? String(value) : value.toPrecision(digits));
}

function trimmed(text: string): string {
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}

/** Units that a value may be written in: the largest one that it fills. Kinds that are not here are written in the solver's unit. */
const SCALES: Partial<Record<KindName, readonly { unit: string; size: number }[]>> = {
  length: [{ unit: 'cm', size: 1 }, { unit: 'mm', size: 0.1 }, { unit: 'um', size: 1e-4 }, { unit: 'nm', size: 1e-7 }],
};

/**
 * A value as text that readQuantity reads back, e.g. after a drag.
 *
 * @param value  in the solver's unit of the kind
 * @param unit   keep this unit, if the kind has it
 */
export function writeQuantity(value: number, kind: KindName, digits = 4, unit?: string): string {
  const scales = SCALES[kind] ?? [{ unit: KINDS[kind].unit, size: 1 }];
  const scale = scales.find((s) => s.unit === unit) ?? scales.find((s) => Math.abs(value) >= s.size * 0.9999) ?? scales[scales.length - 1];
  return `${writeNumber(value / scale.size, digits)} ${scale.unit}`.trimEnd();
}
