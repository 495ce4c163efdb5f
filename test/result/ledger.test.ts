import { describe, expect, it } from 'vitest';
import type { Design } from '../../src/design/types.ts';
import { starters } from '../../src/design/starters/index.ts';
import { densityText, differenceText, decimalText, fieldText, figureText, percentText } from '../../src/result/figure-text.ts';
import { regimeWords, textbookError_meV } from '../../src/result/ledger-layers.ts';
import { ledgerTables, qualityLine, sortedRows, tableTsv, type LedgerTable } from '../../src/result/ledger.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';

function solved(id: string): Result {
  const answer = solveDesign(starters.find((s) => s.id === id)!.design);
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
}

const result = solved('tunnel-junction');
const [layers, junctions, contacts] = ledgerTables(result);

describe('texts of figures', () => {
  it('are plain where that is short and have an exponent as it is typed where not', () => {
    expect([0, 1.5, 0.00213, 12345, 123456, 1.2e17, -4.5e-9].map((v) => figureText(v))).toEqual(['0', '1.50', '0.00213', '12300', '1.23e5', '1.20e17', '−4.50e−9']);
  });

  it('give a dash where there is no figure', () => {
    for (const text of [figureText(null), figureText(Number.NaN), decimalText(null), decimalText(Infinity), percentText(null), differenceText(null)]) expect(text).toBe('–');
  });

  it('keep the decimals of energies, without a minus before nothing', () => {
    expect([1.2, -0.0756, -0.0001].map((v) => decimalText(v))).toEqual(['1.200', '−0.076', '0.000']);
  });

  it('tell almost all from all', () => {
    expect([1, 0.9996, 0.9991, 0.5, 0.0123, 1e-6].map(percentText)).toEqual(['100 %', '100 %', '99.9 %', '50 %', '1.2 %', '1.0e−4 %']);
  });

  it('sign a difference', () => {
    expect([12.34, -3.4].map((v) => differenceText(v))).toEqual(['+12', '−3.4']);
  });

  it('call a field below the error of the mesh no field', () => {
    expect([3e-11, -0.05, 0.2, -5.8e5].map((v) => fieldText(v))).toEqual(['≈ 0', '≈ 0', '2.00e−4', '−580']);
  });
});

describe('the ledger', () => {
  it('has a row for each layer, junction and contact of the result', () => {
    expect(layers.rows.map((r) => r.name)).toEqual(result.layers.map((l) => l.name));
    expect(junctions.rows.length).toBe(result.layers.length - 1);
    expect(contacts.rows.map((r) => r.name)).toEqual(['top', 'bottom']);
  });

  it('leaves out a table without rows', () => {
    expect(ledgerTables({ ...result, junctions: [] }).map((t) => t.id)).toEqual(['layers', 'contacts']);
  });

  it('holds the figures of the result, unrounded, beside their texts', () => {
    const { cells } = layers.rows[1];
    expect(cells.ecMinusEf.value).toBe(result.layers[1].ec_minus_ef_eV);
    expect(cells.n.value).toBe(result.layers[1].n_cm3);
    expect(junctions.rows[1].cells.peakField.value).toBeCloseTo(result.junctions[1].peak_field_V_cm / 1000, 9);
    expect(cells.ecMinusEf.lines).toEqual([decimalText(result.layers[1].ec_minus_ef_eV)]);
  });

  it('says by how much the textbook is off, in meV, with its own figure beside', () => {
    const degenerate = result.layers[2];
    const error = 1000 * (degenerate.boltzmann.ec_minus_ef_eV - degenerate.ec_minus_ef_eV);
    // n-GaAs at 2e19 cm^-3, parabolic band: n/Nc = 46; inverting F_1/2 by hand puts the error of Boltzmann at about 300 meV.
    expect(error).toBeGreaterThan(250);
    expect(textbookError_meV(degenerate)).toBe(error);
    expect(layers.rows[2].cells.textbook).toEqual({ lines: [`${differenceText(error)} meV`], value: error, note: `${decimalText(degenerate.boltzmann.ec_minus_ef_eV)} eV` });
  });

  it('tells carriers below the smallest number as a power of ten, and says where none are left to screen or to conduct', () => {
    const cold: Design = {
      format: 'halfmark-design/1', title: 'cold', conditions: { temperature: '4 K' }, top: { kind: 'neutral' }, bottom: { kind: 'neutral' },
      layers: [
        { name: 'p', material: 'Si', thickness: '200 nm', dopants: [{ dopant: 'B', concentration: '1e17 cm^-3' }] },
        { name: 'i', material: 'Si', thickness: '200 nm' },
      ],
    };
    const answer = solveDesign(cold);
    if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
    const [p, i] = ledgerTables(answer.result)[0].rows.map(({ cells }) => cells);
    // kT ln10 at 4 K is 0.79369 meV; Ec - EF of 1.167 eV and Nc(4 K) near 4e16 cm^-3 give -1470.7 + 16.6.
    expect(p.n.lines).toEqual([expect.stringMatching(/^≈ 1e−145[3-5]$/)]);
    expect(p.n.value).toBe(0);
    expect(p.p.lines[0]).toMatch(/^\d\.\d\de12$/);
    expect(i.debye).toEqual({ lines: ['–'], value: null, note: 'over 1 m: hardly a free carrier' });
    expect(i.resistivity).toEqual({ lines: ['–'], value: null, note: 'no free carriers' });
    expect([densityText(0), densityText(1e-200), densityText(null)]).toEqual(['< 1e−300', '1.00e−200', '–']);
  });

  it('gives the regime in words, full depletion and insulators included', () => {
    const [layer] = result.layers;
    expect(regimeWords({ ...layer, type: 'n', regime: 'freeze-out', fully_depleted: false })).toBe('n, frozen out');
    expect(regimeWords({ ...layer, type: 'p', regime: 'extrinsic', fully_depleted: true })).toBe('p, extrinsic; fully depleted in the stack');
    expect(regimeWords({ ...layer, type: 'i', regime: 'intrinsic', fully_depleted: false })).toBe('intrinsic');
    expect(regimeWords({ ...layer, insulator: true })).toBe('insulator');
  });

  it('gives each dopant a line with both of its shares', () => {
    const [layer] = result.layers;
    const two = { ...layer.ionised[0], concentration_cm3: 1e18, ionised_cm3: 0.5e18, fraction: 0.5, fraction_depleted: 1 };
    const [table] = ledgerTables({ ...result, layers: [{ ...layer, ionised: [two, { ...two, dopant: null, kind: 'donor' as const, ionised_cm3: 1e18, fraction: 1 }] }] });
    expect(table.rows[0].cells.ionised).toEqual({ lines: ['C 50 % / 100 %', 'donor 100 % / 100 %'], value: 75 });
  });

  it('puts the closed form, its regime and how far it is off beside the solved contact resistivity', () => {
    const schottky = solved('schottky');
    const [top] = ledgerTables(schottky).at(-1)!.rows;
    const { rho_c_ohm_cm2: rho, rho_c_closed_form_ohm_cm2: closed } = schottky.contacts[0];
    expect(rho).toBeGreaterThan(0);
    expect(top.cells.rhoC).toEqual({ lines: [figureText(rho)], value: rho });
    expect(top.cells.rhoCClosed).toEqual({ lines: [figureText(closed)], value: closed, note: 'thermionic' });
    expect(top.cells.closedRatio).toEqual({ lines: [figureText(rho! / closed!)], value: rho! / closed! });
    const blocked = ledgerTables({ ...schottky, contacts: [{ ...schottky.contacts[0], rho_c_ohm_cm2: null }] }).at(-1)!.rows[0];
    expect(blocked.cells.closedRatio).toEqual({ lines: ['–'], value: null });
    expect(contacts.rows[0].cells.rhoC, 'a neutral end has none').toEqual({ lines: ['–'], value: null });
  });

  it('gives every usual column a cell with text in every row', () => {
    for (const table of [layers, junctions, contacts]) {
      for (const row of table.rows) for (const column of table.columns) expect(row.cells[column.id].lines.join(''), `${table.id} ${column.id}`).not.toBe('');
    }
  });
});

const small = (values: (number | string | null)[]): LedgerTable => ({
  id: 'layers', title: '', of: 'layer',
  columns: [{ id: 'v', heading: 'V', words: '', unit: 'eV', kind: 'figure', usual: true }],
  rows: values.map((value, index) => ({ index, name: `row ${index}`, cells: { v: { lines: [''], value } } })),
});

describe('sorting', () => {
  it('goes by the number, cells without a figure last either way, equals in their order', () => {
    const table = small([3, null, -1, 3, 20]);
    expect(sortedRows(table, { column: 'v', descending: false }).map((r) => r.index)).toEqual([2, 0, 3, 4, 1]);
    expect(sortedRows(table, { column: 'v', descending: true }).map((r) => r.index)).toEqual([4, 0, 3, 2, 1]);
  });

  it('by the rows themselves goes down the stack or up', () => {
    const table = small([1, 2, 3]);
    expect(sortedRows(table, { column: '', descending: false }).map((r) => r.index)).toEqual([0, 1, 2]);
    expect(sortedRows(table, { column: '', descending: true }).map((r) => r.index)).toEqual([2, 1, 0]);
  });
});

describe('copying', () => {
  it('writes units into the heading row and numbers that a spreadsheet reads', () => {
    const lines = tableTsv(layers).split('\n').map((line) => line.split('\t'));
    expect(lines[0][0]).toBe('layer');
    expect(lines[0]).toContain('Ec − EF (eV)');
    for (const line of lines) expect(line.length).toBe(lines[0].length);
    const n = lines[0].indexOf('n (cm⁻³)');
    lines.slice(1).forEach((line, i) => expect(Math.abs(Number(line[n]) / result.layers[i].n_cm3 - 1)).toBeLessThan(1e-6));
  });

  it('lets no name leave its field or become a formula', () => {
    const table = small([1, 2]);
    table.rows[0].name = 'a\tb\nc';
    table.rows[1].name = '=HYPERLINK("x")';
    expect(tableTsv(table)).toBe('layer\tV (eV)\na b c\t1\n\'=HYPERLINK("x")\t2');
  });

  it('leaves a cell without a figure empty and keeps a negative number a number', () => {
    expect(tableTsv(small([null, -2.5]))).toBe('layer\tV (eV)\nrow 0\t\nrow 1\t-2.5');
  });
});

describe('the line on quality', () => {
  it('says what was accepted and how well it is known', () => {
    const quality = { converged: true, newton_updates: 1, last_update_V: 1e-13, mesh_nodes: 321, mesh_error_V: 4.56e-6, gauss_error: 2.2e-11 };
    expect(qualityLine({ ...result, quality })).toBe('Accepted: mesh error 0.0046 mV on 321 nodes, charge balanced to 2e−11, 1 Newton update.');
  });
});
