import { describe, expect, it } from 'vitest';
import { closeUps } from '../../src/contacts/close-up.ts';
import { plainText, type Drawing } from '../../src/drawing/shapes.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { sheetPdf } from '../../src/export/sheet-files.ts';
import { figureText } from '../../src/result/figure-text.ts';
import { hardest, solveCorner } from '../../src/requirements/corner.ts';
import { cornerTitle } from '../../src/sheet/closer-looks.ts';
import { differenceTable, type SheetVariant } from '../../src/sheet/comparison.ts';
import { PAPERS, SHEET_STYLES } from '../../src/sheet/look.ts';
import { reviewSheet, type SheetInput } from '../../src/sheet/review-sheet.ts';
import { workingsOf } from '../../src/workings/workings-of.ts';
import { wellFormed } from '../drawing/well-formed.ts';
import { FONTS } from '../export/fonts.ts';
import { readPdf, structureOf, type Told } from '../export/read-pdf.ts';
import { outside, overlaps } from './layout-checks.ts';
import { allText, inputOf, solved, solvedStarter, starter, textsOf } from './sheets.ts';

const variantOf = (name: string, change: (design: ReturnType<typeof starter>) => void, id = 'graded-cap'): SheetVariant => {
  const design = starter(id);
  change(design);
  return { name, design, result: solved(design) };
};
const lighter = variantOf('lighter cap', (d) => (d.variables![0].value = '3e18 cm^-3'));
const cold = variantOf('cold', (d) => (d.conditions.temperature = '77 K'));
const thin = variantOf('thin', (d) => (d.layers[3].thickness = '80 nm'));

/** Everything that can be switched on. */
function whole(more: Partial<SheetInput> = {}): SheetInput {
  const input = inputOf('graded-cap');
  const { design, result } = input;
  const corner = solveCorner(design, hardest(input.requirements!)!);
  const contacts = closeUps(design);
  if (corner.kind !== 'corner' || contacts.kind !== 'seen') throw new Error('the starter has a corner and a contact');
  return {
    ...input, comparison: { base: 'as drawn', variants: [lighter, cold, thin] }, corner: corner.corner, closeUps: contacts.contacts,
    workings: [workingsOf(design, result, { table: 'layers', index: 0, column: 'ecMinusEf' }), workingsOf(design, result, { table: 'contacts', index: 0, column: 'rhoC' })], ...more,
  };
}

describe('the sections that a sheet can have besides', () => {
  for (const style of SHEET_STYLES) {
    it(`stand inside the frame, off each other, in the style ${style}`, () => {
      for (const paper of PAPERS) {
        for (const [i, page] of reviewSheet(whole({ style, paper })).entries()) {
          expect(outside(page), `${paper}, page ${i + 1}`).toEqual([]);
          expect(overlaps(page), `${paper}, page ${i + 1}`).toEqual([]);
          wellFormed(svgText(page));
        }
      }
    });
  }

  it('are absent unless asked for', () => {
    const text = allText(reviewSheet(inputOf('graded-cap')));
    for (const words of ['Variants laid over', 'worst corner of the requirements', 'From near', 'Workings:']) expect(text).not.toContain(words);
  });

  it('refer on each page only to gradients and clips of that page, each once', () => {
    for (const page of reviewSheet(whole())) {
      const ids = [...page.gradients, ...page.clips].map(({ id }) => id);
      expect(new Set(ids).size).toBe(ids.length);
      for (const shape of page.shapes) {
        if (shape.clip !== undefined) expect(ids).toContain(shape.clip);
        const paint = /^url\(#(.+)\)$/.exec(shape.fill ?? '');
        if (paint) expect(ids).toContain(paint[1]);
      }
    }
  });

  it('are the same bytes for the same input, all words as text', () => {
    const bytes = (pages: Drawing[]): Uint8Array => sheetPdf(pages, FONTS, { title: 't', author: 'a', provenance: inputOf('graded-cap').result.provenance });
    const [one, two] = [bytes(reviewSheet(whole())), bytes(reviewSheet(whole()))];
    expect(Buffer.from(one).equals(Buffer.from(two))).toBe(true);
    const words = readPdf(one).flatMap((p) => p.texts.map((t) => t.text)).join(' ');
    for (const text of ['lighter cap', 'As drawn'.toLowerCase(), 'From near: Ti on cap', 'Workings: Ec − EF of cap', 'At the worst corner']) expect(words).toContain(text);
  });
});

describe('a sheet as it is heard', () => {
  it('has its title first, every heading once, tables with as many cells in each row as columns, and words for its pictures', () => {
    const pages = reviewSheet(whole());
    const tree = structureOf(sheetPdf(pages, FONTS, { title: 't', author: 'a', provenance: inputOf('graded-cap').result.provenance }));
    expect(tree[0]).toEqual(['H1', starter('graded-cap').title]);
    const headings = tree.flatMap(([type, words]) => (type === 'H2' ? [words] : []));
    expect(headings).toEqual(pages.flatMap((p) => textsOf(p).filter((t) => t.role === 'section').map((t) => plainText(t.runs))).filter((words) => !words.endsWith(', continued')));
    const pictures = tree.flatMap(([type, words]) => (type === 'Figure' ? [words as string] : []));
    expect(pictures.filter((words) => /conduction/i.test(words)).length).toBeGreaterThanOrEqual(3);
    for (const [type, rows] of tree) {
      if (type !== 'Table') continue;
      const counts = (rows as Told[]).map(([, cells]) => cells.length);
      expect(new Set(counts).size).toBe(1);
    }
    const layers = tree[headings.indexOf('Layers, from the top down') < 0 ? 0 : tree.findIndex(([, words]) => words === 'Layers, from the top down') + 1];
    expect(JSON.stringify(layers)).toContain('"cap"');
    expect(JSON.stringify(layers)).toContain('GaAs-InAs x = 0.95');
  });
});

describe('variants on a sheet', () => {
  it('are told apart by dash, mark and grey, and named in the key', () => {
    const pages = reviewSheet(whole({ style: 'journal' }));
    const page = pages.find((p) => p.shapes.filter((s) => s.role === 'variant-conduction-edge').length === 3)!;
    const edges = page.shapes.filter((s) => s.role === 'variant-conduction-edge');
    expect(new Set(edges.map((s) => s.dash)).size).toBe(3);
    expect(new Set(edges.map((s) => s.stroke)).size).toBe(3);
    // Marks of one variant on both its edges; shapes of the marks differ by their count of corners.
    const marks = page.shapes.flatMap((s) => (s.role === 'variant-key-mark' && s.kind === 'path' ? [s.d.replace(/[-\d.,\s]/g, '')] : []));
    expect(marks).toHaveLength(3);
    expect(new Set(marks).size).toBe(3);
    expect(textsOf(page).filter((t) => t.role === 'variant-name').map((t) => plainText(t.runs))).toEqual(['as drawn', 'lighter cap', 'cold', 'thin']);
    for (const s of edges) {
      const level = Number.parseInt(s.stroke!.slice(1, 3), 16) / 255;
      const luminance = level <= 0.04045 ? level / 12.92 : ((level + 0.055) / 1.055) ** 2.4;
      expect(1.05 / (luminance + 0.05)).toBeGreaterThan(3);
    }
  });

  it('have their differences in a table: value, change, per cent', () => {
    const { result } = solvedStarter('graded-cap');
    const table = differenceTable({ name: 'as drawn', result }, [lighter]);
    expect(table.columns.map((c) => c.heading)).toEqual(['Of', 'Figure', 'as drawn', 'lighter cap', 'change', 'per cent']);
    const row = table.rows.map(([line]) => line.map((cell) => cell.map((w) => w.text).join(' '))).find(([of, figure]) => of === 'cap' && figure === 'n (cm⁻³)')!;
    const [before, after] = [result.layers[0].n_cm3, lighter.result.layers[0].n_cm3];
    expect(Number(row[2])).toBeCloseTo(before, -17);
    expect(Number(row[3])).toBeCloseTo(after, -17);
    expect(row[4].startsWith('−')).toBe(true);
    expect(Number(row[5].replace('−', '-').replace(' %', ''))).toBeCloseTo(100 * (after / before - 1), 0);
  });

  it('leave out figures that read the same, and say so where there is none left', () => {
    const { result } = solvedStarter('graded-cap');
    const same = differenceTable({ name: 'a', result }, [{ ...lighter, result }]);
    expect(same.rows).toEqual([[[[{ text: 'No figure reads differently.' }]]]]);
  });

  it('have the changes of the layer table in words, also of layers that only one has', () => {
    const without = variantOf('without grade', (d) => void d.layers.splice(1, 1));
    const text = allText(reviewSheet(whole({ comparison: { base: 'as drawn', variants: [lighter, without] } })));
    expect(text).toContain('Changes from as drawn to lighter cap');
    expect(text).toContain('The variable Ncap: 3e18 cm⁻³, was 1e19 cm⁻³.');
    expect(text).toContain('Layer grade was taken out.');
    expect(text).toMatch(/grade.* only in as drawn\./);
  });

  it('are no more than four with the sheet’s own', () => {
    expect(() => reviewSheet(whole({ comparison: { base: 'a', variants: [lighter, cold, thin, { ...thin, name: 'one more' }] } }))).toThrow('no more than 3 designs');
  });
});

describe('the worst corner', () => {
  it('is that of the hardest requirement: one that is missed before any that is met, then the least margin', () => {
    const [row] = inputOf('graded-cap').requirements!;
    const met = (margin: number): typeof row => ({ ...row, met: true, margin, margin_kind: 'ratio' });
    const missed = (margin: number): typeof row => ({ ...row, met: false, margin, margin_kind: 'ratio' });
    expect(hardest([met(1.2), met(1.1), met(5)])!.margin).toBe(1.1);
    expect(hardest([met(1.001), missed(0.9), missed(0.2)])!.margin).toBe(0.2);
    // A ratio of 1.05 is closer than three hundredths of an electronvolt.
    expect(hardest([{ ...row, met: true, quantity: 'barrierN', margin: 0.03, margin_kind: 'difference', margin_unit: 'eV' }, met(1.05)])!.margin).toBe(1.05);
    expect(hardest([{ ...row, at: null }])).toBeNull();
  });

  it('has the very figure that the judgement found', () => {
    const { design, requirements } = inputOf('graded-cap');
    const row = requirements!.find((r) => r.quantity === 'contactResistivity')!;
    const answer = solveCorner(design, row);
    if (answer.kind !== 'corner') throw new Error(answer.reason);
    const { result } = answer.corner;
    expect(result.conditions.temperature_K).toBe(row.at!.temperature_K);
    expect(result.contacts[0].rho_c_ohm_cm2! / (row.worst as number)).toBeCloseTo(1, 4);
  });

  it('is named in the caption of its plate, with what it comes to there', () => {
    const pages = reviewSheet(whole());
    const captions = pages.flatMap((p) => textsOf(p).filter((t) => t.role === 'caption').map((t) => plainText(t.runs))).join(' ');
    const { at, worst } = hardest(inputOf('graded-cap').requirements!)!;
    expect(at!.words).toMatch(/degC/);
    expect(captions).toContain('−40 °C, Ncap −20 %, barrier +50 meV');
    expect(captions).toContain(`There it is ${figureText(worst as number)} Ω cm²`);
  });

  it('names in its title what moves the requirement, counts the rest, and lists everything that is moved below', () => {
    const at = hardest(inputOf('graded-cap').requirements!)!.at!;
    const pages = reviewSheet(whole());
    const page = pages.find((p) => textsOf(p).some((t) => t.role === 'section' && plainText(t.runs).startsWith('The plate at the worst corner')))!;
    const said = textsOf(page).filter((t) => t.role === 'sentence').map((t) => plainText(t.runs)).join(' ');
    for (const { name, words } of at.tolerances) expect(said.replaceAll('−', '-')).toContain(`${name} ${words}`);
    const named = at.tolerances.filter(({ name, words }) => at.words.includes(`${name} ${words}`)).length;
    expect(named).toBeLessThan(at.tolerances.length);
    expect(textsOf(page).map((t) => plainText(t.runs)).join(' ')).toContain(`and ${at.tolerances.length - named} more (listed below)`);
  });

  it('counts each input once, and says nothing of a rest where there is none', () => {
    const moved = [{ name: 'N', words: '-20 %' }, { name: 'cap', words: '+5 %' }, { name: 'cap thickness', words: '-3 %' }];
    expect(cornerTitle('300 K, N -20 %, cap +5 %, cap thickness -3 %', moved)).toBe('300 K, N -20 %, cap +5 %, cap thickness -3 %');
    expect(cornerTitle('300 K, N -20 %, and 1 more', moved)).toBe('300 K, N -20 %, and 2 more (listed below)');
    expect(cornerTitle('300 K', [])).toBe('300 K');
  });

  it('is refused where the row is of another judgement', () => {
    const { design, requirements } = inputOf('graded-cap');
    expect(solveCorner(design, requirements![0], { tolerances: 'none' })).toEqual({ kind: 'none', reason: 'it was judged over other tolerances' });
  });
});

describe('the workings on a sheet', () => {
  it('hold every formula, every symbol with its value, and the number of its source', () => {
    const { design, result } = solvedStarter('pn-diode');
    const workings = workingsOf(design, result, { table: 'layers', index: 1, column: 'ecMinusEf' });
    const pages = reviewSheet({ ...inputOf('pn-diode'), workings: [workings] });
    const text = allText(pages);
    const cited = /\[(\d+)\] ([^[]*)/.exec(text);
    expect(cited).not.toBeNull();
    const rules = pages.flatMap((p) => p.shapes.filter((s) => s.role === 'formula-rule'));
    expect(rules.length).toBeGreaterThan(2);
    for (const step of workings.steps) if (step.kind === 'formula' && step.result.words !== '') expect(text, step.result.words).toContain(step.result.sign.split('_')[0]);
    expect(text).toContain('thermal energy at 300 K');
    expect(text).toContain('Accuracy:');
    expect(text).toContain('By the simpler way: Ec − EF of drift');
  });

  it('keep a formula with its first symbol on one page', () => {
    for (const page of reviewSheet(whole())) {
      const formulas = textsOf(page).filter((t) => t.role === 'formula');
      const cells = textsOf(page).filter((t) => t.role === 'cell' || t.role === 'sentence');
      if (formulas.length === 0) continue;
      const lowest = Math.max(...formulas.map((t) => t.y));
      expect(cells.some((t) => t.y > lowest)).toBe(true);
    }
  });
});
