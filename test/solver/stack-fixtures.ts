import type { Assumptions, Boundary, CrystalMaterial, Dopant, Interface, Layer, Stack } from '../../solver/stack.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import { CRYSTAL } from './poisson-fixtures.ts';

export const ASSUMPTIONS: Assumptions = { statistics: 'fermi-dirac', alignment: 'affinity', narrowing: false, nonParabolic: false, transmission: 'wkb' };

export function doped(kind: 'donor' | 'acceptor', concentration: number, depth = 0.045, model: Dopant['model'] = 'dilute'): Dopant {
  return { id: null, kind, concentration: { kind: 'constant', value: concentration }, activation: 1, compensation: 0, depth, degeneracy: kind === 'donor' ? 2 : 4, model };
}

export function layer(name: string, thickness_nm: number, dopants: Dopant[], material: Layer['material'] = CRYSTAL): Layer {
  return { name, material, x: { kind: 'constant', value: 0 }, thickness: thickness_nm * CM_PER_NM, dopants };
}

export function stackOf(layers: Layer[], options: { T?: number; top?: Boundary; bottom?: Boundary; interfaces?: Interface[]; assumptions?: Partial<Assumptions>; crystal?: Stack['crystal'] } = {}): Stack {
  return {
    layers,
    interfaces: options.interfaces ?? [],
    top: options.top ?? { kind: 'neutral' },
    bottom: options.bottom ?? { kind: 'neutral' },
    temperature: options.T ?? 300,
    assumptions: { ...ASSUMPTIONS, ...options.assumptions },
    crystal: options.crystal,
  };
}

export function barrier(height: number, carrier: 'n' | 'p' = 'n'): Boundary {
  return { kind: 'barrier', source: { from: 'given', carrier, height }, metal: null, imageForce: true };
}

/** Equal masses and a gap that moves evenly with T: electrons and holes are each other's mirror image. */
export const SYMMETRIC: CrystalMaterial = { ...CRYSTAL, id: 'symmetric', gap: { zeroK: 1.1, alpha: 0, beta: 1 }, affinity: 4, electronMass: [1], holeMass: [1] };
