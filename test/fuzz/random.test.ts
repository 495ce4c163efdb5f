import { describe, expect, it } from 'vitest';
import { checkDesign } from '../../src/design/read.ts';
import { randomDesign, randomFrom } from './random-design.ts';
import { tryDesign } from './trial.ts';

describe('random designs of the presets, 1 to 12 layers, 4 to 900 K', () => {
  it('are accepted, 500 of 500, and sound by sums of our own', { timeout: 120_000 }, () => {
    const bad: string[] = [];
    for (let i = 0; i < 500; i++) {
      const outcome = tryDesign(randomDesign(randomFrom(7e6 + i)));
      if (outcome.kind === 'refused') bad.push(`${i}: refused, ${outcome.reason}`);
      if (outcome.kind === 'wrong') bad.push(`${i}: ${outcome.faults.join('; ')}`);
    }
    expect(bad).toEqual([]);
  });

  it('are design documents, and the same for the same seed', () => {
    for (let i = 0; i < 50; i++) {
      const design = randomDesign(randomFrom(i));
      expect(checkDesign(design)).toEqual({ ok: true, design });
      expect(randomDesign(randomFrom(i))).toEqual(design);
    }
  });
});
