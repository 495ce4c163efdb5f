import { fermiHalfInto } from './fermi-integral.ts';
import { kaneIntegral } from './kane.ts';

/** One carrier's density over its band's density of states, as a logarithm, with its logarithmic slope. */
export interface CarrierLog {
  /** ln F */ log: number;
  /** d ln F/d eta, 0..1 for a parabolic band */ slope: number;
}

/** F_1/2 and its derivative. */
const pair = new Float64Array(2);

/** Below this F_1/2 = exp(eta) to double precision: the next term is exp(2 eta)/2^1.5. */
const NONDEGENERATE = -38;

/**
 * ln of F = n/Nc and its slope.
 *
 * @param eta   (EF - Ec)/kT for electrons, (Ev - EF)/kT for holes; any size
 * @param a     Kane's alpha times kT, >= 0; 0 = parabolic
 * @param boltzmann  exp(eta) in place of the Fermi-Dirac integral
 *
 * F = F_1/2 normalised by Gamma(3/2) (e.g. Blakemore, Solid-State Electron. 25, 1067, 1982, eq. 6; number from memory), or Kane's integral.
 */
export function carrierLog(eta: number, a: number, boltzmann: boolean, out: CarrierLog): void {
  if (a > 0) {
    kaneIntegral(eta, a, boltzmann, out);
    return;
  }
  if (boltzmann || eta < NONDEGENERATE) {
    out.log = eta;
    out.slope = 1;
    return;
  }
  fermiHalfInto(eta, pair);
  out.log = Math.log(pair[0]);
  out.slope = pair[1] / pair[0];
}
