import { describe, expect, it } from 'vitest';
import { drawn, evaluate, knownsOf } from '../../src/workings/expression.ts';
import { formula } from '../../src/workings/formula.ts';
import { known, WORKED } from '../../src/workings/known.ts';
import { mathText, signOf, type MathNode } from '../../src/workings/math.ts';
import { equation, isClosed, printed, readPrinted, shown, step } from '../../src/workings/step.ts';

const a = known('a', 'first', 6, '', WORKED);
const b = known('b', 'second', 2, '', WORKED);
const d = known('E_c−E_F', 'a difference that counts as one', 0.5, 'eV', WORKED);

describe('a formula', () => {
  it('is worked out in the usual order', () => {
    expect(evaluate(formula`${a} - ${b} * 3 ^ 2 / (1 + ${b})`)).toBe(0);
    expect(evaluate(formula`-${a} / ${b} * ${b}`)).toBe(-6);
    expect(evaluate(formula`2 ^ ${b} ^ 3`)).toBe(256);
    expect(evaluate(formula`max(${a}, ${b}) - sqrt(16) + abs(-${b})`)).toBe(4);
  });

  it('is drawn with the brackets that its order needs, and no others', () => {
    const text = (e: ReturnType<typeof formula>): string => mathText(drawn(e)).replaceAll('\u2061', '');
    expect(text(formula`${a} * (${a} - ${b})`)).toBe('a (a − b)');
    expect(text(formula`(${a} + ${b}) / (1 + ${a})`)).toBe('(a + b)/(1 + a)');
    expect(text(formula`${a} - (${b} - 1)`)).toBe('a − (b − 1)');
    expect(text(formula`${b} * ${d}`)).toBe('b (Ec − EF)');
    expect(text(formula`exp(-${d} / ${a})`)).toBe('exp(−(Ec − EF)/a)');
    expect(text(formula`(${a} / ${b}) ^ 2`)).toBe('(a/b)^2');
  });

  it('stands inside another as one part', () => {
    const inner = formula`${a} - ${b}`;
    expect(evaluate(formula`${inner} * 2`)).toBe(8);
    expect(evaluate(formula`${a} / ${inner}`)).toBe(1.5);
  });

  it('names each of its quantities once, as they appear', () => {
    expect(knownsOf(formula`${b} + ${a} * ${b}`)).toEqual([b, a]);
  });

  it('that cannot be read is a mistake of ours and says so', () => {
    expect(() => formula`${a} +`).toThrow('too early');
    expect(() => formula`(${a}`).toThrow('bracket');
    expect(() => formula`${a} ${b}`).toThrow('left over');
    expect(() => formula`cosine(${a})`).toThrow('cosine');
  });
});

describe('signs', () => {
  const tags = (node: MathNode): string => ('text' in node ? node.tag : `${node.tag}(${node.children.map(tags).join(' ')})`);

  it('have their index and their power', () => {
    expect(tags(signOf('E_g'))).toBe('msub(mi mi)');
    expect(tags(signOf('N_D^+'))).toBe('msubsup(mi mi mo)');
    expect(tags(signOf('N_A^−'))).toBe('msubsup(mi mi mo)');
    expect(mathText(signOf('(E_c−E_F)_above'))).toBe('(Ec − EF)above');
  });
});

describe('printed numbers', () => {
  it('read back to what was printed', () => {
    for (const value of [0, 1, -0.00123456, 2.5e19, 6.62607015e-34, -1e-7, 123456.7, Infinity]) expect(readPrinted(printed(value, 6))).toBe(value === Infinity ? value : Number(value.toPrecision(6)));
  });

  it('are as many as working the result out again takes, and no fewer than four', () => {
    const eV = (sign: string, value: number) => known(sign, sign, value, 'eV', WORKED);
    const [top, kT] = [eV('E', 0.112345678), eV('kT', 0.000344693)];
    const s = step(known('w', 'a cold exponential', Math.exp(-top.value / kT.value), '', WORKED), formula`exp(-${top} / ${kT})`);
    const page = shown(s);
    expect(page.symbols[0].value.length).toBeGreaterThan('0.112345'.length);
    const values = new Map([[top, page.symbols[0].value], [kT, page.symbols[1].value]]);
    expect(isClosed(s as Exclude<typeof s, { kind: 'law' }>, values)).toBe(true);
    const rough = new Map([[top, '0.1123'], [kT, '3.447e−4']]);
    expect(isClosed(s as Exclude<typeof s, { kind: 'law' }>, rough)).toBe(false);
  });

  it('do not hide an equation that does not hold', () => {
    const wrong = equation(a, formula`${a}`, formula`${b}`) as Exclude<ReturnType<typeof equation>, { kind: 'law' }>;
    expect(isClosed(wrong, new Map([[a, '6'], [b, '2']]))).toBe(false);
  });
});
