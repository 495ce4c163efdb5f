import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chargeAt, localCharge, type ChargeValues } from '../../solver/charge.ts';
import { ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { neutralLevel } from '../../solver/fermi-level.ts';
import { fermiThreeHalves } from '../../solver/fermi-integral.ts';
import { halved, interpolated, meshOf, type Mesh } from '../../solver/mesh.ts';
import { newton } from '../../solver/newton.ts';
import { solveByBox } from '../../solver/poisson-box.ts';
import { coldStart } from '../../solver/poisson-guess.ts';
import { solvePoisson, type PoissonEnd, type PoissonProblem } from '../../solver/poisson.ts';
import { PoissonSystem } from '../../solver/poisson-system.ts';
import { isRefusal } from '../../solver/solution.ts';
import type { Assumptions, Dopant, Layer } from '../../solver/stack.ts';
import { CRYSTAL, completeDonor } from './poisson-fixtures.ts';

const ASSUMPTIONS: Assumptions = { statistics: 'fermi-dirac', alignment: 'affinity', narrowing: false, nonParabolic: false, transmission: 'wkb' };

function problem(layers: { thickness: number; dopants: Dopant[] }[], T: number, top: (neutral: number) => PoissonEnd, sheets: number[] = []): PoissonProblem {
  const all = layers.map((l, i): Layer => ({ name: `l${i}`, material: CRYSTAL, x: { kind: 'constant', value: 0 }, thickness: l.thickness, dopants: l.dopants }));
  const charges = all.map((l) => localCharge(l, 0, T, ASSUMPTIONS));
  const neutralPsi = (i: number): number => -4.05 - neutralLevel(charges[i]).ecMinusEf;
  return {
    layers: all.map((l, i) => ({
      thickness: l.thickness,
      uniform: true,
      permittivity: () => 11.7 * EPSILON_0,
      ecFlat: () => -4.05,
      gap: () => charges[i].bands.gap,
      charge: () => charges[i],
    })),
    sheets: layers.slice(1).map((_, i) => sheets[i] ?? 0),
    top: top(neutralPsi(0)),
    bottom: { kind: 'potential', psi: neutralPsi(all.length - 1) },
  };
}

function solved(p: PoissonProblem, accuracy: number) {
  const s = solvePoisson(p, { accuracy });
  if (isRefusal(s)) throw new Error(s.reason);
  return s;
}

describe('Poisson over one homogeneous layer', () => {
  // First integral with Fermi-Dirac electrons and complete donors (exact; holes are negligible in these cases):
  // E^2 = (2/eps) q {Nc kT [F_3/2(eta + u) - F_3/2(eta)] - N u kT}, u = psi bending / kT.
  for (const [label, n, bend] of [
    ['accumulation', 1e17, 0.15],
    ['depletion', 1e17, -0.4],
    ['a degenerate layer in depletion', 1e20, -0.3],
  ] as const) {
    it(`gives the surface field of the first integral in ${label}`, () => {
      const T = 300;
      const p = problem([{ thickness: 2e-4 * Math.sqrt(1e17 / n), dopants: [completeDonor(n)] }], T, (psi) => ({ kind: 'potential', psi: psi + bend }));
      const s = solved(p, 1e-6);
      const c = p.layers[0].charge(0);
      const { kT, nc } = c.bands;
      const eta = -neutralLevel(c).ecMinusEf / kT;
      const u = bend / kT;
      const square = ((2 * ELEMENTARY_CHARGE * kT) / (11.7 * EPSILON_0)) * (nc * (fermiThreeHalves(eta + u) - fermiThreeHalves(eta)) - n * u);
      // -dpsi/dz at the top: psi falls to the bulk when the bending is upward.
      const expected = Math.sign(bend) * Math.sqrt(square);
      expect(Math.abs(s.profiles.field[0] / expected - 1)).toBeLessThan(2e-3);
    });
  }

  it('decays with the Debye length when the bending is small', () => {
    const T = 300;
    const small = 1e-4;
    const p = problem([{ thickness: 3e-5, dopants: [completeDonor(1e17)] }], T, (psi) => ({ kind: 'potential', psi: psi + small }));
    const s = solved(p, 1e-8);
    const c = p.layers[0].charge(0);
    const out: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
    chargeAt(c, neutralLevel(c).ecMinusEf, out);
    const debye = Math.sqrt((11.7 * EPSILON_0) / (ELEMENTARY_CHARGE * out.slope));
    // Exact to second order: E = (psi_s/L_D) sqrt(1 + u/3 + u^2/12), u = psi_s/kT.
    const u = small / c.bands.kT;
    const expected = (small / debye) * Math.sqrt(1 + u / 3 + (u * u) / 12);
    expect(Math.abs(s.profiles.field[0] / expected - 1)).toBeLessThan(1e-3);
  });

  it('with the box scheme falls to a quarter of its mesh error when every cell is halved', () => {
    const p = problem([{ thickness: 1e-4, dopants: [completeDonor(1e16)] }], 300, (psi) => ({ kind: 'potential', psi: psi - 0.3 }));
    let mesh = meshOf([Float64Array.from({ length: 101 }, (_, k) => (k * 1e-4) / 100)]);
    const middle: number[] = [];
    for (let level = 0; level < 4; level++) {
      const psi = new Float64Array(mesh.nodes);
      const bulk = p.bottom.kind === 'potential' ? p.bottom.psi : 0;
      psi.fill(bulk);
      if (p.top.kind === 'potential') psi[0] = p.top.psi;
      expect(newton(new PoissonSystem(p, mesh), psi).converged).toBe(true);
      middle.push(psi[10 * 2 ** level]);
      mesh = halved(mesh);
    }
    const ratio = (middle[1] - middle[2]) / (middle[2] - middle[3]);
    expect(ratio).toBeGreaterThan(3.7);
    expect(ratio).toBeLessThan(4.3);
  });
});

describe('the compact scheme', () => {
  /** A p-n step with a sheet charge on it; both rows of the interface, and an open end, take part. */
  const step = (bottom?: PoissonEnd): PoissonProblem => {
    const p = problem([{ thickness: 1e-5, dopants: [{ ...completeDonor(1e17), kind: 'acceptor' }] }, { thickness: 2e-5, dopants: [completeDonor(4e16)] }], 300, (psi) => ({ kind: 'potential', psi }), [3e11]);
    return bottom ? { ...p, bottom } : p;
  };
  /** Unevenly spaced, finer towards both ends of each layer. */
  const meshFor = (p: PoissonProblem, cells: number) =>
    meshOf(p.layers.map((l) => Float64Array.from({ length: cells + 1 }, (_, k) => (l.thickness * (1 - Math.cos((Math.PI * k) / cells))) / 2)));

  /** The same, but permittivity and flat bands slope through both layers. */
  const sloping = (): PoissonProblem => {
    const p = step();
    return { ...p, layers: p.layers.map((l) => ({ ...l, uniform: false, permittivity: (z) => (12 - (5 * z) / l.thickness) * EPSILON_0, ecFlat: (z) => -4.05 + (0.2 * z) / l.thickness })) };
  };

  for (const [label, p] of [['between contacts', step()], ['with an open end', step({ kind: 'sheet', charge: 2e11 })], ['in graded layers', sloping()]] as const) {
    it(`falls to a sixteenth of its mesh error when every cell is halved, ${label}`, () => {
      let mesh = meshFor(p, 80);
      const at: number[][] = [];
      let psi: Float64Array = new Float64Array(mesh.nodes).fill(p.top.kind === 'potential' ? p.top.psi : 0);
      if (p.bottom.kind === 'potential') psi[mesh.nodes - 1] = p.bottom.psi;
      for (let level = 0; level < 4; level++) {
        const system = new PoissonSystem(p, mesh, 'compact');
        system.chooseRows(psi, false);
        newton(system, psi);
        // Rows that were box rows at the poor first guess become compact ones at the solution.
        system.chooseRows(psi, false);
        expect(newton(system, psi).converged).toBe(true);
        expect(system.lumped.some((v) => v === 1)).toBe(false);
        at.push([psi[mesh.first[1]], psi[mesh.first[1] - 20 * 2 ** level], psi[mesh.nodes - 1 - 20 * 2 ** level]]);
        const finer = halved(mesh);
        psi = interpolated(mesh, psi, finer);
        mesh = finer;
      }
      for (let i = 0; i < 3; i++) {
        const ratio = (at[1][i] - at[2][i]) / (at[2][i] - at[3][i]);
        expect(ratio, `place ${i}`).toBeGreaterThan(14);
        expect(ratio, `place ${i}`).toBeLessThan(18);
      }
    });
  }

  it('estimates its own error by what its rows miss', () => {
    const p = step();
    for (const cells of [20, 40, 80]) {
      const solvedOn = (mesh: Mesh): { psi: Float64Array; estimate: Float64Array } => {
        const psi = new Float64Array(mesh.nodes).fill(p.top.kind === 'potential' ? p.top.psi : 0);
        if (p.bottom.kind === 'potential') psi[mesh.nodes - 1] = p.bottom.psi;
        const system = new PoissonSystem(p, mesh, 'compact');
        expect(newton(system, psi).converged).toBe(true);
        system.evaluate(psi, true);
        expect(system.factor()).toBe(true);
        const estimate = system.defects(psi);
        system.solve(estimate);
        return { psi, estimate };
      };
      const mesh = meshFor(p, cells);
      const coarse = solvedOn(mesh);
      const fine = solvedOn(halved(halved(mesh)));
      const at = mesh.first[1];
      const error = fine.psi[4 * at] - coarse.psi[at];
      expect(Math.abs(coarse.estimate[at] / error)).toBeGreaterThan(0.5);
      expect(Math.abs(coarse.estimate[at] / error)).toBeLessThan(3);
    }
  });

  it('agrees with the box scheme within both estimates on random stacks', () => {
    const unit = fc.double({ min: 0, max: 1, noNaN: true });
    const rows = fc.array(fc.record({ t: unit, n: unit, donor: fc.boolean(), bound: fc.boolean() }), { minLength: 1, maxLength: 6 });
    fc.assert(
      fc.property(rows, unit, unit, unit, (list, t, bend, sheet) => {
        const p = problem(
          list.map((r) => ({ thickness: 2e-7 * 1e3 ** r.t, dopants: [{ ...completeDonor(1e14 * 1e6 ** r.n), kind: r.donor ? 'donor' : 'acceptor', model: r.bound ? 'dilute' : 'complete' } as Dopant] })),
          10 * 60 ** t, (psi) => ({ kind: 'potential', psi: psi + (bend - 0.5) }), list.slice(1).map(() => (sheet - 0.5) * 2e12),
        );
        const compact = solved(p, 1e-5);
        expect(compact.quality.method).toBe('compact');
        const box = solveByBox(p, coldStart(p), { accuracy: 1e-5, maxNodes: 40000 }, 0);
        if (isRefusal(box)) throw new Error(box.reason);
        list.forEach((_, l) => {
          const [i, k] = [compact.profiles.layer.indexOf(l), box.profiles.layer.indexOf(l)];
          // Newton's last digits, V, beside the two estimates.
          expect(Math.abs(compact.profiles.psi[i] - box.profiles.psi[k]), `layer ${l}`).toBeLessThan(compact.quality.meshError + box.quality.meshError + 1e-12);
        });
      }),
      { numRuns: 60, seed: 20261202 },
    );
  });
});

describe('Poisson over a stack', () => {
  it('converges on a p-n-like n+/n junction from 300 K down to 4 K and on a 500 um substrate', () => {
    for (const T of [300, 77, 20, 4]) {
      const p = problem([{ thickness: 1e-7, dopants: [completeDonor(1e20)] }, { thickness: 500e-4, dopants: [completeDonor(1e14)] }], T, (psi) => ({ kind: 'potential', psi }));
      const s = solved(p, 1e-4);
      expect(s.quality.gaussError).toBeLessThan(1e-6);
      expect(s.quality.meshError).toBeLessThan(1e-4);
    }
  });

  it('shares the field of a weak sheet charge evenly to both sides', () => {
    // psi at the sheet = q sigma L_D/(2 eps), field jump q sigma/eps (exact for a weak sheet in a thick layer).
    const sigma = 1e8;
    const p = problem([{ thickness: 5e-5, dopants: [completeDonor(1e17)] }, { thickness: 5e-5, dopants: [completeDonor(1e17)] }], 300, (psi) => ({ kind: 'potential', psi }), [sigma]);
    const s = solved(p, 1e-8);
    const i = s.profiles.layer.indexOf(1);
    const jump = (ELEMENTARY_CHARGE * sigma) / (11.7 * EPSILON_0);
    expect(Math.abs((s.profiles.field[i] - s.profiles.field[i - 1]) / jump - 1)).toBeLessThan(1e-6);
    expect(Math.abs(s.profiles.field[i] / (jump / 2) - 1)).toBeLessThan(1e-3);
  });

  it('says so when nothing fixes the potential', () => {
    const c = { bands: { ...localCharge({ name: 'i', material: { ...CRYSTAL, insulator: true }, x: { kind: 'constant', value: 0 }, thickness: 1e-6, dopants: [] }, 0, 300, ASSUMPTIONS).bands }, levels: [], fixed: 0 };
    const p: PoissonProblem = {
      layers: [{ thickness: 1e-6, uniform: true, permittivity: () => 4 * EPSILON_0, ecFlat: () => -1, gap: () => 8, charge: () => c }],
      sheets: [], top: { kind: 'sheet', charge: 0 }, bottom: { kind: 'sheet', charge: 0 },
    };
    const s = solvePoisson(p);
    expect(isRefusal(s)).toBe(true);
  });
});
