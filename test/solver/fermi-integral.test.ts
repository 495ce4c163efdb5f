import { describe, expect, it } from 'vitest';
import { fermiHalf, fermiHalfInto, fermiMinusHalf, fermiThreeHalves, inverseFermiHalf } from '../../solver/fermi-integral.ts';
// The first by direct quadrature (the file says how), the second 25-digit values of the normalised integrals, two independent routes of multi-precision arithmetic (the file's own meta says how).
import tails from '../fixtures/fermi-dirac-tails.json' with { type: 'json' };
import table from '../fixtures/fermi-dirac.json' with { type: 'json' };

/** The accuracy asked of the routines over eta in [-700, 1e4]. */
const RELATIVE = 1e-15;

describe('Fermi-Dirac integrals', () => {
  const orders = [['-1/2', fermiMinusHalf], ['1/2', fermiHalf], ['3/2', fermiThreeHalves]] as const;
  for (const [order, f] of orders) {
    it(`of order ${order} agree with 25-digit values`, () => {
      for (const row of table.forward) expect(Math.abs(f(Number(row.eta)) / Number(row[order]) - 1), `eta = ${row.eta}`).toBeLessThan(RELATIVE);
    });
    it(`of order ${order} join without a step where the method changes`, () => {
      for (const eta of [-38, -2, 0, 7, 40]) expect(Math.abs(f(eta - 1e-13) / f(eta) - 1)).toBeLessThan(5e-13);
    });
  }

  it('agree with direct quadrature far below and far above, where the program uses series', () => {
    for (const row of tails.rows) for (const [order, f] of orders) expect(Math.abs(f(Number(row.eta)) / Number(row[order]) - 1), `order ${order}, eta = ${row.eta}`).toBeLessThan(RELATIVE);
  });

  it('of order 1/2 inverts to 1e-15', () => {
    for (const row of table.inverse_half) expect(Math.abs(inverseFermiHalf(Number(row.y)) - Number(row.eta)), `y = ${row.y}`).toBeLessThan(1e-15 * Math.max(1, Math.abs(Number(row.eta))));
  });

  it('of order 1/2 and its inverse undo each other through every cell and across every join', () => {
    // The last digit of y moves eta by F/F' = (2/3) eta at most of itself, so 1e-15 of max(1, |eta|) is what a round trip can hold.
    for (let i = 0; i <= 40000; i++) {
      const eta = -30 + i * 0.004 + 1e-4 * Math.sin(i);
      expect(Math.abs(inverseFermiHalf(fermiHalf(eta)) - eta), `eta = ${eta}`).toBeLessThan(1e-15 * Math.max(1, Math.abs(eta)));
    }
    for (const y of [1 / 8, 1, 256]) expect(Math.abs(inverseFermiHalf(y * (1 - 1e-15)) - inverseFermiHalf(y))).toBeLessThan(3e-15 * Math.max(1, Math.abs(inverseFermiHalf(y))));
  });

  it('of order 1/2 comes with its derivative in one pass', () => {
    const pair = new Float64Array(2);
    for (const eta of [-800, -700, -38.5, -20, -2.001, -2, -0.3, 0, 7.7, 39.999, 40, 1e4]) {
      fermiHalfInto(eta, pair);
      expect([pair[0], pair[1]], `eta = ${eta}`).toEqual([fermiHalf(eta), fermiMinusHalf(eta)]);
    }
  });

  it('of order 1/2 meets the value known at zero', () => {
    // (1 - 2^(-1/2)) zeta(3/2); McDougall and Stoner, Phil. Trans. R. Soc. A 237, 67 (1938) tabulate 0.678094 = sqrt(pi)/2 of it.
    expect(Math.abs(fermiHalf(0) / 0.765147024625 - 1)).toBeLessThan(1e-11);
  });

  it('has derivatives one order below', () => {
    // Dingle, Appl. Sci. Res. B 6, 225 (1957): dF_j/deta = F_(j-1). A central difference of 1e-4 is good to about 1e-9.
    for (const eta of [-3, 0.5, 6, 50]) {
      const h = 1e-4;
      expect(Math.abs((fermiHalf(eta + h) - fermiHalf(eta - h)) / (2 * h) / fermiMinusHalf(eta) - 1)).toBeLessThan(1e-8);
      expect(Math.abs((fermiThreeHalves(eta + h) - fermiThreeHalves(eta - h)) / (2 * h) / fermiHalf(eta) - 1)).toBeLessThan(1e-8);
    }
  });

  it('refuses to invert what is no value of the integral', () => {
    for (const y of [0, -1, NaN, Infinity]) expect(() => inverseFermiHalf(y)).toThrow(RangeError);
  });
});
