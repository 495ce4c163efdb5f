import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { curvePath, thinned, THINNING } from '../../src/drawing/curve.ts';
import { pathPoints, pathY } from './path-points.ts';

describe('curves', () => {
  it('are thinned by less than the error that can be seen, and keep their ends', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 400, noNaN: true }), { minLength: 3, maxLength: 200 }), (ys) => {
        const p = { x: ys.map((_, i) => i * 1.3), y: ys };
        const thin = thinned(p);
        const d = thin.x.map((x, i) => `${i === 0 ? 'M' : 'L'}${x},${thin.y[i].toFixed(9)}`).join('');
        expect(thin.x[0]).toBe(p.x[0]);
        expect(thin.x[thin.x.length - 1]).toBe(p.x[p.x.length - 1]);
        p.x.forEach((x, i) => expect(Math.abs(pathY(d, x) - p.y[i])).toBeLessThanOrEqual(THINNING + 1e-9));
      }),
    );
  });

  it('lose most points of a straight line and of a long flat part', () => {
    const x = Array.from({ length: 700 }, (_, i) => i);
    expect(thinned({ x, y: x.map((v) => 3 * v) }).x).toEqual([0, 699]);
    expect(thinned({ x, y: x.map((v) => 100 * Math.exp(-v / 20)) }).x.length).toBeLessThan(40);
  });

  it('pass through every node where nodes are sparse', () => {
    const p = { x: [0, 50, 100, 180], y: [10, 60, 65, 20] };
    const points = pathPoints(curvePath(p));
    expect(points.map(({ x, y }) => [x, y])).toEqual(p.x.map((x, i) => [x, p.y[i]]));
    expect(points.slice(1).every(({ command }) => command === 'C')).toBe(true);
  });

  it('invent no extremum between sparse nodes', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 400, noNaN: true }), { minLength: 3, maxLength: 12 }), (ys) => {
        const d = curvePath({ x: ys.map((_, i) => i * 40), y: ys });
        const segments = [...d.matchAll(/C([^C]*)/g)].map(([, rest]) => rest.split(',').map(Number));
        expect(segments).toHaveLength(ys.length - 1);
        // The control points of a cubic hold the curve between them: inside the ends' range, so is the curve.
        segments.forEach(([, y1, , y2], i) => {
          const [low, high] = [Math.min(ys[i], ys[i + 1]) - 0.011, Math.max(ys[i], ys[i + 1]) + 0.011];
          for (const y of [y1, y2]) expect(y >= low && y <= high).toBe(true);
        });
      }),
    );
  });

  it('break at a value that is not finite instead of drawing a wrong one', () => {
    const points = pathPoints(curvePath({ x: [0, 1, 2, 3, 4], y: [5, 6, Number.NaN, 7, Infinity] }));
    expect(points.map(({ command, x }) => `${command}${x}`)).toEqual(['M0', 'L1', 'M3']);
  });
});
