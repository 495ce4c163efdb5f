import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawPlate } from '../../src/drawing/plate.ts';
import { drawRail } from '../../src/drawing/rail.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { inventedResult } from './invented-result.ts';
import { wellFormed } from './well-formed.ts';

const HOSTILE = ['</text><script>alert(1)</script>', '"><image href="https://example.com/x"/>', '&amp;&lt;&#x0;&bogus;', '\u0000\u0008\u001b\ufffe\uffff\ud800x', ']]>--><!--', '\u202Eevil\u2066', '= ${1} `x` \\ \'"', 'a\tb\r\nc'];

describe('SVG text', () => {
  it('is well-formed in every style and reading', () => {
    for (const style of ['light', 'dark', 'slide', 'journal'] as const) {
      for (const shading of ['occupancy', 'carriers', 'none'] as const) {
        const plate = drawPlate(inventedResult(), { style, shading, frame: 'full', vacuum: true, stale: true, width: 1000, height: 600 });
        wellFormed(svgText(plate));
        wellFormed(svgText(drawRail(inventedResult(), 30, { width: 180, height: 500, energy: plate.axes.energy, style })));
      }
    }
  });

  it('stays well-formed, and without an element of theirs, whatever the names', () => {
    for (const name of HOSTILE) {
      const result = inventedResult([name, `${name} `, `b${name}`], name);
      result.contacts[0].metal = name;
      result.layers[0].material = name;
      result.layers[0].ionised[0].dopant = name;
      const elements = wellFormed(svgText(drawPlate(result, { frame: 'full', width: 1200, height: 700 })));
      const known = ['svg', 'title', 'desc', 'defs', 'linearGradient', 'stop', 'clipPath', 'rect', 'path', 'line', 'text', 'tspan'];
      for (const element of elements) {
        expect(known).toContain(element.name);
        for (const key of Object.keys(element.attributes)) expect(key).not.toMatch(/^on|href|^style$|^class$/);
      }
    }
  });

  it('stays well-formed for any text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 40 }), (name) => {
        wellFormed(svgText(drawPlate(inventedResult([name, name, name], name), { frame: 'full' })));
      }),
      { numRuns: 60 },
    );
  });

  it('keeps letters of every script and drops what turns the direction of writing', () => {
    const svg = svgText(drawPlate(inventedResult(['Schicht ä', '層 β', 'p'], 'Заголовок\u202E 😀'), { frame: 'full', width: 1400 }));
    expect(svg).toContain('Schicht ä');
    expect(svg).toContain('層 β');
    expect(svg).toContain('Заголовок 😀');
    expect(svg).not.toContain('\u202E');
  });

  it('refers only to gradients and clips of its own, by ids that are there once', () => {
    for (const prefix of ['plate', 'variant-2']) {
      const svg = svgText(drawPlate(inventedResult(), { prefix }));
      const ids = [...svg.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id);
      expect(new Set(ids).size).toBe(ids.length);
      const used = [...svg.matchAll(/url\(#([^)]*)\)/g)].map(([, id]) => id);
      expect(used.length).toBeGreaterThan(3);
      for (const id of used) expect(ids).toContain(id);
      expect(ids.every((id) => id.startsWith(prefix))).toBe(true);
    }
  });

  it('uses presentation attributes alone and nothing from outside', () => {
    const svg = svgText(drawPlate(inventedResult(), { frame: 'full' }));
    expect(svg).not.toMatch(/<style| style=| class=|var\(|<filter|<pattern|<image|href|@import/);
  });

  it('is the same text for the same input', () => {
    expect(svgText(drawPlate(inventedResult(), { shading: 'carriers' }))).toBe(svgText(drawPlate(inventedResult(), { shading: 'carriers' })));
  });
});

describe('the check of well-formedness', () => {
  it('finds what it is there to find', () => {
    for (const bad of ['<a><b></a></b>', '<a x="1" x="2"/>', '<a>&nbsp;</a>', '<a x=1/>', '<a/><b/>', '<a>\u0001</a>', '<a', '<a x="<"/>', '<a>']) expect(() => wellFormed(bad), bad).toThrow();
    expect(wellFormed('<a x="1 &amp; 2"><b/>c</a>')).toHaveLength(2);
  });
});
