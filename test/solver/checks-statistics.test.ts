import { describe, expect, it } from 'vitest';
import { chargeAt, localCharge, type ChargeValues } from '../../solver/charge.ts';
import { BOLTZMANN, EPSILON_0 } from '../../solver/constants.ts';
import { fermiHalf, fermiMinusHalf, fermiThreeHalves, inverseFermiHalf } from '../../solver/fermi-integral.ts';
import { neutralLevel } from '../../solver/fermi-level.ts';
import { layerFigures } from '../../solver/layer.ts';
import { mobility } from '../../solver/mobility.ts';
import type { Assumptions, CrystalMaterial, Dopant } from '../../solver/stack.ts';
import checksA from '../fixtures/checks-a.json';
import checksB from '../fixtures/checks-b.json';
import checksC from '../fixtures/checks-c.json';
import checksG from '../fixtures/checks-g.json';
import checksH from '../fixtures/checks-h.json';
import checksI from '../fixtures/checks-i.json';
import { BOLTZMANN_STATISTICS, crystalWith, dopant, holdAgainst, layerOf, PLAIN } from './point-fixtures.ts';

const COMPLETE = { model: 'complete' } as const;
const figures = (m: CrystalMaterial, dopants: Dopant[], T = 300, a: Assumptions = PLAIN) => layerFigures(layerOf(m, dopants), T, a, false);
const level = (m: CrystalMaterial, dopants: Dopant[], T = 300, a: Assumptions = PLAIN): number => neutralLevel(localCharge(layerOf(m, dopants), 0, T, a)).ecMinusEf;
const blank = (): ChargeValues => ({ n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 });

/** Where `f` changes sign between two positive arguments, by halving their ratio. */
function crossing(f: (x: number) => number, low: number, high: number): number {
  const sign = Math.sign(f(low));
  if (Math.sign(f(high)) === sign) throw new Error('no change of sign');
  for (let i = 0; i < 60; i++) {
    const middle = Math.sqrt(low * high);
    if (Math.sign(f(middle)) === sign) low = middle;
    else high = middle;
  }
  return Math.sqrt(low * high);
}

describe('Fermi-Dirac integrals against tables and exact laws (sources in checks-a.json)', () => {
  /** Gamma(3/2) and Gamma(5/2), by which tables without the Gamma factor differ. */
  const HALF = Math.sqrt(Math.PI) / 2;
  const THREE_HALVES = 0.75 * Math.sqrt(Math.PI);

  it('their slopes are those of the next lower order (fd-deriv)', () => {
    holdAgainst(checksA, 'fd-deriv', '[F_3/2(0.501)-F_3/2(0.499)]/0.002 / F_1/2(0.5)', (fermiThreeHalves(0.501) - fermiThreeHalves(0.499)) / 0.002 / fermiHalf(0.5));
    holdAgainst(checksA, 'fd-deriv', '[F_3/2(6.001)-F_3/2(5.999)]/0.002 / F_1/2(6)', (fermiThreeHalves(6.001) - fermiThreeHalves(5.999)) / 0.002 / fermiHalf(6));
    for (const eta of [-3, 0.5, 6]) expect(Math.abs((fermiHalf(eta + 1e-3) - fermiHalf(eta - 1e-3)) / 2e-3 / fermiMinusHalf(eta) - 1), `${eta}`).toBeLessThan(1e-6);
  });

  it('meet the printed tables (fd-half-0, fd-mcdougall)', () => {
    holdAgainst(checksA, 'fd-half-0', 'F_1/2(0)', fermiHalf(0));
    holdAgainst(checksA, 'fd-half-0', 'unnormalised integral', fermiHalf(0) * HALF);
    for (const eta of [-4, 2, 4]) holdAgainst(checksA, 'fd-mcdougall', `I_1/2(${eta})`, fermiHalf(eta) * HALF);
    holdAgainst(checksA, 'fd-mcdougall', 'I_3/2(0)', fermiThreeHalves(0) * THREE_HALVES);
  });

  it('meet the degenerate limit and the series of the inverse (fd-sommerfeld, fd-joyce-dixon)', () => {
    holdAgainst(checksA, 'fd-sommerfeld', 'F_1/2(30)', fermiHalf(30));
    for (const r of [0.5, 2, 5]) holdAgainst(checksA, 'fd-joyce-dixon', `eta(r=${r})`, inverseFermiHalf(r));
  });

  it('give the electrons of a level 2 kT inside the band (fd-neamen-4.6)', () => {
    const c = localCharge(layerOf(crystalWith(1.12, 2.8e19, 1.04e19), []), 0, 300, PLAIN);
    const out = blank();
    chargeAt(c, -2 * BOLTZMANN * 300, out);
    holdAgainst(checksA, 'fd-neamen-4.6', 'n0 exact', out.n);
  });
});

describe('doping found for a demand (sources in checks-b.json, checks-c.json, checks-g.json)', () => {
  it('of 5 % carriers above the doping at 550 K (ni-si-550K)', () => {
    const m = crystalWith(1.12, 2.8e19, 1.04e19);
    const excess = (N: number): number => figures(m, [dopant('donor', N, COMPLETE)], 550, BOLTZMANN_STATISTICS).n - 1.05 * N;
    holdAgainst(checksB, 'ni-si-550K', 'Nd', crossing(excess, 1e14, 1e17));
  });

  it('of a level 0.20 eV below the band in compensated silicon (comp-neamen-4.13)', () => {
    const T = 0.025851 / BOLTZMANN;
    const m = crystalWith(1.12, 2.8e19, 1.04e19, T);
    const miss = (N: number): number => level(m, [dopant('acceptor', 1e16, COMPLETE), dopant('donor', N, COMPLETE)], T, BOLTZMANN_STATISTICS) - 0.2;
    holdAgainst(checksC, 'comp-neamen-4.13', 'Nd', crossing(miss, 1.2e16, 1e18));
  });

  it('of a level 3 kT above the acceptors, which is no degenerate layer yet (degenerate-onset-neamen-4.14)', () => {
    // Equal bands put the intrinsic level at midgap.
    const kT = BOLTZMANN * 300;
    const states = 1.5e10 * Math.exp(0.56 / kT);
    const m = crystalWith(1.12, states, states);
    const miss = (N: number): number => 1.12 - level(m, [dopant('acceptor', N, COMPLETE)], 300, BOLTZMANN_STATISTICS) - 0.045 - 3 * kT;
    const N = crossing(miss, 1e16, 1e19);
    holdAgainst(checksC, 'degenerate-onset-neamen-4.14', 'Na', N);
    expect(figures(m, [dopant('acceptor', N, COMPLETE)]).regime).toBe('extrinsic');
  });

  it('of overlapping bands in GaAs doped alike on both sides (deg-onset-gaas)', () => {
    const m = crystalWith(1.42, 4.35e17, 8.2e18);
    const overlap = (N: number): number => level(m, [dopant('acceptor', N, COMPLETE)]) - 1.42 - level(m, [dopant('donor', N, COMPLETE)]);
    holdAgainst(checksG, 'deg-onset-gaas', 'N', crossing(overlap, 1e17, 1e19));
  });
});

describe('ionisation and degeneracy (sources in checks-c.json, checks-g.json)', () => {
  it('aluminium in SiC, each density with its own depth (ion-sic-al)', () => {
    for (const [text, depth] of [['1e15', 0.22], ['1e16', 0.215], ['1e18', 0.19]] as const) {
      holdAgainst(checksC, 'ion-sic-al', `share ${text}`, figures(crystalWith(3.26, 1.7e19, 2.5e19), [dopant('acceptor', Number(text), { depth })]).ionised[0].fraction);
    }
  });

  it('boron is 90 % ionised at 193 K by the ratio of the tails and at 188.5 K by neutrality (ion-neamen-T90)', () => {
    const m = crystalWith(1.12, 2.8e19, 1.04e19);
    // Neutral acceptors over holes at one level far from both, times the acceptors that stand in for the holes: pa/(p0 + pa) with p0 = Na.
    const held = (T: number): number => {
      const c = localCharge(layerOf(m, [dopant('acceptor', 1e16)]), 0, T, BOLTZMANN_STATISTICS);
      const out = blank();
      chargeAt(c, 1.12 - 0.2, out);
      const ratio = (1e16 - out.acceptors) / out.p;
      return ratio / (1 + ratio);
    };
    holdAgainst(checksC, 'ion-neamen-T90', 'T', crossing((T) => held(T) - 0.1, 100, 300));
    const neutral = crossing((T) => figures(m, [dopant('acceptor', 1e16)], T).ionised[0].fraction - 0.9, 100, 300);
    expect(Math.abs(neutral - 188.5)).toBeLessThan(0.2);
  });

  it('the peak voltage of a germanium tunnel diode by the one-third rule (deg-ge-tunnel)', () => {
    const m = crystalWith(0.66, 1.04e19, 6e18);
    const n = -level(m, [dopant('donor', 2e19, COMPLETE)]);
    const p = level(m, [dopant('acceptor', 4e19, COMPLETE)]) - 0.66;
    holdAgainst(checksG, 'deg-ge-tunnel', 'peak voltage (Vn+Vp)/3', (n + p) / 3);
  });
});

describe('mobility and screening (sources in checks-h.json, checks-i.json)', () => {
  it('the three-parameter form follows the longer one below 1e20 (mu-masetti)', () => {
    const P = { min: 68.5, max: 1414, reference: 9.2e16, exponent: 0.711 };
    holdAgainst(checksH, 'mu-masetti', 'mu P 1e15', mobility(P, 1e15));
    holdAgainst(checksH, 'mu-masetti', 'mu P 1e20', mobility(P, 1e20));
    holdAgainst(checksH, 'mu-masetti', 'mu B 1e18', mobility({ min: 44.9, max: 470.5, reference: 2.23e17, exponent: 0.719 }, 1e18));
  });

  it('the flat-band capacitance over an oxide holds the Debye length (debye-neamen-cfb)', () => {
    const L = figures(crystalWith(1.12, 2.8e19, 1.04e19), [dopant('acceptor', 1e16, COMPLETE)], 300, BOLTZMANN_STATISTICS).debyeLength!;
    holdAgainst(checksI, 'debye-neamen-cfb', 'C_FB', 1 / (5.5e-6 / (3.9 * EPSILON_0) + L / (11.7 * EPSILON_0)));
  });
});
