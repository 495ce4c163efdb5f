import { localCharge } from '../../solver/charge.ts';
import { ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { fermiHalf } from '../../solver/fermi-integral.ts';
import { neutralLevel } from '../../solver/fermi-level.ts';
import { polarisationSheets } from '../../solver/polarisation.ts';
import { ACCEPTANCE } from '../../solver/quality.ts';
import type { Solution } from '../../solver/solution.ts';

/**
 * What is wrong with an accepted solution, by sums of our own over what it prints; empty when it is sound. Without a test runner, so that long
 * random runs use it too.
 */
export function faultsOf(answer: Solution, accuracy: number = ACCEPTANCE.meshError): string[] {
  const faults: string[] = [];
  const { quality, profiles, stack } = answer;
  if (!quality.converged) faults.push('not converged');
  if (!(quality.lastUpdate < 1e-9)) faults.push(`last update ${quality.lastUpdate} V`);
  if (!(quality.gaussError < 1e-6)) faults.push(`charge balance open by ${quality.gaussError}`);
  if (!(quality.meshError <= accuracy)) faults.push(`mesh error ${quality.meshError} V`);
  for (const [name, values] of Object.entries(profiles)) if ([...(values as Float64Array)].some((v) => !Number.isFinite(v))) faults.push(`${name} is not finite`);
  if (faults.length > 0) return faults;
  const tops = stack.layers.map((_, l) => profiles.z[profiles.layer.indexOf(l)]);
  const bandsOf = (s: number) => localCharge(stack.layers[profiles.layer[s]], profiles.z[s] - tops[profiles.layer[s]], stack.temperature, stack.assumptions).bands;
  return [...carrierFaults(answer, bandsOf), ...gaussFaults(answer, (s) => bandsOf(s).permittivity * EPSILON_0), ...bulkFaults(answer), ...boundFaults(answer, tops), ...figureFaults(answer)];
}

const EPSILON = 2.2e-16;
/** Change of a band edge through a graded layer, eV. */
const STEEPEST = 5;

/** A flat Fermi level: wherever the bands are, the carriers are those of EF = 0 (parabolic bands, Fermi-Dirac statistics). */
function carrierFaults({ profiles, stack }: Solution, bandsOf: (s: number) => ReturnType<typeof localCharge>['bands']): string[] {
  if (stack.assumptions.statistics !== 'fermi-dirac' || stack.assumptions.nonParabolic) return [];
  const faults: string[] = [];
  for (let s = 0; s < profiles.z.length; s++) {
    const bands = bandsOf(s);
    if (bands.insulator) continue;
    for (const [density, states, eta] of [[profiles.n[s], bands.nc, -profiles.ec[s] / bands.kT], [profiles.p[s], bands.nv, profiles.ev[s] / bands.kT]]) {
      // Below 1e-250 only the exponent is left to compare; ec - gap and ev differ by rounding, which exp(eta) magnifies.
      // In a graded alloy the composition is asked anew at the printed depth, which under a thick stack has lost the digits of a thin layer: edges that move by up to
      // some eV over a tenth of it are off by so much.
      const { thickness, x } = stack.layers[profiles.layer[s]];
      const lost = x.kind === 'constant' ? 0 : (EPSILON * profiles.z[s] * 10 * STEEPEST) / thickness / bands.kT;
      const limit = (x.kind === 'constant' ? 1e-11 : 1e-9) * Math.max(1, 4 / bands.kT / 1e3) + lost;
      if (density > 1e-250 && !(Math.abs(density / (states * fermiHalf(eta)) - 1) < limit)) faults.push(`carriers at node ${s}`);
    }
  }
  return faults;
}

/**
 * Gauss's law over the printed profiles, each layer, as a share of the largest sheet of charge in the stack: by trapezoids for the box scheme, by parabolas for the
 * compact one. Each is exact for its scheme, so what is left open is the solver's own.
 */
function gaussFaults({ profiles, stack, quality }: Solution, epsAt: (s: number) => number): string[] {
  const faults: string[] = [];
  const sheets = polarisationSheets(stack);
  for (const row of stack.interfaces) sheets[row.index] += row.sheetCharge;
  let largest = Math.max(1e8, ...sheets.map(Math.abs)) * ELEMENTARY_CHARGE;
  for (let l = 0; l < stack.layers.length; l++) largest = Math.max(largest, sheetOf(profiles, l));
  for (let l = 0; l < stack.layers.length; l++) {
    const first = profiles.layer.indexOf(l);
    const last = profiles.layer.lastIndexOf(l);
    const [z, rho] = [profiles.z.subarray(first, last + 1), profiles.charge.subarray(first, last + 1)];
    const graded = stack.layers[l].x.kind !== 'constant';
    const charge = ELEMENTARY_CHARGE * (quality.method === 'box' ? byTrapezoids(z, rho) : graded ? inStretchedDepth(stack, l, z, rho) : byParabolas(z, rho));
    let doped = 0;
    for (let s = first; s < last; s++) {
      const h = profiles.z[s + 1] - profiles.z[s];
      doped += ELEMENTARY_CHARGE * h * (profiles.ionisedDonors[s] + profiles.ionisedAcceptors[s]);
    }
    const [epsFirst, epsLast] = [epsAt(first), epsAt(last)];
    const out = epsLast * profiles.field[last] - epsFirst * profiles.field[first];
    // Fields are differences of potentials near 4 V, good to 1e-15 of them over the cell: allowed beside the 1e-6.
    const rounding = 4e-15 * (epsFirst / (profiles.z[first + 1] - profiles.z[first]) + epsLast / (profiles.z[last] - profiles.z[last - 1])) + 1e-13 * doped;
    if (!(Math.abs(out - charge) < 1e-6 * largest + rounding + (quality.method === 'box' ? 0 : ELEMENTARY_CHARGE * endDoubt(z, rho)))) faults.push(`Gauss over layer ${l}: ${out - charge} of ${largest}`);
    // Displacement steps by the sheet between the layers and by nothing else.
    if (l > 0) {
      const sheet = ELEMENTARY_CHARGE * sheets[l - 1];
      const epsAbove = epsAt(first - 1);
      const step = epsFirst * profiles.field[first] - epsAbove * profiles.field[first - 1] - sheet;
      if (!(Math.abs(step) < 1e-6 * (largest + Math.abs(sheet)) + rounding + 4e-15 * (epsAbove / (profiles.z[first - 1] - profiles.z[first - 2])))) faults.push(`displacement at interface ${l - 1}: ${step}`);
      if (profiles.psi[first] !== profiles.psi[first - 1]) faults.push(`psi jumps at interface ${l - 1}`);
    }
  }
  return faults;
}

/** C/cm^2 of a layer, sizes added up. */
function sheetOf({ z, layer, charge }: Solution['profiles'], l: number): number {
  let sum = 0;
  for (let s = layer.indexOf(l); s < layer.lastIndexOf(l); s++) sum += (ELEMENTARY_CHARGE * (z[s + 1] - z[s]) * (Math.abs(charge[s]) + Math.abs(charge[s + 1]))) / 2;
  return sum;
}

/** In the middle of a uniform layer that is many Debye lengths from its ends, the bands lie where charge neutrality puts them. */
function bulkFaults({ profiles, stack, layers }: Solution): string[] {
  const faults: string[] = [];
  for (let l = 0; l < stack.layers.length; l++) {
    const layer = stack.layers[l];
    const { debyeLength, insulator, fullyDepleted } = layers[l];
    if (insulator || fullyDepleted || debyeLength === null || layer.x.kind !== 'constant' || layer.dopants.some((d) => d.concentration.kind !== 'constant')) continue;
    const c = localCharge(layer, layer.thickness / 2, stack.temperature, stack.assumptions);
    const net = layer.dopants.reduce((sum, d) => sum + (d.concentration.kind === 'constant' ? d.concentration.value * d.activation : 0), 0);
    // The farthest that a depletion of the gap, or of 4 V of band bending, can reach on either side; a layer much thicker is neutral inside.
    const reach = net > 0 ? Math.sqrt((2 * c.bands.permittivity * EPSILON_0 * 4) / (ELEMENTARY_CHARGE * net)) + 40 * debyeLength : 80 * debyeLength;
    if (!(layer.thickness > 8 * reach)) continue;
    const first = profiles.layer.indexOf(l);
    const last = profiles.layer.lastIndexOf(l);
    const middle = profiles.z[first] + layer.thickness / 2;
    let s = first;
    while (s < last && profiles.z[s] < middle) s++;
    const { ecMinusEf } = neutralLevel(c);
    if (!(Math.abs(profiles.ec[s] - ecMinusEf) < 1e-3)) faults.push(`the middle of layer ${l} is ${profiles.ec[s] - ecMinusEf} eV from its neutral level`);
  }
  return faults;
}

/** The compact scheme may close the two cells at each end by trapezoids, where the screening is finer than the mesh; by how much that could differ, cm^-2. */
function endDoubt(z: Float64Array, rho: Float64Array): number {
  const m = z.length;
  const doubt = (from: number): number => {
    const [zs, rhos] = [z.subarray(from, from + 3), rho.subarray(from, from + 3)];
    // Screening finer than the mesh shows as a charge that falls more than threefold a cell; then the cells at the end count whole.
    const [end, next] = from === 0 ? [rhos[0], rhos[1]] : [rhos[2], rhos[1]];
    const steep = Math.abs(end) > 3 * Math.abs(next) ? Math.abs(rhos[0] * (zs[1] - zs[0])) + Math.abs(rhos[2] * (zs[2] - zs[1])) : 0;
    return 2 * Math.abs(byParabolas(zs, rhos) - byTrapezoids(zs, rhos)) + steep;
  };
  return doubt(0) + doubt(m - 3);
}

/**
 * In a graded crystal the parabolas are those of rho eps against the stretched depth, dx = dz eps(0)/eps: only there is the equation one of even eps. Depths come
 * from the printed z, eps between them from the crystal itself, dz/eps by Simpson's rule.
 */
function inStretchedDepth(stack: Solution['stack'], l: number, z: Float64Array, rho: Float64Array): number {
  const layer = stack.layers[l];
  const eps = (at: number): number => localCharge(layer, Math.min(layer.thickness, Math.max(0, at - z[0])), stack.temperature, stack.assumptions).bands.permittivity;
  const first = eps(z[0]);
  const x = new Float64Array(z.length);
  const source = Float64Array.from(rho, (v, k) => (v * eps(z[k])) / first);
  for (let k = 1; k < z.length; k++) x[k] = x[k - 1] + ((z[k] - z[k - 1]) * first * (1 / eps(z[k - 1]) + 4 / eps(0.5 * (z[k - 1] + z[k])) + 1 / eps(z[k]))) / 6;
  return byParabolas(x, source);
}

/**
 * Densities within what is there, and the maximum principle: where no positive sheet and no positive end lifts it, psi stays below the highest of what the ends
 * and local neutrality ask for; likewise from below (charge falls with psi).
 */
function boundFaults({ profiles, stack, quality }: Solution, tops: number[]): string[] {
  const faults: string[] = [];
  let [least, most] = [Infinity, -Infinity];
  for (let s = 0; s < profiles.z.length; s++) {
    const layer = stack.layers[profiles.layer[s]];
    const depth = Math.min(layer.thickness, Math.max(0, profiles.z[s] - tops[profiles.layer[s]]));
    const c = localCharge(layer, depth, stack.temperature, stack.assumptions);
    let [donors, acceptors] = [0, 0];
    for (const level of c.levels) if (level.donor) donors += level.density; else acceptors += level.density;
    // Steep tails move by some 1e-9 of themselves with the rounding of the depth.
    const within = (value: number, active: number): boolean => value >= 0 && value <= active * (1 + 1e-7);
    if (!within(profiles.ionisedDonors[s], c.bands.insulator ? 0 : donors) || !within(profiles.ionisedAcceptors[s], c.bands.insulator ? 0 : acceptors)) faults.push(`more ionised than there is at node ${s}`);
    if (profiles.n[s] < 0 || profiles.p[s] < 0) faults.push(`negative carriers at node ${s}`);
    if (c.bands.insulator) continue;
    const psi = profiles.ec[s] + profiles.psi[s] - neutralLevel(c).ecMinusEf;
    least = Math.min(least, psi);
    most = Math.max(most, psi);
  }
  const sheets = [...polarisationSheets(stack)];
  for (const row of stack.interfaces) sheets[row.index] += row.sheetCharge;
  const last = profiles.psi.length - 1;
  for (const [end, s] of [[stack.top, 0], [stack.bottom, last]] as const) {
    if (end.kind === 'open') sheets.push(end.sheetCharge);
    else {
      least = Math.min(least, profiles.psi[s]);
      most = Math.max(most, profiles.psi[s]);
    }
  }
  const slack = quality.meshError + 1e-9;
  for (let s = 0; s <= last; s++) {
    if (!sheets.some((v) => v > 0) && profiles.psi[s] > most + slack) faults.push(`psi at node ${s} is ${profiles.psi[s] - most} V above all that asks for it`);
    if (!sheets.some((v) => v < 0) && profiles.psi[s] < least - slack) faults.push(`psi at node ${s} is ${least - profiles.psi[s]} V below all that asks for it`);
  }
  return faults;
}

/** No figure of a layer, a junction or a contact is NaN. */
function figureFaults({ layers, junctions, contacts }: Solution): string[] {
  return [...layers, ...junctions, ...contacts].flatMap((row, i) => Object.entries(row).filter(([, v]) => typeof v === 'number' && Number.isNaN(v)).map(([key]) => `${key} of row ${i} is NaN`));
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
