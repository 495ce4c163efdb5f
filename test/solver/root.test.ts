import { describe, expect, it } from 'vitest';
import { findRoot } from '../../solver/root.ts';

/** Name, function, bracket and root, each exact or to the digits given. */
const cases: [string, (x: number) => number, number, number, number][] = [
  ['a line', (x) => 2 * x - 1, 0, 3, 0.5],
  ['a cubic with a flat root', (x) => (x - 1) ** 3, 0, 3.7, 1],
  ['Lambert', (x) => x * Math.exp(x) - 1, -1, 1, 0.5671432904097838],
  ['a steep exponential', (x) => Math.exp(40 * x) - Math.exp(20), 0, 1, 0.5],
  ['a falling logarithm', (x) => -Math.log(x / 7), 1e-3, 1e3, 7],
  ['Kepler', (x) => x - 0.8 * Math.sin(x) - 1, 0, 3, 1.7821913289379],
  ['a jump', (x) => (x < Math.SQRT2 ? -1 : 1), 0, 2, Math.SQRT2],
  ['a wall without an answer', (x) => (x < 0.3 ? -Infinity : x), 0, 1, 0.3],
];

describe('the root search', () => {
  for (const [name, f, a, b, root] of cases) {
    it(`closes in ${name} no slower than bisection and a step`, () => {
      const tolerance = 1e-10;
      const answer = findRoot(f, { a, b, tolerance });
      expect(answer.b - answer.a).toBeLessThanOrEqual(answer.reason === 'exact' ? b - a : tolerance);
      expect(Math.abs(answer.root - root)).toBeLessThanOrEqual(tolerance * 1.1 + 1e-10);
      expect(answer.evaluations).toBeLessThanOrEqual(Math.ceil(Math.log2((b - a) / tolerance)) + 1);
      if (answer.reason !== 'exact') expect(answer.fa > 0).not.toBe(answer.fb > 0);
    });
  }

  it('is faster than bisection where the function is smooth', () => {
    const answer = findRoot((x) => x * Math.exp(x) - 1, { a: -1, b: 1, tolerance: 1e-12 });
    expect(answer.evaluations).toBeLessThan(14); // bisection: 41
  });

  it('says why it stopped', () => {
    expect(findRoot((x) => x, { a: 0, b: 1, tolerance: 1e-3 }).reason).toBe('exact');
    expect(findRoot((x) => x * x + 1, { a: -1, b: 1, tolerance: 1e-3 }).reason).toBe('not enclosed');
    expect(findRoot((x) => x - 0.3, { a: 0, b: 1, tolerance: 1e-300 }).reason).toMatch(/exact|no progress in floating point/);
    expect(findRoot((x) => (x < 1e9 + 0.5 ? -1 : 1), { a: 1e9, b: 1e9 + 1, tolerance: 1e-12 }).reason).toBe('no progress in floating point');
    expect(findRoot((x) => Math.cos(x), { a: 1, b: 2, tolerance: 1e-3 }).reason).toBe('tolerance');
  });

  it('refuses a bracket that is none', () => {
    expect(() => findRoot((x) => x, { a: 1, b: 0, tolerance: 1 })).toThrow(RangeError);
    expect(() => findRoot((x) => x, { a: 0, b: 1, tolerance: 0 })).toThrow(RangeError);
    expect(() => findRoot(() => NaN, { a: 0, b: 1, tolerance: 1 })).toThrow(RangeError);
    expect(() => findRoot((x) => (x > 0 && x < 1 ? NaN : x - 0.6), { a: 0, b: 1, tolerance: 1e-3 })).toThrow(RangeError);
  });
});
