import type { Sizing, SizingEdge } from '../../solver/sizing.ts';
import type { RequirementResult } from '../result/types.ts';

/** Steps inwards from an end that failed its full judgement; what is still not met then is no interval that anybody should rely on. */
const MOST_STEPS = 12;

/** A value judged in full: its rows, null where the design has no reading there. May take solves. */
export type JudgeInFull<P> = (value: number) => Generator<P, readonly RequirementResult[] | null>;

/**
 * Intervals of which both ends, and every value inside that was judged in full, meet everything in that judgement. The search knows a value by the corners that were worst so far; where the full
 * judgement finds an end or a value inside wanting, the interval is drawn in, cut, or dropped.
 */
export function* verifiedIntervals<P>({ intervals, nodes }: Pick<Sizing, 'intervals' | 'nodes'>, judged: (value: number) => readonly RequirementResult[] | null, judge: JudgeInFull<P>): Generator<P, Sizing['intervals']> {
  const out: Sizing['intervals'] = [];
  for (const { from, to } of intervals) {
    const inside = nodes.map(({ value }) => value).filter((value) => value >= from.value && value <= to.value);
    // Values inside that failed cut it.
    let start = 0;
    const parts: [first: number, last: number][] = [];
    inside.forEach((value, k) => {
      const rows = judged(value);
      if (k === 0 || k === inside.length - 1 || rows === null || holds(rows)) return;
      parts.push([start, k - 1]);
      start = k + 1;
    });
    parts.push([start, inside.length - 1]);
    for (const [first, last] of parts) {
      const low = yield* end(inside.slice(first, last + 1), first === 0 ? from : null, inside[first - 1], judged, judge);
      if (low === null) continue;
      const rest = inside.slice(first, last + 1).filter((value) => value >= low.value).reverse();
      const high = yield* end(rest, last === inside.length - 1 ? to : null, inside[last + 1], judged, judge);
      if (high !== null) out.push({ from: low, to: high });
    }
  }
  return out;
}

const holds = (rows: readonly RequirementResult[] | null): boolean => rows !== null && rows.every(({ met }) => met);

/**
 * The outermost of some values, from outside in, that holds when it is judged in full.
 *
 * @param found   the end that the search found there; null where a value that failed cut the interval
 * @param before  the value beyond it that failed, where `found` is null
 */
function* end<P>(values: readonly number[], found: SizingEdge | null, before: number | undefined, judged: (value: number) => readonly RequirementResult[] | null, judge: JudgeInFull<P>): Generator<P, SizingEdge | null> {
  let beyond = before;
  for (const [step, value] of values.entries()) {
    if (step > MOST_STEPS) return null;
    const rows = judged(value) ?? (yield* judge(value));
    if (holds(rows)) {
      if (step === 0 && found !== null) return found;
      const failed = beyond === undefined ? null : judged(beyond);
      const binding = failed === null ? -1 : failed.findIndex(({ met }) => !met);
      return { value, reason: 'requirement', binding: binding < 0 ? null : binding, beyond: beyond ?? null, search: null };
    }
    beyond = value;
  }
  return null;
}
