import { compactHalfBelow } from './poisson-weights.ts';
import type { PoissonSystem } from './poisson-system.ts';

/**
 * Displacement -eps dpsi/dz at each node, by side, C/cm^2 [sides]: the one that the scheme itself carries there (the cell's flux plus the charge of the half
 * hat between), so that Gauss's law holds for it too.
 *
 * @param psi  [nodes], V, as last evaluated in `system`
 */
export function displacementsOf(system: PoissonSystem, psi: Float64Array): Float64Array {
  const { mesh, conductance, density, weights, lumped, stretch } = system;
  const out = new Float64Array(density.length);
  const half = new Float64Array(3);
  for (let l = 0; l < mesh.local.length; l++) {
    const z = mesh.local[l];
    const x = system.stretched[l];
    const first = mesh.first[l];
    const m = z.length - 1;
    for (let k = 0; k <= m; k++) {
      const i = first + k;
      const s = i + l;
      // Below the node where there is a cell below, else above it; at a layer's ends the half row is that of the equation itself.
      const end = k === m;
      if (k === 0 || end) for (let j = 0; j < 3; j++) half[j] = weights[3 * s + j];
      else if (lumped[s]) {
        half[0] = half[2] = 0;
        half[1] = 0.5 * (z[k + 1] - z[k]);
      } else {
        compactHalfBelow(x[k] - x[k - 1], x[k + 1] - x[k], half);
        for (let j = 0; j < 3; j++) half[j] *= stretch[s - 1 + j];
      }
      const from = s + (k === 0 ? 0 : end ? -2 : -1);
      const charge = half[0] * density[from] + half[1] * density[from + 1] + half[2] * density[from + 2];
      out[s] = end ? -conductance[i - 1] * (psi[i] - psi[i - 1]) + charge : -conductance[i] * (psi[i + 1] - psi[i]) - charge;
    }
  }
  return out;
}

/** Largest |t^2 (1 - t)^2| is 1/16; an error psi'''' h^4/24 of it bends by psi'''' h^2/12 at the ends of the cell. */
const BEND_TO_ERROR = 1 / 32;

/**
 * How far the cubic through potentials and fields at the two ends of each cell (Hermite), by which everything between nodes is read, may lie off there, V
 * [sides]: a cell's at its upper node. The cubic's own bend at the ends is held against the one that the charge there asks for.
 *
 * @param displacements  `displacementsOf` this psi, [sides]
 */
export function betweenErrors(system: PoissonSystem, psi: Float64Array, displacements: Float64Array): Float64Array {
  const { mesh, density, permittivity, stretch } = system;
  const out = new Float64Array(density.length);
  for (let l = 0; l < mesh.local.length; l++) {
    const x = system.stretched[l];
    const first = mesh.first[l];
    const eps = permittivity[first + l];
    if (system.charges[first + l].bands.insulator) continue;
    for (let k = 0; k + 1 < x.length; k++) {
      const i = first + k;
      const s = i + l;
      const h = x[k + 1] - x[k];
      // In the stretched depth, where eps is even: slope -D/eps(0), bend -rho eps/eps(0)^2; both times h and h^2.
      const a = (-displacements[s] * h) / eps;
      const b = (-displacements[s + 1] * h) / eps;
      const rise = psi[i + 1] - psi[i];
      const scale = (h * h) / eps;
      const above = 6 * rise - 4 * a - 2 * b + scale * density[s] * stretch[s];
      const below = -6 * rise + 2 * a + 4 * b + scale * density[s + 1] * stretch[s + 1];
      out[s] = BEND_TO_ERROR * Math.max(Math.abs(above), Math.abs(below));
    }
  }
  return out;
}
