import { describe, expect, it } from 'vitest';
import { isRefusal } from '../../solver/solution.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { AlloyMaterial, Boundary, CrystalMaterial, Dopant, Layer, NarrowingLaw } from '../../solver/stack.ts';
import { CRYSTAL } from './poisson-fixtures.ts';
import { barrier, doped, layer, stackOf } from './stack-fixtures.ts';

function warnings(layers: Layer[], options: Parameters<typeof stackOf>[1] = {}): string[] {
  const answer = solveStack(stackOf(layers, options));
  if (isRefusal(answer)) throw new Error(answer.reason);
  return answer.warnings;
}
const one = (dopants: Dopant[], material: Layer['material'] = CRYSTAL, options: Parameters<typeof stackOf>[1] = {}): string[] => warnings([layer('body', 500, dopants, material)], options);

describe('a plain stack', () => {
  it('carries no warning', () => {
    expect(one([doped('donor', 1e17)])).toEqual([]);
    expect(warnings([layer('p', 300, [doped('acceptor', 1e17)]), layer('n', 1500, [doped('donor', 1e16)])], { top: barrier(0.5, 'p') })).toEqual([]);
  });

  it('says when it was solved with Boltzmann statistics', () => {
    expect(one([doped('donor', 1e17)], CRYSTAL, { assumptions: { statistics: 'boltzmann' } })).toEqual([expect.stringMatching(/^Boltzmann statistics/)]);
  });
});

describe('doping', () => {
  const mott: Partial<Dopant> = { id: 'D', mottDensity: 3e18 };

  it('beyond the Mott density is named, whatever model is in force', () => {
    expect(one([{ ...doped('donor', 5e18), ...mott }])).toEqual(['body: D at 5.0e+18 cm^-3 lies above its Mott density 3.0e+18 cm^-3, where an impurity band conducts; "dilute" still binds carriers there and leaves too few free, "complete" frees them all']);
    expect(one([{ ...doped('donor', 5e18, 0.045, 'complete'), ...mott }])).toEqual(['body: D at 5.0e+18 cm^-3 lies above its Mott density 3.0e+18 cm^-3, where an impurity band conducts']);
    expect(one([{ ...doped('donor', 2e18), ...mott }])).toEqual([]);
    expect(one([{ ...doped('donor', 5e18), screened: { coefficient: 3e-8, mottDensity: 4e18, boundExponent: 2 } }])).toEqual([expect.stringContaining('Mott density 4.0e+18')]);
    expect(one([doped('donor', 5e18)])).toEqual([]);
  });

  it('counts where it is highest in a graded layer, and as far as it is active', () => {
    const graded: Dopant = { ...doped('donor', 0), ...mott, concentration: { kind: 'linear', from: 4e18, to: 1e17 } };
    expect(one([graded])).toHaveLength(1);
    expect(one([{ ...graded, activation: 0.5 }])).toEqual([]);
    const implant: Dopant = { ...graded, concentration: { kind: 'implant', peak: 4e18, depth: 123e-7, straggle: 20e-7, background: 0 } };
    expect(one([implant])).toHaveLength(1);
    const points: Dopant = { ...graded, concentration: { kind: 'points', z: [0, 70e-7, 500e-7], value: [1e17, 4e18, 1e17] } };
    expect(one([points])).toHaveLength(1);
  });

  it('above a published solubility is named', () => {
    expect(one([{ ...doped('donor', 5e19), id: 'D', solubility: 2e19 }])).toEqual(['body: D at 5.0e+19 cm^-3 lies above the 2.0e+19 cm^-3 that was published as reachable']);
    expect(one([{ ...doped('donor', 2e19), id: 'D', solubility: 2e19 }])).toEqual([]);
  });

  it('of several levels of one centre is named, two doses or two centres are not', () => {
    const level = (depth: number, more: Partial<Dopant>): Dopant => ({ ...doped('donor', 1e16, depth), ...more });
    const expected = ['body: the levels of S belong to one centre, but are counted as independent of each other'];
    expect(one([level(0.1, { id: 'S' }), level(0.3, { id: 'S' })])).toEqual(expected);
    expect(one([level(0.1, { id: 'S0', centre: 'S' }), level(0.3, { id: 'S1', centre: 'S' })])).toEqual(expected);
    expect(one([level(0.1, { id: 'S', centre: 'S' }), { ...doped('acceptor', 1e15, 0.1), id: 'S-', centre: 'S' }])).toEqual(expected);
    expect(one([level(0.1, { id: 'S' }), level(0.1, { id: 'S' })])).toEqual([]);
    expect(one([level(0.1, { id: 'S' }), level(0.3, { id: 'T' })])).toEqual([]);
    expect(one([level(0.1, { centre: 'S' }), level(0.3, { centre: 'T' })])).toEqual([]);
    expect(one([level(0.1, {}), level(0.3, {})])).toEqual([]);
    expect(one([level(0.1, { id: 'S' }), { ...doped('donor', 0, 0.3), id: 'S' }])).toEqual([]);
    expect(warnings([layer('a', 300, [level(0.1, { id: 'S' })]), layer('b', 300, [level(0.3, { id: 'S' })])])).toEqual([]);
  });

  it('with a model that lacks its parameters is named', () => {
    expect(one([doped('donor', 1e16, 0.045, 'merging')])).toEqual([expect.stringContaining('no parameters for "merging"')]);
    expect(one([doped('donor', 1e16, 0.045, 'screened')])).toEqual([expect.stringContaining('no parameters for "screened"')]);
    expect(one([{ ...doped('donor', 1e16, 0.045, 'merging'), merging: { depthReference: 1e18, depthExponent: 1, boundReference: 1e18, boundExponent: 2 } }])).toEqual([]);
  });
});

describe('laws outside their range', () => {
  const known: CrystalMaterial = { ...CRYSTAL, validity: { temperature: [77, 400], doping: [1e14, 1e19] } };

  it('are named for the temperature and for the doping', () => {
    expect(one([doped('donor', 1e17)], known)).toEqual([]);
    expect(one([doped('donor', 1e17)], known, { T: 77 })).toEqual([]);
    expect(one([doped('donor', 1e17)], known, { T: 450 })).toEqual(['body: 450 K is outside the 77 to 400 K in which the laws of test-crystal are known; they are extrapolated']);
    expect(one([doped('donor', 1e17)], known, { T: 60 })).toHaveLength(1);
    expect(one([doped('donor', 8e18), doped('donor', 8e18)], known)).toEqual(['body: doping of 1.6e+19 cm^-3 is outside the 1.0e+14 cm^-3 to 1.0e+19 cm^-3 in which the laws of test-crystal are known; they are extrapolated']);
    expect(one([doped('donor', 1e13)], known)).toHaveLength(1);
    expect(one([], known)).toEqual([]);
  });

  it('of an alloy are its own and those of the ends that it holds', () => {
    const alloy: AlloyMaterial = { id: 'mixed', first: known, second: { ...CRYSTAL, id: 'other' }, bowing: {} };
    const at = (x: number, material = alloy) => warnings([{ ...layer('body', 500, [doped('donor', 1e17)], material), x: { kind: 'constant', value: x } }], { T: 450 });
    expect(at(0.3)).toHaveLength(1);
    expect(at(1)).toEqual([]);
    expect(at(1, { ...alloy, validity: { temperature: [100, 300] } })).toEqual([expect.stringContaining('laws of mixed')]);
  });
});

describe('narrowing', () => {
  const slotboom: NarrowingLaw = { law: 'slotboom', energy: 0.009, reference: 1e17, constant: 0.5, conductionShare: 0.5 };
  const jain: NarrowingLaw = { law: 'jain-roulston', donor: { third: 0.0102, quarter: 0.013, half: 0.0014 }, acceptor: { third: 0.011, quarter: 0.016, half: 0.001 }, conductionShare: 0.5 };
  const apparent: CrystalMaterial = { ...CRYSTAL, id: 'apparent', narrowing: slotboom };
  const proper: CrystalMaterial = { ...CRYSTAL, id: 'proper', narrowing: jain };
  const on = { assumptions: { narrowing: true } };

  it('that was fitted with Boltzmann statistics is named with Fermi-Dirac only, and only where something is doped', () => {
    expect(one([doped('donor', 1e18)], apparent, on)).toEqual(['body: the narrowing of apparent was fitted with Boltzmann statistics and counts degeneracy twice with Fermi-Dirac']);
    expect(one([doped('donor', 1e18)], apparent)).toEqual([]);
    expect(one([doped('donor', 1e18)], apparent, { assumptions: { narrowing: true, statistics: 'boltzmann' } })).toEqual([expect.stringMatching(/^Boltzmann/)]);
    expect(one([], apparent, on)).toEqual([]);
  });

  it('of the many-body kind goes with Fermi-Dirac', () => {
    expect(one([doped('donor', 1e18)], proper, on)).toEqual([]);
  });

  it('of an alloy counts the ends that it holds', () => {
    const alloy: AlloyMaterial = { id: 'mixed', first: proper, second: apparent, bowing: {} };
    const at = (x: number) => warnings([{ ...layer('body', 500, [doped('donor', 1e18)], alloy), x: { kind: 'constant', value: x } }], on);
    expect(at(0)).toEqual([]);
    expect(at(0.4)).toEqual([expect.stringContaining('narrowing of apparent')]);
    expect(at(1)).toHaveLength(1);
  });

  it('that is asked for where no law is known is named', () => {
    expect(one([doped('donor', 1e18)], CRYSTAL, on)).toEqual(['body: no narrowing law is known for test-crystal; its gap is left as it is']);
  });
});

describe('contacts', () => {
  const tunnelling: CrystalMaterial = { ...CRYSTAL, tunnellingMass: { electron: 0.26 } };
  const metal: Boundary = { kind: 'barrier', source: { from: 'workFunction', workFunction: 4.6, slope: 'material' }, metal: 'M', imageForce: false };

  it('say where the field leaves the image force no meaning, however cold it is', () => {
    expect(one([doped('donor', 5e20, 0, 'complete')], tunnelling, { top: barrier(0.6) })).toEqual([expect.stringMatching(/^top contact: the field is so high that the image-force .* highest 0\.\d\d nm from the metal, less than atoms lie apart$/)]);
    expect(one([doped('donor', 5e20, 0, 'complete')], tunnelling, { bottom: barrier(0.6) })).toEqual([expect.stringMatching(/^bottom contact/)]);
    expect(one([doped('donor', 1e19, 0, 'complete')], tunnelling, { top: barrier(0.6) })).toEqual([]);
    expect(one([doped('donor', 5e20, 0, 'complete')], tunnelling, { top: { ...barrier(0.6), imageForce: false } as Boundary })).toEqual([]);
    // E00 is many kT there, but the field is that of any light doping.
    expect(one([doped('donor', 1e16, 0, 'complete')], tunnelling, { top: barrier(0.6), T: 4.2 })).toEqual([]);
    // A barrier below the band fills the surface: nothing is lowered there.
    expect(one([doped('donor', 5e20, 0, 'complete')], tunnelling, { top: barrier(-0.6) })).toEqual([]);
  });

  it('say where nothing is known of the pinning', () => {
    expect(one([doped('donor', 1e16)], CRYSTAL, { top: metal })).toEqual(['top contact: how strongly test-crystal pins a metal is not known; its barrier is the ideal one (S = 1)']);
    expect(one([doped('donor', 1e16)], { ...CRYSTAL, pinningSlope: 0.3, neutralityLevel: 0.4 }, { top: metal })).toEqual([]);
    expect(one([doped('donor', 1e16)], CRYSTAL, { top: { ...metal, source: { from: 'workFunction', workFunction: 4.6, slope: 1 } } as Boundary })).toEqual([]);
  });

  it('say where measured contacts lie decades away from the barrier picture, with the published band, and only for that type', () => {
    const odd: CrystalMaterial = { ...CRYSTAL, outsideContactModel: { carrier: 'p', low: 1.1e-6, high: 0.052, source: 'an author (2019)' } };
    const barrier = { top: { kind: 'barrier', source: { from: 'given', carrier: 'p', height: 0.6 }, metal: null, imageForce: false } } as const;
    expect(one([doped('acceptor', 1e17)], odd, barrier)).toEqual([expect.stringMatching(/^top contact: mechanism outside the model.*p-type.*1\.1e-6 and 5\.2e-2 ohm cm\^2 \(an author \(2019\)\)/)]);
    expect(one([doped('donor', 1e17)], odd, barrier)).toEqual([]);
    expect(one([doped('acceptor', 1e17)], odd)).toEqual([]);
  });
});

describe('bands', () => {
  it('that confine carriers are named with their layer, wide ones are not', () => {
    const wide: CrystalMaterial = { ...CRYSTAL, id: 'wide', gap: { zeroK: 1.6, alpha: 4.73e-4, beta: 636 }, affinity: 3.8 };
    const around = (thickness: number, mass: number) =>
      warnings([layer('b1', 100, [doped('donor', 1e17)], wide), layer('well', thickness, [doped('donor', 1e17)], { ...CRYSTAL, id: 'narrow', electronMass: [mass] }), layer('b2', 100, [doped('donor', 1e17)], wide)]);
    expect(around(8, 0.067)).toEqual([expect.stringMatching(/^well: its electrons are confined \(levels about \d+ meV apart/)]);
    expect(around(300, 1.09)).toEqual([]);
  });

  it('of a thin layer depleted throughout are named', () => {
    expect(warnings([layer('p', 300, [doped('acceptor', 1e18)]), layer('n', 40, [doped('donor', 1e17)]), layer('p2', 300, [doped('acceptor', 1e18)])])).toEqual([expect.stringMatching(/^n is fully depleted/)]);
  });
});
