import { describe, expect, it } from 'vitest';
import { BOLTZMANN, ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { Solution } from '../../solver/solution.ts';
import type { CrystalMaterial } from '../../solver/stack.ts';
import checksD from '../fixtures/checks-d.json';
import checksG from '../fixtures/checks-g.json';
import { expectSound } from './invariants.ts';
import { crystalWith, dopant, holdAgainst } from './point-fixtures.ts';
import { layer, stackOf } from './stack-fixtures.ts';

const COMPLETE = { model: 'complete' } as const;
/** Equal bands of stated intrinsic density at kT, so that the intrinsic level lies at midgap. */
const ofNi = (ni: number, T: number, permittivity = 11.7): CrystalMaterial => ({ ...crystalWith(2 * BOLTZMANN * T * Math.log(2.8e19 / ni), 2.8e19, 2.8e19, T), permittivity });

interface Sides {
  Na: number;
  Nd: number;
  T?: number;
  statistics?: 'boltzmann' | 'fermi-dirac';
}

/** p above n, all dopants charged, each side some space charge widths thick. */
function junction(m: CrystalMaterial, { Na, Nd, T = 300, statistics = 'boltzmann' }: Sides): { s: Solution; Vbi: number; xp: number; xn: number; W: number; Emax: number } {
  const stack = stackOf([layer('p', 4000, [dopant('acceptor', Na, COMPLETE)], m), layer('n', 8000, [dopant('donor', Nd, COMPLETE)], m)], { T, assumptions: { statistics } });
  const s = expectSound(solveStack(stack));
  const [j] = s.junctions;
  const [xp, xn] = [j.depletionApproximationAbove!, j.depletionApproximationBelow!];
  // The approximation's own peak field follows from its width.
  return { s, Vbi: j.builtIn!, xp, xn, W: xp + xn, Emax: (ELEMENTARY_CHARGE * Nd * xn) / (m.permittivity * EPSILON_0) };
}

/** Intrinsic density that gives a junction the total potential V. */
const niFor = (V: number, Na: number, Nd: number, T = 300): number => Math.sqrt(Na * Nd) * Math.exp(-V / (2 * BOLTZMANN * T));
const kelvin = (kT: number): number => kT / BOLTZMANN;

describe('built-in potentials of published junctions (sources in checks-d.json)', () => {
  it('of silicon with a stated intrinsic density (vbi-neamen-7.1, vbi-sze-4.1)', () => {
    holdAgainst(checksD, 'vbi-neamen-7.1', 'Vbi, Na 1e18', junction(ofNi(1.5e10, 300), { Na: 1e18, Nd: 1e15 }).Vbi);
    holdAgainst(checksD, 'vbi-neamen-7.1', 'Vbi, Na 1e16', junction(ofNi(1.5e10, 300), { Na: 1e16, Nd: 1e15 }).Vbi);
    const T = kelvin(0.0259);
    holdAgainst(checksD, 'vbi-sze-4.1', 'Vbi', junction(ofNi(9.65e9, T), { Na: 1e18, Nd: 1e15, T }).Vbi);
  });

  it('from the band edges, with both widths (vbi-singh-5.1)', () => {
    const T = kelvin(0.026);
    const j = junction({ ...crystalWith(1.1, 2.8e19, 1e19, T), permittivity: 11.9 }, { Na: 1e18, Nd: 1e16, T });
    holdAgainst(checksD, 'vbi-singh-5.1', 'Vbi', j.Vbi);
    holdAgainst(checksD, 'vbi-singh-5.1', 'Wp', j.xp);
    holdAgainst(checksD, 'vbi-singh-5.1', 'Wn', j.xn);
  });
});

describe('widths and fields in the depletion approximation (sources in checks-d.json)', () => {
  it('w-neamen-7.2, beside a solved peak field that is lower by the majority tails', () => {
    const j = junction(ofNi(niFor(0.635, 1e16, 1e15), 300), { Na: 1e16, Nd: 1e15 });
    for (const [quantity, got] of [['W', j.W], ['xn', j.xn], ['xp', j.xp], ['Emax', j.Emax]] as const) holdAgainst(checksD, 'w-neamen-7.2', quantity, got);
    // The approximation leaves out both majority tails, some 2kT/q of Vbi.
    expect(j.s.junctions[0].peakField / j.Emax).toBeLessThan(1);
    expect(j.s.junctions[0].peakField / j.Emax).toBeGreaterThan(Math.sqrt(1 - (3 * BOLTZMANN * 300) / 0.635));
  });

  it('vbi-neamen-prob-7: levels, widths and field together', () => {
    const T = kelvin(0.0259);
    const m = ofNi(1.5e10, T);
    const j = junction(m, { Na: 1e17, Nd: 5e15, T });
    const half = j.s.layers[0].gap / 2;
    holdAgainst(checksD, 'vbi-neamen-prob-7', 'EF-Ei (n side)', half - j.s.layers[1].ecMinusEf);
    holdAgainst(checksD, 'vbi-neamen-prob-7', 'Ei-EF (p side)', j.s.layers[0].ecMinusEf - half);
    for (const [quantity, got] of [['Vbi', j.Vbi], ['xn', j.xn], ['xp', j.xp], ['Emax', j.Emax]] as const) holdAgainst(checksD, 'vbi-neamen-prob-7', quantity, got);
  });

  it('w-streetman-5: a diode 10 um across', () => {
    const T = kelvin(0.0259);
    const j = junction(ofNi(1.5e10, T, 11.8), { Na: 1e18, Nd: 5e15, T });
    for (const [quantity, got] of [['V0', j.Vbi], ['W', j.W], ['xp', j.xp], ['E0', j.Emax]] as const) holdAgainst(checksD, 'w-streetman-5', quantity, got);
    holdAgainst(checksD, 'w-streetman-5', 'Q+', ELEMENTARY_CHARGE * 5e15 * j.xn * Math.PI * 0.0005 ** 2);
  });

  it('w-sze-4.2: a one-sided junction; the degenerate side moves the built-in potential by some meV', () => {
    const T = kelvin(0.0259);
    const m = ofNi(9.65e9, T, 11.9);
    const j = junction(m, { Na: 1e19, Nd: 1e16, T });
    for (const [quantity, got] of [['Vbi', j.Vbi], ['W', j.W], ['Emax', j.Emax]] as const) holdAgainst(checksD, 'w-sze-4.2', quantity, got);
    const exact = junction(m, { Na: 1e19, Nd: 1e16, T, statistics: 'fermi-dirac' }).Vbi - j.Vbi;
    expect(exact).toBeGreaterThan(0.001);
    expect(exact).toBeLessThan(0.01);
  });

  it('w-neamen-7.3-reverse and c-neamen-7.5: a junction of the same total potential has the width and the capacitance', () => {
    const m = ofNi(niFor(5.635, 1e16, 1e15), 300);
    const j = junction(m, { Na: 1e16, Nd: 1e15 });
    holdAgainst(checksD, 'w-neamen-7.3-reverse', 'W', j.W);
    const area = 1e-4;
    holdAgainst(checksD, 'c-neamen-7.5', 'C', (area * 11.7 * EPSILON_0) / j.W);
    // The solved one keeps the majority tails, 2kT/q of 5.635 V.
    const tails = Math.sqrt(1 - (2 * BOLTZMANN * 300) / 5.635);
    holdAgainst(checksD, 'c-neamen-7.5', 'C', area * j.s.junctions[0].capacitance! * tails);
  });

  it('breakdown-doping-neamen-7.4: the doping at which 25 V give 3e5 V/cm', () => {
    const miss = (Nd: number): number => junction(ofNi(niFor(25, 1e18, Nd), 300), { Na: 1e18, Nd }).Emax - 3e5;
    let [low, high] = [3e15, 5e16];
    for (let i = 0; i < 20; i++) {
      const middle = Math.sqrt(low * high);
      if (miss(middle) < 0) low = middle;
      else high = middle;
    }
    holdAgainst(checksD, 'breakdown-doping-neamen-7.4', 'Nd', low);
  });

  it('lin-sze-4.3: a linearly graded junction', () => {
    const T = kelvin(0.0259);
    const edge = 1e20 * 2.5e-5;
    // Built-in potential between the neutral levels of the two edges of the space charge.
    holdAgainst(checksD, 'lin-sze-4.3', 'Vbi', junction(ofNi(9.65e9, T, 11.9), { Na: edge, Nd: edge, T }).Vbi);
    // A layer of that width in a wide gap, its ends held at the drop q a W^3/(12 eps) of the depleted profile: nothing in it but dopants.
    const graded = (kind: 'donor' | 'acceptor', from: number, to: number) => dopant(kind, 0, { ...COMPLETE, concentration: { kind: 'linear', from, to } });
    const drop = (ELEMENTARY_CHARGE * 1e20 * 5e-5 ** 3) / (12 * 11.9 * EPSILON_0);
    const m = { ...crystalWith(4, 2.8e19, 2.8e19, T), permittivity: 11.9 };
    const s = expectSound(solveStack(stackOf([layer('graded', 500, [graded('acceptor', edge, 0), graded('donor', 0, edge)], m)], {
      T, top: { kind: 'pinned', level: 2 + drop / 2 }, bottom: { kind: 'pinned', level: 2 - drop / 2 },
    }), { accuracy: 1e-6 }), 1e-6);
    expect(Math.abs(s.profiles.field[0])).toBeLessThan(50);
    holdAgainst(checksD, 'lin-sze-4.3', 'Emax', Math.max(...s.profiles.field.map(Math.abs)));
    expect(s.layers[0].fullyDepleted).toBe(true);
  });
});

describe('the first tunnel diode (source in checks-g.json)', () => {
  it('esaki-1958: width and mean field with the degenerate built-in potential', () => {
    const j = junction({ ...crystalWith(0.66, 1.04e19, 6e18), permittivity: 16 }, { Na: 1.6e19, Nd: 1e19, statistics: 'fermi-dirac' });
    expect(j.Vbi).toBeGreaterThan(0.68);
    expect(j.Vbi).toBeLessThan(0.75);
    holdAgainst(checksG, 'esaki-1958', 'W', j.W);
    holdAgainst(checksG, 'esaki-1958', 'mean field', j.Vbi / j.W);
  });
});
