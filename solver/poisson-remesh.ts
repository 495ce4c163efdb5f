import { meshOf, type Mesh } from './mesh.ts';
import type { Landmark } from './profile.ts';
import type { PoissonProblem, PoissonSystem } from './poisson-system.ts';

/** How steeply the cell size may grow along a layer: neighbouring cells stay alike within about this share, on which the fourth order rests. */
const GRADING = 0.3;
/** Cells change by no more than this from one mesh to the next: the differences that ask for it are themselves only rough. */
const FINER = 1 / 8;
const COARSER = 2.5;
/** Least cells of a layer; the estimate takes five nodes, and a graded profile must not hide between them. */
const LEAST_CELLS = 6;
const LEAST_CELLS_GRADED = 48;
/** Of a cell: landmarks nearer than this to each other share a node. */
const NEAREST_MARK = 1 / 3;
/** A whole number of cells that rounding put a hair above itself stays that number. */
const ROUNDING = 1e-9;
/** What a row misses grows with the fifth power of its cells. */
const POWER = 1 / 5;
/** What a cubic between nodes misses grows with the fourth power of its cell, but more slowly at a bend of the doping that the cells do not resolve yet. */
const POWER_BETWEEN = 1 / 4;
const POWER_KINK = 1 / 2;

/** Rows' shares in the error of psi: the charge that each misses times the response of its own node, V [nodes]. */
export function rowErrors(defects: Float64Array, response: Float64Array): Float64Array {
  const out = new Float64Array(defects.length);
  for (let i = 0; i < out.length; i++) out[i] = Math.abs(defects[i]) * response[i];
  return out;
}

/**
 * A new mesh on which every row misses the same: cell sizes in proportion to (goal/row's error)^(1/5), smoothed so that they grow evenly, and nodes
 * set where the integral of 1/size passes whole steps (de Boor, Lect. Notes Math. 363, 12, 1974; Pereyra and Sewell, Numer. Math. 23, 261, 1975).
 *
 * @param errors  of the rows of `system`, V [nodes]
 * @param aim     wished error of a row, V
 * @param between  of the cubic between nodes, V [sides]; the larger of the two demands counts
 */
export function equidistributed(problem: PoissonProblem, system: PoissonSystem, errors: Float64Array, aim: number, between: Float64Array, betweenAim: number): Mesh {
  const { mesh } = system;
  return meshOf(
    mesh.local.map((z, l) => {
      const m = z.length - 1;
      if (system.charges[mesh.first[l] + l].bands.insulator) return Float64Array.from({ length: 5 }, (_, k) => (z[m] * k) / 4);
      const first = mesh.first[l];
      const least = problem.layers[l].uniform ? LEAST_CELLS : LEAST_CELLS_GRADED;
      const most = z[m] / least;
      const size = new Float64Array(m + 1);
      for (let k = 0; k <= m; k++) {
        const h = 0.5 * (z[Math.min(m, k + 1)] - z[Math.max(0, k - 1)]) * (k === 0 || k === m ? 2 : 1);
        // A difference may pass through zero on one node: the neighbours speak for it.
        let error = errors[first + k];
        if (k > 0) error = Math.max(error, errors[first + k - 1]);
        if (k < m) error = Math.max(error, errors[first + k + 1]);
        const cell = first + l + k;
        const off = Math.max(k > 0 ? between[cell - 1] : 0, k < m ? between[cell] : 0) / betweenAim;
        const change = Math.min((aim / error) ** POWER, off > 1 ? off ** -POWER_KINK : off ** -POWER_BETWEEN);
        size[k] = Math.min(most, h * Math.min(COARSER, Math.max(FINER, change)));
      }
      for (const mark of problem.layers[l].landmarks ?? []) {
        for (let k = 0; k <= m; k++) size[k] = Math.min(size[k], mark.reach + GRADING * Math.abs(z[k] - mark.z));
      }
      for (let k = 1; k <= m; k++) size[k] = Math.min(size[k], size[k - 1] + GRADING * (z[k] - z[k - 1]));
      for (let k = m - 1; k >= 0; k--) size[k] = Math.min(size[k], size[k + 1] + GRADING * (z[k + 1] - z[k]));
      return placed(z, size, least, problem.layers[l].landmarks ?? []);
    }),
  );
}

/**
 * Nodes at even steps of Int dz/size, size straight between the old nodes, and one at each landmark: a kink between two nodes would be cut off, which no row
 * of the mesh could see. A landmark closer to another, or to an end, than a third of the cell there gives way.
 */
function placed(z: Float64Array, size: Float64Array, least: number, landmarks: readonly Landmark[]): Float64Array {
  const m = z.length - 1;
  const count = new Float64Array(m + 1);
  // Int dz/size over a cell: h ln(1 + r)/(r s0), r = s1/s0 - 1.
  for (let k = 0; k < m; k++) count[k + 1] = count[k] + steps(z, size, k, z[k + 1]);
  const marks = landmarks.map((mark) => mark.z).filter((x) => x > 0 && x < z[m]).sort((x, y) => x - y);
  const bounds: { z: number; count: number }[] = [{ z: z[0], count: 0 }];
  let k = 0;
  for (const mark of marks) {
    while (k + 1 < m && z[k + 1] <= mark) k++;
    const at = count[k] + steps(z, size, k, mark);
    if (at - bounds[bounds.length - 1].count > NEAREST_MARK && count[m] - at > NEAREST_MARK) bounds.push({ z: mark, count: at });
  }
  bounds.push({ z: z[m], count: count[m] });
  const stretch = Math.max(1, least / Math.ceil(count[m]));
  const out: number[] = [z[0]];
  k = 0;
  for (let s = 0; s + 1 < bounds.length; s++) {
    const [from, to] = [bounds[s], bounds[s + 1]];
    const cells = Math.max(1, Math.ceil((to.count - from.count) * stretch - ROUNDING));
    for (let j = 1; j < cells; j++) {
      const c = from.count + ((to.count - from.count) * j) / cells;
      while (k + 1 < m && count[k + 1] < c) k++;
      const r = size[k + 1] / size[k] - 1;
      const x = ((c - count[k]) * size[k]) / (z[k + 1] - z[k]);
      out.push(z[k] + (z[k + 1] - z[k]) * Math.min(1, Math.abs(r) < 1e-6 ? x : Math.expm1(r * x) / r));
    }
    out.push(to.z);
  }
  return Float64Array.from(out);
}

/** Int dz/size from old node k to a depth within its cell. */
function steps(z: Float64Array, size: Float64Array, k: number, to: number): number {
  const r = ((size[k + 1] / size[k] - 1) * (to - z[k])) / (z[k + 1] - z[k]);
  return ((to - z[k]) / size[k]) * (Math.abs(r) < 1e-6 ? 1 - r / 2 : Math.log1p(r) / r);
}

/**
 * Carries a solved potential to another mesh of the same stack: straight between nodes plus the bend that Poisson's equation itself gives there,
 * psi'' = -rho/eps with the charge straight between nodes. Where that bend would make psi turn within a cell it is cut back.
 *
 * @param psi  as last evaluated in `system`, V [nodes]
 */
export function bent(system: PoissonSystem, psi: Float64Array, to: Mesh): Float64Array {
  const { mesh: from, density, permittivity } = system;
  const out = new Float64Array(to.nodes);
  for (let l = 0; l < to.local.length; l++) {
    const a = from.local[l];
    const b = to.local[l];
    let c = 0;
    for (let k = 0; k < b.length; k++) {
      while (c + 2 < a.length && a[c + 1] < b[k]) c++;
      const h = a[c + 1] - a[c];
      const u = Math.min(1, Math.max(0, (b[k] - a[c]) / h));
      const i = from.first[l] + c;
      const s = i + l;
      const rise = psi[i + 1] - psi[i];
      const bend = ((h * h) / (6 * permittivity[s])) * (density[s] * (2 - u) + density[s + 1] * (1 + u));
      const most = Math.abs(rise);
      out[to.first[l] + k] = psi[i] + u * rise + u * (1 - u) * Math.max(-most, Math.min(most, bend));
    }
  }
  return out;
}
