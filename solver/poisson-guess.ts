import { chargeAt, type ChargeValues } from './charge.ts';
import { ELEMENTARY_CHARGE } from './constants.ts';
import { neutralLevel } from './fermi-level.ts';
import { gradedLayer, meshOf, type Mesh } from './mesh.ts';
import { PoissonSystem, type PoissonLayer, type PoissonProblem } from './poisson-system.ts';
import type { PoissonStart } from './poisson.ts';
import type { PoissonWork } from './poisson-work.ts';
import type { Landmark } from './profile.ts';

/** Local neutrality on a coarse mesh. */
export function coldStart(problem: PoissonProblem, work?: PoissonWork): PoissonStart {
  const mesh = meshOf(problem.layers.map(firstLayerMesh));
  const psi = neutralGuess(problem, mesh);
  setEnds(problem, psi);
  shiftToBalance(problem, mesh, psi, work);
  return { mesh, psi, warm: false };
}

/** Coarse cells graded by the layer's own Debye length at neutrality. */
function firstLayerMesh(layer: PoissonLayer): Float64Array {
  const middle = layer.charge(layer.thickness / 2);
  if (middle.bands.insulator) return gradedLayer(layer.thickness, layer.thickness / 4, layer.thickness / 4);
  const out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
  chargeAt(middle, neutralLevel(middle).ecMinusEf, out);
  const debye = Math.sqrt(layer.permittivity(layer.thickness / 2) / (ELEMENTARY_CHARGE * Math.max(out.slope, 1e-30)));
  const finest = Math.min(layer.thickness / 8, Math.max(1e-8, Math.min(debye, 2e-7)));
  // A profile can hide between the nodes of a coarse mesh: graded layers start with more of them, and with some at every landmark.
  return withLandmarks(gradedLayer(layer.thickness, finest, layer.thickness / (layer.uniform ? 6 : 48)), layer.landmarks ?? []);
}

/** Nodes at each landmark and at one and two reaches from it; other nodes give way where they come close. */
function withLandmarks(z: Float64Array, landmarks: readonly Landmark[]): Float64Array {
  if (landmarks.length === 0) return z;
  const end = z[z.length - 1];
  const wanted = landmarks.flatMap((mark) => [-2, -1, 0, 1, 2].map((j) => ({ z: mark.z + j * mark.reach, room: 0.3 * mark.reach })));
  // Finest first, so that a wide landmark's nodes give way to a narrow one's.
  wanted.sort((a, b) => a.room - b.room);
  const nodes = [0, end];
  for (const { z: at, room } of [...wanted, ...Array.from(z, (at) => ({ z: at, room: 0.3 * localSize(z, at) }))]) {
    if (at <= 0 || at >= end) continue;
    const i = nodes.findIndex((node) => node > at);
    if (at - nodes[i - 1] > room && nodes[i] - at > room) nodes.splice(i, 0, at);
  }
  return Float64Array.from(nodes);
}

/** The smaller cell beside a node of a mesh. */
function localSize(z: Float64Array, at: number): number {
  const k = z.indexOf(at);
  return Math.min(k > 0 ? z[k] - z[k - 1] : Infinity, k + 1 < z.length ? z[k + 1] - z[k] : Infinity);
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

export function setEnds(problem: PoissonProblem, psi: Float64Array): void {
  if (problem.top.kind === 'potential') psi[0] = problem.top.psi;
  if (problem.bottom.kind === 'potential') psi[psi.length - 1] = problem.bottom.psi;
}

/**
 * With both ends open the carriers alone fix the level: shifts the guess evenly until the whole stack is neutral. The total falls with
 * psi, so bisection finds the place even where frozen layers leave Newton no slope.
 */
function shiftToBalance(problem: PoissonProblem, mesh: Mesh, psi: Float64Array, work?: PoissonWork): void {
  if (problem.top.kind === 'potential' || problem.bottom.kind === 'potential') return;
  const system = new PoissonSystem(problem, mesh, 'box', work);
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
