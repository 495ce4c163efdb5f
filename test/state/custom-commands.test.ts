import { describe, expect, it } from 'vitest';
import { presetCatalogue } from '../../src/design/catalogue.ts';
import { usesOf, type EntryKey } from '../../src/design/entry-key.ts';
import { checkDesign } from '../../src/design/read.ts';
import type { Design } from '../../src/design/types.ts';
import { allKeys, dopantsIn, presetOf, shownEntry } from '../../src/parameters/entry-view.ts';
import { valueComplaint } from '../../src/parameters/check-value.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { parametersInUse } from '../../src/sheet/parameters.ts';
import { materialAsks } from '../../src/workings/published.ts';
import { addCustomEntry, removeCustomEntry, resetCustomValue, setCustomValue } from '../../src/state/commands/index.ts';
import { catalogueOf } from '../../src/design/catalogue.ts';
import { designFixture } from './design-fixture.ts';

const GAAS: EntryKey = { list: 'materials', id: 'GaAs' };
const SILICON: EntryKey = { list: 'dopants', id: 'Si', host: 'GaAs' };
const TI: EntryKey = { list: 'metals', id: 'Ti' };
const base = (key: EntryKey) => presetOf(key)!;
const solvable = (): Design => ({ ...designFixture(), requirements: [] });
const gapOf = (design: Design): number => {
  const answer = solveDesign(design);
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result.layers[0].gap_eV!;
};

describe('a value of the design’s own', () => {
  it('wins over the preset, keeps the others with their sources, and names its own', () => {
    const design = solvable();
    const next = setCustomValue(design, GAAS, base(GAAS), 'gap.zeroK', '1.6 eV', 'measured here');
    expect(gapOf(next) - gapOf(design)).toBeCloseTo(0.081, 6);
    const shown = shownEntry(catalogueOf(next.custom), GAAS)!;
    expect(shown.values.filter(({ own }) => own).map(({ path, work, presetText }) => [path, work, presetText])).toEqual([['gap.zeroK', 'measured here', '1.519 eV']]);
    expect(shown.values.find(({ path }) => path === 'permittivity')!.origin.checked).not.toBe(null);
    expect(checkDesign(next).ok).toBe(true);
    expect(design.custom).toBe(undefined);
    expect(presetCatalogue.materials.get('GaAs')!.entry.gap).toMatchObject({ zeroK: '1.519 eV' });
  });

  it('goes back to the preset without a trace, and leaves another one where it is', () => {
    const once = setCustomValue(solvable(), GAAS, base(GAAS), 'gap.zeroK', '1.6 eV', 'a');
    const twice = setCustomValue(once, GAAS, base(GAAS), 'mobility.electron.exponent', '0.4', 'b');
    expect(resetCustomValue(twice, GAAS, base(GAAS), 'mobility.electron.exponent')).toEqual(once);
    const back = resetCustomValue(resetCustomValue(twice, GAAS, base(GAAS), 'gap.zeroK'), GAAS, base(GAAS), 'mobility.electron.exponent');
    expect(back).toEqual(solvable());
    expect('custom' in back).toBe(false);
  });

  it('comes back from every value of every preset, and each is a quantity of its kind as it stands', () => {
    const design = solvable();
    let count = 0;
    for (const key of allKeys(presetCatalogue)) {
      for (const { path, edited } of shownEntry(presetCatalogue, key)!.values) {
        const at = `${JSON.stringify(key)} ${path}`;
        const changed = setCustomValue(design, key, base(key), path, edited, 'mine');
        expect(resetCustomValue(changed, key, base(key), path), at).toEqual(design);
        expect(checkDesign(changed).ok, at).toBe(true);
        expect(valueComplaint(design, key, base(key), path, edited, edited.includes(';') || path.startsWith('validity')), at).toBe(null);
        count++;
      }
    }
    expect(count).toBeGreaterThan(1000);
  });

  it('can be one that the preset does not have, and goes with its reset', () => {
    const key: EntryKey = { list: 'dopants', id: 'C', host: 'GaAs' };
    const { missing } = shownEntry(presetCatalogue, key)!;
    expect(missing.length).toBeGreaterThan(0);
    const next = setCustomValue(solvable(), key, base(key), missing[0].path, '3e17 cm^-3', 'a table');
    expect(shownEntry(catalogueOf(next.custom), key)!.values.find(({ path }) => path === missing[0].path)).toMatchObject({ own: true, presetText: null, work: 'a table' });
    expect(resetCustomValue(next, key, base(key), missing[0].path)).toEqual(solvable());
  });

  it('of a barrier takes the published check with it', () => {
    const at = base(TI) as { barriers: { material: string; carrier: string }[] };
    const next = setCustomValue(solvable(), TI, base(TI), 'barriers.0', '0.77 eV', 'IV at 300 K');
    expect(next.custom!.metals![0].barriers![0]).toEqual({ material: at.barriers[0].material, carrier: at.barriers[0].carrier, height: '0.77 eV', source: 'IV at 300 K' });
    expect(next.custom!.metals![0].barriers!.slice(1)).toEqual(at.barriers.slice(1));
  });

  it('is refused with a sentence where it is empty, of another kind, without a unit or out of bounds', () => {
    const complaint = (key: EntryKey, path: string, text: string) => valueComplaint(solvable(), key, base(key), path, text, false);
    expect(complaint(GAAS, 'gap.zeroK', '')).toContain('empty');
    expect(complaint(GAAS, 'gap.zeroK', '20 nm')).toContain('is a length, not an energy');
    expect(complaint(GAAS, 'gap.zeroK', '1.6')).toContain('has no unit');
    expect(complaint(GAAS, 'gap.zeroK', '40 eV')).toContain('at most 30 eV');
    expect(complaint(GAAS, 'permittivity', '0.5')).toContain('at least 1');
    expect(complaint(SILICON, 'degeneracy', '0')).toContain('must be above zero');
    expect(complaint(TI, 'workFunction', '-4 eV')).toContain('must be above zero');
    expect(complaint(GAAS, 'gap.zeroK', '1.5 eV + Ncap * 0 eV cm^3')).toBe(null);
  });
});

describe('a value changed in the design, on the review sheet', () => {
  it('is told as an own value with its source, and the published ones beside it keep their works', () => {
    const design = setCustomValue(solvable(), GAAS, base(GAAS), 'gap.zeroK', '1.6 eV', 'measured here');
    const answer = solveDesign(design);
    if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
    const rows = parametersInUse(design, answer.result).filter(({ of }) => of === 'GaAs');
    expect(rows.filter(({ own }) => own).map(({ work, values }) => [work, values])).toEqual([['own value: measured here', [{ path: 'gap.zeroK', text: '1.6 eV' }]]]);
    expect(rows.filter(({ own }) => !own).length).toBeGreaterThan(2);
    const workings = materialAsks(catalogueOf(design.custom), 'GaAs');
    expect(workings('gap.zeroK', 'E', 'gap', 1.6, 'eV').origin).toEqual({ from: 'own value', text: 'measured here' });
    expect(workings('permittivity', 'e', 'permittivity', 12.9, '').origin.from).toBe('source');
  });
});

describe('an entry of the design’s own', () => {
  it('is a copy under its own id, with the dopants of its original, and solves alike', () => {
    const design = solvable();
    const next = addCustomEntry(design, GAAS, base(GAAS), 'GaAs-lot7', dopantsIn(presetCatalogue, 'GaAs'));
    expect(next.custom!.materials!.map(({ id }) => id)).toEqual(['GaAs-lot7']);
    expect(next.custom!.dopants!.every(({ host }) => host === 'GaAs-lot7')).toBe(true);
    const used: Design = { ...next, top: { kind: 'neutral' }, layers: [{ ...next.layers[0], material: 'GaAs-lot7' }], interfaces: [], bottom: { kind: 'neutral' } };
    expect(gapOf(used)).toBe(gapOf(design));
    expect(() => addCustomEntry(next, GAAS, base(GAAS), 'GaAs-lot7')).toThrow(RangeError);
  });

  it('tells where it is used, and is taken out without a trace', () => {
    const design = addCustomEntry(solvable(), TI, base(TI), 'Ti-2');
    expect(usesOf(design, { list: 'metals', id: 'Ti-2' })).toEqual([]);
    expect(usesOf(design, TI)).toEqual(['the top contact']);
    expect(usesOf(design, SILICON)).toEqual(['layer cap']);
    expect(usesOf(design, GAAS)).toEqual(['layer cap', 'layer buffer']);
    expect(removeCustomEntry(design, { list: 'metals', id: 'Ti-2' })).toEqual(solvable());
    expect(() => removeCustomEntry(solvable(), TI)).toThrow(RangeError);
  });
});
