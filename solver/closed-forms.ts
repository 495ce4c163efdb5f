import { BOLTZMANN } from './constants.ts';

export interface ClosedForm {
  /** ohm cm^2; Infinity beyond the largest number */ rhoC: number;
  form: 'thermionic' | 'thermionic-field' | 'field';
}

/** Below this E00/kT thermionic emission rules (common practice, no source). */
const THERMIONIC = 0.5;
/** The field form needs c1 kT below 1; near 1 its two terms grow without bound against each other. */
const FIELD = 0.9;

/**
 * Specific contact resistivity at zero bias by the closed forms, in the depletion approximation and without image force. Padovani and Stratton, Solid-State
 * Electron. 9, 695 (1966); Yu, Solid-State Electron. 13, 239 (1970).
 *
 * @param barrier     phi_B, eV
 * @param edge        band edge of the neutral layer from EF, eV: Ec - EF for electrons, EF - Ev for holes; negative when degenerate
 * @param e00         eV
 * @param constant    A*, A/(cm^2 K^2)
 * @param temperature K
 *
 * With psi = phi_B - edge, the exponent at E = edge + z psi is (psi/E00) [sqrt(1-z) - z artanh sqrt(1-z)], its slope -artanh(sqrt(1-z))/E00.
 * - thermionic, E00 < kT/2 or no barrier above EF: k/(A T)/ln[1 + exp(-phi_B/kT)], the usual k/(A T) exp(phi_B/kT) where phi_B is some kT;
 * - field, where EF lies in the band and the slope at EF, c1, is below 1/kT: the exponent's straight line at EF over the occupancy, less what lies below the
 *   band: k^2/A exp(exponent at EF)/[pi kT/sin(pi c1 kT) - exp(c1 edge)/c1]; and where a layer is not degenerate but so cold that its carriers keep to the band's
 *   edge, with the slope c1 at kT above it: k^2/A exp(exponent there) (1 - c1 kT)/kT exp(c1 kT + edge/kT);
 * - thermionic-field, else: the parabola at the energy edge + psi/cosh^2(E00/kT), where the slope is 1/kT:
 *   k^2/A cosh(E00/kT)/(2 sqrt(pi E00 psi tanh(E00/kT))) exp(psi/E0 + edge/kT), E0 = E00 coth(E00/kT).
 * Why the thermionic-field form is not the one in print. With b the exponent, T f falls as exp(-b(E) - E/kT); b' = -artanh(s)/E00 with s = sqrt(1 - z), so the peak has s = tanh r,
 * r = E00/kT, and there b'' = cosh^2 r/(2 E00 psi tanh r). The Gauss integral over it, sqrt(2 pi/b''), is 2 sqrt(pi E00 psi tanh r)/cosh r, which gives the form above, since dJ/dV at V = 0 is
 * exactly (A/k^2) Int T f dE: both currents count, and T may move with V without moving them apart. As Padovani and Stratton's current J = A T sqrt(pi E00 psi)/(k cosh r) exp(-psi/E0 - edge/kT)
 * stands in print (from memory), the Gauss integral is taken as half of that, with tanh r = 1; and Yu's resistivity kT/(A T^2) sqrt(E00/(pi psi)) cosh r coth r exp(..) (from memory) comes of its forward
 * part alone, which grows as exp(V/E0), not as exp(V/kT). So it is 2 r/sqrt(tanh r) times this, 1.5 at r = 0.5 and 4.1 at r = 2. The integral through the parabola decides
 * (test/solver/checks-rho-c.test.ts): this form lies within 0.7 to 1 of it.
 */
export function closedFormResistivity(barrier: number, edge: number, e00: number, constant: number, temperature: number): ClosedForm {
  const kT = BOLTZMANN * temperature;
  const psi = barrier - edge;
  const ratio = e00 / kT;
  // Below EF the exponential alone would conduct better than the band has states.
  if (ratio < THERMIONIC || psi <= 0 || barrier <= 0) return { rhoC: BOLTZMANN / (constant * temperature) / logOnePlusExp(-Math.max(barrier, edge) / kT), form: 'thermionic' };
  const front = BOLTZMANN ** 2 / constant;
  const degenerate = edge < 0;
  const z = (degenerate ? -edge : kT) / psi;
  if (z < 1) {
    const s = Math.sqrt(1 - z);
    const slope = Math.atanh(s) / e00;
    const exponent = (psi / e00) * (s - z * Math.atanh(s));
    if (slope * kT < FIELD) {
      const sum = degenerate ? (Math.PI * kT) / Math.sin(Math.PI * slope * kT) - Math.exp(slope * edge) / slope : (kT / (1 - slope * kT)) * Math.exp(-slope * kT - edge / kT);
      return { rhoC: (front * Math.exp(exponent)) / sum, form: 'field' };
    }
  }
  const th = Math.tanh(ratio);
  // ln(2 cosh) without overflow: at 4 K E00/kT reaches hundreds.
  const logCosh = ratio + Math.log1p(Math.exp(-2 * ratio)) - Math.LN2;
  const log = logCosh - Math.log(2 * Math.sqrt(Math.PI * e00 * psi * th)) + (psi * th) / e00 + edge / kT;
  return { rhoC: front * Math.exp(log), form: 'thermionic-field' };
}

function logOnePlusExp(u: number): number {
  return u > 0 ? u + Math.log1p(Math.exp(-u)) : Math.log1p(Math.exp(u));
}

/**
 * Saturation current density of thermionic emission, A T^2 exp(-phi/kT), A/cm^2; e.g. Sze and Ng, Physics of Semiconductor Devices (2007), section 3.3.1.
 *
 * @param barrier  eV, lowered already
 */
export function saturationCurrent(barrier: number, constant: number, temperature: number): number {
  return constant * temperature * temperature * Math.exp(-barrier / (BOLTZMANN * temperature));
}
