import { describe, expect, it } from 'vitest';
import { densityOfStates } from '../../solver/bands.ts';
import { imageForceLowering, tunnellingEnergy } from '../../solver/barrier.ts';
import { ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { polarisationSheets } from '../../solver/polarisation.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { CrystalMaterial, Solution } from '../../solver/index.ts';
import { CRYSTAL } from './poisson-fixtures.ts';
import { expectSound } from './invariants.ts';
import { barrier, doped, layer, stackOf } from './stack-fixtures.ts';
// Sources and inputs stand in the data, check by check; the tolerances here are those of the solved fields (1e-4 where the check says so).
import checksD from '../fixtures/checks-d.json' with { type: 'json' };
import checksE from '../fixtures/checks-e.json' with { type: 'json' };
import checksF from '../fixtures/checks-f.json' with { type: 'json' };
import checksJ from '../fixtures/checks-j.json' with { type: 'json' };

const checks = [checksD, checksE, checksF, checksJ].flatMap((f) => f.checks as unknown as Check[]);

interface Check {
  id: string;
  inputs: Record<string, unknown>;
  expected: { quantity: string; value?: number; tolerance?: { abs?: number; rel?: number } }[];
}
const check = (id: string): Check => {
  const found = checks.find((c) => c.id === id);
  if (!found) throw new Error(`no check ${id}`);
  return found;
};
const value = (c: Check, quantity: string): number => {
  const row = c.expected.find((e) => e.quantity === quantity);
  if (row?.value === undefined) throw new Error(`${c.id} expects no ${quantity}`);
  return row.value;
};
const near = (got: number, expected: number, relative: number): void => expect(Math.abs(got / expected - 1), `${got} against ${expected}`).toBeLessThan(relative);

const KT = 8.617333262e-5 * 300;
/** A crystal with the given densities of states and gap at 300 K. */
function crystal(nc: number, nv: number, gap: number, permittivity: number): CrystalMaterial {
  const mass = (n: number): number => (n / densityOfStates(1, 300)) ** (2 / 3);
  return { ...CRYSTAL, gap: { zeroK: gap, alpha: 0, beta: 1 }, electronMass: [mass(nc)], holeMass: [mass(nv)], permittivity, permittivityHighFrequency: permittivity };
}
/** Nc = Nv = 2.8e19 with the gap that gives ni: only ni counts where statistics are Boltzmann's and dopants complete. */
const withNi = (ni: number, permittivity: number): CrystalMaterial => crystal(2.8e19, 2.8e19, 2 * KT * Math.log(2.8e19 / ni), permittivity);
const BOLTZMANN = { statistics: 'boltzmann' } as const;
const donors = (n: number) => [doped('donor', n, 0, 'complete')];
const acceptors = (n: number) => [doped('acceptor', n, 0, 'complete')];
const sound = (stack: Parameters<typeof solveStack>[0], accuracy = 1e-6): Solution => expectSound(solveStack(stack, { accuracy }), accuracy);

/** A thick layer held at the bending u kT: a pinned surface does it. */
function halfSpace(material: CrystalMaterial, dopants: ReturnType<typeof donors>, thickness_nm: number, u: number, assumptions = {}): Solution {
  const bulk = sound(stackOf([layer('bulk', thickness_nm, dopants, material)], { assumptions })).layers[0].ecMinusEf;
  return sound(stackOf([layer('bulk', thickness_nm, dopants, material)], { assumptions, top: { kind: 'pinned', level: bulk - u * KT } }), 1e-7);
}

describe('published and exact results for whole stacks', () => {
  it('pb-surface-n: surface fields of the first integral of Poisson-Boltzmann, from accumulation to inversion', () => {
    const c = check('pb-surface-n');
    for (const u of [4, -8, -20, -30]) near(Math.abs(halfSpace(withNi(1e10, 11.7), donors(1e16), 3000, u, BOLTZMANN).profiles.field[0]), value(c, `E_s(u=${u})`), 1e-4);
  });

  it('fi-gaas-degenerate: surface fields of a degenerate layer', () => {
    const c = check('fi-gaas-degenerate');
    const material = crystal(4.35e17, 7e18, 1.42, 12.9);
    for (const u of [6, -10]) near(Math.abs(halfSpace(material, donors(5e18), 300, u).profiles.field[0]), value(c, `E_s(u=${u})`), 1e-4);
  });

  it('fi-sic-frozen: surface fields of a frozen-out layer whose acceptors the field ionises', () => {
    const c = check('fi-sic-frozen');
    const material = crystal(1.7e19, 2.5e19, 3.2, 9.7);
    for (const u of [2, 10, 40]) {
      // The check counts bending towards depletion of holes: Ec - EF falls.
      const s = halfSpace(material, [doped('acceptor', 1e19, 0.19)], 400, u);
      near(Math.abs(s.profiles.field[0]), value(c, `E_s(u=${u})`), 2e-4);
      near(s.layers[0].ionised[0].fraction, value(c, 'bulk ionised share'), 0.02);
    }
  });

  it('debye-linear: the surface field of a small bending', () => {
    const s = halfSpace(withNi(1e10, 11.7), donors(1e16), 1500, 0.001 / KT, BOLTZMANN);
    near(Math.abs(s.profiles.field[0]), value(check('debye-linear'), 'E_s'), 1e-3);
    // Three Debye lengths in: between the two nodes on either side, straight in the logarithm.
    const bulk = s.profiles.psi[s.profiles.psi.length - 1];
    const depth = 3 * (s.layers[0].debyeLength as number);
    const k = s.profiles.z.findIndex((z) => z > depth);
    const [low, high] = [k - 1, k].map((i) => Math.log(Math.abs(s.profiles.psi[i] - bulk)));
    const u = (depth - s.profiles.z[k - 1]) / (s.profiles.z[k] - s.profiles.z[k - 1]);
    near(Math.exp(low + u * (high - low)) / Math.abs(s.profiles.psi[0] - bulk), value(check('debye-linear'), 'psi at 3 L_D / psi_s'), 0.02);
  });

  it('pn-exact-sym: half the potential on each side and the exact peak field', () => {
    const c = check('pn-exact-sym');
    const m = withNi(1e10, 11.7);
    const s = sound(stackOf([layer('p', 1500, acceptors(1e16), m), layer('n', 1500, donors(1e16), m)], { assumptions: BOLTZMANN }));
    const at = s.profiles.layer.indexOf(1);
    expect(Math.abs(s.profiles.psi[s.profiles.psi.length - 1] - s.profiles.psi[at] - value(c, 'drop on the n side'))).toBeLessThan(1e-6);
    near(s.junctions[0].peakField, value(c, 'E_peak'), 1e-4);
    const approximate = (ELEMENTARY_CHARGE * 1e16 * (s.junctions[0].depletionApproximationBelow as number)) / (11.7 * EPSILON_0);
    near(approximate / s.junctions[0].peakField, value(c, 'E_peak depletion approximation / exact'), 1e-5);
  });

  it('vbi-fd-n+p: the built-in potential with Fermi-Dirac statistics', () => {
    const m = crystal(2.86e19, 3.1e19, 1.124, 11.7);
    const s = sound(stackOf([layer('p', 300, acceptors(1e18), m), layer('n', 100, donors(1e20), m)]), 1e-4);
    expect(Math.abs((s.junctions[0].builtIn as number) - value(check('vbi-fd-n+p'), 'Vbi'))).toBeLessThan(2e-5);
  });

  it('schottky-exact: the peak field of a metal contact', () => {
    const m = crystal(2.8e19, 2.8e19, 1.6, 11.7);
    const bulk = sound(stackOf([layer('n', 1000, donors(1e17), m)], { assumptions: BOLTZMANN })).layers[0].ecMinusEf;
    const s = sound(stackOf([layer('n', 1000, donors(1e17), m)], { assumptions: BOLTZMANN, top: barrier(0.6 + bulk) }));
    near(s.profiles.field[0] / -1, value(check('schottky-exact'), 'E_max exact'), 1e-4);
    const approximate = Math.sqrt((2 * ELEMENTARY_CHARGE * 1e17 * 0.6) / (11.7 * EPSILON_0));
    near(approximate / Math.abs(s.profiles.field[0]), value(check('schottky-exact'), 'E_max depletion approximation / exact'), 1e-4);
  });

  it('highlow-limit: drop and field of an n+/n step', () => {
    const c = check('highlow-limit');
    const m = withNi(1e10, 11.7);
    const s = sound(stackOf([layer('n+', 200, donors(1e19), m), layer('n', 8000, donors(1e15), m)], { assumptions: BOLTZMANN }));
    const at = s.profiles.layer.indexOf(1);
    expect(Math.abs(Math.abs(s.junctions[0].builtIn as number) - value(c, 'Vbi'))).toBeLessThan(1e-8);
    expect(Math.abs((s.profiles.psi[0] - s.profiles.psi[at]) / KT - value(c, 'drop on the n+ side / (kT/q)'))).toBeLessThan(0.003);
    near(Math.abs(s.profiles.field[at]), value(c, 'E_interface'), 0.003);
  });

  it('sheet-linear: a weak sheet charge in a thick layer', () => {
    const c = check('sheet-linear');
    const m = withNi(1e10, 11.7);
    const s = sound(stackOf([layer('a', 1500, donors(1e16), m), layer('b', 1500, donors(1e16), m)], { assumptions: BOLTZMANN, interfaces: [{ index: 0, sheetCharge: 1e9 }] }), 1e-8);
    const at = s.profiles.layer.indexOf(1);
    near(s.profiles.field[at] - s.profiles.field[at - 1], value(c, 'field jump'), 1e-6);
    // The closed form is linear; the first integral to the next order, E = (psi/L_D)(1 + u/6), takes u/6 = 0.2 % off it.
    const linear = value(c, 'psi(0)');
    near(s.profiles.psi[at] - s.profiles.psi[0], linear * (1 - linear / KT / 6), 1e-4);
  });

  it('pol-ambacher-x03: sheet charges of AlGaN on GaN, strained and relaxed', () => {
    const c = check('pol-ambacher-x03');
    const gan: CrystalMaterial = { ...CRYSTAL, id: 'g', polarisation: { spontaneous: -0.029e-4, e31: -0.49e-4, e33: 0.73e-4, c13: 103, c33: 405, lattice: 3.189e-8 } };
    const aln: CrystalMaterial = { ...CRYSTAL, id: 'a', polarisation: { spontaneous: -0.081e-4, e31: -0.6e-4, e33: 1.46e-4, c13: 108, c33: 373, lattice: 3.112e-8 } };
    const upper = { ...layer('u', 20, []), material: { id: 'ag', first: gan, second: aln, bowing: {} }, x: { kind: 'constant' as const, value: 0.3 } };
    for (const [strain, quantity] of [['pseudomorphic', 'sigma/e strained'], ['relaxed', 'sigma/e relaxed']] as const) {
      near(polarisationSheets(stackOf([upper, layer('l', 100, [], gan)], { crystal: { face: 'metal', strain, template: gan } }))[0], value(c, quantity), 0.01);
    }
  });

  it('image-neamen-9.3 and e00-constant: the closed forms of a contact', () => {
    expect(Math.abs(imageForceLowering(68000, 13.1) - value(check('image-neamen-9.3'), 'dphi'))).toBeLessThan(2e-4);
    near(tunnellingEnergy(1e19, 0.26, 11.7), value(check('e00-constant'), 'E00 n-Si 1e19, m 0.26, er 11.7'), 0.01);
    near(tunnellingEnergy(1e18, 0.067, 12.9), value(check('e00-constant'), 'E00 n-GaAs 1e18, m 0.067, er 12.9'), 0.01);
    expect(EPSILON_0).toBeCloseTo(8.8541878128e-14, 24);
  });
});
