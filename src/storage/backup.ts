import { sha256 } from '@noble/hashes/sha2';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils';
import type { LooseEntry } from '../design/entry-key.ts';
import { MOST_CHARACTERS } from '../design/read.ts';
import { backupTooLarge, MOST_ENTRIES } from './backup-bounds.ts';
import type { KeptVariant } from './kept-variants.ts';
import { recordFault, type ProjectRecord } from './record.ts';
import { keyOfItem, shelfFault, shelfKey } from './shelf.ts';

/**
 * All projects in one file that a person can keep: JSON, each project with a check over its own text, so that a file cut short or altered is noticed
 * project by project and the others still come back. The person's shelf stands behind them.
 */
export const BACKUP_FORMAT = 'halfmark-backup/3';
/** Those that can be read: in version 1 a project had no variants, before version 3 there was no shelf. */
const READABLE = ['halfmark-backup/1', 'halfmark-backup/2', BACKUP_FORMAT];

export { LARGEST_FILE } from './backup-bounds.ts';
/** Characters of a name in a sentence. */
const MOST_NAME = 80;

type Shelved = LooseEntry;
type Kept = Omit<ProjectRecord, 'id' | 'revision'>;
interface BackupEntry extends Kept {
  check: string;
}

export type BackupReading =
  | { ok: true; projects: Kept[]; shelf: Shelved[]; refused: { name: string; why: string }[] }
  | { ok: false; message: string };

/** @param written  ms since 1970 */
export function writeBackup(records: readonly ProjectRecord[], written: number, shelf: readonly Shelved[] = []): string {
  const projects = records.map(({ id: _id, revision: _revision, ...kept }): BackupEntry => ({ ...kept, check: checkOf(kept) }));
  return `${JSON.stringify({ format: BACKUP_FORMAT, written: new Date(written).toISOString(), projects, shelf: shelf.map(({ list, entry }) => ({ list, entry, check: checkOfEntry({ list, entry } as Shelved) })) }, null, 1)}\n`;
}

/** A project whose variants are what they are and lead nowhere back: for a backup that would be too large to be read. */
export function withoutUndo(record: ProjectRecord): ProjectRecord {
  const history = { past: [], future: [] };
  const variants = record.variants?.map((variant): KeptVariant => (variant.kept === null ? variant : { ...variant, kept: { ...variant.kept, history } }));
  return { ...record, history, ...(variants === undefined ? {} : { variants }) };
}

/** Reads a backup. What is whole is given back, what is not is named with the reason. */
export function readBackup(text: string): BackupReading {
  const tooLarge = backupTooLarge(text);
  if (tooLarge !== null) return { ok: false, message: tooLarge };
  let file: unknown;
  const refused: { name: string; why: string }[] = [];
  try {
    file = JSON.parse(text.replace(/^\ufeff/, ''));
  } catch {
    const rest = salvaged(text);
    if (rest === null) return { ok: false, message: 'This is no backup file: it is not JSON, or it was cut short.' };
    file = rest;
    refused.push({ name: 'What follows', why: 'the file was cut short or damaged there' });
  }
  if (typeof file !== 'object' || file === null) return { ok: false, message: 'This is no backup file.' };
  const { format, projects, shelf = [] } = file as { format?: unknown; projects?: unknown; shelf?: unknown };
  const version = typeof format === 'string' ? /^halfmark-backup\/(\d+)$/.exec(format) : null;
  if (version === null) return { ok: false, message: 'This is no backup file: it does not say "halfmark-backup" as its format.' };
  if (!READABLE.includes(version[0])) return { ok: false, message: `This backup is of version ${version[1]}, and this page reads versions 1 to 3. Reload the page to get its newest version.` };
  if (!Array.isArray(projects)) return { ok: false, message: 'This backup holds no list of projects.' };
  if (projects.length > MOST_ENTRIES || (Array.isArray(shelf) && shelf.length > MOST_ENTRIES)) return { ok: false, message: `This is no backup file: it lists more than ${MOST_ENTRIES} projects or entries of a shelf.` };
  const good: Kept[] = [];
  for (const [i, entry] of projects.entries()) {
    const fault = designTooLong(entry) ?? recordFault(typeof entry === 'object' && entry !== null ? { ...entry, id: '', revision: 1 } : entry);
    const { check, ...kept } = fields(entry);
    const name = typeof kept.name === 'string' ? short(kept.name) : `number ${i + 1}`;
    if (fault !== null) refused.push({ name, why: fault });
    else if (!fits(check, () => checkOf(kept))) refused.push({ name, why: 'its check does not fit: it was changed or damaged' });
    else good.push(kept);
  }
  return { ok: true, projects: good, shelf: readShelf(shelf, refused), refused };
}

function readShelf(shelf: unknown, refused: { name: string; why: string }[]): Shelved[] {
  const good: Shelved[] = [];
  for (const row of Array.isArray(shelf) ? (shelf as unknown[]) : []) {
    const { list, entry, check } = (row ?? {}) as { list?: unknown; entry?: { id?: unknown; first?: unknown; second?: unknown } | null; check?: string };
    const loose = { list, entry } as Shelved;
    const id = list === 'offsets' ? (typeof entry?.first === 'string' && typeof entry.second === 'string' ? `${entry.first} to ${entry.second}` : undefined) : entry?.id;
    const name = `${typeof id === 'string' ? short(id) : 'an entry'} of the shelf`;
    const fault = shelfFault({ key: typeof id === 'string' && list !== undefined ? shelfKey(keyOfItem(loose)) : '', list, entry, kept: 0 });
    if (fault !== null) refused.push({ name, why: fault });
    else if (!fits(check, () => checkOfEntry(loose))) refused.push({ name, why: 'its check does not fit: it was changed or damaged' });
    else good.push(loose);
  }
  return good;
}

/** What stands in quotes was not counted with the values of the file: it is held to the length of a design before it is parsed in its turn. */
function designTooLong(entry: unknown): string | null {
  const { designText, variants } = fields(entry);
  const texts: unknown[] = [designText, ...(Array.isArray(variants) ? variants.map((variant) => (variant as KeptVariant | null)?.kept?.designText) : [])];
  return texts.some((text) => typeof text === 'string' && text.length > MOST_CHARACTERS) ? 'its design is longer than any that is read' : null;
}

const short = (name: string): string => (name.length <= MOST_NAME ? name : `${name.slice(0, MOST_NAME)}…`);

/** What is nested too deeply to be written as text again was not written by this program. */
function fits(check: unknown, own: () => string): boolean {
  try {
    return check === own();
  } catch (error) {
    if (error instanceof RangeError) return false;
    throw error;
  }
}

const checkOfEntry = ({ list, entry }: Shelved): string => `sha256:${bytesToHex(sha256(utf8ToBytes(JSON.stringify([list, entry]))))}`;

/**
 * What a file that is no whole JSON document still holds: the projects that stand complete before the fault, each with its own check for the reader to look at.
 * @returns null when it does not begin like a backup
 */
function salvaged(text: string): { format: string; projects: unknown[] } | null {
  const head = /^\ufeff?\s*\{\s*"format"\s*:\s*"(halfmark-backup\/\d+)"[^[{}]*"projects"\s*:\s*\[/.exec(text.slice(0, 500));
  if (head === null) return null;
  const projects: unknown[] = [];
  for (let at = head[0].length; ; ) {
    while (/[\s,]/.test(text[at] ?? '')) at++;
    const end = text[at] === '{' ? endOfObject(text, at) : -1;
    if (end < 0) return { format: head[1], projects };
    try {
      projects.push(JSON.parse(text.slice(at, end)));
    } catch {
      // The next one may be whole again.
    }
    at = end;
  }
}

/** @returns the place behind the bracket that closes the object which begins at `from`; -1 where the text ends before */
function endOfObject(text: string, from: number): number {
  let depth = 0;
  let quoted = false;
  for (let at = from; at < text.length; at++) {
    const sign = text[at];
    if (quoted) {
      if (sign === '\\') at++;
      else if (sign === '"') quoted = false;
    } else if (sign === '"') quoted = true;
    else if (sign === '{') depth++;
    else if (sign === '}' && --depth === 0) return at + 1;
  }
  return -1;
}

/** What a backup may say of a project, and nothing else that stands beside it. */
function fields(entry: unknown): BackupEntry {
  const { name, created, changed, binned, designText, history, view, variants, check } = (entry ?? {}) as BackupEntry;
  return { name, created, changed, binned, designText, history, view, ...(variants === undefined ? {} : { variants }), check };
}

function checkOf({ name, created, changed, binned, designText, history, view, variants }: Kept): string {
  return `sha256:${bytesToHex(sha256(utf8ToBytes(JSON.stringify([name, created, changed, binned, designText, history, view, ...(variants === undefined ? [] : [variants])]))))}`;
}
