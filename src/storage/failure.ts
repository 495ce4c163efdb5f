/** Why the browser did not keep something, for a program to test and for a person to read. */
export interface StorageFailure {
  code: 'full' | 'newer' | 'denied' | 'lost' | 'other';
  sentence: string;
}

const SENTENCES: Record<Exclude<StorageFailure['code'], 'other'>, string> = {
  full: 'There is no room left in this browser. Your work is safe while this page stays open: save it as a file, or empty the bin.',
  newer: 'Your projects were saved by a newer version of this page. Reload it to get that version; until then nothing is saved.',
  denied: 'This browser keeps nothing for this page (a private window, or storage is switched off). Your work lasts while the page is open: save it as a file.',
  lost: 'The browser cut the connection to its storage. Your work is safe while this page stays open; saving is tried again.',
};

/** @param error what a storage call threw */
export function storageFailure(error: unknown): StorageFailure {
  const name = error instanceof Error || error instanceof DOMException ? error.name : '';
  const code = codeOf(name);
  if (code !== 'other') return { code, sentence: SENTENCES[code] };
  const reason = error instanceof Error ? error.message : String(error);
  return { code, sentence: `The browser did not save (${reason}). Your work is safe while this page stays open: save it as a file.` };
}

function codeOf(name: string): StorageFailure['code'] {
  switch (name) {
    case 'QuotaExceededError':
      return 'full';
    case 'VersionError':
      return 'newer';
    case 'SecurityError':
    case 'NotAllowedError':
      return 'denied';
    case 'InvalidStateError':
    case 'AbortError':
      return 'lost';
    default:
      return 'other';
  }
}
