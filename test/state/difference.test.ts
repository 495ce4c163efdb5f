import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { apply, difference, inverse, same, type Json } from '../../src/state/difference.ts';

const json = fc.jsonValue({ maxDepth: 4 }).map((value) => JSON.parse(JSON.stringify(value)) as Json);
const plain = (value: Json): Json => JSON.parse(JSON.stringify(value)) as Json;

describe('differences of two documents', () => {
  it('lead from one to the other and back, for any two', () => {
    fc.assert(
      fc.property(json, json, (a, b) => {
        const changes = difference(a, b);
        const there = apply(a, changes);
        expect(same(there, b)).toBe(true);
        expect(same(apply(there, inverse(changes)), a)).toBe(true);
      }),
      { numRuns: 500, seed: 7 },
    );
  });

  it('survive being written as JSON', () => {
    fc.assert(
      fc.property(json, json, (a, b) => {
        const changes = JSON.parse(JSON.stringify(difference(a, b))) as ReturnType<typeof difference>;
        expect(plain(apply(a, changes))).toEqual(plain(b));
      }),
      { numRuns: 200, seed: 11 },
    );
  });

  it('are none between equal documents, whatever the order of keys', () => {
    expect(difference({ a: 1, b: [1, { c: 2 }] }, { b: [1, { c: 2 }], a: 1 })).toEqual([]);
  });

  it('put one layer in without rewriting those below it', () => {
    expect(difference({ list: ['a', 'b', 'c'] }, { list: ['a', 'x', 'b', 'c'] })).toEqual([{ path: ['list'], at: 1, out: [], into: ['x'] }]);
  });

  it('name the one value that changed, deep inside', () => {
    expect(difference({ a: [{ t: '1 nm' }, { t: '2 nm' }] }, { a: [{ t: '1 nm' }, { t: '3 nm' }] })).toEqual([{ path: ['a', 1, 't'], before: '2 nm', after: '3 nm' }]);
  });

  it('refuse a document that they do not start from', () => {
    const changes = difference({ a: 1, list: [1, 2] }, { a: 2, list: [1] });
    expect(() => apply({ a: 3, list: [1, 2] }, changes)).toThrow(RangeError);
    expect(() => apply({ a: 1, list: [1, 5] }, changes)).toThrow(RangeError);
    expect(() => apply({ a: 1 }, changes)).toThrow(RangeError);
  });
});
