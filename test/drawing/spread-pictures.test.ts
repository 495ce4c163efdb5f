import { describe, expect, it } from 'vitest';
import { runsWidth } from '../../src/drawing/glyph-widths.ts';
import { figureAxis } from '../../src/drawing/figure-axis.ts';
import { drawHistogram, type HistogramPicture } from '../../src/drawing/histogram.ts';
import { plainText, type Drawing, type LineShape, type RectShape, type TextShape } from '../../src/drawing/shapes.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { drawTornado, tornadoHeight, type TornadoPicture } from '../../src/drawing/tornado.ts';
import { spreadOf } from '../../src/tolerance/statistics.ts';
import { wellFormed } from './well-formed.ts';

const of = <S>(d: Drawing, role: string): S[] => d.shapes.filter((s) => s.role === role) as S[];
const words = (d: Drawing, role: string): string[] => of<TextShape>(d, role).map(({ runs }) => plainText(runs));

describe('the axis of a figure', () => {
  it('writes ticks that tell figures apart which differ in their fourth digit only', () => {
    const near = figureAxis([0.55, 0.5501], 'linear', [0, 400], 11);
    const texts = near.ticks.map(({ runs }) => plainText(runs));
    expect(new Set(texts).size).toBe(texts.length);
    const large = figureAxis([1.02e19, 1.04e19], 'log', [0, 400], 11).ticks.map(({ runs }) => plainText(runs));
    expect(new Set(large).size).toBe(large.length);
    expect(large.every((text) => text.endsWith('× 1019'.replace('× ', '×\u2009')))).toBe(true);
  });

  it('is even in the value where a logarithm has no place, and shows one value alone', () => {
    expect(figureAxis([-1, 5], 'log', [0, 100], 11).log).toBe(false);
    const alone = figureAxis([3, 3], 'linear', [0, 100], 11);
    expect(alone.x(3)).toBeCloseTo(50, 6);
    const zero = figureAxis([0], 'linear', [0, 100], 11);
    expect(zero.x(0)).toBeCloseTo(50, 6);
  });
});

const values = Array.from({ length: 500 }, (_, i) => 200 + 40 * Math.sin(i * 12.9898) * Math.sin(i * 4.1));
function histogram(change: Partial<HistogramPicture> = {}): HistogramPicture {
  return { label: 'cap: sheet resistance', unit: 'ohm', histogram: spreadOf(values, false).histogram!, nominal: 200, middle: [170, 230], limit: { value: 225, bound: 'max' }, ...change };
}
const drawn = (change: Partial<HistogramPicture> = {}, width = 560): Drawing => drawHistogram(histogram(change), { width, height: 230 });

describe('the histogram', () => {
  it('has bars whose areas are the counts', () => {
    const d = drawn();
    const { edges, counts } = histogram().histogram;
    const bars = of<RectShape>(d, 'histogram-bar');
    expect(bars).toHaveLength(counts.filter((count) => count > 0).length);
    const most = Math.max(...counts);
    const tallest = Math.max(...bars.map(({ h }) => h));
    counts.filter((count) => count > 0).forEach((count, i) => expect(bars[i].h / tallest).toBeCloseTo(count / most, 6));
    expect(bars[0].w).toBeCloseTo((bars.at(-1)!.x + bars.at(-1)!.w - bars[0].x) / (edges.length - 1), 3);
  });

  it('hatches the side of the limit where it is not met, and writes so', () => {
    const d = drawn();
    const [line] = of<LineShape>(d, 'histogram-limit');
    const [clip] = d.clips;
    expect(clip.x).toBeCloseTo(line.x1, 6);
    expect(clip.x + clip.w).toBeGreaterThan(500);
    expect(words(d, 'histogram-limit-word')).toEqual(['at most 225']);
    const least = drawn({ limit: { value: 190, bound: 'min' } });
    expect(least.clips[0].x + least.clips[0].w).toBeCloseTo(of<LineShape>(least, 'histogram-limit')[0].x1, 6);
    expect(words(least, 'histogram-beyond-word')).toEqual(['not met']);
  });

  it('points at a limit that is far outside, and shades all where nothing meets it', () => {
    const met = drawn({ limit: { value: 9000, bound: 'max' } });
    expect(words(met, 'histogram-limit-far')).toEqual(['at most 9000 →']);
    expect(met.clips).toHaveLength(0);
    const none = drawn({ limit: { value: 1, bound: 'max' } });
    expect(words(none, 'histogram-limit-far')).toEqual(['← at most 1']);
    expect(none.clips[0].w).toBeGreaterThan(400);
  });

  it('draws one value of all, and tells itself in words', () => {
    const d = drawn({ histogram: { edges: [5, 5], counts: [12], log: false }, nominal: 5, middle: [5, 5], limit: null });
    expect(of<RectShape>(d, 'histogram-bar')[0].w).toBeGreaterThan(2);
    expect(d.description).toBe('Histogram of cap: sheet resistance: 12 values from 5 ohm to 5 ohm; 95 % between 5 ohm and 5 ohm; nominal 5 ohm');
  });

  it('is well-formed with any words, and keeps its texts on the paper', () => {
    for (const width of [320, 900]) {
      const d = drawn({ label: '<b>&"cap"', limit: { value: 239, bound: 'max' } }, width);
      expect(() => wellFormed(svgText(d))).not.toThrow();
      for (const text of d.shapes.filter((s): s is TextShape => s.kind === 'text')) {
        const right = text.x + runsWidth(text.runs, text.size) * { start: 1, middle: 0.5, end: 0 }[text.anchor];
        expect(right, plainText(text.runs)).toBeLessThanOrEqual(width);
      }
    }
  });
});

const bars: TornadoPicture['bars'] = [
  { label: 'Ncap', tolerance: '10 %', low: 222, high: 182 },
  { label: 'tcap', tolerance: '3 nm', low: 208, high: 192 },
  { label: 'both', tolerance: '5 %', low: 203, high: 207 },
  { label: 'gone', tolerance: '50 meV', low: null, high: 201 },
];
const tornado = (change: Partial<TornadoPicture> = {}, width = 560): Drawing => drawTornado({ label: 'cap: sheet resistance', unit: 'ohm', log: true, nominal: 200, bars, limit: 220, ...change }, { width, height: tornadoHeight(bars.length) });

describe('the tornado', () => {
  it('parts each bar at the nominal value, low end hatched and high end full', () => {
    const d = tornado();
    const [nominal] = of<LineShape>(d, 'tornado-nominal');
    const [low] = of<RectShape>(d, 'tornado-low');
    const [high] = of<RectShape>(d, 'tornado-high');
    expect(low.x).toBeCloseTo(nominal.x1, 6);
    expect(high.x + high.w).toBeCloseTo(nominal.x1, 6);
    expect(of(d, 'tornado-hatch')).toHaveLength(3);
    expect(low.w).toBeGreaterThan(of<RectShape>(d, 'tornado-low')[1].w);
  });

  it('sets two ends on one side of the nominal value under each other', () => {
    const d = tornado();
    const [low, high] = [of<RectShape>(d, 'tornado-low')[2], of<RectShape>(d, 'tornado-high')[2]];
    expect(low.y + low.h).toBeLessThanOrEqual(high.y + 1e-9);
  });

  it('says where an end has no answer, and what every end means in words', () => {
    const d = tornado();
    expect(words(d, 'tornado-missing')).toEqual(['no answer at the low end']);
    expect(words(d, 'tornado-key-word')).toEqual(['low end', 'high end']);
    expect(d.description).toContain('Ncap 222 ohm to 182 ohm');
    expect(of(d, 'tornado-limit')).toHaveLength(1);
    expect(of(tornado({ limit: 900 }), 'tornado-limit')).toHaveLength(0);
  });

  it('is well-formed, and told apart without colour', () => {
    expect(() => wellFormed(svgText(tornado({}, 320)))).not.toThrow();
    const d = drawTornado({ label: 'x', unit: '', log: false, nominal: 0, bars, limit: null }, { width: 500, height: 300, style: 'journal' });
    expect(of<RectShape>(d, 'tornado-low')[0].fill).not.toBe(of<RectShape>(d, 'tornado-high')[0].fill);
  });
});
