import { describe, expect, it } from 'vitest';
import { differenceTicks, ratioTicks, scoreWindow, valueTicks } from '../../src/drawing/margin-axes.ts';
import { drawMarginPlot, lineCode, type MarginPicture } from '../../src/drawing/margin-plot.ts';
import { plainText, type Drawing, type LineShape, type PathShape, type RectShape, type TextShape } from '../../src/drawing/shapes.ts';
import { styleOf } from '../../src/drawing/styles.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { pathPoints } from './path-points.ts';
import { wellFormed } from './well-formed.ts';

const values = Array.from({ length: 41 }, (_, i) => 1e18 * 10 ** (i / 20));
/** One falls with the variable as its square, one rises by 60 meV a decade. */
function picture(change: Partial<MarginPicture> = {}): MarginPicture {
  return {
    name: 'Ncap', unit: 'cm^-3', scale: 'log', from: 1e18, to: 1e20,
    curves: [
      { label: 'contact resistivity of top', measure: { kind: 'ratio' }, points: values.map((value) => ({ value, score: 2 * Math.log(value / 4e18) })), strong: true },
      { label: 'barrier of top', measure: { kind: 'difference', step: 0.0259, unit: 'eV' }, points: values.map((value) => ({ value, score: (0.06 * Math.log10(4e19 / value)) / 0.0259 })) },
    ],
    intervals: [{ from: { value: 4e18, text: '4e18 cm^-3', curve: 0 }, to: { value: 4e19, text: '4e19 cm^-3', curve: 1 } }],
    best: { value: 7e18, text: '7e18 cm^-3', score: 1 },
    now: { value: 1e19, text: '1e19 cm^-3' },
    ...change,
  };
}
const draw = (change: Partial<MarginPicture> = {}, width = 900): Drawing => drawMarginPlot(picture(change), { width, height: 380 });
const of = <S>(d: Drawing, role: string): S[] => d.shapes.filter((s) => s.role === role) as S[];
const words = (d: Drawing, role: string): string[] => of<TextShape>(d, role).map(({ runs }) => plainText(runs));

describe('the picture of margins', () => {
  it('lets each curve cross the line of the limit where its score is zero, which is where the interval ends', () => {
    const d = draw();
    const [limit] = of<LineShape>(d, 'margin-limit');
    const [interval] = of<RectShape>(d, 'margin-interval');
    of<PathShape>(d, 'margin-curve').forEach(({ d: data }, i) => {
      const points = pathPoints(data);
      const at = points.findIndex((p, k) => k > 0 && (p.y - limit.y1) * (points[k - 1].y - limit.y1) <= 0);
      const [a, b] = [points[at - 1], points[at]];
      const crossing = a.x + ((limit.y1 - a.y) / (b.y - a.y)) * (b.x - a.x);
      expect(crossing).toBeCloseTo(i === 0 ? interval.x : interval.x + interval.w, 0);
    });
  });

  it('gives factors and differences an axis each, with their limits on one line', () => {
    const d = draw();
    expect(words(d, 'margin-title')).toEqual(['margin, times', 'margin, eV']);
    const [limit] = of<LineShape>(d, 'margin-limit');
    const zero = of<TextShape>(d, 'margin-tick').filter(({ runs }) => ['×1', '0'].includes(plainText(runs)));
    expect(zero).toHaveLength(2);
    expect(zero[0].y).toBeCloseTo(zero[1].y, 6);
    expect(Math.abs(zero[0].y - limit.y1)).toBeLessThan(6);
  });

  it('names the curves at their ends, by numbers alone where it is narrow', () => {
    expect(words(draw(), 'margin-label')).toEqual(['1 contact resistivity of top', '2 barrier of top']);
    expect(words(draw({}, 380), 'margin-label')).toEqual(['1', '2']);
  });

  it('keeps words and ticks clear of the diamond, wherever the best point lies', () => {
    const one = picture().curves.slice(0, 1);
    for (const [curves, width] of [[one, 900], [one, 380], [picture().curves, 900], [picture().curves, 380]] as const) {
      for (const value of [1e18, 1e20]) {
        const d = draw({ curves, intervals: [], now: null, best: { value, text: String(value), score: 0 } }, width);
        const xs = pathPoints(of<PathShape>(d, 'margin-best')[0].d).map(({ x }) => x);
        // With half the line that it is drawn with.
        const [left, right] = [Math.min(...xs) - 1, Math.max(...xs) + 1];
        const labels = of<TextShape>(d, 'margin-label');
        expect(labels).toHaveLength(curves.length);
        for (const { x } of labels) expect(x).toBeGreaterThan(right + 2);
        for (const { x, anchor } of of<TextShape>(d, 'margin-tick')) {
          if (value === 1e18 && anchor === 'end') expect(x).toBeLessThan(left);
          if (value === 1e20 && anchor === 'start') expect(x).toBeGreaterThan(right);
        }
      }
    }
  });

  it('tells lines apart without colour', () => {
    const style = styleOf('journal');
    const codes = Array.from({ length: 7 }, (_, i) => `${lineCode(i, style).dash} ${lineCode(i, style).width}`);
    expect(new Set(codes).size).toBe(7);
    expect(new Set(Array.from({ length: 7 }, (_, i) => lineCode(i, style).color))).toEqual(new Set(['#000000']));
  });

  it('says at each end which requirement closes it, at the best value and at the value in the design what they are', () => {
    const d = draw();
    expect(words(d, 'margin-closed-by')).toEqual(['1', '2']);
    expect(words(d, 'margin-end-figure')).toEqual(['4e18 cm^-3', '4e19 cm^-3']);
    expect(words(d, 'margin-best-figure')).toEqual(['best 7e18 cm^-3']);
    expect(words(d, 'margin-now-figure')).toEqual(['now 1e19 cm^-3']);
  });

  it('calls the nearest miss by its name and shades nothing', () => {
    const d = draw({ intervals: [], best: { value: 7e18, text: '7e18 cm^-3', score: -14 } });
    expect(words(d, 'margin-best-figure')).toEqual(['nearest 7e18 cm^-3']);
    expect(of(d, 'margin-interval')).toEqual([]);
    const { x, y, w, h } = d.clips[0];
    const mark = pathPoints(of<PathShape>(d, 'margin-best')[0].d);
    for (const p of mark) expect(p.x >= x && p.x <= x + w && p.y >= y && p.y <= y + h).toBe(true);
    expect(d.description).toContain('no value meets all of them');
  });

  it('breaks a curve where there is no answer and says so along the foot', () => {
    const d = draw({ curves: [{ label: 'a', measure: { kind: 'ratio' }, points: values.map((value, i) => ({ value, score: i > 10 && i < 25 ? null : 1 })) }] });
    expect(of<PathShape>(d, 'margin-curve')[0].d.match(/M/g)).toHaveLength(2);
    expect(of(d, 'margin-no-answer')).toHaveLength(1);
    expect(words(d, 'margin-no-answer-word')).toEqual(['no answer']);
  });

  it('keeps margins without end off the picture with an arrow, and no figure of it infinite', () => {
    const d = draw({ curves: [...picture().curves, { label: 'share', measure: { kind: 'ratio' }, points: values.map((value) => ({ value, score: 700 })) }] });
    expect(words(d, 'margin-label')[0]).toBe('↑3 share');
    expect(svgText(d)).not.toMatch(/NaN|Infinity/);
    wellFormed(svgText(d));
  });

  it('lets no two figures over it touch', () => {
    const marks = ['margin-best-figure', 'margin-end-figure', 'margin-now-figure'];
    const d = draw({ intervals: [{ from: { value: 4e18, text: '4e18 cm^-3', curve: 0 }, to: { value: 4.1e18, text: '4.1e18 cm^-3', curve: 1 } }], best: { value: 4.05e18, text: '4.05e18 cm^-3', score: 0.1 } });
    const boxes = marks.flatMap((role) => of<TextShape>(d, role)).map((s) => ({ left: s.x - 3 * plainText(s.runs).length, right: s.x + 3 * plainText(s.runs).length, y: s.y }));
    expect(boxes.length).toBeGreaterThanOrEqual(3);
    for (const [i, a] of boxes.entries()) for (const b of boxes.slice(i + 1)) expect(a.y !== b.y || a.right < b.left || b.right < a.left).toBe(true);
  });

  it('is refused where there is no room, and for a range that is none', () => {
    expect(() => draw({}, 90)).toThrow(RangeError);
    expect(() => draw({ to: 1e18 })).toThrow(RangeError);
    expect(() => draw({ from: 0 })).toThrow(RangeError);
  });
});

describe('the axes of margins', () => {
  it('show the limit and a factor of two about it, whatever the scores are', () => {
    for (const scores of [[], [3], [-3], [700, -700]]) {
      const [low, high] = scoreWindow(scores, null);
      expect(low).toBeLessThanOrEqual(-Math.log(2));
      expect(high).toBeGreaterThanOrEqual(Math.log(2));
      expect(Math.max(-low, high)).toBeLessThan(12);
    }
    expect(scoreWindow([700, -700], -40)[0]).toBeLessThan(-40);
  });

  it('have the limit among their ticks', () => {
    for (const window of [[-1, 1], [-0.8, 9], [-30, 9], [-5, 5]] as const) {
      expect(ratioTicks(window).map(({ at }) => Math.abs(at))).toContain(0);
      expect(differenceTicks(window, 0.0259).map(({ at }) => Math.abs(at))).toContain(0);
      expect(ratioTicks(window).length).toBeLessThan(16);
    }
  });

  it('name decades of a variable, twos and fives where there is room', () => {
    const named = (ticks: ReturnType<typeof valueTicks>) => ticks.filter(({ runs }) => runs.length > 0).map(({ at }) => Number(at.toPrecision(6)));
    expect(named(valueTicks(1e14, 1e20, 'log', 8))).toEqual([1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20]);
    expect(named(valueTicks(5, 100, 'log'))).toEqual([5, 10, 20, 50, 100]);
    expect(named(valueTicks(0, 100, 'linear', 5))).toEqual([0, 20, 40, 60, 80, 100]);
  });
});
