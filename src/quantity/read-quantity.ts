import { didYouMean, quoted } from './wording.ts';
import { evaluate, ExpressionError, NO_NAMES, type Scope } from './expression.ts';
import { KINDS, type Kind, type KindName } from './kinds.ts';
import { normalise } from './normalise.ts';
import { inUnit, UNIT_NAMES, type Value } from './units.ts';

export type Reading = { ok: true; value: number } | { ok: false; message: string };

/**
 * Reads what a person typed as a quantity of one kind.
 *
 * @param text   a string with a unit or an expression; for kind "number" a JSON number as well
 * @returns      the value in the solver's unit of that kind (KINDS), finite; or a sentence with the mend
 */
export function readQuantity(text: unknown, kind: KindName, scope: Scope = NO_NAMES): Reading {
  const wanted: Kind = KINDS[kind];
  const example = wanted.also === undefined ? `"${wanted.example}"` : `"${wanted.example}" or "${wanted.also.example}"`;
  const fail = (message: string): Reading => ({ ok: false, message });
  if (typeof text === 'number') {
    if (kind !== 'number') return fail(`${text} has no unit; ${wanted.words} is wanted here, as text, such as ${example}`);
    return Number.isFinite(text) ? { ok: true, value: text } : fail(`${text} is no finite number`);
  }
  if (typeof text !== 'string') return fail(`${quoted(text)} is no text; ${wanted.words} is wanted here, such as ${example}`);
  const share = kind === 'number' ? /^\s*([-+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?)\s*%\s*$/.exec(text) : null;
  if (share) return { ok: true, value: Number(share[1]) / 100 };
  // "25C" is a temperature where a temperature is asked for, a charge elsewhere.
  const typed = kind === 'temperature' ? text.replace(/^(\s*[-+\u2212]?[\d.]+)\s*C\s*$/, '$1 degC') : text;
  const plain = plainQuantity(typed, kind);
  if (plain !== null) return Number.isFinite(plain) ? { ok: true, value: plain } : fail(`${quoted(text)} is not a finite number`);
  let value: Value;
  try {
    value = evaluate(typed, scope);
  } catch (error) {
    if (!(error instanceof ExpressionError)) throw error;
    return fail(mistyped(text, kind, scope) ?? `${quoted(text)} ${error.message}`);
  }
  const number = inUnit(value, wanted.unit);
  if (number !== null) return { ok: true, value: number };
  // A charge per area is as good as the number of charges on it.
  const charge = wanted.also === undefined ? null : inUnit(value, wanted.also.unit);
  if (charge !== null) return { ok: true, value: charge * wanted.also!.size };
  if (typeof value === 'number') return fail(`${quoted(text)} has no unit; ${wanted.words} is wanted here, such as ${example}`);
  const other = kindOf(value);
  const found = other ? `is ${KINDS[other].words}, not ${wanted.words}` : `is not ${wanted.words}`;
  return fail(`${quoted(text)} ${found}; ${wanted.unit === '' ? 'write it without a unit' : 'write it'} such as ${example}`);
}

/** Powers of ten from a unit to the solver's unit of the kind. */
const DECIMAL: Partial<Record<KindName, Readonly<Record<string, number>>>> = {
  length: { nm: -7, um: -4, mm: -1, cm: 0, m: 2, pm: -10, angstrom: -8 },
  energy: { eV: 0, meV: -3, ueV: -6 },
  density: { 'cm^-3': 0, 'm^-3': -6 },
  sheetDensity: { 'cm^-2': 0, 'm^-2': -4 },
};

/**
 * One number with one unit, by far the most common text: the decimal point is moved in the text itself, so that "0.36 eV" and "200 nm" are
 * the nearest doubles and not one rounding beside them. Null for anything else.
 */
function plainQuantity(text: string, kind: KindName): number | null {
  const found = /^([-+]?(?:\d+\.?\d*|\.\d+))(?:[eE]([-+]?\d{1,4}))?\s*(\S.*)$/.exec(text.length > 60 ? '' : normalise(text));
  if (!found) return null;
  const [, digits, exponent = '0', unit] = found;
  const shift = unit === KINDS[kind].unit ? 0 : DECIMAL[kind] && Object.hasOwn(DECIMAL[kind], unit) ? DECIMAL[kind][unit] : null;
  return shift === null ? null : Number(`${digits}e${Number(exponent) + shift}`);
}

/** "200 mn": one number with one unknown word; says which unit was meant. */
function mistyped(text: string, kind: KindName, scope: Scope): string | null {
  const found = /^[-+]?[\d.]+(?:[eE][-+]?\d+)?\s*([A-Za-z_]+)/.exec(normalise(text));
  if (!found || UNIT_NAMES.includes(found[1]) || scope.names.includes(found[1]) || found[1] === 'degC') return null;
  const words = KINDS[kind].words.replace(/^an? /, '');
  const simple = KINDS[kind].units.filter((u) => /^[A-Za-z]+$/.test(u));
  const mend = didYouMean(found[1], simple) || didYouMean(found[1], [...scope.names, ...UNIT_NAMES]) || `; write it such as "${KINDS[kind].example}"`;
  return `${quoted(text)} is no ${words}${mend}`;
}

/** The kind that a value with a unit belongs to, for messages. */
function kindOf(value: Value): KindName | null {
  for (const name of Object.keys(KINDS) as KindName[]) if (KINDS[name].unit !== '' && inUnit(value, KINDS[name].unit) !== null) return name;
  return null;
}
