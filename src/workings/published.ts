import { sources } from '../../presets/index.ts';
import type { Catalogue, Entry } from '../design/catalogue.ts';
import type { EntryKey } from '../design/entry-key.ts';
import { ownValues } from '../parameters/own-value.ts';
import { entryValues, type ValueOrigin } from '../parameters/entry-values.ts';
import { known, type Known, type Origin } from './known.ts';

/** Where a value of an entry stands, as the workings tell it. */
export function originOf(found: ValueOrigin, own: boolean): Origin {
  if (own) return { from: 'own value', text: found.source };
  return { from: 'source', key: found.source, text: Object.hasOwn(sources, found.source) ? sources[found.source] : found.source, checked: found.checked, note: found.note };
}

/** A value of an entry as a quantity. */
export type Asks = (path: string, sign: string, words: string, value: number | undefined, unit: string, scale?: number) => Known;

/**
 * Asks for values of a material, with where each stands. A value that an entry does not state (a default) is a convention.
 *
 * @param id  of a material of the catalogue
 */
export function materialAsks(catalogue: Catalogue, id: string): Asks {
  return asks(catalogue.materials.get(id), id, { list: 'materials', id });
}

export function dopantAsks(catalogue: Catalogue, host: string, id: string): Asks {
  return asks(catalogue.dopants.get(host)?.get(id), `${host}:${id}`, { list: 'dopants', id, host });
}

export function metalAsks(catalogue: Catalogue, id: string): Asks {
  return asks(catalogue.metals.get(id), id, { list: 'metals', id });
}

const CONVENTION: Origin = { from: 'source', key: 'convention', text: sources.convention, checked: null, note: '' };

function asks(found: Entry<object> | undefined, of: string, key: EntryKey): Asks {
  const rows = found ? entryValues(found.entry) : [];
  // A copy that changes one value keeps the published ones as such.
  const isOwn = found === undefined || found.preset ? () => false : ownValues(key);
  return (path, sign, words, value, unit, scale = 1) => {
    const row = rows.find((r) => r.path === path) ?? rows.find((r) => r.path.startsWith(`${path}.`)) ?? rows.find((r) => path.startsWith(`${r.path}.`));
    const origin = row === undefined ? CONVENTION : originOf(row.origin, isOwn(row));
    return known(sign, `${words} of ${of}`, value ?? Number.NaN, unit, origin, { scale, path: `${of} ${path}` });
  };
}
