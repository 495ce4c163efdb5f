import { describe, expect, it } from 'vitest';
import { erfc, inverseErfc } from '../../solver/erfc.ts';
import { isUniform, profileAt } from '../../solver/profile.ts';
import { crystalWith, dopant, layerOf } from './point-fixtures.ts';

describe('profiles', () => {
  it('meet both ends, whichever is larger', () => {
    for (const kind of ['linear', 'gaussian', 'erfc'] as const) {
      for (const [from, to] of [[1e19, 1e15], [1e15, 1e19]]) {
        expect(profileAt({ kind, from, to }, 0, 2e-5) / from - 1).toBeCloseTo(0, 12);
        expect(profileAt({ kind, from, to }, 2e-5, 2e-5) / to - 1).toBeCloseTo(0, 12);
      }
    }
  });

  it('a falling Gaussian passes (to/from)^(1/4) at half depth', () => {
    expect(profileAt({ kind: 'gaussian', from: 1e20, to: 1e16 }, 1, 2) / 1e19).toBeCloseTo(1, 12);
  });

  it('an implant peaks at its depth and keeps its background', () => {
    const p = { kind: 'implant', peak: 8e17, depth: 2.5e-5, straggle: 4e-6, background: 1e15 } as const;
    expect(profileAt(p, 2.5e-5, 1e-4) / 8.01e17).toBeCloseTo(1, 12);
    expect(profileAt(p, 2.9e-5, 1e-4) / (8e17 * Math.exp(-0.5) + 1e15)).toBeCloseTo(1, 12);
  });

  it('points are joined by straight lines and held beyond them', () => {
    const p = { kind: 'points', z: [1, 2, 4], value: [10, 20, 0] } as const;
    expect([0, 1, 1.5, 3, 4, 9].map((z) => profileAt(p, z, 10))).toEqual([10, 10, 15, 10, 0, 0]);
  });

  it('a layer is uniform only when neither composition nor doping moves', () => {
    const m = crystalWith(1, 1e19, 1e19);
    expect(isUniform(layerOf(m, [dopant('donor', 1e17)]))).toBe(true);
    expect(isUniform(layerOf(m, [dopant('donor', 0, { concentration: { kind: 'linear', from: 1, to: 2 } })]))).toBe(false);
    expect(isUniform(layerOf(m, [], { x: { kind: 'linear', from: 0, to: 0.3 } }))).toBe(false);
  });
});

describe('erfc', () => {
  it('has the tabulated values', () => {
    // NIST Digital Library of Mathematical Functions, section 7.23 tables (values from memory to ten digits).
    for (const [x, y] of [[0, 1], [0.5, 0.4795001222], [1, 0.1572992071], [2, 0.004677734981], [3, 2.209049700e-5]]) expect(Math.abs(erfc(x) / y - 1)).toBeLessThan(1e-9);
  });

  it('is undone by its inverse down to 1e-30', () => {
    for (const y of [0.999, 0.5, 0.1, 1e-3, 1e-8, 1e-30]) expect(Math.abs(erfc(inverseErfc(y)) / y - 1), `${y}`).toBeLessThan(1e-11);
  });
});

describe('the ends of a profile', () => {
  it('are met exactly, whatever the rounding of the depth', () => {
    const grade = { kind: 'linear', from: 0.95, to: 0 } as const;
    for (const thickness of [5e-6, 1e-7, 3.3e-6, 0.05]) {
      expect(profileAt(grade, thickness, thickness)).toBe(0);
      expect(profileAt(grade, 0, thickness)).toBe(0.95);
      expect(profileAt(grade, thickness * (1 + 1e-15), thickness)).toBe(0);
    }
  });
});

describe('points on a logarithmic scale', () => {
  const measured = { kind: 'points', z: [0, 1e-5, 2e-5], value: [1e20, 1e16, 0], scale: 'log' } as const;
  it('go straight in the logarithm between positive values', () => {
    expect(profileAt(measured, 5e-6, 1)).toBeCloseTo(1e18, -6);
  });
  it('go straight to a value of zero, which has no logarithm', () => {
    expect(profileAt(measured, 1.5e-5, 1)).toBeCloseTo(5e15, -3);
  });
});
