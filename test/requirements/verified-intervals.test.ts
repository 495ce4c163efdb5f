import { describe, expect, it } from 'vitest';
import { verifiedIntervals } from '../../src/requirements/verified-intervals.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import type { SizingEdge } from '../../solver/sizing.ts';
import type { SizingNode } from '../../solver/sizing-nodes.ts';

const edge = (value: number, reason: SizingEdge['reason'] = 'requirement'): SizingEdge => ({ value, reason, binding: 0, beyond: null, search: null });
const node = (value: number): SizingNode => ({ u: value / 10, value, scores: [1], least: 1, binding: 0 });
/** Two requirements, of which the second fails where `holds` says so. */
function verified(holds: (value: number) => boolean, known: readonly number[]) {
  const asked: number[] = [];
  const rows = (value: number): RequirementResult[] => [{ met: true }, { met: holds(value) }] as RequirementResult[];
  const judgedNow = new Set(known);
  const steps = verifiedIntervals(
    { intervals: [{ from: edge(2), to: edge(8, 'range') }], nodes: Array.from({ length: 11 }, (_, v) => node(v)) },
    (value) => (judgedNow.has(value) ? rows(value) : null),
    function* (value) {
      asked.push(value);
      judgedNow.add(value);
      yield value;
      return rows(value);
    },
  );
  let step = steps.next();
  while (!step.done) step = steps.next();
  return { intervals: step.value.map(({ from, to }) => [from.value, to.value]), edges: step.value, asked };
}

describe('ends of a sized interval', () => {
  it('stand as they were found where the full judgement agrees', () => {
    const { edges, asked } = verified(() => true, [2, 4, 6, 8]);
    expect(edges).toEqual([{ from: edge(2), to: edge(8, 'range') }]);
    expect(asked).toEqual([]);
  });

  it('are drawn in to a value that holds when it is judged in full', () => {
    const { intervals, edges, asked } = verified((value) => value >= 4 && value < 8, [2, 8]);
    expect(intervals).toEqual([[4, 7]]);
    expect(asked).toEqual([3, 4, 7]);
    expect(edges[0].from).toMatchObject({ reason: 'requirement', binding: 1, beyond: 3 });
    expect(edges[0].to).toMatchObject({ reason: 'requirement', binding: 1, beyond: 8 });
  });

  it('come in pairs where a value inside fails', () => {
    expect(verified((value) => value !== 5, [2, 5, 8]).intervals).toEqual([[2, 4], [6, 8]]);
  });

  it('are none where nothing holds', () => {
    expect(verified(() => false, [2, 8]).intervals).toEqual([]);
  });
});
