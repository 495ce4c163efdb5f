import { describe, expect, it } from 'vitest';
import { ledgerTsv } from '../../src/export/ledger-tsv.ts';
import { inventedResult } from '../drawing/invented-result.ts';

const tables = (text: string): string[][][] => text.replace(/\n$/, '').split('\n\n').map((table) => table.split('\n').map((line) => line.split('\t')));

describe('the ledger as TSV', () => {
  it('holds the tables of layers, junctions and contacts, each with as many cells in every row', () => {
    const [layers, junctions, contacts] = tables(ledgerTsv(inventedResult()));
    expect(layers.map((row) => row[0])).toEqual(['layer', 'n cap', 'barrier', 'p base']);
    expect(junctions).toHaveLength(3);
    expect(contacts).toHaveLength(3);
    for (const table of [layers, junctions, contacts]) for (const row of table) expect(row).toHaveLength(table[0].length);
  });

  it('puts the unit into the heading and a plain number below it', () => {
    const [layers] = tables(ledgerTsv(inventedResult()));
    const column = layers[0].findIndex((heading) => /Ec.*EF.*\(eV\)/.test(heading));
    expect(column).toBeGreaterThan(0);
    expect(layers.slice(1).map((row) => Number(row[column]))).toEqual([0.1, 0.7, 0.95]);
  });

  it('lets no name become a formula, a cell or a row of its own', () => {
    for (const name of ['=1+1', '+x', '@SUM(A1)', 'a\tb', 'a\nb', 'a\r\nb']) {
      const [layers] = tables(ledgerTsv(inventedResult([name, 'b', 'c'])));
      expect(layers).toHaveLength(4);
      expect(layers[1]).toHaveLength(layers[0].length);
      expect(layers[1][0]).not.toMatch(/^[=+@]/);
    }
  });
});
