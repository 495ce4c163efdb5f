import { describe, expect, it } from 'vitest';
import { narrowing } from '../../solver/narrowing.ts';
import type { NarrowingLaw } from '../../solver/stack.ts';

/**
 * Silicon by Jain and Roulston (1991), coefficients per powers of N in cm^-3, eV (from memory): A N^(1/3) + B N^(1/4) + C N^(1/2).
 * The law takes them at 1e18 cm^-3.
 */
const DONOR = { A: 10.23e-9, B: 4.12e-7, C: 1.46e-12 };
const ACCEPTOR = { A: 11.07e-9, B: 5.17e-7, C: 2.27e-12 };
const at1e18 = ({ A, B, C }: typeof DONOR) => ({ third: A * 1e6, quarter: B * 10 ** 4.5, half: C * 1e9 });
const JAIN: NarrowingLaw = { law: 'jain-roulston', donor: at1e18(DONOR), acceptor: at1e18(ACCEPTOR), conductionShare: 0.5 };
const SLOTBOOM: NarrowingLaw = { law: 'slotboom', energy: 0.009, reference: 1e17, constant: 0.5, conductionShare: 0.5 };

describe('narrowing by Jain and Roulston', () => {
  it('is the sum of its three powers at every density, for either kind', () => {
    for (const N of [1e16, 1e18, 3e19, 1e21]) {
      for (const [c, donors, acceptors] of [[DONOR, N, 0], [ACCEPTOR, 0, N]] as const) {
        const direct = c.A * Math.cbrt(N) + c.B * N ** 0.25 + c.C * Math.sqrt(N);
        expect(Math.abs(narrowing(JAIN, donors, acceptors) / direct - 1)).toBeLessThan(1e-12);
      }
    }
  });

  it('of n-silicon meets the figures that were measured', () => {
    // 18.7 meV ln(N/7e17): Wagner and del Alamo, J. Appl. Phys. 63, 425 (1988), from memory; such measurements scatter by some 15 %.
    for (const N of [5e18, 1e19, 3e19, 1e20]) expect(Math.abs(narrowing(JAIN, N, 0) / (0.0187 * Math.log(N / 7e17)) - 1), `${N}`).toBeLessThan(0.15);
  });

  it('of a layer that holds both kinds lies between that of one and of the other', () => {
    const total = 1e19;
    const [n, p] = [narrowing(JAIN, total, 0), narrowing(JAIN, 0, total)];
    expect(narrowing(JAIN, 0.7 * total, 0.3 * total)).toBeCloseTo(0.7 * n + 0.3 * p, 14);
    // No step where the last atoms of the other kind vanish.
    expect(Math.abs(narrowing(JAIN, total, 1) - n)).toBeLessThan(1e-15);
  });

  it('is nothing without dopants and grows with them', () => {
    expect(narrowing(JAIN, 0, 0)).toBe(0);
    let last = 0;
    for (let e = 14; e <= 21; e++) {
      const next = narrowing(JAIN, 10 ** e, 0);
      expect(next).toBeGreaterThan(last);
      last = next;
    }
  });
});

describe('narrowing by Slotboom and de Graaff', () => {
  it('is 6.4 meV at its reference and 83 meV at 1e19 cm^-3', () => {
    // 9 meV sqrt(0.5), and 9 meV {ln 100 + sqrt[ln^2 100 + 0.5]} = 83.4 meV; the often quoted 18 meV ln(N/1e17) is its limit.
    expect(narrowing(SLOTBOOM, 1e17, 0)).toBeCloseTo(0.009 * Math.SQRT1_2, 15);
    expect(narrowing(SLOTBOOM, 5e18, 5e18)).toBeCloseTo(0.0834, 3);
    expect(Math.abs(narrowing(SLOTBOOM, 1e21, 0) / (0.018 * Math.log(1e4)) - 1)).toBeLessThan(0.002);
  });

  it('keeps its digits far below its reference', () => {
    // energy constant/(2 |l|) to first order, l = ln(N/reference).
    const l = Math.log(1e-17);
    expect(Math.abs(narrowing(SLOTBOOM, 1, 0) / ((0.009 * 0.5) / (2 * -l)) - 1)).toBeLessThan(1e-3);
    expect(narrowing(SLOTBOOM, 1, 0)).toBeGreaterThan(0);
  });
});
