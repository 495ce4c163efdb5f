import { describe, expect, it } from 'vitest';
import { isRefusal, solveBands, solveStack } from '../../solver/index.ts';
import { starters } from '../../src/design/starters/index.ts';
import { toStack } from '../../src/design/stack.ts';
import { askedResult } from '../../src/result/asked-result.ts';
import { resultOf } from '../../src/result/from-solution.ts';
import { figuresOf } from '../../src/sweep/figures.ts';

const NO_PROVENANCE = { program: '', model: '', presets: '', design: '' };

describe('a result whose rows are worked out when they are read', () => {
  for (const { id, design } of starters) {
    it(`has every figure of the whole result to the last bit: ${id}`, () => {
      const reading = toStack(design);
      if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
      const solution = solveStack(reading.stack);
      const bands = solveBands(reading.stack);
      if (isRefusal(solution) || isRefusal(bands)) throw new Error('refused');
      const whole = resultOf(solution, '', NO_PROVENANCE);
      const asked = askedResult(bands);
      const figures = figuresOf(design);
      expect(figures.length).toBeGreaterThan(20);
      // From the last to the first: a row must not depend on what was read before it.
      for (const figure of [...figures].reverse()) expect(Object.is(figure.read(asked), figure.read(whole)), figure.path).toBe(true);
      expect(asked.layers).toEqual(whole.layers);
      expect(asked.junctions).toEqual(whole.junctions);
      expect(asked.contacts).toEqual(whole.contacts);
      expect(asked.contacts.find((c) => c.side === 'bottom')).toBe(asked.contacts[1]);
      expect(asked.profile.ec_eV).toEqual(whole.profile.ec_eV);
      expect(asked.conditions).toEqual(whole.conditions);
    });
  }
});
