import { ELEMENTARY_CHARGE } from './constants.ts';
import { neutralLevel } from './fermi-level.ts';
import { divided, gradedLayer, halved, interpolated, meshOf, type Mesh } from './mesh.ts';
import { newton, type NewtonResult } from './newton.ts';
import { PoissonSystem, type PoissonLayer, type PoissonProblem } from './poisson-system.ts';
import { profilesOf } from './poisson-profiles.ts';
import { ACCEPTANCE, refusalReason } from './quality.ts';
import { chargeAt, type ChargeValues } from './charge.ts';
import type { Profiles, Quality, Refusal } from './solution.ts';
import type { SolveOptions } from './stack.ts';

export type { PoissonEnd, PoissonLayer, PoissonProblem } from './poisson-system.ts';

export interface PoissonSolution {
  profiles: Profiles;
  quality: Quality;
}

/** Halving a mesh cuts the box scheme's error to a quarter; a third of the difference is then the finer one's error. */
const RICHARDSON = 1 / 3;
/** One such estimate can be optimistic on graded meshes, so it is quoted four times as large. */
const SAFETY = 4;
const MOST_ROUNDS = 14;
/** Below this sheet charge, cm^-2 (a field of some 15 V/cm), Gauss's law is held against this instead: a flat stack has no charge of its own. */
const LEAST_SHEET = 1e8;
/** Sums of charge are rounded at some 1e-14 of the doping that they contain; no finer balance can be asked of a flat stack. */
const ROUNDING_SHARE = 1e-8;

/**
 * Potential of the whole stack at thermal equilibrium, EF = 0 throughout, Ec = ecFlat - psi.
 *
 * Starts from local neutrality on a coarse graded mesh, then alternates a solution on the mesh and on its halved copy: their difference
 * estimates the error, and the cells whose charge bends most are divided until the estimate is below `options.accuracy`.
 *
 * @returns the profiles with their quality, or a refusal that says what was missed. A refusal carries no figures.
 */
export function solvePoisson(problem: PoissonProblem, options: SolveOptions = {}): PoissonSolution | Refusal {
  const accuracy = options.accuracy ?? ACCEPTANCE.meshError;
  const maxNodes = options.maxNodes ?? 40000;
  let coarse: Mesh;
  let psi: Float64Array;
  if (options.warmStart) {
    const fine = meshOfProfiles(options.warmStart, problem.layers.length);
    coarse = meshOf(fine.local.map((z, l) => z.filter((_, k) => k % 2 === 0).map((v) => (v * problem.layers[l].thickness) / z[z.length - 1])));
    psi = interpolated(fine, potentialOfProfiles(options.warmStart, fine), coarse);
  } else {
    coarse = meshOf(problem.layers.map(firstLayerMesh));
    psi = neutralGuess(problem, coarse);
  }
  setEnds(problem, psi);
  if (!options.warmStart) shiftToBalance(problem, coarse, psi);
  let updates = 0;
  let threshold = Infinity;
  let quality: Quality | null = null;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const system = new PoissonSystem(problem, coarse);
    let run: NewtonResult = newton(system, psi);
    updates += run.updates;
    if (!run.converged) return refuse(run, updates, coarse.nodes, quality);
    const fine = halved(coarse);
    const finePsi = interpolated(coarse, psi, fine);
    const fineSystem = new PoissonSystem(problem, fine);
    run = newton(fineSystem, finePsi);
    updates += run.updates;
    if (!run.converged) return refuse(run, updates, fine.nodes, quality);
    let difference = 0;
    for (let l = 0; l < coarse.local.length; l++) {
      for (let k = 0; k < coarse.local[l].length; k++) {
        const d = Math.abs(psi[coarse.first[l] + k] - finePsi[fine.first[l] + 2 * k]);
        if (!(d <= difference)) difference = d;
      }
    }
    const meshError = SAFETY * RICHARDSON * difference;
    quality = {
      converged: true,
      newtonUpdates: updates,
      lastUpdate: run.lastUpdate,
      meshNodes: fine.nodes,
      meshError,
      gaussError: gaussError(fineSystem, finePsi),
      method: 'box',
    };
    // The first meshes are too coarse for their own estimate to mean much: no answer before one refinement.
    const settled = round > 0 || options.warmStart !== undefined;
    if (settled && meshError <= accuracy) {
      const reason = refusalReason(quality, accuracy);
      if (reason) return { refused: true, reason, quality };
      return { profiles: profilesOf(fineSystem, finePsi), quality };
    }
    const refined = refinement(fineSystem, coarse, fine, accuracy, meshError, threshold);
    threshold = refined.threshold;
    if (refined.mesh.nodes * 2 > maxNodes) {
      return { refused: true, reason: `the estimated mesh error ${meshError.toExponential(1)} V stays above ${accuracy} V with ${fine.nodes} nodes`, quality };
    }
    psi = interpolated(fine, finePsi, refined.mesh);
    setEnds(problem, psi);
    coarse = refined.mesh;
  }
  return { refused: true, reason: quality ? (refusalReason(quality, accuracy) ?? 'the mesh did not settle') : 'the mesh did not settle', quality };
}

function refuse(run: NewtonResult, updates: number, nodes: number, earlier: Quality | null): Refusal {
  const reason =
    run.reason === 'singular matrix'
      ? 'nothing fixes the potential: neither a contact nor a carrier is there to hold it; give one end a contact'
      : `Newton's iteration did not settle: ${run.reason} after ${updates} updates (last update ${run.lastUpdate.toExponential(1)} V)`;
  return { refused: true, reason, quality: earlier ?? { converged: false, newtonUpdates: updates, lastUpdate: run.lastUpdate, meshNodes: nodes, meshError: Infinity, gaussError: Infinity, method: 'box' } };
}

/** Coarse cells graded by the layer's own Debye length at neutrality. */
function firstLayerMesh(layer: PoissonLayer): Float64Array {
  const middle = layer.charge(layer.thickness / 2);
  if (middle.bands.insulator) return gradedLayer(layer.thickness, layer.thickness / 4, layer.thickness / 4);
  const out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
  chargeAt(middle, neutralLevel(middle).ecMinusEf, out);
  const debye = Math.sqrt(layer.permittivity(layer.thickness / 2) / (ELEMENTARY_CHARGE * Math.max(out.slope, 1e-30)));
  const finest = Math.min(layer.thickness / 8, Math.max(1e-8, Math.min(debye, 2e-7)));
  // A profile can hide between the nodes of a coarse mesh: graded layers start with more of them.
  return gradedLayer(layer.thickness, finest, layer.thickness / (layer.uniform ? 6 : 48));
}

/** psi [nodes] from local neutrality; straight across insulators. */
function neutralGuess(problem: PoissonProblem, mesh: Mesh): Float64Array {
  const psi = new Float64Array(mesh.nodes);
  const known = new Uint8Array(mesh.nodes);
  mesh.local.forEach((z, l) => {
    const layer = problem.layers[l];
    if (layer.charge(0).bands.insulator) return;
    let value = 0;
    for (let k = 0; k < z.length; k++) {
      if (k === 0 || !layer.uniform) value = layer.ecFlat(z[k]) - neutralLevel(layer.charge(z[k])).ecMinusEf;
      const i = mesh.first[l] + k;
      // On an interface the mean of both sides; Newton moves it at once.
      psi[i] = known[i] ? 0.5 * (psi[i] + value) : value;
      known[i] = 1;
    }
  });
  setEnds(problem, psi);
  if (problem.top.kind === 'potential') known[0] = 1;
  if (problem.bottom.kind === 'potential') known[mesh.nodes - 1] = 1;
  fillStraight(psi, known);
  return psi;
}

function fillStraight(psi: Float64Array, known: Uint8Array): void {
  let last = -1;
  for (let i = 0; i < psi.length; i++) {
    if (!known[i]) continue;
    for (let j = last + 1; j < i; j++) psi[j] = last < 0 ? psi[i] : psi[last] + ((psi[i] - psi[last]) * (j - last)) / (i - last);
    last = i;
  }
  for (let j = last + 1; j < psi.length; j++) psi[j] = last < 0 ? 0 : psi[last];
}

function setEnds(problem: PoissonProblem, psi: Float64Array): void {
  if (problem.top.kind === 'potential') psi[0] = problem.top.psi;
  if (problem.bottom.kind === 'potential') psi[psi.length - 1] = problem.bottom.psi;
}

/**
 * With both ends open the carriers alone fix the level: shifts the guess evenly until the whole stack is neutral. The total falls with
 * psi, so bisection finds the place even where frozen layers leave Newton no slope.
 */
function shiftToBalance(problem: PoissonProblem, mesh: Mesh, psi: Float64Array): void {
  if (problem.top.kind === 'potential' || problem.bottom.kind === 'potential') return;
  const system = new PoissonSystem(problem, mesh);
  const start = Float64Array.from(psi);
  const total = (shift: number): number => {
    for (let i = 0; i < psi.length; i++) psi[i] = start[i] + shift;
    system.evaluate(psi, false);
    // Fluxes cancel in the sum: what is left is all charge and both sheets.
    return system.residual.reduce((a, b) => a + b, 0);
  };
  let [low, high] = [-20, 20];
  for (let i = 0; i < 50; i++) {
    const middle = 0.5 * (low + high);
    if (total(middle) > 0) low = middle;
    else high = middle;
  }
  total(0.5 * (low + high));
}

/**
 * Where to divide: a cell's quadrature error in volts is about h^2 q |rho(a) - 2 rho(m) + rho(b)|/(8 eps), read off the halved mesh.
 * It falls with h^4 and the error of psi with h^2, so the threshold falls with the square of the distance from the goal.
 */
function refinement(system: PoissonSystem, coarse: Mesh, fine: Mesh, accuracy: number, meshError: number, threshold: number): { mesh: Mesh; threshold: number } {
  const bends: Float64Array[] = [];
  let worst = 0;
  coarse.local.forEach((z, l) => {
    const b = new Float64Array(z.length - 1);
    for (let c = 0; c + 1 < z.length; c++) {
      const s = fine.first[l] + l + 2 * c;
      const h = z[c + 1] - z[c];
      b[c] = (h * h * Math.abs(system.density[s] - 2 * system.density[s + 1] + system.density[s + 2])) / (8 * system.permittivity[s]);
      if (b[c] > worst) worst = b[c];
    }
    bends.push(b);
  });
  let goal = Math.min(threshold, worst) * Math.max(1 / 256, Math.min(0.5, ((0.7 * accuracy) / meshError) ** 2));
  if (!(goal > 0)) goal = 0;
  const pieces = bends.map((b) => {
    const p = new Int32Array(b.length);
    for (let c = 0; c < b.length; c++) p[c] = b[c] > goal && goal > 0 ? Math.min(4, Math.ceil((b[c] / goal) ** 0.25)) : 1;
    return p;
  });
  smoothPieces(coarse, pieces);
  return { mesh: divided(coarse, pieces), threshold: goal };
}

/** No cell more than three times its neighbour in a layer: abrupt steps of the mesh would spoil the error estimate. */
function smoothPieces(mesh: Mesh, pieces: Int32Array[]): void {
  mesh.local.forEach((z, l) => {
    const p = pieces[l];
    const size = (c: number): number => (z[c + 1] - z[c]) / p[c];
    for (let sweep = 0; sweep < 2; sweep++) {
      for (let c = 1; c < p.length; c++) while (size(c) > 3 * size(c - 1)) p[c]++;
      for (let c = p.length - 2; c >= 0; c--) while (size(c) > 3 * size(c + 1)) p[c]++;
    }
  });
}

/**
 * Gauss's law over the stack and over each layer: what flows out of a layer less the charge that it holds, as a share of the largest
 * sheet charge (that of any layer's electrons, holes or dopants apart from neutral background, or any interface sheet).
 */
function gaussError(system: PoissonSystem, psi: Float64Array): number {
  const { mesh, conductance, density } = system;
  let open = 0;
  let largest = 0;
  let doped = 0;
  mesh.local.forEach((z, l) => {
    const first = mesh.first[l];
    const last = first + z.length - 1;
    let inner = 0;
    let absolute = 0;
    for (let k = 1; k + 1 < z.length; k++) {
      const q = density[first + l + k] * 0.5 * (z[k + 1] - z[k - 1]);
      inner += q;
      for (const level of system.charges[first + l + k].levels) doped += ELEMENTARY_CHARGE * level.density * 0.5 * (z[k + 1] - z[k - 1]);
      absolute += Math.abs(q);
    }
    // Displacement (-eps dpsi/dz) in the first and the last cell of the layer encloses its inner boxes.
    const above = -conductance[first] * (psi[first + 1] - psi[first]);
    const below = -conductance[last - 1] * (psi[last] - psi[last - 1]);
    open = Math.max(open, Math.abs(below - above - inner));
    largest = Math.max(largest, absolute, Math.abs(above), Math.abs(below));
  });
  // Over the stack the boxes on the interfaces and their sheets count too: all inner residuals together.
  let stack = 0;
  for (let i = 1; i + 1 < mesh.nodes; i++) stack += system.residual[i];
  open = Math.max(open, Math.abs(stack));
  return open / Math.max(largest, ELEMENTARY_CHARGE * LEAST_SHEET, ROUNDING_SHARE * doped);
}

function meshOfProfiles(profiles: Profiles, layers: number): Mesh {
  const local: number[][] = Array.from({ length: layers }, () => []);
  for (let s = 0; s < profiles.z.length; s++) local[profiles.layer[s]].push(profiles.z[s]);
  return meshOf(local.map((z) => Float64Array.from(z, (v) => v - z[0])));
}

function potentialOfProfiles(profiles: Profiles, mesh: Mesh): Float64Array {
  const psi = new Float64Array(mesh.nodes);
  for (let s = 0; s < profiles.z.length; s++) psi[s - profiles.layer[s]] = profiles.psi[s];
  return psi;
}
