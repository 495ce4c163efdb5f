/** The largest file that is read at all, a design or a backup: bytes of the file, characters of its text. */
export const LARGEST_FILE = 50e6;
/**
 * Values of JSON in the largest backup that this program writes: each stands on a line of its own, with its indent some 15 characters. A file packed closer than that was written
 * to fill the memory: parsed, 50 MB of brackets take more than a gigabyte.
 */
const MOST_VALUES = 4e6;
/** Of projects, and of entries of the shelf. */
export const MOST_ENTRIES = 10_000;

/** @returns why a file is not even read, in words; null when it may be */
export function fileTooLarge({ name, size }: { name: string; size: number }): string | null {
  return size > LARGEST_FILE ? `${name} has ${Math.round(size / 1e6)} MB: that is no design and no backup.` : null;
}

/** @returns why a text is not even parsed as a backup, in words; null when it may be */
export function backupTooLarge(text: string): string | null {
  if (text.length > LARGEST_FILE) return `This is no backup file: it has ${Math.round(text.length / 1e6)} MB, and more than ${LARGEST_FILE / 1e6} MB are not read.`;
  return hasMoreValues(text, MOST_VALUES) ? 'This is no backup file: it holds more single values than any backup.' : null;
}

/** Counts brackets and commas outside quoted text. */
function hasMoreValues(text: string, most: number): boolean {
  if (text.length <= most) return false;
  let count = 0;
  for (let quoted = false, at = 0; at < text.length; at++) {
    const code = text.charCodeAt(at);
    if (quoted) {
      if (code === 0x5c) at++;
      else if (code === 0x22) quoted = false;
    } else if (code === 0x22) quoted = true;
    else if ((code === 0x5b || code === 0x7b || code === 0x2c) && ++count > most) return true;
  }
  return false;
}
