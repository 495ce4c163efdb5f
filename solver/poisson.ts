import { interpolated, meshOf, type Mesh } from './mesh.ts';
import { solveByBox } from './poisson-box.ts';
import { solveByCompact } from './poisson-compact.ts';
import { coldStart, setEnds } from './poisson-guess.ts';
import type { PoissonLayer, PoissonProblem } from './poisson-system.ts';
import { mostLooks, PoissonWork } from './poisson-work.ts';
import { ACCEPTANCE } from './quality.ts';
import type { Profiles, Quality, Refusal } from './solution.ts';
import type { SolveOptions } from './stack.ts';

export type { PoissonEnd, PoissonLayer, PoissonProblem } from './poisson-system.ts';

export interface PoissonSolution {
  profiles: Profiles;
  quality: Quality;
}

/** What is asked of an answer. */
export interface PoissonGoal {
  /** accepted estimate of the mesh error, V */ accuracy: number;
  maxNodes: number;
}

const MOST_NODES = 40000;
/** Many layers may have more: a graded one begins with some hundred. */
const MOST_NODES_A_LAYER = 200;
/** Shares of the work that are gone at most when a warm start, and then the compact scheme, give up: the box scheme must have its turn. */
const WARM_SHARE = 0.25;
const COMPACT_SHARE = 0.7;

/** Where an iteration begins. */
export interface PoissonStart {
  mesh: Mesh;
  /** V [nodes] */ psi: Float64Array;
  /** from an earlier solution, whose mesh already knows where the charge bends */ warm: boolean;
}

/**
 * Potential of the whole stack at thermal equilibrium, EF = 0 throughout, Ec = ecFlat - psi.
 *
 * Starts from local neutrality on a coarse graded mesh, or from an earlier solution. The compact scheme of fourth order takes every stack, graded layers included; should it
 * not settle, the box scheme answers. `quality.method` says which.
 *
 * @returns the profiles with their quality, or a refusal that says what was missed. A refusal carries no figures.
 */
export function solvePoisson(given: PoissonProblem, options: SolveOptions = {}): PoissonSolution | Refusal {
  const problem: PoissonProblem = { ...given, layers: given.layers.map(askedOnce) };
  const goal: PoissonGoal = { accuracy: options.accuracy ?? ACCEPTANCE.meshError, maxNodes: options.maxNodes ?? Math.max(MOST_NODES, MOST_NODES_A_LAYER * problem.layers.length) };
  const warm = options.warmStart ? warmStart(problem, options.warmStart) : null;
  const work = new PoissonWork(mostLooks(problem.layers.length));
  let updates = 0;
  for (const first of warm ? [warm, null] : [null]) {
    work.allow(first ? WARM_SHARE : COMPACT_SHARE);
    const compact = solveByCompact(problem, first ?? coldStart(problem, work), goal, work);
    updates += compact.updates;
    if (compact.solution) {
      compact.solution.quality.newtonUpdates = updates;
      return compact.solution;
    }
  }
  work.allow(1);
  return solveByBox(problem, coldStart(problem, work), goal, updates, work);
}

/** A uniform layer's functions, asked once and remembered. */
function askedOnce(layer: PoissonLayer): PoissonLayer {
  if (!layer.uniform) return layer;
  const charge = layer.charge(0);
  const [permittivity, ecFlat, gap] = [layer.permittivity(0), layer.ecFlat(0), layer.gap(0)];
  return { thickness: layer.thickness, uniform: true, charge: () => charge, permittivity: () => permittivity, ecFlat: () => ecFlat, gap: () => gap };
}

/** Every other node of an earlier solution, stretched to the layers of now; null when it is none of such a stack. */
function warmStart(problem: PoissonProblem, profiles: Profiles): PoissonStart | null {
  const fine = meshOfProfiles(profiles, problem.layers.length);
  if (!fine) return null;
  const mesh = meshOf(fine.local.map((z, l) => z.filter((_, k) => k % 2 === 0).map((v) => (v * problem.layers[l].thickness) / z[z.length - 1])));
  const psi = interpolated(fine, potentialOfProfiles(profiles, fine), mesh);
  setEnds(problem, psi);
  return { mesh, psi, warm: true };
}

/** Null unless every layer has an even number of cells, and enough of them for the half mesh. */
function meshOfProfiles(profiles: Profiles, layers: number): Mesh | null {
  const local: number[][] = Array.from({ length: layers }, () => []);
  for (let s = 0; s < profiles.z.length; s++) {
    const nodes = local[profiles.layer[s]];
    if (!nodes) return null;
    nodes.push(profiles.z[s]);
  }
  if (local.some((z) => z.length < 9 || z.length % 2 === 0)) return null;
  return meshOf(local.map((z) => Float64Array.from(z, (v) => v - z[0])));
}

function potentialOfProfiles(profiles: Profiles, mesh: Mesh): Float64Array {
  const psi = new Float64Array(mesh.nodes);
  for (let s = 0; s < profiles.z.length; s++) psi[s - profiles.layer[s]] = profiles.psi[s];
  return psi;
}
