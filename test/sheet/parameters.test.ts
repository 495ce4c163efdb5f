import { describe, expect, it } from 'vitest';
import * as presets from '../../presets/index.ts';
import type { DopantPreset, MaterialPreset } from '../../presets/index.ts';
import { starters } from '../../src/design/starters/index.ts';
import { entryValues } from '../../src/parameters/entry-values.ts';
import { parameterWords } from '../../src/parameters/parameter-words.ts';
import { parametersInUse } from '../../src/sheet/parameters.ts';
import { sourceTables } from '../../src/sheet/source-tables.ts';
import { solved, solvedStarter, starter } from './sheets.ts';

/** Parts of an entry that the assumptions can put out of force. */
const OPTIONAL = /^(narrowing|nonParabolicity|polarisation|naturalValence|tunnellingMass|richardson|permittivityHighFrequency|neutralityLevel|pinningSlope|merging|screened|outsideContactModel|alloy\.bowing\.naturalValence)/;

describe('the values of a preset, one by one', () => {
  const entries: { id: string; sources: Record<string, { source: string; checked: string }> }[] = [...presets.materials, ...presets.dopants, ...presets.metals, ...presets.offsets.map((o) => ({ ...o, id: `${o.first}/${o.second}` }))];

  it('are all there: no source of any preset stays without its value', () => {
    for (const entry of entries) {
      const paths = entryValues(entry).map((v) => v.path);
      for (const path of Object.keys(entry.sources)) {
        expect(paths.some((p) => p === path || p.startsWith(`${path}.`) || path.startsWith(`${p}.`)) || path.endsWith('.carrier'), `${entry.id}: ${path} is not among ${paths.join(', ')}`).toBe(true);
      }
    }
  });

  it('each say where they stand, how that was checked, and the work is known', () => {
    for (const entry of entries) {
      for (const { path, origin } of entryValues(entry)) {
        expect(origin.checked, `${entry.id}: ${path}`).not.toBeNull();
        expect(Object.keys(presets.sources), `${entry.id}: ${path}`).toContain(origin.source);
      }
    }
  });

  it('have words of the trade, not only paths', () => {
    const bare = new Set(entries.flatMap((entry) => entryValues(entry).map((v) => v.path)).filter((path) => !path.startsWith('delta') && parameterWords(path) === path && !['affinity', 'permittivity', 'depth', 'degeneracy', 'gap', 'solubility'].includes(path)));
    expect([...bare]).toEqual([]);
  });
});

describe('the parameters in use', () => {
  for (const { id } of starters) {
    it(`of ${id} hold every value of every preset that the design names`, () => {
      const { design, result } = solvedStarter(id);
      const rows = parametersInUse(design, result);
      const has = (of: string, path: string): boolean => rows.some((row) => row.of === of && row.values.some((v) => v.path === path));
      const own = new Set([...(design.custom?.materials ?? [])].map((m) => m.id));
      const named = new Set(design.layers.map((l) => l.material));
      for (const material of design.custom?.materials ?? []) if (material.alloy) [material.alloy.first, material.alloy.second].forEach((end) => named.add(end));
      let checked = 0;
      for (const name of [...named].filter((n) => !own.has(n))) {
        const preset = presets.materials.find((m) => m.id === name) as MaterialPreset;
        const crystals = 'alloy' in preset ? [preset, ...[preset.alloy.first, preset.alloy.second].map((end) => presets.materials.find((m) => m.id === end)!)] : [preset];
        for (const crystal of crystals) {
          for (const { path, text } of entryValues(crystal)) {
            if (OPTIONAL.test(path)) continue;
            expect(has(crystal.id, path), `${crystal.id}: ${path} ${text}`).toBe(true);
            checked++;
          }
        }
      }
      for (const layer of design.layers) {
        for (const row of layer.dopants ?? []) {
          if (row.dopant === undefined || design.custom?.dopants?.some((d) => d.id === row.dopant)) continue;
          const preset = presets.dopants.find((d) => d.host === layer.material && d.id === row.dopant) as DopantPreset;
          for (const { path } of entryValues(preset)) if (!OPTIONAL.test(path)) expect(has(`${layer.material}:${row.dopant}`, path), `${layer.material}:${row.dopant} ${path}`).toBe(true);
        }
      }
      expect(checked).toBeGreaterThan(5);
    });
  }

  it('hold what an assumption puts in force and leave out what it does not touch', () => {
    const design = starter('pn-diode');
    const paths = (d = design): string[] => parametersInUse(d, solved(d)).flatMap((r) => r.values.map((v) => v.path));
    expect(paths().some((p) => p.startsWith('narrowing'))).toBe(design.assumptions?.narrowing ?? false);
    const narrowed = { ...design, assumptions: { ...design.assumptions, narrowing: true } };
    expect(paths(narrowed).some((p) => p.startsWith('narrowing'))).toBe(true);
    expect(paths({ ...design, top: { kind: 'neutral' } }).some((p) => p.startsWith('richardson'))).toBe(false);
    const polar = starter('nitride-channel');
    expect(paths(polar).some((p) => p.startsWith('polarisation'))).toBe(true);
  });

  it('name the measured barrier of a metal, or its work function where none was measured', () => {
    const { design, result } = solvedStarter('pn-diode');
    const measured = parametersInUse(design, result).find((r) => r.of === 'Al on Si')!;
    expect(measured.values[0].path).toMatch(/^barrier for (electrons|holes)$/);
    expect(measured.work).toBe(presets.sources[measured.origin.source]);
    const ideal = { ...design, top: { kind: 'barrier' as const, metal: 'Al', pinning: 'none' } };
    expect(parametersInUse(ideal, solved(ideal)).find((r) => r.of === 'Al')!.values.map((v) => v.path)).toEqual(['workFunction']);
  });

  it('name the published offset of a pair', () => {
    const { design, result } = solvedStarter('modulation-doped');
    const row = parametersInUse(design, result).find((r) => r.of === 'GaAs / AlGaAs')!;
    expect(row.values).toEqual([{ path: 'ΔEv for each x, second less first', text: '-0.53 eV' }]);
    expect(row.work).toContain('Vurgaftman');
  });

  it('flag every value of the person as an own value', () => {
    const design = starter('graded-cap');
    design.top = { kind: 'barrier', barrier: '0.1 eV' };
    design.interfaces = [{ above: 'grade', dEc: '0.02 eV', sheetCharge: '1e11 cm^-2' }];
    const rows = parametersInUse(design, solved(design));
    const own = rows.filter((r) => r.own);
    expect(own.map((r) => r.of)).toEqual(expect.arrayContaining(['GaAs-InAs', 'cap: donor', 'top contact', 'below grade']));
    expect(own.every((r) => r.work.startsWith('own value'))).toBe(true);
    const [table] = sourceTables(design, solved(design));
    const checked = table.rows.map((row) => row[0][3][0].text);
    expect(checked.filter((text) => text === 'own value')).toHaveLength(own.length);
  });

  it('cite each work once, by a number that the parameters point to', () => {
    const { design, result } = solvedStarter('p-gan-contact');
    const [table, cited] = sourceTables(design, result);
    const numbers = cited.rows.map((row) => row[0][0][0].text);
    const works = cited.rows.map((row) => row[0][1][0].text);
    expect(new Set(works).size).toBe(works.length);
    expect(numbers).toEqual(works.map((_, i) => `[${i + 1}]`));
    for (const row of table.rows) expect(numbers).toContain(row[0][2][0].text);
    expect(new Set(table.rows.map((row) => row[0][2][0].text)).size).toBe(works.length);
  });
});
