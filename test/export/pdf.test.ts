import { describe, expect, it } from 'vitest';
import type { Drawing, Part, Shape } from '../../src/drawing/shapes.ts';
import { readFont } from '../../src/export/pdf-font.ts';
import { pdfOf } from '../../src/export/pdf.ts';
import { FONTS } from './fonts.ts';
import { objectsOf, readPdf, structureOf } from './read-pdf.ts';

const PROPERTIES = { title: 'a title', author: 'an author', subject: '', creator: 'a program' };

function drawing(shapes: Shape[], more: Partial<Drawing> = {}): Drawing {
  return { width: 400, height: 200, background: '#FFFFFF', font: 'sans-serif', shapes, gradients: [], clips: [], title: 't', description: 'd', ...more };
}
const words = (text: string, more: Partial<Shape> = {}): Shape => ({ kind: 'text', role: 'r', x: 100, y: 50, size: 12, anchor: 'start', runs: [{ text }], ...more }) as Shape;
const pdf = (shapes: Shape[], more: Partial<Drawing> = {}): Uint8Array => pdfOf([drawing(shapes, more)], FONTS, PROPERTIES);
const found = (shapes: Shape[], more: Partial<Drawing> = {}) => readPdf(pdf(shapes, more))[0];

describe('a PDF of drawings', () => {
  it('gives its text back, with Greek, raised and lowered figures, and signs', () => {
    const text = 'φBn ρ 2×10¹⁹ cm⁻³ Ω µm ≤ − χ m₀';
    expect(found([words(text)]).texts.map((t) => t.text)).toEqual([text]);
  });

  it('gives back characters that the face has no glyph for, which it shows as boxes', () => {
    expect(found([words('層 \u{1F9EA} ok')]).texts[0].text).toBe('層 \u{1F9EA} ok');
  });

  it('puts text where the drawing has it, in points from the lower edge', () => {
    const { texts, width, height } = found([words('here')]);
    expect([width, height]).toEqual([300, 150]);
    expect(texts[0].x).toBeCloseTo(75, 2);
    expect(texts[0].y).toBeCloseTo(112.5, 2);
  });

  it('ends text at its anchor by the true width of its glyphs', () => {
    const font = readFont(FONTS.normal);
    const width = [...'0.5 eV'].reduce((sum, c) => sum + font.advanceOf(font.glyphOf(c.codePointAt(0)!)), 0) / font.unitsPerEm;
    const { texts } = found([words('0.5 eV', { anchor: 'end' } as Partial<Shape>), words('0.5 eV', { anchor: 'middle' } as Partial<Shape>)]);
    expect(texts[0].x).toBeCloseTo(0.75 * (100 - 12 * width), 2);
    expect(texts[1].x).toBeCloseTo(0.75 * (100 - 6 * width), 2);
  });

  it('lowers a subscript and comes back to the line', () => {
    const { texts } = found([words('', { runs: [{ text: 'E' }, { text: 'C', script: 'sub' }, { text: ' x' }] } as Partial<Shape>)]);
    expect(texts.map((t) => t.text)).toEqual(['E', 'C', ' x']);
    expect(texts[1].y).toBeLessThan(texts[0].y);
    expect(texts[2].y).toBe(texts[0].y);
    expect(texts[2].x).toBeGreaterThan(texts[1].x);
  });

  it('is the same bytes for the same drawings, and other bytes for another', () => {
    expect(Buffer.from(pdf([words('one')])).equals(Buffer.from(pdf([words('one')])))).toBe(true);
    expect(Buffer.from(pdf([words('one')])).equals(Buffer.from(pdf([words('two')])))).toBe(false);
  });

  it('carries no date and no clock', () => {
    expect(Buffer.from(pdf([words('one')])).toString('latin1')).not.toMatch(/CreationDate|ModDate/);
  });

  it('embeds a font that can be read again, with the widths of the whole one and only the glyphs that are shown', () => {
    const objects = [...objectsOf(pdf([words('Äx0')])).values()];
    const file = objects.find(({ body }) => body.includes('/Length1'))!.stream!;
    const subset = readSubset(file);
    const whole = readFont(FONTS.normal);
    // The empty box, three glyphs, and the two parts of the letter with dots.
    expect(subset.glyphs).toBeGreaterThanOrEqual(4);
    expect(subset.glyphs).toBeLessThanOrEqual(6);
    expect(subset.advances.slice(1, 4)).toEqual([...'Äx0'].map((c) => whole.advanceOf(whole.glyphOf(c.codePointAt(0)!))));
    expect(file.length).toBeLessThan(10_000);
  });

  it('writes paths, dashes, clips, opacity and gradients', () => {
    const { content } = found(
      [
        { kind: 'path', role: 'a', d: 'M0,0L10,5C1,2,3,4,5,6Z', fill: 'url(#g)', stroke: '#FF0000', width: 2, dash: '14 6', clip: 'c', opacity: 0.4 },
        { kind: 'line', role: 'b', x1: 1, y1: 2, x2: 3, y2: 4, stroke: '#000000' },
      ],
      { gradients: [{ id: 'g', x1: 0, y1: 0, x2: 0, y2: 10, stops: [{ offset: 0.2, color: '#FFFFFF' }, { offset: 0.2, color: '#112233' }, { offset: 1, color: '#000000' }] }], clips: [{ id: 'c', x: 1, y: 2, w: 30, h: 40 }] },
    );
    expect(content).toContain('1 2 30 40 re W n');
    expect(content).toContain('0 0 m\n10 5 l\n1 2 3 4 5 6 c\nh');
    expect(content).toContain('[14 6] 0 d');
    expect(content).toContain('/O1 gs');
    expect(content).toContain('/S1 sh');
  });

  it('turns a name against its page into harmless text', () => {
    const name = ') Tj ET Q /JavaScript <</S/URI>> \u0000\u202e\ud800 (\\';
    const bytes = pdfOf([drawing([words(name)])], FONTS, { ...PROPERTIES, title: name, author: '\u202e>> endobj' });
    expect(readPdf(bytes)[0].texts[0].text).toBe(') Tj ET Q /JavaScript <</S/URI>>  (\\');
    expect(Buffer.from(bytes).toString('latin1')).not.toContain('JavaScript');
  });

  it('tells programs that read aloud what its marks are: title first, headings, tables by rows and cells, pictures by words; ornament is none of it', () => {
    const table = { columns: 2, heads: 1 };
    const cell = (row: number, column: number): Part => ({ as: 'cell', table, row, column });
    const [figure, heading, title] = [{ as: 'figure', alt: 'a band (picture)' }, { as: 'heading' }, { as: 'title' }] as Part[];
    const split = cell(1, 1);
    const bytes = pdf([
      words('Heading', { part: heading }), { kind: 'line', role: 'l', x1: 0, y1: 0, x2: 1, y2: 1, stroke: '#000000', part: figure },
      words('h0', { part: cell(0, 0) }), words('h1', { part: cell(0, 1) }), words('a', { part: cell(1, 0) }), words('first', { part: split }), words('second', { part: split }),
      words('b', { part: cell(2, 1) }), words('ornament'), words('Title', { part: title }),
    ]);
    const tree = structureOf(bytes);
    expect(tree).toEqual([
      ['H1', 'Title'], ['H2', 'Heading'], ['Figure', 'a band (picture)'],
      ['Table', [['TR', [['TH', 'h0'], ['TH', 'h1']]], ['TR', [['TD', 'a'], ['TD', 'first second']]], ['TR', [['TD', ''], ['TD', 'b']]]]],
    ]);
    expect(found([words('Heading', { part: heading })]).content).toMatch(/^[^\n]*cm\n\/Artifact BMC\n[^]*EMC\n\/H2 << \/MCID 0 >> BDC\n[^]*EMC\n$/);
    const text = Buffer.from(bytes).toString('latin1');
    expect(text).toContain('/Marked true');
    expect(text).toContain('/Lang (en)');
    expect(Buffer.from(pdf([words('no parts')])).toString('latin1')).not.toContain('StructTreeRoot');
  });

  it('refuses what it cannot write rather than leave it out', () => {
    expect(() => pdfOf([], FONTS, PROPERTIES)).toThrow('at least one page');
    expect(() => pdf([{ kind: 'path', role: 'a', d: 'm0,0l1,1' }])).toThrow('path data');
    expect(() => pdf([{ kind: 'path', role: 'a', d: 'M0,0L1' }])).toThrow('path data');
    expect(() => pdf([{ kind: 'rect', role: 'a', x: 0, y: 0, w: 1, h: 1, fill: 'red' }])).toThrow('colour');
    expect(() => pdf([{ kind: 'rect', role: 'a', x: 0, y: 0, w: 1, h: 1, fill: 'url(#none)' }])).toThrow('gradient');
    expect(() => pdf([{ kind: 'rect', role: 'a', x: Number.NaN, y: 0, w: 1, h: 1 }])).toThrow('number');
  });
});

/** Count of glyphs and their advances, straight from the tables. */
function readSubset(file: Buffer): { glyphs: number; advances: number[] } {
  const table = (tag: string): number => {
    for (let i = 0; i < file.readUInt16BE(4); i++) if (file.toString('latin1', 12 + 16 * i, 16 + 16 * i) === tag) return file.readUInt32BE(20 + 16 * i);
    throw new Error(`no table ${tag}`);
  };
  const glyphs = file.readUInt16BE(table('maxp') + 4);
  return { glyphs, advances: Array.from({ length: glyphs }, (_, g) => file.readUInt16BE(table('hmtx') + 4 * g)) };
}
