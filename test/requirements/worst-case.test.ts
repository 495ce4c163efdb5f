import { describe, expect, it } from 'vitest';
import type { Point, Reading } from '../../src/requirements/point.ts';
import { seeded } from '../../src/requirements/random.ts';
import { worstCases, type Readable, type WorstCase, type WorstCaseOptions } from '../../src/requirements/worst-case.ts';

type Score = (point: Point) => number | null;

/** Scores at hand in place of a solver. */
class Formula implements Readable {
  evaluations = 0;
  readonly uncertainties: unknown[];
  readonly #seen = new Map<string, Reading>();
  constructor(count: number, readonly scores: Score[]) {
    this.uncertainties = new Array<null>(count).fill(null);
  }
  at(point: Point): Reading {
    const key = JSON.stringify(point);
    let reading = this.#seen.get(key);
    if (!reading) {
      this.evaluations++;
      const scores = this.scores.map((f) => f(point));
      reading = { point, scores, figures: scores, refusal: scores.includes(null) ? 'none here' : null };
      this.#seen.set(key, reading);
    }
    return reading;
  }
  has(point: Point): boolean {
    return this.#seen.has(JSON.stringify(point));
  }
}

function worst(formula: Formula, options: WorstCaseOptions = {}, temperatures: number[] = [233, 398]): WorstCase[] {
  const steps = worstCases(formula, [...formula.scores.keys()], temperatures, 300, options);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
    expect(step.value.done).toBeLessThanOrEqual(step.value.of);
  }
}

/** The lowest score over all corners of k uncertainties and both temperatures. */
function factorial(f: Score, k: number, temperatures: number[] = [233, 398]): number {
  let least = Infinity;
  for (const temperature of temperatures) for (let c = 0; c < 2 ** k; c++) least = Math.min(least, f({ temperature, counts: Array.from({ length: k }, (_, i) => (c & (1 << i) ? 1 : -1)) }) as number);
  return least;
}

describe('the worst case', () => {
  it('is the worst of all corners where there are few uncertainties', () => {
    const f: Score = ({ temperature, counts: [a, b, c] }) => temperature / 100 + a * b - 2 * b * c + 0.3 * a;
    const [found] = worst(new Formula(3, [f]));
    expect(found.reading?.scores[0]).toBe(factorial(f, 3));
    expect(found.reading?.point.temperature).toBe(233);
    expect(found.cornersSufficed).toBe(true);
  });

  it('is found among many uncertainties with few of their corners, interactions included', () => {
    const random = seeded(5);
    for (let trial = 0; trial < 20; trial++) {
      const k = 10;
      const slopes = Array.from({ length: k }, () => 2 * random() - 1);
      const pairs = Array.from({ length: 8 }, () => ({ i: Math.floor(random() * k), j: Math.floor(random() * k), w: 0.4 * (random() - 0.5) }));
      const f: Score = ({ temperature, counts }) => (temperature - 300) / 500 + counts.reduce((sum, c, i) => sum + slopes[i] * c, 0) + pairs.reduce((sum, { i, j, w }) => sum + w * counts[i] * counts[j], 0);
      const formula = new Formula(k, [f]);
      const [found] = worst(formula, { samples: 0 });
      expect(found.reading?.scores[0], `trial ${trial}`).toBeCloseTo(factorial(f, k), 9);
      expect(formula.evaluations).toBeLessThan(250); // 2048 corners
    }
  });

  it('turns to the corner that only two together make bad', () => {
    // Each direction by itself looks harmless one way; flips from the combined corner find the pair.
    const f: Score = ({ counts }) => counts[0] + counts[1] + 3 * counts[2] * counts[3] + 0.1 * counts[2] + counts.slice(4).reduce((s, c) => s + c, 0);
    const [found] = worst(new Formula(8, [f]), { samples: 0 }, [300]);
    expect(found.reading?.scores[0]).toBeCloseTo(factorial(f, 8, [300]), 9);
  });

  it('finds a worst temperature between the ends', () => {
    const f: Score = ({ temperature, counts: [a] }) => ((temperature - 340) / 50) ** 2 + 0.5 * a;
    const [found] = worst(new Formula(1, [f]));
    expect(found.reading?.point.temperature).toBeGreaterThan(325);
    expect(found.reading?.point.temperature).toBeLessThan(355);
    expect(found.reading?.scores[0]).toBeLessThan(-0.45);
  });

  it('says when the corners did not suffice, and goes on from the worse point inside', () => {
    const f: Score = ({ counts: [a, b] }) => (a - 0.3) ** 2 + (b + 0.2) ** 2 - 0.1;
    const [found] = worst(new Formula(2, [f]), {}, [300]);
    // The nominal point is tried beside the corners (0.03 here); the bottom of the bowl is at -0.1.
    expect(found.cornersSufficed).toBe(false);
    expect(found.reading?.scores[0]).toBeLessThan(-0.09);
  });

  it('tells the uncertainties that count from those that do not', () => {
    const [found] = worst(new Formula(3, [({ counts }) => counts[0] - 2 * counts[2]]), {}, [300]);
    expect(found.effects).toEqual([2, 0, 4]);
    expect(found.reading?.point.counts[0]).toBe(-1);
    expect(found.reading?.point.counts[2]).toBe(1);
  });

  it('keeps the points without an answer, and does not take them for good or bad', () => {
    const f: Score = ({ temperature, counts: [a] }) => (a > 0.9 && temperature > 350 ? null : 1 + a);
    const [found] = worst(new Formula(1, [f]));
    expect(found.reading?.scores[0]).toBe(0);
    expect(found.unanswered.length).toBeGreaterThan(0);
    const [nowhere] = worst(new Formula(1, [() => null]));
    expect(nowhere.reading).toBeNull();
  });

  it('comes out the same every time', () => {
    const f: Score = ({ temperature, counts: [a, b] }) => Math.sin(3 * a + temperature) + Math.cos(2 * b);
    expect(worst(new Formula(2, [f]))).toEqual(worst(new Formula(2, [f])));
    expect(worst(new Formula(2, [f]), { seed: 2 })[0].reading).not.toBeNull();
  });

  it('needs one solve where nothing is uncertain and nothing ranges', () => {
    const formula = new Formula(0, [() => 1]);
    expect(worst(formula, {}, [300])[0].reading?.scores).toEqual([1]);
    expect(formula.evaluations).toBe(1);
  });

  it('keeps requirements apart, each with its own corner', () => {
    const [first, second] = worst(new Formula(2, [({ counts }) => counts[0], ({ counts }) => -counts[0] + counts[1]]), {}, [300]);
    expect(first.reading?.point.counts[0]).toBe(-1);
    expect(second.reading?.point.counts).toEqual([1, -1]);
  });
});
