import { Asker } from '../design/ask.ts';
import { catalogueOf } from '../design/catalogue.ts';
import { readDopant } from '../design/dopant.ts';
import type { AnyEntry, EntryKey } from '../design/entry-key.ts';
import { partsOf, placeOfPath } from '../design/entry-path.ts';
import { readMaterial } from '../design/material.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { setCustomValue } from '../state/commands/set-custom-value.ts';
import { entryOf } from './entry-view.ts';
import { valueKind } from './value-kind.ts';

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

/** Bounds that only the use of an entry would tell. */
const LIMITS: Readonly<Record<string, { positive?: boolean; least?: [number, string]; most?: [number, string] }>> = {
  workFunction: { positive: true },
  pinningSlope: { least: [0, '0'], most: [1, '1'] },
};
