import { complaintLine } from '../design/complaint.ts';
import { keyText, type AnyEntry, type EntryKey, type EntryList } from '../design/entry-key.ts';
import { readDesign } from '../design/read.ts';
import { blankDesign } from '../state/blank-design.ts';

/** An own entry on the person's shelf, kept across projects. */
export interface ShelfItem {
  /** list and name: one of each */ key: string;
  list: EntryList;
  entry: AnyEntry;
  /** when it was put there, ms since 1970 */ kept: number;
}

const LISTS: readonly EntryList[] = ['materials', 'dopants', 'metals'];
const MOST_CHARACTERS = 200_000;

export function shelfKey(key: EntryKey): string {
  return `${key.list} ${keyText(key)}`;
}

export function keyOfItem({ list, entry }: Pick<ShelfItem, 'list' | 'entry'>): EntryKey {
  return { list, id: entry.id, ...(list === 'dopants' && 'host' in entry ? { host: entry.host } : {}) };
}

/** @returns what makes a stored value no item of the shelf, in words; null for a good one */
export function shelfFault(value: unknown): string | null {
  if (typeof value !== 'object' || value === null) return 'it is no record';
  const { key, list, entry, kept } = value as Partial<Record<keyof ShelfItem, unknown>>;
  if (!LISTS.includes(list as EntryList)) return 'it is of no list that is known';
  if (typeof kept !== 'number' || !Number.isFinite(kept)) return 'its time is no number';
  if (typeof entry !== 'object' || entry === null) return 'it holds no entry';
  let text: string;
  try {
    text = JSON.stringify({ ...blankDesign('shelf'), custom: { [list as EntryList]: [entry] } });
  } catch {
    return 'it cannot be written';
  }
  if (text.length > MOST_CHARACTERS) return 'it is too long';
  const reading = readDesign(text);
  if (!reading.ok) return complaintLine(reading.complaints[0]);
  return key === shelfKey(keyOfItem({ list: list as EntryList, entry: entry as AnyEntry })) ? null : 'its name is not that of its entry';
}
