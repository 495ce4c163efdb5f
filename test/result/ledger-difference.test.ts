import { describe, expect, it } from 'vitest';
import { starters } from '../../src/design/starters/index.ts';
import * as commands from '../../src/state/commands/index.ts';
import { ledgerTables } from '../../src/result/ledger.ts';
import { cellDifference, loneRows, partnerRow } from '../../src/result/ledger-difference.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Design } from '../../src/design/types.ts';

const { design } = starters.find(({ id }) => id === 'pn-diode')!;
function tables(of: Design) {
  const answer = solveDesign(of);
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return ledgerTables(answer.result);
}
const [here, there] = [tables(design), tables(commands.setTemperature(design, '350 K'))];

describe('the ledger of two results', () => {
  it('tells value, change and per cent of each figure that differs', () => {
    const [layers] = here;
    const column = layers.columns.find(({ unit }) => unit === 'eV')!;
    const row = layers.rows[1];
    const other = partnerRow(layers, row, there)!;
    const difference = cellDifference(column, row.cells[column.id], other.cells[column.id])!;
    const [a, b] = [row.cells[column.id].value as number, other.cells[column.id].value as number];
    expect(difference.other).toBe(other.cells[column.id].lines.join(', '));
    expect(Number(difference.change!.replace('−', '-'))).toBeCloseTo(a - b, 4);
    expect(Number(difference.percent!.replace('−', '-').replace(' %', '')) / ((100 * (a - b)) / b)).toBeCloseTo(1, 1);
  });

  it('has nothing to tell of the same result, nor of words that are equal', () => {
    const again = tables(design);
    for (const table of here) for (const row of table.rows) for (const column of table.columns) expect(cellDifference(column, row.cells[column.id], partnerRow(table, row, again)!.cells[column.id])).toBeNull();
  });

  it('names rows that only one of them has', () => {
    const fewer = tables(commands.removeLayer(design, 1));
    const [lone] = loneRows(here, fewer);
    expect(lone).toEqual({ id: 'layers', here: [design.layers[1].name], there: [] });
    expect(loneRows(here, here)).toEqual([]);
  });

  it('takes for the same what reads the same', () => {
    const column = here[0].columns.find(({ kind }) => kind === 'figure')!;
    expect(cellDifference(column, { lines: ['≈ 0'], value: 6e-11 }, { lines: ['≈ 0'], value: 1e-11 })).toBeNull();
  });

  it('gives no per cent of a figure that was zero', () => {
    const column = here[0].columns.find(({ kind }) => kind === 'figure')!;
    expect(cellDifference(column, { lines: ['2'], value: 2 }, { lines: ['0'], value: 0 })).toEqual({ other: '0', change: '+2.00', percent: null });
  });
});
