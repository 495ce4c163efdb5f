import { chargeAt, type ChargeValues } from './charge.ts';
import { displacementsOf } from './poisson-fields.ts';
import type { PoissonSystem } from './poisson-system.ts';
import type { Profiles } from './solution.ts';

/**
 * Profiles by side from a solved potential. The field at a node is of the displacement that the scheme itself carries there, so Gauss's law holds for the
 * printed fields too.
 *
 * @param psi  [nodes], V
 */
export function profilesOf(system: PoissonSystem, psi: Float64Array): Profiles {
  const { mesh, charges } = system;
  const displacements = displacementsOf(system, psi);
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
      profiles.field[s] = displacements[s] / system.permittivity[s];
    }
    top += z[z.length - 1];
  });
  return profiles;
}
