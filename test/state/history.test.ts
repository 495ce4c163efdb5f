import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as commands from '../../src/state/commands/index.ts';
import { BURST_MS, History } from '../../src/state/history.ts';
import type { Design } from '../../src/design/types.ts';
import { designFixture } from './design-fixture.ts';

/** Edits with arbitrary arguments, each valid for any design that the others can lead to. */
const edits = fc.array(
  fc.record({
    what: fc.constantFrom('thickness', 'insert', 'remove', 'move', 'rename', 'title', 'range', 'contact', 'dopant', 'temperature'),
    a: fc.nat(20),
    b: fc.nat(20),
    text: fc.constantFrom('10 nm', '20 nm', 'Ncap', '3e17 cm^-3'),
    join: fc.option(fc.constantFrom('drag', 'type'), { nil: undefined }),
    wait: fc.constantFrom(10, BURST_MS * 2),
  }),
  { maxLength: 40 },
);
type Edit = { what: string; a: number; b: number; text: string };

function edited(design: Design, { what, a, b, text }: Edit): Design {
  const n = design.layers.length;
  switch (what) {
    case 'thickness':
      return commands.setThickness(design, a % n, text);
    case 'insert':
      return commands.insertLayer(design, a % (n + 1), { name: 'new', material: 'GaAs', thickness: text });
    case 'remove':
      return commands.removeLayer(design, a % n);
    case 'move':
      return commands.moveLayer(design, a % n, b % n);
    case 'rename':
      return commands.renameLayer(design, a % n, `layer ${b}`);
    case 'title':
      return commands.setTitle(design, text);
    case 'range':
      return commands.setTemperatureRange(design, b % 2 ? ['0 degC', text] : undefined);
    case 'contact':
      return commands.setContact(design, b % 2 ? 'top' : 'bottom', a % 2 ? { kind: 'neutral' } : { kind: 'pinned', level: text });
    case 'dopant':
      return commands.addDopant(design, a % n, { dopant: 'Si', concentration: text });
    default:
      return commands.setTemperature(design, text);
  }
}

describe('undo and redo', () => {
  it('walk through every step of any series of edits, back and forth', () => {
    fc.assert(
      fc.property(edits, (list) => {
        let clock = 0;
        let history = new History(() => clock);
        let design = designFixture();
        // The design at each step, as undo should find it: an edit that joins replaces the last.
        const steps: Design[] = [design];
        for (const edit of list) {
          clock += edit.wait;
          const next = edited(design, edit);
          const before = history.toRecord().past.length;
          history.record(design, next, edit.what, edit.join);
          design = next;
          const after = history.toRecord().past.length;
          if (after > before) steps.push(next);
          else if (after < before) steps.pop();
          else steps[steps.length - 1] = next;
        }
        for (let round = 0; round < 2; round++) {
          for (let i = steps.length - 2; i >= 0; i--) {
            const back = history.undo(design);
            expect(back).toEqual(steps[i]);
            design = back!;
          }
          expect(history.undo(design)).toBeNull();
          // Half way through the world ends and begins again: what was written down is enough.
          const written = JSON.stringify(history.toRecord());
          history = new History(() => clock);
          history.restore(JSON.parse(written));
          for (let i = 1; i < steps.length; i++) {
            const forth = history.redo(design);
            expect(forth).toEqual(steps[i]);
            design = forth!;
          }
          expect(history.redo(design)).toBeNull();
        }
      }),
      { numRuns: 150, seed: 3 },
    );
  });

  const start = designFixture();
  const thick = (text: string) => commands.setThickness(start, 0, text);

  it('take back a whole drag as one step', () => {
    const history = new History(() => 0);
    let design = start;
    for (const text of ['41 nm', '42 nm', '43 nm']) {
      history.record(design, thick(text), 'thickness of cap', 'drag:1');
      design = thick(text);
    }
    expect(history.undo(design)).toEqual(start);
  });

  it('begin a new step when the burst is over, by time, by seal or by another key', () => {
    let clock = 0;
    const history = new History(() => clock);
    history.record(start, thick('41 nm'), 'a', 'k');
    clock += BURST_MS + 1;
    history.record(thick('41 nm'), thick('42 nm'), 'b', 'k');
    history.seal();
    history.record(thick('42 nm'), thick('43 nm'), 'c', 'k');
    history.record(thick('43 nm'), thick('44 nm'), 'd', 'other');
    expect(history.toRecord().past.map((step) => step.label)).toEqual(['a', 'b', 'c', 'd']);
  });

  it('forget a burst that ends where it began', () => {
    const history = new History(() => 0);
    history.record(start, thick('41 nm'), 'thickness', 'k');
    history.record(thick('41 nm'), start, 'thickness', 'k');
    expect(history.undoLabel).toBeNull();
    history.record(start, thick('50 nm'), 'thickness', 'k');
    expect(history.undo(thick('50 nm'))).toEqual(start);
  });

  it('do not join an edit to a step under the burst when the burst has vanished', () => {
    const history = new History(() => 0);
    const warm = commands.setTemperature(start, '310 K');
    const warmThick = commands.setThickness(warm, 0, '41 nm');
    history.record(start, warm, 'thickness', undefined);
    history.record(warm, warmThick, 'thickness', 'k');
    history.record(warmThick, warm, 'thickness', 'k');
    history.record(warm, warmThick, 'thickness', 'k');
    expect(history.undo(warmThick)).toEqual(warm);
  });

  it('skip an edit that changes nothing and keep what can be redone', () => {
    const history = new History(() => 0);
    history.record(start, thick('41 nm'), 'a');
    history.undo(thick('41 nm'));
    expect(history.record(start, designFixture(), 'nothing')).toBe(false);
    expect(history.redo(start)).toEqual(thick('41 nm'));
  });

  it('drop what could be redone when something else is done', () => {
    const history = new History(() => 0);
    history.record(start, thick('41 nm'), 'a');
    history.undo(thick('41 nm'));
    history.record(start, thick('50 nm'), 'b');
    expect(history.redoLabel).toBeNull();
    expect(history.undoLabel).toBe('b');
  });

  it('keep the newest steps when there are more than fit', () => {
    const history = new History(() => 0, { steps: 3, characters: 1e6 });
    let design = start;
    for (let i = 0; i < 10; i++) {
      history.record(design, thick(`${i} nm`), `step ${i}`);
      design = thick(`${i} nm`);
    }
    expect(history.toRecord().past.map((step) => step.label)).toEqual(['step 7', 'step 8', 'step 9']);
    expect(history.undo(design)).toEqual(thick('8 nm'));
    const small = new History(() => 0, { steps: 100, characters: 10 });
    small.record(start, thick('1 nm'), 'a');
    small.record(thick('1 nm'), thick('2 nm'), 'b');
    expect(small.toRecord().past.map((step) => step.label)).toEqual(['b']);
  });

  it('start empty from a record that is none', () => {
    const history = new History(() => 0);
    for (const bad of [null, 7, {}, { past: [{}], future: [] }, { past: [{ label: 'a', changes: [{ path: [null] }] }], future: [] }, { past: [{ label: 'a', changes: [{ path: [], at: 0 }] }], future: [] }]) {
      history.restore(bad);
      expect(history.undoLabel).toBeNull();
    }
  });

  it('lead nowhere from a design that the steps do not belong to', () => {
    const history = new History(() => 0);
    history.record(start, thick('41 nm'), 'a');
    expect(history.undo(thick('99 nm'))).toBeNull();
    expect(history.undoLabel).toBeNull();
  });
});
