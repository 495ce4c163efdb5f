import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { profileCsv } from '../../src/export/profile-csv.ts';
import { inventedResult } from '../drawing/invented-result.ts';
import { readCsv } from './read-csv.ts';

describe('the profile as CSV', () => {
  it('names every column with its unit in the heading row', () => {
    const [heading] = readCsv(profileCsv(inventedResult()));
    expect(heading).toEqual(['depth (nm)', 'Ec (eV)', 'Ev (eV)', 'EF (eV)', 'vacuum level (eV)', 'potential (V)', 'field (V/cm)', 'n (cm^-3)', 'p (cm^-3)', 'ionised donors (cm^-3)', 'ionised acceptors (cm^-3)', 'net charge (q cm^-3)', 'layer', 'layer name']);
  });

  it('gives back every number exactly', () => {
    const result = inventedResult();
    const [heading, ...rows] = readCsv(profileCsv(result));
    expect(rows).toHaveLength(result.profile.z_nm.length);
    const columns = [result.profile.z_nm, result.profile.ec_eV, result.profile.ev_eV, result.profile.ef_eV, result.profile.vacuum_eV, result.profile.potential_V, result.profile.field_V_cm, result.profile.n_cm3, result.profile.p_cm3];
    rows.forEach((row, i) => {
      expect(row).toHaveLength(heading.length);
      columns.forEach((values, c) => expect(Number(row[c])).toBe(values[i] + 0));
      expect(row[12]).toBe(String(result.profile.layer[i] + 1));
      expect(row[13]).toBe(result.layers[result.profile.layer[i]].name);
    });
  });

  it('ends every line with CR LF and leaves a cell empty where there is no number', () => {
    const result = inventedResult();
    result.profile.ec_eV[3] = Number.NaN;
    const text = profileCsv(result);
    expect(text.endsWith('\r\n')).toBe(true);
    expect(text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
    expect(readCsv(text)[4][1]).toBe('');
  });

  it('lets no layer name become a formula, a cell or a row of its own', () => {
    for (const name of ['=1+1', '+1', '-1', '@SUM(A1)', '\t=1', '\r\n=1', '  =1', '＝1', 'a,b', 'say "x"', 'two\nlines', '\u0000=1']) {
      const rows = readCsv(profileCsv(inventedResult([name, 'b', 'c'])));
      expect(rows).toHaveLength(108);
      expect(rows[1]).toHaveLength(14);
      expect(rows[1][13], JSON.stringify(name)).not.toMatch(/^\s*[=+\-@＝]/);
    }
    expect(readCsv(profileCsv(inventedResult(['say "x", please', 'b', 'c'])))[1][13]).toBe('say "x", please');
  });

  it('stays readable whatever the names', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 20 }), (name) => {
        const rows = readCsv(profileCsv(inventedResult([name, 'b', 'c'])));
        expect(rows.every((row) => row.length === 14)).toBe(true);
      }),
      { numRuns: 50 },
    );
  });
});
