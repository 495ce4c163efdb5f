import { expect } from 'chai';
import { deleteDB, openDB } from 'idb';
import { MIGRATIONS, openDatabase } from '../../src/storage/database.ts';
import { ProjectStore } from '../../src/storage/project-store.ts';
import { designFixture } from '../state/design-fixture.ts';

const METAL = { list: 'metals' as const, entry: { id: 'M', workFunction: '4.2 eV', source: 'measured' } };
const DOPANT = { list: 'dopants' as const, entry: { id: 'M', host: 'GaAs', kind: 'donor' as const, depth: '6 meV', source: 'measured' } };
const content = { designText: JSON.stringify(designFixture()), history: { past: [], future: [] }, view: {}, variants: [] };

let name: string;
let count = 0;

describe('the shelf', () => {
  beforeEach(() => (name = `shelf-${Date.now()}-${count++}`));
  afterEach(async () => deleteDB(name));

  it('keeps entries across projects and connections, one of each name', async () => {
    const one = new ProjectStore(() => {}, name, () => 5);
    await one.shelve([METAL, DOPANT]);
    await one.shelve([{ ...METAL, entry: { ...METAL.entry, workFunction: '4.3 eV' } }]);
    await one.close();
    const two = new ProjectStore(() => {}, name);
    expect(await two.shelf()).to.deep.equal([{ key: 'dopants GaAs:M', ...DOPANT, kept: 5 }, { key: 'metals M', list: 'metals', entry: { ...METAL.entry, workFunction: '4.3 eV' }, kept: 5 }]);
    await two.unshelve('metals M');
    expect((await two.shelf()).map(({ key }) => key)).to.deep.equal(['dopants GaAs:M']);
    await two.close();
  });

  it('is empty in a database of the version before, whose projects and settings all stay', async () => {
    const old = await openDatabase(name, () => {}, MIGRATIONS.slice(0, 2));
    expect(old.version).to.equal(2);
    const record = { id: 'p', name: 'cell', created: 1, changed: 2, revision: 3, binned: null, ...content, variants: undefined };
    await old.put('projects', JSON.parse(JSON.stringify(record)));
    await old.put('settings', 'p', 'last');
    old.close();
    const store = new ProjectStore(() => {}, name);
    expect(await store.shelf()).to.deep.equal([]);
    expect((await store.all()).map(({ id, revision }) => [id, revision])).to.deep.equal([['p', 3]]);
    expect(await store.setting('last')).to.equal('p');
    await store.shelve([METAL]);
    expect(await store.shelf()).to.have.length(1);
    await store.close();
    const db = await openDB(name);
    expect(db.version).to.equal(3);
    db.close();
  });

  it('sets aside what cannot be read, with its text', async () => {
    const store = new ProjectStore(() => {}, name);
    await store.shelve([METAL]);
    await store.close();
    const db = await openDatabase(name, () => {});
    await db.put('shelf', { key: 'metals bad', list: 'metals', entry: { id: 'bad', workFunktion: 4 }, kept: 1 });
    db.close();
    expect((await store.shelf()).map(({ key }) => key)).to.deep.equal(['metals M']);
    const damaged = await store.damaged();
    expect(damaged).to.have.length(1);
    expect(damaged[0].text).to.contain('workFunktion');
    expect(await store.shelf()).to.have.length(1);
    await store.close();
  });
});
