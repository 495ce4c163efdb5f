import { halved, type Mesh } from './mesh.ts';
import { largest, newton, type NewtonResult } from './newton.ts';
import { gaussError } from './poisson-balance.ts';
import { betweenErrors, displacementsOf } from './poisson-fields.ts';
import { setEnds } from './poisson-guess.ts';
import { profilesOf } from './poisson-profiles.ts';
import { bent, equidistributed, rowErrors } from './poisson-remesh.ts';
import { PoissonSystem, type PoissonProblem } from './poisson-system.ts';
import type { PoissonGoal, PoissonSolution, PoissonStart } from './poisson.ts';
import type { PoissonWork } from './poisson-work.ts';
import { ACCEPTANCE, refusalReason } from './quality.ts';
import type { Quality } from './solution.ts';

/** Halving a mesh cuts the compact scheme's error to a sixteenth. */
const CONTRACTION = 1 / 16;
/** One estimate can be optimistic, so each of two of different kinds is quoted four times as large, and the larger counts. */
const SAFETY = 4;
/** Two estimates of the coarse error that differ by more than this do not agree. */
const AGREEMENT = 1.2;
const MOST_ROUNDS = 10;
/** Halvings of the best mesh where new meshes do not come to rest: 3 of 900 random stacks came here, one of them twice, and were accepted so; the box scheme had none left to do. */
const MOST_HALVINGS = 2;
/** A coarse mesh of this error leaves the halved one well within the accuracy. */
const COARSE_SHARE = 2;
/** Newton updates that end the passing solutions: that of the first mesh, V, and of coarse ones as a share of their target. Only the answer itself needs all digits. */
const FIRST_UPDATE = 1e-5;
const UPDATE_SHARE = 1e-3;
/** Share of the goal that a single row may miss, at first. */
const ROW_SHARE = 1 / 6;
/** Share of it that the cubic of a cell may miss between nodes, where errors do not add up. */
const BETWEEN_SHARE = 0.35;

interface Solved {
  system: PoissonSystem;
  run: NewtonResult;
  /** shares of the rows in the error at the nodes, V [nodes] */ errors: Float64Array;
  /** of the cubic between nodes, V [sides], a cell's at its upper node */ between: Float64Array;
  /** largest error at a node by the linear response to what the rows miss, V */ nodal: number;
  /** the same with what the cubic between nodes may be off, V */ estimate: number;
}

interface Halved {
  solved: Solved;
  /** V [nodes] */ psi: Float64Array;
  meshError: number;
  /** null where the answer is not good enough */ accepted: PoissonSolution | null;
}

/**
 * The compact scheme: a coarse box solution shows where the charge bends; meshes of even row errors follow until the estimate is small enough; then
 * every cell is halved, and the difference gives the estimate that the answer quotes.
 *
 * @param start  mesh and potential to begin with; the potential is changed in place
 * @returns no solution where Newton's iteration or the meshes do not settle: the box scheme's turn
 */
export function solveByCompact(problem: PoissonProblem, start: PoissonStart, goal: PoissonGoal, work: PoissonWork): { solution: PoissonSolution | null; updates: number } {
  let { mesh, psi } = start;
  let updates = 0;
  let target = COARSE_SHARE * goal.accuracy;
  let share = ROW_SHARE;
  const solve = (on: Mesh, values: Float64Array, scheme: 'compact' | 'box', tolerance: number): Solved | null => {
    const system = new PoissonSystem(problem, on, scheme, work);
    system.chooseRows(values, false);
    let run = newton(system, values, true, tolerance);
    updates += run.updates;
    if (!run.converged) return null;
    // Rows were chosen at the guess; where the solution lies elsewhere, once more.
    if (system.chooseRows(values, true) > 0) {
      run = newton(system, values, true, tolerance);
      updates += run.updates;
      system.evaluate(values, true);
    }
    if (!run.converged || !system.factor()) return null;
    const missed = system.defects(values);
    const errors = rowErrors(missed, system.response());
    system.solve(missed);
    const between = betweenErrors(system, values, displacementsOf(system, values));
    const nodal = largest(missed);
    return { system, run, errors, between, nodal, estimate: Math.max(nodal, largest(between)) };
  };
  const carryTo = (from: Solved, values: Float64Array): void => {
    mesh = equidistributed(problem, from.system, from.errors, share * target, from.between, BETWEEN_SHARE * target);
    psi = bent(from.system, values, mesh);
    setEnds(problem, psi);
  };
  /** Solves on the mesh of halved cells and holds the two against each other; null where Newton does not settle. */
  const halve = (coarse: Solved, coarsePsi: Float64Array): Halved | null => {
    const from = coarse.system.mesh;
    const to = halved(from);
    const finePsi = bent(coarse.system, coarsePsi, to);
    const fine = solve(to, finePsi, 'compact', ACCEPTANCE.update);
    if (!fine) return null;
    const { nodal, between } = differences(coarse.system, coarsePsi, fine.system, finePsi);
    // Between nodes nothing is taken off for the finer cells: where the doping bends within a Debye length they may be no better by much.
    const meshError = Math.max(halvingError(nodal, coarse.nodal, fine.nodal), halvingError(between, coarse.estimate, fine.estimate), between, SAFETY * fine.estimate);
    const quality: Quality = {
      converged: true,
      newtonUpdates: updates,
      lastUpdate: fine.run.lastUpdate,
      looks: work.spent,
      meshNodes: to.nodes,
      meshError,
      gaussError: gaussError(fine.system, finePsi),
      method: 'compact',
    };
    const accepted = refusalReason(quality, goal.accuracy) === null ? { profiles: profilesOf(fine.system, finePsi), quality } : null;
    return { solved: fine, psi: finePsi, meshError, accepted };
  };
  if (!start.warm) {
    const first = solve(mesh, psi, 'box', FIRST_UPDATE);
    if (!first) return { solution: null, updates };
    carryTo(first, psi);
  }
  let best: { coarse: Solved; psi: Float64Array } | null = null;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    if (2 * mesh.nodes > goal.maxNodes) break;
    const coarse = solve(mesh, psi, 'compact', Math.max(ACCEPTANCE.update, UPDATE_SHARE * target));
    if (!coarse) break;
    if (!best || coarse.estimate < best.coarse.estimate) best = { coarse, psi };
    if (!(coarse.estimate <= target)) {
      if ((round > 0 || start.warm) && !(coarse.nodal <= target)) share *= Math.min(0.8, Math.max(0.05, (0.7 * target) / coarse.nodal));
      carryTo(coarse, psi);
      continue;
    }
    const fine = halve(coarse, psi);
    if (!fine) break;
    if (fine.accepted) return { solution: fine.accepted, updates };
    const { meshError } = fine;
    target *= Math.min(0.5, Math.max(0.02, (0.5 * goal.accuracy) / meshError));
    carryTo(coarse, psi);
  }
  // Where every new mesh puts its nodes elsewhere and its estimate goes up and down, halved copies of the best one keep theirs: tried before the box scheme's turn.
  for (let halving = 0; best && halving < MOST_HALVINGS && 2 * best.coarse.system.mesh.nodes <= goal.maxNodes; halving++) {
    const fine = halve(best.coarse, best.psi);
    if (!fine) break;
    if (fine.accepted) return { solution: fine.accepted, updates };
    best = { coarse: fine.solved, psi: fine.psi };
  }
  return { solution: null, updates };
}

/** Largest differences of a solution from that on its halved mesh, V: at the nodes that both have, and of the cubic in the middle of each cell from the node there. */
function differences(coarse: PoissonSystem, coarsePsi: Float64Array, fine: PoissonSystem, finePsi: Float64Array): { nodal: number; between: number } {
  const displacements = displacementsOf(coarse, coarsePsi);
  let nodal = 0;
  let between = 0;
  coarse.mesh.local.forEach((z, l) => {
    for (let k = 0; k < z.length; k++) {
      const i = coarse.mesh.first[l] + k;
      const j = fine.mesh.first[l] + 2 * k;
      const d = Math.abs(coarsePsi[i] - finePsi[j]);
      if (!(d <= nodal)) nodal = d;
      if (k + 1 === z.length) break;
      const bend = (z[k + 1] - z[k]) * (displacements[i + l + 1] / coarse.permittivity[i + l + 1] - displacements[i + l] / coarse.permittivity[i + l]);
      const b = Math.abs(0.5 * (coarsePsi[i] + coarsePsi[i + 1]) + bend / 8 - finePsi[j + 1]);
      if (!(b <= between)) between = b;
    }
  });
  return { nodal, between };
}

/**
 * Error of the finer of two solutions, V, from their difference. With the contraction c that both meshes' own estimates show (never better than a
 * sixteenth) it is c/(1 - c) of the difference. Where the difference is larger than what the coarse mesh said of itself the meshes are too coarse for either
 * estimate, and the difference stands whole.
 */
function halvingError(difference: number, coarseEstimate: number, fineEstimate: number): number {
  if (!(difference <= AGREEMENT * coarseEstimate)) return 2 * difference;
  const c = Math.min(0.5, Math.max(CONTRACTION, fineEstimate / Math.max(coarseEstimate, 1e-30)));
  return (SAFETY * difference * c) / (1 - c);
}
