import { describe, expect, it } from 'vitest';
import { GAUSS_3, GAUSS_5, integrate } from '../../solver/quadrature.ts';

describe('quadrature', () => {
  it('Gauss rules of n points are exact for polynomials up to degree 2n - 1 and not beyond', () => {
    for (const rule of [GAUSS_3, GAUSS_5]) {
      const n = rule.nodes.length;
      const moment = (power: number): number => rule.nodes.reduce((sum, x, i) => sum + rule.weights[i] * x ** power, 0) * (power + 1);
      for (let power = 0; power < 2 * n; power++) expect(moment(power)).toBeCloseTo(1, 14);
      expect(Math.abs(moment(2 * n) - 1)).toBeGreaterThan(1e-6);
    }
  });

  it('one panel is exact for polynomials up to degree 22 and takes 15 values', () => {
    for (const power of [0, 7, 22]) {
      const { value, evaluations } = integrate((x) => x ** power, [-1, 2], 1e3);
      expect(value / ((2 ** (power + 1) - (-1) ** (power + 1)) / (power + 1))).toBeCloseTo(1, 13);
      expect(evaluations).toBe(15);
    }
  });

  it('reaches the accuracy asked for on a root, a step and a narrow peak, and its error estimate is on the safe side', () => {
    const cases: [(x: number) => number, number[], number][] = [
      [(x) => Math.sqrt(x), [0, 1], 2 / 3],
      [(x) => 1 / (1 + Math.exp((x - 0.3) / 1e-3)), [0, 1], 0.3],
      [(x) => 1e-4 / ((x - 0.61) ** 2 + 1e-8), [0, 1], Math.atan(3900) + Math.atan(6100)],
    ];
    for (const [f, ends, exact] of cases) {
      const { value, error } = integrate(f, ends, 1e-9);
      expect(error).toBeLessThanOrEqual(1e-9 * value);
      expect(Math.abs(value - exact)).toBeLessThanOrEqual(error + 1e-15);
    }
  });

  it('stops at the number of panels allowed and owns up to the error that is left', () => {
    const { value, error, evaluations } = integrate((x) => Math.abs(Math.sin(40 * x)), [0, 3], 1e-12, 0, 4);
    expect(evaluations).toBeLessThanOrEqual(15 * 7);
    expect(error).toBeGreaterThan(1e-12 * value);
  });
});
