import { expect, it } from 'vitest';
import { svgText } from '../../src/drawing/svg-text.ts';
import { sheetPdf } from '../../src/export/sheet-files.ts';
import { decimalText, figureText } from '../../src/result/figure-text.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { PAPERS, SHEET_STYLES } from '../../src/sheet/look.ts';
import { reviewSheet } from '../../src/sheet/review-sheet.ts';
import { wellFormed } from '../drawing/well-formed.ts';
import { FONTS } from '../export/fonts.ts';
import { readPdf } from '../export/read-pdf.ts';
import { randomDesign, randomFrom } from '../fuzz/random-design.ts';
import { outside, overlaps } from './layout-checks.ts';

const SHEETS = 12;

it('a sheet of random stacks has every text in its place, every layer in its table, and a PDF that can be read', () => {
  const random = randomFrom(20_260);
  let drawn = 0;
  for (let i = 0; drawn < SHEETS && i < 4 * SHEETS; i++) {
    const design = randomDesign(random);
    const answer = solveDesign(design);
    if (answer.kind !== 'result') continue;
    drawn++;
    const pages = reviewSheet({ design, result: answer.result, author: 'A', date: '', revision: '', style: SHEET_STYLES[i % 3], paper: PAPERS[i % 2] });
    for (const page of pages) {
      expect(outside(page), `stack ${i}`).toEqual([]);
      expect(overlaps(page), `stack ${i}`).toEqual([]);
      wellFormed(svgText(page));
    }
    const words = readPdf(sheetPdf(pages, FONTS, { title: design.title, author: '', provenance: answer.result.provenance })).flatMap((p) => p.texts.map((t) => t.text));
    for (const layer of design.layers) expect(words.join(' ')).toContain(layer.name);
    // A figure broken over two lines would be misread.
    for (const layer of answer.result.layers) for (const figure of [decimalText(layer.ec_minus_ef_eV), ...(layer.insulator ? [] : [figureText(layer.n_cm3), figureText(layer.p_cm3)])]) expect(words, `stack ${i}`).toContain(figure);
  }
  expect(drawn).toBe(SHEETS);
});
