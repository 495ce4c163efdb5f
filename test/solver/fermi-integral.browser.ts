import { expect } from 'chai';
import { fermiHalf, fermiMinusHalf, fermiThreeHalves } from '../../solver/fermi-integral.ts';
import table from '../fixtures/fermi-dirac.json' with { type: 'json' };

// The same table and accuracy as in Node: engines differ in the last digits of Math.exp.
describe('Fermi-Dirac integrals in a browser', () => {
  for (const [order, f] of [['-1/2', fermiMinusHalf], ['1/2', fermiHalf], ['3/2', fermiThreeHalves]] as const) {
    it(`of order ${order} agree with 25-digit values`, () => {
      for (const row of table.forward) expect(Math.abs(f(Number(row.eta)) / Number(row[order]) - 1), `eta = ${row.eta}`).to.be.lessThan(1e-13);
    });
  }
});
