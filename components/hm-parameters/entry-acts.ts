import type { Catalogue } from '../../src/design/catalogue.ts';
import { keyText, usesOf, type EntryKey, type EntryList } from '../../src/design/entry-key.ts';
import type { Design } from '../../src/design/types.ts';
import { dopantsIn, entryOf, presetOf } from '../../src/parameters/entry-view.ts';
import { addCustomEntry, removeCustomEntry } from '../../src/state/commands/index.ts';

export const LISTS: Readonly<Record<EntryList, { one: string; many: string }>> = {
  materials: { one: 'material', many: 'Materials' },
  dopants: { one: 'dopant', many: 'Dopants' },
  metals: { one: 'metal', many: 'Metals' },
};

/** The design's own entries, in its order. */
export function ownKeys({ custom = {} }: Design): EntryKey[] {
  return [
    ...(custom.materials ?? []).map(({ id }): EntryKey => ({ list: 'materials', id })),
    ...(custom.dopants ?? []).map(({ id, host }): EntryKey => ({ list: 'dopants', id, host })),
    ...(custom.metals ?? []).map(({ id }): EntryKey => ({ list: 'metals', id })),
  ];
}

/** "GaAs-2", "GaAs-3": an id that nothing of its kind has. */
export function freeId(catalogue: Catalogue, key: EntryKey): string {
  const stem = key.id.replace(/-\d+$/, '');
  let n = 2;
  while (entryOf(catalogue, { ...key, id: `${stem}-${n}` }) !== null) n++;
  return `${stem}-${n}`;
}

export function copied(design: Design, catalogue: Catalogue, key: EntryKey, id: string): Design {
  return addCustomEntry(design, key, entryOf(catalogue, key)!.entry, id, key.list === 'materials' ? dopantsIn(catalogue, key.id) : []);
}

/** The design without the entry; a sentence where something still needs it. Dopants that came with a copied material go with it. */
export function removed(design: Design, key: EntryKey): Design | string {
  if (presetOf(key) === null) {
    const uses = usesOf(design, key).filter((use) => !use.startsWith('the own dopant'));
    if (uses.length > 0) return `${keyText(key)} stays: ${uses.join(', ')} ${uses.length === 1 ? 'uses' : 'use'} it.`;
  }
  let next = removeCustomEntry(design, key);
  if (key.list === 'materials' && presetOf(key) === null) {
    for (const { id, host } of design.custom?.dopants ?? []) if (host === key.id) next = removeCustomEntry(next, { list: 'dopants', id, host });
  }
  return next;
}
