import { describe, expect, it } from 'vitest';
import { carrierLog, type CarrierLog } from '../../solver/carriers.ts';

const out: CarrierLog = { log: 0, slope: 0 };
const at = (eta: number, a: number, boltzmann = false): CarrierLog => {
  carrierLog(eta, a, boltzmann, out);
  return { ...out };
};

describe("Kane's integral", () => {
  it('tends to F_1/2 as the non-parabolicity vanishes, from frozen to degenerate', () => {
    for (const eta of [-2000, -50, -39, -20, -3, -0.1, 0, 0.1, 2, 10, 30, 41.9, 42.1, 200, 5000]) {
      const kane = at(eta, 1e-18);
      const parabolic = at(eta, 0);
      expect(Math.abs(kane.log - parabolic.log), `eta ${eta}`).toBeLessThan(1e-13 * Math.max(1, Math.abs(eta)));
      expect(Math.abs(kane.slope / parabolic.slope - 1), `eta ${eta}`).toBeLessThan(1e-12);
    }
  });

  it('joins its two forms without a step', () => {
    for (const a of [1e-3, 0.02, 0.4, 3]) {
      for (const edge of [-40, 0, 42]) {
        const below = at(edge - 1e-9, a);
        const above = at(edge + 1e-9, a);
        expect(Math.abs(above.log - below.log - 2e-9 * below.slope), `a ${a}, eta ${edge}`).toBeLessThan(1e-12 * Math.max(1, Math.abs(edge)));
      }
    }
  });

  it('agrees with direct quadrature', () => {
    // Midpoint rule in t = sqrt(x), 200,000 cells: error far below 1e-9.
    const direct = (eta: number, a: number): number => {
      const cells = 200000;
      const end = Math.sqrt(Math.max(eta, 0) + 45);
      let sum = 0;
      for (let k = 0; k < cells; k++) {
        const t = (end * (k + 0.5)) / cells;
        const x = t * t;
        sum += (2 * x * Math.sqrt(1 + a * x) * (1 + 2 * a * x)) / (1 + Math.exp(x - eta));
      }
      return Math.log(((2 / Math.sqrt(Math.PI)) * sum * end) / cells);
    };
    for (const [eta, a] of [[-5, 0.02], [0, 0.4], [3, 1], [20, 0.1], [60, 0.4]]) expect(Math.abs(at(eta, a).log - direct(eta, a)), `eta ${eta}`).toBeLessThan(1e-9);
  });

  it('is the Boltzmann tail with Boltzmann statistics', () => {
    expect(at(5, 0.3, true).log - 5).toBeCloseTo(at(-60, 0.3).log + 60, 12);
  });
});

describe('carrier densities', () => {
  it('have the slope of their logarithm', () => {
    const d = 1e-4;
    for (const a of [0, 0.02, 0.5]) {
      for (const eta of [-60, -10, -1, 0, 3, 15, 50, 400]) {
        const slope = (at(eta + d, a).log - at(eta - d, a).log) / (2 * d);
        expect(Math.abs(slope - at(eta, a).slope), `eta ${eta}, a ${a}`).toBeLessThan(3e-8);
      }
    }
  });
});
