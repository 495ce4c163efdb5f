import { describe, expect, it } from 'vitest';
import { BOLTZMANN } from '../../solver/constants.ts';
import { drawPlate } from '../../src/drawing/plate.ts';
import type { PathShape } from '../../src/drawing/shapes.ts';
import { pathPoints } from './path-points.ts';
import { STACKS } from './results.ts';

describe('the shading by carriers', () => {
  it('nests: a denser level lies inside the paler one before it', () => {
    const plate = drawPlate(STACKS.tunnel(), { shading: 'carriers', depth: 'true' });
    const levels = plate.shapes.filter((s) => s.role === 'electrons-density') as PathShape[];
    expect(levels.length).toBeGreaterThan(3);
    const extent = levels.map(({ d }) => pathPoints(d)).map((points) => [Math.min(...points.map((p) => p.y)), Math.max(...points.map((p) => p.y)), points.length]);
    for (let i = 1; i < extent.length; i++) {
      expect(extent[i][0]).toBeGreaterThan(extent[i - 1][0]);
      expect(extent[i][1]).toBeLessThanOrEqual(extent[i - 1][1]);
    }
  });

  it('lies on points of equal density: g f at the upper bound is the level', () => {
    const result = STACKS.diode();
    const plate = drawPlate(result, { shading: 'carriers', depth: 'true', width: 1400, height: 900 });
    const kT = BOLTZMANN * 300;
    const { energy, depth } = plate.axes;
    const base = result.layers[1];
    // In the flat base, far from the junction: the far side of each level of the electrons.
    const ec = base.ec_minus_ef_eV;
    const at = depth.x(1450);
    const density = (e: number): number => (base.nc_cm3 / kT) * (2 / Math.sqrt(Math.PI)) * Math.sqrt(Math.max(e - ec, 0) / kT) * Math.exp(-e / kT);
    const tops = (plate.shapes.filter((s) => s.role === 'electrons-density') as PathShape[]).map(({ d }) => {
      const near = pathPoints(d).filter((p) => Math.abs(p.x - at) < 60);
      return near.length === 0 ? null : Math.min(...near.map((p) => p.y));
    });
    const found = tops.filter((y): y is number => y !== null);
    expect(found.length).toBeGreaterThanOrEqual(2);
    // One decade lies between one level and the next; 0.01 px is 0.1 % of a kT here.
    for (let i = 1; i < found.length; i++) expect(density(energy.energy(found[i])) / density(energy.energy(found[i - 1]))).toBeCloseTo(10, 0);
  });

  it('finds electrons in the well of a modulation-doped channel and no holes beside them', () => {
    const result = STACKS.channel();
    const plate = drawPlate(result, { shading: 'carriers', depth: 'true', window: [49, 80] });
    const electrons = plate.shapes.filter((s) => s.role === 'electrons-density') as PathShape[];
    const left = Math.min(...electrons.flatMap(({ d }) => pathPoints(d).map((p) => p.x)));
    expect(plate.axes.depth.depth(left)).toBeLessThan(49.5);
    expect(plate.shapes.some((s) => s.role === 'holes-density')).toBe(false);
  });

  it('draws nothing in an insulator', () => {
    const plate = drawPlate(STACKS.gate(), { shading: 'carriers', depth: 'true', window: [0, 5] });
    expect(plate.shapes.filter((s) => s.role.endsWith('-density')).flatMap((s) => pathPoints((s as PathShape).d)).filter((p) => p.x < plate.axes.area.right - 1)).toEqual([]);
  });
});
