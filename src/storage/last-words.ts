/**
 * What was not saved yet when the page went away. A page that is being closed may not finish a transaction; the small synchronous store takes the text
 * meanwhile, and the next visit takes it up.
 */
export interface LastWords {
  /** id of the project */ id: string;
  /** the revision that the text was written on top of */ revision: number;
  designText: string;
  /** id of the variant that the text is of; absent: the one that is open */ variant?: string;
  /** of what was about to become a project of its own: the id that it gets in the database */ born?: string;
}

/** One place a project and a tab, so that two tabs that close together do not talk over each other. */
const prefix = (id: string): string => `halfmark:unsaved:${id}:`;

/** @returns whether they were kept; a browser may refuse */
export function leaveLastWords(words: LastWords, tab: string, store: Storage = localStorage): boolean {
  return rewriteLastWords(prefix(words.id) + tab, words, store);
}

/** Writes more into words where they stand. @returns whether they were kept */
export function rewriteLastWords(place: string, words: LastWords, store: Storage = localStorage): boolean {
  try {
    store.setItem(place, JSON.stringify(words));
    return true;
  } catch {
    return false;
  }
}

/** What they said has been saved after all. */
export function dropLastWords(id: string, tab: string, store: Storage = localStorage): void {
  forgetLastWords(prefix(id) + tab, store);
}

/** Those of one project, of whichever tab, each with the place where they stand. What cannot be read is removed and left out. */
export function hearLastWords(id: string, store: Storage = localStorage): { place: string; words: LastWords }[] {
  try {
    const places = Array.from({ length: store.length }, (_, i) => store.key(i)!).filter((key) => key.startsWith(prefix(id)));
    return places.flatMap((place) => {
      const words = read(store.getItem(place) ?? '');
      if (words === null) store.removeItem(place);
      return words === null ? [] : [{ place, words }];
    });
  } catch {
    return [];
  }
}

/** Removes what stands at a place: to be called once it is kept elsewhere, or it would be lost between the two. */
export function forgetLastWords(place: string, store: Storage = localStorage): void {
  try {
    store.removeItem(place);
  } catch {
    // A browser that keeps nothing has nothing to forget.
  }
}

function read(text: string): LastWords | null {
  try {
    const { id, revision, designText, variant, born } = JSON.parse(text) as Partial<LastWords>;
    if (typeof id !== 'string' || typeof revision !== 'number' || typeof designText !== 'string') return null;
    return { id, revision, designText, ...(typeof variant === 'string' ? { variant } : {}), ...(typeof born === 'string' ? { born } : {}) };
  } catch {
    return null;
  }
}
