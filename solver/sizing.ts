import { rootSearch, type RootAnswer } from './root.ts';
import { isMet, SizingNodes, type SizingNode } from './sizing-nodes.ts';
import { suspectCell } from './sizing-refine.ts';

export interface SizingProblem {
  /** ends of the variable's range, from < to; both positive on a log scale */ from: number;
  to: number;
  scale: 'linear' | 'log';
  /** values of the first scan, both ends among them; default 25 */ points?: number;
  /** edges are closed to this: relative on a log scale, a share of the range on a linear one; default 1e-4 */ tolerance?: number;
  /** most evaluations spent on looking for what the scan missed; default 4 times `points` */ mostRefined?: number;
}

/** One end of an interval. */
export interface SizingEdge {
  /** the outermost value at which every requirement is met */ value: number;
  /** what ends the interval: the range, a requirement, or that beyond there is no answer */ reason: 'range' | 'requirement' | 'no answer';
  /** index of the requirement that is not met, or not known, just beyond; null at the end of the range */ binding: number | null;
  /** the nearest value beyond, where it is not; null at the end of the range */ beyond: number | null;
  /** how the edge was closed; null at the end of the range */ search: Pick<RootAnswer, 'evaluations' | 'reason'> | null;
}

export interface Sizing {
  /** all intervals found, in order, in which every requirement is met; an interval may be one value */ intervals: { from: SizingEdge; to: SizingEdge }[];
  /** where the least score is largest; the nearest miss where nothing is met; null where there is no answer anywhere */ best: SizingNode | null;
  /** requirements that are not met at `best`; empty where there are intervals */ blockers: number[];
  /** of each requirement by itself, whether it is met somewhere in the range */ metSomewhere: boolean[];
  /** every value that was asked, in order */ nodes: readonly SizingNode[];
  /** widest gap between neighbouring values, in the range's own measure (0..1): what is narrower can have been missed */ resolution: number;
  evaluations: number;
}

const POINTS = 25;
/** Edges are closed to this unless asked otherwise. */
export const TOLERANCE = 1e-4;
/** The refinement divides a cell of the first scan down to this share of it. */
const FINEST = 1 / 32;
/** Width, in u, to which the best point is searched. */
const BEST_WIDTH = 2e-3;
const GOLDEN = (3 - Math.sqrt(5)) / 2;

/**
 * All intervals of one variable in which every requirement is met. Nothing is taken for monotone: a scan over the range, then the cells that may hide
 * something are divided (sizing-refine.ts), then every change of verdict is closed by a bracketed root search, then the best point by golden sections.
 *
 * The search asks: it yields a value of the variable and is given the scores of the requirements there (0 at the limit, above where met, null without an
 * answer), always as many. What is narrower than `resolution` and shows in no slope can be missed, as with any finite scan.
 *
 * @throws {RangeError} a range that is none
 */
export function* sizing(problem: SizingProblem): Generator<number, Sizing, readonly (number | null)[]> {
  const { from, to, scale, points = POINTS, tolerance = TOLERANCE, mostRefined = 4 * points } = problem;
  if (!(to > from) || !Number.isFinite(to - from) || (scale === 'log' && !(from > 0))) throw new RangeError('a sizing needs a range from a lower to a higher value, both positive on a log scale');
  if (!(points >= 2) || !(tolerance > 0)) throw new RangeError('a sizing needs two points at least and a positive tolerance');
  const span = scale === 'log' ? Math.log(to / from) : to - from;
  const valueAt = (u: number): number => (u <= 0 ? from : u >= 1 ? to : scale === 'log' ? from * Math.exp(span * u) : from + span * u);
  const width = scale === 'log' ? tolerance / span : tolerance;
  const nodes = new SizingNodes();
  const searches = new Map<SizingNode, Pick<RootAnswer, 'evaluations' | 'reason'>>();
  const ask = function* (u: number): Generator<number, SizingNode, readonly (number | null)[]> {
    const value = valueAt(u);
    return nodes.add(u, value, yield value);
  };

  for (let k = 0; k < points; k++) yield* ask(k / (points - 1));
  for (let refined = 0; refined < mostRefined; refined++) {
    const c = suspectCell(nodes, FINEST / (points - 1));
    if (c < 0) break;
    yield* ask((nodes.list[c].u + nodes.list[c + 1].u) / 2);
  }
  yield* climb(nodes, ask);
  // A search may turn up further changes beside the one that it closes.
  for (let c = nextChange(nodes, width); c >= 0; c = nextChange(nodes, width)) {
    const [a, b] = [nodes.list[c], nodes.list[c + 1]];
    const search = rootSearch({ a: a.u, b: b.u, fa: signed(a), fb: signed(b), tolerance: width });
    let step = search.next();
    let last: SizingNode[] = [a, b];
    while (!step.done) {
      const node = yield* ask(step.value);
      last = [...last, node];
      step = search.next(signed(node));
    }
    const { evaluations, reason } = step.value;
    for (const node of last) searches.set(node, { evaluations, reason });
    // Two values that floating point does not tell apart end the search wider than asked for.
    if (evaluations === 0) break;
  }
  return summary(nodes, searches);
}

/** The same for scores that are at hand. */
export function sizeOver(problem: SizingProblem, scores: (value: number) => readonly (number | null)[]): Sizing {
  const search = sizing(problem);
  let step = search.next();
  while (!step.done) step = search.next(scores(step.value));
  return step.value;
}

/** Met counts as above zero, so that a score of exactly zero ends no search early. */
function signed(node: SizingNode): number {
  return node.least === 0 ? Number.MIN_VALUE : node.least;
}

function nextChange({ list }: SizingNodes, width: number): number {
  for (let c = 0; c + 1 < list.length; c++) if (isMet(list[c]) !== isMet(list[c + 1]) && list[c + 1].u - list[c].u > width) return c;
  return -1;
}

/** Golden sections around the best node: the largest least score, or the nearest miss, which may then turn out to be met. */
function* climb(nodes: SizingNodes, ask: (u: number) => Generator<number, SizingNode, readonly (number | null)[]>): Generator<number, void, readonly (number | null)[]> {
  let { best } = nodes;
  if (!Number.isFinite(best.least)) return;
  for (;;) {
    const at = nodes.list.indexOf(best);
    const below = at > 0 ? nodes.list[at - 1].u : best.u;
    const above = at + 1 < nodes.list.length ? nodes.list[at + 1].u : best.u;
    if (above - below <= BEST_WIDTH) return;
    const node = yield* ask(best.u - below > above - best.u ? best.u - GOLDEN * (best.u - below) : best.u + GOLDEN * (above - best.u));
    if (node.least > best.least) best = node;
  }
}

function summary(nodes: SizingNodes, searches: ReadonlyMap<SizingNode, Pick<RootAnswer, 'evaluations' | 'reason'>>): Sizing {
  const { list } = nodes;
  const intervals: Sizing['intervals'] = [];
  const edge = (inside: SizingNode, outside: SizingNode | undefined): SizingEdge => {
    if (outside === undefined) return { value: inside.value, reason: 'range', binding: null, beyond: null, search: null };
    return { value: inside.value, reason: outside.least === -Infinity ? 'no answer' : 'requirement', binding: outside.binding, beyond: outside.value, search: searches.get(outside) ?? searches.get(inside) ?? null };
  };
  for (let first = 0; first < list.length; first++) {
    if (!isMet(list[first])) continue;
    let last = first;
    while (last + 1 < list.length && isMet(list[last + 1])) last++;
    intervals.push({ from: edge(list[first], list[first - 1]), to: edge(list[last], list[last + 1]) });
    first = last;
  }
  const { best } = nodes;
  const answered = Number.isFinite(best.least) || best.scores.length === 0;
  let resolution = 0;
  for (let c = 0; c + 1 < list.length; c++) resolution = Math.max(resolution, list[c + 1].u - list[c].u);
  return {
    intervals,
    best: answered ? best : null,
    blockers: intervals.length > 0 ? [] : best.scores.flatMap((score, i) => (score === null || score < 0 ? [i] : [])),
    metSomewhere: best.scores.map((_, i) => list.some((node) => (node.scores[i] ?? -1) >= 0)),
    nodes: list,
    resolution,
    evaluations: list.length,
  };
}
