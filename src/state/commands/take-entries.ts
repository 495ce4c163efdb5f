import { produce } from 'immer';
import { ownIndex, type AnyEntry, type EntryList } from '../../design/entry-key.ts';
import type { Design, DopantInput } from '../../design/types.ts';

/** Puts whole entries into the design as its own; an own one of the same name gives way. */
export function takeEntries(design: Design, entries: readonly { list: EntryList; entry: AnyEntry }[]): Design {
  return produce(design, (draft) => {
    const custom = (draft.custom ??= {});
    for (const { list, entry } of entries) {
      const rows = (custom[list] ??= []) as AnyEntry[];
      const at = ownIndex(custom, { list, id: entry.id, ...(list === 'dopants' ? { host: (entry as DopantInput).host } : {}) });
      if (at < 0) rows.push(structuredClone(entry));
      else rows[at] = structuredClone(entry);
    }
  });
}
