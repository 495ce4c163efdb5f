import type { Quality } from './solution.ts';

/** What an accepted answer has to satisfy. */
export const ACCEPTANCE = {
  /** largest last Newton update, V */ update: 1e-9,
  /** largest open share of Gauss's law, of the largest sheet charge */ gauss: 1e-6,
  /** default of the accepted estimate of the mesh error in psi, V */ meshError: 1e-4,
} as const;

/** Why an answer is not accepted, in words; null when it is. */
export function refusalReason(quality: Quality, accuracy: number): string | null {
  if (!quality.converged) return `Newton's iteration did not settle (last update ${quality.lastUpdate.toExponential(1)} V)`;
  if (!(quality.lastUpdate < ACCEPTANCE.update)) return `the last update of the potential is ${quality.lastUpdate.toExponential(1)} V, more than ${ACCEPTANCE.update} V`;
  if (!(quality.gaussError < ACCEPTANCE.gauss)) return `the charge balance is open by ${quality.gaussError.toExponential(1)} of the largest sheet charge`;
  if (!(quality.meshError <= accuracy)) return `the estimated mesh error ${quality.meshError.toExponential(1)} V stays above ${accuracy} V with ${quality.meshNodes} nodes`;
  return null;
}
