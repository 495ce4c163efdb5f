import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { carrierLog } from '../../solver/carriers.ts';
import { energyDistribution, levelInterval, peakOfBand } from '../../src/drawing/band-filling.ts';

const eta = fc.double({ min: -40, max: 60, noNaN: true });
const alpha = fc.double({ min: 0, max: 0.2, noNaN: true });

describe('the filling of a band against energy', () => {
  it('adds up to the density of the solver, parabolic and Kane, from a Boltzmann tail to a deep pool', () => {
    for (const [e, a] of [[-30, 0], [-2, 0], [0, 0], [5, 0], [40, 0], [-3, 0.05], [12, 0.03]] as const) {
      // s = t^2 takes the root out of the integrand: midpoint rule.
      let sum = 0;
      const step = 2e-3;
      for (let t = step / 2; t * t < Math.max(e, 0) + 45; t += step) sum += Math.exp(energyDistribution(t * t, e, a)) * 2 * t * step;
      const solver = { log: 0, slope: 0 };
      carrierLog(e, a, false, solver);
      // The midpoint rule with this step is good to about 1e-6.
      expect(Math.abs(sum / Math.exp(solver.log) - 1), `eta ${e}, alpha kT ${a}`).toBeLessThan(1e-5);
    }
  });

  it('has its largest value at the peak', () => {
    fc.assert(
      fc.property(eta, alpha, (e, a) => {
        const peak = peakOfBand(e, a);
        const top = energyDistribution(peak, e, a);
        for (const s of [0.5, 0.99, 1.01, 2]) expect(energyDistribution(peak * s, e, a)).toBeLessThanOrEqual(top + 1e-9);
      }),
    );
  });

  it('peaks half a kT above the edge where Boltzmann statistics hold', () => {
    expect(peakOfBand(-20, 0)).toBeCloseTo(0.5, 5);
  });

  it('reaches a level at the two ends of the interval found and inside of it exceeds it', () => {
    fc.assert(
      fc.property(eta, alpha, fc.double({ min: 0.01, max: 12, noNaN: true }), (e, a, below) => {
        const level = energyDistribution(peakOfBand(e, a), e, a) - below;
        const [from, to] = levelInterval(level, e, a);
        expect(from).toBeLessThan(to);
        expect(Math.abs(energyDistribution(to, e, a) - level)).toBeLessThan(1e-3);
        expect(Math.abs(energyDistribution(from, e, a) - level)).toBeLessThan(1e-3);
        expect(energyDistribution(0.5 * (from + to), e, a)).toBeGreaterThan(level);
      }),
    );
  });

  it('gives an interval of no width for a level above the peak', () => {
    const [from, to] = levelInterval(5, -3, 0);
    expect(from).toBe(to);
  });
});
