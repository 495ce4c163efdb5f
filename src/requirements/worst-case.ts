import type { Point, Reading } from './point.ts';
import { seeded } from './random.ts';

export interface WorstCaseOptions {
  /** with at most so many uncertainties all corners are solved; default 6 */ mostFactorial?: number;
  /** points inside that check the corners; default 32 */ samples?: number;
  /** of those points; default 1 */ seed?: number;
  /** temperatures between the ends; default 3 */ inside?: number;
}

/** The worst of one requirement over a temperature range and all tolerances. */
export interface WorstCase {
  /** null where there was a figure nowhere */ reading: Reading | null;
  /** how far the score moves where an uncertainty is put to its other end; 0 where that is the mesh's noise [uncertainties] */ effects: number[];
  /** no point inside was worse than the corners and the temperatures between the ends */ cornersSufficed: boolean;
  /** points without an answer; what is not known is not met */ unanswered: Reading[];
}

/** What is searched: something that can be read at points, with a number of uncertainties. PointSolver is one. */
export interface Readable {
  readonly evaluations: number;
  readonly uncertainties: readonly unknown[];
  at(point: Point): Reading;
  /** whether a point has been read already */ has(point: Point): boolean;
}

/** Solves so far, and how many are expected in all. */
export interface Progress {
  done: number;
  of: number;
}

/** Scores closer than this are the mesh's doing (1e-5 V of psi is 4e-4 kT), not a worse point. */
export const NOISE = 2e-3;
const MOST_ROUNDS = 8;
/** Uncertainties that are flipped in pairs. */
const MOST_PAIRED = 6;
/** Steps of the search from a point inside that turned out worse, and the share of the range at which it ends. */
const FIRST_STEP = 0.25;
const LAST_STEP = 0.02;

/**
 * The worst case of some requirements that are held over the same temperatures. Corners first: all of them where there are few uncertainties, else each
 * direction by itself, then the corner of all bad directions, then flips of one at a time while they make it worse. Temperatures between the ends
 * are tried at the corners that were bad at the ends. Then points inside, drawn with a seed; where one is worse, the search goes on from there.
 *
 * @param rows          indices of the requirements in the solver's list
 * @param temperatures  the ends, K; one value where they do not range
 * @param nominal       the design's own temperature, K
 */
export function* worstCases(solver: Readable, rows: readonly number[], temperatures: readonly number[], nominal: number, options: WorstCaseOptions = {}): Generator<Progress, WorstCase[]> {
  const { mostFactorial = 6, samples = 32, seed = 1, inside = 3 } = options;
  const k = solver.uncertainties.length;
  const [coldest, hottest] = [temperatures[0], temperatures[temperatures.length - 1]];
  const ends = coldest === hottest ? [coldest] : [coldest, hottest];
  const between = ends.length < 2 ? [] : temperaturesBetween(coldest, hottest, nominal, inside);
  const zero = new Array<number>(k).fill(0);
  const seen: Reading[] = [];
  const from = solver.evaluations;
  let expected = (ends.length * (k <= mostFactorial ? 2 ** k : 1 + 4 * k) + between.length * (2 + rows.length) + (k > 0 || ends.length > 1 ? samples : 0));
  const ask = function* (point: Point): Generator<Progress, Reading> {
    const fresh = !solver.has(point);
    const reading = solver.at(point);
    seen.push(reading);
    if (fresh) {
      const done = solver.evaluations - from;
      expected = Math.max(expected, done + 1);
      yield { done, of: expected };
    }
    return reading;
  };
  const worstOf = (row: number, among: readonly Reading[] = seen): Reading | null => among.reduce<Reading | null>((worst, r) => (lower(r.scores[row], worst?.scores[row]) ? r : worst), null);

  for (const temperature of ends) {
    yield* ask({ temperature, counts: zero });
    if (k === 0) continue;
    if (k <= mostFactorial) for (let corner = 0; corner < 2 ** k; corner++) yield* ask({ temperature, counts: zero.map((_, i) => (corner & (1 << i) ? 1 : -1)) });
    else {
      const single = (i: number, count: number): Point => ({ temperature, counts: zero.map((_, j) => (j === i ? count : 0)) });
      for (let i = 0; i < k; i++) for (const count of [-1, 1]) yield* ask(single(i, count));
      for (const row of rows) {
        const counts = zero.map((_, i) => {
          const [minus, plus] = [solver.at(single(i, -1)).scores[row], solver.at(single(i, 1)).scores[row]];
          return lower(plus, minus) ? 1 : -1;
        });
        yield* descend(row, yield* ask({ temperature, counts }), ask);
      }
    }
  }
  for (const temperature of between) yield* ask({ temperature, counts: zero });
  for (const row of rows) {
    const corners = new Map<string, readonly number[]>();
    for (const end of ends) {
      const worst = worstOf(row, seen.filter((r) => r.point.temperature === end));
      if (worst) corners.set(worst.point.counts.join(), worst.point.counts);
    }
    for (const temperature of between) for (const counts of corners.values()) yield* ask({ temperature, counts });
    const worst = worstOf(row);
    if (worst && between.includes(worst.point.temperature)) yield* descend(row, worst, ask);
  }

  const atCorners = rows.map((row) => worstOf(row));
  if (k > 0 || ends.length > 1) {
    const random = seeded(seed);
    for (let s = 0; s < samples; s++) yield* ask({ temperature: coldest + (hottest - coldest) * random(), counts: zero.map(() => 2 * random() - 1) });
  }
  const out: WorstCase[] = [];
  for (const [i, row] of rows.entries()) {
    const sampled = worstOf(row);
    const cornersSufficed = sampled === null || !lower((sampled.scores[row] as number) + NOISE, atCorners[i]?.scores[row]);
    const start = cornersSufficed ? atCorners[i] : sampled;
    // Between the ends the worst temperature is on no grid.
    if (start && (!cornersSufficed || between.includes(start.point.temperature))) yield* search(row, start, { coldest, hottest, counts: !cornersSufficed }, ask);
    const reading = worstOf(row);
    const effects: number[] = [];
    for (let u = 0; u < k; u++) {
      if (reading === null || reading.point.counts[u] === 0) effects.push(0);
      else {
        const { temperature, counts } = reading.point;
        const other = (yield* ask({ temperature, counts: counts.map((c, j) => (j === u ? -c : c)) })).scores[row];
        const effect = other === null ? Infinity : Math.abs(other - (reading.scores[row] as number));
        effects.push(effect > NOISE ? effect : 0);
      }
    }
    out.push({ reading, effects, cornersSufficed, unanswered: [...new Set(seen.filter((r) => r.scores[row] === null))] });
  }
  return out;
}

type Ask = (point: Point) => Generator<Progress, Reading>;

/**
 * Flips one uncertainty after the other while that makes the requirement worse, then those that count most in pairs: two that only together are bad show in
 * no single flip. Points without a score are never taken for worse.
 */
function* descend(row: number, start: Reading, ask: Ask): Generator<Progress, void> {
  let worst = start;
  const flipped = (flips: readonly number[], count: number): Point => ({ temperature: worst.point.temperature, counts: worst.point.counts.map((c, j) => (flips.includes(j) ? (c === 0 ? count : -c) : c)) });
  // What moved nothing in one round is left alone in the next.
  let tried = [...start.point.counts.keys()];
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const before = worst;
    const effects = new Map<number, number>();
    for (const i of tried) {
      for (const count of worst.point.counts[i] === 0 ? [-1, 1] : [1]) {
        const other = yield* ask(flipped([i], count));
        effects.set(i, Math.abs((other.scores[row] ?? 0) - (worst.scores[row] ?? 0)));
        if (lower(other.scores[row], worst.scores[row])) worst = other;
      }
    }
    tried = tried.filter((i) => (effects.get(i) as number) > NOISE);
    if (worst !== before) continue;
    const strong = [...tried].sort((a, b) => (effects.get(b) as number) - (effects.get(a) as number)).slice(0, MOST_PAIRED);
    for (const [k, i] of strong.entries()) {
      for (const j of strong.slice(k + 1)) {
        const other = yield* ask(flipped([i, j], 1));
        if (lower(other.scores[row], worst.scores[row])) worst = other;
      }
    }
    if (worst === before) return;
  }
}

/** Pattern search (Hooke and Jeeves, J. ACM 8, 212, 1961, without its pattern move) for a lower score inside the ranges. */
function* search(row: number, start: Reading, box: { coldest: number; hottest: number; counts: boolean }, ask: Ask): Generator<Progress, void> {
  let worst = start;
  const axes = [-1, ...(box.counts ? start.point.counts.keys() : [])];
  for (let step = FIRST_STEP; step > LAST_STEP; step /= 2) {
    for (const axis of axes) {
      for (const sign of [-1, 1]) {
        const { temperature, counts } = worst.point;
        const to = axis < 0 ? { temperature: clamp(temperature + sign * step * (box.hottest - box.coldest), box.coldest, box.hottest), counts } : { temperature, counts: counts.map((c, i) => (i === axis ? clamp(c + 2 * sign * step, -1, 1) : c)) };
        const tried = yield* ask(to);
        if (lower(tried.scores[row], worst.scores[row])) {
          worst = tried;
          break;
        }
      }
    }
  }
}

/** Equal parts of the range, and the design's own temperature where it lies inside. */
function temperaturesBetween(coldest: number, hottest: number, nominal: number, inside: number): number[] {
  const out = Array.from({ length: inside }, (_, i) => coldest + ((hottest - coldest) * (i + 1)) / (inside + 1));
  if (nominal > coldest && nominal < hottest) out.push(nominal);
  return out.sort((a, b) => a - b);
}

function lower(a: number | null | undefined, b: number | null | undefined): boolean {
  return a !== null && a !== undefined && (b === null || b === undefined || a < b);
}

const clamp = (x: number, low: number, high: number): number => Math.min(high, Math.max(low, x));
