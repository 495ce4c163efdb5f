import { describe, expect, it } from 'vitest';
import type { Answer, Result } from '../../src/result/types.ts';
import * as commands from '../../src/state/commands/index.ts';
import { Session, type SolveOutcome } from '../../src/state/session.ts';
import { designFixture } from './design-fixture.ts';

/** A result that is told apart by its title; what is in it does not matter to the session. */
const result = (title: string) => ({ title }) as Result;
const solved = (title: string): SolveOutcome => ({ kind: 'answered', answer: { kind: 'result', result: result(title) } });
const answered = (answer: Answer): SolveOutcome => ({ kind: 'answered', answer });

/** A session whose solver answers when the test says so. */
function rig() {
  const asked: { title: string; answer: (outcome: SolveOutcome) => Promise<void>; fail: (error: Error) => Promise<void> }[] = [];
  const session = new Session(designFixture(), (design) => {
    let resolve!: (outcome: SolveOutcome) => void;
    let reject!: (error: Error) => void;
    const promise = new Promise<SolveOutcome>((yes, no) => ([resolve, reject] = [yes, no]));
    const settled = async () => void (await Promise.allSettled([promise]), await Promise.resolve());
    asked.push({ title: design.title, answer: (outcome) => (resolve(outcome), settled()), fail: (error) => (reject(error), settled()) });
    return promise;
  });
  const retitle = (title: string) => session.edit(commands.setTitle(session.design, title), 'title');
  return { session, asked, retitle };
}

describe('a session', () => {
  it('asks the solver when it opens a design and shows what comes', async () => {
    const { session, asked } = rig();
    expect(session.findings.status).toBe('initial');
    session.open(designFixture());
    expect(session.findings.status).toBe('pending');
    await asked[0].answer(solved('a'));
    expect(session.findings).toEqual({ status: 'complete', result: result('a'), stale: false, complaints: [], refusal: null });
  });

  it('marks the shown result stale from the edit on until the new one is in', async () => {
    const { session, asked, retitle } = rig();
    session.open(designFixture());
    await asked[0].answer(solved('a'));
    retitle('b');
    expect(session.findings).toMatchObject({ status: 'pending', stale: true, result: { title: 'a' } });
    await asked[1].answer(solved('b'));
    expect(session.findings).toMatchObject({ status: 'complete', stale: false, result: { title: 'b' } });
  });

  it('keeps the last good result beside the reason why the present design has none', async () => {
    const { session, asked, retitle } = rig();
    session.open(designFixture());
    await asked[0].answer(solved('a'));
    retitle('b');
    await asked[1].answer(answered({ kind: 'complaints', complaints: [{ path: 'layers[0].thickness', message: 'no' }] }));
    expect(session.findings).toMatchObject({ status: 'error', stale: true, result: { title: 'a' }, complaints: [{ path: 'layers[0].thickness' }], refusal: null });
    retitle('c');
    await asked[2].answer(answered({ kind: 'refused', reason: 'mesh error too large' }));
    expect(session.findings).toMatchObject({ status: 'error', stale: true, result: { title: 'a' }, complaints: [], refusal: 'mesh error too large' });
    retitle('d');
    await asked[3].answer(solved('d'));
    expect(session.findings).toMatchObject({ status: 'complete', stale: false, refusal: null });
  });

  it('shows a result that was overtaken as stale, and never an older one after a newer one', async () => {
    const { session, asked, retitle } = rig();
    session.open(designFixture());
    retitle('b');
    retitle('c');
    await asked[1].answer(solved('b'));
    expect(session.findings).toMatchObject({ status: 'pending', stale: true, result: { title: 'b' } });
    await asked[0].answer(solved('a'));
    expect(session.findings.result?.title).toBe('b');
    await asked[2].answer(solved('c'));
    expect(session.findings).toMatchObject({ status: 'complete', stale: false, result: { title: 'c' } });
  });

  it('keeps the same layer chosen when undo and redo move it', () => {
    const { session } = rig();
    session.open(designFixture());
    const { name } = session.design.layers[0];
    session.edit(commands.moveLayer(session.design, 0, 1), 'layer moved');
    session.changeMoment({ chosen: { kind: 'layer', index: 1 } });
    session.undo();
    expect(session.design.layers[0].name).toBe(name);
    expect(session.moment.chosen).toEqual({ kind: 'layer', index: 0 });
    session.redo();
    expect(session.moment.chosen).toEqual({ kind: 'layer', index: 1 });
  });

  it('leaves the choice where it is when undo takes a name back', () => {
    const { session } = rig();
    session.open(designFixture());
    session.changeMoment({ chosen: { kind: 'layer', index: 1 } });
    session.edit(commands.renameLayer(session.design, 1, 'another'), 'name');
    session.undo();
    expect(session.moment.chosen).toEqual({ kind: 'layer', index: 1 });
  });

  it('ignores complaints about a design that is no longer the present one', async () => {
    const { session, asked, retitle } = rig();
    session.open(designFixture());
    retitle('b');
    await asked[0].answer(answered({ kind: 'refused', reason: 'old' }));
    expect(session.findings).toMatchObject({ status: 'pending', refusal: null });
  });

  it('drops answers that belong to the project that was open before', async () => {
    const { session, asked } = rig();
    session.open(designFixture());
    session.open({ ...designFixture(), title: 'other' });
    await asked[0].answer(solved('old project'));
    expect(session.findings.result).toBeNull();
    await asked[1].answer(solved('other'));
    expect(session.findings.result?.title).toBe('other');
  });

  it('says so when solving was stopped or when the program failed', async () => {
    const { session, asked } = rig();
    session.open(designFixture());
    await asked[0].answer({ kind: 'dropped' });
    expect(session.findings).toMatchObject({ status: 'error', refusal: expect.stringContaining('stopped') });
    session.askAgain();
    await asked[1].fail(new Error('out of range'));
    expect(session.findings).toMatchObject({ status: 'error', refusal: expect.stringContaining('out of range') });
  });

  it('takes back and does again in words, and asks the solver each time', () => {
    const { session, asked, retitle } = rig();
    session.open(designFixture());
    retitle('b');
    expect(session.undo()).toBe('title');
    expect(session.design).toEqual(designFixture());
    expect(session.redo()).toBe('title');
    expect(session.design.title).toBe('b');
    expect(asked.map(({ title }) => title)).toEqual(['three layers', 'b', 'three layers', 'b']);
    expect(session.redo()).toBeNull();
  });

  it('neither asks nor remembers when an edit changes nothing', () => {
    const { session, asked } = rig();
    session.open(designFixture());
    expect(session.edit(designFixture(), 'nothing')).toBe(false);
    expect(asked).toHaveLength(1);
    expect(session.undoLabel).toBeNull();
  });

  it('keeps the view out of undo and lets go of a choice that is no longer there', () => {
    const { session } = rig();
    session.open(designFixture(), { view: { depth: 'true' } });
    session.changeMoment({ chosen: { kind: 'layer', index: 2 } });
    session.edit(commands.removeLayer(session.design, 0), 'remove');
    expect(session.moment.chosen).toBeNull();
    session.changeView({ depth: 'even', window: undefined });
    session.undo();
    expect(session.view).toEqual({ depth: 'even' });
  });

  it('goes on undoing after a reload', () => {
    const { session, retitle } = rig();
    session.open(designFixture());
    retitle('b');
    const kept = JSON.parse(JSON.stringify({ design: session.design, history: session.historyRecord }));
    const later = rig().session;
    later.open(kept.design, { history: kept.history });
    expect(later.undo()).toBe('title');
    expect(later.design).toEqual(designFixture());
  });
});
