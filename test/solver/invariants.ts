import { expect } from 'vitest';
import { ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { fermiHalf } from '../../solver/fermi-integral.ts';
import { localCharge } from '../../solver/charge.ts';
import { ACCEPTANCE } from '../../solver/quality.ts';
import { isRefusal, type Refusal, type Solution } from '../../solver/solution.ts';
import { polarisationSheets } from '../../solver/polarisation.ts';

/** What any accepted solution must satisfy, however it came about. Throws the reason of a refusal. */
export function expectSound(answer: Solution | Refusal, accuracy: number = ACCEPTANCE.meshError): Solution {
  if (isRefusal(answer)) throw new Error(`refused: ${answer.reason}`);
  const { quality, profiles, stack } = answer;
  expect(quality.converged).toBe(true);
  expect(quality.lastUpdate).toBeLessThan(1e-9);
  expect(quality.gaussError).toBeLessThan(1e-6);
  expect(quality.meshError).toBeLessThanOrEqual(accuracy);
  for (const values of [profiles.ec, profiles.ev, profiles.psi, profiles.field, profiles.n, profiles.p, profiles.charge]) {
    for (const v of values) expect(Number.isFinite(v)).toBe(true);
  }
  const eps = Array.from(profiles.z, (z, s) => {
    const layer = stack.layers[profiles.layer[s]];
    const top = profiles.z[profiles.layer.indexOf(profiles.layer[s])];
    return localCharge(layer, z - top, stack.temperature, stack.assumptions).bands.permittivity * EPSILON_0;
  });
  // A flat Fermi level: wherever the bands are, the carriers are those of EF = 0 (parabolic bands, Fermi-Dirac statistics).
  if (stack.assumptions.statistics === 'fermi-dirac' && !stack.assumptions.nonParabolic) {
    for (let s = 0; s < profiles.z.length; s++) {
      const layer = stack.layers[profiles.layer[s]];
      const bands = localCharge(layer, profiles.z[s] - profiles.z[profiles.layer.indexOf(profiles.layer[s])], stack.temperature, stack.assumptions).bands;
      if (bands.insulator) continue;
      for (const [density, states, eta] of [[profiles.n[s], bands.nc, -profiles.ec[s] / bands.kT], [profiles.p[s], bands.nv, profiles.ev[s] / bands.kT]]) {
        // Below 1e-250 only the exponent is left to compare; ec - gap and ev differ by rounding, which exp(eta) magnifies.
        if (density > 1e-250) expect(Math.abs(density / (states * fermiHalf(eta)) - 1), `carriers at node ${s}`).toBeLessThan(1e-11 * Math.max(1, 4 / bands.kT / 1e3));
      }
    }
  }
  // Gauss's law by a sum of its own over the printed profiles, each layer, as a share of the charge that is there: by trapezoids for the box scheme, by
  // parabolas for the compact one. Each is exact for its scheme, so what is left open is the solver's own.
  const sheets = polarisationSheets(stack);
  for (const row of stack.interfaces) sheets[row.index] += row.sheetCharge;
  for (let l = 0; l < stack.layers.length; l++) {
    const first = profiles.layer.indexOf(l);
    const last = profiles.layer.lastIndexOf(l);
    const charge = ELEMENTARY_CHARGE * (quality.method === 'box' ? byTrapezoids : byParabolas)(profiles.z.subarray(first, last + 1), profiles.charge.subarray(first, last + 1));
    let size = ELEMENTARY_CHARGE * 1e8;
    let doped = 0;
    for (let s = first; s < last; s++) {
      const h = profiles.z[s + 1] - profiles.z[s];
      size += (ELEMENTARY_CHARGE * h * (Math.abs(profiles.charge[s]) + Math.abs(profiles.charge[s + 1]))) / 2;
      doped += ELEMENTARY_CHARGE * h * (profiles.ionisedDonors[s] + profiles.ionisedAcceptors[s]);
    }
    const out = eps[last] * profiles.field[last] - eps[first] * profiles.field[first];
    // Fields are differences of potentials near 4 V, good to 1e-15 of them over the cell: allowed beside the 1e-6.
    const rounding = 4e-15 * (eps[first] / (profiles.z[first + 1] - profiles.z[first]) + eps[last] / (profiles.z[last] - profiles.z[last - 1])) + 1e-13 * doped;
    expect(Math.abs(out - charge), `Gauss over layer ${l}`).toBeLessThan(1e-6 * size + rounding);
    // Displacement steps by the sheet between the layers and by nothing else.
    if (l > 0) {
      const step = eps[first] * profiles.field[first] - eps[first - 1] * profiles.field[first - 1] - ELEMENTARY_CHARGE * sheets[l - 1];
      expect(Math.abs(step), `displacement at interface ${l - 1}`).toBeLessThan(1e-6 * (size + Math.abs(ELEMENTARY_CHARGE * sheets[l - 1])) + rounding + 4e-15 * (eps[first - 1] / (profiles.z[first - 1] - profiles.z[first - 2])));
      expect(profiles.psi[first]).toBe(profiles.psi[first - 1]);
    }
  }
  return answer;
}

function byTrapezoids(z: Float64Array, rho: Float64Array): number {
  let sum = 0;
  for (let k = 0; k + 1 < z.length; k++) sum += ((z[k + 1] - z[k]) * (rho[k] + rho[k + 1])) / 2;
  return sum;
}

/** Each cell holds the parabolas of its two nodes, the weight passing evenly from one to the other; two Gauss points integrate that cubic exactly. */
function byParabolas(z: Float64Array, rho: Float64Array): number {
  const parabola = (k: number, x: number): number => {
    const b = Math.min(Math.max(k - 1, 0), z.length - 3);
    let value = 0;
    for (let i = b; i < b + 3; i++) {
      let l = rho[i];
      for (let j = b; j < b + 3; j++) if (j !== i) l *= (x - z[j]) / (z[i] - z[j]);
      value += l;
    }
    return value;
  };
  let sum = 0;
  for (let k = 0; k + 1 < z.length; k++) {
    const h = z[k + 1] - z[k];
    for (const t of [0.5 - Math.sqrt(1 / 12), 0.5 + Math.sqrt(1 / 12)]) sum += (h / 2) * ((1 - t) * parabola(k, z[k] + t * h) + t * parabola(k + 1, z[k] + t * h));
  }
  return sum;
}
