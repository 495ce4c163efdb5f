import { produce } from 'immer';
import { ownIndex, type AnyEntry, type LooseEntry } from '../../design/entry-key.ts';
import type { Design, DopantInput } from '../../design/types.ts';
import { setPairOffset } from './set-pair-offset.ts';

/** Puts whole entries into the design as its own; an own one of the same name gives way. */
export function takeEntries(design: Design, entries: readonly LooseEntry[]): Design {
  const placed = entries.reduce((next, loose) => (loose.list === 'offsets' ? setPairOffset(next, structuredClone(loose.entry)) : next), design);
  return produce(placed, (draft) => {
    if (entries.length === 0) return;
    const custom = (draft.custom ??= {});
    for (const { list, entry } of entries) {
      if (list === 'offsets') continue;
      const rows = (custom[list] ??= []) as AnyEntry[];
      const at = ownIndex(custom, { list, id: entry.id, ...(list === 'dopants' ? { host: (entry as DopantInput).host } : {}) });
      if (at < 0) rows.push(structuredClone(entry));
      else rows[at] = structuredClone(entry);
    }
  });
}
