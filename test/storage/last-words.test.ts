import { describe, expect, it } from 'vitest';
import { leaveLastWords, takeLastWords } from '../../src/storage/last-words.ts';

/** The part of the browser's small store that is used. */
function shelf(full = false): Storage {
  const map = new Map<string, string>();
  const set = (key: string, value: string) => {
    if (full) throw new Error('full');
    map.set(key, value);
  };
  return { getItem: (key: string) => map.get(key) ?? null, setItem: set, removeItem: (key: string) => void map.delete(key) } as Storage;
}

describe('what was not saved when the page went away', () => {
  it('is there at the next visit, once', () => {
    const store = shelf();
    const words = { id: 'a', revision: 3, designText: '{}' };
    expect(leaveLastWords(words, store)).toBe(true);
    expect(takeLastWords('b', store)).toBeNull();
    expect(takeLastWords('a', store)).toEqual(words);
    expect(takeLastWords('a', store)).toBeNull();
  });

  it('is given up without harm when the browser refuses or gives back something else', () => {
    expect(leaveLastWords({ id: 'a', revision: 3, designText: '{}' }, shelf(true))).toBe(false);
    const store = shelf();
    for (const bad of ['nonsense', 'null', '{"id":1}']) {
      store.setItem('halfmark:unsaved:a', bad);
      expect(takeLastWords('a', store)).toBeNull();
    }
  });
});
