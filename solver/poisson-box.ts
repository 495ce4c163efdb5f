import { refusalReason } from './quality.ts';
import { divided, halved, interpolated, type Mesh } from './mesh.ts';
import { newton, type NewtonResult } from './newton.ts';
import { gaussError } from './poisson-balance.ts';
import { setEnds } from './poisson-guess.ts';
import { profilesOf } from './poisson-profiles.ts';
import { PoissonSystem, type PoissonProblem } from './poisson-system.ts';
import type { PoissonGoal, PoissonSolution, PoissonStart } from './poisson.ts';
import { PoissonWork } from './poisson-work.ts';
import type { Quality, Refusal } from './solution.ts';

/** Halving a mesh cuts the box scheme's error to a quarter; a third of the difference is then the finer one's error. */
const RICHARDSON = 1 / 3;
/** One such estimate can be optimistic on graded meshes, so it is quoted four times as large. */
const SAFETY = 4;
const MOST_ROUNDS = 14;

/**
 * The box scheme, for where the compact one does not settle: alternates a solution on the mesh and on its halved copy; their
 * difference estimates the error, and the cells whose charge bends most are divided until the estimate is below `goal.accuracy`.
 *
 * @param start    mesh and potential to begin with; the potential is changed in place
 * @param updates  Newton updates already spent, for the count in the quality
 * @param work     what is spent already, and how much may be
 */
export function solveByBox(problem: PoissonProblem, start: PoissonStart, goal: PoissonGoal, updates: number, work: PoissonWork = new PoissonWork()): PoissonSolution | Refusal {
  const { accuracy, maxNodes } = goal;
  let { mesh: coarse, psi } = start;
  let threshold = Infinity;
  let quality: Quality | null = null;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const system = new PoissonSystem(problem, coarse, 'box', work);
    let run: NewtonResult = newton(system, psi);
    updates += run.updates;
    if (!run.converged) return refuse(run, updates, coarse.nodes, quality, work);
    const fine = halved(coarse);
    const finePsi = interpolated(coarse, psi, fine);
    const fineSystem = new PoissonSystem(problem, fine, 'box', work);
    run = newton(fineSystem, finePsi);
    updates += run.updates;
    if (!run.converged) return refuse(run, updates, fine.nodes, quality, work);
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
      looks: work.spent,
      meshNodes: fine.nodes,
      meshError,
      gaussError: gaussError(fineSystem, finePsi),
      method: 'box',
    };
    // The first meshes are too coarse for their own estimate to mean much: no answer before one refinement.
    const settled = round > 0 || start.warm;
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

function refuse(run: NewtonResult, updates: number, nodes: number, earlier: Quality | null, work: PoissonWork): Refusal {
  const quality = earlier ?? { converged: false, newtonUpdates: updates, lastUpdate: run.lastUpdate, looks: work.spent, meshNodes: nodes, meshError: Infinity, gaussError: Infinity, method: 'box' };
  return { refused: true, reason: reasonOf(run, updates, earlier, work), quality: { ...quality, looks: work.spent } };
}

function reasonOf(run: NewtonResult, updates: number, earlier: Quality | null, work: PoissonWork): string {
  if (run.reason === 'singular matrix') return 'nothing fixes the potential: neither a contact nor a carrier is there to hold it; give one end a contact';
  if (run.reason === 'work exhausted') {
    const reached = earlier ? `, when the estimated mesh error was ${earlier.meshError.toExponential(1)} V with ${earlier.meshNodes} nodes` : '';
    return `the answer was given up after ${work.spent} looks at mesh nodes, the most that are spent on one${reached}; a larger accepted error or fewer layers would need less`;
  }
  return `Newton's iteration did not settle: ${run.reason} after ${updates} updates (last update ${run.lastUpdate.toExponential(1)} V)`;
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
