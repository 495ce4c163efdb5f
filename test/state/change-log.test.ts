import { describe, expect, it } from 'vitest';
import type { Design } from '../../src/design/types.ts';
import { changeLog } from '../../src/state/change-log.ts';
import * as commands from '../../src/state/commands/index.ts';
import { designFixture } from './design-fixture.ts';

const log = (change: (design: Design) => Design): string[] => changeLog(designFixture(), change(designFixture()));
const edited = (change: (design: Design) => void) => (design: Design): Design => {
  const copy = structuredClone(design);
  change(copy);
  return copy;
};

describe('the change log between two designs', () => {
  it('has nothing to say of equal ones', () => {
    expect(log((design) => structuredClone(design))).toEqual([]);
  });

  it('tells each value of a layer with what it was', () => {
    expect(log((design) => commands.setThickness(design, 0, '55 nm'))).toEqual(['Thickness of cap: 55 nm, was 40 nm.']);
    expect(log(edited((d) => { d.layers[1].x = '0.25'; d.layers[0].dopants![0].concentration = '3e18 cm^-3'; }))).toEqual(['Concentration of Si in cap: 3e18 cm^-3, was 2*Ncap.', 'Composition x of spacer: 0.25, was 0.3.']);
    expect(log(edited((d) => { d.layers[0].dopants![0].activation = 0.5; d.layers[0].dopants![0].dopant = 'Te'; }))).toEqual(['Dopant of cap: Te, was Si.', 'Activation of Te in cap: 0.5, was not given.']);
  });

  it('tells layers that came, went, were renamed or moved', () => {
    expect(log((design) => commands.removeLayer(design, 1))).toContain('Layer spacer was taken out.');
    expect(log((design) => commands.renameLayer(design, 1, 'barrier')).filter((line) => line.startsWith('Layer'))).toEqual(['Layer spacer is called barrier now.']);
    const added = log(edited((d) => { d.layers.splice(1, 0, { name: 'stop', material: 'GaAs', thickness: '5 nm' }); }));
    expect(added).toEqual(['Layer stop was put in below cap: GaAs, 5 nm, undoped.']);
    expect(log((design) => commands.moveLayer(design, 0, 2))).toContain('The layers stand in another order: spacer, buffer, cap.');
  });

  it('tells graded values, dopants put in and taken out, contacts, variables and conditions', () => {
    const lines = log(edited((d) => {
      d.layers[2].dopants = [];
      d.layers[0].thickness = '40 nm';
      d.layers[1].x = { from: '0.1', to: '0.3', shape: 'linear' };
      d.layers[1].dopants = [{ dopant: 'Si', concentration: { peak: '1e18 cm^-3', depth: '5 nm', straggle: '2 nm', shape: 'gaussian' } }];
      d.top = { kind: 'barrier', barrier: '0.7 eV' };
      d.variables = [...(d.variables ?? []), { name: 'new', value: '3 nm' }];
      d.conditions.temperature = '77 K';
      d.notes = 'cold';
    }));
    expect(lines).toEqual(expect.arrayContaining([
      'Dopant C of buffer was taken out.', 'Composition x of spacer: 0.1 to 0.3 (linear), was 0.3.', 'Dopant Si of spacer was put in: 1e18 cm^-3 peak at 5 nm.', 'The variable new was put in: 3 nm.', 'Temperature: 77 K, was 300 K.',
    ]));
    expect(lines.some((line) => /of the top contact: /.test(line))).toBe(true);
    expect(lines.some((line) => line.startsWith('Notes: cold'))).toBe(true);
  });

  it('tells requirements and changes of a variable', () => {
    const lines = log(edited((d) => {
      d.requirements = [{ quantity: 'sheetResistance', of: 'cap', max: '250 ohm', over: 'temperatureRange' }];
      d.variables![0] = { ...d.variables![0], value: '9e18 cm^-3', tolerance: '7 %' };
    }));
    expect(lines).toContain('The requirement "sheetResistance of cap at most 250 ohm over the temperature range" was put in.');
    expect(lines.filter((line) => line.startsWith('The variable'))).toEqual([expect.stringMatching(/: 9e18 cm\^-3, was /), expect.stringMatching(/has another tolerance/)]);
  });

  it('tells which interface was given what, also where the layer above it was renamed', () => {
    const given = edited((d) => { d.interfaces = [{ above: 'cap', sheetCharge: '3e12 cm^-2' }]; });
    const before = given(designFixture());
    expect(changeLog(edited((d) => { delete d.interfaces; })(before), before)).toEqual(['Sheet charge at the interface below cap: 3e12 cm^-2, was not given.']);
    const other = edited((d) => { d.interfaces = [{ above: 'cap', sheetCharge: '4e12 cm^-2' }, { above: 'spacer', dEc: '0.2 eV' }]; })(before);
    expect(changeLog(before, other)).toEqual(['Sheet charge at the interface below cap: 4e12 cm^-2, was 3e12 cm^-2.', 'Offset of the conduction band at the interface below spacer: 0.2 eV, was not given.']);
    expect(changeLog(before, commands.renameLayer(before, 0, 'lid')).some((line) => line.includes('interface'))).toBe(false);
    expect(changeLog(other, before)).toContain('Offset of the conduction band at the interface below spacer: no longer given, was 0.2 eV.');
  });

  it('tells which own entry came, went, or has another value', () => {
    const given = edited((d) => {
      d.custom = {
        materials: [{ id: 'mine', gap: { zeroK: '1.5 eV', alpha: '5e-4 eV/K', beta: '200 K' }, source: 'own' }], dopants: [{ id: 'Si', host: 'mine', kind: 'donor', depth: '6 meV', source: 'own' }],
        metals: [{ id: 'alloy', workFunction: '4.5 eV', source: 'own' }], offsets: [{ first: 'mine', second: 'GaAs', deltaEv: { constant: '0.1 eV' }, source: 'own' }],
      };
    });
    expect(log(given)).toEqual(['The own material mine was put in.', 'The own dopant Si in mine was put in.', 'The own metal alloy was put in.', 'The own band offset mine to GaAs was put in.']);
    const before = given(designFixture());
    const after = edited((d) => {
      d.custom!.materials![0].gap = { zeroK: '1.6 eV', alpha: '5e-4 eV/K', beta: '200 K' };
      d.custom!.dopants = [];
      d.custom!.metals!.push({ id: 'second', workFunction: '5 eV', source: 'own' });
      d.custom!.metals![0].barriers = [{ material: 'GaAs', carrier: 'n', height: '0.8 eV', source: 'own' }];
      d.custom!.offsets![0].deltaEv = { constant: '0.2 eV' };
    })(before);
    expect(changeLog(before, after)).toEqual([
      'Gap.zeroK of the own material mine: 1.6 eV, was 1.5 eV.', 'The own dopant Si in mine was taken out.', 'Barriers of the own metal alloy: 1 in the list, was not given.', 'The own metal second was put in.',
      'DeltaEv.constant of the own band offset mine to GaAs: 0.2 eV, was 0.1 eV.',
    ]);
    expect(changeLog(before, after).join(' ')).not.toMatch(/[{}[\]]/);
  });

  it('writes a range that was not there in words', () => {
    const none = edited((d) => { delete d.conditions.temperatureRange; })(designFixture());
    const ranged = edited((d) => { d.conditions.temperatureRange = ['-40 degC', '85 degC']; })(none);
    expect(changeLog(none, ranged)).toEqual(['Temperature range: -40 degC to 85 degC, was not given.']);
  });
});
