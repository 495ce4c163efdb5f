import { sources } from '../../presets/index.ts';
import { presetCatalogue, type Catalogue } from '../design/catalogue.ts';
import { keyText, type AnyEntry, type EntryKey } from '../design/entry-key.ts';
import { textAtPath } from '../design/entry-path.ts';
import type { Design, DopantInput, MaterialInput, MetalInput } from '../design/types.ts';
import { entryValues, origin, type ValueOrigin } from './entry-values.ts';
import { parameterWords } from './parameter-words.ts';
import { missingFormulas, missingValues, valueKind } from './value-kind.ts';
import type { KindName } from '../quantity/kinds.ts';

/** One value of an entry as the page shows it. */
export interface ShownValue {
  path: string;
  words: string;
  kind: KindName;
  /** as it reads, "45 meV at x = 0.3" */ text: string;
  /** as it is edited, "45 meV" */ edited: string;
  /** the work, or the words of the person */ work: string;
  origin: ValueOrigin;
  /** differs from the preset, or there is none */ own: boolean;
  /** what the preset says; null where it has no such value or there is no preset */ presetText: string | null;
}

export interface ShownEntry {
  key: EntryKey;
  text: string;
  name: string;
  /** it stands in the design's own list */ own: boolean;
  /** a preset of the same id is behind it */ preset: boolean;
  values: ShownValue[];
  /** paths that can be put in */ missing: { path: string; words: string }[];
  /** paths of values that can be written as a formula instead */ formulas: { path: string; words: string }[];
}

/** The entry as the design has it, and the preset behind it. */
export function entryOf(catalogue: Catalogue, { list, id, host }: EntryKey): { entry: AnyEntry; preset: boolean; path: string } | null {
  return (list === 'dopants' ? catalogue.dopants.get(host ?? '')?.get(id) : catalogue[list].get(id)) ?? null;
}

export function presetOf(key: EntryKey): AnyEntry | null {
  return entryOf(presetCatalogue, key)?.entry ?? null;
}

/** Everything that the page says of one entry; null where neither presets nor design have it. */
export function shownEntry(catalogue: Catalogue, key: EntryKey): ShownEntry | null {
  const found = entryOf(catalogue, key);
  if (found === null) return null;
  const { entry } = found;
  const preset = presetOf(key);
  const own = !found.preset;
  const before = preset === null ? [] : rowsOf(preset);
  const values = rowsOf(entry).map(({ path, text, origin: from }): ShownValue => {
    const published = before.find((row) => row.path === path);
    const differs = own && (published === undefined || published.text !== text || published.origin.source !== from.source);
    return {
      path, text, words: wordsOf(path, entry), kind: valueKind(path), edited: textAtPath(entry, path) ?? text, origin: from, work: workOf(from.source, differs), own: differs, presetText: published?.text ?? lawText(before, path),
    };
  });
  const paths = values.map(({ path }) => path);
  const named = (list: string[]): { path: string; words: string }[] => list.map((path) => ({ path, words: parameterWords(path) }));
  return { key, text: keyText(key), name: entry.name ?? entry.id, own, preset: preset !== null, values, missing: named(missingValues(kindOf(key, entry), paths)), formulas: named(missingFormulas(kindOf(key, entry), paths)) };
}

/** The published law that a formula stands for, in a line; null where there is none. */
function lawText(published: readonly { path: string; text: string }[], path: string): string | null {
  if (!path.endsWith('.formula')) return null;
  const law = path.slice(0, path.lastIndexOf('.'));
  const rows = published.filter((row) => row.path === law || row.path.startsWith(`${law}.`));
  // An alloy without a law of its own is mixed from its ends.
  return rows.length === 0 ? 'the rule between the ends' : rows.map((row) => (row.path === law ? row.text : `${parameterWords(row.path)} ${row.text}`)).join(', ');
}

export function kindOf(key: EntryKey, entry: AnyEntry): Parameters<typeof missingValues>[0] {
  if (key.list === 'dopants') return 'dopant';
  if (key.list === 'metals') return 'metal';
  const { alloy, insulator } = entry as MaterialInput;
  return alloy ? 'alloy' : insulator ? 'insulator' : 'crystal';
}

/** The values of an entry, a metal's barriers among them. */
function rowsOf(entry: AnyEntry): { path: string; text: string; origin: ValueOrigin }[] {
  const barriers = (entry as MetalInput).barriers ?? [];
  // A word of the entry, which no measurement gives.
  const values = entryValues(entry).filter(({ path }) => path !== 'model');
  return [...values, ...barriers.map((b, i) => ({ path: `barriers.${i}`, text: b.height, origin: origin(b) }))];
}

function wordsOf(path: string, entry: AnyEntry): string {
  const barrier = /^barriers\.(\d+)$/.exec(path);
  if (barrier === null) return parameterWords(path);
  const { material, carrier } = (entry as MetalInput).barriers![Number(barrier[1])];
  return `barrier on ${material} for ${carrier === 'n' ? 'electrons' : 'holes'}`;
}

function workOf(source: string, own: boolean): string {
  if (!own && Object.hasOwn(sources, source)) return sources[source];
  return source === '' ? 'no source given' : source;
}

/** Where a value stands and how it was checked, in words. */
export function checkedWords({ checked, confidence }: ValueOrigin, own: boolean): string {
  if (own || checked === null) return own ? 'own value of this design' : 'not said';
  const words = { page: 'seen in print', memory: 'from memory of the cited work', computed: 'derived from the cited work' }[checked];
  return confidence === '' ? words : `${words}; confidence ${confidence}`;
}

/** Materials of the layers from the top down with the ends of alloys, dopants, metals: what the design uses, each once. */
export function keysInUse(design: Design, catalogue: Catalogue): EntryKey[] {
  const keys: EntryKey[] = [];
  const add = (key: EntryKey): void => {
    if (!keys.some((k) => keyText(k) === keyText(key) && k.list === key.list) && entryOf(catalogue, key) !== null) keys.push(key);
  };
  const material = (id: string): void => {
    add({ list: 'materials', id });
    const alloy = catalogue.materials.get(id)?.entry.alloy;
    if (alloy) [alloy.first, alloy.second].forEach((end) => add({ list: 'materials', id: end }));
  };
  design.layers.forEach((layer) => material(layer.material));
  if (design.crystal?.template !== undefined) material(design.crystal.template);
  for (const layer of design.layers) for (const row of layer.dopants ?? []) if (row.dopant !== undefined) add({ list: 'dopants', id: row.dopant, host: layer.material });
  for (const side of [design.top, design.bottom]) if (side.kind === 'barrier' && side.metal !== undefined) add({ list: 'metals', id: side.metal });
  return keys;
}

/** Every entry that presets and design have. */
export function allKeys(catalogue: Catalogue): EntryKey[] {
  return [
    ...[...catalogue.materials.keys()].map((id): EntryKey => ({ list: 'materials', id })),
    ...[...catalogue.dopants].flatMap(([host, rows]) => [...rows.keys()].map((id): EntryKey => ({ list: 'dopants', id, host }))),
    ...[...catalogue.metals.keys()].map((id): EntryKey => ({ list: 'metals', id })),
  ];
}

/** The dopants that a host has, own ones over presets. */
export function dopantsIn(catalogue: Catalogue, host: string): DopantInput[] {
  return [...(catalogue.dopants.get(host)?.values() ?? [])].map(({ entry }) => entry);
}
