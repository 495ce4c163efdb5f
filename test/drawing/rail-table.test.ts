import { describe, expect, it } from 'vitest';
import { railRows } from '../../src/drawing/rail-table.ts';
import { hereAt } from '../../src/drawing/rail.ts';
import { STACKS } from './results.ts';

describe('the rail as figures', () => {
  it('stands half filled at the Fermi level, nine tenths and one tenth at the ends of the thermal width, and has no states in the gap', () => {
    for (const make of Object.values(STACKS)) {
      const result = make();
      const depth = result.layers[0].thickness_nm / 2;
      const { ec, ev } = hereAt(result, depth);
      const rows = railRows(result, depth, [-3, 3]);
      for (const share of [0.9, 0.5, 0.1]) expect(Math.min(...rows.map(({ occupancy }) => Math.abs(occupancy - share)))).toBeLessThan(1e-12);
      expect(rows.map(({ energy_eV }) => energy_eV)).toEqual(rows.map(({ energy_eV }) => energy_eV).sort((a, b) => b - a));
      for (const { energy_eV, occupancy, states, carriers } of rows) {
        if (energy_eV < ec && energy_eV > ev) expect(states).toBe(null);
        // g f of electrons, g (1 - f) of holes.
        else if (states !== null) expect(carriers! / states).toBeCloseTo(energy_eV > ec ? occupancy : 1 - occupancy, 9);
      }
    }
  });

  it('integrates to the carriers that the result gives', () => {
    const result = STACKS.diode();
    const depth = result.layers[0].thickness_nm / 2;
    const { ec, n, p, ev, kT } = hereAt(result, depth);
    // One band at a time: the axis begins a hair inside, and the rows are its midpoints.
    const sum = (from: number, to: number): number => {
      let total = 0;
      const cells = 400;
      for (let i = 0; i < cells; i++) {
        const a = from + ((to - from) * i) / cells;
        const row = railRows(result, depth, [a, a + (to - from) / cells])[8];
        total += (row.carriers ?? 0) * Math.abs((to - from) / cells);
      }
      return total;
    };
    // The square root at the edge costs the midpoint rule about a per cent.
    expect(sum(ec, ec + 40 * kT) / n).toBeCloseTo(1, 1);
    expect(sum(ev - 40 * kT, ev) / p).toBeCloseTo(1, 1);
  });
});
