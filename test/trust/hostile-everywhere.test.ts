import { describe, expect, it } from 'vitest';
import { runHere } from '../../src/batch/job.ts';
import { presetCatalogue } from '../../src/design/catalogue.ts';
import { readDesign } from '../../src/design/read.ts';
import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { writeDesign } from '../../src/design/write.ts';
import { drawPlate } from '../../src/drawing/plate.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { sheetPdf, sheetSvgs } from '../../src/export/sheet-files.ts';
import { marginsCsv } from '../../src/requirements/margins-csv.ts';
import { ledgerTables, tableTsv } from '../../src/result/ledger.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';
import { reviewSheet } from '../../src/sheet/review-sheet.ts';
import { readBackup, writeBackup } from '../../src/storage/backup.ts';
import { shelfFault } from '../../src/storage/shelf.ts';
import { sweepCsvHeading, sweepCsvRows } from '../../src/sweep/csv.ts';
import { planSweep, pointsOf, sweepJob } from '../../src/sweep/sweep.ts';
import { planVariations } from '../../src/tolerance/plan.ts';
import { variationResult } from '../../src/tolerance/result.ts';
import { summaryCsv } from '../../src/tolerance/summary-csv.ts';
import { variationJob } from '../../src/tolerance/variations.ts';
import { workingsText } from '../../src/workings/text.ts';
import { workingsOf } from '../../src/workings/workings-of.ts';
import { wellFormed } from '../drawing/well-formed.ts';
import { FONTS } from '../export/fonts.ts';
import { readCsv } from '../export/read-csv.ts';
import { objectsOf, readPdf } from '../export/read-pdf.ts';
import { designFixture } from '../state/design-fixture.ts';
import { toleranced } from '../tolerance/designs.ts';
import { NAMES } from './hostile-names.ts';

/** What a spreadsheet would run. */
const FORMULA = /^\s*[=+\-@＝＋－＠]/;
const isNumber = (cell: string): boolean => cell === '' || Number.isFinite(Number(cell));
function expectNoFormulas(cells: readonly string[], name: string): void {
  for (const cell of cells) if (!isNumber(cell)) expect(FORMULA.test(cell), `${JSON.stringify(cell.slice(0, 60))} of ${name.slice(0, 40)}`).toBe(false);
}
const plain = (drawn: string, name: string): void => {
  for (const element of wellFormed(drawn)) {
    expect(['script', 'img', 'b', 'image', 'a', 'foreignObject', 'style', 'iframe'], name).not.toContain(element.name);
    for (const key of Object.keys(element.attributes)) expect(key, name).not.toMatch(/^on|^style$|href/i);
  }
};
function expectPlainPdf(bytes: Uint8Array, name: string): void {
  expect(readPdf(bytes).length).toBeGreaterThan(0);
  for (const { body } of objectsOf(bytes).values()) expect(body.replace(/\((?:\\.|[^\\()])*\)|<[0-9A-Fa-f]*>/gs, ''), name).not.toMatch(/\/(JS|JavaScript|OpenAction|AA|URI|Launch|EmbeddedFile)\b/);
}
function solved(design: Design): Result | null {
  const answer = solveDesign(design);
  return answer.kind === 'result' ? answer.result : null;
}
/** A design with one name, or text, in every place that takes one. */
function withName(name: string): Design {
  const design = structuredClone(toleranced);
  design.title = name;
  design.notes = name;
  design.layers.forEach((layer, i) => (layer.name = i === 0 ? name : `${name} ${i}`));
  design.requirements = [{ quantity: 'barrierN', of: 'top', max: '0.6 eV' }, { quantity: 'electronDensity', of: design.layers[0].name, min: '1e17 cm^-3' }];
  for (const variable of design.variables!) variable.note = name;
  return design;
}
const designs = NAMES.map((name) => ({ name, design: withName(name) })).filter(({ design }) => solved(design) !== null);

describe('names of a stranger in the tables of every panel', () => {
  it('are most of them solved like any other', () => {
    expect(designs.length).toBeGreaterThan(NAMES.length / 2);
  });

  it('are no formulas in the table that the ledger copies, whichever columns and rows are shown', () => {
    for (const { name, design } of designs) {
      for (const table of ledgerTables(solved(design)!)) {
        for (const text of [tableTsv(table), tableTsv(table, table.columns.slice(1), [...table.rows].reverse())]) {
          const rows = text.split('\n').map((row) => row.split('\t'));
          expectNoFormulas(rows.flat(), name);
          expect(new Set(rows.map((row) => row.length)).size, name).toBe(1);
        }
      }
    }
  }, 60_000);

  it('are no formulas in a sweep, its headings and its reasons', async () => {
    for (const { name, design } of designs) {
      const reading = planSweep(design, { axis: { variable: 'layers[0].thickness', from: '200 nm', to: '400 nm', points: 2 }, figures: ['layers.0.ec_minus_ef_eV', `layers.${design.layers[0].name}.ec_minus_ef_eV`] });
      const asked = reading.ok ? reading : planSweep(design, { axis: { variable: 'layers[0].thickness', from: '200 nm', to: '400 nm', points: 2 } });
      if (!asked.ok) throw new Error(JSON.stringify(asked.complaints));
      const points = pointsOf(asked.plan, (await runHere(sweepJob(asked.plan))).values);
      points.set(1, { gap: name } as never);
      const rows = readCsv(sweepCsvHeading(asked.plan) + sweepCsvRows(asked.plan, points));
      expectNoFormulas(rows.flat(), name);
      expect(new Set(rows.map((row) => row.length)).size, name).toBe(1);
    }
  }, 120_000);

  it('are no formulas in the summary of tolerances', async () => {
    for (const { name, design } of designs.filter((_, i) => i % 3 === 0)) {
      const planned = planVariations(design, { count: 4, seed: 3, tolerances: 'stated' });
      if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
      const result = variationResult(planned.plan, (await runHere(variationJob(planned.plan))).values);
      expectNoFormulas(readCsv(summaryCsv(result)).flat(), name);
      // Each text of it by itself, whatever may come to stand there one day.
      const all = { ...result, inputs: result.inputs.map((input) => ({ ...input, label: name, tolerance: name, span: [name, name] as typeof input.span })), figures: result.figures.map((figure) => ({ ...figure, words: name, path: name, unit: name })), gaps: [{ index: 1, reason: name }] };
      expectNoFormulas(readCsv(summaryCsv(all)).flat(), name);
    }
  }, 120_000);

  it('are no formulas in the margins of a sizing', () => {
    for (const { name, design } of designs) {
      const rows = readCsv(marginsCsv({ variable: name, unit: 'nm', scan: [{ value: 1, scores: [0, 1] }] }, design));
      expectNoFormulas(rows.flat(), name);
      expect(rows[0].join(), name).toContain('at least');
      expect(new Set(rows.map((row) => row.length)).size, name).toBe(1);
    }
  });
});

describe('texts of a stranger in what can be added to a design', () => {
  it('stay text as names of variants, on the plate and on the sheet', () => {
    const design = structuredClone(toleranced);
    const result = solved(design)!;
    for (const name of NAMES) {
      const drawnPlate = drawPlate(result, { style: 'light', width: 800, height: 450, frame: 'full', variants: [{ name, result }], base: name } as Parameters<typeof drawPlate>[1]);
      plain(svgText(drawnPlate), name);
    }
    for (const name of NAMES.filter((_, i) => i % 4 === 0)) {
      const pages = reviewSheet({ design: { ...design, notes: name }, result, requirements: [], author: name, date: '', revision: '', style: 'screen', paper: 'A4', comparison: { base: name, variants: [{ name, design: { ...design, title: name }, result }] }, workings: [workingsOf(withName(name), solved(withName(name)) ?? result, { table: 'layers', index: 0, column: 'ecMinusEf' })] });
      for (const { text } of sheetSvgs(pages, name)) plain(text, name);
      expectPlainPdf(sheetPdf(pages, FONTS, { title: name, author: name, provenance: result.provenance }), name);
    }
  }, 120_000);

  it('stay text in an own entry with its source, in the workings and on the sheet', () => {
    let met = 0;
    for (const name of NAMES) {
      const metal = { id: 'own', workFunction: '4.5 eV', source: name };
      const design: Design = { ...structuredClone(toleranced), title: 'own', custom: { metals: [metal] }, top: { kind: 'barrier', metal: 'own' } };
      const result = solved(design);
      if (result === null) continue;
      met++;
      const workings = workingsOf(design, result, { table: 'contacts', index: 0, column: 'barrierN' });
      expect(workingsText(workings).length).toBeGreaterThan(10);
      if (met % 4 !== 1) continue;
      const pages = reviewSheet({ design, result, requirements: [], author: '', date: '', revision: '', style: 'screen', paper: 'A4', workings: [workings] });
      for (const { text } of sheetSvgs(pages, 'own')) plain(text, name);
      expectPlainPdf(sheetPdf(pages, FONTS, { title: 'own', author: '', provenance: result.provenance }), name);
    }
    expect(met).toBeGreaterThan(NAMES.length / 2);
  }, 120_000);

  it('run nothing as formulas over T, and hold nothing up', () => {
    const GaAs = structuredClone(presetCatalogue.materials.get('GaAs')!.entry);
    const nested = (depth: number): string => `${'('.repeat(depth)}T${')'.repeat(depth)}*1 eV/K`;
    const texts = [
      ...NAMES, 'T.constructor("return 1")()', 'import("fs")', 'f(T) = T', 'T = 5; T', 'eval("1")', 'x!', '1 eV * 9^9^9^9^9', '1 eV * 1e999', '1 eV / 0', '(T/T - 1)*1 eV', '1 eV * (-1)^0.5', 'T', '1 eV*T^T^T',
      nested(200), '1 eV+'.repeat(5000) + '1 eV', 'sqrt('.repeat(80) + 'T' + ')'.repeat(80), '1 eV*factorial(170)', 'ones(1000,1000)', 'range(1,1e9)', '1 eV * T'.repeat(40),
    ];
    for (const formula of texts) {
      const design: Design = { ...designFixture(), layers: [{ name: 'a', material: 'GaAs', thickness: '1 um', dopants: [{ kind: 'donor', depth: '6 meV', concentration: '1e17 cm^-3' }] }], custom: { materials: [{ ...GaAs, gap: { formula }, source: 'measured here' }] } };
      delete design.interfaces;
      delete design.requirements;
      delete design.variables;
      design.top = design.bottom = { kind: 'neutral' };
      const started = performance.now();
      const reading = readDesign(JSON.stringify(design));
      const answer = reading.ok ? toStack(reading.design) : reading;
      expect(answer.ok, formula.slice(0, 60)).toBe(false);
      if (!answer.ok) for (const { message } of answer.complaints) expect(message.length, formula.slice(0, 60)).toBeLessThan(1000);
      expect(performance.now() - started, formula.slice(0, 60)).toBeLessThan(3000);
    }
    expect(({} as { polluted?: unknown }).polluted).toBe(undefined);
  }, 60_000);

  it('are kept out of the shelf where they are no entry, and stay text where they are', () => {
    for (const list of ['__proto__', 'constructor', 'toString', 'layers', 7, null]) expect(shelfFault({ key: 'x', list, entry: { id: 'x' }, kept: 1 }), String(list)).not.toBeNull();
    for (const entry of [[], 'text', 7, { id: 'M' }, JSON.parse('{"id":"M","workFunction":"4.2 eV","source":"x","__proto__":{"polluted":1}}'), JSON.parse('{"id":"M","workFunction":"4.2 eV","source":"x","constructor":{"prototype":{"polluted":1}}}'), { id: 'M', workFunction: '4.2 eV', source: 'A'.repeat(300_000) }]) {
      expect(shelfFault({ key: 'metals M', list: 'metals', entry, kept: 1 }), JSON.stringify(entry).slice(0, 60)).not.toBeNull();
    }
    for (const source of NAMES) {
      const item = { list: 'metals' as const, entry: { id: 'M', workFunction: '4.2 eV', source } };
      if (shelfFault({ key: 'metals M', ...item, kept: 1 }) !== null) continue;
      const reading = readBackup(writeBackup([], 0, [item]));
      expect(reading.ok && reading.shelf, source.slice(0, 40)).toEqual([item]);
    }
  });

  it('come back from a file that a design was saved to letter by letter, or as a design that is refused', () => {
    for (const name of NAMES) {
      const design = withName(name);
      const reading = readDesign(writeDesign(design));
      if (reading.ok) expect(JSON.parse(JSON.stringify(reading.design)), name.slice(0, 40)).toEqual(JSON.parse(JSON.stringify(design)));
    }
  });
});
