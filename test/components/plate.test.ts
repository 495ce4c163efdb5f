import { describe, expect, it } from 'vitest';
import { panned, zoomed, zoomedEnergies, zoomedOnto } from '../../components/hm-plate/depth-window.ts';
import { tableReadings } from '../../components/hm-plate/plate-table.ts';
import { heldView } from '../../components/hm-plate/plate-view.ts';
import { depthText, readingAt, readingSentence } from '../../components/hm-plate/reading.ts';
import { starters } from '../../src/design/starters/index.ts';
import { depthAxis } from '../../src/drawing/depth-axis.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';

function solved(id: string): Result {
  const answer = solveDesign(starters.find((s) => s.id === id)!.design);
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
}
const result = solved('modulation-doped');
const TOTAL = 548;
const axes = (['true', 'even'] as const).map((mode) => depthAxis(result, { mode, range: [100, 900] }));

describe('the part of the depth in view', () => {
  it('keeps the place under the pointer where it is, on either axis', () => {
    for (const axis of axes) {
      const z = axis.depth(700);
      const window = zoomed(axis, TOTAL, 700, 2)!;
      const next = depthAxis(result, { mode: axis.mode, range: [100, 900], window });
      // The ends stand on neat figures, which may move them by half a pixel each.
      expect(Math.abs(next.x(z) - 700)).toBeLessThan(1.5);
    }
  });

  it('has the depth that is looked at in its middle after a press, and ends of few digits', () => {
    for (const axis of axes) {
      const z = axis.depth(620);
      const window = zoomedOnto(axis, TOTAL, z, 1.6)!;
      const next = depthAxis(result, { mode: axis.mode, range: [100, 900], window });
      expect(Math.abs(next.x(z) - 500)).toBeLessThan(12);
      for (const end of window) expect(String(end).replace(/^0\.0*|\D|0+$/g, '').length, String(end)).toBeLessThanOrEqual(3);
    }
  });

  it('stays within the stack and keeps its width where the depth that is looked at lies near an end', () => {
    const [from, to] = zoomedOnto(axes[0], TOTAL, 3, 2)!;
    expect(from).toBe(0);
    expect(to).toBeCloseTo(TOTAL / 2, -1);
  });

  it('is the whole stack when looked at from far', () => {
    expect(zoomed(axes[0], TOTAL, 500, 0.5)).toBe(undefined);
  });

  it('does not get narrower than half a nanometre', () => {
    const [from, to] = zoomed(axes[0], TOTAL, 500, 1e9)!;
    expect(to - from).toBeCloseTo(0.5, 9);
  });

  it('keeps its width at the ends of the stack', () => {
    const axis = depthAxis(result, { mode: 'true', range: [100, 900], window: [400, 500] });
    expect(panned(axis, TOTAL, 1e6)!.map((z) => Math.round(z * 1e6) / 1e6)).toEqual([448, 548]);
    expect(panned(axis, TOTAL, -1e6)!.map((z) => Math.abs(Math.round(z * 1e6) / 1e6))).toEqual([0, 100]);
    expect(panned(axis, TOTAL, 80)![0]).toBeCloseTo(410, 6);
  });

  it('zooms in energy about a level', () => {
    expect(zoomedEnergies([-2, 2], 1, 2)).toEqual([-0.5, 1.5]);
  });
});

describe('a reading', () => {
  it('is the node itself on a node', () => {
    const { profile } = result;
    const i = 40;
    const r = readingAt(result, profile.z_nm[i])!;
    expect(r.ec_minus_ef_eV).toBeCloseTo(profile.ec_eV[i] - profile.ef_eV[i], 12);
    expect(r.n_cm3 / profile.n_cm3[i]).toBeCloseTo(1, 9);
    expect(r.ef_minus_ev_eV).toBeCloseTo(profile.ef_eV[i] - profile.ev_eV[i], 12);
  });

  it('goes straight in the logarithm of the densities between nodes', () => {
    const { profile } = result;
    const i = 60;
    const r = readingAt(result, (profile.z_nm[i] + profile.z_nm[i + 1]) / 2)!;
    expect(r.n_cm3 / Math.sqrt(profile.n_cm3[i] * profile.n_cm3[i + 1])).toBeCloseTo(1, 9);
  });

  it('of an interface is that of the side asked for', () => {
    const step = result.junctions[2].delta_ec_eV;
    const [above, below] = [readingAt(result, 48, 2)!, readingAt(result, 48, 3)!];
    expect([above.layer, below.layer]).toEqual([2, 3]);
    expect(below.ec_minus_ef_eV - above.ec_minus_ef_eV).toBeCloseTo(step, 3);
  });

  it('is held within the stack at all ends', () => {
    expect(readingAt(result, -5)!.z_nm).toBe(0);
    expect(readingAt(result, 1e9)!.layer).toBe(3);
    expect(readingAt(result, 1e9)!.z_nm).toBeCloseTo(TOTAL, 6);
    const none = { ...result, profile: { ...result.profile, z_nm: [] } };
    expect(readingAt(none, 1)).toBe(null);
  });

  it('is a sentence with units', () => {
    expect(readingSentence(readingAt(result, 20)!, 'supply')).toMatch(/^20\.00 nm, supply; Ec − EF −?\d\.\d{3} eV; EF − Ev \d\.\d{3} eV; n \S+ cm⁻³; p \S+ cm⁻³; ψ \S+ V; field \S+ kV\/cm$/);
    expect([3.14159, 123.456, 12_345].map(depthText)).toEqual(['3.14 nm', '123.5 nm', '12.35 µm']);
  });
});

describe('the table of the plate', () => {
  it('goes down the stack and holds both sides of each interface', () => {
    for (const axis of axes) {
      const readings = tableReadings(result, axis);
      readings.forEach((r, i) => i > 0 && expect(r.z_nm).toBeGreaterThanOrEqual(readings[i - 1].z_nm));
      for (const [z, pair] of [[5, [0, 1]], [40, [1, 2]], [48, [2, 3]]] as const) expect(readings.filter((r) => Math.abs(r.z_nm - z) < 1e-9).map((r) => r.layer)).toEqual(pair);
    }
  });
});

describe('a view as saved', () => {
  it('keeps what fits and leaves out the rest', () => {
    expect(heldView({ depth: 'true', window: [1, 2], moved: { a: [3, 4] } })).toMatchObject({ depth: 'true', window: [1, 2], moved: { a: [3, 4] }, levels: true, vacuum: false });
    expect(heldView({ depth: 'x', window: [2, 1], energyWindow: [0, Infinity], moved: { a: [3, 'x'] }, hidden: [1, 'b'], style: 'loud' } as never)).toEqual({
      depth: undefined, window: undefined, energyWindow: undefined, shading: undefined, vacuum: false, levels: true, hidden: ['b'], moved: {}, style: undefined,
    });
  });
});
