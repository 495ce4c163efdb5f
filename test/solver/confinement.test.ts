import { describe, expect, it } from 'vitest';
import { confinedPockets } from '../../solver/confinement.ts';
import { ELECTRON_MASS, ELEMENTARY_CHARGE, PLANCK } from '../../solver/constants.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { Boundary, CrystalMaterial, Stack } from '../../solver/stack.ts';
import { CRYSTAL } from './poisson-fixtures.ts';
import { expectSound } from './invariants.ts';
import { barrier, doped, layer, stackOf } from './stack-fixtures.ts';

const HBAR = PLANCK / (2 * Math.PI);
const LIGHT: CrystalMaterial = { ...CRYSTAL, id: 'light', gap: { zeroK: 1.42, alpha: 0, beta: 1 }, affinity: 4.07, permittivity: 12.9, electronMass: [0.067], holeMass: [0.5] };
const WIDE: CrystalMaterial = { ...LIGHT, id: 'wide', gap: { zeroK: 1.8, alpha: 0, beta: 1 }, affinity: 3.84, electronMass: [0.09] };
const FREE: Boundary = { kind: 'open', sheetCharge: 0 };
const donors = (n: number) => [doped('donor', n, 0, 'complete')];
const acceptors = (n: number) => [doped('acceptor', n, 0, 'complete')];
const pockets = (stack: Stack) => confinedPockets(stack, expectSound(solveStack(stack)).profiles);

describe('confinement', () => {
  it('in a thin free-standing film has the levels of a box', () => {
    const [found, ...others] = pockets(stackOf([layer('film', 5, donors(1e18), LIGHT)], { top: FREE, bottom: FREE }));
    // E2 - E1 = 3 (pi hbar/L)^2/2m, exact between two walls.
    const box = (3 * (Math.PI * HBAR) ** 2) / (2 * 0.067 * ELECTRON_MASS * 25e-18) / ELEMENTARY_CHARGE;
    expect(others).toEqual([]);
    expect(found).toMatchObject({ layer: 0, carrier: 'electron' });
    expect(Math.abs(found.spacing / box - 1)).toBeLessThan(0.01);
  });

  it('of an inversion layer lies near that of the triangle of its surface field', () => {
    const oxide: CrystalMaterial = { ...CRYSTAL, id: 'oxide', insulator: true, gap: { zeroK: 8.9, alpha: 0, beta: 1 }, affinity: 0.95, permittivity: 3.9, electronMass: undefined, holeMass: undefined };
    const s = expectSound(solveStack(stackOf([layer('oxide', 3, [], oxide), layer('channel', 1000, acceptors(1e17))], { top: barrier(2.9) })));
    const at = s.profiles.layer.indexOf(1);
    const field = Math.abs(s.profiles.field[at]) * 100;
    // Zeros of the Airy function 2.338 and 4.088 times (hbar^2 (q F)^2/2m)^(1/3); the field falls inward, so the true spacing is smaller.
    const triangle = ((4.088 - 2.338) * Math.cbrt((HBAR * ELEMENTARY_CHARGE * field) ** 2 / (2 * 1.09 * ELECTRON_MASS))) / ELEMENTARY_CHARGE;
    const [found] = confinedPockets(s.stack, s.profiles);
    expect(found).toMatchObject({ layer: 1, carrier: 'electron' });
    expect(found.spacing / triangle).toBeLessThan(1);
    expect(found.spacing / triangle).toBeGreaterThan(0.5);
  });

  it('is found in a narrow well that holds electrons, and for holes where it holds those', () => {
    const well = (dopants: ReturnType<typeof donors>) => pockets(stackOf([layer('b1', 100, dopants, WIDE), layer('well', 8, dopants, LIGHT), layer('b2', 100, dopants, WIDE)]));
    expect(well(donors(1e17)).map((f) => [f.layer, f.carrier])).toEqual([[1, 'electron']]);
    expect(well(acceptors(1e17)).map((f) => [f.layer, f.carrier])).toEqual([[1, 'hole']]);
  });

  it('is found in the channel of a modulation-doped pair', () => {
    const stack = stackOf([layer('supply', 40, donors(2e18), WIDE), layer('spacer', 3, [], WIDE), layer('channel', 1000, acceptors(1e14), LIGHT)], { top: barrier(0.85) });
    expect(pockets(stack).map((f) => f.layer)).toContain(2);
  });

  it('is found in wider pockets the colder it is', () => {
    const at = (T: number) => pockets(stackOf([layer('p1', 100, acceptors(1e18)), layer('n', 60, donors(2e18)), layer('p2', 100, acceptors(1e18))], { T })).map((f) => f.layer);
    expect(at(300)).toEqual([]);
    expect(at(20)).toEqual([1]);
  });

  it('is not found in junctions, wide layers, an ohmic end or an empty well', () => {
    expect(pockets(stackOf([layer('p', 300, acceptors(1e18)), layer('n', 1000, donors(1e16))]))).toEqual([]);
    expect(pockets(stackOf([layer('p1', 300, acceptors(1e18)), layer('n', 1000, donors(1e16)), layer('p2', 300, acceptors(1e18))]))).toEqual([]);
    expect(pockets(stackOf([layer('film', 1000, donors(1e18), LIGHT)], { top: FREE, bottom: FREE }))).toEqual([]);
    expect(pockets(stackOf([layer('n+', 10, donors(1e20), LIGHT), layer('n', 1000, donors(1e16), LIGHT)]))).toEqual([]);
    // The conduction band of a p-type double barrier is a well as well, but nothing is in it.
    expect(pockets(stackOf([layer('b1', 100, acceptors(1e17), WIDE), layer('well', 8, [], LIGHT), layer('b2', 100, acceptors(1e17), WIDE)])).filter((f) => f.carrier === 'electron')).toEqual([]);
  });
});
