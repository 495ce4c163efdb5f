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

const prefix = (id: string): string => `halfmark:unsaved:${id}:`;
/** One place a project, a tab and a variant, so that neither two tabs that close together nor two variants of one tab talk over each other. */
const placeOf = (id: string, tab: string, variant = ''): string => `${prefix(id)}${tab}:${variant}`;

/** Counts what this tab has said, so that what it said last is known as such. */
let turn = 0;

/** @returns whether they were kept; a browser may refuse */
export function leaveLastWords(words: LastWords, tab: string, store: Storage = localStorage): boolean {
  return write(placeOf(words.id, tab, words.variant), { ...words, turn: ++turn }, store);
}

/** Writes more into words where they stand. @returns whether they were kept */
export function rewriteLastWords(place: string, words: LastWords, store: Storage = localStorage): boolean {
  return write(place, words, store);
}

/** What a tab said of a project, in any of its variants, has been saved after all. */
export function dropLastWords(id: string, tab: string, store: Storage = localStorage): void {
  try {
    for (const place of placesUnder(placeOf(id, tab), store)) store.removeItem(place);
  } catch {
    // A browser that keeps nothing has nothing to forget.
  }
}

/** Those of one project, of whichever tab, what it said last behind the rest, each with the place where they stand and the tab that left them. What cannot be read is removed and left out. */
export function hearLastWords(id: string, store: Storage = localStorage): { place: string; tab: string; words: LastWords }[] {
  try {
    const heard = placesUnder(prefix(id), store).flatMap((place) => {
      const said = read(store.getItem(place) ?? '');
      if (said === null) store.removeItem(place);
      return said === null ? [] : [{ place, tab: place.slice(prefix(id).length).split(':')[0], ...said }];
    });
    return heard.sort((one, other) => one.turn - other.turn).map(({ place, tab, words }) => ({ place, tab, words }));
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

function placesUnder(start: string, store: Storage): string[] {
  return Array.from({ length: store.length }, (_, i) => store.key(i)!).filter((key) => key.startsWith(start));
}

function write(place: string, said: LastWords & { turn?: number }, store: Storage): boolean {
  try {
    store.setItem(place, JSON.stringify(said));
    return true;
  } catch {
    return false;
  }
}

function read(text: string): { words: LastWords; turn: number } | null {
  try {
    const { id, revision, designText, variant, born, turn: said } = JSON.parse(text) as Partial<LastWords & { turn: number }>;
    if (typeof id !== 'string' || typeof revision !== 'number' || typeof designText !== 'string') return null;
    const words = { id, revision, designText, ...(typeof variant === 'string' ? { variant } : {}), ...(typeof born === 'string' ? { born } : {}) };
    return { words, turn: typeof said === 'number' ? said : 0 };
  } catch {
    return null;
  }
}
