import { expect } from 'chai';
import { deleteDB } from 'idb';
import { writeDesign } from '../../src/design/write.ts';
import * as commands from '../../src/state/commands/index.ts';
import { Session } from '../../src/state/session.ts';
import { Keeper } from '../../src/storage/keeper.ts';
import { leaveLastWords } from '../../src/storage/last-words.ts';
import { Lasting } from '../../src/storage/lasting.ts';
import { ProjectStore } from '../../src/storage/project-store.ts';
import { designFixture } from '../state/design-fixture.ts';

let name: string;
let count = 0;
let ends: (() => Promise<void>)[];

/** One tab: a session, its keeper and its own connection. */
function tab() {
  const store = new ProjectStore(() => {}, name);
  const session = new Session(designFixture(), async () => ({ kind: 'dropped' }));
  const keeper = new Keeper(session, store, name);
  ends.push(async () => {
    await keeper.close();
    await store.close();
  });
  const retitle = (title: string) => session.edit(commands.setTitle(session.design, title), 'title');
  return { store, session, keeper, retitle };
}
async function until(holds: () => boolean): Promise<void> {
  for (let i = 0; i < 400 && !holds(); i++) await new Promise((done) => setTimeout(done, 5));
  expect(holds(), String(holds)).to.equal(true);
}

describe('the keeper of the open project', () => {
  beforeEach(() => {
    name = `keeper-${Date.now()}-${count++}`;
    ends = [];
  });
  afterEach(async () => {
    for (const end of ends) await end();
    await deleteDB(name);
  });

  it('saves as one works, and the next visit goes on with design, history and view', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.retitle('second');
    one.session.changeView({ depth: 'true' });
    await until(() => one.keeper.saving.kind === 'saved' && one.keeper.project.revision > 1);
    const two = tab();
    expect(await two.keeper.openLast()).to.deep.equal({ ok: true, recovered: false });
    expect(two.keeper.project.name).to.equal('cell');
    expect(two.session.design.title).to.equal('second');
    expect(two.session.view).to.deep.equal({ depth: 'true' });
    expect(two.session.undo()).to.equal('title');
    expect(two.session.design).to.deep.equal(designFixture());
  });

  it('asks the browser to keep its storage once there is an edit to keep, not before, and tells a refusal beside the saved state', async () => {
    let asked = 0;
    const store = new ProjectStore(() => {}, name);
    const session = new Session(designFixture(), async () => ({ kind: 'dropped' }));
    const keeper = new Keeper(session, store, name, new Lasting({ persisted: async () => false, persist: async () => ++asked > 1 }));
    ends.push(async () => {
      await keeper.close();
      await store.close();
    });
    await keeper.create('cell', designFixture());
    await new Promise((done) => setTimeout(done, 20));
    expect(asked).to.equal(0);
    expect(keeper.saving).to.deep.equal({ kind: 'saved' });
    let told = 0;
    keeper.addEventListener('saving', () => (told = keeper.saving.kind === 'saved' && keeper.saving.clearable ? told + 1 : told));
    for (const title of ['one', 'two']) {
      session.edit(commands.setTitle(session.design, title), 'title');
      await keeper.flush();
      await until(() => told > 0);
    }
    expect(asked).to.equal(1);
    expect(keeper.saving).to.deep.equal({ kind: 'saved', clearable: true });
  });

  it('opens a design with a mistake in it: a mistake is no damage', async () => {
    const one = tab();
    await one.keeper.create('cell', commands.setThickness(designFixture(), 0, '200 mn'));
    const two = tab();
    expect((await two.keeper.openLast()).ok).to.equal(true);
    expect(two.session.design.layers[0].thickness).to.equal('200 mn');
  });

  it('finds nothing at a first visit', async () => {
    expect(await tab().keeper.openLast()).to.have.property('ok', false);
  });

  it('tells a tab that another one has saved, and lets it keep its own as a copy', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const two = tab();
    await two.keeper.openLast();
    one.retitle('from one');
    two.retitle('from two');
    await Promise.all([one.keeper.flush(), two.keeper.flush()]);
    const [winner, loser] = one.keeper.saving.kind === 'saved' ? [one, two] : [two, one];
    expect(loser.keeper.saving.kind).to.equal('conflict');
    // The page was hidden meanwhile: what it left behind must not come back as a third project.
    await loser.keeper.flush();
    const mine = loser.session.design.title;
    await loser.keeper.keepMineAsCopy();
    expect(loser.keeper.saving.kind).to.equal('saved');
    expect(loser.keeper.project.name).to.equal('cell (copy)');
    const titles = await Promise.all((await one.store.list()).map(async ({ id }) => JSON.parse((await one.store.get(id))!.designText).title));
    expect(titles.sort()).to.deep.equal([winner.session.design.title, mine].sort());
    await tab().keeper.open(winner.keeper.project.id!);
    expect(await one.store.list()).to.have.length(2);
    expect(loser.session.undo()).to.equal('title');
  });

  it('lets a tab take what the other one saved', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const two = tab();
    await two.keeper.openLast();
    one.retitle('from one');
    await one.keeper.flush();
    // The second tab has changed nothing, and hears of it all the same.
    await until(() => two.keeper.saving.kind === 'conflict');
    expect(await two.keeper.takeTheOther()).to.deep.equal({ ok: true, recovered: false });
    expect(two.session.design.title).to.equal('from one');
    expect(two.keeper.saving.kind).to.equal('saved');
  });

  it('makes no fuss when the other tab only looked from elsewhere', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const two = tab();
    await two.keeper.openLast();
    one.session.changeView({ depth: 'true' });
    await one.keeper.flush();
    two.retitle('from two');
    await two.keeper.flush();
    await until(() => two.keeper.saving.kind === 'saved');
    expect(JSON.parse((await one.store.get(one.keeper.project.id!))!.designText).title).to.equal('from two');
  });

  it('does not bring back a project that was deleted in another tab unless asked to', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    await one.store.bin(one.keeper.project.id!);
    await one.store.delete(one.keeper.project.id!);
    one.retitle('still here');
    await one.keeper.flush();
    expect(one.keeper.saving).to.deep.equal({ kind: 'conflict', other: null });
    expect(await one.keeper.takeTheOther()).to.have.property('ok', false);
    await one.keeper.keepMineAsCopy();
    expect(JSON.parse((await one.store.get(one.keeper.project.id!))!.designText).title).to.equal('still here');
  });

  it('takes up what the last visit had no time to save, as a step that can be undone', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const { id, revision } = one.keeper.project;
    leaveLastWords({ id: id!, revision, designText: writeDesign(commands.setTitle(designFixture(), 'in the last second')) }, 'closed tab');
    const two = tab();
    expect(await two.keeper.openLast()).to.deep.equal({ ok: true, recovered: true });
    expect(two.session.design.title).to.equal('in the last second');
    two.session.undo();
    expect(two.session.design.title).to.equal('three layers');
  });

  it('ignores last words that were saved after all', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.retitle('second');
    await one.keeper.flush();
    one.retitle('third');
    await one.keeper.flush();
    const two = tab();
    expect(await two.keeper.openLast()).to.deep.equal({ ok: true, recovered: false });
    expect(await two.store.list()).to.have.length(1);
  });

  it('makes a project of its own of what a losing tab had not saved when it was closed', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const two = tab();
    await two.keeper.openLast();
    one.retitle('from one');
    await one.keeper.flush();
    await until(() => two.keeper.saving.kind === 'conflict');
    two.retitle('from two');
    expect(two.keeper.atRisk).to.equal(true);
    await two.keeper.close();
    const three = tab();
    expect(await three.keeper.openLast()).to.deep.equal({ ok: true, recovered: false });
    const entries = await three.store.list();
    const kept = entries.find((entry) => entry.name === 'cell (unsaved changes)')!;
    expect(JSON.parse((await three.store.get(kept.id))!.designText).title).to.equal('from two');
    expect(three.session.design.title).to.equal('from one');
  });

  it('leaves last words when the page goes away before the save is through', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.retitle('late');
    const put = IDBObjectStore.prototype.put;
    IDBObjectStore.prototype.put = () => {
      throw new DOMException('gone', 'AbortError');
    };
    try {
      await one.keeper.close();
    } finally {
      IDBObjectStore.prototype.put = put;
    }
    const two = tab();
    expect(await two.keeper.openLast()).to.deep.equal({ ok: true, recovered: true });
    expect(two.session.design.title).to.equal('late');
  });

  it('keeps a project in memory while the disk is full, and saves it when there is room', async () => {
    const one = tab();
    const add = IDBObjectStore.prototype.add;
    IDBObjectStore.prototype.add = () => {
      throw new DOMException('full', 'QuotaExceededError');
    };
    try {
      await one.keeper.create('cell', designFixture());
      expect(one.keeper.saving).to.have.nested.property('failure.code', 'full');
      expect(one.session.design).to.deep.equal(designFixture());
    } finally {
      IDBObjectStore.prototype.add = add;
    }
    one.retitle('room again');
    await one.keeper.flush();
    expect(one.keeper.saving.kind).to.equal('saved');
    expect(await one.store.list()).to.have.length(1);
  });

  it('opens nothing else while what is on the page cannot be saved, unless the person lets it go', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const other = await one.store.create('other', { designText: writeDesign(designFixture()), history: { past: [], future: [] }, view: {} });
    one.retitle('unsaved');
    const put = IDBObjectStore.prototype.put;
    IDBObjectStore.prototype.put = () => {
      throw new DOMException('full', 'QuotaExceededError');
    };
    try {
      expect(await one.keeper.open(other.id)).to.include({ ok: false, unsaved: true });
      expect(await one.keeper.create('new', designFixture())).to.include({ ok: false, unsaved: true });
      expect(one.session.design.title).to.equal('unsaved');
      expect((await one.keeper.open(other.id, true)).ok).to.equal(true);
    } finally {
      IDBObjectStore.prototype.put = put;
    }
    expect(one.session.design.title).to.equal('three layers');
  });

  it('sets a project aside whose design is none, and opens the next', async () => {
    const one = tab();
    await one.keeper.create('good', designFixture());
    const bad = await one.store.create('bad', { designText: '{"format":"other/1"}', history: { past: [], future: [] }, view: {} });
    await one.store.setSetting('last', bad.id);
    const two = tab();
    expect((await two.keeper.openLast()).ok).to.equal(true);
    expect(two.keeper.project.name).to.equal('good');
    expect((await two.store.damaged())[0].text).to.contain('other/1');
  });
});
