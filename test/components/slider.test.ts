import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sliderOf, textAt } from '../../components/hm-variables/slider.ts';

const variable = (value: string, range?: [string, string]) => ({ name: 'N', value, range });

describe('the slider of a variable', () => {
  it('goes by the logarithm where the range spans more than a decade, else evenly', () => {
    const doping = sliderOf(variable('1e18 cm^-3', ['1e17 cm^-3', '1e19 cm^-3']))!;
    expect(doping).toMatchObject({ log: true, unit: 'cm^-3' });
    expect(doping.at).toBeCloseTo(0.5, 12);
    expect(sliderOf(variable('30 nm', ['10 nm', '50 nm']))).toEqual({ unit: 'nm', from: 10, to: 50, log: false, at: 0.5 });
    expect(sliderOf(variable('0 V', ['-1 V', '1 V']))).toMatchObject({ log: false, at: 0.5 });
  });

  it('gives the ends exactly and three digits between them', () => {
    const slider = sliderOf(variable('1e18 cm^-3', ['1.2345e17 cm^-3', '1e19 cm^-3']))!;
    expect(textAt(slider, 0)).toBe('1.2345e17 cm^-3');
    expect(textAt(slider, 1)).toBe('1e19 cm^-3');
    expect(textAt(slider, 0.5)).toMatch(/^1\.11e18 cm\^-3$/);
    expect(textAt(sliderOf(variable('0.3', ['0.1', '0.5']))!, 0.5)).toBe('0.3');
  });

  it('leads back to the position it was given, wherever the text was rounded', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1, noNaN: true }), fc.constantFrom<[string, string]>(['1e15 cm^-3', '1e20 cm^-3'], ['5 nm', '40 nm']), (at, range) => {
        const text = textAt(sliderOf(variable(range[0], range))!, at);
        // Three digits: half a percent of the value, whatever the range.
        expect(Math.abs(sliderOf(variable(text, range))!.at - at)).toBeLessThan(0.006);
      }),
      { numRuns: 200, seed: 9 },
    );
  });

  it('holds a value outside its range at the nearer end', () => {
    expect(sliderOf(variable('1e21 cm^-3', ['1e17 cm^-3', '1e19 cm^-3']))?.at).toBe(1);
    expect(sliderOf(variable('-5 cm^-3', ['1e17 cm^-3', '1e19 cm^-3']))?.at).toBe(0);
  });

  it('is left out where nothing can be pulled: no range, an expression, two units, an empty range', () => {
    expect(sliderOf(variable('1e18 cm^-3'))).toBeNull();
    expect(sliderOf(variable('2*M', ['1e17 cm^-3', '1e19 cm^-3']))).toBeNull();
    expect(sliderOf(variable('1 um', ['10 nm', '50 nm']))).toBeNull();
    expect(sliderOf(variable('1 nm', ['5 nm', '5 nm']))).toBeNull();
  });
});
