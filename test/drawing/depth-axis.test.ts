import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { depthAxis, type DepthMode } from '../../src/drawing/depth-axis.ts';
import { textWidth } from '../../src/drawing/glyph-widths.ts';
import { inventedResult } from './invented-result.ts';
import { STACKS } from './results.ts';

const MODES: DepthMode[] = ['true', 'even'];
const results = Object.entries(STACKS).map(([name, make]) => [name, make()] as const);

describe('the depth axis', () => {
  for (const mode of MODES) {
    it(`rises strictly and can be turned back, ${mode}`, () => {
      for (const [name, result] of results) {
        const total = result.layers.reduce((sum, l) => sum + l.thickness_nm, 0);
        const axis = depthAxis(result, { mode, range: [50, 850] });
        fc.assert(
          fc.property(fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }), (a, b) => {
            const [z1, z2] = [Math.min(a, b) * total, Math.max(a, b) * total];
            if (z2 - z1 > 1e-9 * total) expect(axis.x(z2), name).toBeGreaterThan(axis.x(z1));
            expect(Math.abs(axis.depth(axis.x(z1)) - z1), name).toBeLessThan(1e-9 * total + 1e-12);
          }),
          { numRuns: 100 },
        );
      }
    });

    it(`puts the window on the whole range, ${mode}`, () => {
      const axis = depthAxis(inventedResult(), { mode, range: [40, 640], window: [95, 130] });
      expect(axis.x(95)).toBeCloseTo(40, 9);
      expect(axis.x(130)).toBeCloseTo(640, 9);
      expect(axis.edges).toHaveLength(4);
      expect(axis.edges[0]).toBeLessThan(40);
      expect(axis.edges[3]).toBeGreaterThan(640);
    });

    it(`sets ticks apart and at their depths, ${mode}`, () => {
      for (const [name, result] of results) {
        for (const width of [200, 340, 1000]) {
          const axis = depthAxis(result, { mode, range: [50, 50 + width] });
          expect(axis.ticks.length, name).toBeGreaterThanOrEqual(2);
          axis.ticks.slice(1).forEach((tick, i) => {
            const before = axis.ticks[i];
            expect(tick.x - before.x, `${name}: ${before.label} | ${tick.label}`).toBeGreaterThan((textWidth(tick.label, 11) + textWidth(before.label, 11)) / 2);
          });
          const unit = axis.title.includes('µm') ? 1000 : 1;
          for (const { x, label } of axis.ticks) {
            const nm = label.endsWith(' µm') ? 1000 * Number.parseFloat(label) : unit * Number(label);
            // Labels have four digits.
            expect(Math.abs(axis.depth(x) - nm), `${name}: ${label}`).toBeLessThanOrEqual(5.1e-4 * nm + 1e-9);
          }
        }
      }
    });
  }

  it('tells neighbouring depths apart below a thick wafer', () => {
    const result = inventedResult();
    result.layers[0].thickness_nm = 300_000;
    result.profile.z_nm = result.profile.z_nm.map((z, i) => (result.profile.layer[i] === 0 ? z * 3000 : z + 299_900));
    const part: [number, number] = [299_990, 300_050];
    for (const axis of [depthAxis(result, { mode: 'even', range: [0, 1200] }), ...MODES.map((mode) => depthAxis(result, { mode, range: [0, 1200], window: part }))]) {
      const labels = axis.ticks.map(({ label }) => label);
      expect(new Set(labels).size, labels.join(' | ')).toBe(labels.length);
      expect(labels.length).toBeGreaterThan(4);
    }
  });

  it('sets the figures of an uneven axis at much the same distances between two boundaries', () => {
    const axis = depthAxis(inventedResult(), { mode: 'even', range: [0, 1200] });
    for (let l = 0; l < axis.edges.length - 1; l++) {
      const within = axis.ticks.map(({ x }) => x).filter((x) => x >= axis.edges[l] - 0.01 && x <= axis.edges[l + 1] + 0.01);
      const gaps = within.slice(1).map((x, i) => x - within[i]);
      if (gaps.length > 1) expect(Math.max(...gaps) / Math.min(...gaps), `layer ${l}: ${gaps.map(Math.round).join(' ')}`).toBeLessThan(2.4);
    }
  });

  it('shows by ticks without figures, at even steps of depth, how an uneven axis is stretched', () => {
    const axis = depthAxis(inventedResult(), { mode: 'even', range: [0, 1200] });
    expect(axis.marks.length).toBeGreaterThan(10);
    const all = [...axis.ticks.map(({ x }) => x), ...axis.marks].sort((a, b) => a - b);
    all.slice(1).forEach((x, i) => expect(x - all[i]).toBeGreaterThanOrEqual(4 - 1e-9));
    for (const x of axis.marks) {
      const z = axis.depth(x);
      expect(Math.abs(z - Number(z.toPrecision(4))), String(z)).toBeLessThan(1e-6 * z);
    }
    expect(depthAxis(inventedResult(), { mode: 'true', range: [0, 1200] }).marks).toEqual([]);
  });

  it('is even in nm in true mode', () => {
    const axis = depthAxis(inventedResult(), { mode: 'true', range: [0, 2120] });
    expect(axis.x(1000)).toBeCloseTo(1000, 9);
    expect(axis.title).toBe('depth (µm)');
  });

  it('gives a 2 nm layer on a 300 um wafer room to be read', () => {
    const result = inventedResult();
    result.layers[1].thickness_nm = 2;
    result.layers[2].thickness_nm = 300_000;
    result.profile.z_nm = result.profile.z_nm.map((z, i) => (result.profile.layer[i] === 1 ? 100 + (z - 100) / 10 : result.profile.layer[i] === 2 ? 102 + ((z - 120) / 2000) * 300_000 : z));
    const axis = depthAxis(result, { mode: 'even', range: [0, 1000] });
    expect(axis.edges[2] - axis.edges[1]).toBeGreaterThan(1000 / 6);
    expect(axis.title).toContain('even-handed');
  });

  it('gives the layer that bends more the more room', () => {
    const axis = depthAxis(inventedResult(), { mode: 'even', range: [0, 1000] });
    const room = axis.edges.slice(1).map((x, i) => x - axis.edges[i]);
    // 0.6, 0.1 and 0.75 V of bending: a sixth of the room each, and half of it by these.
    [0.6, 0.1, 0.75].forEach((bending, i) => expect(room[i]).toBeCloseTo(1000 * (1 / 6 + (0.5 * bending) / 1.45), 0));
  });

  it('moves smoothly while a value is dragged', () => {
    const at = (scale: number): number[] => {
      const result = inventedResult();
      result.profile.potential_V = result.profile.potential_V.map((psi, i) => (result.profile.layer[i] === 0 ? psi * scale : psi));
      const axis = depthAxis(result, { mode: 'even', range: [0, 1000] });
      return [20, 60, 110, 150, 700, 1900].map(axis.x);
    };
    for (let scale = 0; scale < 2; scale += 0.05) {
      const [here, next] = [at(scale), at(scale + 1e-4)];
      here.forEach((x, i) => expect(Math.abs(x - next[i])).toBeLessThan(1));
    }
  });

  it('shares evenly where nothing bends', () => {
    const result = inventedResult();
    result.profile.potential_V = result.profile.potential_V.map(() => 0.3);
    const axis = depthAxis(result, { mode: 'even', range: [0, 900] });
    expect(axis.edges.map(Math.round)).toEqual([0, 300, 600, 900]);
    expect(axis.x(50)).toBeCloseTo(150, 9);
  });

  it('refuses a mode that it does not know', () => {
    expect(() => depthAxis(inventedResult(), { mode: 'log' as DepthMode, range: [0, 1] })).toThrow('unknown depth mode: log');
  });

  it('holds a window that reaches beyond the stack within it', () => {
    expect(depthAxis(inventedResult(), { mode: 'true', range: [0, 1], window: [-50, 1e9] }).window).toEqual([0, 2120]);
    const point = depthAxis(inventedResult(), { mode: 'even', range: [0, 1], window: [500, 500] }).window;
    expect(point[1]).toBeGreaterThan(point[0]);
  });
});
