/**
 * What was not saved yet when the page went away. A page that is being closed may not finish a transaction; the small synchronous store takes the text
 * meanwhile, and the next visit takes it up as one more step of the project.
 */
export interface LastWords {
  id: string;
  /** the revision that the text was written on top of */ revision: number;
  designText: string;
}

/** One place a project, so that two tabs that close together do not talk over each other. */
const keyOf = (id: string): string => `halfmark:unsaved:${id}`;

/** @returns whether it was kept; a browser may refuse */
export function leaveLastWords(words: LastWords, store: Storage = localStorage): boolean {
  try {
    store.setItem(keyOf(words.id), JSON.stringify(words));
    return true;
  } catch {
    return false;
  }
}

/** Reads and removes those of one project. @returns null when there are none, or none that can be read */
export function takeLastWords(project: string, store: Storage = localStorage): LastWords | null {
  try {
    const text = store.getItem(keyOf(project));
    if (text === null) return null;
    store.removeItem(keyOf(project));
    const { id, revision, designText } = JSON.parse(text) as Partial<LastWords>;
    return typeof id === 'string' && typeof revision === 'number' && typeof designText === 'string' ? { id, revision, designText } : null;
  } catch {
    return null;
  }
}
