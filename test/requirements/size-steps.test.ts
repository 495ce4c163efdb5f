import { describe, expect, it } from 'vitest';
import { size, sizeSteps, type LookedAt, type SearchedRange, type SizeOptions } from '../../src/requirements/size.ts';
import { contactDesign } from './designs.ts';

const design = () => contactDesign((d) => { d.requirements = [{ quantity: 'sheetResistance', of: 'cap', max: '250 ohm' }]; });
const options: SizeOptions = { variable: 'tcap', tolerances: 'none', samples: 0, points: 9 };

describe('a sizing under way', () => {
  it('tells the range first, then each value that it has looked at, and those are the values of its scan', () => {
    const steps = sizeSteps(design(), options);
    const seen: LookedAt[] = [];
    let range: SearchedRange | null = null;
    for (;;) {
      const step = steps.next();
      if (!step.done) {
        if (step.value.seen && 'value' in step.value.seen) seen.push(step.value.seen);
        else if (step.value.seen) range = seen.length === 0 ? step.value.seen : null;
        continue;
      }
      if (step.value.kind !== 'sized') throw new Error('not sized');
      const { variable, unit, scale, from, to } = step.value;
      expect(range).toEqual({ variable, unit, scale, from, to });
      expect(new Set(seen.map(({ value }) => value))).toEqual(new Set(step.value.scan.map(({ value }) => value)));
      break;
    }
    expect(seen.every(({ scores }) => scores.length === 1)).toBe(true);
  });

  it('goes in decades or in even steps as asked, and finds the same edge', () => {
    const edges = (['log', 'linear'] as const).map((scale) => {
      const found = size(design(), { ...options, scale });
      if (found.kind !== 'sized') throw new Error('not sized');
      expect(found.scale).toBe(scale);
      return found.intervals[0].from.value;
    });
    expect(edges[0] / edges[1]).toBeCloseTo(1, 3);
  });

  it('refuses decades from zero', () => {
    const found = size(design(), { ...options, from: '0 nm', scale: 'log' });
    expect(found.kind === 'complaints' && found.complaints.map(({ path, message }) => `${path} ${message}`)).toEqual([expect.stringMatching(/^--from is not above zero, and decades/)]);
    expect(size(design(), { ...options, from: '0 nm', to: '200 nm', scale: 'linear' }).kind).toBe('sized');
  });
});
