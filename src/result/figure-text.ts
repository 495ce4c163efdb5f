/**
 * Text of a figure for people: a fixed count of significant digits, plain where that is short, else with an exponent ("1.20e17", as it is typed).
 *
 * @param value   in whatever unit stands beside it; null or not finite gives an en dash ("no figure")
 * @param digits  significant, >= 1
 */
export function figureText(value: number | null, digits = 3): string {
  if (value === null || !Number.isFinite(value)) return '–';
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e-3 && size < 1e5) return withMinus(plain(value, digits));
  return withMinus(value.toExponential(digits - 1).replace('e+', 'e'));
}

/** Zero of a density is one below the smallest number that a computer holds, not none. */
export const BELOW_NUMBERS = '< 1e−300';

/** A density of carriers, which is never nothing: what underflows is said to lie below 1e-300. */
export function densityText(value: number | null, digits = 3): string {
  return value === 0 ? BELOW_NUMBERS : figureText(value, digits);
}

/**
 * Text with a fixed count of decimals, for figures that are compared by their difference (energies): columns of it line up at the point.
 *
 * @param decimals  >= 0; null or not finite gives an en dash
 */
export function decimalText(value: number | null, decimals = 3): string {
  if (value === null || !Number.isFinite(value)) return '–';
  const text = value.toFixed(decimals);
  return withMinus(Number(text) === 0 ? text.replace('-', '') : text);
}

/** V/cm */
const LEAST_FIELD = 0.1;

/**
 * A field in kV/cm. What is below a tenth of a volt per centimetre is the mesh's error (0.1 mV over 10 µm), not a field.
 *
 * @param field_V_cm  any sign, or null
 */
export function fieldText(field_V_cm: number | null, digits = 3): string {
  if (field_V_cm !== null && Math.abs(field_V_cm) < LEAST_FIELD) return '≈ 0';
  return figureText(field_V_cm === null ? null : field_V_cm / 1000, digits);
}

/** A share as percent: enough digits near 0 and near 100 % to tell "almost all" from "all". */
export function percentText(share: number | null): string {
  if (share === null || !Number.isFinite(share)) return '–';
  const percent = 100 * share;
  if (percent > 99.95) return '100 %';
  if (percent >= 10) return `${percent.toFixed(percent > 99 ? 1 : 0)} %`;
  return `${figureText(percent, 2)} %`;
}

/** A signed difference: "+12", "−3.4". */
export function differenceText(value: number | null, digits = 2): string {
  const text = figureText(value, digits);
  return value !== null && value > 0 && Number.isFinite(value) ? `+${text}` : text;
}

/** toPrecision without its exponent form: 12345 to three digits is 12300. */
function plain(value: number, digits: number): string {
  const text = value.toPrecision(digits);
  return text.includes('e') ? Number(text).toFixed(0) : text;
}

/** The typographic minus: a hyphen is taken for a dash in a table. */
function withMinus(text: string): string {
  return text.replace(/^-/, '−').replace(/e-/, 'e−');
}
