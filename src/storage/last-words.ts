/**
 * What was not saved yet when the page went away. A page that is being closed may not finish a transaction; the small synchronous store takes the text
 * meanwhile, and the next visit takes it up.
 */
export interface LastWords {
  /** id of the project */ id: string;
  /** the revision that the text was written on top of */ revision: number;
  designText: string;
}

/** One place a project and a tab, so that two tabs that close together do not talk over each other. */
const prefix = (id: string): string => `halfmark:unsaved:${id}:`;

/** @returns whether they were kept; a browser may refuse */
export function leaveLastWords(words: LastWords, tab: string, store: Storage = localStorage): boolean {
  try {
    store.setItem(prefix(words.id) + tab, JSON.stringify(words));
    return true;
  } catch {
    return false;
  }
}

/** What they said has been saved after all. */
export function dropLastWords(id: string, tab: string, store: Storage = localStorage): void {
  try {
    store.removeItem(prefix(id) + tab);
  } catch {
    // A browser that keeps nothing has nothing to drop.
  }
}

/** Reads and removes those of one project, of whichever tab. What cannot be read is left out. */
export function takeLastWords(id: string, store: Storage = localStorage): LastWords[] {
  try {
    const keys = Array.from({ length: store.length }, (_, i) => store.key(i)!).filter((key) => key.startsWith(prefix(id)));
    const texts = keys.map((key) => store.getItem(key) ?? '');
    for (const key of keys) store.removeItem(key);
    return texts.map(read).filter((words) => words !== null);
  } catch {
    return [];
  }
}

function read(text: string): LastWords | null {
  try {
    const { id, revision, designText } = JSON.parse(text) as Partial<LastWords>;
    return typeof id === 'string' && typeof revision === 'number' && typeof designText === 'string' ? { id, revision, designText } : null;
  } catch {
    return null;
  }
}
