import { describe, expect, it } from 'vitest';
import { formulaAt } from '../../solver/formula.ts';
import { NO_NAMES, type Scope } from '../../src/quantity/expression.ts';
import { readFormula, type Over } from '../../src/quantity/read-formula.ts';
import { readQuantity } from '../../src/quantity/read-quantity.ts';
import type { KindName } from '../../src/quantity/kinds.ts';

const both: Over[] = ['T', 'x'];
const at = (text: string, T: number, x: number, kind: KindName = 'energy', scope: Scope = NO_NAMES): number => {
  const reading = readFormula(text, kind, both, scope);
  if (!reading.ok) throw new Error(reading.message);
  return formulaAt(reading.formula, T, x);
};
const refused = (text: string, kind: KindName = 'energy', over: Over[] = both): string => {
  const reading = readFormula(text, kind, over, NO_NAMES);
  expect(reading.ok, text).toBe(false);
  return reading.ok ? '' : reading.message;
};

describe('a formula over T and x', () => {
  it('gives the law that it states, in the solver’s unit, at every temperature', () => {
    for (const T of [4, 77, 300, 650]) expect(at('1519 meV - 0.5405 meV/K * T^2 / (T + 204 K)', T, 0)).toBeCloseTo(1.519 - (5.405e-4 * T * T) / (T + 204), 12);
    for (const x of [0, 0.3, 1]) expect(at('1.424 eV + 1.247 eV * x', 300, x)).toBeCloseTo(1.424 + 1.247 * x, 12);
    expect(at('min(0.1, 0.2 - x) + abs(-x) + sqrt(x^2) + log10(10^x) + exp(log(x)) - (-x)', 300, 0.25, 'number')).toBeCloseTo(-0.05 + 5 * 0.25, 12);
  });

  it('takes the same texts as a quantity, to the same number', () => {
    for (const text of ['1.2 eV', '45 meV', '-(0.3 eV) + 2 * 10 meV', '3e-19 C V / 2', '2 eV nm / (4 nm)']) {
      const reading = readFormula(text, 'energy', both, NO_NAMES);
      const quantity = readQuantity(text, 'energy');
      if (!reading.ok || !quantity.ok) throw new Error(text);
      expect(reading.over.size).toBe(0);
      expect(formulaAt(reading.formula, 300, 0)).toBeCloseTo(quantity.value, 13);
    }
    expect(at('45 meV', 300, 0)).toBeCloseTo(0.045, 15);
    expect(at('30 %', 300, 0, 'number')).toBeCloseTo(0.3, 15);
  });

  it('uses the design’s variables, and says which of T and x it moves with', () => {
    const scope: Scope = { value: (name) => (name === 'bow' ? 0.7 : name === 'T' ? 99 : undefined), names: ['bow', 'T'] };
    expect(at('1 eV - bow * x * (1 - x) * 1 eV', 300, 0.5, 'energy', scope)).toBeCloseTo(0.825, 12);
    // A variable of the name T does not hide the temperature.
    expect(at('T / (300 K)', 150, 0, 'number', scope)).toBeCloseTo(0.5, 15);
    const reading = readFormula('x * 1 eV', 'energy', both, scope);
    expect(reading.ok && [...reading.over]).toEqual(['x']);
  });

  it('refuses another dimension, a unit left out, and a name that is not known, with a sentence', () => {
    expect(refused('1.5 eV - T')).toContain('different kinds');
    expect(refused('1.5 eV - 0.5 * T^2/(T + 204)')).toContain('different kinds');
    expect(refused('1.5 * x')).toContain('has no unit');
    expect(refused('20 nm * x')).toContain('is a length, not an energy');
    expect(refused('1 eV * y')).toContain('neither a unit nor a variable');
    expect(refused('1 eV * x', 'energy', ['T'])).toContain('neither a unit nor a variable');
    expect(refused('')).toContain('is empty');
  });

  it('runs nothing that a hostile text brings', () => {
    const hostile = [
      'constructor', '__proto__', 'T.constructor', 'x.constructor("return 1")()', 'f(T) = T', 'T = 5', 'import("fs")', 'x[1]', '{a: 1}', '"1"', '[1, 2] * T', 'T; x', 'T ? 1 : 2', 'eval("1")', 'x!', "x'", 'T to K', 'parse("1")', 'unit("1 eV")',
      'range(1, 1e9)', '9^9^9^9', 'x^1e9', '('.repeat(300) + 'x' + ')'.repeat(300), 'x+'.repeat(400) + 'x', `1${'0'.repeat(600)}`, 'valueOf', 'toString()', 'x.toString', 'hasOwnProperty(x)', 'x and T', 'x > 1', 'i', 'Infinity', 'NaN', 'sqrt(x, x)', 'sqrt()', 'min()',
    ];
    for (const text of hostile) expect(refused(text, 'number').length, text).toBeGreaterThan(5);
  });

  it('is told apart from a text that fails at one temperature only', () => {
    const reading = readFormula('1 eV * 300 K / (T - 300 K)', 'energy', both, NO_NAMES);
    if (!reading.ok) throw new Error(reading.message);
    expect(formulaAt(reading.formula, 300, 0)).toBe(Number.POSITIVE_INFINITY);
    expect(formulaAt(reading.formula, 600, 0)).toBeCloseTo(1, 12);
  });
});
