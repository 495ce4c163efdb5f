import { describe, expect, it } from 'vitest';
import { toStack } from '../../src/design/stack.ts';
import type { Requirement } from '../../src/design/types.ts';
import { contactDesign } from './designs.ts';

function read(requirement: Requirement, change: Parameters<typeof contactDesign>[0] = () => {}): string {
  const reading = toStack({ ...contactDesign(change), requirements: [requirement] });
  return reading.ok ? JSON.stringify(reading.requirements) : reading.complaints.map((c) => `${c.path}: ${c.message}`).join('\n');
}

describe('a requirement', () => {
  it('is read with its limit in the unit of the result', () => {
    const reading = toStack({ ...contactDesign(), requirements: [{ quantity: 'depletionWidth', of: 'top', max: '0.1 um', over: 'temperatureRange' }, { quantity: 'contactResistivity', of: 'top', max: '100 ohm um^2' }, { quantity: 'builtIn', of: 'cap', max: '200 mV' }, { quantity: 'ionisedShare', of: 'base', min: '90 %' }, { quantity: 'carrierDensity', of: 'cap', min: 'Ncap/2' }] });
    if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
    [100, 1e-6, 0.2, 0.9, 2.5e19].forEach((limit, i) => expect((reading.requirements[i].limit as number) / limit).toBeCloseTo(1, 12));
    expect(reading.requirements.map((r) => [r.target.kind, r.target.index, r.bound])).toEqual([['contact', 0, 'max'], ['contact', 0, 'max'], ['junction', 0, 'max'], ['layer', 1, 'min'], ['layer', 0, 'min']]);
    expect(reading.requirements[0].over).toBe('temperatureRange');
    expect(reading.requirements[1].over).toBe('temperature');
  });

  it('of an unknown quantity, or of nothing that is there, is complained of with the nearest name', () => {
    expect(read({ quantity: 'sheetResistence', of: 'cap', max: '1 ohm' })).toBe("requirements[0].quantity: there is no quantity 'sheetResistence'; did you mean sheetResistance?");
    expect(read({ quantity: 'happiness', of: 'cap', max: '1' })).toMatch(/there is no quantity 'happiness'; one of contactResistivity, /);
    expect(read({ quantity: '__proto__', of: 'cap', max: '1' })).toMatch(/there is no quantity/);
    expect(read({ quantity: 'constructor', of: 'cap', max: '1' })).toMatch(/there is no quantity/);
    expect(read({ quantity: 'sheetResistance', of: 'cup', max: '1 ohm' })).toMatch(/\.of: there is nothing called 'cup'; did you mean cap\?/);
    expect(read({ quantity: 'barrier', of: 'tip', max: '1 eV' })).toMatch(/did you mean top\?/);
  });

  it('of the wrong sort of thing says what would do', () => {
    expect(read({ quantity: 'contactResistivity', of: 'cap', max: '1 ohm cm^2' })).toMatch(/'cap' is a layer, which has no contact resistivity; name a contact \("top" or "bottom"\)/);
    expect(read({ quantity: 'sheetResistance', of: 'top', max: '1 ohm' })).toMatch(/'top' is a contact, which has no sheet resistance; name a layer \('cap', 'base'\)/);
    expect(read({ quantity: 'builtIn', of: 'base', max: '1 V' })).toMatch(/'base' is the last layer, with no junction below it; name the layer above a junction \('cap'\)/);
  });

  it('without a limit, or with one of another kind, is complained of', () => {
    expect(read({ quantity: 'sheetResistance', of: 'cap' })).toMatch(/^requirements\[0\]: has no limit/);
    expect(read({ quantity: 'sheetResistance', of: 'cap', max: '1 ohm cm' })).toMatch(/requirements\[0\]\.max: '1 ohm cm' is a resistivity, not a sheet resistance/);
    expect(read({ quantity: 'sheetResistance', of: 'cap', max: '100' })).toMatch(/has no unit/);
    expect(read({ quantity: 'sheetResistance', of: 'cap', max: '0 ohm' })).toMatch(/must be above zero/);
    expect(read({ quantity: 'sheetResistance', of: 'cap', max: true })).toMatch(/is true, but sheetResistance is a figure/);
    expect(read({ quantity: 'barrier', of: 'top', max: '0.3 eV', min: '0.5 eV' })).toMatch(/"max" below its "min"/);
  });

  it('of a flag asks for it or forbids it', () => {
    expect(read({ quantity: 'degenerate', of: 'cap', min: true })).toMatch(/"limit":true/);
    expect(read({ quantity: 'degenerate', of: 'cap', max: false })).toMatch(/"limit":false/);
    expect(read({ quantity: 'degenerate', of: 'cap', max: true })).toMatch(/asks for nothing/);
    expect(read({ quantity: 'degenerate', of: 'cap', min: '3 kT' })).toMatch(/asks for nothing/);
  });

  it('over a temperature range needs one', () => {
    expect(read({ quantity: 'builtIn', of: 'cap', max: '1 V', over: 'temperatureRange' }, (d) => { delete d.conditions.temperatureRange; })).toMatch(/\.over: is "temperatureRange", but conditions has none/);
  });
});
