import { expect } from 'chai';
import { deleteDB, openDB } from 'idb';
import { writeDesign } from '../../src/design/write.ts';
import { setTitle } from '../../src/state/commands/index.ts';
import { Session } from '../../src/state/session.ts';
import { addVariant, openVariant, renameVariant } from '../../src/state/variants.ts';
import { MIGRATIONS } from '../../src/storage/database.ts';
import { Keeper } from '../../src/storage/keeper.ts';
import { leaveLastWords } from '../../src/storage/last-words.ts';
import { ProjectStore } from '../../src/storage/project-store.ts';
import { designFixture } from '../state/design-fixture.ts';
import first from '../fixtures/storage-1.json' with { type: 'json' };

let name: string;
let count = 0;
let ends: (() => Promise<void>)[];

function tab() {
  const store = new ProjectStore(() => {}, name);
  const session = new Session(designFixture(), async () => ({ kind: 'dropped' }));
  const keeper = new Keeper(session, store, name);
  ends.push(async () => {
    await keeper.close();
    await store.close();
  });
  return { store, session, keeper, retitle: (title: string) => session.edit(setTitle(session.design, title), 'title') };
}
const titles = ({ variants }: Session) => variants.list.map((variant) => `${variant.id === variants.open ? '*' : ''}${variant.name}: ${variant.design.title}`);

describe('the variants of a kept project', () => {
  beforeEach(() => {
    name = `variants-${Date.now()}-${count++}`;
    ends = [];
  });
  afterEach(async () => {
    for (const end of ends) await end();
    await deleteDB(name);
  });

  it('are there after a reload, each with its own undo', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.retitle('first');
    one.session.changeVariants(addVariant(one.session.variants, 'other', 'b'));
    one.retitle('second');
    await one.keeper.flush();
    const two = tab();
    expect((await two.keeper.openLast()).ok).to.equal(true);
    expect(titles(two.session)).to.deep.equal(['base: first', '*other: second']);
    expect(two.session.undo()).to.equal('title');
    two.session.changeVariants(openVariant(two.session.variants, 'base'));
    expect(two.session.design.title).to.equal('first');
    two.session.undo();
    expect(titles(two.session)).to.deep.equal(['*base: three layers', 'other: first']);
  });

  it('are copied with the project', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.session.changeVariants(addVariant(one.session.variants, 'other', 'b'));
    await one.keeper.flush();
    const copy = (await one.store.copy(one.keeper.project.id!))!;
    await one.keeper.open(copy.id);
    expect(titles(one.session)).to.deep.equal(['base: three layers', '*other: three layers']);
  });

  it('of two tabs never overwrite each other: another name alone is somebody\'s work', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const two = tab();
    await two.keeper.openLast();
    two.session.changeVariants(renameVariant(two.session.variants, 'base', 'as grown'));
    await two.keeper.flush();
    one.retitle('mine');
    await one.keeper.flush();
    expect(one.keeper.saving.kind).to.equal('conflict');
    expect((await two.store.get(two.keeper.project.id!))!.variants![0].name).to.equal('as grown');
  });

  it('get back what a dead tab had not saved, each its own, also one that was never saved', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.session.changeVariants(addVariant(one.session.variants, 'other', 'b'));
    await one.keeper.flush();
    const { id, revision } = one.keeper.project;
    leaveLastWords({ id: id!, revision, designText: writeDesign(setTitle(designFixture(), 'in the last second')), variant: 'base' }, 'dead tab');
    const two = tab();
    expect(await two.keeper.openLast()).to.deep.equal({ ok: true, recovered: true });
    expect(titles(two.session)).to.deep.equal(['*base: in the last second', 'other: three layers']);
    await two.keeper.flush();
    leaveLastWords({ id: id!, revision: two.keeper.project.revision, designText: writeDesign(setTitle(designFixture(), 'never saved')), variant: 'z' }, 'dead tab');
    const three = tab();
    await three.keeper.openLast();
    expect(titles(three.session)).to.deep.equal(['base: in the last second', '*unsaved changes: never saved', 'other: three layers']);
  });

  it('get back an edit by a dead tab that was in another variant than the one saved as open', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.session.changeVariants(addVariant(one.session.variants, 'other', 'b'));
    await one.keeper.flush();
    one.session.changeVariants(openVariant(one.session.variants, 'base'));
    one.retitle('in the last second');
    // Its last words are there; its save never comes: the page is gone.
    await new Promise((done) => setTimeout(done, 120));
    await one.store.close();
    const two = tab();
    expect(await two.keeper.openLast()).to.deep.equal({ ok: true, recovered: true });
    expect(titles(two.session)).to.deep.equal(['*base: in the last second', 'other: three layers']);
  });

  it('get back the edits by a dead tab in each of two variants', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.session.changeVariants(addVariant(one.session.variants, 'other', 'b'));
    await one.keeper.flush();
    await one.store.close();
    // Nothing is saved from here on.
    const spoken = () => new Promise((done) => setTimeout(done, 120));
    one.retitle('edited there');
    await spoken();
    one.session.changeVariants(openVariant(one.session.variants, 'base'));
    one.retitle('and here');
    await spoken();
    const two = tab();
    expect(await two.keeper.openLast()).to.deep.equal({ ok: true, recovered: true });
    expect(titles(two.session)).to.deep.equal(['*base: and here', 'other: edited there']);
    expect((await two.store.list()).length).to.equal(1);
  });

  it('are one in a database of the first version, which is lifted without losing anything', async () => {
    const old = await openDB(name, 1, {
      upgrade(db, _from, _to, transaction) {
        void MIGRATIONS[0](db as never, transaction as never);
      },
    });
    for (const project of first.projects) await old.put('projects', project);
    for (const [key, value] of Object.entries(first.settings)) await old.put('settings', value, key);
    old.close();
    const one = tab();
    expect((await one.keeper.openLast()).ok).to.equal(true);
    expect(one.session.variants.list.map((variant) => variant.name)).to.deep.equal(['base']);
    const whole = first.projects.filter((project) => project.id !== 'odd') as { id: string; name: string }[];
    for (const project of whole) expect(await one.store.get(project.id)).to.deep.equal({ ...project, variants: [{ id: 'base', name: 'base', removed: false, kept: null }] });
    expect((await one.store.damaged()).map(({ text }) => text).join()).to.contain('keep me');
    const edited = whole.find((project) => project.name === 'three layers')!;
    await one.keeper.open(edited.id);
    expect(one.session.redo()).to.equal('thickness of first layer');
    expect(one.session.design.layers[0].thickness).to.equal('45 nm');
  });
});
