import { describe, expect, it } from 'vitest';
import type { Design } from '../../src/design/types.ts';
import { removeLayer, setTemperature, setThickness } from '../../src/state/commands/index.ts';
import { History, type HistoryRecord } from '../../src/state/history.ts';
import { designAt, revisionsOf } from '../../src/state/revisions.ts';
import { designFixture } from './design-fixture.ts';

const first = designFixture();
const designs: Design[] = [first, setThickness(first, 0, '55 nm')];
designs.push(removeLayer(designs[1], 1), setTemperature(removeLayer(designs[1], 1), '77 K'));
const labels = ['thickness of cap', 'spacer taken out', 'temperature'];
const kept = new History();
labels.forEach((label, i) => kept.record(designs[i], designs[i + 1], label));
const variant = { design: designs[3], history: kept.toRecord() };

describe('revisions of a variant', () => {
  it('are the steps that undo remembers, the earliest first', () => {
    expect(revisionsOf(variant)).toEqual([{ steps: 0, label: null }, ...labels.map((label, i) => ({ steps: i + 1, label }))]);
    expect(revisionsOf({ history: { past: [], future: [] } })).toEqual([{ steps: 0, label: null }]);
  });

  it('hold each the design as it was then', () => {
    for (const [steps, design] of designs.entries()) expect(designAt(variant, steps)).toEqual(design);
    expect(designAt(variant, 99)).toBe(variant.design);
  });

  it('follow an undo: what was taken back is no revision', () => {
    const undone = new History();
    undone.restore(variant.history);
    const design = undone.undo(variant.design)!;
    const now = { design, history: undone.toRecord() };
    expect(revisionsOf(now).map(({ label }) => label)).toEqual([null, ...labels.slice(0, 2)]);
    expect(designAt(now, 1)).toEqual(designs[1]);
  });

  it('of a history that is mixed up are none, or lead nowhere, and nothing throws', () => {
    expect(revisionsOf({ history: { past: 'x' } as unknown as HistoryRecord })).toHaveLength(1);
    const step = (changes: unknown): HistoryRecord => ({ past: [{ label: 'x', changes: changes as never }], future: [] });
    expect(designAt({ design: first, history: step([{ path: ['title'], before: 'a', after: 'not the title' }]) }, 0)).toBeNull();
    expect(designAt({ design: first, history: step([{ path: ['layers'], before: 7, after: first.layers }]) }, 0)).toBeNull();
    expect(designAt({ design: first, history: step([{ path: [], after: first }]) }, 0)).toBeNull();
  });
});
