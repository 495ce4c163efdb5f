import { describe, expect, it } from 'vitest';
import { energyAxis } from '../../src/drawing/energy-axis.ts';
import { inventedResult } from './invented-result.ts';
import { STACKS } from './results.ts';

describe('the energy axis', () => {
  it('holds both edges and the Fermi level of every semiconductor layer', () => {
    for (const [name, make] of Object.entries(STACKS)) {
      const result = make();
      const { domain } = energyAxis(result, { range: [500, 20] });
      result.profile.ec_eV.forEach((ec, i) => {
        if (result.layers[result.profile.layer[i]].insulator) return;
        expect(domain[1], name).toBeGreaterThan(ec);
        expect(domain[0], name).toBeLessThan(result.profile.ev_eV[i]);
      });
      expect(domain[0]).toBeLessThan(0);
      expect(domain[1]).toBeGreaterThan(0);
    }
  });

  it('shows the barrier of an oxide but does not press the semiconductor flat for its gap', () => {
    const result = STACKS.gate();
    const { domain } = energyAxis(result, { range: [500, 20] });
    expect(domain[1]).toBeGreaterThan(result.profile.ec_eV[0]);
    expect(domain[0]).toBeGreaterThan(result.profile.ev_eV[0]);
    expect(1.12 / (domain[1] - domain[0])).toBeGreaterThan(0.15);
  });

  it('has a scale in a low picture too: three ticks or more', () => {
    for (const [low, high] of [[-0.95, 0.7], [-0.4, 0.9], [-3.9, 0.9], [0.1001, 0.1004]]) {
      const { ticks } = energyAxis(inventedResult(), { range: [130, 0], window: [low, high] });
      expect(ticks.length, `${low} to ${high}`).toBeGreaterThanOrEqual(3);
      expect(new Set(ticks.map(({ label }) => label)).size).toBe(ticks.length);
    }
  });

  it('makes room for the vacuum level when asked', () => {
    const result = inventedResult();
    expect(energyAxis(result, { range: [500, 20] }).domain[1]).toBeLessThan(2);
    expect(energyAxis(result, { range: [500, 20], vacuum: true }).domain[1]).toBeGreaterThan(Math.max(...result.profile.vacuum_eV));
  });

  it('runs up, can be turned back, and prefers the zoom to the shared energies', () => {
    const axis = energyAxis(inventedResult(), { range: [500, 20], window: [0.5, -0.5], domain: [-3, 3] });
    expect(axis.domain).toEqual([-0.5, 0.5]);
    expect(axis.y(-0.5)).toBe(500);
    expect(axis.y(0.5)).toBe(20);
    expect(axis.energy(axis.y(0.123))).toBeCloseTo(0.123, 12);
  });

  it('labels ticks with the decimals that their step needs', () => {
    const fine = energyAxis(inventedResult(), { range: [500, 20], window: [-0.02, 0.03] });
    for (const { y, label } of fine.ticks) expect(Number(label.replace('−', '-'))).toBeCloseTo(fine.energy(y), 9);
    expect(fine.ticks.some(({ label }) => label.startsWith('−'))).toBe(true);
    const labels = fine.ticks.map(({ label }) => label);
    expect(new Set(labels).size).toBe(labels.length);
  });

  it('refuses an empty window', () => {
    expect(() => energyAxis(inventedResult(), { range: [500, 20], window: [1, 1] })).toThrow('no energy window');
    expect(() => energyAxis(inventedResult(), { range: [500, 20], window: [Number.NaN, 1] })).toThrow('no energy window');
  });
});
