import type { CrystalMaterial, Dopant } from '../../solver/stack.ts';

/** An invented crystal with round figures near silicon's. */
export const CRYSTAL: CrystalMaterial = {
  id: 'test-crystal',
  insulator: false,
  gap: { zeroK: 1.17, alpha: 4.73e-4, beta: 636 },
  affinity: 4.05,
  affinityShare: 0.5,
  permittivity: 11.7,
  permittivityHighFrequency: 11.7,
  electronMass: [1.09],
  holeMass: [1.15],
  tunnellingMass: { electron: 0.3, hole: 0.2 },
  richardson: { electron: 110, hole: 80 },
};

/** Donors that are charged whatever the Fermi level. */
export function completeDonor(concentration: number): Dopant {
  return { id: null, kind: 'donor', concentration: { kind: 'constant', value: concentration }, activation: 1, compensation: 0, depth: 0.045, degeneracy: 2, model: 'complete' };
}
