/**
 * What engineers type, and texts written back for them. Only the unit is looked at here; whether the text means anything is the reader's business.
 */
const NUMBER = String.raw`[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?`;
const BARE = new RegExp(`^${NUMBER}$`, 'i');
const WITH_UNIT = new RegExp(`^(${NUMBER})\\s*([a-zA-Zµμ°Å].*)$`, 'i');

/** The unit of a plain value with a unit ("0.35um" gives "um"); null for an expression or a bare number. */
export function unitOf(text: string): string | null {
  return WITH_UNIT.exec(text.trim())?.[2] ?? null;
}

/** No doping has so few atoms per cubic centimetre: such a number is meant as something else, a share or a composition. */
const LEAST_DENSITY = 1e3;

/**
 * A bare number gets the unit of the text that it replaces, else the usual unit of its kind: "3e17" for a doping becomes "3e17 cm^-3". Everything else stays
 * as typed, and so does what can be no density: a variable that was one becomes a pure number by typing one.
 */
export function completed(typed: string, usualUnit: string, replaced: string = ''): string {
  const text = typed.trim();
  if (usualUnit === '' || !BARE.test(text)) return text;
  const unit = unitOf(replaced) ?? usualUnit;
  const size = Math.abs(Number(text));
  return unit === 'cm^-3' && size > 0 && size < LEAST_DENSITY ? text : `${text} ${unit}`;
}

/** Units of length that a dragged thickness keeps, in nm. */
const NM_PER: Record<string, number> = { nm: 1, um: 1e3, µm: 1e3, μm: 1e3, mm: 1e6, cm: 1e7, angstrom: 0.1, Å: 0.1 };

/**
 * A thickness as text in the unit of the text it replaces; an expression or an unknown unit gives nm, or um from 10 um up.
 *
 * @param thickness_nm  > 0
 * @param step_nm       the text is rounded to whole steps of this
 */
export function thicknessText(thickness_nm: number, replaced: string, step_nm: number): string {
  const kept = unitOf(replaced);
  const unit = kept !== null && kept in NM_PER ? kept : thickness_nm >= 1e4 ? 'um' : 'nm';
  const rounded = Math.max(1, Math.round(thickness_nm / step_nm)) * step_nm;
  // Twelve digits drop the binary tail of the product and nothing that a person typed.
  return `${Number((rounded / NM_PER[unit]).toPrecision(12))} ${unit}`;
}

/** The largest power of ten not above `value`: 37 gives 10. */
export function powerOfTen(value: number): number {
  return 10 ** Math.floor(Math.log10(value) + 1e-9);
}

/** nm of a thickness that is a plain number with a unit of length; null for expressions and anything else. */
export function plainThickness(text: string): number | null {
  const match = WITH_UNIT.exec(text.trim());
  const size = match && Object.hasOwn(NM_PER, match[2].trim()) ? Number(match[1]) * NM_PER[match[2].trim()] : Number.NaN;
  return size > 0 ? size : null;
}
