import { describe, expect, it } from 'vitest';
import { starters } from '../../src/design/starters/index.ts';
import { drawPlate } from '../../src/drawing/plate.ts';
import { plainText } from '../../src/drawing/shapes.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { reviewSheet } from '../../src/sheet/review-sheet.ts';
import { solvedStarter } from '../sheet/sheets.ts';

/** What programs for slides and drawings are known to read alike. */
const ELEMENTS = new Set(['svg', 'title', 'desc', 'defs', 'linearGradient', 'stop', 'clipPath', 'rect', 'path', 'line', 'text', 'tspan']);

/** Names of the elements that are open at each opening tag. */
function openings(svg: string): { name: string; attributes: string; within: string[] }[] {
  const open: string[] = [];
  const out: { name: string; attributes: string; within: string[] }[] = [];
  for (const [, closing, name, attributes, empty] of svg.matchAll(/<(\/?)([A-Za-z]+)((?:[^>"]|"[^"]*")*?)(\/?)>/g)) {
    if (closing) open.pop();
    else {
      out.push({ name, attributes, within: [...open] });
      if (!empty) open.push(name);
    }
  }
  expect(open).toEqual([]);
  return out;
}

describe('an exported SVG', () => {
  for (const { id } of starters) {
    it(`of ${id} is flat and plain, for programs that know little of SVG: no groups, styles, variables, filters, scripts or outside references`, () => {
      const { design, result } = solvedStarter(id);
      const plates = (['light', 'dark', 'slide', 'journal'] as const).map((style) => drawPlate(result, { style, width: 1280, height: 720, frame: 'full', variants: [{ name: 'itself', result }], base: 'this' }));
      const pages = reviewSheet({ design, result, author: '', date: '', revision: '', style: 'slide', paper: 'A4' });
      for (const drawing of [...plates, ...pages]) {
        const svg = svgText(drawing);
        for (const { name, attributes, within } of openings(svg)) {
          expect(ELEMENTS, name).toContain(name);
          // Flat: marks stand in the drawing itself, not in groups; only letters, names and definitions lie deeper.
          if (['rect', 'path', 'line', 'text'].includes(name)) expect(within.filter((w) => !['defs', 'clipPath'].includes(w)), name).toEqual(['svg']);
          expect(attributes).not.toMatch(/\s(?:style|class|filter|mask|href|xlink:href|on\w+)=/);
          for (const [, target] of attributes.matchAll(/url\(([^)]*)\)/g)) expect(target).toMatch(/^#/);
        }
        expect(svg).not.toContain('var(');
        expect(svg).not.toMatch(/<style|<image|<use|<foreignObject|<script/);
      }
    });
  }

  it('has all its words as text, none as outlines', () => {
    const { result } = solvedStarter('nitride-channel');
    const plate = drawPlate(result, { style: 'slide', width: 1280, height: 720, frame: 'full' });
    const texts = [...svgText(plate).matchAll(/<text[^>]*>(.*?)<\/text>/g)].map(([, inner]) => inner.replace(/<title>.*?<\/title>/, '').replace(/<[^>]*>/g, ''));
    const words = plate.shapes.flatMap((s) => (s.kind === 'text' ? [plainText(s.runs)] : []));
    expect(texts.map((t) => t.replaceAll('&#39;', "'").replaceAll('&amp;', '&').replaceAll('&lt;', '<').replaceAll('&gt;', '>'))).toEqual(words);
    expect(words).toEqual(expect.arrayContaining(['channel', 'barrier', 'buffer']));
  });
});
