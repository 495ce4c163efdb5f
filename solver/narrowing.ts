import type { NarrowingLaw } from './stack.ts';

/** Density to which the coefficients of the Jain-Roulston form refer, cm^-3. */
const JAIN_REFERENCE = 1e18;

/**
 * Band-gap narrowing by doping.
 *
 * @param donors     active donors, cm^-3, >= 0
 * @param acceptors  active acceptors, cm^-3, >= 0
 * @returns          fall of the gap, eV, >= 0; the law's `conductionShare` of it lowers Ec
 *
 * Both laws take the sum of all active dopants. In a layer that holds both kinds the Jain-Roulston coefficients are weighted by
 * each kind's share of that sum, so that a layer graded from one kind to the other meets no step.
 *
 * Sources: Slotboom and de Graaff, Solid-State Electron. 19, 857 (1976), eq. (9); Jain and Roulston, Solid-State Electron. 34, 453
 * (1991), closed form in powers 1/3, 1/4 and 1/2 (equation numbers from memory). The first is an apparent narrowing, fitted with Boltzmann statistics;
 * the second is the true one, to be used with Fermi-Dirac. Checked: test/solver/narrowing.test.ts.
 */
export function narrowing(law: NarrowingLaw, donors: number, acceptors: number): number {
  const total = donors + acceptors;
  if (!(total > 0)) return 0;
  if (law.law === 'slotboom') {
    const l = Math.log(total / law.reference);
    const root = Math.sqrt(l * l + law.constant);
    // For l < 0 the sum cancels; its conjugate does not.
    return law.energy * (l >= 0 ? l + root : law.constant / (root - l));
  }
  const share = donors / total;
  const mixed = (part: 'third' | 'quarter' | 'half'): number => share * law.donor[part] + (1 - share) * law.acceptor[part];
  const r = total / JAIN_REFERENCE;
  return Math.max(0, mixed('third') * Math.cbrt(r) + mixed('quarter') * Math.sqrt(Math.sqrt(r)) + mixed('half') * Math.sqrt(r));
}
