import { formulaAt } from '../../solver/formula.ts';
import { Asker } from '../design/ask.ts';
import { catalogueOf } from '../design/catalogue.ts';
import { readDopant } from '../design/dopant.ts';
import type { AnyEntry, EntryKey } from '../design/entry-key.ts';
import { partsOf, placeOfPath } from '../design/entry-path.ts';
import { askFormula } from '../design/formula.ts';
import { readMaterial } from '../design/material.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { KINDS } from '../quantity/kinds.ts';
import { readFormula } from '../quantity/read-formula.ts';
import { readQuantity } from '../quantity/read-quantity.ts';
import { setCustomValue } from '../state/commands/set-custom-value.ts';
import { entryOf, kindOf } from './entry-view.ts';
import { formulaOver, valueKind } from './value-kind.ts';

/**
 * What is wrong with a value that a person wants to put in, before it is in the design: its unit, then what the reader of the whole entry says of it.
 *
 * @param list  the value is a list now ("1.06; 2e-5"), and stays one
 * @returns a sentence with the mend, or null
 */
export function valueComplaint(design: Design, key: EntryKey, base: AnyEntry, path: string, text: string, list: boolean): string | null {
  if (text.trim() === '') return 'is empty; a value is wanted here';
  const { scope } = readVariables(design.variables ?? []);
  const ask = new Asker(scope);
  if (path.endsWith('.formula')) return formulaComplaint(design, key, base, path, text, ask);
  for (const part of list ? partsOf(path, text) : [text]) ask.quantity(part, valueKind(path), path, LIMITS[path] ?? {});
  if (ask.complaints.length > 0) return ask.complaints[0].message;
  if (list && path.startsWith('validity') && partsOf(path, text).length !== 2) return 'is no range; write it as two values with "to" between them';
  const next = setCustomValue(design, key, base, path, text, '-');
  const catalogue = catalogueOf(next.custom);
  const found = entryOf(catalogue, key);
  if (found === null) return null;
  if (key.list === 'materials') readMaterial(key.id, catalogue, ask, 'material');
  else if (key.list === 'dopants') readDopant({ dopant: key.id, concentration: '1e15 cm^-3' }, key.host ?? '', 0.5, catalogue, 'dopant', ask);
  const place = `${found.path}${placeOfPath(found.entry, path)}`;
  return ask.complaints.find((c) => c.path === place || c.path.startsWith(`${place}[`))?.message ?? null;
}

/** The formula itself, then the design that holds it: where it counts at some temperature or composition there, it must have a value. */
function formulaComplaint(design: Design, key: EntryKey, base: AnyEntry, path: string, text: string, ask: Asker): string | null {
  const over = formulaOver(kindOf(key, base), path);
  if (over === null) return 'cannot be a formula; write a value';
  askFormula({ formula: text }, valueKind(path), path.replace(/\.formula$/, ''), over, ask);
  if (ask.complaints.length > 0) return ask.complaints[0].message;
  const next = setCustomValue(design, key, base, path, text, '-');
  const found = entryOf(catalogueOf(next.custom), key);
  const reading = toStack(next);
  if (reading.ok || found === null) return null;
  const place = `${found.path}${placeOfPath(found.entry, path)}`;
  return reading.complaints.find((c) => c.path === place)?.message ?? null;
}

/** What a formula comes to at a few places of the design's range, in words; null where it cannot be read yet. */
export function formulaPreview(design: Design, key: EntryKey, base: AnyEntry, path: string, text: string): string | null {
  const over = formulaOver(kindOf(key, base), path);
  if (over === null || text.trim() === '') return null;
  const { scope } = readVariables(design.variables ?? []);
  const reading = readFormula(text, valueKind(path), over, scope);
  if (!reading.ok) return null;
  const kelvin = (typed: string): number | null => {
    const value = readQuantity(typed, 'temperature', scope);
    return value.ok ? value.value : null;
  };
  const { temperature, temperatureRange = [] } = design.conditions;
  const temperatures = over.includes('T') ? [...new Set([300, kelvin(temperature), ...temperatureRange.map(kelvin)].filter((T): T is number => T !== null))].sort((a, b) => a - b) : [300];
  const compositions = over.includes('x') ? [0, 0.5, 1] : [Number.NaN];
  const unit = KINDS[valueKind(path)].unit;
  const places = temperatures.flatMap((T) => compositions.map((x) => {
    const value = formulaAt(reading.formula, T, x);
    const at = [...(over.includes('T') ? [`${Number(T.toPrecision(5))} K`] : []), ...(Number.isNaN(x) ? [] : [`x = ${x}`])].join(', ');
    return `${at}: ${Number.isFinite(value) ? `${Number(value.toPrecision(5))}${unit === '' ? '' : ` ${unit}`}` : 'no value'}`;
  }));
  return places.join('; ');
}

/** Bounds that only the use of an entry would tell. */
const LIMITS: Readonly<Record<string, { positive?: boolean; least?: [number, string]; most?: [number, string] }>> = {
  workFunction: { positive: true },
  pinningSlope: { least: [0, '0'], most: [1, '1'] },
};
