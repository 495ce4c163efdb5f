import { describe, expect, it } from 'vitest';
import { ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { CrystalMaterial, Layer, Stack } from '../../solver/stack.ts';
import { CRYSTAL } from './poisson-fixtures.ts';
import { expectSound } from './invariants.ts';
import { barrier, doped, layer, stackOf, SYMMETRIC } from './stack-fixtures.ts';

const EPS = 11.7 * EPSILON_0;
const KT = 8.617333262e-5 * 300;
const donors = (n: number) => [doped('donor', n, 0, 'complete')];
const acceptors = (n: number) => [doped('acceptor', n, 0, 'complete')];
const junctions = (layers: Layer[], options: Parameters<typeof stackOf>[1] = {}, accuracy = 1e-5) => expectSound(solveStack(stackOf(layers, options), { accuracy }), accuracy).junctions;
const capacitances = (stack: Stack) => expectSound(solveStack(stack)).junctions.map((j) => j.capacitance);
/** Abrupt junction with the majority tails kept: sqrt(q eps Na Nd/[2 (Na + Nd) (Vbi - 2kT/q)]). */
const textbook = (na: number, nd: number, V: number): number => Math.sqrt((ELEMENTARY_CHARGE * EPS * na * nd) / (2 * (na + nd) * (V - 2 * KT)));

describe('the capacitance of a junction at zero bias', () => {
  it('is that of the first integral where both sides are doped alike', () => {
    const [j] = junctions([layer('p', 500, acceptors(1e17)), layer('n', 500, donors(1e17))], { assumptions: { statistics: 'boltzmann' } });
    expect(Math.abs(j.capacitance! / textbook(1e17, 1e17, j.builtIn!) - 1)).toBeLessThan(1e-4);
  });

  it('of a one-sided junction lies within 3 % of the textbook form, and above it by the spill-over of the heavy side', () => {
    const [j] = junctions([layer('p', 300, acceptors(1e18)), layer('n', 2000, donors(1e16))], { assumptions: { statistics: 'boltzmann' } });
    const ratio = j.capacitance! / Math.sqrt((ELEMENTARY_CHARGE * EPS * 1e16) / (2 * (j.builtIn! - 2 * KT)));
    expect(ratio).toBeGreaterThan(1);
    expect(ratio).toBeLessThan(1.03);
  });

  it('is the derivative of the solved charge: two junctions of nearly the same built-in potential differ by C dV', () => {
    // With equal bands and doping, more of the same gap is more voltage across the same junction: Q(V) at two gaps, C between them.
    const at = (gap: number) => {
      const m: CrystalMaterial = { ...SYMMETRIC, gap: { zeroK: gap, alpha: 0, beta: 1 } };
      const s = expectSound(solveStack(stackOf([layer('p', 700, acceptors(3e16), m), layer('n', 700, donors(3e16), m)]), { accuracy: 1e-6 }), 1e-6);
      return { V: s.junctions[0].builtIn!, Q: EPS * s.junctions[0].peakField, C: s.junctions[0].capacitance! };
    };
    const [a, b, c] = [at(1.09), at(1.1), at(1.11)];
    expect(Math.abs((c.Q - a.Q) / (c.V - a.V) / b.C - 1)).toBeLessThan(2e-3);
  });

  it('takes the permittivity of each side of a heterojunction', () => {
    const other: CrystalMaterial = { ...CRYSTAL, id: 'other', permittivity: 20 };
    const [j] = junctions([layer('p', 500, acceptors(1e17)), layer('n', 700, donors(1e17), other)], { assumptions: { statistics: 'boltzmann' } });
    // Depletion approximation of an abrupt heterojunction, C = sqrt(q Na Nd e1 e2/[2 (e1 Nd' + e2 Na') V]) with V less 2kT/q (Anderson 1962; from memory).
    const [e1, e2] = [11.7 * EPSILON_0, 20 * EPSILON_0];
    const expected = Math.sqrt((ELEMENTARY_CHARGE * e1 * e2 * 1e17) / (2 * (e1 + e2) * (j.builtIn! - 2 * KT)));
    expect(Math.abs(j.capacitance! / expected - 1)).toBeLessThan(0.01);
  });

  it('counts each of two junctions by itself where a neutral layer parts them, in either order', () => {
    const p = layer('p', 300, acceptors(1e18));
    const n = layer('n', 1500, donors(1e16));
    const [alone] = capacitances(stackOf([p, n]));
    const both = capacitances(stackOf([p, n, { ...p, name: 'p2' }]));
    const [turned] = capacitances(stackOf([n, p]));
    for (const c of [...both, turned]) expect(Math.abs(c! / alone! - 1)).toBeLessThan(2e-3);
  });

  it('grows with temperature, as the built-in potential falls', () => {
    const at = (T: number) => capacitances(stackOf([layer('p', 300, acceptors(1e18)), layer('n', 1500, donors(1e16))], { T }))[0]!;
    expect(at(77)).toBeLessThan(at(300));
    expect(at(300)).toBeLessThan(at(400));
  });

  it('has no meaning between sides of one kind, beside an oxide, and where no neutral side is left', () => {
    expect(capacitances(stackOf([layer('n+', 100, donors(1e19)), layer('n', 1000, donors(1e16))]))).toEqual([null]);
    const oxide: CrystalMaterial = { ...CRYSTAL, id: 'oxide', insulator: true, gap: { zeroK: 8.9, alpha: 0, beta: 1 }, affinity: 0.95, permittivity: 3.9, electronMass: undefined, holeMass: undefined };
    expect(capacitances(stackOf([layer('oxide', 3, [], oxide), layer('p', 1000, acceptors(1e17))], { top: barrier(2.5) }))).toEqual([null]);
    expect(capacitances(stackOf([layer('p', 200, acceptors(1e18)), layer('n', 50, donors(1e17)), layer('p2', 200, acceptors(1e18))]))).toEqual([null, null]);
  });

  it('of an undoped layer between p and n is that of its thickness and of the charge beyond it', () => {
    const [above, below] = capacitances(stackOf([layer('p', 200, acceptors(1e19)), layer('i', 400, []), layer('n', 200, donors(1e19))]));
    expect(Math.abs(above! / below! - 1)).toBeLessThan(1e-9);
    // Carriers that spill into the undoped layer stand closer than its thickness.
    expect(above! / (EPS / 400e-7)).toBeGreaterThan(1);
    expect(above! / (EPS / 400e-7)).toBeLessThan(1.4);
  });

  it('does not change where a layer is split in two inside its depletion', () => {
    const [whole] = capacitances(stackOf([layer('p', 300, acceptors(1e18)), layer('n', 2000, donors(1e16))]));
    const split = capacitances(stackOf([layer('p', 300, acceptors(1e18)), layer('n1', 100, donors(1e16)), layer('n2', 1900, donors(1e16))]));
    expect(Math.abs(split[0]! / whole! - 1)).toBeLessThan(1e-3);
    // The cut is no junction.
    expect(split[1]).toBeNull();
  });
});
