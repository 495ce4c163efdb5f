import { describe, expect, it } from 'vitest';
import { dropLastWords, forgetLastWords, hearLastWords, leaveLastWords } from '../../src/storage/last-words.ts';

/** The part of the browser's small store that is used. */
function shelf(full = false): Storage {
  const map = new Map<string, string>();
  const setItem = (key: string, value: string) => {
    if (full) throw new Error('full');
    map.set(key, value);
  };
  return { get length() { return map.size; }, key: (i: number) => [...map.keys()][i] ?? null, getItem: (key: string) => map.get(key) ?? null, setItem, removeItem: (key: string) => void map.delete(key) } as Storage;
}
const heard = (id: string, store: Storage) => hearLastWords(id, store).map(({ words }) => words);
const words = (revision: number) => ({ id: 'a', revision, designText: '{}' });

describe('what was not saved when the page went away', () => {
  it('is there at the next visit, from every tab of that project and no other, until it is kept elsewhere', () => {
    const store = shelf();
    expect(leaveLastWords(words(3), 'one', store)).toBe(true);
    leaveLastWords(words(2), 'two', store);
    leaveLastWords({ ...words(9), id: 'b' }, 'one', store);
    expect(heard('a', store)).toEqual([words(3), words(2)]);
    forgetLastWords(hearLastWords('a', store)[0].place, store);
    expect(heard('a', store)).toEqual([words(2)]);
    expect(heard('b', store)).toHaveLength(1);
  });

  it('is dropped by the tab that saved it after all, and only its own', () => {
    const store = shelf();
    leaveLastWords(words(3), 'one', store);
    leaveLastWords(words(2), 'two', store);
    dropLastWords('a', 'one', store);
    expect(heard('a', store)).toEqual([words(2)]);
  });

  it('is there of each variant that a tab was in, and dropped with them all', () => {
    const store = shelf();
    for (const variant of ['base', 'b']) leaveLastWords({ ...words(3), variant }, 'one', store);
    leaveLastWords({ ...words(4), variant: 'b' }, 'one', store);
    expect(heard('a', store)).toEqual([{ ...words(3), variant: 'base' }, { ...words(4), variant: 'b' }]);
    leaveLastWords({ ...words(5), variant: 'base' }, 'one', store);
    expect(heard('a', store).map(({ variant }) => variant)).toEqual(['b', 'base']);
    expect(hearLastWords('a', store).map(({ tab }) => tab)).toEqual(['one', 'one']);
    dropLastWords('a', 'one', store);
    expect(heard('a', store)).toEqual([]);
  });

  it('is given up without harm when the browser refuses or gives back something else', () => {
    expect(leaveLastWords(words(3), 'one', shelf(true))).toBe(false);
    const store = shelf();
    for (const [i, bad] of ['nonsense', 'null', '{"id":1}'].entries()) store.setItem(`halfmark:unsaved:a:${i}`, bad);
    expect(heard('a', store)).toEqual([]);
  });
});
