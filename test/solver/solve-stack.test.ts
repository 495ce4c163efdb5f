import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { Boundary, CrystalMaterial, Layer } from '../../solver/stack.ts';
import { CRYSTAL } from './poisson-fixtures.ts';
import { expectSound } from './invariants.ts';
import { barrier, doped, layer, stackOf, SYMMETRIC } from './stack-fixtures.ts';

const EPS = 11.7 * EPSILON_0;
const KT_300 = 8.617333262e-5 * 300;

describe('a p-n junction', () => {
  it('splits a symmetric built-in potential in half, with the peak field of the first integral', () => {
    const N = 1e17;
    const s = expectSound(solveStack(stackOf([layer('p', 500, [doped('acceptor', N, 0, 'complete')], SYMMETRIC), layer('n', 500, [doped('donor', N, 0, 'complete')], SYMMETRIC)]), { accuracy: 1e-6 }), 1e-6);
    const j = s.junctions[0];
    const at = s.profiles.layer.indexOf(1);
    const half = s.profiles.psi[at] - s.profiles.psi[0];
    expect(Math.abs(half - (j.builtIn as number) / 2)).toBeLessThan(2e-6);
    // E^2 = (2q/eps) Int rho dpsi over one half; with Boltzmann majority tails: (2qN/eps)[V/2 - kT (1 - exp(-V/2kT))]. Exact but for
    // degeneracy, which at N = 0.004 Nc moves it by some 1e-4 (Sze and Ng 2007, section 2.2, with the majority tail kept).
    const V = j.builtIn as number;
    const field = Math.sqrt(((2 * ELEMENTARY_CHARGE * N) / EPS) * (V / 2 - KT_300 * (1 - Math.exp(-V / 2 / KT_300))));
    expect(Math.abs(j.peakField / field - 1)).toBeLessThan(1e-3);
  });

  it('obeys the first integral on both sides of a one-sided junction', () => {
    // eps E^2/2 = q [N |psi_bulk - psi_s| - kT (n + p)_bulk + kT (n + p)_s], exact with Boltzmann carriers and complete dopants: the depletion
    // approximation keeps the first term only, and misses what the heavy side's carriers spill over (Sze and Ng 2007, section 2.2).
    const s = expectSound(
      solveStack(stackOf([layer('p', 300, [doped('acceptor', 1e18, 0, 'complete')]), layer('n', 4000, [doped('donor', 1e15, 0, 'complete')])], { assumptions: { statistics: 'boltzmann' } }), { accuracy: 1e-6 }),
      1e-6,
    );
    const { psi, n, p, field, layer: of } = s.profiles;
    const at = of.indexOf(1);
    const end = psi.length - 1;
    const below = 1e15 * (psi[end] - psi[at]) - KT_300 * (n[end] + p[end] - n[at] - p[at]);
    const above = 1e18 * (psi[at] - psi[0]) - KT_300 * (n[0] + p[0] - n[at] - p[at]);
    const square = (EPS * field[at] ** 2) / (2 * ELEMENTARY_CHARGE);
    expect(Math.abs(below / square - 1)).toBeLessThan(2e-3);
    expect(Math.abs(above / square - 1)).toBeLessThan(2e-3);
  });

  it('comes close to the depletion approximation where the built-in potential is many kT', () => {
    // W = sqrt(2 eps (Vbi - 2kT/q) (1/N + 1/N)/q), both sides (Sze and Ng 2007, section 2.2; from memory); the half-charge edges lie within a Debye length each.
    const N = 1e17;
    const s = expectSound(solveStack(stackOf([layer('p', 500, [doped('acceptor', N, 0, 'complete')]), layer('n', 500, [doped('donor', N, 0, 'complete')])])));
    const j = s.junctions[0];
    const W = Math.sqrt((4 * EPS * ((j.builtIn as number) - 2 * KT_300)) / (ELEMENTARY_CHARGE * N));
    const solved = (j.depletionAbove as number) + (j.depletionBelow as number);
    expect(Math.abs(solved - W)).toBeLessThan(2 * (s.layers[0].debyeLength as number));
  });

  it('puts the built-in potential of the neutral sides across a stack that is long enough', () => {
    for (const T of [4.2, 77, 300, 450]) {
      const s = expectSound(solveStack(stackOf([layer('p', 3000, [doped('acceptor', 1e16)]), layer('n', 3000, [doped('donor', 1e18)])], { T })));
      const across = s.profiles.psi[s.profiles.psi.length - 1] - s.profiles.psi[0];
      expect(Math.abs(across - (s.junctions[0].builtIn as number))).toBeLessThan(1e-9);
    }
  });
});

describe('a metal contact', () => {
  it('has the exact maximum field of a depleted n layer', () => {
    // E^2 = (2qN/eps)(V - kT/q [1 - exp(-qV/kT)]), V the bending; exact with Boltzmann electrons (Sze and Ng 2007, section 3.2).
    const N = 1e16;
    const s = expectSound(solveStack(stackOf([layer('n', 2000, [doped('donor', N, 0, 'complete')])], { top: barrier(0.7) }), { accuracy: 1e-6 }), 1e-6);
    const V = 0.7 - s.layers[0].ecMinusEf;
    const field = Math.sqrt(((2 * ELEMENTARY_CHARGE * N) / EPS) * (V - KT_300 * (1 - Math.exp(-V / KT_300))));
    expect(Math.abs(-s.contacts[0].surfaceField / field - 1)).toBeLessThan(1e-3);
    expect(s.profiles.ec[0]).toBeCloseTo(0.7, 9);
    expect((s.contacts[0].barrierN as number) + (s.contacts[0].barrierP as number)).toBeCloseTo(s.layers[0].gap, 12);
  });

  it('on a frozen-out layer leaves the depletion region charged', () => {
    const s = expectSound(solveStack(stackOf([layer('p', 1000, [doped('acceptor', 1e17)])], { T: 20, top: barrier(0.5, 'p') })));
    expect(s.layers[0].regime).toBe('freeze-out');
    expect(s.layers[0].ionised[0].fraction).toBeLessThan(1e-3);
    expect(s.layers[0].ionised[0].fractionDepleted).toBeGreaterThan(0.999);
    expect(s.profiles.ionisedAcceptors[0] / 1e17).toBeGreaterThan(0.999);
  });
});

describe('symmetries', () => {
  it('a stack read from the other end gives the mirrored bands', () => {
    const layers = [layer('a', 50, [doped('donor', 1e19)]), layer('b', 200, [doped('acceptor', 3e16)]), layer('c', 400, [doped('donor', 1e17)])];
    const one = expectSound(solveStack(stackOf(layers, { top: barrier(0.6) }), { accuracy: 1e-6 }), 1e-6);
    const other = expectSound(solveStack(stackOf([...layers].reverse(), { bottom: barrier(0.6) }), { accuracy: 1e-6 }), 1e-6);
    // At the interfaces, which both meshes hold.
    const b = one.profiles.layer.indexOf(1);
    const c = one.profiles.layer.indexOf(2);
    expect(Math.abs(one.profiles.ec[c] - other.profiles.ec[other.profiles.layer.indexOf(1)])).toBeLessThan(4e-6);
    expect(Math.abs(one.profiles.ec[b] - other.profiles.ec[other.profiles.layer.indexOf(2)])).toBeLessThan(4e-6);
  });

  it('swapping donors and acceptors in a symmetric band structure turns the diagram over', () => {
    const make = (first: 'donor' | 'acceptor', second: 'donor' | 'acceptor') =>
      expectSound(solveStack(stackOf([layer('a', 100, [{ ...doped(first, 1e18), degeneracy: 2 }], SYMMETRIC), layer('b', 600, [{ ...doped(second, 1e16), degeneracy: 2 }], SYMMETRIC)])));
    const one = make('donor', 'acceptor');
    const other = make('acceptor', 'donor');
    const i = one.profiles.layer.indexOf(1);
    const k = other.profiles.layer.indexOf(1);
    expect(Math.abs(one.profiles.ec[i] + other.profiles.ev[k])).toBeLessThan(1e-4);
    expect(Math.abs(one.profiles.field[i] / other.profiles.field[k] + 1)).toBeLessThan(1e-2);
  });
});

/** Nitride-like crystals with the polarisation constants of Ambacher et al., J. Appl. Phys. 85, 3222 (1999), Tables I-II (from memory). */
const GAN: CrystalMaterial = {
  ...CRYSTAL, id: 'gan-like', gap: { zeroK: 3.51, alpha: 9.09e-4, beta: 830 }, affinity: 4.1, permittivity: 9.5, permittivityHighFrequency: 5.35, electronMass: [0.2], holeMass: [1.5],
  polarisation: { spontaneous: -0.029e-4, e31: -0.49e-4, e33: 0.73e-4, c13: 103, c33: 405, lattice: 3.189e-8 },
};
const ALN: CrystalMaterial = {
  ...GAN, id: 'aln-like', gap: { zeroK: 6.2, alpha: 1.8e-3, beta: 1462 }, affinity: 1.9, electronMass: [0.4],
  polarisation: { spontaneous: -0.081e-4, e31: -0.6e-4, e33: 1.46e-4, c13: 108, c33: 373, lattice: 3.112e-8 },
};

describe('a polar stack', () => {
  const alloy: Layer['material'] = { id: 'algan-like', first: GAN, second: ALN, bowing: {} };
  const stack = (face: 'metal' | 'N') =>
    stackOf([{ ...layer('barrier', 25, []), material: alloy, x: { kind: 'constant', value: 0.3 } }, layer('channel', 1000, [doped('donor', 1e15, 0.03)], GAN)], {
      top: { kind: 'pinned', level: 1.2 },
      crystal: { face, strain: 'pseudomorphic', template: GAN },
    });

  it('gathers an electron gas under a strained barrier on the metal face', () => {
    const s = expectSound(solveStack(stack('metal')));
    const i = s.profiles.layer.indexOf(1);
    // Ambacher et al. (1999): some 1.5e13 charges per cm^2 at x = 0.3 from these constants.
    expect(s.junctions[0].sheetCharge).toBeGreaterThan(1.2e13);
    expect(s.junctions[0].sheetCharge).toBeLessThan(1.9e13);
    expect(s.profiles.ec[i]).toBeLessThan(0);
    expect(s.profiles.n[i]).toBeGreaterThan(1e19);
  });

  it('turns the charge over on the other face', () => {
    expect(expectSound(solveStack(stack('N'))).junctions[0].sheetCharge).toBe(-expectSound(solveStack(stack('metal'))).junctions[0].sheetCharge);
  });
});

describe('graded layers and insulators', () => {
  const silica: CrystalMaterial = { ...CRYSTAL, id: 'oxide', insulator: true, gap: { zeroK: 8.9, alpha: 0, beta: 1 }, affinity: 0.95, permittivity: 3.9, permittivityHighFrequency: 2.1, electronMass: undefined, holeMass: undefined };
  const wide: CrystalMaterial = { ...CRYSTAL, id: 'wide', gap: { zeroK: 1.8, alpha: 4.73e-4, beta: 636 }, affinity: 3.7, permittivity: 11 };
  const alloy: Layer['material'] = { id: 'graded', first: CRYSTAL, second: wide, bowing: { gap: 0.2 } };

  it('an implanted profile keeps its dose', () => {
    const implanted = { ...doped('acceptor', 0, 0, 'complete'), concentration: { kind: 'implant', peak: 8e17, depth: 250e-7, straggle: 40e-7, background: 0 } as const };
    const s = expectSound(solveStack(stackOf([layer('well', 600, [implanted, doped('donor', 1e16)]), layer('bulk', 2000, [doped('donor', 1e16)])])));
    const { z, ionisedAcceptors, layer: of } = s.profiles;
    let dose = 0;
    for (let i = 0; i + 1 < z.length; i++) if (of[i + 1] === 0) dose += ((z[i + 1] - z[i]) * (ionisedAcceptors[i] + ionisedAcceptors[i + 1])) / 2;
    // The whole Gaussian lies in the layer: sqrt(2 pi) straggle peak.
    expect(Math.abs(dose / (Math.sqrt(2 * Math.PI) * 40e-7 * 8e17) - 1)).toBeLessThan(1e-3);
  });

  it('a narrow implant is not stepped over, wherever it lies', () => {
    for (let i = 0; i < 24; i++) {
      const [depth, straggle] = [100 + 1800 * ((i * 0.618034) % 1), 1 + (i % 4)];
      const implanted = { ...doped('acceptor', 0, 0, 'complete'), concentration: { kind: 'implant', peak: 8e17, depth: depth * 1e-7, straggle: straggle * 1e-7, background: 0 } as const };
      const s = expectSound(solveStack(stackOf([layer('well', 2000, [implanted, doped('donor', 1e16)])])));
      const { z, ionisedAcceptors } = s.profiles;
      let dose = 0;
      for (let k = 0; k + 1 < z.length; k++) dose += ((z[k + 1] - z[k]) * (ionisedAcceptors[k] + ionisedAcceptors[k + 1])) / 2;
      expect(Math.abs(dose / (Math.sqrt(2 * Math.PI) * straggle * 1e-7 * 8e17) - 1), `${depth} nm`).toBeLessThan(0.01);
    }
  });

  it('a graded alloy joins its neighbours without a step of the bands', () => {
    for (const T of [20, 300, 600]) {
      const s = expectSound(solveStack(stackOf([layer('a', 100, [doped('donor', 1e17)]), { ...layer('g', 80, [doped('donor', 1e17)]), material: alloy, x: { kind: 'linear', from: 0, to: 0.8 } }, { ...layer('w', 200, [doped('donor', 1e17)]), material: alloy, x: { kind: 'constant', value: 0.8 } }], { T })));
      expect(Math.abs(s.junctions[0].deltaEc)).toBeLessThan(1e-12);
      expect(Math.abs(s.junctions[1].deltaEc)).toBeLessThan(1e-12);
    }
  });

  it('an oxide under a metal carries one field from end to end', () => {
    const top: Boundary = { kind: 'barrier', source: { from: 'workFunction', workFunction: 4.1, slope: 1 }, metal: null, imageForce: false };
    for (const T of [77, 300]) {
      const s = expectSound(solveStack(stackOf([layer('oxide', 2, [], silica), layer('p', 2000, [doped('acceptor', 1e17)])], { T, top })));
      const last = s.profiles.layer.indexOf(1) - 1;
      expect(Math.abs(s.profiles.field[last] / s.profiles.field[0] - 1)).toBeLessThan(1e-6);
      // Displacement: the field drops by the ratio of permittivities.
      expect(Math.abs((s.profiles.field[last] * 3.9) / (s.profiles.field[last + 1] * 11.7) - 1)).toBeLessThan(1e-6);
      expect(s.layers[0].insulator).toBe(true);
      expect(s.junctions[0].builtIn).toBeNull();
    }
  });

  it('refuses a neutral contact on an oxide, in words', () => {
    expect(() => solveStack(stackOf([layer('oxide', 5, [], silica), layer('p', 200, [doped('acceptor', 1e17)])]))).toThrow(/insulator/);
  });

  it('refuses a charge on an interface that is not there', () => {
    expect(() => solveStack(stackOf([layer('p', 200, [doped('acceptor', 1e17)])], { interfaces: [{ index: 0, sheetCharge: 1e12 }] }))).toThrow(/no interface 0/);
  });

  it('a 1 nm layer on a 500 um substrate', () => {
    expectSound(solveStack(stackOf([layer('delta', 1, [doped('donor', 1e21)]), layer('substrate', 5e5, [doped('acceptor', 1e13)])], { top: barrier(0.6) })));
  });
});

describe('a re-solve from an earlier solution', () => {
  it('gives the same answer as a cold start', () => {
    const make = (n: number) => stackOf([layer('cap', 50, [doped('donor', n)]), layer('base', 400, [doped('acceptor', 1e16)]), layer('sub', 900, [doped('donor', 1e17)])], { top: barrier(0.6) });
    const cold = expectSound(solveStack(make(1.2e18), { accuracy: 1e-5 }), 1e-5);
    const warm = expectSound(solveStack(make(1.2e18), { accuracy: 1e-5, warmStart: expectSound(solveStack(make(1e18), { accuracy: 1e-5 }), 1e-5).profiles }), 1e-5);
    const at = (s: typeof cold, l: number): number => s.profiles.ec[s.profiles.layer.indexOf(l)];
    for (const l of [1, 2]) expect(Math.abs(at(cold, l) - at(warm, l))).toBeLessThan(2e-5);
  });
});

describe('random sensible stacks', () => {
  const boundary = (inner: fc.Arbitrary<number>): fc.Arbitrary<Boundary> =>
    fc.oneof(
      fc.constant<Boundary>({ kind: 'neutral' }),
      inner.map((h): Boundary => barrier(0.2 + 0.6 * h)),
      inner.map((h): Boundary => ({ kind: 'pinned', level: 0.2 + 0.6 * h })),
      inner.map((h): Boundary => ({ kind: 'open', sheetCharge: (h - 0.5) * 2e12 })),
    );
  const unit = fc.double({ min: 0, max: 1, noNaN: true });
  const layers = fc.array(fc.record({ t: unit, n: unit, donor: fc.boolean(), second: fc.boolean(), model: fc.constantFrom('dilute', 'complete') }), { minLength: 1, maxLength: 12 });
  /** A second crystal, so that interfaces have offsets. */
  const other: CrystalMaterial = { ...CRYSTAL, id: 'other', gap: { zeroK: 1.5, alpha: 5.4e-4, beta: 204 }, affinity: 4.07, permittivity: 12.9, electronMass: [0.067], holeMass: [0.53] };

  it('of 1 to 12 layers between 4 and 900 K are accepted and close Gauss\'s law', () => {
    fc.assert(
      fc.property(layers, unit, boundary(unit), boundary(unit), unit, (rows, t, top, bottom, sheet) => {
        const stack = stackOf(
          rows.map((r, i) => layer(`l${i}`, 1 * 5e5 ** r.t, [doped(r.donor ? 'donor' : 'acceptor', 1e13 * 1e8 ** r.n, 0.045, r.model as 'dilute' | 'complete')], r.second ? other : CRYSTAL)),
          { T: 4 * 225 ** t, top, bottom, interfaces: rows.length > 1 ? [{ index: 0, sheetCharge: (sheet - 0.5) * 6e13 }] : [] },
        );
        expectSound(solveStack(stack));
      }),
      { numRuns: 500, seed: 20261201 },
    );
  });
});
