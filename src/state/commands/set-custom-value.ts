import { produce } from 'immer';
import { ownIndex, type AnyEntry, type EntryKey } from '../../design/entry-key.ts';
import { dropAtPath, putAtPath, textAtPath } from '../../design/entry-path.ts';
import type { Design } from '../../design/types.ts';

/**
 * Changes one value of a material, dopant or metal within this design: the design's own entry of that name, made as a copy of `base` where there is none yet, wins over the preset.
 *
 * @param base    what the design uses now: the preset, or its own entry
 * @param path    of the value, design/entry-path.ts
 * @param source  where the new value stands, in the person's words; takes the place of what stood there
 */
export function setCustomValue(design: Design, key: EntryKey, base: AnyEntry, path: string, text: string, source: string): Design {
  return produce(design, (draft) => {
    const entry = ownEntry(draft, key, base);
    const formula = lawOf(path);
    if (formula !== null) {
      (entry as unknown as Record<string, unknown>)[formula] = { formula: text };
      entry.sources = { ...withoutLaw(entry.sources, formula), [path]: source };
      return;
    }
    putAtPath(entry, path, text);
    const barrier = /^barriers\.(\d+)$/.exec(path);
    if (barrier !== null && 'barriers' in entry) {
      // A barrier carries its source itself; how the published one was checked says nothing of this one.
      const { material, carrier, height } = entry.barriers![Number(barrier[1])];
      entry.barriers![Number(barrier[1])] = { material, carrier, height, source };
    } else entry.sources = { ...entry.sources, [path]: source };
  });
}

/**
 * Puts one value back to what the preset says; an own entry that then says nothing else goes as well. Of an entry without a preset nothing can be put back.
 */
export function resetCustomValue(design: Design, key: EntryKey, preset: AnyEntry, path: string): Design {
  if (ownIndex(design.custom, key) < 0) return design;
  return produce(design, (draft) => {
    const entry = ownEntry(draft, key, preset);
    const formula = lawOf(path);
    if (formula !== null) restoreLaw(entry, preset, formula);
    const text = formula === null ? textAtPath(preset, path) : null;
    const barrier = /^barriers\.(\d+)$/.exec(path);
    const published = barrier && 'barriers' in preset ? preset.barriers?.[Number(barrier[1])] : undefined;
    if (published && 'barriers' in entry) entry.barriers![Number(barrier![1])] = structuredClone(published);
    else if (formula === null && text === null) dropAtPath(entry, path);
    else if (formula === null) copyValue(entry, preset, path);
    if (formula === null) {
      const { [path]: _, ...others } = entry.sources ?? {};
      const before = preset.sources;
      entry.sources = before && Object.hasOwn(before, path) ? { ...others, [path]: before[path] } : others;
    }
    if (sameContent(entry, preset)) {
      draft.custom![key.list]!.splice(ownIndex(draft.custom, key), 1);
      tidy(draft);
    }
  });
}

/** What a formula stands for as a whole: "gap" of "gap.formula"; null for any other value. */
function lawOf(path: string): string | null {
  return /^(\w+)\.formula$/.exec(path)?.[1] ?? null;
}

/** The published law again, with where its values stand. */
function restoreLaw(entry: AnyEntry, preset: AnyEntry, law: string): void {
  const [own, published] = [entry, preset] as unknown as Record<string, unknown>[];
  if (Object.hasOwn(published, law)) own[law] = structuredClone(published[law]);
  else delete own[law];
  const before = Object.entries(preset.sources ?? {}).filter(([path]) => isOfLaw(path, law));
  entry.sources = { ...withoutLaw(entry.sources, law), ...Object.fromEntries(before) };
}

const isOfLaw = (path: string, law: string): boolean => path === law || path.startsWith(`${law}.`);
const withoutLaw = (sources: Record<string, unknown> | undefined, law: string): Record<string, unknown> => Object.fromEntries(Object.entries(sources ?? {}).filter(([path]) => !isOfLaw(path, law)));

/** A number stays a number, a list a list: the value itself is copied, not its text. */
function copyValue(entry: AnyEntry, preset: AnyEntry, path: string): void {
  const top = path.split('.')[0];
  const whole = structuredClone((preset as unknown as Record<string, unknown>)[top]);
  if (path === top) {
    (entry as unknown as Record<string, unknown>)[top] = whole;
    return;
  }
  putAtPath(entry, path, textAtPath(preset, path)!);
  // Where nothing but this value differed, the part is the preset's again, numbers and all.
  if (sameTexts((entry as unknown as Record<string, unknown>)[top], whole)) (entry as unknown as Record<string, unknown>)[top] = whole;
}

const sameTexts = (a: unknown, b: unknown): boolean => stable(a, String) === stable(b, String);
const sameContent = (a: unknown, b: unknown): boolean => stable(a, (x) => x) === stable(b, (x) => x);

/** JSON with the keys in order. */
function stable(value: unknown, leaf: (x: unknown) => unknown): string {
  return JSON.stringify(value, (_, v: unknown) => (v !== null && typeof v === 'object' ? (Array.isArray(v) ? v : Object.fromEntries(Object.entries(v).sort(([p], [q]) => (p < q ? -1 : 1)))) : leaf(v)));
}

function ownEntry(draft: Design, key: EntryKey, base: AnyEntry): AnyEntry {
  const custom = (draft.custom ??= {});
  const rows = (custom[key.list] ??= []) as AnyEntry[];
  const at = ownIndex(custom, key);
  if (at >= 0) return rows[at];
  rows.push(structuredClone(base));
  return rows[rows.length - 1];
}

/** Takes out lists that are empty, and `custom` when nothing is left: the design is as if it had never had an entry. */
export function tidy(draft: Design): void {
  const { custom } = draft;
  if (!custom) return;
  for (const list of ['materials', 'dopants', 'metals', 'offsets'] as const) if (custom[list]?.length === 0) delete custom[list];
  if (Object.keys(custom).length === 0) delete draft.custom;
}
