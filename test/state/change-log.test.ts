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
});
