import { describe, expect, it } from 'vitest';
import { completed, plainThickness, thicknessText, unitOf } from '../../components/shared/typed-text.ts';

describe('a typed text', () => {
  it('gets the usual unit if it is a bare number', () => {
    expect(completed('3e17', 'cm^-3')).toBe('3e17 cm^-3');
    expect(completed(' .5E18 ', 'cm^-3', 'Ncap')).toBe('.5E18 cm^-3');
  });

  it('gets the unit of the text it replaces', () => {
    expect(completed('0.4', 'nm', '0.35um')).toBe('0.4 um');
    expect(completed('80', 'nm', '2*tcap')).toBe('80 nm');
  });

  it('stays as it is in all other cases', () => {
    for (const text of ['80 nm', '350nm', '2*Ncap', '3e17 cn^-3', '', 'Ncap']) expect(completed(text, 'cm^-3', '1e17 cm^-3')).toBe(text);
    expect(completed('0.3', '')).toBe('0.3');
  });

  it('stays bare where it can be no doping, so that a variable becomes a share by typing one', () => {
    expect(['0.9', '12', '1e-3'].map((text) => completed(text, 'cm^-3', '1e17 cm^-3'))).toEqual(['0.9', '12', '1e-3']);
    expect(['0', '1e3', '5e14'].map((text) => completed(text, 'cm^-3'))).toEqual(['0 cm^-3', '1e3 cm^-3', '5e14 cm^-3']);
  });

  it('has a unit only if it is a plain value', () => {
    expect(['0.35um', '80 nm', '1e17 cm^-3', '5 µm', '2*tcap', '12', 'tcap'].map(unitOf)).toEqual(['um', 'nm', 'cm^-3', 'µm', null, null, null]);
  });

  it('is a thickness in nm if it is a plain length', () => {
    expect(plainThickness('0.35um')).toBeCloseTo(350, 9);
    expect(plainThickness('8e1 nm')).toBe(80);
    for (const text of ['tcap', '80', '80 kg', '-5 nm', '0 nm', '2*40 nm', '5 toString']) expect(plainThickness(text)).toBe(null);
  });
});

describe('the text of a dragged thickness', () => {
  it('keeps the unit and has no digits below its step', () => {
    expect(thicknessText(354.4, '0.35um', 1)).toBe('0.354 um');
    expect(thicknessText(81.26, '80 nm', 0.1)).toBe('81.3 nm');
  });

  it('replaces an expression by nm, or by um for a wafer', () => {
    expect(thicknessText(83.2, '2*tcap', 1)).toBe('83 nm');
    expect(thicknessText(300_000, 'twafer', 1000)).toBe('300 um');
  });

  it('is never nothing', () => {
    expect(thicknessText(0.2, '80 nm', 1)).toBe('1 nm');
  });
});
