import type { Dopant } from './stack.ts';

/** Depth and share of bound states of one level at a given concentration. */
export interface LevelInForce {
  /** below Ec (donor) or above Ev (acceptor), eV, >= 0 for shallow dopants */ depth: number;
  /** b: share of the dopants that keep a bound state, 0..1 */ bound: number;
}

/**
 * Level in force at the row's own local active concentration.
 *
 * @param N  active concentration of this row here, cm^-3, >= 0
 *
 * - "dilute": depth as given, b = 1.
 * - "merging": dE = dE0/[1 + (N/Nref)^c], b = 1/[1 + (N/Nb)^d]; Altermatt, Schenk et al., J. Appl. Phys. 100, 113714 and 113715 (2006).
 * - "screened": dE = max(0, dE0 - a N^(1/3)), Pearson and Bardeen, Phys. Rev. 75, 865 (1949; from memory); b = 1/[1 + (N/N_Mott)^d], the form of
 *   Altermatt et al. put at the Mott density.
 * - "complete": b = 0.
 * A row that asks for a model without its parameters is taken as dilute.
 */
export function levelInForce(d: Dopant, N: number): LevelInForce {
  if (d.model === 'complete') return { depth: d.depth, bound: 0 };
  if (d.model === 'merging' && d.merging) {
    const m = d.merging;
    return {
      depth: d.depth / (1 + Math.pow(N / m.depthReference, m.depthExponent)),
      bound: 1 / (1 + Math.pow(N / m.boundReference, m.boundExponent)),
    };
  }
  if (d.model === 'screened' && d.screened) {
    const s = d.screened;
    return {
      depth: Math.max(0, d.depth - s.coefficient * Math.cbrt(N)),
      bound: 1 / (1 + Math.pow(N / s.mottDensity, s.boundExponent)),
    };
  }
  return { depth: d.depth, bound: 1 };
}

/**
 * ln of the share of bound states that are filled (neutral): -ln(1 + exp(u)/g), for u the level's distance from EF over kT, positive
 * when it prefers to be charged: (E_D - EF)/kT for a donor, (EF - E_A)/kT for an acceptor.
 */
export function logNeutralShare(u: number, logG: number): number {
  const v = u - logG;
  return v > 0 ? -v - Math.log1p(Math.exp(-v)) : -Math.log1p(Math.exp(v));
}
