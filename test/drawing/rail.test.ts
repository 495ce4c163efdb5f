import { describe, expect, it } from 'vitest';
import { BOLTZMANN } from '../../solver/constants.ts';
import { energyAxis } from '../../src/drawing/energy-axis.ts';
import { densityRuns } from '../../src/drawing/figures.ts';
import { drawRail } from '../../src/drawing/rail.ts';
import { plainText, type Drawing, type LineShape, type PathShape, type TextShape } from '../../src/drawing/shapes.ts';
import { inventedResult } from './invented-result.ts';
import { pathPoints } from './path-points.ts';
import { STACKS } from './results.ts';

const draw = (depth_nm: number, result = inventedResult()): { rail: Drawing; energy: ReturnType<typeof energyAxis> } => {
  const energy = energyAxis(result, { range: [500, 20] });
  return { rail: drawRail(result, depth_nm, { width: 216, height: 560, energy, style: 'light' }), energy };
};
const path = (d: Drawing, role: string): PathShape => d.shapes.find((s) => s.role === role) as PathShape;
const text = (d: Drawing, role: string): string => plainText((d.shapes.find((s) => s.role === role) as TextShape).runs);
/** Room of the curves: 8 px are left free on each side. */
const ROOM = 200;

describe('the rail', () => {
  it('writes a small density plain, and one below the smallest number as such', () => {
    const words = (value: number): string => plainText(densityRuns(value));
    expect(words(3.96)).toBe('4.0');
    expect(words(13)).toBe('13');
    expect(words(2e15)).toMatch(/^2\u2009×\u200910.*15$/);
    expect(words(0)).toMatch(/^< 10.*−300$/);
  });

  it('draws f(E) from 0 to 1 over its width', () => {
    for (const T of [4, 300, 1000]) {
      const result = inventedResult();
      result.conditions.temperature_K = T;
      const { rail, energy } = draw(50, result);
      const points = pathPoints(path(rail, 'rail-occupancy').d);
      expect(points.length).toBeGreaterThan(100);
      // At 4 K the curve falls over two px: the energies are compared by where f is, within a px of y.
      for (const p of points) {
        const f = (e: number): number => 1 / (1 + Math.exp(e / (BOLTZMANN * T)));
        const [low, high] = [f(energy.energy(p.y - 0.006)), f(energy.energy(p.y + 0.006))];
        const drawn = (p.x - 8) / ROOM;
        expect(drawn >= low - 1e-3 && drawn <= high + 1e-3, `${T} K at ${p.y}: ${drawn}`).toBe(true);
      }
    }
  });

  it('marks half occupancy at the Fermi level and brackets 90 % to 10 %, which is 4.39 kT', () => {
    const { rail, energy } = draw(50);
    const fermi = rail.shapes.find((s) => s.role === 'rail-fermi-level') as LineShape;
    expect(fermi.y1).toBeCloseTo(energy.y(0), 6);
    const mark = pathPoints(path(rail, 'rail-half').d);
    expect(mark.reduce((sum, p) => sum + p.x, 0) / mark.length).toBeCloseTo(8 + ROOM / 2, 1);
    expect(mark.reduce((sum, p) => sum + p.y, 0) / mark.length).toBeCloseTo(energy.y(0), 1);
    const bracket = pathPoints(path(rail, 'rail-thermal-width').d).map((p) => energy.energy(p.y));
    const width = Math.max(...bracket) - Math.min(...bracket);
    // ln 9 twice, drawn to 0.01 px of some 240 px an eV.
    expect(width / (BOLTZMANN * 300)).toBeCloseTo(2 * Math.log(9), 1);
    expect(text(rail, 'rail-width-figure')).toBe('90…10 %: 4.39 kT');
  });

  it('puts electrons above Ec and holes below Ev', () => {
    const { rail, energy } = draw(30);
    const ec = 0.1 + 0.6 * 0.25;
    for (const p of pathPoints(path(rail, 'rail-electrons').d)) expect(p.y).toBeLessThanOrEqual(energy.y(ec) + 0.02);
    for (const p of pathPoints(path(rail, 'rail-holes').d)) expect(p.y).toBeGreaterThanOrEqual(energy.y(ec - 1.1) - 0.02);
    for (const p of pathPoints(path(rail, 'rail-states-electrons').d)) expect(p.y).toBeLessThanOrEqual(energy.y(ec) + 0.02);
  });

  it('draws g as the root of the energy above the edge', () => {
    const { rail, energy } = draw(95);
    const points = pathPoints(path(rail, 'rail-states-electrons').d).filter((p) => p.y < energy.y(0.3));
    const share = points.map((p) => (p.x - 8) / Math.sqrt(energy.energy(p.y) - 0.1));
    expect(points.length).toBeGreaterThan(4);
    for (const s of share) expect(Math.abs(s / share[0] - 1)).toBeLessThan(0.02);
  });

  it('writes the densities of that depth', () => {
    const { rail } = draw(90);
    // n = 2.8e19 exp(-0.1/0.02585) in the invented result.
    expect(text(rail, 'rail-electrons-figure')).toBe('n 5.8\u2009×\u20091017 cm−3');
    expect(text(rail, 'rail-depth')).toBe('at 90 nm');
    expect(rail.description).toContain('5.85e17 electrons');
  });

  it('holds a depth outside the stack at its end', () => {
    expect(draw(-5).rail.title).toContain('0 nm');
    expect(draw(1e9).rail.title).toContain('p base');
  });

  it('draws no states in an insulator', () => {
    const { rail } = draw(2, STACKS.gate());
    expect(rail.title).toContain('oxide');
    expect(rail.shapes.some((s) => s.role.startsWith('rail-states'))).toBe(false);
    expect(rail.shapes.some((s) => s.role === 'rail-occupancy')).toBe(true);
  });
});
