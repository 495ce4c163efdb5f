import { describe, expect, it } from 'vitest';
import { starters } from '../../src/design/starters/index.ts';
import { carrierClass } from '../../src/drawing/regime-look.ts';
import { drawRegimeMap, mapIndexAt, regimeWords } from '../../src/drawing/regime-map-plot.ts';
import { plainText, type Drawing, type LineShape, type PathShape, type TextShape } from '../../src/drawing/shapes.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { mapJob, planMap } from '../../src/map/map-job.ts';
import { REGIMES, type RegimeMap } from '../../src/map/regime-map.ts';
import { pathPoints } from './path-points.ts';
import { wellFormed } from './well-formed.ts';

const of = <S>(d: Drawing, role: string): S[] => d.shapes.filter((s) => s.role === role) as S[];
const words = (d: Drawing, role: string): string[] => of<TextShape>(d, role).map(({ runs }) => plainText(runs));
const { design } = starters.find(({ id }) => id === 'pn-diode')!;
const planned = planMap(design, { layer: 0, columns: 90, rows: 80 });
if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
const map = mapJob(planned.plan).run(0) as RegimeMap;
const draw = (errors = true, width = 900) => drawRegimeMap({ layer: design.layers[0].name, map, marks: planned.plan.marks, errors }, { width, height: 520 });

describe('the regime map as a picture', () => {
  it('calls carriers what the layer is called wherever it is not degenerate', () => {
    let seen = 0;
    map.regime.forEach((code, i) => {
      if (REGIMES[code] === 'degenerate' || code === 255) return;
      seen++;
      expect(carrierClass(map, i)).toBe(REGIMES[code]);
    });
    expect(seen).toBeGreaterThan(1000);
  });

  it('tints, bounds and names each area, and hatches by degeneracy', () => {
    const d = draw();
    expect(of<PathShape>(d, 'map-class').map(({ title }) => title)).toEqual(['extrinsic', 'freeze-out', 'intrinsic']);
    expect(new Set(of<PathShape>(d, 'map-class').map(({ fill }) => fill)).size).toBe(3);
    expect(of<PathShape>(d, 'map-hatch').map(({ title }) => title)).toEqual(['degenerate', 'transitional']);
    expect(words(d, 'map-class-word')).toEqual(expect.arrayContaining(['extrinsic', 'freeze-out', 'intrinsic']));
    for (const { x, y, runs } of of<TextShape>(d, 'map-class-word')) expect(regimeWords(map, mapIndexAt(map, d.area, x, y - 4))).toContain(plainText(runs).split(',')[0]);
  });

  it('hatches only what is as degenerate as the hatch says', () => {
    const d = draw();
    const [dense] = of<PathShape>(d, 'map-hatch');
    for (const { x, y } of pathPoints(dense.d)) expect(map.degeneracy[mapIndexAt(map, d.area, x, y)]).toBe(0);
  });

  it('puts the design’s layer where its doping and temperature are, its range upright through it', () => {
    const d = draw();
    const own = planned.plan.marks.find(({ layer }) => layer === 0)!;
    const points = pathPoints(of<PathShape>(d, 'map-layer').find(({ title }) => title!.startsWith(own.name))!.d);
    expect((Math.min(...points.map((p) => p.x)) + Math.max(...points.map((p) => p.x))) / 2).toBeCloseTo(d.x(own.doping), 1);
    if (own.range) expect(of<LineShape>(d, 'map-range')[0].y1).toBeCloseTo(d.y(own.range[0]), 6);
    expect(words(d, 'map-layer-word')).toContain(own.name);
  });

  it('draws the Mott density and lines of the textbook’s error, with figures, unless they are not wanted', () => {
    const d = draw();
    expect(of<LineShape>(d, 'map-mott')[0].x1).toBeCloseTo(d.x(map.mottDoping!), 6);
    expect(of(d, 'map-error').length).toBeGreaterThan(2);
    expect(words(d, 'map-error-figure').length).toBeGreaterThan(0);
    expect(of(draw(false), 'map-error')).toEqual([]);
  });

  it('lets no word lie on another', () => {
    for (const width of [360, 900]) {
      const boxes = draw(true, width).shapes.filter(({ role, kind }) => kind === 'rect' && role.endsWith('-ground')) as { x: number; y: number; w: number; h: number }[];
      boxes.forEach((a, i) => boxes.slice(i + 1).forEach((b) => expect(a.x < b.x + b.w && b.x < a.x + a.w && a.y < b.y + b.h && b.y < a.y + a.h).toBe(false)));
    }
  });

  it('is a well-formed file in every style and is told in words', () => {
    const d = draw();
    expect(d.description).toContain(`${design.layers[0].name} stands at`);
    for (const style of ['light', 'dark', 'journal'] as const) {
      const text = svgText(drawRegimeMap({ layer: '<b>&', map, marks: planned.plan.marks, errors: true }, { width: 700, height: 460, style }));
      expect(wellFormed(text).length).toBeGreaterThan(20);
      expect(text).not.toMatch(/NaN|Infinity|<b>/);
    }
  });
});
