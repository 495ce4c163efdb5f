import { chargeAt, type ChargeValues, type LocalCharge } from './charge.ts';
import { ELEMENTARY_CHARGE } from './constants.ts';
import type { Mesh } from './mesh.ts';
import { compactDefects, compactEnd, compactRow } from './poisson-weights.ts';
import { PoissonWork } from './poisson-work.ts';
import type { Landmark } from './profile.ts';
import { TridiagonalFactors } from './tridiagonal.ts';

/** One layer as Poisson's equation sees it. Functions take the depth from the top of the layer, cm. */
export interface PoissonLayer {
  /** cm */ thickness: number;
  /** no property moves with depth: each function is then asked once */ uniform: boolean;
  /** F/cm */ permittivity(z: number): number;
  /** eV, from the common vacuum level */ ecFlat(z: number): number;
  /** eV */ gap(z: number): number;
  charge(z: number): LocalCharge;
  /** what a mesh must not step over, in a graded layer */ landmarks?: readonly Landmark[];
}

/** An end of the stack: psi given (V), or a sheet charge (+q, cm^-2) with no field outside. */
export type PoissonEnd = { kind: 'potential'; psi: number } | { kind: 'sheet'; charge: number };

export interface PoissonProblem {
  layers: PoissonLayer[];
  /** +q, cm^-2, [layers - 1] */ sheets: ArrayLike<number>;
  top: PoissonEnd;
  bottom: PoissonEnd;
}

/**
 * A compact row keeps the sign of its neighbours' entries while h^2 |drho/dpsi|/eps < 12. Inside a layer the loss is harmless: such cells lie in neutral
 * layers, where the matrix stays diagonally dominant and a disturbance dies by a factor of ten a cell, or they will be refined. But the far entry
 * of a layer's end is eliminated with the row beside it, so the two rows at each end give way to box rows beyond this limit.
 */
const END_LIMIT = 6;

/**
 * Poisson's equation on one mesh, box or compact (poisson-weights.ts): at every node
 *   flux below - flux above + q (weighted charge + sheet) = 0,   flux = eps dpsi/dz between nodes.
 * The Jacobian is tridiagonal. With the box scheme it is an M-matrix whatever the mesh, since the charge falls with psi (Selberherr, Analysis and
 * Simulation of Semiconductor Devices, 1984, section 6.1). The compact rows of a layer's ends reach one node farther: that entry is
 * eliminated with the neighbouring row before the matrix is factored, and right-hand sides are treated alike in `solve`.
 */
export class PoissonSystem {
  readonly mesh: Mesh;
  readonly scheme: 'compact' | 'box';
  /** eps/h of every cell, F/cm^2 [nodes - 1] */
  readonly conductance: Float64Array;
  /** residual, C/cm^2 [nodes] */
  readonly residual: Float64Array;
  /** q times the net charge by side, C/cm^3 [nodes + layers - 1] */
  readonly density: Float64Array;
  /** its derivative by psi, <= 0 */
  readonly slope: Float64Array;
  readonly ecFlat: Float64Array;
  readonly gap: Float64Array;
  readonly permittivity: Float64Array;
  readonly charges: LocalCharge[];
  /**
   * Stretched depth of each layer's nodes, cm [layers] of [nodes of the layer]: x = eps(0) Int dz/eps, in which eps drops out of the fluxes and
   * d^2 psi/dx^2 = -rho eps/eps(0)^2 is left of the equation. The depth itself where eps is even.
   */
  readonly stretched: Float64Array[];
  /** eps/eps(0) of each layer, by side: what a charge counts more in the stretched depth [sides] */
  readonly stretch: Float64Array;
  /** three weights of each side's row, cm, for the three nodes around it within the layer [3 sides] */
  readonly weights: Float64Array;
  /** rows of sides that are of the box scheme [sides] */
  readonly lumped: Uint8Array;
  readonly work: PoissonWork;
  private readonly lower: Float64Array;
  private readonly diagonal: Float64Array;
  private readonly upper: Float64Array;
  /** how much of the neighbouring row is taken off the row of a layer's first and last node [layers] */
  private readonly takenFirst: Float64Array;
  private readonly takenLast: Float64Array;
  private readonly factors: TridiagonalFactors;
  private readonly problem: PoissonProblem;
  private readonly out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };

  /** @param work  where its cost is counted */
  constructor(problem: PoissonProblem, mesh: Mesh, scheme: 'compact' | 'box' = 'box', work: PoissonWork = new PoissonWork()) {
    this.problem = problem;
    this.work = work;
    this.mesh = mesh;
    this.scheme = scheme;
    const n = mesh.nodes;
    const layers = mesh.local.length;
    const sides = n + layers - 1;
    work.spent += sides;
    // One piece of memory for all: twenty small ones cost more than the arithmetic on them.
    const memory = new Float64Array(5 * n + 9 * sides + 2 * layers);
    let used = 0;
    const take = (length: number): Float64Array => memory.subarray(used, (used += length));
    this.conductance = take(n - 1);
    this.residual = take(n);
    this.lower = take(n);
    this.diagonal = take(n);
    this.upper = take(n);
    this.takenFirst = take(layers);
    this.takenLast = take(layers);
    this.factors = new TridiagonalFactors(n);
    this.density = take(sides);
    this.slope = take(sides);
    this.ecFlat = take(sides);
    this.gap = take(sides);
    this.permittivity = take(sides);
    this.stretch = take(sides);
    this.weights = take(3 * sides);
    this.charges = new Array<LocalCharge>(sides);
    this.lumped = new Uint8Array(sides);
    this.stretched = mesh.local.map((z, l) => this.fill(problem.layers[l], z, mesh.first[l] + l));
    this.stretched.forEach((x, l) => {
      for (let k = 0; k < x.length; k++) {
        const i = mesh.first[l] + k;
        this.weigh(l, k, scheme === 'box');
        if (k > 0) this.conductance[i - 1] = this.permittivity[mesh.first[l] + l] / (x[k] - x[k - 1]);
      }
    });
  }

  /** Local properties of a layer's nodes, asked once where the layer is uniform; returns its stretched depth. */
  private fill(layer: PoissonLayer, z: Float64Array, s0: number): Float64Array {
    let charge = layer.charge(0);
    let ecFlat = layer.ecFlat(0);
    let gap = layer.gap(0);
    const eps0 = layer.permittivity(0);
    let eps = eps0;
    let x = z;
    for (let k = 0; k < z.length; k++) {
      const s = s0 + k;
      if (!layer.uniform && k > 0) {
        charge = layer.charge(z[k]);
        ecFlat = layer.ecFlat(z[k]);
        gap = layer.gap(z[k]);
        const middle = layer.permittivity(0.5 * (z[k - 1] + z[k]));
        const above = eps;
        eps = layer.permittivity(z[k]);
        if (x === z && (middle !== eps0 || eps !== eps0)) x = Float64Array.from(z);
        // Simpson's rule on 1/eps.
        if (x !== z) x[k] = x[k - 1] + ((z[k] - z[k - 1]) * eps0 * (1 / above + 4 / middle + 1 / eps)) / 6;
      }
      this.charges[s] = charge;
      this.ecFlat[s] = ecFlat;
      this.gap[s] = gap;
      this.permittivity[s] = eps;
      this.stretch[s] = eps === eps0 ? 1 : eps / eps0;
    }
    return x;
  }

  /** Sets the weights of node k of layer l. */
  private weigh(l: number, k: number, box: boolean): void {
    const { weights, stretch } = this;
    const z = this.mesh.local[l];
    const m = z.length - 1;
    const s = this.mesh.first[l] + l + k;
    const o = 3 * s;
    this.lumped[s] = box ? 1 : 0;
    if (box) {
      weights[o] = weights[o + 1] = weights[o + 2] = 0;
      weights[o + (k === 0 ? 0 : k === m ? 2 : 1)] = 0.5 * (z[Math.min(k + 1, m)] - z[Math.max(k - 1, 0)]);
      return;
    }
    this.compactWeights(this.stretched[l], k, weights, o);
    const from = s - k + Math.min(Math.max(k - 1, 0), m - 2);
    for (let j = 0; j < 3; j++) weights[o + j] *= stretch[from + j];
  }

  private compactWeights(x: Float64Array, k: number, out: Float64Array, o: number): void {
    const m = x.length - 1;
    if (k === 0) compactEnd(x[1] - x[0], x[2] - x[1], true, out, o);
    else if (k === m) compactEnd(x[m] - x[m - 1], x[m - 1] - x[m - 2], false, out, o);
    else compactRow(x[k] - x[k - 1], x[k + 1] - x[k], out, o);
  }

  /**
   * Chooses box rows where the compact ones would lose their signs at `psi` [nodes], V. Leaves residual and matrix of `psi`.
   *
   * @param charged  density and slope are already those of `psi`
   * @returns number of layer ends whose rows changed
   */
  chooseRows(psi: Float64Array, charged: boolean): number {
    if (!charged) this.charge(psi);
    let changed = 0;
    const { mesh, slope, permittivity, lumped } = this;
    for (let l = 0; this.scheme === 'compact' && l < mesh.local.length; l++) {
      const z = this.stretched[l];
      const m = z.length - 1;
      const s0 = mesh.first[l] + l;
      for (const [end, from] of [[0, 0], [m, m - 2]]) {
        const s = s0 + from;
        const h = Math.max(z[from + 1] - z[from], z[from + 2] - z[from + 1]);
        const box = h * h * Math.max(-slope[s], -slope[s + 1], -slope[s + 2]) > END_LIMIT * permittivity[s];
        if (box === (lumped[s0 + end] === 1)) continue;
        this.weigh(l, end, box);
        this.weigh(l, from + 1, box);
        changed++;
      }
    }
    this.assemble(psi, true);
    return changed;
  }

  /** Residual at `psi` [nodes], V; with `jacobian` also the matrix d residual/d psi. */
  evaluate(psi: Float64Array, jacobian: boolean): void {
    this.charge(psi);
    this.assemble(psi, jacobian);
  }

  private charge(psi: Float64Array): void {
    const { mesh, density, slope, ecFlat, charges, out } = this;
    this.work.spent += charges.length;
    const q = ELEMENTARY_CHARGE;
    for (let l = 0; l < mesh.local.length; l++) {
      const from = mesh.first[l] + l;
      const to = from + mesh.local[l].length;
      if (charges[from].bands.insulator) continue;
      for (let s = from; s < to; s++) {
        chargeAt(charges[s], ecFlat[s] - psi[s - l], out);
        density[s] = q * out.net;
        slope[s] = -q * out.slope;
      }
    }
  }

  private assemble(psi: Float64Array, jacobian: boolean): void {
    const { mesh, problem, residual, diagonal, lower, upper, conductance, density, slope, weights, takenFirst, takenLast } = this;
    const layers = mesh.local.length;
    for (let l = 0; l < layers; l++) {
      const m = mesh.local[l].length - 1;
      const i0 = mesh.first[l];
      const s0 = i0 + l;
      const last = i0 + m;
      // The two ends' half rows: the upper layer's last and this one's first add up on the interface.
      const w = 3 * s0;
      const v = 3 * (s0 + m);
      const top = conductance[i0] * (psi[i0 + 1] - psi[i0]) + weights[w] * density[s0] + weights[w + 1] * density[s0 + 1] + weights[w + 2] * density[s0 + 2];
      residual[i0] = l === 0 ? top : residual[i0] + top + ELEMENTARY_CHARGE * problem.sheets[l - 1];
      residual[last] =
        -conductance[last - 1] * (psi[last] - psi[last - 1]) + weights[v] * density[s0 + m - 2] + weights[v + 1] * density[s0 + m - 1] + weights[v + 2] * density[s0 + m];
      for (let k = 1; k < m; k++) {
        const i = i0 + k;
        const s = s0 + k;
        const above = conductance[i - 1];
        const below = conductance[i];
        const w0 = weights[3 * s];
        const w1 = weights[3 * s + 1];
        const w2 = weights[3 * s + 2];
        residual[i] = below * (psi[i + 1] - psi[i]) - above * (psi[i] - psi[i - 1]) + w0 * density[s - 1] + w1 * density[s] + w2 * density[s + 1];
        if (jacobian) {
          lower[i] = above + w0 * slope[s - 1];
          diagonal[i] = -above - below + w1 * slope[s];
          upper[i] = below + w2 * slope[s + 1];
        }
      }
      if (!jacobian) continue;
      // Far entries are eliminated with the neighbouring rows, which are inner ones.
      const down = (weights[w + 2] * slope[s0 + 2]) / upper[i0 + 1];
      const up = (weights[v] * slope[s0 + m - 2]) / lower[last - 1];
      takenFirst[l] = down;
      takenLast[l] = up;
      const own = -conductance[i0] + weights[w] * slope[s0] - down * lower[i0 + 1];
      diagonal[i0] = l === 0 ? own : diagonal[i0] + own;
      upper[i0] = conductance[i0] + weights[w + 1] * slope[s0 + 1] - down * diagonal[i0 + 1];
      diagonal[last] = -conductance[last - 1] + weights[v + 2] * slope[s0 + m] - up * upper[last - 1];
      lower[last] = conductance[last - 1] + weights[v + 1] * slope[s0 + m - 1] - up * diagonal[last - 1];
    }
    this.end(problem.top, 0, psi, jacobian);
    this.end(problem.bottom, mesh.nodes - 1, psi, jacobian);
  }

  private end(end: PoissonEnd, i: number, psi: Float64Array, jacobian: boolean): void {
    if (end.kind === 'sheet') {
      this.residual[i] += ELEMENTARY_CHARGE * end.charge;
      return;
    }
    // A row of its own scale would spoil no test here: it is exact after the first full step, and zero in the guess.
    const scale = i === 0 ? this.conductance[0] : this.conductance[i - 1];
    this.residual[i] = -scale * (psi[i] - end.psi);
    if (jacobian) {
      this.diagonal[i] = -scale;
      if (i === 0) this.upper[0] = this.takenFirst[0] = 0;
      else this.lower[i] = this.takenLast[this.takenLast.length - 1] = 0;
    }
  }

  /** Factors the Jacobian of the last `evaluate(psi, true)`; false when it is singular. */
  factor(): boolean {
    return this.factors.factor(this.lower, this.diagonal, this.upper);
  }

  /** Solves Jacobian x = rhs with the last factors, in place [nodes]. */
  solve(rhs: Float64Array): void {
    const { mesh, takenFirst, takenLast } = this;
    for (let l = 0; l < mesh.local.length; l++) {
      const first = mesh.first[l];
      const last = first + mesh.local[l].length - 1;
      rhs[first] -= takenFirst[l] * rhs[first + 1];
      rhs[last] -= takenLast[l] * rhs[last - 1];
    }
    this.factors.solve(rhs);
  }

  /**
   * Charge that each row misses, C/cm^2 [nodes], at the last evaluated `psi`, from fourth differences of the charge (poisson-weights.ts); box rows count
   * what they leave out of the parabola too. Layers need at least five nodes. Ends of given potential miss nothing.
   *
   * An inversion charge rises towards an interface as exp(-psi/kT). Differences taken from its foot see (1 - exp(-x))^4 of its fourth derivative in place of
   * x^4, x = step of psi/kT over a cell: at the ends, where differences are one-sided, this is put right.
   */
  defects(psi: Float64Array): Float64Array {
    const { mesh, problem, density, weights, lumped } = this;
    const out = new Float64Array(mesh.nodes);
    const compact = new Float64Array(3);
    // One piece of memory for all layers: of a thousand, the allocations would cost more than the sums.
    const longest = this.stretched.reduce((most, x) => Math.max(most, x.length), 0);
    const own = new Float64Array(longest);
    const source = new Float64Array(longest);
    const spare = new Float64Array(2 * longest);
    const [differences, fourth] = [spare.subarray(0, longest), spare.subarray(longest)];
    this.stretched.forEach((x, l) => {
      const first = mesh.first[l];
      const s0 = first + l;
      const m = x.length - 1;
      const { insulator, kT } = this.charges[s0].bands;
      if (insulator) return;
      for (let k = 0; k <= m; k++) source[k] = differences[k] = density[s0 + k] * this.stretch[s0 + k];
      compactDefects(x, differences, own, fourth);
      const top = steepening((psi[first + 1] - psi[first]) / kT);
      const bottom = steepening((psi[first + m] - psi[first + m - 1]) / kT);
      own[0] *= top;
      own[1] *= top;
      own[m - 1] *= bottom;
      own[m] *= bottom;
      for (let k = 0; k <= m; k++) {
        if (lumped[s0 + k]) {
          this.compactWeights(x, k, compact, 0);
          const from = Math.min(Math.max(k - 1, 0), m - 2);
          for (let j = 0; j < 3; j++) own[k] += compact[j] * source[from + j] - weights[3 * (s0 + k) + j] * density[s0 + from + j];
        }
        out[first + k] += own[k];
      }
    });
    if (problem.top.kind === 'potential') out[0] = 0;
    if (problem.bottom.kind === 'potential') out[mesh.nodes - 1] = 0;
    return out;
  }

  /** Diagonal of the inverse Jacobian: how far a charge put on a node moves that node, V cm^2/C [nodes], positive. */
  response(): Float64Array {
    return this.factors.inverseDiagonal().map(Math.abs);
  }
}

/** [x/(1 - exp(-x))]^4 for x = |step|. */
function steepening(step: number): number {
  const x = Math.abs(step);
  return x < 1e-3 ? 1 : (x / -Math.expm1(-x)) ** 4;
}
