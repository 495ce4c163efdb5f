import { describe, expect, it } from 'vitest';
import { sizeOver, sizing, type SizingProblem } from '../../solver/sizing.ts';

type Score = (v: number) => number | null;

/** A reproducible stream of numbers in 0..1 (Park and Miller, 1988). */
function stream(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}

/** Intervals by a scan of many thousand values: the brute-force answer, its edges good to a step. */
function bruteForce({ from, to, scale }: SizingProblem, scores: Score[], count: number): { from: number; to: number }[] {
  const at = (k: number): number => (scale === 'log' ? from * (to / from) ** (k / count) : from + ((to - from) * k) / count);
  const met = (v: number): boolean => scores.every((f) => { const s = f(v); return s !== null && s >= 0; });
  const out: { from: number; to: number }[] = [];
  let open = false;
  for (let k = 0; k <= count; k++) {
    const v = at(k);
    if (met(v)) {
      if (!open) out.push({ from: v, to: v });
      out[out.length - 1].to = v;
      open = true;
    } else open = false;
  }
  return out;
}

/** One to three scores: slopes, humps, dips, waves, steps, and stretches without an answer. */
function randomProblem(seed: number): { problem: SizingProblem; scores: Score[] } {
  const random = stream(seed * 7919 + 13);
  const scale = random() < 0.5 ? 'log' : 'linear';
  const [from, to] = scale === 'log' ? [1e15, 1e20] : [-3, 5];
  const u = (v: number): number => (scale === 'log' ? Math.log(v / from) / Math.log(to / from) : (v - from) / (to - from));
  const scores = Array.from({ length: 1 + Math.floor(random() * 3) }, (): Score => {
    const [a, b, c, d] = [random(), random(), random(), random()];
    const sort = Math.floor(random() * 6);
    if (sort === 0) return (v) => (u(v) - a) * (b < 0.5 ? 8 : -8);
    if (sort === 1) return (v) => 2 - 40 * (0.5 + b) * (u(v) - a) ** 2;
    if (sort === 2) return (v) => 40 * (0.5 + b) * (u(v) - a) ** 2 - 0.8;
    if (sort === 3) return (v) => Math.sin(2 * Math.PI * (1 + 2 * a) * u(v) + 6 * b) + 0.7 * (c - 0.3);
    if (sort === 4) return (v) => (u(v) < a ? -2 : 1.5 + 0 * v) * (b < 0.8 ? 1 : -1);
    return (v) => (u(v) > 0.6 + 0.4 * c ? null : 3 * (u(v) - 0.5 * d));
  });
  return { problem: { from, to, scale }, scores };
}

describe('sizing', () => {
  it('finds the intervals of a fine scan on fifty random problems', () => {
    let several = 0;
    let empty = 0;
    for (let seed = 1; seed <= 50; seed++) {
      const { problem, scores } = randomProblem(seed);
      const answer = sizeOver(problem, (v) => scores.map((f) => f(v)));
      const count = 20000;
      const fine = bruteForce(problem, scores, count);
      const span = problem.scale === 'log' ? Math.log(problem.to / problem.from) : problem.to - problem.from;
      const distance = (x: number, y: number): number => (problem.scale === 'log' ? Math.abs(Math.log(x / y)) : Math.abs(x - y)) / span;
      expect(answer.intervals.length, `problem ${seed}`).toBe(fine.length);
      answer.intervals.forEach((interval, i) => {
        for (const end of ['from', 'to'] as const) {
          const edge = interval[end];
          // One step of the scan and the tolerance of the edge, 1e-4.
          expect(distance(edge.value, fine[i][end]), `problem ${seed}`).toBeLessThan(1 / count + 1.1e-4);
          expect(scores.every((f) => (f(edge.value) ?? -1) >= 0), `problem ${seed}: the edge itself is met`).toBe(true);
          if (edge.reason === 'range') expect(distance(edge.value, end === 'from' ? problem.from : problem.to)).toBe(0);
          else {
            const beyond = scores.map((f) => f(edge.beyond as number));
            const binding = beyond[edge.binding as number];
            expect(edge.reason).toBe(beyond.includes(null) ? 'no answer' : 'requirement');
            expect(binding === null || binding < 0, `problem ${seed}: what binds is not met beyond`).toBe(true);
          }
        }
      });
      if (fine.length > 1) several++;
      if (fine.length === 0) {
        empty++;
        expect(answer.blockers.length).toBeGreaterThan(0);
      }
      expect(answer.evaluations).toBeLessThan(250);
    }
    // The problems are worth the name: some are not monotone, some have no answer.
    expect(several).toBeGreaterThan(5);
    expect(empty).toBeGreaterThan(3);
  });

  it('finds the best point', () => {
    const answer = sizeOver({ from: 0, to: 1, scale: 'linear' }, (v) => [1 - 10 * (v - 0.4) ** 2, 2 - v]);
    expect(Math.abs((answer.best?.value ?? 0) - 0.4)).toBeLessThan(2e-3);
    const tent = sizeOver({ from: 0, to: 1, scale: 'linear' }, (v) => [4 * v - 1, 2 - 3 * v]);
    expect(Math.abs((tent.best?.value ?? 0) - 3 / 7)).toBeLessThan(2e-3);
  });

  it('tells the nearest miss and what blocks where nothing is met', () => {
    const answer = sizeOver({ from: 0, to: 1, scale: 'linear' }, (v) => [v - 0.7, 0.5 - v, 1]);
    expect(answer.intervals).toEqual([]);
    expect(answer.best?.value).toBeCloseTo(0.6, 2);
    expect(answer.best?.least).toBeCloseTo(-0.1, 2);
    expect(answer.blockers).toEqual([0, 1]);
    expect(answer.metSomewhere).toEqual([true, true, true]);
    expect(sizeOver({ from: 0, to: 1, scale: 'linear' }, (v) => [v - 1.5, 1]).metSomewhere).toEqual([false, true]);
  });

  it('finds a window narrower than a cell of the scan by the slopes beside it', () => {
    const answer = sizeOver({ from: 0, to: 1, scale: 'linear', points: 9 }, (v) => [0.01 - Math.abs(v - 0.3123)]);
    expect(answer.intervals).toHaveLength(1);
    expect(answer.intervals[0].from.value).toBeCloseTo(0.3023, 3);
    expect(answer.intervals[0].to.value).toBeCloseTo(0.3223, 3);
  });

  it('finds a gap narrower than a cell of the scan', () => {
    const answer = sizeOver({ from: 0, to: 1, scale: 'linear', points: 9 }, (v) => [Math.abs(v - 0.7071) - 0.004, 1]);
    expect(answer.intervals).toHaveLength(2);
    expect(answer.intervals[0].to.value).toBeCloseTo(0.7031, 3);
    expect(answer.intervals[1].from.value).toBeCloseTo(0.7111, 3);
  });

  it('never counts a value without an answer as met', () => {
    const answer = sizeOver({ from: 1, to: 100, scale: 'log' }, (v) => [v < 10 ? 1 : null]);
    expect(answer.intervals).toHaveLength(1);
    expect(answer.intervals[0].to.reason).toBe('no answer');
    expect(answer.intervals[0].to.value).toBeLessThan(10);
    expect(answer.intervals[0].to.value).toBeGreaterThan(10 * (1 - 2e-4));
    const nowhere = sizeOver({ from: 1, to: 100, scale: 'log' }, () => [null, 1]);
    expect(nowhere.best).toBeNull();
    expect(nowhere.blockers).toEqual([0]);
  });

  it('gives the whole range where everything is met, and where nothing is asked', () => {
    for (const scores of [[1], []]) {
      const { intervals, blockers } = sizeOver({ from: 2, to: 3, scale: 'linear' }, () => scores);
      expect(intervals.map((i) => [i.from.value, i.to.value, i.from.reason, i.to.reason])).toEqual([[2, 3, 'range', 'range']]);
      expect(blockers).toEqual([]);
    }
  });

  it('asks for one value at a time', () => {
    const search = sizing({ from: 0, to: 1, scale: 'linear', points: 2 });
    const step = search.next();
    expect(step).toEqual({ done: false, value: 0 });
    expect(search.next([1])).toEqual({ done: false, value: 1 });
  });

  it('refuses a range that is none', () => {
    const scores = (): number[] => [1];
    expect(() => sizeOver({ from: 1, to: 1, scale: 'linear' }, scores)).toThrow(RangeError);
    expect(() => sizeOver({ from: 0, to: 1, scale: 'log' }, scores)).toThrow(RangeError);
    expect(() => sizeOver({ from: 0, to: Infinity, scale: 'linear' }, scores)).toThrow(RangeError);
    expect(() => sizeOver({ from: 0, to: 1, scale: 'linear', points: 1 }, scores)).toThrow(RangeError);
  });
});
