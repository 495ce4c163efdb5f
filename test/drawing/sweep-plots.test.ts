import { describe, expect, it } from 'vitest';
import { contourLevels, drawContourMap, type ContourPicture } from '../../src/drawing/contour-map.ts';
import { drawFilmStrip } from '../../src/drawing/film-strip.ts';
import { plainText, type Drawing, type LineShape, type PathShape, type TextShape } from '../../src/drawing/shapes.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { describeSweep, drawSweepPlot, type SweepPicture } from '../../src/drawing/sweep-plot.ts';
import { pathPoints } from './path-points.ts';
import { wellFormed } from './well-formed.ts';

const of = <S>(d: Drawing, role: string): S[] => d.shapes.filter((s) => s.role === role) as S[];
const words = (d: Drawing, role: string): string[] => of<TextShape>(d, role).map(({ runs }) => plainText(runs));

const values = Array.from({ length: 31 }, (_, i) => 1e15 * 10 ** (i / 10));
function sweep(change: Partial<SweepPicture> = {}): SweepPicture {
  return {
    axis: { words: 'Ndrift', unit: 'cm^-3', scale: 'log', from: values[0], to: values[30] }, values,
    curves: [
      { label: 'drift: electrons', unit: 'cm^-3', log: true, values: values.map((v) => v) },
      { label: 'drift: Ec - EF', unit: 'eV', log: false, values: values.map((v) => 0.3 - 0.06 * Math.log10(v / 1e15)) },
      { label: 'drift: holes', unit: 'cm^-3', log: true, values: values.map((v) => 1e30 / v) },
    ],
    gaps: [], now: { value: 1e16, text: '1e16 cm^-3' }, ...change,
  };
}

describe('the picture of a sweep', () => {
  it('gives each unit a panel over one axis, and a density its decades', () => {
    const d = drawSweepPlot(sweep(), { width: 900 });
    expect(d.panels.map(({ curves }) => curves)).toEqual([[0, 2], [1]]);
    expect(words(d, 'sweep-panel-title')).toEqual(['density (cm−3)', 'drift: Ec - EF (eV)']);
    const [panel] = d.panels;
    expect(panel.y(1e15) - panel.y(1e16)).toBeCloseTo(panel.y(1e16) - panel.y(1e17), 6);
  });

  it('draws each value where its axes say', () => {
    const d = drawSweepPlot(sweep(), { width: 900 });
    const line = pathPoints(of<PathShape>(d, 'sweep-curve').find(({ title }) => title === '2 drift: Ec - EF')!.d);
    expect(line[0].x).toBeCloseTo(d.x(1e15), 1);
    expect(line[0].y).toBeCloseTo(d.panels[1].y(0.3), 1);
    expect(line.at(-1)!.y).toBeCloseTo(d.panels[1].y(0.3 - 0.18), 1);
    expect(of<LineShape>(d, 'sweep-now')[0].x1).toBeCloseTo(d.x(1e16), 6);
  });

  it('breaks a curve where there is no answer, and says so at the foot with the reason', () => {
    const curves = [{ ...sweep().curves[1], values: sweep().curves[1].values.map((v, i) => (i >= 10 && i <= 12 ? null : v)) }];
    const d = drawSweepPlot(sweep({ curves, gaps: [10, 11, 12].map((index) => ({ index, reason: 'did not settle' })) }), { width: 900 });
    expect(of<PathShape>(d, 'sweep-curve')[0].d.match(/M/g)).toHaveLength(2);
    expect(of(d, 'sweep-gap')).toHaveLength(1);
    expect(of<PathShape>(d, 'sweep-gap')[0].title).toContain('did not settle');
    expect(d.description).toContain('3 points have no answer');
  });

  it('names curves at their ends, by number alone where it is narrow; lines differ without colour', () => {
    expect(words(drawSweepPlot(sweep(), { width: 900 }), 'sweep-label')).toContain('1 drift: electrons');
    expect(words(drawSweepPlot(sweep(), { width: 360 }), 'sweep-label').sort()).toEqual(['1', '2', '3']);
    const lines = of<PathShape>(drawSweepPlot(sweep(), { width: 900, style: 'journal' }), 'sweep-curve').map(({ dash, width }) => `${dash} ${width}`);
    expect(new Set(lines).size).toBe(3);
  });

  it('draws what has come in so far, also nothing, a constant and values below zero', () => {
    const none = sweep().curves.map((curve) => ({ ...curve, values: values.map(() => null) }));
    expect(() => svgText(drawSweepPlot(sweep({ curves: none }), { width: 400 }))).not.toThrow();
    for (const value of [0, -2, 5e19]) {
      const d = drawSweepPlot(sweep({ curves: [{ label: 'x', unit: '', log: true, values: values.map(() => value) }] }), { width: 400 });
      expect(svgText(d)).not.toMatch(/NaN|Infinity/);
      expect(words(d, 'sweep-y-tick').length).toBeGreaterThan(0);
    }
  });

  it('is told in words with where it turns', () => {
    const text = describeSweep(sweep({ curves: [{ label: 'gain', unit: '', log: false, values: values.map((_, i) => 10 - Math.abs(i - 20)) }] }));
    expect(text).toContain('from -10 to 0');
    expect(text).toContain('largest 10 at 1e17 cm^-3');
  });

  it('refuses a range that is none', () => {
    expect(() => drawSweepPlot(sweep({ axis: { words: 'a', unit: '', scale: 'linear', from: 1, to: 1 } }), { width: 400 })).toThrow(RangeError);
  });
});

const plane = (change: Partial<ContourPicture> = {}, f: (c: number, r: number) => number | null = (c, r) => c + 10 * r): ContourPicture => ({
  x: { words: 'a', unit: 'nm', scale: 'linear', from: 0, to: 10 }, y: { words: 'b', unit: 'K', scale: 'linear', from: 100, to: 200 }, columns: 11, rows: 6,
  figure: { label: 'c', unit: 'eV', log: false, values: Array.from({ length: 66 }, (_, i) => f(i % 11, Math.floor(i / 11))) }, gaps: [], now: { x: 5, y: 150 }, ...change,
});

describe('the map of two axes', () => {
  it('draws lines where the figure has their value', () => {
    const d = drawContourMap(plane(), { width: 700, height: 420 });
    const [line] = of<PathShape>(d, 'contour-line').filter(({ title }) => title === '30 eV');
    for (const { x, y } of pathPoints(line.d)) {
      const c = (10 * (x - d.area.left)) / (d.area.right - d.area.left);
      const r = (5 * (d.area.bottom - y)) / (d.area.bottom - d.area.top);
      expect(c + 10 * r).toBeCloseTo(30, 0);
    }
    expect(words(d, 'contour-figure')).toContain('30');
  });

  it('darkens with the value in one tint, so that grey prints keep the order', () => {
    const light = of<PathShape>(drawContourMap(plane(), { width: 700, height: 420 }), 'contour-band').map(({ fill }) => Number.parseInt(fill!.slice(3, 5), 16));
    expect(light.length).toBeGreaterThan(4);
    for (let i = 1; i < light.length; i++) expect(light[i]).toBeLessThan(light[i - 1]);
  });

  it('hatches what has no answer, with the reason', () => {
    const d = drawContourMap(plane({ gaps: [{ index: 0, reason: 'the gap closes' }] }, (c, r) => (c + r === 0 ? null : c + 10 * r)), { width: 700, height: 420 });
    const [gap] = of<PathShape>(d, 'contour-gap');
    expect(gap.title).toContain('the gap closes');
    for (const { x, y } of pathPoints(gap.d)) expect(x < d.area.left + 40 && y > d.area.bottom - 60).toBe(true);
  });

  it('marks the design itself', () => {
    const d = drawContourMap(plane(), { width: 700, height: 420 });
    const points = pathPoints(of<PathShape>(d, 'contour-now')[0].d);
    expect(points.reduce((s, p) => s + p.x, 0) / points.length).toBeCloseTo((d.area.left + d.area.right) / 2, 0);
  });

  it('takes levels of powers of ten for decades, none for a constant', () => {
    expect(contourLevels([1e14, 1e20], true)).toEqual([1e15, 1e16, 1e17, 1e18, 1e19]);
    expect(contourLevels([2, 2, null], false)).toEqual([]);
    expect(contourLevels([], false)).toEqual([]);
  });

  it('is well-formed as a file whatever it is given', () => {
    for (const picture of [plane(), plane({}, () => null), plane({}, () => 3), plane({ figure: { ...plane().figure, label: '<script>&"' } })]) {
      const text = svgText(drawContourMap(picture, { width: 360, height: 320 }));
      expect(wellFormed(text).length).toBeGreaterThan(5);
      expect(text).not.toMatch(/NaN|Infinity|<script/);
    }
  });
});

describe('the strip of a film', () => {
  const temperatures = Array.from({ length: 11 }, (_, i) => 100 + 10 * i);
  const strip = (width = 700) => drawFilmStrip({ temperatures, scale: 'linear', layers: [
    { name: 'cap', regimes: temperatures.map(() => 'degenerate') },
    { name: 'base', regimes: temperatures.map((t) => (t < 150 ? 'freeze-out' : t > 190 ? null : 'extrinsic')) },
  ], gaps: [{ index: 10, reason: 'did not settle' }] }, { width });

  it('parts each layer where its regime changes, half-way between frames', () => {
    const d = strip();
    const stretches = of<PathShape & { x: number; w: number }>(d, 'film-stretch');
    expect(stretches.map(({ title }) => title)).toEqual(['cap: degenerate from 100 to 200 K', 'base: freeze-out from 100 to 140 K', 'base: extrinsic from 150 to 190 K']);
    expect(stretches[1].x + stretches[1].w).toBeCloseTo(d.x(145), 6);
    expect(words(d, 'film-word')).toEqual(['degenerate', 'freeze-out', 'extrinsic']);
    expect(of(d, 'film-hatch')).toHaveLength(1);
  });

  it('marks a frame without an answer, and is told in words', () => {
    expect(of<PathShape>(strip(), 'film-gap')[0].title).toBe('no answer at 200 K: did not settle');
    expect(strip().description).toContain('base: freeze-out from 100 to 140 K, extrinsic from 150 to 190 K');
  });
});
