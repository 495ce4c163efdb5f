import { describe, expect, it } from 'vitest';
import { evenPair, philox } from '../../src/tolerance/counter-random.ts';
import { drawCounts, reachOf } from '../../src/tolerance/draw.ts';

describe('random numbers by counter', () => {
  it('are the published ones', () => {
    // Known answers of the authors' own distribution for Philox4x32-10 (from memory): zeros, ones, and digits of pi.
    const F = 0xffffffff;
    const known: [[number, number, number, number], [number, number], number[]][] = [
      [[0, 0, 0, 0], [0, 0], [0x6627e8d5, 0xe169c58d, 0xbc57ac4c, 0x9b00dbd8]],
      [[F, F, F, F], [F, F], [0x408f276d, 0x41c83b0e, 0xa20bc7c6, 0x6d5451fd]],
      [[0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344], [0xa4093822, 0x299f31d0], [0xd16cfe09, 0x94fdcceb, 0x5001e420, 0x24126ea1]],
    ];
    const out = new Uint32Array(4);
    for (const [counter, key, expected] of known) {
      philox(counter, key, out);
      expect([...out]).toEqual(expected);
    }
  });

  it('lie evenly inside 0..1 and differ by seed, index and input', () => {
    const values = Array.from({ length: 20000 }, (_, i) => evenPair(7, i, 0, 0)[0]);
    expect(Math.min(...values)).toBeGreaterThan(0);
    expect(Math.max(...values)).toBeLessThan(1);
    // Standard error of the mean of 20,000 is 0.002, of the variance 5e-4; five of each.
    const mean = values.reduce((a, b) => a + b) / values.length;
    expect(Math.abs(mean - 0.5)).toBeLessThan(0.01);
    expect(Math.abs(values.reduce((a, b) => a + (b - mean) ** 2, 0) / values.length - 1 / 12)).toBeLessThan(0.0027);
    const first = [evenPair(7, 0, 0, 0), evenPair(8, 0, 0, 0), evenPair(7, 1, 0, 0), evenPair(7, 0, 1, 0), evenPair(7, 0, 0, 1), evenPair(7 + 2 ** 32, 0, 0, 0), evenPair(7, 2 ** 32, 0, 0)].map(([u]) => u);
    expect(new Set(first).size).toBe(7);
  });

  it('make normal counts of half a tolerance, and even ones within it', () => {
    const n = 20000;
    const spread = (distribution: 'normal' | 'uniform') => {
      const counts = Array.from({ length: n }, (_, i) => drawCounts(3, i, [2], [distribution])[0]);
      return { sd: Math.sqrt(counts.reduce((a, c) => a + c * c, 0) / n), most: Math.max(...counts.map(Math.abs)), beyond: counts.filter((c) => Math.abs(c) > 1).length / n };
    };
    const normal = spread('normal');
    // Standard error of a standard deviation: sd/sqrt(2n) = 0.25 %; beyond two sigma lie 4.55 %, standard error 0.15 %.
    expect(Math.abs(normal.sd / 0.5 - 1)).toBeLessThan(0.0125);
    expect(Math.abs(normal.beyond - 0.0455)).toBeLessThan(0.0075);
    expect(normal.most).toBeLessThanOrEqual(2);
    const even = spread('uniform');
    expect(Math.abs(even.sd * Math.sqrt(3) - 1)).toBeLessThan(0.0125);
    expect(even.most).toBeLessThanOrEqual(1);
  });

  it('never take more than there is', () => {
    const input = (tolerance: string) => ({ label: '', variable: null, apply: (s: never) => s, words: () => '', tolerance, origin: 'stated' as const, default: null });
    expect(reachOf(input('60 %'))).toBeCloseTo(0.95 / 0.6, 12);
    expect(reachOf(input('10 %'))).toBe(2);
    expect(reachOf(input('50 meV'))).toBe(2);
    for (let i = 0; i < 2000; i++) expect(1 + 0.95 * drawCounts(1, i, [reachOf(input('95 %'))], ['normal'])[0]).toBeGreaterThan(0);
  });
});
