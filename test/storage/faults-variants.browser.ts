import { expect } from 'chai';
import { deleteDB } from 'idb';
import * as commands from '../../src/state/commands/index.ts';
import { Session } from '../../src/state/session.ts';
import { addVariant, deleteVariant, openVariant, removeVariant, renameVariant } from '../../src/state/variants.ts';
import { Keeper } from '../../src/storage/keeper.ts';
import { ProjectStore } from '../../src/storage/project-store.ts';
import { designFixture } from '../state/design-fixture.ts';
import { Faults, FAULTS, type Fault } from './faults.ts';

const METAL = { list: 'metals' as const, entry: { id: 'M', workFunction: '4.2 eV', source: 'measured' } };
const OTHER = { list: 'metals' as const, entry: { id: 'N', workFunction: '5 eV', source: 'measured' } };
const MENDED = { ...METAL, entry: { ...METAL.entry, workFunction: '4.3 eV' } };

let name: string;
let count = 0;
let faults: Faults | null = null;

/** One tab: a session, its keeper and its own connection. */
function tab() {
  const store = new ProjectStore(() => {}, name, () => 5);
  const session = new Session(designFixture(), async () => ({ kind: 'dropped' }));
  const keeper = new Keeper(session, store, name);
  const leave = async (): Promise<void> => {
    await keeper.close();
    await store.close();
  };
  return { store, session, keeper, leave, retitle: (title: string): void => void session.edit(commands.setTitle(session.design, title), title) };
}
type Tab = ReturnType<typeof tab>;

/** Every variant with its name, and each title that its history leads through, the latest first. The tab is only looked through: what it undoes is not saved. */
function revisions({ session }: Tab): string[] {
  const { open } = session.variants;
  return session.variants.list.map(({ id, name: called, removed, design, history }) => {
    const walker = new Session(design, async () => ({ kind: 'dropped' }));
    walker.open(design, { history });
    const titles = [walker.design.title];
    while (walker.undo() !== null) titles.push(walker.design.title);
    return `${id === open ? '*' : ''}${called}${removed ? ' (put away)' : ''}: ${titles.join(' < ')}`;
  });
}

/** Tries again what did not come about, as a person would. */
async function insist(act: () => Promise<unknown>): Promise<void> {
  for (let i = 0; i < 3; i++) {
    const done = await act().then(() => true, () => false);
    if (done) return;
  }
  throw new Error('it did not come about in three tries');
}

/** A visit with every change of variants and of the shelf in it, each of them saved. */
async function visit({ keeper, store, session, retitle }: Tab): Promise<void> {
  await keeper.create('cell', designFixture());
  const variants = async (change: (all: Session['variants']) => Session['variants']): Promise<void> => {
    session.changeVariants(change(session.variants));
    await keeper.flush();
  };
  const title = async (text: string): Promise<void> => {
    retitle(text);
    await keeper.flush();
  };
  await title('first');
  await variants((all) => addVariant(all, 'thin', 'b'));
  await title('second');
  await insist(() => store.shelve([METAL, OTHER]));
  await variants((all) => openVariant(all, 'base'));
  await title('third');
  await variants((all) => renameVariant(all, 'b', 'thinner'));
  await variants((all) => addVariant(all, 'spare', 'c'));
  await title('fourth');
  await insist(() => store.shelve([MENDED]));
  await insist(() => store.unshelve('metals N'));
  await variants((all) => addVariant(all, 'gone', 'd'));
  await variants((all) => deleteVariant(removeVariant(openVariant(all, 'b'), 'd'), 'd'));
  await variants((all) => removeVariant(all, 'c'));
}
describe('variants, their revisions and the shelf, whatever goes wrong with a write', () => {
  afterEach(() => {
    faults?.mend();
    faults = null;
    for (const key of Object.keys(localStorage)) if (key.startsWith('halfmark:unsaved:')) localStorage.removeItem(key);
  });

  async function tryVisit(fault: Fault, wrong: (write: number) => boolean): Promise<Tab> {
    name = `faults-variants-${Date.now()}-${count++}`;
    faults = new Faults(fault, wrong);
    const one = tab();
    await visit(one);
    return one;
  }
  /** What the next visit finds. */
  async function found(): Promise<{ revisions: string[]; shelf: string[]; damaged: number }> {
    const next = tab();
    expect((await next.keeper.openLast()).ok).to.equal(true);
    const shelf = (await next.store.shelf()).map(({ key, entry }) => `${key}: ${'workFunction' in entry ? String(entry.workFunction) : ''}`);
    const outcome = { revisions: revisions(next), shelf, damaged: (await next.store.damaged()).length };
    expect(await next.store.list()).to.have.length(1);
    await next.leave();
    return outcome;
  }

  for (const fault of FAULTS) {
    it(`none is lost when the k-th write is ${fault}, for every k`, async () => {
      const one = await tryVisit(fault, () => false);
      const { writes } = faults!;
      faults!.mend();
      await one.leave();
      const whole = await found();
      await deleteDB(name);
      expect(whole.revisions).to.have.length(3);
      expect(whole.revisions.join('\n')).to.match(/^base: third < first < /m).and.to.match(/^\*thinner: second < first/m).and.to.match(/^spare \(put away\): fourth < third/m).and.to.contain(designFixture().title);
      expect(whole).to.deep.include({ shelf: ['metals M: 4.3 eV'], damaged: 0 });
      expect(writes).to.be.greaterThan(15);
      for (let k = 0; k < writes; k++) {
        const tried = await tryVisit(fault, (write) => write === k);
        faults!.mend();
        expect(faults!.happened, `write ${k}`).to.equal(1);
        await tried.keeper.flush();
        expect(tried.keeper.saving.kind, `write ${k}`).to.equal('saved');
        await tried.leave();
        expect(await found(), `write ${k}`).to.deep.equal(whole);
        await deleteDB(name);
      }
    }).timeout(60_000);

    it(`the variant on the page is at the next visit what it was, and the shelf as last accepted, when every write from the k-th on is ${fault}`, async () => {
      for (let k = 1; k < 9; k++) {
        name = `faults-variants-${Date.now()}-${count++}`;
        const one = tab();
        await one.keeper.create('cell', designFixture());
        await one.store.shelve([METAL]);
        faults = new Faults(fault, (write) => write >= k);
        const accepted = ['4.2 eV'];
        for (const workFunction of ['4.3 eV', '4.4 eV']) {
          const taken = await one.store.shelve([{ ...METAL, entry: { ...METAL.entry, workFunction } }]).then(() => true, () => false);
          if (taken) accepted.push(workFunction);
          one.session.changeVariants(addVariant(one.session.variants, `with ${workFunction}`, workFunction));
          one.retitle(workFunction);
          await one.keeper.flush();
        }
        expect(one.session.design.title).to.equal('4.4 eV');
        if (one.keeper.saving.kind !== 'saved') expect(one.keeper.atRisk, `from write ${k}`).to.equal(true);
        await one.leave();
        faults.mend();
        const next = tab();
        await next.keeper.openLast();
        expect(next.session.design.title, `from write ${k}`).to.equal('4.4 eV');
        expect((await next.store.shelf()).map(({ entry }) => 'workFunction' in entry && entry.workFunction), `from write ${k}`).to.deep.equal([accepted.at(-1)]);
        await next.leave();
        await deleteDB(name);
      }
    }).timeout(60_000);
  }
});
