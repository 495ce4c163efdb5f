import { describe, expect, it } from 'vitest';
import { checkDesign, readDesign } from '../../src/design/read.ts';
import { starters } from '../../src/design/starters/index.ts';
import { writeDesign } from '../../src/design/write.ts';
import { solveDesign } from '../../src/result/solve-design.ts';

describe('the starters', () => {
  it('are nine, with names of their own', () => {
    expect(starters).toHaveLength(9);
    expect(new Set(starters.map((s) => s.id)).size).toBe(9);
    expect(new Set(starters.map((s) => s.title)).size).toBe(9);
  });

  for (const { id, design } of starters) {
    it(`${id} reads, writes back whole, and solves within 0.1 mV`, () => {
      expect(checkDesign(design)).toEqual({ ok: true, design });
      expect(readDesign(writeDesign(design))).toEqual({ ok: true, design });
      const answer = solveDesign(design);
      if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
      expect(answer.result.quality.converged).toBe(true);
      expect(answer.result.quality.mesh_error_V).toBeLessThanOrEqual(1e-4);
      expect(answer.result.layers.map((l) => l.name)).toEqual(design.layers.map((l) => l.name));
    });

    it(`${id} solves at both ends of its temperature range`, () => {
      for (const temperature of design.conditions.temperatureRange ?? []) expect(solveDesign(design, { set: { temperature } }).kind).toBe('result');
    });
  }
});
