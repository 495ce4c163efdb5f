import type { Custom, InterfaceInput } from '../design/types.ts';
import { turned, valueText } from './change-sentences.ts';
import { difference, same, type Json } from './difference.ts';

type Row = Record<string, Json | undefined>;

const INTERFACE_WORDS: Readonly<Record<string, string>> = { sheetCharge: 'sheet charge', dEc: 'offset of the conduction band', dEv: 'offset of the valence band' };

/** @param renamed  layers whose name alone changed, new name by old one */
export function interfaceChanges(before: readonly InterfaceInput[], after: readonly InterfaceInput[], renamed: ReadonlyMap<string, string>): string[] {
  const placed = (rows: readonly InterfaceInput[], nameOf: (name: string) => string): Map<string, Row> => new Map(rows.map(({ above, ...values }) => [nameOf(above), { ...values }]));
  const [old, now] = [placed(before, (name) => renamed.get(name) ?? name), placed(after, (name) => name)];
  return [...new Set([...old.keys(), ...now.keys()])].flatMap((above) => {
    const [a, b] = [old.get(above) ?? {}, now.get(above) ?? {}];
    return [...new Set([...Object.keys(a), ...Object.keys(b)])].flatMap((key) => turned(`${INTERFACE_WORDS[key] ?? key} at the interface below ${above}`, a[key], b[key]));
  });
}

/** Lists of own entries: what one is called, and by what two revisions of it are known to be the same. */
const OWN: readonly { list: keyof Custom; words: string; keyOf(row: Row): string }[] = [
  { list: 'materials', words: 'own material', keyOf: ({ id }) => String(id) },
  { list: 'dopants', words: 'own dopant', keyOf: ({ id, host }) => `${String(id)} in ${String(host)}` },
  { list: 'metals', words: 'own metal', keyOf: ({ id }) => String(id) },
  { list: 'offsets', words: 'own band offset', keyOf: ({ first, second }) => `${String(first)} to ${String(second)}` },
];

export function ownEntryChanges(before: Custom, after: Custom): string[] {
  return OWN.flatMap(({ list, words, keyOf }) => {
    const byKey = (custom: Custom): Map<string, Row> => new Map(((custom[list] ?? []) as unknown as Row[]).map((row) => [keyOf(row), row]));
    const [old, now] = [byKey(before), byKey(after)];
    return [
      ...[...old.keys()].filter((key) => !now.has(key)).map((key) => `The ${words} ${key} was taken out.`),
      ...[...now].flatMap(([key, row]) => {
        const was = old.get(key);
        return was === undefined ? [`The ${words} ${key} was put in.`] : entryChanges(`the ${words} ${key}`, was, row);
      }),
    ];
  });
}

/** Each value of an entry that is another one; of a list that grew or shrank how many stand in it. */
function entryChanges(of: string, before: Row, after: Row): string[] {
  return [...new Set([...Object.keys(before), ...Object.keys(after)])].flatMap((key) => {
    const [was, is] = [before[key], after[key]];
    if (same(was, is)) return [];
    if ([was, is].some(Array.isArray) && length(was) !== length(is)) return [`${key} of ${of}: ${countText(is)}, was ${countText(was)}.`];
    return difference(was, is, [key]).flatMap((change) => ('at' in change ? [`The list ${change.path.join('.')} of ${of} was changed.`] : turned(`${change.path.join('.')} of ${of}`, change.before, change.after)));
  }).map((sentence) => sentence[0].toUpperCase() + sentence.slice(1));
}

const length = (value: Json | undefined): number => (Array.isArray(value) ? value.length : -1);
const countText = (value: Json | undefined): string => (Array.isArray(value) ? `${value.length} in the list` : value === undefined ? 'not given' : valueText(value));
