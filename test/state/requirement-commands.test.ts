import { describe, expect, it } from 'vitest';
import type { Design } from '../../src/design/types.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { limitWords, writtenLimits } from '../../src/requirements/limits.ts';
import { judge } from '../../src/requirements/judge.ts';
import { makeVariable, setRequirementQuantity, textAtPlace } from '../../src/state/commands/index.ts';
import { designFixture } from './design-fixture.ts';

/** The fixture with requirements that can be met or not. */
const REQUIREMENTS = [{ quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2' }, { quantity: 'fullyDepleted', of: 'spacer', min: true }];

describe('a variable made of a value in the stack', () => {
  const design: Design = { ...designFixture(), requirements: REQUIREMENTS };

  it('takes over its text, and its name stands in its place', () => {
    const next = makeVariable(design, { layer: 2, part: 'concentration', row: 0 }, 'N_buffer', { range: ['1e14 cm^-3', '1e16 cm^-3'] });
    expect(next.layers[2].dopants![0].concentration).toBe('N_buffer');
    expect(next.variables).toEqual([...design.variables!, { name: 'N_buffer', value: '1e15 cm^-3', range: ['1e14 cm^-3', '1e16 cm^-3'] }]);
    expect(makeVariable({ ...design, variables: undefined }, { layer: 0, part: 'thickness' }, 't_cap').variables).toEqual([{ name: 't_cap', value: '40 nm' }]);
    expect(JSON.stringify(design)).toBe(JSON.stringify({ ...designFixture(), requirements: REQUIREMENTS }));
  });

  it('stands for the peak of an implant, and not for a value that goes through the depth', () => {
    const implanted = designFixture();
    implanted.layers[2].dopants![0].concentration = { peak: '1e18 cm^-3', depth: '20 nm', straggle: '10 nm', shape: 'gaussian' };
    const place = { layer: 2, part: 'concentration', row: 0 } as const;
    expect(textAtPlace(implanted, place)).toBe('1e18 cm^-3');
    expect(makeVariable(implanted, place, 'N').layers[2].dopants![0].concentration).toEqual({ peak: 'N', depth: '20 nm', straggle: '10 nm', shape: 'gaussian' });
    implanted.layers[2].dopants![0].concentration = { from: '1e18 cm^-3', to: '1e17 cm^-3', shape: 'linear' };
    expect(textAtPlace(implanted, place)).toBe(null);
    expect(() => makeVariable(implanted, place, 'N')).toThrow(RangeError);
    expect(() => makeVariable(implanted, { layer: 9, part: 'thickness' }, 'N')).toThrow(RangeError);
  });

  it('leaves the figures of the stack as they were', () => {
    const solved = (d: typeof design) => {
      const answer = solveDesign(d);
      if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
      return answer.result.layers;
    };
    expect(solved(makeVariable(makeVariable(design, { layer: 0, part: 'thickness' }, 't_cap'), { layer: 2, part: 'concentration', row: 0 }, 'N_buffer'))).toEqual(solved(design));
  });
});

describe('a requirement that asks for another quantity', () => {
  it('keeps what it was asked of and its limit, unless others are given', () => {
    const design = designFixture();
    expect(setRequirementQuantity(design, 0, 'leakage').requirements![0]).toEqual({ quantity: 'leakage', of: 'top', max: '1e-6 ohm cm^2' });
    expect(setRequirementQuantity(design, 0, 'sheetResistance', { of: 'cap', max: '100 ohm' }).requirements![0]).toEqual({ quantity: 'sheetResistance', of: 'cap', max: '100 ohm' });
    expect(setRequirementQuantity(design, 0, 'carrierDensity', { of: 'cap', min: '1e18 cm^-3' }).requirements![0]).toEqual({ quantity: 'carrierDensity', of: 'cap', min: '1e18 cm^-3' });
    expect(() => setRequirementQuantity(design, 5, 'leakage')).toThrow(RangeError);
  });
});

describe('the limits as they are written', () => {
  const design = { ...designFixture(), requirements: [{ quantity: 'builtIn', of: 'spacer', min: '0.1 V', max: '2 V' }, ...REQUIREMENTS, { quantity: 'degenerate', of: 'buffer', max: false }] };

  it('come in the order of the rows of a judgement', () => {
    const judgement = judge(design, { tolerances: 'none', samples: 0 });
    if (judgement.kind !== 'judged') throw new Error(JSON.stringify(judgement));
    expect(writtenLimits(design).map(({ requirement, bound }) => [requirement.quantity, requirement.of, bound])).toEqual(judgement.requirements.map(({ quantity, of, bound }) => [quantity, of, bound]));
  });

  it('are told in words', () => {
    expect(writtenLimits(design).map(limitWords)).toEqual([
      'built-in potential of spacer, at most 2 V', 'built-in potential of spacer, at least 0.1 V', 'contact resistivity of top, at most 1e-6 ohm cm^2', 'spacer fully depleted', 'buffer not degenerate',
    ]);
  });
});
