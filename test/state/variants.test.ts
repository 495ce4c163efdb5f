import { describe, expect, it } from 'vitest';
import * as commands from '../../src/state/commands/index.ts';
import { Session, type SolveOutcome } from '../../src/state/session.ts';
import { addVariant, deleteVariant, loneVariant, openVariant, removeVariant, renameVariant, takeBackVariant, type VariantList } from '../../src/state/variants.ts';
import { designFixture } from './design-fixture.ts';

const names = ({ list, open }: VariantList): string[] => list.map(({ id, name, removed }) => `${id === open ? '*' : ''}${name}${removed ? ' (away)' : ''}`);
const three = (): VariantList => addVariant(addVariant(loneVariant(designFixture()), 'thick', 'b'), 'thin', 'c');

describe('the variants of a project', () => {
  it('begin with one; a copy stands behind the open one, is open, and has a name and a history of its own', () => {
    const first = loneVariant(designFixture());
    expect(names(first)).toEqual(['*base']);
    const second = addVariant({ ...first, list: [{ ...first.list[0], history: { past: [{ label: 'x', changes: [] }], future: [] } }] }, ' base ', 'b');
    expect(names(second)).toEqual(['base', '*base 2']);
    expect(second.list[1]).toMatchObject({ design: first.list[0].design, history: { past: [], future: [] } });
    expect(second.list[0].history.past).toHaveLength(1);
    expect(names(addVariant(openVariant(second, 'base'), 'thin', 'c'))).toEqual(['base', '*thin', 'base 2']);
  });

  it('are renamed to names that nobody else has, and never to nothing', () => {
    expect(names(renameVariant(three(), 'b', 'thin'))).toEqual(['base', 'thin 2', '*thin']);
    const all = three();
    expect(renameVariant(all, 'b', '  ')).toBe(all);
    expect(renameVariant(all, 'b', 'thick')).toBe(all);
  });

  it('are put away and taken back; a neighbour takes the place of the open one, and the last one stays', () => {
    const away = removeVariant(three(), 'c');
    expect(names(away)).toEqual(['base', '*thick', 'thin (away)']);
    expect(openVariant(away, 'c')).toBe(away);
    expect(names(takeBackVariant(away, 'c'))).toEqual(['base', '*thick', 'thin']);
    const lone = removeVariant(away, 'b');
    expect(names(lone)).toEqual(['*base', 'thick (away)', 'thin (away)']);
    expect(removeVariant(lone, 'base')).toBe(lone);
    expect(names(removeVariant(openVariant(three(), 'base'), 'base'))).toEqual(['base (away)', '*thick', 'thin']);
  });

  it('are deleted for good only after they were put away', () => {
    const all = three();
    expect(deleteVariant(all, 'b')).toBe(all);
    expect(names(deleteVariant(removeVariant(all, 'b'), 'b'))).toEqual(['base', '*thin']);
  });
});

describe('a session with variants', () => {
  const rig = () => {
    const asked: { title: string; settle: (outcome: SolveOutcome) => void }[] = [];
    const session = new Session(designFixture(), (design) => new Promise((settle) => asked.push({ title: design.title, settle })));
    const retitle = (title: string) => session.edit(commands.setTitle(session.design, title), `title ${title}`);
    const to = (id: string) => session.changeVariants(openVariant(session.variants, id));
    return { session, asked, retitle, to };
  };

  it('edits the open one only, and undoes within it', () => {
    const { session, retitle, to } = rig();
    retitle('first');
    session.changeVariants(addVariant(session.variants, 'other', 'b'));
    expect(session.design.title).toBe('first');
    expect(session.undoLabel).toBeNull();
    retitle('second');
    to('base');
    expect(session.design.title).toBe('first');
    expect(session.undo()).toBe('title first');
    to('b');
    expect(session.design.title).toBe('second');
    expect(session.undo()).toBe('title second');
    expect(session.design.title).toBe('first');
    to('base');
    expect(session.redo()).toBe('title first');
    expect(session.variants.list.map(({ design }) => design.title)).toEqual(['first', 'first']);
  });

  it('shows nothing of the one that was left, and keeps its view', async () => {
    const { session, asked } = rig();
    session.open(designFixture());
    session.changeView({ depth: 'true' });
    session.changeMoment({ chosen: { kind: 'layer', index: 0 } });
    session.changeVariants(addVariant(session.variants, 'other', 'b'));
    asked[0].settle({ kind: 'answered', answer: { kind: 'result', result: { title: 'late' } } } as unknown as SolveOutcome);
    await Promise.resolve();
    expect(session.findings).toMatchObject({ status: 'pending', result: null });
    expect(session.moment.chosen).toBeNull();
    expect(session.view).toEqual({ depth: 'true' });
  });

  it('solves nothing anew when a variant only gets another name, and tells of it', () => {
    const { session, asked } = rig();
    session.open(designFixture());
    const before = asked.length;
    let told = 0;
    session.addEventListener('variants', () => told++);
    session.changeVariants(renameVariant(session.variants, 'base', 'as grown'));
    expect([asked.length - before, told]).toEqual([0, 1]);
  });
});
