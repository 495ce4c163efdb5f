import { describe, expect, it } from 'vitest';
import { choiceOptions, likelyVariable, nameForPlace, rangeAbout } from '../../components/hm-sizing/sizing-choices.ts';
import { marginTable, pictureOf, plainValue, shownUnit } from '../../components/hm-sizing/sizing-picture.ts';
import { blockerWords, edgeWords, outcomeWords } from '../../components/hm-sizing/sizing-words.ts';
import { size, type SizedAnswer, type SizedEdge } from '../../src/requirements/size.ts';
import { sizingBasis, textWithin, valueText } from '../../src/requirements/sized-value.ts';
import { evaluate, NO_NAMES } from '../../src/quantity/expression.ts';
import { inUnit } from '../../src/quantity/units.ts';
import { readVariables } from '../../src/design/variables.ts';
import { setVariable } from '../../src/state/commands/index.ts';
import { contactDesign } from '../requirements/designs.ts';
import { designFixture } from '../state/design-fixture.ts';

const design = (max = '250 ohm') => contactDesign((d) => { d.requirements = [{ quantity: 'sheetResistance', of: 'cap', max }, { quantity: 'barrierN', of: 'top', max: '0.6 eV' }]; });
function sized(max?: string): SizedAnswer {
  const found = size(design(max), { variable: 'tcap', tolerances: 'none', samples: 0, points: 9 });
  if (found.kind !== 'sized') throw new Error(JSON.stringify(found));
  return found;
}

describe('what can be sized', () => {
  it('is every variable, and every plain value of the stack', () => {
    const { variables, places } = choiceOptions(designFixture());
    expect(variables.map(({ text }) => text)).toEqual(['Ncap, now 1e19 cm^-3']);
    // The doping of the cap is "2*Ncap": it is sized by its variable.
    expect(places.map(({ text }) => text)).toEqual(['thickness of cap, 40 nm', 'thickness of spacer, 20 nm', 'thickness of buffer, 1 um', 'C concentration of buffer, 1e15 cm^-3']);
  });

  it('gets a name that the reader of designs takes, unlike all others', () => {
    const given = designFixture();
    given.layers[0].name = 'Deckschicht (n⁺)';
    given.layers[1].name = '層';
    given.layers[2].name = 'p 2';
    const names = given.layers.map((_, layer) => nameForPlace(given, { layer, part: 'thickness' }));
    expect(names).toEqual(['t_Deckschicht_n', 't_2', 't_p_2']);
    given.variables!.push({ name: 't_Deckschicht_n', value: '1 nm' }, { name: 't_p_2', value: '1 nm' }, { name: 't_2', value: '1 nm' });
    const more = given.layers.map((_, layer) => nameForPlace(given, { layer, part: 'thickness' }));
    expect(new Set([...more, ...given.variables!.map(({ name }) => name)]).size).toBe(7);
    expect(readVariables([...given.variables!, ...more.map((name) => ({ name, value: '1 nm' }))]).complaints).toEqual([]);
  });

  it('is, for a requirement, sooner a variable of the layer that it is about', () => {
    const given = contactDesign((d) => {
      d.variables!.push({ name: 'Nbase', value: '1e17 cm^-3' });
      d.layers[1].dopants![0].concentration = '2*Nbase';
    });
    expect(likelyVariable(given, 'base')).toBe('Nbase');
    expect(likelyVariable(given, 'bottom')).toBe('Nbase');
    expect(likelyVariable(given, 'top')).toBe('Ncap');
    expect(likelyVariable(designFixture(), 'buffer')).toBe(null);
  });

  it('is searched about its value: a doping over decades, a thickness by factors', () => {
    expect(rangeAbout('1e17 cm^-3')).toEqual(['1e16 cm^-3', '1e18 cm^-3']);
    expect(rangeAbout('40 nm')).toEqual(['10 nm', '160 nm']);
    // A share ends at the whole.
    expect(['0.2', '0.3', '1', '1.2'].map(rangeAbout)).toEqual([['0.05', '0.8'], ['0.075', '1'], ['0.25', '1'], ['0.3', '4.8']]);
    for (const text of ['2*Ncap', '25 degC', '-0.2 eV', '0 nm', '', 'rubbish']) expect(rangeAbout(text)).toBe(null);
  });
});

describe('the value that is put into the design', () => {
  it('has as few digits as keep it within its interval', () => {
    expect(textWithin({ unit: 'cm^-3' }, 2.36789e19, [2e19, 3e19])).toBe('2.37e19 cm^-3');
    expect(textWithin({ unit: 'cm^-3' }, 2.36789e19, [2e19, 2.36789e19])).toBe('2.36789e19 cm^-3');
    expect(textWithin({ unit: 'cm' }, 23.456e-7, [23.4e-7, 23.46e-7])).toBe('23.46 nm');
    expect(textWithin({ unit: '' }, 0.31256, [0.3, 0.4])).toBe('0.313');
  });

  it('reads back as what it was', () => {
    for (const [unit, value] of [['cm', 1.2345e-6], ['cm', 3.1e-4], ['cm^-3', 2.5e19], ['eV', 0.55], ['V/cm', 3.2e5], ['K', 310]] as const) {
      expect((inUnit(evaluate(valueText({ unit }, value, 6), NO_NAMES), unit) as number) / value).toBeCloseTo(1, 5);
    }
  });

  it('leaves what was found good, as a new title does; another thickness does not', () => {
    const given = design();
    const basis = sizingBasis(given, 'tcap');
    expect(sizingBasis({ ...setVariable(given, 1, { value: '99 nm', range: ['1 nm', '2 nm'], note: 'as sized' }), title: 'other', notes: 'n' }, 'tcap')).toBe(basis);
    expect(sizingBasis(setVariable(given, 1, { tolerance: '1 nm' }), 'tcap')).not.toBe(basis);
    expect(sizingBasis(setVariable(given, 0, { value: '4e19 cm^-3' }), 'tcap')).not.toBe(basis);
  });

  it('is read from plain texts only, for the mark in the picture', () => {
    expect(plainValue('40 nm', 'cm')).toBeCloseTo(40e-7, 15);
    expect(plainValue('1e19 cm^-3', 'cm^-3')).toBe(1e19);
    expect(plainValue('550 meV', 'eV')).toBeCloseTo(0.55, 12);
    expect(plainValue('0.3', '')).toBe(0.3);
    for (const [text, unit] of [['2*N', 'cm^-3'], ['40 nm', 'cm^-3'], ['', ''], ['300 K', 'cm']] as const) expect(plainValue(text, unit)).toBe(null);
  });
});

describe('the picture of a sizing', () => {
  it('shows lengths in nm or um, and the margins of the answer', () => {
    const answer = sized();
    const picture = pictureOf(answer, design(), 1);
    expect([picture.unit, picture.from.toFixed(6), picture.to.toFixed(6)]).toEqual(['nm', '20.000000', '200.000000']);
    expect(shownUnit('cm', 0.01)).toEqual({ unit: 'um', factor: 1e4 });
    expect(shownUnit('eV', 1)).toEqual({ unit: 'eV', factor: 1 });
    expect(picture.curves.map(({ measure }) => measure)).toEqual([{ kind: 'ratio' }, { kind: 'difference', step: 0.0259, unit: 'eV' }]);
    expect(picture.curves.map(({ strong }) => strong)).toEqual([false, true]);
    expect(picture.intervals[0].from.curve).toBe(0);
    expect(picture.intervals[0].to.curve).toBe(null);
    expect(picture.now?.value).toBeCloseTo(60, 9);
    const values = picture.curves[0].points.map(({ value }) => value);
    expect([...values].sort((a, b) => a - b)).toEqual(values);
    expect(picture.best!.score).toBeCloseTo(Math.min(...answer.scan.find(({ value }) => value === answer.best!.value)!.scores.map((score) => score as number)), 12);
  });

  it('tells margins as factors and differences in its table', () => {
    const { headings, rows } = marginTable(sized(), design());
    expect(headings).toEqual(['tcap', 'sheet resistance of cap, at most 250 ohm', 'barrier for electrons of top, at most 0.6 eV']);
    for (const row of rows) {
      expect(row[0]).toMatch(/^[\d.]+ nm$/);
      expect(row[1]).toMatch(/^×[\d.]+$/);
      expect(row[2]).toBe('0.05 eV');
    }
  });
});

describe('the words of a sizing', () => {
  it('say the interval, or the nearest miss with what it lacks', () => {
    expect(outcomeWords(sized())).toMatch(/^Everything is met with tcap from [\d.]+ nm to 200 nm\.$/);
    const missed = sized('1 ohm');
    expect(outcomeWords(missed)).toBe('No value of tcap in this range meets everything. The nearest is 200 nm, with 1 not met.');
    const [{ index, words }] = blockerWords(missed);
    expect(index).toBe(0);
    const { margin } = missed.best!.requirements[0];
    const lacks = Number(/^It lacks a factor of ([\d.]+)\. No value in the range meets it\.$/.exec(words)?.[1]);
    expect(lacks * margin!).toBeCloseTo(1, 2);
    const lower = { ...missed.best!.requirements[1], met: false, margin: -0.12 };
    expect(blockerWords({ ...missed, blockers: [{ index: 1, words: '', met_somewhere: true }], best: { ...missed.best!, requirements: [missed.best!.requirements[0], lower] } })[0].words).toMatch(/^It lacks 0\.12 eV\. Other values/);
    expect(outcomeWords({ ...missed, best: null })).toContain('no accepted answer');
  });

  it('say where an interval ends and why', () => {
    const edge = (change: Partial<SizedEdge>): SizedEdge => ({ value: 1, text: '1 nm', reason: 'requirement', requirement: { index: 2, words: 'barrier of top at most 1 eV' }, at: '-40 degC', beyond: 2, row: null, ...change });
    expect(edgeWords(edge({}), 'below')).toBe('Below 1 nm it fails on requirement 3, at -40 degC.');
    expect(edgeWords(edge({ reason: 'no answer', at: null }), 'above')).toBe('Above 1 nm there is no answer for barrier of top at most 1 eV.');
    expect(edgeWords(edge({ reason: 'range', requirement: null, at: null }), 'above')).toContain('end of the range');
  });
});
