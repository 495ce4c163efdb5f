import { describe, expect, it } from 'vitest';
import { marginsCsv } from '../../src/requirements/margins-csv.ts';
import { contactDesign } from './designs.ts';

describe('the margins of a sizing as CSV', () => {
  const design = contactDesign((d) => {
    d.requirements = [{ quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2' }, { quantity: 'barrierN', of: 'top', min: '0.5 eV' }];
  });

  it('have a row a value, rising, with a ratio in times and a difference in its unit', () => {
    const rows = marginsCsv({ variable: 'Ncap', unit: 'cm^-3', scan: [{ value: 2e19, scores: [Math.log(3), 2] }, { value: 1e19, scores: [0, -1] }] }, design).split('\r\n');
    expect(rows[0]).toBe('Ncap (cm^-3),"contact resistivity of top, at most 1e-6 ohm cm^2, margin (times)","barrier for electrons of top, at least 0.5 eV, margin (eV)"');
    expect(rows[1].split(',').map(Number)).toEqual([1e19, 1, -0.0259]);
    const [value, times, eV] = rows[2].split(',').map(Number);
    expect(value).toBe(2e19);
    expect(times).toBeCloseTo(3, 12);
    expect(eV).toBeCloseTo(0.0518, 12);
    expect(rows[3]).toBe('');
  });

  it('tell what has no end, what has no margin at all, and what has no answer', () => {
    const cells = (scores: (number | null)[]): string[] => marginsCsv({ variable: 'Ncap', unit: 'cm^-3', scan: [{ value: 1e19, scores }] }, design).split('\r\n')[1].split(',').slice(1);
    expect(cells([700, 0])).toEqual(['Infinity', '0']);
    expect(cells([-700, null])).toEqual(['0', '']);
  });
});
