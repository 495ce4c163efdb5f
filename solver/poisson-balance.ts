import { ELEMENTARY_CHARGE } from './constants.ts';
import type { PoissonSystem } from './poisson-system.ts';

/** Below this sheet charge, cm^-2 (a field of some 15 V/cm), Gauss's law is held against this instead: a flat stack has no charge of its own. */
const LEAST_SHEET = 1e8;
/**
 * A potential is known to its last digit, and that moves the charge of a doped layer by eps |psi|/kT of its doping: no balance finer than
 * this can be asked of a flat stack, whatever its size. In units of the accepted share, 1e-6; never below 1e-8, the rounding of the sum itself.
 */
const LAST_DIGIT_SHARE = 2.2e-16 / 1e-6;
const ROUNDING_SHARE = 1e-8;

/**
 * Gauss's law over the stack and over each layer: what flows out of a layer less the charge that it holds, as a share of the largest
 * sheet charge (that of any layer's electrons, holes or dopants apart from neutral background, or any interface sheet).
 */
export function gaussError(system: PoissonSystem, psi: Float64Array): number {
  const { mesh, conductance, density, weights } = system;
  let open = 0;
  let largest = 0;
  let uncertain = 0;
  mesh.local.forEach((z, l) => {
    const first = mesh.first[l];
    const last = first + z.length - 1;
    const { kT } = system.charges[first + l].bands;
    const share = Math.max(ROUNDING_SHARE, (LAST_DIGIT_SHARE * Math.max(Math.abs(psi[first]), Math.abs(psi[last]))) / kT);
    let inner = 0;
    let absolute = 0;
    for (let k = 1; k + 1 < z.length; k++) {
      const s = first + l + k;
      inner += weights[3 * s] * density[s - 1] + weights[3 * s + 1] * density[s] + weights[3 * s + 2] * density[s + 1];
      const box = 0.5 * (z[k + 1] - z[k - 1]);
      for (const level of system.charges[s].levels) uncertain += share * ELEMENTARY_CHARGE * level.density * box;
      absolute += Math.abs(density[s]) * box;
    }
    // Displacement (-eps dpsi/dz) in the first and the last cell of the layer encloses its inner rows.
    const above = -conductance[first] * (psi[first + 1] - psi[first]);
    const below = -conductance[last - 1] * (psi[last] - psi[last - 1]);
    open = Math.max(open, Math.abs(below - above - inner));
    largest = Math.max(largest, absolute, Math.abs(above), Math.abs(below));
  });
  // Over the stack the rows of the interfaces and their sheets count too: all inner residuals together.
  let stack = 0;
  for (let i = 1; i + 1 < mesh.nodes; i++) stack += system.residual[i];
  open = Math.max(open, Math.abs(stack));
  return open / Math.max(largest, ELEMENTARY_CHARGE * LEAST_SHEET, uncertain);
}
