import { describe, expect, it } from 'vitest';
import { KINDS, type KindName } from '../../src/quantity/kinds.ts';
import { readQuantity } from '../../src/quantity/read-quantity.ts';
import { writeQuantity } from '../../src/quantity/write-quantity.ts';

describe('a value written as text', () => {
  it('is read back as the same quantity, whatever its kind', () => {
    for (const kind of Object.keys(KINDS) as KindName[]) {
      for (const value of [0.47, 1.25e-6, 3.5e18, 0, -0.02]) {
        const text = writeQuantity(value, kind);
        const reading = readQuantity(text, kind);
        if (!reading.ok) throw new Error(`${kind}: ${text}: ${reading.message}`);
        expect(Math.abs(reading.value - value), `${kind}: ${text}`).toBeLessThanOrEqual(1e-12 * Math.abs(value));
      }
    }
  });

  it('has the unit that people use of a length, and none of a pure number', () => {
    expect([2e-6, 3.5e-5, 1e-4, 0.25].map((cm) => writeQuantity(cm, 'length'))).toEqual(['20 nm', '350 nm', '1 um', '2.5 mm']);
    expect(writeQuantity(0.47, 'number')).toBe('0.47');
    expect(writeQuantity(350, 'temperature')).toBe('350 K');
  });
});
