import { describe, expect, it } from 'vitest';
import { rivals } from '../../presets/rivals.ts';
import { sources } from '../../presets/index.ts';
import { catalogueOf, presetCatalogue } from '../../src/design/catalogue.ts';
import { textAtPath } from '../../src/design/entry-path.ts';
import { checkDesign } from '../../src/design/read.ts';
import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { valueComplaint } from '../../src/parameters/check-value.ts';
import { entryOf, presetOf, shownEntry } from '../../src/parameters/entry-view.ts';
import { chooseRival, offsetOf, rivalOffsets, rivalsOf } from '../../src/parameters/rivals.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { parametersInUse } from '../../src/sheet/parameters.ts';
import { addBarrier, removePairOffset, resetCustomValue, setCustomValue, setPairOffset } from '../../src/state/commands/index.ts';
import { designFixture } from '../state/design-fixture.ts';

const solvable = (): Design => ({ ...designFixture(), requirements: [] });
const polar = (): Design => ({
  format: 'halfmark-design/1', title: 'pair', conditions: { temperature: '300 K' }, top: { kind: 'neutral' }, bottom: { kind: 'neutral' },
  layers: [{ name: 'a', material: 'AlN', thickness: '20 nm', dopants: [{ dopant: 'Si', concentration: '1e18 cm^-3' }] }, { name: 'b', material: 'GaN', thickness: '200 nm', dopants: [{ dopant: 'Si', concentration: '1e18 cm^-3' }] }],
});
const result = (design: Design) => {
  const answer = solveDesign(design);
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
};

describe('every rival published value', () => {
  it('stands beside a value that its preset has, differs from it, has a source, and can be taken', () => {
    expect(rivals.values.length).toBeGreaterThan(15);
    for (const { of, values, source } of rivals.values) {
      const at = `${JSON.stringify(of)} ${Object.keys(values).join()}`;
      const entry = presetOf(of)!;
      expect(entry, at).toBeTruthy();
      expect(sources[source], at).toBeTruthy();
      for (const [path, text] of Object.entries(values)) {
        if (!path.endsWith('.formula')) expect(textAtPath(entry, path), at).toBeTruthy();
        expect(textAtPath(entry, path), at).not.toBe(text);
        expect(valueComplaint(solvable(), of, entry, path, text, false), at).toBe(null);
      }
    }
    for (const { first, second, source } of rivals.offsets) {
      expect([first, second].every((id) => presetCatalogue.materials.has(id)), `${first} ${second}`).toBe(true);
      expect(sources[source]).toBeTruthy();
    }
  });

  it('takes the place of the published one in one act, says whose it is, and goes back without a trace', () => {
    for (const { of } of rivals.values) {
      const entry = presetOf(of)!;
      for (const [i, rival] of rivalsOf(of, entry).entries()) {
        const at = `${JSON.stringify(of)} ${i}`;
        expect(rival.chosen, at).toBe(false);
        const chosen = chooseRival(solvable(), of, entry, rival);
        const found = entryOf(catalogueOf(chosen.custom), of)!.entry;
        expect(rivalsOf(of, found)[i].chosen, at).toBe(true);
        expect(checkDesign(chosen).ok, at).toBe(true);
        const own = shownEntry(catalogueOf(chosen.custom), of)!.values.filter((value) => value.own);
        expect(own.map(({ path }) => path).sort(), at).toEqual(rival.values.map(({ path }) => path).sort());
        for (const value of own) {
          expect(value.work, at).toContain(rival.work);
          expect(value.presetText, at).not.toBe(null);
        }
        const back = rival.values.reduce((design, { path }) => resetCustomValue(design, of, entry, path), chosen);
        expect(back, at).toEqual(solvable());
      }
    }
  });

  it('is flagged on the review sheet as entered by the person, with its work', () => {
    const key = { list: 'materials', id: 'GaAs' } as const;
    const rival = rivalsOf(key, presetOf(key)!).find(({ path }) => path === 'electronMass')!;
    const design = chooseRival(solvable(), key, presetOf(key)!, rival);
    const row = parametersInUse(design, result(design)).find(({ of, own }) => of === 'GaAs' && own)!;
    expect(row.work).toMatch(/^own value: Ioffe Institute/);
    expect(row.values).toEqual([{ path: 'electronMass', text: '0.063' }]);
  });
});

describe('a formula in the place of a published law', () => {
  const key = { list: 'materials', id: 'GaAs' } as const;
  it('shows the law that it stands for, keeps no source of it, and goes back whole', () => {
    const design = setCustomValue(solvable(), key, presetOf(key)!, 'gap.formula', '1.42 eV', 'here');
    const shown = shownEntry(catalogueOf(design.custom), key)!;
    expect(shown.values.find(({ path }) => path === 'gap.formula')).toMatchObject({ text: '1.42 eV', own: true, presetText: 'gap at 0 K 1.519 eV, Varshni α 0.0005405 eV/K, Varshni β 204 K' });
    expect(shown.values.some(({ path }) => path === 'gap.zeroK')).toBe(false);
    expect(shown.formulas.some(({ path }) => path === 'gap.formula')).toBe(false);
    expect(resetCustomValue(design, key, presetOf(key)!, 'gap.formula')).toEqual(solvable());
  });

  it('is refused on the page with the temperature at which it fails', () => {
    const wide: Design = { ...solvable(), conditions: { ...solvable().conditions, temperatureRange: ['200 K', '400 K'] } };
    expect(valueComplaint(wide, key, presetOf(key)!, 'gap.formula', '1.8 eV - 5e-3 eV/K * T', false)).toMatch(/at 3\d\d(\.\d+)? K/);
    expect(valueComplaint(wide, key, presetOf(key)!, 'affinity.formula', '4 eV', false)).toContain('cannot be a formula');
  });
});

describe('an own band offset of a pair', () => {
  it('wins over the published one, also for an own material and where it stands the other way round', () => {
    const published = result(polar()).junctions[0];
    expect(published).toMatchObject({ alignment: 'published' });
    expect(published.delta_ev_eV).toBeCloseTo(0.8, 9);
    const [rival] = rivalOffsets('AlN', 'GaN');
    const own = setPairOffset(polar(), offsetOf(rival));
    const row = result(own).junctions[0];
    expect(row).toMatchObject({ alignment: 'own' });
    expect(row.delta_ev_eV).toBeCloseTo(1.36, 9);
    const sheet = parametersInUse(own, result(own)).find(({ of }) => of === 'GaN / AlN')!;
    expect(sheet).toMatchObject({ own: true, work: expect.stringContaining('Waldrop') });
    // The same pair once more takes its place; the design is as before when it goes.
    const again = setPairOffset(own, { first: 'AlN', second: 'GaN', deltaEv: { constant: '0.9 eV' }, source: 'XPS here' });
    expect(again.custom!.offsets).toHaveLength(1);
    expect(result(again).junctions[0].delta_ev_eV).toBeCloseTo(0.9, 9);
    expect(removePairOffset(again, 'GaN', 'AlN')).toEqual(polar());
  });

  it('leaves an offset that the interface itself states, and counts although affinities were asked for', () => {
    const own = setPairOffset(polar(), { first: 'AlN', second: 'GaN', deltaEv: { constant: '0.9 eV' }, source: 'XPS here' });
    expect(result({ ...own, interfaces: [{ above: 'a', dEv: '0.7 eV' }] }).junctions[0].delta_ev_eV).toBeCloseTo(0.7, 9);
    expect(result({ ...own, assumptions: { alignment: 'affinity' } }).junctions[0].delta_ev_eV).toBeCloseTo(0.9, 9);
  });

  it('is refused without a source, of no pair, with both edges or none, and twice', () => {
    const complaint = (...offsets: object[]): string[] => {
      const reading = toStack({ ...polar(), custom: { offsets: offsets as never } });
      return reading.ok ? [] : reading.complaints.map(({ path, message }) => `${path}: ${message}`);
    };
    expect(complaint({ first: 'AlN', second: 'GaN', deltaEv: { constant: '0.9 eV' }, source: ' ' })[0]).toMatch(/^custom\.offsets\[0\]\.source: is empty/);
    expect(complaint({ first: 'AlN', second: 'GaM', deltaEv: { constant: '0.9 eV' }, source: 's' })[0]).toContain('did you mean GaN?');
    expect(complaint({ first: 'AlN', second: 'AlN', deltaEv: { constant: '0.9 eV' }, source: 's' })[0]).toContain('same material');
    expect(complaint({ first: 'AlN', second: 'GaN', source: 's' })[0]).toContain('needs one of');
    expect(complaint({ first: 'AlN', second: 'GaN', deltaEv: {}, source: 's' })[0]).toContain('is empty');
    expect(complaint({ first: 'AlN', second: 'GaN', deltaEv: { constant: '9 nm' }, source: 's' })[0]).toContain('not an energy');
    const row = { first: 'AlN', second: 'GaN', deltaEv: { constant: '0.9 eV' }, source: 's' };
    expect(complaint(row, { ...row, first: 'GaN', second: 'AlN' })[0]).toContain('twice');
  });
});

describe('an own barrier of a metal on a material', () => {
  it('is added to the metal with its source, and takes the place of one of the same pair and carrier', () => {
    const key = { list: 'metals', id: 'Ti' } as const;
    const base = presetOf(key) as import('../../src/design/types.ts').MetalInput;
    const once = addBarrier(solvable(), key, base, { material: 'InP', carrier: 'n', height: '0.42 eV', source: 'IV here' });
    expect(once.custom!.metals![0].barriers!.filter(({ material }) => material === 'InP')).toEqual([{ material: 'InP', carrier: 'n', height: '0.42 eV', source: 'IV here' }]);
    const twice = addBarrier(once, key, once.custom!.metals![0], { material: 'InP', carrier: 'n', height: '0.44 eV', source: 'CV here' });
    expect(twice.custom!.metals![0].barriers).toHaveLength(base.barriers!.length + 1);
    expect(twice.custom!.metals).toHaveLength(1);
  });
});

describe('a custom entry without a source', () => {
  it('is refused with its place and the mend', () => {
    for (const source of ['', '  ', undefined, { source: '' }]) {
      const reading = toStack({ ...polar(), custom: { metals: [{ id: 'M', workFunction: '4 eV', source }] } });
      expect(reading.ok ? [] : reading.complaints).toEqual([{ path: 'custom.metals[0].source', message: expect.stringContaining('say where the values stand') }]);
    }
  });
});
