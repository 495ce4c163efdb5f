import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { BOLTZMANN } from '../../solver/constants.ts';
import { chargeAt, localCharge, type ChargeValues, type LocalCharge } from '../../solver/charge.ts';
import { neutralLevel } from '../../solver/fermi-level.ts';
import type { Assumptions, CrystalMaterial, Dopant } from '../../solver/stack.ts';
import checksC from '../fixtures/checks-c.json';
import checksG from '../fixtures/checks-g.json';
import { BOLTZMANN_STATISTICS, crystalWith, dopant, holdAgainst, layerOf, massFor, PLAIN } from './point-fixtures.ts';

const COMPLETE = { model: 'complete' } as const;

interface Point extends ChargeValues {
  ec: number;
  evaluations: number;
  c: LocalCharge;
}

function solve(m: CrystalMaterial, dopants: Dopant[], T: number, a: Assumptions = PLAIN): Point {
  const c = localCharge(layerOf(m, dopants), 5e-5, T, a);
  const level = neutralLevel(c);
  const out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
  chargeAt(c, level.ecMinusEf, out);
  return { ...out, ec: level.ecMinusEf, evaluations: level.evaluations, c };
}

/** A crystal of stated intrinsic density, equal bands. */
function crystalOfNi(ni: number, T: number, bands = 2.8e19): CrystalMaterial {
  return crystalWith(2 * BOLTZMANN * T * Math.log(bands / ni), bands, bands, T);
}

describe('Fermi level against published figures (sources in checks-c.json)', () => {
  it('compensated silicon', () => {
    const r = solve(crystalOfNi(1.5e10, 300), [dopant('acceptor', 1e16, COMPLETE), dopant('donor', 3e15, COMPLETE)], 300, BOLTZMANN_STATISTICS);
    holdAgainst(checksC, 'comp-neamen-4.11', 'p0', r.p);
    holdAgainst(checksC, 'comp-neamen-4.11', 'n0', r.n);
    // Turned about: the published 2.24e16 donors at kT = 0.0259 eV (comp-neamen-4.13) must give the demanded 0.20 eV.
    const T = 0.0259 / BOLTZMANN;
    const set = solve(crystalWith(1.12, 2.8e19, 1.04e19, T), [dopant('acceptor', 1e16, COMPLETE), dopant('donor', 2.24e16, COMPLETE)], T, BOLTZMANN_STATISTICS);
    expect(Math.abs(set.ec - 0.2)).toBeLessThan(1e-4);
  });

  it('intrinsic and nearly intrinsic layers', () => {
    const m = { ...crystalWith(1.12, 1e19, 1e19), electronMass: [1.08], holeMass: [0.56] };
    holdAgainst(checksC, 'ef-intrinsic-neamen-4.4', 'Ei-Emid', 0.56 - solve(m, [], 300).ec);
    const ge = solve(crystalOfNi(2.4e13, 300), [dopant('donor', 5e13, COMPLETE)], 300, BOLTZMANN_STATISTICS);
    holdAgainst(checksC, 'near-intrinsic-neamen-4.10', 'n0', ge.n);
    holdAgainst(checksC, 'near-intrinsic-neamen-4.10', 'p0', ge.p);
  });

  it('both carriers at a stated level', () => {
    const c = localCharge(layerOf(crystalWith(1.12, 2.8e19, 1.04e19), []), 0, 300, BOLTZMANN_STATISTICS);
    const out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
    chargeAt(c, 0.25, out);
    holdAgainst(checksC, 'ef-neamen-4.5', 'n0', out.n);
    holdAgainst(checksC, 'ef-neamen-4.5', 'p0', out.p);
  });

  it('arsenic in silicon, all ionised', () => {
    const T = 0.0259 / BOLTZMANN;
    const gap = 2 * 0.0259 * Math.log(2.86e19 / 9.65e9);
    const r = solve(crystalWith(gap, 2.86e19, 2.86e19, T), [dopant('donor', 1e16, COMPLETE)], T, BOLTZMANN_STATISTICS);
    holdAgainst(checksC, 'ef-sze-2.4', 'p', r.p);
    holdAgainst(checksC, 'ef-sze-2.4', 'Ec-EF', r.ec);
    holdAgainst(checksC, 'ef-sze-2.4', 'EF-Ei', gap / 2 - r.ec);
  });

  it('freeze-out of phosphorus, alone and compensated', () => {
    const si = crystalWith(1.169, 2.86e19, 3.1e19);
    // Published with Boltzmann electrons; the tolerance is that of Fermi-Dirac ones.
    holdAgainst(checksC, 'freeze-blakemore', 'n(40 K)', solve(si, [dopant('donor', 1e16), dopant('acceptor', 1e14)], 40).n);
    holdAgainst(checksC, 'freeze-sip-77', 'share 1e+15', solve(si, [dopant('donor', 1e15)], 77).donors / 1e15);
    holdAgainst(checksC, 'freeze-sip-77', 'share 1e+17', solve(si, [dopant('donor', 1e17)], 77).donors / 1e17);
  });

  it('indium in silicon stays mostly neutral at room temperature', () => {
    const r = solve(crystalWith(1.124, 2.8e19, 3.1e19), [dopant('acceptor', 1e17, { depth: 0.155 })], 300);
    holdAgainst(checksC, 'ion-si-in', 'ionised share', r.acceptors / 1e17);
  });

  it('aluminium in SiC stays within the published spread', () => {
    const published: [number, number, number, number][] = [[1e15, 0.22, 0.58, 1.3], [1e16, 0.215, 0.3, 1.35], [1e18, 0.19, 0.055, 1.6]];
    for (const [N, depth, share, factor] of published) {
      const r = solve(crystalWith(3.26, 1.7e19, 2.5e19), [dopant('acceptor', N, { depth })], 300);
      expect(Math.abs(Math.log(r.acceptors / N / share)), `${N}`).toBeLessThan(Math.log(factor));
    }
  });

  it('the Boltzmann level misses by the Joyce-Dixon term', () => {
    const T = 0.026 / BOLTZMANN;
    const m = crystalWith(1.42, 4.45e17, 7e18, T);
    const boltzmann = solve(m, [dopant('donor', 1e17, COMPLETE)], T, BOLTZMANN_STATISTICS).ec;
    const exact = solve(m, [dopant('donor', 1e17, COMPLETE)], T).ec;
    holdAgainst(checksC, 'jd-singh-2.13', 'EF-Ec Boltzmann', -boltzmann);
    holdAgainst(checksC, 'jd-singh-2.13', 'EF-Ec Joyce-Dixon', -exact);
    holdAgainst(checksC, 'jd-singh-2.13', 'error', boltzmann - exact);
  });
});

describe('degenerate layers against exact and published figures (sources in checks-g.json)', () => {
  it('n-GaAs at 77 K by the Sommerfeld form', () => {
    const m = { ...crystalWith(1.5, 1e17, 7e18), electronMass: [0.067] };
    holdAgainst(checksG, 'deg-gaas-sommerfeld', 'EF-Ec', -solve(m, [dopant('donor', 2e19, COMPLETE)], 77).ec);
  });

  it('a germanium tunnel junction overlaps', () => {
    const m = crystalWith(0.66, 1.04e19, 6e18);
    const n = solve(m, [dopant('donor', 2e19, COMPLETE)], 300).ec;
    const p = solve(m, [dopant('acceptor', 4e19, COMPLETE)], 300).ec;
    holdAgainst(checksG, 'deg-ge-tunnel', 'EF-Ec (n side)', -n);
    holdAgainst(checksG, 'deg-ge-tunnel', 'qVbi - Eg', p - n - 0.66);
  });

  it('p-silicon at 1e20, and the onset of overlap in GaAs', () => {
    const r = solve(crystalWith(1.12, 2.8e19, 3.1e19), [dopant('acceptor', 1e20, COMPLETE)], 300);
    holdAgainst(checksG, 'deg-si-p', 'Ev-EF', r.ec - 1.12);
    const gaas = crystalWith(1.42, 4.35e17, 8.2e18);
    const N = 1.16585297468e18;
    const overlap = solve(gaas, [dopant('acceptor', N, COMPLETE)], 300).ec - 1.42 - solve(gaas, [dopant('donor', N, COMPLETE)], 300).ec;
    expect(Math.abs(overlap)).toBeLessThan(1e-4);
  });

  it('the two-term textbook form holds to its own error', () => {
    for (const r of [1, 2, 4]) holdAgainst(checksG, 'deg-sze-approx', `eta(${r})`, -solve(crystalWith(1.4, 1e18, 1e19), [dopant('donor', r * 1e18, COMPLETE)], 300).ec / (BOLTZMANN * 300));
  });
});

describe('Fermi level from 1 K to 1500 K', () => {
  const gaps = [0.17, 1.12, 3.4, 6];
  const temperatures = [1, 4, 20, 77, 300, 700, 1500];
  const sets: Dopant[][] = [
    [],
    [dopant('donor', 1e15)],
    [dopant('acceptor', 1e19, { depth: 0.16 })],
    [dopant('donor', 1e21, COMPLETE)],
    [dopant('donor', 1e17), dopant('acceptor', 9.99e16)],
    [dopant('donor', 1e16), dopant('acceptor', 1e16)],
    [dopant('donor', 1e16, COMPLETE), dopant('acceptor', 1e16, COMPLETE)],
    [dopant('donor', 1e18, { compensation: 0.4 }), dopant('acceptor', 2e14, { depth: 0.08 })],
  ];

  it('is finite, settles within 12 evaluations and closes the balance to 1e-12 of the larger charge', () => {
    let most = 0;
    for (const gap of gaps) for (const T of temperatures) for (const dopants of sets) {
      const r = solve({ ...crystalWith(gap, 2.8e19, 1e19) }, dopants, T);
      const label = `gap ${gap}, ${T} K, set ${sets.indexOf(dopants)}`;
      expect(Number.isFinite(r.ec), label).toBe(true);
      most = Math.max(most, r.evaluations);
      const larger = Math.max(r.p + r.donors, r.n + r.acceptors);
      // The level is one double: its last digit moves the charge by slope x ulp, which no iteration can undercut (6 eV at 1 K: 1e-11).
      const lastDigit = r.slope * 2.3e-16 * Math.max(gap, r.ec, 0.01) * 2;
      expect(Math.abs(r.net), label).toBeLessThanOrEqual(1e-12 * larger + lastDigit);
    }
    expect(most).toBeLessThanOrEqual(12);
  });

  it('settles within 12 evaluations at random points too, filled bands and exact compensation among them', () => {
    const unit = fc.double({ min: 0, max: 1, noNaN: true });
    const rows = fc.array(fc.record({ donor: fc.boolean(), n: unit, depth: unit, complete: fc.boolean() }), { maxLength: 4 });
    fc.assert(
      fc.property(unit, unit, rows, fc.boolean(), (t, g, list, same) => {
        const gap = 0.1 + 6 * g;
        const dopants = list.map((r) => dopant(r.donor ? 'donor' : 'acceptor', 1e12 * 1e9 ** (same ? list[0].n : r.n), { depth: 0.5 * gap * r.depth, model: r.complete ? 'complete' : 'dilute' }));
        const r = solve(crystalWith(gap, 2.8e19, 1e19), dopants, 1500 ** t);
        expect(r.evaluations).toBeLessThanOrEqual(12);
        const larger = Math.max(r.p + r.donors, r.n + r.acceptors);
        expect(Math.abs(r.net)).toBeLessThanOrEqual(1e-12 * larger + r.slope * 2.3e-16 * Math.max(gap, Math.abs(r.ec), 0.01) * 2);
      }),
      { numRuns: 3000, seed: 20261203 },
    );
  });

  it('falls strictly as acceptors are added', () => {
    for (const T of temperatures) {
      let last = -Infinity;
      for (const N of [1e14, 1e15, 9e15, 1e16, 1.1e16, 1e17, 1e18]) {
        const { ec } = solve(crystalWith(1.12, 2.8e19, 1e19), [dopant('donor', 1e16), dopant('acceptor', N)], T);
        expect(ec, `${T} K, ${N}`).toBeGreaterThan(last);
        last = ec;
      }
    }
  });

  it('keeps n times p at ni squared in a non-degenerate layer', () => {
    for (const T of [200, 300, 500]) {
      const r = solve(crystalWith(1.12, 2.8e19, 1e19), [dopant('donor', 1e14)], T);
      const b = r.c.bands;
      expect(Math.log(r.n) + Math.log(r.p) - (Math.log(b.nc) + Math.log(b.nv) - b.gap / b.kT)).toBeCloseTo(0, 4);
    }
  });
});

describe('corner cases of the Fermi level', () => {
  const si = crystalWith(1.17, 2.86e19, 3.1e19);

  it('at 4 K phosphorus holds the level halfway between itself and the band', () => {
    const r = solve(si, [dopant('donor', 1e15)], 4);
    // n^2 = N Nc/g exp(-dE/kT) in strong freeze-out.
    const { kT, nc } = r.c.bands;
    const expected = 0.0225 + 0.5 * kT * Math.log((2 * nc) / 1e15);
    expect(r.ec).toBeCloseTo(expected, 10);
  });

  it('one compensating acceptor in a million moves it onto the donor at 4 K', () => {
    const r = solve(si, [dopant('donor', 1e15), dopant('acceptor', 1e9)], 4);
    // (N_D - N_A)/N_A = g exp((E_F - E_D)/kT).
    expect(r.ec).toBeCloseTo(0.045 - r.c.bands.kT * Math.log((1e15 - 1e9) / 1e9 / 2), 10);
  });

  it('equal donors and acceptors at 50 K still fix it, where the carriers are 1e-40 cm^-3', () => {
    const r = solve(crystalWith(1.17, 2.86e19, 2.86e19), [dopant('donor', 1e16), dopant('acceptor', 1e16, { degeneracy: 2 })], 50);
    expect(r.ec).toBeCloseTo(0.585, 12);
    expect(Math.abs(solve(crystalWith(6, 1e19, 1e19), [dopant('donor', 1e16, COMPLETE), dopant('acceptor', 1e16, COMPLETE)], 1).ec - 3)).toBeLessThan(1e-12);
  });

  it('a compensation ratio keeps the row whole and adds opposite charge', () => {
    const own = solve(si, [dopant('acceptor', 1e18, { depth: 0.16, compensation: 0.05 })], 300);
    const two = solve(si, [dopant('acceptor', 1e18, { depth: 0.16 }), dopant('donor', 5e16, COMPLETE)], 300);
    expect(own.ec).toBe(two.ec);
    expect(own.donors).toBe(5e16);
  });

  it('merging and screening leave nothing bound far above their densities', () => {
    const merging = { depthReference: 3e18, depthExponent: 1, boundReference: 6e18, boundExponent: 2.3 };
    const screened = { coefficient: 3e-8, mottDensity: 4e18, boundExponent: 2 };
    for (const model of ['merging', 'screened'] as const) {
      const high = solve(si, [dopant('donor', 1e21, { model, merging, screened })], 20);
      expect(high.donors / 1e21).toBeGreaterThan(0.999);
      const low = solve(si, [dopant('donor', 1e13, { model, merging, screened })], 20);
      const dilute = solve(si, [dopant('donor', 1e13)], 20);
      expect(Math.abs(low.ec - dilute.ec)).toBeLessThan(1e-3);
    }
  });

  it('an insulator carries no charge and answers midgap', () => {
    const oxide: CrystalMaterial = { ...crystalWith(9, 1e19, 1e19), insulator: true, electronMass: undefined, holeMass: undefined };
    const r = solve(oxide, [dopant('donor', 1e18)], 300);
    expect([r.ec, r.n, r.p, r.net, r.slope]).toEqual([4.5, 0, 0, 0, 0]);
  });

  it('a degenerate band at 4 K fills as the exact zero-temperature law says', () => {
    const m = { ...crystalWith(1.5, 1e17, 7e18), electronMass: [massFor(4.35e17, 300)] };
    const r = solve(m, [dopant('donor', 1e19, COMPLETE)], 4);
    expect(r.n / 1e19).toBeCloseTo(1, 12);
  });
});

describe('charge', () => {
  it('has the stated slope, which is never negative', () => {
    for (const a of [PLAIN, { ...PLAIN, nonParabolic: true }]) {
      const m = { ...crystalWith(1.1, 2e18, 1e19), nonParabolicity: { electron: 0.6, hole: 0.2 } };
      const c = localCharge(layerOf(m, [dopant('donor', 1e18), dopant('acceptor', 3e17, { depth: 0.1 })]), 0, 300, a);
      const out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
      const net = (y: number): number => (chargeAt(c, y, out), out.net);
      for (let y = -0.5; y < 1.7; y += 0.0501) {
        const d = 1e-5;
        const slope = (net(y + d) - net(y - d)) / (2 * d);
        chargeAt(c, y, out);
        expect(out.slope).toBeGreaterThanOrEqual(0);
        expect(Math.abs(slope - out.slope), `${y}`).toBeLessThan(1e-6 * out.slope + 1e-10 * 1e18 / d);
      }
    }
  });
});
