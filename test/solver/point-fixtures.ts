import { expect } from 'vitest';
import { densityOfStates } from '../../solver/bands.ts';
import type { Assumptions, CrystalMaterial, Dopant, Layer } from '../../solver/stack.ts';

/** Fermi-Dirac, parabolic, no narrowing. */
export const PLAIN: Assumptions = { statistics: 'fermi-dirac', alignment: 'offsets', narrowing: false, nonParabolic: false, transmission: 'wkb' };
export const BOLTZMANN_STATISTICS: Assumptions = { ...PLAIN, statistics: 'boltzmann' };

/** Mass whose density of states is `n` (cm^-3) at T. */
export function massFor(n: number, T: number): number {
  return Math.pow(n / densityOfStates(1, T), 2 / 3);
}

/** A crystal with a gap that does not move and the given densities of states at T (they scale as T^1.5). */
export function crystalWith(gap: number, nc: number, nv: number, T = 300): CrystalMaterial {
  return {
    id: 'stated',
    insulator: false,
    gap: { zeroK: gap, alpha: 0, beta: 1 },
    affinity: 4,
    affinityShare: 0.5,
    permittivity: 11.7,
    permittivityHighFrequency: 11.7,
    electronMass: [massFor(nc, T)],
    holeMass: [massFor(nv, T)],
  };
}

export function dopant(kind: 'donor' | 'acceptor', concentration: number, more: Partial<Dopant> = {}): Dopant {
  return {
    id: null, kind, concentration: { kind: 'constant', value: concentration }, activation: 1, compensation: 0,
    depth: 0.045, degeneracy: kind === 'donor' ? 2 : 4, model: 'dilute', ...more,
  };
}

export function layerOf(material: Layer['material'], dopants: Dopant[], more: Partial<Layer> = {}): Layer {
  return { name: 'layer', material, x: { kind: 'constant', value: 0 }, thickness: 1e-4, dopants, ...more };
}

interface Expected {
  quantity: string;
  value?: number;
  range?: number[];
  tolerance?: { abs?: number; rel?: number; factor?: number };
}

interface Check {
  id: string;
  expected: Expected[];
}

/** Holds a figure against a published one, with that one's own tolerance (any one of abs, rel and factor is enough). */
export function holdAgainst(file: { checks: unknown[] }, id: string, quantity: string, got: number): void {
  const check = (file.checks as Check[]).find((c) => c.id === id);
  const e = check?.expected.find((x) => x.quantity === quantity);
  if (!e) throw new Error(`no check ${id}: ${quantity}`);
  if (e.range) {
    expect(got, `${id}: ${quantity}`).toBeGreaterThanOrEqual(e.range[0]);
    expect(got, `${id}: ${quantity}`).toBeLessThanOrEqual(e.range[1]);
    return;
  }
  const value = e.value ?? NaN;
  if (e.tolerance?.factor !== undefined) {
    expect(Math.abs(Math.log(got / value)), `${id}: ${quantity}: got ${got}, expected ${value} within a factor of ${e.tolerance.factor}`).toBeLessThanOrEqual(Math.log(e.tolerance.factor));
    return;
  }
  const allowed = Math.max(e.tolerance?.abs ?? 0, (e.tolerance?.rel ?? 0) * Math.abs(value));
  expect(Math.abs(got - value), `${id}: ${quantity}: got ${got}, expected ${value} within ${allowed}`).toBeLessThanOrEqual(allowed);
}
