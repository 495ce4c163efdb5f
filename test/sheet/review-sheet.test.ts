import { describe, expect, it } from 'vitest';
import { closeUps } from '../../src/contacts/close-up.ts';
import { starters } from '../../src/design/starters/index.ts';
import { plainText, type Drawing } from '../../src/drawing/shapes.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { sheetPdf } from '../../src/export/sheet-files.ts';
import { decimalText } from '../../src/result/figure-text.ts';
import { furtherSections } from '../../src/sheet/further.ts';
import { PAPERS, SHEET_STYLES } from '../../src/sheet/look.ts';
import { reviewSheet } from '../../src/sheet/review-sheet.ts';
import { wellFormed } from '../drawing/well-formed.ts';
import { FONTS } from '../export/fonts.ts';
import { readPdf } from '../export/read-pdf.ts';
import { outside, overlaps } from './layout-checks.ts';
import { allText, inputOf, sheetOf, solved, starter, tenLayers, textsOf } from './sheets.ts';

const roleText = (page: Drawing, role: string): string[] => textsOf(page).filter((t) => t.role === role).map((t) => plainText(t.runs));

describe('the review sheet', () => {
  for (const { id } of starters) {
    for (const style of SHEET_STYLES) {
      it(`of ${id} in the style ${style} keeps every text inside the frame and off the others`, () => {
        for (const paper of PAPERS) {
          for (const [i, page] of sheetOf(id, { style, paper }).entries()) {
            expect(outside(page), `${paper}, page ${i + 1}`).toEqual([]);
            expect(overlaps(page), `${paper}, page ${i + 1}`).toEqual([]);
          }
        }
      });
    }
  }

  it('has on every page the title block, its page of all pages, and the cautions', () => {
    const pages = sheetOf('pn-diode');
    const { provenance } = inputOf('pn-diode').result;
    expect(pages.length).toBeGreaterThan(2);
    pages.forEach((page, i) => {
      expect(roleText(page, 'block-title')).toEqual([starter('pn-diode').title]);
      expect(roleText(page, 'block-author')).toEqual(['A. Author']);
      expect(roleText(page, 'block-date')).toEqual(['2026-12-01']);
      expect(roleText(page, 'block-revision')).toEqual(['B']);
      expect(roleText(page, 'block-page')).toEqual([`${i + 1} of ${pages.length}`]);
      expect(roleText(page, 'block-design')).toEqual([provenance.design]);
      expect(roleText(page, 'block-parameters')).toEqual([provenance.presets]);
      expect(roleText(page, 'block-program-and-model')[0]).toContain(provenance.model);
      expect(roleText(page, 'caution').join(' ')).toContain('to be confirmed by measurement');
      expect(roleText(page, 'caution').join(' ')).toContain('Hazardous gases');
    });
  });

  it('is landscape on the paper asked for', () => {
    const [a4] = sheetOf('pn-diode');
    const [letter] = sheetOf('pn-diode', { paper: 'letter' });
    expect([(a4.width * 25.4) / 96, (a4.height * 25.4) / 96].map(Math.round)).toEqual([297, 210]);
    expect([letter.width / 96, letter.height / 96]).toEqual([11, 8.5]);
  });

  it('carries the plate on its first page, with the gradient that it needs and no other page', () => {
    const pages = sheetOf('nitride-channel');
    expect(pages[0].shapes.some((s) => s.role === 'conduction-edge')).toBe(true);
    expect(pages[0].gradients).toHaveLength(1);
    expect(pages.slice(1).every((p) => p.gradients.length === 0 && !p.shapes.some((s) => s.role === 'conduction-edge'))).toBe(true);
    expect(pages[0].shapes.filter((s) => s.fill === `url(#${pages[0].gradients[0].id})`).length).toBeGreaterThan(0);
  });

  it('lists the layers from the top down with their tolerances, dopants, and what is only assumed', () => {
    const text = allText(sheetOf('graded-cap'));
    for (const words of ['cap', 'grade', 'emitter', 'collector', '= Ncap', '± 20 %', '± 5 %', 'donor, own', 'Si, donor', 'n, degenerate', 'x 0.95 to 0, linear']) expect(text).toContain(words);
    expect(allText(sheetOf('graded-cap', { requirements: [], tolerances: 'none' }))).toContain('not stated');
  });

  it('shows each requirement with limit, worst case, where that is, margin and verdict', () => {
    const input = inputOf('pn-diode');
    const rows = input.requirements!;
    expect(rows.length).toBeGreaterThan(0);
    const cells = sheetOf('pn-diode').flatMap((p) => roleText(p, 'cell'));
    expect(cells.filter((c) => c === 'met' || c === 'not met')).toEqual(rows.map((r) => (r.met ? 'met' : 'not met')));
    expect(rows.map((r) => r.met)).toContain(false);
    for (const { met, margin } of rows) expect(cells).toContain(met ? `${Number(margin!.toPrecision(3))} times` : `missed by a factor ${Number((1 / margin!).toPrecision(3))}`);
  });

  it('says that requirements were not judged where no rows are given', () => {
    const { requirements: _, ...input } = inputOf('pn-diode');
    expect(allText(reviewSheet(input))).toMatch(/The design states \d+ requirements, which were not judged/);
  });

  it('repeats the heading of a table on the pages that it goes on to, and never cuts a row', () => {
    const design = tenLayers();
    const pages = reviewSheet({ ...inputOf('pn-diode'), design, result: solved(design), requirements: [] });
    const goingOn = pages.filter((p) => roleText(p, 'section').some((s) => s.endsWith(', continued')));
    expect(goingOn.length).toBeGreaterThan(0);
    for (const page of pages) {
      const frame = page.shapes.find((s) => s.role === 'frame')!;
      // Each row is closed by a rule on its own page; the first cells under a heading have the heading's columns above them.
      const rules = page.shapes.flatMap((s) => (s.role === 'row-rule' && s.kind === 'line' ? [s.y1] : []));
      for (const cell of textsOf(page).filter((t) => t.role === 'cell')) expect(rules.some((y) => y > cell.y), plainText(cell.runs)).toBe(true);
      if (rules.length > 0) expect(page.shapes.some((s) => s.role === 'column-heading')).toBe(true);
      expect(frame.kind === 'rect' && rules.every((y) => y < frame.y + frame.h)).toBe(true);
    }
  });

  it('has every layer of ten on it, and in its PDF', () => {
    const design = tenLayers();
    const result = solved(design);
    const pages = reviewSheet({ ...inputOf('pn-diode'), design, result, requirements: [] });
    const bytes = sheetPdf(pages, FONTS, { title: design.title, author: '', provenance: result.provenance });
    const text = readPdf(bytes).flatMap((p) => p.texts.map((t) => t.text));
    for (const layer of design.layers) expect(text).toContain(layer.name);
    for (const page of pages) expect(overlaps(page)).toEqual([]);
  });

  it('of ten layers has room for another design over it, its contact from near and a figure’s workings', async () => {
    const design = tenLayers();
    const other = { ...tenLayers(), title: 'thinner' };
    other.layers = other.layers.map((layer) => ({ ...layer, thickness: '40 nm' }));
    const result = solved(design);
    const { sections, missing } = await furtherSections(design, result, null, { over: [{ name: 'thinner', design: other }], base: 'base', corner: false, contacts: true, workings: [{ table: 'layers', index: 0, column: 'ecMinusEf' }] }, {
      result: async (design) => solved(design), corner: async () => 'none is asked for', contacts: async (design) => { const answer = closeUps(design); return answer.kind === 'seen' ? answer.contacts : answer.kind; },
    });
    const pages = reviewSheet({ ...inputOf('pn-diode'), design, result, requirements: [], ...sections });
    sheetPdf(pages, FONTS, { title: design.title, author: '', provenance: result.provenance });
    expect(missing).toEqual([]);
    for (const page of pages) expect([...overlaps(page), ...outside(page)]).toEqual([]);
  });

  it('splits a layer of fifty dopants over rows that fit a page, and leaves none out', () => {
    const design = starter('pn-diode');
    design.requirements = [];
    design.layers[1].dopants = Array.from({ length: 50 }, (_, i) => ({ kind: 'donor' as const, depth: `${i + 1} meV`, concentration: `${i + 1}e13 cm^-3` }));
    const input = { ...inputOf('pn-diode'), design, result: solved(design), requirements: [] };
    for (const style of SHEET_STYLES) {
      const pages = reviewSheet({ ...input, style });
      for (const page of pages) expect(outside(page)).toEqual([]);
      const cells = pages.flatMap((p) => roleText(p, 'cell'));
      for (let i = 1; i <= 50; i++) expect(cells.some((c) => c === `${i < 10 ? `${i}e13` : `${i / 10}e14`} cm⁻³`), `dopant ${i}`).toBe(true);
    }
  });

  it('is not held up by texts of a million characters', () => {
    const design = starter('pn-diode');
    design.requirements = [];
    design.notes = 'a\n\n'.repeat(500_000);
    design.custom = { materials: [] };
    const input = { ...inputOf('pn-diode'), design, result: solved(design), requirements: [], title: 'w'.repeat(1_000_000), author: 'x '.repeat(500_000) };
    input.result = { ...input.result, warnings: ['v'.repeat(1_000_000)] };
    const pages = reviewSheet(input);
    expect(pages.length).toBeLessThan(20);
    expect(allText(pages)).toContain('the rest stands in the design file');
    for (const page of pages) expect(outside(page)).toEqual([]);
  });

  it('is the same drawings and the same bytes for the same input', () => {
    const one = sheetOf('graded-cap');
    const two = sheetOf('graded-cap');
    expect(two).toEqual(one);
    const of = { title: 't', author: 'a', provenance: inputOf('graded-cap').result.provenance };
    expect(Buffer.from(sheetPdf(two, FONTS, of)).equals(Buffer.from(sheetPdf(one, FONTS, of)))).toBe(true);
  });

  it('gives all its words back from the PDF', () => {
    const pages = sheetOf('p-gan-contact');
    const read = readPdf(sheetPdf(pages, FONTS, { title: 't', author: 'a', provenance: inputOf('p-gan-contact').result.provenance }));
    pages.forEach((page, i) => {
      const found = read[i].texts.map((t) => t.text).join('');
      for (const t of textsOf(page)) for (const run of t.runs) expect(found).toContain(run.text);
    });
  });

  it('is well-formed as SVG whatever the names, and shows them as text', () => {
    const design = starter('graded-cap');
    design.title = '<script>alert(1)</script> & "quoted"';
    design.requirements = [];
    design.notes = '<b>\u202e</b>\u0000 '.repeat(400);
    design.layers[0].name = `cap <img src=x onerror=alert(1)> ${'w'.repeat(300)}`;
    design.layers[1].name = '層 \u202eevil\u{1F600}';
    const input = { ...inputOf('graded-cap'), design, result: solved(design), requirements: [], title: undefined, author: '</text><script>', date: 'x'.repeat(500), revision: '\u0007' };
    for (const style of SHEET_STYLES) {
      const pages = reviewSheet({ ...input, style });
      for (const page of pages) {
        wellFormed(svgText(page));
        expect(svgText(page)).not.toContain('<script');
        expect(outside(page)).toEqual([]);
        expect(overlaps(page)).toEqual([]);
      }
      const words = readPdf(sheetPdf(pages, FONTS, { title: design.title, author: input.author, provenance: input.result.provenance })).flatMap((p) => p.texts.map((t) => t.text));
      expect(words.join('')).toContain('<script>alert(1)</script> & "quoted"');
      for (const layer of input.result.layers) for (const figure of [layer.ec_minus_ef_eV, layer.ef_minus_ev_eV, layer.gap_eV]) expect(words, `${style}: a figure is broken`).toContain(decimalText(figure));
      expect(words.join('')).not.toMatch(/[\u0000-\u001f\u202a-\u202e]/);
    }
  });

  it('says what was set for it, the seed, and what is laid over the plate', () => {
    const design = starter('graded-cap');
    const set = { temperature: '77 K', Ncap: '2e19 cm^-3' };
    const text = allText(reviewSheet({ ...inputOf('graded-cap'), design, result: solved(design, set), set, seed: 1234, comparison: { base: 'cold', variants: [{ name: 'warm', design, result: solved(design) }] }, requirements: [] }));
    expect(text).toContain('Set for this sheet: temperature = 77 K, Ncap = 2e19 cm⁻³.');
    expect(text).toContain('for this sheet; the design says 1e19 cm⁻³');
    expect(text).toContain('Seed of the random draws: 1234.');
    expect(text).toContain('Variants laid over each other');
    expect(text).toContain('warm');
  });

  it('lists every warning of the result', () => {
    const input = inputOf('graded-cap');
    expect(input.result.warnings.length).toBeGreaterThan(0);
    const text = allText(reviewSheet({ ...input, result: { ...input.result, warnings: ['first warning of two', 'second warning of two'] } }));
    expect(text).toContain('first warning of two');
    expect(text).toContain('second warning of two');
  });

  it('draws in black, white and grey for a journal', () => {
    for (const page of sheetOf('modulation-doped', { style: 'journal' })) {
      for (const s of page.shapes) for (const paint of [s.fill, s.stroke]) if (paint?.startsWith('#')) expect(new Set([paint.slice(1, 3), paint.slice(3, 5), paint.slice(5, 7)]).size, `${s.role} ${paint}`).toBe(1);
    }
  });

  it('refuses a style and a paper that it does not know', () => {
    expect(() => sheetOf('pn-diode', { style: 'jurnal' as 'journal' })).toThrow('unknown style of a sheet: jurnal');
    expect(() => sheetOf('pn-diode', { paper: 'A3' as 'A4' })).toThrow('unknown paper: A3');
  });
});
