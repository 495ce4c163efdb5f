import { describe, expect, it } from 'vitest';
import { checkDesign } from '../../src/design/read.ts';
import { Coverage } from './coverage.ts';
import { randomDesign, randomFrom } from './random-design.ts';
import { compareDesign, tryDesign } from './trial.ts';

describe('random designs of presets and own materials, 1 to 12 layers, 4 to 1000 K', () => {
  it('are accepted, 300 of 300, sound by sums of our own and within the bound of work', { timeout: 300_000 }, () => {
    const bad: string[] = [];
    for (let i = 0; i < 300; i++) {
      const outcome = tryDesign(randomDesign(randomFrom(7e6 + i)));
      if (outcome.kind === 'refused') bad.push(`${i}: refused, ${outcome.reason}`);
      if (outcome.kind === 'wrong') bad.push(`${i}: ${outcome.faults.join('; ')}`);
    }
    expect(bad).toEqual([]);
  });

  it('keep their stated error, on nodes and between them, against a thousand times more accurate solutions', { timeout: 300_000 }, () => {
    const bad: string[] = [];
    let compared = 0;
    for (let i = 0; i < 120; i++) {
      const outcome = compareDesign(randomDesign(randomFrom(8e6 + i)));
      if (outcome.kind === 'not sensible') continue;
      if (outcome.kind !== 'compared') bad.push(`${i}: ${JSON.stringify(outcome)}`);
      else {
        compared++;
        if (!(outcome.distance <= outcome.stated)) bad.push(`${i}: ${outcome.distance} V apart in layer ${outcome.layer}, ${outcome.stated} V stated`);
      }
    }
    expect(bad).toEqual([]);
    expect(compared).toBeGreaterThan(110);
  });

  it('hold every material, boundary, profile, strain, centre and range that they should', { timeout: 120_000 }, () => {
    const coverage = new Coverage();
    for (let i = 0; i < 1500; i++) coverage.add(randomDesign(randomFrom(7e6 + i)));
    expect(coverage.missing()).toEqual([]);
  });

  it('are accepted with frozen layers, where Newton asks for 1e11 V, and where its steps wander', () => {
    for (const seed of [102_002_765, 102_003_765, 102_004_554]) expect(tryDesign(randomDesign(randomFrom(seed)))).toMatchObject({ kind: 'accepted', method: 'compact' });
  });

  it('are design documents, and the same for the same seed', () => {
    for (let i = 0; i < 50; i++) {
      const design = randomDesign(randomFrom(i));
      expect(checkDesign(design)).toEqual({ ok: true, design });
      expect(randomDesign(randomFrom(i))).toEqual(design);
    }
  });
});
