import { chargeAt, type ChargeValues, type LocalCharge } from './charge.ts';
import { ELEMENTARY_CHARGE } from './constants.ts';
import type { Mesh } from './mesh.ts';
import { TridiagonalFactors } from './tridiagonal.ts';

/** One layer as Poisson's equation sees it. Functions take the depth from the top of the layer, cm. */
export interface PoissonLayer {
  /** cm */ thickness: number;
  /** no property moves with depth: each function is then asked once */ uniform: boolean;
  /** F/cm */ permittivity(z: number): number;
  /** eV, from the common vacuum level */ ecFlat(z: number): number;
  /** eV */ gap(z: number): number;
  charge(z: number): LocalCharge;
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
 * The box scheme (finite volumes) of Poisson's equation on one mesh: at every node
 *   flux below - flux above + q (charge of the node's box + sheet) = 0,   flux = eps dpsi/dz between nodes.
 * It closes Gauss's law box by box, and its Jacobian is an M-matrix whatever the mesh, since the charge falls with psi
 * (Selberherr, Analysis and Simulation of Semiconductor Devices, 1984, section 6.1).
 */
export class PoissonSystem {
  readonly mesh: Mesh;
  /** eps/h of every cell, F/cm^2 [nodes - 1] */
  readonly conductance: Float64Array;
  /** residual, C/cm^2 [nodes] */
  readonly residual: Float64Array;
  /** q times the net charge by side, C/cm^3 [nodes + layers - 1] */
  readonly density: Float64Array;
  readonly ecFlat: Float64Array;
  readonly gap: Float64Array;
  readonly permittivity: Float64Array;
  readonly charges: LocalCharge[];
  private readonly lower: Float64Array;
  private readonly diagonal: Float64Array;
  private readonly upper: Float64Array;
  readonly factors: TridiagonalFactors;
  private readonly problem: PoissonProblem;
  private readonly out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };

  constructor(problem: PoissonProblem, mesh: Mesh) {
    this.problem = problem;
    this.mesh = mesh;
    const n = mesh.nodes;
    const sides = n + mesh.local.length - 1;
    this.conductance = new Float64Array(n - 1);
    this.residual = new Float64Array(n);
    this.lower = new Float64Array(n);
    this.diagonal = new Float64Array(n);
    this.upper = new Float64Array(n);
    this.factors = new TridiagonalFactors(n);
    this.density = new Float64Array(sides);
    this.ecFlat = new Float64Array(sides);
    this.gap = new Float64Array(sides);
    this.permittivity = new Float64Array(sides);
    this.charges = new Array<LocalCharge>(sides);
    mesh.local.forEach((z, l) => {
      const layer = problem.layers[l];
      const first = mesh.first[l];
      let charge = layer.charge(0);
      let ecFlat = layer.ecFlat(0);
      let gap = layer.gap(0);
      let eps = layer.permittivity(0);
      for (let k = 0; k < z.length; k++) {
        if (!layer.uniform && k > 0) {
          charge = layer.charge(z[k]);
          ecFlat = layer.ecFlat(z[k]);
          gap = layer.gap(z[k]);
          eps = layer.permittivity(z[k]);
        }
        const s = first + l + k;
        this.charges[s] = charge;
        this.ecFlat[s] = ecFlat;
        this.gap[s] = gap;
        this.permittivity[s] = eps;
        if (k > 0) {
          const middle = layer.uniform ? eps : layer.permittivity(0.5 * (z[k - 1] + z[k]));
          this.conductance[first + k - 1] = middle / (z[k] - z[k - 1]);
        }
      }
    });
  }

  /** Residual at `psi` [nodes], V; with `jacobian` also the matrix d residual/d psi. */
  evaluate(psi: Float64Array, jacobian: boolean): void {
    const { mesh, problem, residual, diagonal, lower, upper, conductance, density, ecFlat, charges, out } = this;
    const q = ELEMENTARY_CHARGE;
    residual.fill(0);
    if (jacobian) diagonal.fill(0);
    const layers = mesh.local.length;
    for (let l = 0; l < layers; l++) {
      const z = mesh.local[l];
      const first = mesh.first[l];
      for (let k = 0; k < z.length; k++) {
        const i = first + k;
        const s = i + l;
        chargeAt(charges[s], ecFlat[s] - psi[i], out);
        const rho = q * out.net;
        density[s] = rho;
        const box = 0.5 * ((k > 0 ? z[k] - z[k - 1] : 0) + (k + 1 < z.length ? z[k + 1] - z[k] : 0));
        residual[i] += rho * box;
        if (jacobian) diagonal[i] -= q * out.slope * box;
        if (k + 1 < z.length) {
          const a = conductance[i];
          const flux = a * (psi[i + 1] - psi[i]);
          residual[i] += flux;
          residual[i + 1] -= flux;
          if (jacobian) {
            diagonal[i] -= a;
            diagonal[i + 1] -= a;
            upper[i] = a;
            lower[i + 1] = a;
          }
        }
      }
      if (l > 0) residual[first] += q * problem.sheets[l - 1];
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
      if (i === 0) this.upper[0] = 0;
      else this.lower[i] = 0;
    }
  }

  /** Factors the Jacobian of the last `evaluate(psi, true)`; false when it is singular. */
  factor(): boolean {
    return this.factors.factor(this.lower, this.diagonal, this.upper);
  }
}
