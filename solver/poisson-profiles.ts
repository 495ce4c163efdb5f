import { chargeAt, type ChargeValues } from './charge.ts';
import { compactHalfBelow } from './poisson-weights.ts';
import type { PoissonSystem } from './poisson-system.ts';
import type { Profiles } from './solution.ts';

/**
 * Profiles by side from a solved potential. The field at a node is the displacement that the scheme itself carries there (the
 * cell's flux plus the charge of the half hat between), so Gauss's law holds for the printed fields too.
 *
 * @param psi  [nodes], V
 */
export function profilesOf(system: PoissonSystem, psi: Float64Array): Profiles {
  const { mesh, conductance, charges, density, weights } = system;
  const half = new Float64Array(3);
  const sides = mesh.nodes + mesh.local.length - 1;
  const array = (): Float64Array => new Float64Array(sides);
  const profiles: Profiles = {
    z: array(), layer: new Int32Array(sides), ec: array(), ev: array(), psi: array(), field: array(),
    n: array(), p: array(), ionisedDonors: array(), ionisedAcceptors: array(), charge: array(),
  };
  const out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
  let top = 0;
  mesh.local.forEach((z, l) => {
    const first = mesh.first[l];
    const x = system.stretched[l];
    for (let k = 0; k < z.length; k++) {
      const i = first + k;
      const s = i + l;
      profiles.z[s] = top + z[k];
      profiles.layer[s] = l;
      profiles.psi[s] = psi[i];
      profiles.ec[s] = system.ecFlat[s] - psi[i];
      profiles.ev[s] = profiles.ec[s] - system.gap[s];
      chargeAt(charges[s], profiles.ec[s], out);
      profiles.n[s] = out.n;
      profiles.p[s] = out.p;
      profiles.ionisedDonors[s] = out.donors;
      profiles.ionisedAcceptors[s] = out.acceptors;
      profiles.charge[s] = out.net;
      // Below the node where there is a cell below, else above it; at a layer's ends the half row is that of the equation itself.
      const end = k + 1 === z.length;
      if (k === 0 || end) for (let j = 0; j < 3; j++) half[j] = weights[3 * s + j];
      else if (system.lumped[s]) {
        half[0] = half[2] = 0;
        half[1] = 0.5 * (z[k + 1] - z[k]);
      } else {
        compactHalfBelow(x[k] - x[k - 1], x[k + 1] - x[k], half);
        for (let j = 0; j < 3; j++) half[j] *= system.stretch[s - 1 + j];
      }
      const from = s + (k === 0 ? 0 : end ? -2 : -1);
      const charge = half[0] * density[from] + half[1] * density[from + 1] + half[2] * density[from + 2];
      const displacement = end ? -conductance[i - 1] * (psi[i] - psi[i - 1]) + charge : -conductance[i] * (psi[i + 1] - psi[i]) - charge;
      profiles.field[s] = displacement / system.permittivity[s];
    }
    top += z[z.length - 1];
  });
  return profiles;
}
