import { describe, expect, it } from 'vitest';
import { histogramOf, quantile, spreadOf, yieldOf } from '../../src/tolerance/statistics.ts';

describe('the spread of a figure', () => {
  it('has the usual mean, deviation and quantiles of a small sample', () => {
    const spread = spreadOf([2, null, 4, 4, 4, 5, 5, 7, 9], false);
    expect(spread).toMatchObject({ known: 8, mean: 5, least: 2, most: 9 });
    // Sum of squares 32 over n - 1 = 7.
    expect(spread.sd).toBeCloseTo(Math.sqrt(32 / 7), 14);
    expect(spread.quantiles.find((q) => q.p === 0.5)!.value).toBe(4.5);
    expect(quantile([1, 2, 3, 4], 0.25)).toBe(1.75);
  });

  it('says nothing of no values and of one', () => {
    expect(spreadOf([null, null], true)).toMatchObject({ known: 0, mean: null, sd: null, histogram: null });
    expect(spreadOf([3], true)).toMatchObject({ known: 1, mean: 3, sd: null, least: 3, most: 3 });
  });

  it('puts every value into one bin, on a logarithm where that is asked for', () => {
    const values = Float64Array.from({ length: 1000 }, (_, i) => 10 ** (i / 100));
    for (const log of [false, true]) {
      const { edges, counts } = histogramOf(values, log);
      expect(counts.reduce((a, b) => a + b)).toBe(1000);
      expect(edges.length).toBe(counts.length + 1);
      expect([edges[0], edges[edges.length - 1]]).toEqual([values[0], values[999]]);
      if (log) expect(Math.max(...counts) - Math.min(...counts)).toBeLessThanOrEqual(1);
    }
    expect(histogramOf([5, 5, 5], false)).toEqual({ edges: [5, 5], counts: [3], log: false });
  });
});

describe('the yield', () => {
  it('has the interval of Wilson', () => {
    // 81 of 263, 95 %: 0.2553 to 0.3662; Newcombe, Statistics in Medicine 17, 857 (1998), table I, method 3 (from memory).
    const found = yieldOf(81, 263)!;
    expect(found.low).toBeCloseTo(0.2553, 4);
    expect(found.high).toBeCloseTo(0.3662, 4);
    expect(yieldOf(0, 10)).toMatchObject({ low: 0, share: 0 });
    expect(yieldOf(10, 10)).toMatchObject({ high: 1, share: 1 });
    expect(yieldOf(0, 0)).toBeNull();
  });
});
