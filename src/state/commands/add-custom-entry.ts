import { produce } from 'immer';
import { keyText, ownIndex, type AnyEntry, type EntryKey } from '../../design/entry-key.ts';
import type { Design, DopantInput } from '../../design/types.ts';

/**
 * Adds a material, a dopant or a metal to the design, as a copy of a known one under an id of its own.
 *
 * @param id       another one than any of its kind has; the caller has looked
 * @param dopants  of a material: those known in the original, copied into the new host, since without them it could not be doped by name
 * @throws {RangeError} the design has an own entry of that id
 */
export function addCustomEntry(design: Design, from: EntryKey, original: AnyEntry, id: string, dopants: readonly DopantInput[] = []): Design {
  const key: EntryKey = { ...from, id };
  if (ownIndex(design.custom, key) >= 0) throw new RangeError(`${keyText(key)} is there already`);
  return produce(design, (draft) => {
    const custom = (draft.custom ??= {});
    const rows = (custom[from.list] ??= []) as AnyEntry[];
    rows.push({ ...structuredClone(original), id, name: id });
    const carried = dopants.filter((d) => ownIndex(design.custom, { list: 'dopants', id: d.id, host: id }) < 0);
    if (carried.length > 0) (custom.dopants ??= []).push(...carried.map((d) => ({ ...structuredClone(d), host: id })));
  });
}
