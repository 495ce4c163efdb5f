import { complaintLine } from '../design/complaint.ts';
import { keyText, type LooseEntry } from '../design/entry-key.ts';
import { readDesign } from '../design/read.ts';
import { blankDesign } from '../state/blank-design.ts';

/** An own entry on the person's shelf, kept across projects. */
export type ShelfItem = LooseEntry & {
  /** list and name: one of each */ key: string;
  /** when it was put there, ms since 1970 */ kept: number;
};

/** By what an item is found; of an offset the id names the pair, whichever way round it was written. */
export interface ShelfKey {
  list: LooseEntry['list'];
  id: string;
  /** of a dopant */ host?: string;
}

const LISTS: readonly LooseEntry['list'][] = ['materials', 'dopants', 'metals', 'offsets'];
const MOST_CHARACTERS = 200_000;

export function shelfKey(key: ShelfKey): string {
  return `${key.list} ${keyText(key)}`;
}

export function keyOfItem({ list, entry }: LooseEntry): ShelfKey {
  if (list === 'offsets') return { list, id: [entry.first, entry.second].sort().join(' and ') };
  return { list, id: entry.id, ...(list === 'dopants' && 'host' in entry ? { host: entry.host } : {}) };
}

/** @returns what makes a stored value no item of the shelf, in words; null for a good one */
export function shelfFault(value: unknown): string | null {
  if (typeof value !== 'object' || value === null) return 'it is no record';
  const { key, list, entry, kept } = value as Partial<Record<keyof ShelfItem, unknown>>;
  if (!LISTS.includes(list as LooseEntry['list'])) return 'it is of no list that is known';
  if (typeof kept !== 'number' || !Number.isFinite(kept)) return 'its time is no number';
  if (typeof entry !== 'object' || entry === null) return 'it holds no entry';
  let text: string;
  try {
    text = JSON.stringify({ ...blankDesign('shelf'), custom: { [list as LooseEntry['list']]: [entry] } });
  } catch {
    return 'it cannot be written';
  }
  if (text.length > MOST_CHARACTERS) return 'it is too long';
  const reading = readDesign(text);
  if (!reading.ok) return complaintLine(reading.complaints[0]);
  return key === shelfKey(keyOfItem({ list, entry } as LooseEntry)) ? null : 'its name is not that of its entry';
}
