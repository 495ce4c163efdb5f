import type { Custom, Design, DopantInput, MaterialInput, MetalInput, OffsetInput } from './types.ts';

/** The three lists of a design's own entries. */
export type EntryList = 'materials' | 'dopants' | 'metals';
export type AnyEntry = MaterialInput | DopantInput | MetalInput;

/** An entry, or an offset of a pair, on its way from one design to another. */
export type LooseEntry = { list: EntryList; entry: AnyEntry } | { list: 'offsets'; entry: OffsetInput };

/** What an entry is found by. Dopants of two hosts may share an id. */
export interface EntryKey {
  list: EntryList;
  id: string;
  /** of a dopant */ host?: string;
}

export function sameKey(a: EntryKey, b: EntryKey): boolean {
  return a.list === b.list && a.id === b.id && a.host === b.host;
}

/** "GaAs", "GaAs:Si". */
export function keyText({ id, host }: Pick<EntryKey, 'id' | 'host'>): string {
  return host === undefined ? id : `${host}:${id}`;
}

/** Place of an own entry in its list; -1 where the design has none. */
export function ownIndex(custom: Custom | undefined, key: EntryKey): number {
  const rows: readonly AnyEntry[] = custom?.[key.list] ?? [];
  return rows.findIndex((row) => row.id === key.id && (key.host === undefined || (row as DopantInput).host === key.host));
}

/** Where a design names an entry, in words; an own alloy that is made of it and an own dopant that lives in it count as well. */
export function usesOf(design: Design, key: EntryKey): string[] {
  const { id, host } = key;
  if (key.list === 'metals') return (['top', 'bottom'] as const).filter((side) => namesMetal(design[side], id)).map((side) => `the ${side} contact`);
  if (key.list === 'dopants') return design.layers.filter((l) => l.material === host && (l.dopants ?? []).some((row) => row.dopant === id)).map((l) => `layer ${l.name}`);
  const { custom, crystal } = design;
  return [
    ...design.layers.filter((l) => l.material === id).map((l) => `layer ${l.name}`),
    ...(crystal?.template === id ? ['the template of the crystal'] : []),
    ...(custom?.materials ?? []).filter((m) => m.alloy?.first === id || m.alloy?.second === id).map((m) => `the own alloy ${m.id}`),
    ...(custom?.dopants ?? []).filter((d) => d.host === id).map((d) => `the own dopant ${d.host}:${d.id}`),
  ];
}

function namesMetal(contact: Design['top'], id: string): boolean {
  return contact.kind === 'barrier' && contact.metal === id;
}
