import { describe, expect, it } from 'vitest';
import { putText } from '../../components/hm-sweeps/sweep-picture.ts';
import { readAxis } from '../../src/sweep/axis.ts';
import { designFixture } from '../state/design-fixture.ts';

const axisOf = (from: string, to: string, points: number, scale: 'linear' | 'log' = 'linear', variable = 'temperature') => {
  const reading = readAxis(designFixture(), { variable, from, to, points, scale }, {});
  if (!reading.ok) throw new Error(reading.complaints[0].message);
  return reading.axis;
};

describe('a point of a sweep that is put into the design', () => {
  it('is written as the cursor reads it', () => {
    const axis = axisOf('233.15 K', '398.15 K', 41);
    expect(axis.texts[10]).toBe('274.4 K');
    const odd = axisOf('233.15 K', '398.15 K', 37);
    expect(odd.texts[9].length).toBeGreaterThanOrEqual(putText(odd, 9).length);
    for (const [i, value] of odd.values.entries()) if (i > 0 && i < 36) expect(putText(odd, i)).toBe(`${Number(value.toPrecision(4))} K`);
  });

  it('keeps the ends as they were given', () => {
    const axis = axisOf('233.1512345 K', '398.15 K', 5);
    expect([putText(axis, 0), putText(axis, 4)]).toEqual(['233.1512345 K', '398.15 K']);
  });

  it('has more digits where the points lie close, so that each stays by itself', () => {
    const axis = axisOf('299.999 K', '300.001 K', 21);
    const texts = axis.values.map((_, i) => putText(axis, i));
    expect(new Set(texts).size).toBe(21);
    texts.forEach((text, i) => expect(Math.abs(Number.parseFloat(text) - axis.values[i])).toBeLessThanOrEqual(0.05 * 1e-4));
  });
});
