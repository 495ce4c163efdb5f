import { expect } from 'chai';
import { deleteDB } from 'idb';
import { writeDesign } from '../../src/design/write.ts';
import * as commands from '../../src/state/commands/index.ts';
import { Session } from '../../src/state/session.ts';
import { Keeper } from '../../src/storage/keeper.ts';
import { leaveLastWords } from '../../src/storage/last-words.ts';
import { openDatabase } from '../../src/storage/database.ts';
import { ProjectStore } from '../../src/storage/project-store.ts';
import { recordFault } from '../../src/storage/record.ts';
import { designFixture } from '../state/design-fixture.ts';
import { Faults, FAULTS, type Fault } from './faults.ts';

let name: string;
let count = 0;
let ends: (() => Promise<void>)[];
let faults: Faults | null;

/** One tab: a session, its keeper and its own connection. */
function tab() {
  const store = new ProjectStore(() => {}, name);
  const session = new Session(designFixture(), async () => ({ kind: 'dropped' }));
  const keeper = new Keeper(session, store, name);
  const leave = async (): Promise<void> => {
    await keeper.close();
    await store.close();
  };
  ends.push(leave);
  const retitle = (title: string): void => void session.edit(commands.setTitle(session.design, title), title);
  return { store, session, keeper, retitle, leave };
}
type Tab = ReturnType<typeof tab>;

/** Every whole project as "name: title of its design", and how many records are not whole. */
async function kept(): Promise<{ projects: string[]; broken: number }> {
  const db = await openDatabase(name, () => {});
  const values = await db.getAll('projects');
  db.close();
  const good = values.filter((value) => recordFault(value) === null) as { name: string; designText: string }[];
  return { projects: good.map((record) => `${record.name}: ${JSON.parse(record.designText).title}`).sort(), broken: values.length - good.length };
}

/** Tries again what did not come about, as a person would. */
async function insist(act: () => Promise<{ ok: boolean } | void>): Promise<void> {
  for (let i = 0; i < 3; i++) {
    const outcome = await act().catch(() => ({ ok: false }));
    if (outcome === undefined || outcome.ok) return;
  }
  throw new Error('it did not come about in three tries');
}

/** A visit with every kind of write in it. */
async function visit({ keeper, store, retitle }: Tab): Promise<void> {
  await insist(() => keeper.create('first', designFixture()));
  retitle('a');
  await keeper.flush();
  await keeper.rename('renamed');
  retitle('b');
  await insist(() => keeper.create('second', designFixture()));
  retitle('c');
  await keeper.flush();
  const first = (await store.list()).find((entry) => entry.name !== 'second')!;
  await insist(() => store.bin(first.id));
  await insist(() => store.takeOutOfBin(first.id));
  await insist(() => keeper.open(first.id));
  retitle('d');
  await keeper.flush();
}
const WHOLE = ['renamed: d', 'second: c'];

describe('whatever goes wrong with a write', () => {
  beforeEach(() => {
    name = `faults-${Date.now()}-${count++}`;
    ends = [];
    faults = null;
  });
  afterEach(async () => {
    faults?.mend();
    for (const end of ends) await end();
    await deleteDB(name);
    for (const key of Object.keys(localStorage)) if (key.startsWith('halfmark:unsaved:')) localStorage.removeItem(key);
  });

  /** One visit in which writes go wrong; a fresh database each. */
  async function tryVisit(fault: Fault, wrong: (write: number) => boolean): Promise<Tab> {
    name = `faults-${Date.now()}-${count++}`;
    faults = new Faults(fault, wrong);
    const one = tab();
    await visit(one);
    return one;
  }
  async function end(one: Tab): Promise<void> {
    await one.leave();
    ends = [];
    await deleteDB(name);
  }

  for (const fault of FAULTS) {
    it(`nothing is lost when the k-th write is ${fault}, for every k`, async () => {
      const one = await tryVisit(fault, () => false);
      const writes = faults!.writes;
      faults!.mend();
      expect((await kept()).projects).to.deep.equal(WHOLE);
      await end(one);
      expect(writes).to.be.greaterThan(10);
      for (let k = 0; k < writes; k++) {
        const tried = await tryVisit(fault, (write) => write === k);
        faults!.mend();
        expect(faults!.happened, `write ${k}`).to.equal(1);
        await tried.keeper.flush();
        expect(tried.keeper.saving.kind, `write ${k}`).to.equal('saved');
        expect(await kept(), `write ${k}`).to.deep.equal({ projects: WHOLE, broken: 0 });
        // Undo came through as well.
        const next = tab();
        await next.keeper.openLast();
        const open = (await next.store.list()).find((entry) => entry.name === 'renamed')!;
        await next.keeper.open(open.id);
        expect(next.session.undo(), `write ${k}`).to.equal('d');
        expect(next.session.design.title, `write ${k}`).to.equal('b');
        await next.leave();
        await end(tried);
      }
    }).timeout(60_000);

    it(`the page keeps the work, says so, and the next visit has it, when every write from the k-th on is ${fault}`, async () => {
      for (let k = 0; k < 6; k++) {
        name = `faults-${Date.now()}-${count++}`;
        faults = new Faults(fault, (write) => write >= k);
        const one = tab();
        await one.keeper.create('first', designFixture());
        one.retitle('a');
        await one.keeper.flush();
        one.retitle('b');
        await one.keeper.flush();
        expect(one.session.design.title).to.equal('b');
        if (one.keeper.saving.kind !== 'saved') expect(one.keeper.atRisk, `from write ${k}`).to.equal(true);
        await one.leave();
        faults.mend();
        const next = tab();
        expect((await next.keeper.openLast()).ok, `from write ${k}`).to.equal(true);
        expect(next.session.design.title, `from write ${k}`).to.equal('b');
        await next.keeper.flush();
        expect(await kept(), `from write ${k}`).to.deep.equal({ projects: [`${next.keeper.project.name}: b`], broken: 0 });
        await next.leave();
        await end(one);
      }
    }).timeout(60_000);
  }

  it('what a dead tab had not saved yet survives until it is saved, however often the next visit dies as well', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const { id, revision } = one.keeper.project;
    leaveLastWords({ id: id!, revision, designText: writeDesign(commands.setTitle(designFixture(), 'in the last second')) }, 'dead tab');
    for (let visitNumber = 0; visitNumber < 3; visitNumber++) {
      const store = new ProjectStore(() => {}, name);
      const session = new Session(designFixture(), async () => ({ kind: 'dropped' }));
      // It reads, and is gone before it has written: nothing of it is closed in order.
      faults = new Faults('refused', () => true);
      expect(await new Keeper(session, store, `${name}-${visitNumber}`).openLast()).to.deep.equal({ ok: true, recovered: true });
      expect(session.design.title).to.equal('in the last second');
      faults.mend();
      await store.close();
    }
    const last = tab();
    await last.keeper.openLast();
    await last.keeper.flush();
    expect((await kept()).projects).to.include('cell: in the last second');
  });

  /** A tab whose database does what it is asked to, and whose page dies before it hears so. */
  function dyingTab() {
    const store = new (class extends ProjectStore {
      override async createAll(...given: Parameters<ProjectStore['createAll']>): Promise<never> {
        await super.createAll(...given);
        return new Promise(() => {});
      }
    })(() => {}, name);
    const session = new Session(designFixture(), async () => ({ kind: 'dropped' }));
    return { session, store, keeper: new Keeper(session, store, `${name}-dying`) };
  }
  const untilKept = async (count: number): Promise<void> => {
    for (let i = 0; i < 200 && (await kept()).projects.length < count; i++) await new Promise((done) => setTimeout(done, 5));
  };

  it('a tab that dies between the write of a new project and the next write leaves it once, with what was typed meanwhile', async () => {
    for (const typed of [null, 'typed meanwhile']) {
      name = `faults-${Date.now()}-${count++}`;
      const dying = dyingTab();
      void dying.keeper.create('cell', designFixture());
      await untilKept(1);
      if (typed !== null) dying.session.edit(commands.setTitle(dying.session.design, typed), 'typed');
      void dying.keeper.flush();
      await dying.store.close();
      const next = tab();
      expect(await next.keeper.openLast()).to.deep.equal({ ok: true, recovered: typed !== null });
      expect(next.session.design.title).to.equal(typed ?? designFixture().title);
      await next.keeper.flush();
      expect((await kept()).projects).to.deep.equal([`cell: ${typed ?? designFixture().title}`]);
      for (const id of ['', next.keeper.project.id]) expect(Object.keys(localStorage).filter((key) => key.startsWith(`halfmark:unsaved:${id}:`))).to.deep.equal([]);
      await end(next);
    }
  });

  it('a visit that dies while it makes a project of what a losing tab left makes one of it, not two', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    const { id } = one.keeper.project;
    await one.leave();
    leaveLastWords({ id: id!, revision: 77, designText: writeDesign(commands.setTitle(designFixture(), 'of the losing tab')) }, 'losing tab');
    const dying = dyingTab();
    void dying.keeper.openLast();
    await untilKept(2);
    await dying.store.close();
    const next = tab();
    await next.keeper.openLast();
    expect((await kept()).projects).to.deep.equal(['cell (unsaved changes): of the losing tab', 'cell: three layers']);
  });

  it('a change is written down within a blink, before the database has it', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    faults = new Faults('refused', () => true);
    one.retitle('just now');
    await new Promise((done) => setTimeout(done, 120));
    const held = Object.keys(localStorage).filter((key) => key.startsWith(`halfmark:unsaved:${one.keeper.project.id}`));
    expect(held).to.have.length(1);
    expect(localStorage.getItem(held[0])).to.contain('just now');
    faults.mend();
    await one.keeper.flush();
    expect(localStorage.getItem(held[0])).to.equal(null);
  });

  it('a name that could not be written is owed until it is', async () => {
    const one = tab();
    await one.keeper.create('first', designFixture());
    faults = new Faults('refused', () => true);
    await one.keeper.rename('renamed');
    await one.keeper.flush();
    expect(one.keeper.project.name).to.equal('renamed');
    expect(one.keeper.atRisk).to.equal(true);
    faults.mend();
    await one.keeper.flush();
    expect(one.keeper.saving.kind).to.equal('saved');
    expect((await kept()).projects).to.deep.equal(['renamed: three layers']);
  });

  it('a second tab that opens a project while a change in the first is not saved yet shows that change, and neither asks about it', async () => {
    const one = tab();
    await one.keeper.create('cell', designFixture());
    one.retitle('in flight');
    // Its last words are there, its save is not.
    await new Promise((done) => setTimeout(done, 120));
    const two = tab();
    await two.keeper.openLast();
    expect(two.session.design.title).to.equal('in flight');
    await one.keeper.flush();
    await two.keeper.flush();
    await new Promise((done) => setTimeout(done, 100));
    expect([one.keeper.saving.kind, two.keeper.saving.kind]).to.deep.equal(['saved', 'saved']);
    expect((await kept()).projects).to.deep.equal(['cell: in flight']);
  });

  it('a damaged record beside a full disk hides no other project', async () => {
    const one = tab();
    await one.keeper.create('good', designFixture());
    const db = await openDatabase(name, () => {});
    await db.put('projects', { id: 'bad', name: 'bad', designText: '{"format":"halfma' });
    await db.put('settings', 'bad', 'last');
    db.close();
    faults = new Faults('refused', () => true);
    const two = tab();
    expect((await two.keeper.openLast()).ok).to.equal(true);
    expect(two.keeper.project.name).to.equal('good');
    expect((await two.store.list()).map((entry) => entry.name)).to.deep.equal(['good']);
    faults.mend();
    // With room again it is set aside, as it was.
    await two.store.list();
    expect((await two.store.damaged()).map(({ text }) => text).join()).to.contain('halfma');
  });

  it('a project of a newer program stays where it is and is not taken for damaged', async () => {
    const one = tab();
    const { id } = await one.store.create('newer', { designText: '{"format":"halfmark-design/2","shine":1}', history: { past: [], future: [] }, view: {} });
    const opened = await one.keeper.open(id);
    expect(opened).to.have.property('ok', false);
    expect(opened).to.have.property('why').that.matches(/newer/);
    expect(await one.store.damaged()).to.deep.equal([]);
    expect((await one.store.get(id))!.designText).to.contain('shine');
  });

  it('a backup is added whole or not at all', async () => {
    const { store } = tab();
    const content = { designText: writeDesign(designFixture()), history: { past: [], future: [] }, view: {} };
    const projects = ['one', 'two', 'three'].map((wish) => ({ name: wish, content }));
    for (const fault of FAULTS) {
      for (let k = 0; k < projects.length; k++) {
        faults = new Faults(fault, (write) => write === k);
        expect(await store.createAll(projects).then(() => 'added', () => 'refused')).to.equal('refused');
        faults.mend();
        expect(await store.list()).to.deep.equal([]);
      }
    }
    await store.createAll([...projects, projects[0]]);
    expect((await store.list()).map((entry) => entry.name).sort()).to.deep.equal(['one', 'one 2', 'three', 'two']);
  });

  it('a history that was mixed up with another design leads nowhere and harms nothing', async () => {
    const one = tab();
    const { id } = await one.store.create('mixed', {
      designText: writeDesign(designFixture()),
      history: { past: [{ label: 'odd', changes: [{ path: ['title'], before: 'never was', after: 'nor this' }] }], future: [] },
      view: [] as never,
    });
    expect((await one.keeper.open(id)).ok).to.equal(true);
    expect(one.session.undo()).to.equal(null);
    expect(one.session.design).to.deep.equal(designFixture());
  });
});
