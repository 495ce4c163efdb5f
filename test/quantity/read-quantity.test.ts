import { describe, expect, it } from 'vitest';
import { evaluate } from '../../src/quantity/expression.ts';
import type { KindName } from '../../src/quantity/kinds.ts';
import { KINDS } from '../../src/quantity/kinds.ts';
import { readQuantity } from '../../src/quantity/read-quantity.ts';
import { unitNamed, UNIT_NAMES } from '../../src/quantity/units.ts';

const value = (text: unknown, kind: KindName, names: Record<string, string> = {}): number => {
  const r = readQuantity(text, kind, scopeOf(names));
  if (!r.ok) throw new Error(r.message);
  return r.value;
};
const message = (text: unknown, kind: KindName, names: Record<string, string> = {}): string => {
  const r = readQuantity(text, kind, scopeOf(names));
  return r.ok ? `read as ${r.value}` : r.message;
};
const scopeOf = (names: Record<string, string>) => ({ names: Object.keys(names), value: (n: string) => (Object.hasOwn(names, n) ? evaluate(names[n], { names: [], value: () => undefined }) : undefined) });

describe('reading a quantity', () => {
  it('reads what engineers type, in the solver\'s units', () => {
    // [text, kind, value]; exact but for one rounding
    const cases: [string, KindName, number][] = [
      ['200 nm', 'length', 2e-5], ['0.35um', 'length', 3.5e-5], ['1 µm', 'length', 1e-4], ['1 μm', 'length', 1e-4], ['20 Å', 'length', 2e-7], ['500 um', 'length', 0.05],
      ['5e17 cm^-3', 'density', 5e17], ['5e17 cm-3', 'density', 5e17], ['5e17 cm⁻³', 'density', 5e17], ['5e17/cm^3', 'density', 5e17], ['1e24 m^-3', 'density', 1e18],
      ['1.2 eV', 'energy', 1.2], ['45.5 meV', 'energy', 0.0455], ['77 K', 'temperature', 77], ['-40 degC', 'temperature', 233.15], ['25 °C', 'temperature', 298.15], ['25C', 'temperature', 298.15],
      ['112 A/(cm^2 K^2)', 'richardson', 112], ['1300 cm^2/(V s)', 'mobility', 1300], ['1300 cm2/(V s)', 'mobility', 1300], ['-0.034 C/m^2', 'chargeDensity', -3.4e-6], ['1e-6 ohm cm²', 'contactResistivity', 1e-6],
      ['1 Ω mm²', 'contactResistivity', 0.01], ['3e5 V/cm', 'field', 3e5], ['4.73e-4 eV/K', 'energyPerKelvin', 4.73e-4], ['0.5 eV^-1', 'perEnergy', 0.5], ['10 %', 'number', 0.1], ['0.3', 'number', 0.3], ['−5e12 cm^-2', 'sheetDensity', -5e12], ['-0.034 C/m^2', 'sheetDensity', -0.034 * 1e-4 / 1.602176634e-19],
      ['106 GPa', 'stiffness', 106], ['3.1e-8 eV cm', 'energyLength', 3.1e-8],
    ];
    for (const [text, kind, expected] of cases) expect(Math.abs(value(text, kind) / expected - 1), `${text} is ${value(text, kind)}`).toBeLessThan(1e-15);
  });

  it('reads the nearest double, not one rounding beside it', () => {
    expect(value('0.36 eV', 'energy')).toBe(0.36);
    expect(value('45.5 meV', 'energy')).toBe(0.0455);
    expect(value('200 nm', 'length')).toBe(2e-5);
    expect(value('0.35um', 'length')).toBe(3.5e-5);
    expect(value('1e24 m^-3', 'density')).toBe(1e18);
    expect(value('2.5e-1 eV', 'energy')).toBe(0.25);
  });

  it('calculates with variables and units', () => {
    const names = { Ncap: '1e19 cm^-3', tcap: '40 nm' };
    expect(value('2*Ncap', 'density', names)).toBe(2e19);
    expect(value('tcap + 10 nm', 'length', names)).toBeCloseTo(5e-6, 20);
    expect(value('tcap/4', 'length', names)).toBeCloseTo(1e-6, 20);
    expect(value('min(tcap, 1 um)', 'length', names)).toBeCloseTo(4e-6, 20);
    expect(value('max(10 meV, 20 meV)', 'energy')).toBeCloseTo(0.02, 16);
    expect(value('Ncap*exp(-tcap/(20 nm))', 'density', names)).toBeCloseTo(1e19 * Math.exp(-2), -4);
    expect(value('sqrt(4)*1 nm', 'length')).toBeCloseTo(2e-7, 20);
  });

  it('refuses a bare number and says which unit would fit', () => {
    expect(message(200, 'length')).toBe('200 has no unit; a length is wanted here, as text, such as "200 nm"');
    expect(message('200', 'length')).toContain('has no unit; a length is wanted here');
  });

  it('offers the unit that was meant', () => {
    expect(message('200 mn', 'length')).toBe("'200 mn' is no length; did you mean nm?");
    expect(message('5e17 cm^-2', 'density')).toContain("is a sheet density, not a concentration");
    expect(message('5 eV', 'length')).toContain('is an energy, not a length');
    expect(message('2*Ncpa', 'density', { Ncap: '1e19 cm^-3' })).toContain('did you mean Ncap?');
  });

  it('asks for the unit of a sheet charge that is a bare number, and names both that fit', () => {
    expect(message('-0.23', 'sheetDensity')).toBe("'-0.23' has no unit; a sheet density is wanted here, such as \"1e12 cm^-2\" or \"-0.034 C/m^2\"");
  });

  it('runs nothing that is not arithmetic', () => {
    for (const hostile of ['import("x")', 'a=1', 'f(x)=x', '[1,2,3]', '1:1e8', 'constructor', 'constructor("x")()', '__proto__', 'cos.constructor("return 1")()', '"text"', '{a:1}', 'x.y', 'eval("1")', 'parse("1")', '5 to cm', 'true', 'i', 'e', 'random()', '1;2', '2!', '3 % 2', 'createUnit("a")', '`x`', '1 == 1 ? 2 : 3', 'toString', 'hasOwnProperty(1)']) {
      const answer = readQuantity(hostile, 'number');
      expect(answer.ok, `${hostile} ${JSON.stringify(answer)}`).toBe(false);
    }
  });

  it('comes to an end on hostile text, where a hang would run into the limit of every test', () => {
    for (const hostile of ['9^9^9^9', '('.repeat(400), '1' + '+1'.repeat(240), '-'.repeat(490) + '1', '2^'.repeat(200) + '2', 'x'.repeat(5e6), '1e999', '1/0', 'sqrt(-1)', 'log(0)']) expect(readQuantity(hostile, 'number').ok, hostile.slice(0, 40)).toBe(false);
  });

  it('does not read an hour, a bit or a kilotesla into a design', () => {
    for (const trap of ['1 h', '1 b', '1 kT', '8.617e-5 eV/K * 25 degC', '1 e', '1 T', '1 min']) expect(readQuantity(trap, 'energy').ok, trap).toBe(false);
  });

  it('refuses what is neither text nor number', () => {
    for (const thing of [null, true, {}, [], undefined]) expect(readQuantity(thing, 'length').ok).toBe(false);
    expect(readQuantity(Infinity, 'number').ok).toBe(false);
    expect(readQuantity(Number.NaN, 'number').ok).toBe(false);
  });

  it('knows every unit that it offers, and every example is read back', () => {
    for (const name of UNIT_NAMES) expect(unitNamed(name), name).toBeDefined();
    for (const [kind, { example }] of Object.entries(KINDS)) for (const text of example.split(' or ')) expect(readQuantity(text, kind as KindName).ok, text).toBe(true);
  });

  it('has an electron volt of today', () => {
    // e = 1.602176634e-19 C exactly (SI 2019)
    expect(unitNamed('eV')?.toNumber('J')).toBe(1.602176634e-19);
  });
});
