import { describe, expect, it } from 'vitest';
import * as commands from '../../src/state/commands/index.ts';
import { designFixture } from './design-fixture.ts';

const design = designFixture();
const whole = JSON.stringify(design);

describe('the commands of a design', () => {
  it('leave the design they were given as it was', () => {
    commands.setThickness(design, 0, '80 nm');
    commands.removeLayer(design, 1);
    commands.moveLayer(design, 0, 2);
    commands.renameVariable(design, 0, 'N');
    expect(JSON.stringify(design)).toBe(whole);
  });

  it('share every part that did not change', () => {
    const next = commands.setThickness(design, 0, '80 nm');
    expect(next.layers[0].thickness).toBe('80 nm');
    expect(next.layers[1]).toBe(design.layers[1]);
    expect(next.conditions).toBe(design.conditions);
  });

  it('give the same design back where nothing changes', () => {
    expect(commands.setThickness(design, 0, '40 nm')).toBe(design);
    expect(commands.moveLayer(design, 1, 1)).toBe(design);
    expect(commands.renameLayer(design, 0, 'cap')).toBe(design);
  });

  it('write a concentration into the row that is meant, constant or graded', () => {
    expect(commands.setConcentration(design, 2, 0, '3e15 cm^-3').layers[2].dopants).toEqual([{ dopant: 'C', concentration: '3e15 cm^-3' }]);
    const graded = { from: '1e17 cm^-3', to: '1e19 cm^-3', shape: 'linear' } as const;
    expect(commands.setConcentration(design, 0, 0, graded).layers[0].dopants?.[0].concentration).toEqual(graded);
  });

  it('keep a dopant row either named or given outright', () => {
    const outright = commands.setDopant(design, 0, 0, { kind: 'donor', depth: '45 meV' });
    expect(outright.layers[0].dopants?.[0]).toEqual({ kind: 'donor', depth: '45 meV', concentration: '2*Ncap' });
    const named = commands.setDopant(outright, 0, 0, { dopant: 'Te' });
    expect(named.layers[0].dopants?.[0]).toEqual({ dopant: 'Te', concentration: '2*Ncap' });
  });

  it('take a key of a dopant row out when it is given as undefined', () => {
    const modelled = commands.setDopant(design, 0, 0, { model: 'dilute' });
    expect(modelled.layers[0].dopants?.[0].model).toBe('dilute');
    expect(commands.setDopant(modelled, 0, 0, { model: undefined }).layers[0].dopants?.[0]).toEqual(design.layers[0].dopants?.[0]);
  });

  it('add and take out dopant rows, also in a layer without a list', () => {
    const bare = commands.setMaterial(design, 0, 'GaAs');
    const { dopants: _, ...rest } = bare.layers[0];
    const without = { ...bare, layers: [rest, ...bare.layers.slice(1)] };
    const added = commands.addDopant(without, 0, { dopant: 'Si', concentration: '1e18 cm^-3' });
    expect(added.layers[0].dopants).toHaveLength(1);
    expect(commands.removeDopant(added, 0, 0).layers[0].dopants).toEqual([]);
  });

  it('keep the dopants when the material changes, unless others come with it', () => {
    expect(commands.setMaterial(design, 0, 'Si').layers[0].dopants).toEqual(design.layers[0].dopants);
    const with_ = commands.setMaterial(design, 1, 'Si', { x: null, dopants: [{ dopant: 'P', concentration: '1e17 cm^-3' }] });
    expect(with_.layers[1]).toEqual({ name: 'spacer', material: 'Si', thickness: '20 nm', dopants: [{ dopant: 'P', concentration: '1e17 cm^-3' }] });
  });

  it('set and take out a composition', () => {
    expect(commands.setComposition(design, 1, '0.4').layers[1].x).toBe('0.4');
    expect('x' in commands.setComposition(design, 1, undefined).layers[1]).toBe(false);
  });

  it('give an inserted layer a name of its own', () => {
    const next = commands.insertLayer(design, 3, { name: 'cap', material: 'Si', thickness: '1 um' });
    expect(next.layers.map((layer) => layer.name)).toEqual(['cap', 'spacer', 'buffer', 'cap 2']);
    expect(commands.insertLayer(next, 0, { name: 'cap 2', material: 'Si', thickness: '1 um' }).layers[0].name).toBe('cap 3');
  });

  it('take out an exception at an interface when its two layers no longer meet', () => {
    const parted = commands.insertLayer(design, 1, { name: 'new', material: 'GaAs', thickness: '5 nm' });
    expect(parted.interfaces).toEqual([{ above: 'spacer', dEc: '-0.23 eV' }]);
    expect(commands.moveLayer(design, 0, 2).interfaces).toEqual([{ above: 'spacer', dEc: '-0.23 eV' }]);
    expect(commands.removeLayer(design, 2).interfaces).toEqual([{ above: 'cap', sheetCharge: '1e11 cm^-2' }]);
  });

  it('take a layer out with its requirements but never the requirements of a contact', () => {
    const next = commands.removeLayer(design, 1);
    expect(next.layers.map((layer) => layer.name)).toEqual(['cap', 'buffer']);
    expect(next.interfaces).toEqual([]);
    expect(next.requirements).toEqual([{ quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2' }]);
  });

  it('leave the last layer of a stack in its place', () => {
    const single = { ...design, layers: [design.layers[0]] };
    expect(commands.removeLayer(single, 0)).toBe(single);
  });

  it('follow a renamed layer through interfaces and requirements', () => {
    const next = commands.renameLayer(design, 1, 'barrier');
    expect(next.interfaces?.[1].above).toBe('barrier');
    expect(next.requirements?.[1].of).toBe('barrier');
    expect(next.requirements?.[0].of).toBe('top');
  });

  it('set contacts, temperature, range, bias, title and notes', () => {
    expect(commands.setContact(design, 'bottom', { kind: 'pinned', level: '0.7 eV' }).bottom).toEqual({ kind: 'pinned', level: '0.7 eV' });
    expect(commands.setTemperature(design, '77 K').conditions.temperature).toBe('77 K');
    expect(commands.setTemperatureRange(design, ['0 degC', '85 degC']).conditions.temperatureRange).toEqual(['0 degC', '85 degC']);
    expect('temperatureRange' in commands.setTemperatureRange(design, undefined).conditions).toBe(false);
    expect(commands.setBias(design, '0 V').conditions.bias).toBe('0 V');
    expect('bias' in commands.setBias(commands.setBias(design, '0 V'), undefined).conditions).toBe(false);
    expect(commands.setTitle(design, 'four layers').title).toBe('four layers');
    expect(commands.setNotes(design, 'thin').notes).toBe('thin');
    expect('notes' in commands.setNotes(commands.setNotes(design, 'thin'), '')).toBe(false);
  });

  it('set, add and take out variables', () => {
    expect(commands.setVariable(design, 0, { value: '2e19 cm^-3', tolerance: undefined }).variables).toEqual([{ name: 'Ncap', value: '2e19 cm^-3' }]);
    const added = commands.addVariable(design, { name: 't', value: '10 nm' });
    expect(added.variables).toHaveLength(2);
    expect(commands.removeVariable(added, 0).variables).toEqual([{ name: 't', value: '10 nm' }]);
  });

  it('write a renamed variable into every expression that uses it, and into nothing else', () => {
    const near = commands.addVariable(commands.setTitle(design, 'Ncap study'), { name: 'NcapOld', value: 'Ncap/2 + NcapOld2' });
    const next = commands.renameVariable(near, 0, 'Nc');
    expect(next.variables).toEqual([{ name: 'Nc', value: '1e19 cm^-3', tolerance: '10 %' }, { name: 'NcapOld', value: 'Nc/2 + NcapOld2' }]);
    expect(next.layers[0].dopants?.[0].concentration).toBe('2*Nc');
    expect(next.title).toBe('Ncap study');
  });

  it('set, add and take out requirements', () => {
    const next = commands.setRequirement(design, 0, { max: undefined, min: '1e-7 ohm cm^2', over: 'temperatureRange' });
    expect(next.requirements?.[0]).toEqual({ quantity: 'contactResistivity', of: 'top', min: '1e-7 ohm cm^2', over: 'temperatureRange' });
    expect(commands.addRequirement({ ...design, requirements: undefined }, { quantity: 'builtIn', of: 'cap', min: '1 V' }).requirements).toHaveLength(1);
    expect(commands.removeRequirement(design, 0).requirements).toEqual([design.requirements?.[1]]);
    expect(() => commands.setRequirement(design, 2, {})).toThrow(RangeError);
  });

  it('set an assumption and give it back to its default', () => {
    const next = commands.setAssumption(design, 'narrowing', true);
    expect(next.assumptions).toEqual({ narrowing: true });
    expect(commands.setAssumption(next, 'narrowing', undefined).assumptions).toEqual({});
  });

  it('write an interface row when something is exceptional and take it out when nothing is', () => {
    const bare = { ...design, interfaces: undefined };
    const next = commands.setInterface(bare, 0, { sheetCharge: '1e12 cm^-2' });
    expect(next.interfaces).toEqual([{ above: 'cap', sheetCharge: '1e12 cm^-2' }]);
    expect(commands.setInterface(next, 0, { sheetCharge: undefined }).interfaces).toBeUndefined();
    expect(() => commands.setInterface(design, 2, { dEc: '0.1 eV' })).toThrow(RangeError);
  });

  it('throw for a place that is not there', () => {
    expect(() => commands.setThickness(design, 3, '1 nm')).toThrow(RangeError);
    expect(() => commands.setConcentration(design, 1, 0, '1 cm^-3')).toThrow(RangeError);
    expect(() => commands.removeVariable(design, -1)).toThrow(RangeError);
  });
});
