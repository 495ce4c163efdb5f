import { ownIndex, type EntryKey, type LooseEntry } from '../design/entry-key.ts';
import type { Custom, DopantInput, MaterialInput } from '../design/types.ts';

type Listed = Exclude<LooseEntry, { list: 'offsets' }>;

/**
 * An own entry with what it cannot do without: a material brings its own dopants and, where it is an alloy, its own ends with theirs.
 *
 * @returns the entry last; empty where there is no such own entry
 */
export function withCompanions(custom: Custom, key: EntryKey): Listed[] {
  const at = ownIndex(custom, key);
  if (at < 0) return [];
  const entry = custom[key.list]![at];
  if (key.list !== 'materials') return [{ list: key.list, entry }];
  const { alloy } = entry as MaterialInput;
  const ends = alloy ? [alloy.first, alloy.second].filter((id) => id !== key.id).flatMap((id) => withCompanions({ ...custom, materials: custom.materials?.filter((m) => m.id !== key.id) }, { list: 'materials', id })) : [];
  const dopants = (custom.dopants ?? []).filter(({ host }) => host === key.id).map((dopant): Listed => ({ list: 'dopants', entry: dopant }));
  return [...ends, ...dopants, { list: 'materials', entry }];
}

/** Loose entries as the lists of a design; offsets go their own way, as nothing else needs them. */
export function asCustom(all: readonly LooseEntry[]): Custom {
  const rows = all.filter((row): row is Listed => row.list !== 'offsets');
  return {
    materials: rows.filter(({ list }) => list === 'materials').map(({ entry }) => entry as MaterialInput),
    dopants: rows.filter(({ list }) => list === 'dopants').map(({ entry }) => entry as DopantInput),
    metals: rows.filter(({ list }) => list === 'metals').map(({ entry }) => entry),
  };
}
