import { expect } from 'chai';
import { deleteDB, openDB } from 'idb';
import { MIGRATIONS, openDatabase, type DatabaseMoment, type Migration } from '../../src/storage/database.ts';
import { ProjectStore, type Content } from '../../src/storage/project-store.ts';
import { designFixture } from '../state/design-fixture.ts';

const content = (title = 'three layers'): Content => ({ designText: JSON.stringify({ ...designFixture(), title }), history: { past: [], future: [] }, view: { depth: 'even' } });

let count = 0;
let name: string;
let stores: ProjectStore[];
function open(told?: (moment: DatabaseMoment) => void): ProjectStore {
  const store = new ProjectStore(told, name);
  stores.push(store);
  return store;
}

/** Writes into the raw database, past all checks. */
async function raw(write: (db: Awaited<ReturnType<typeof openDatabase>>) => Promise<unknown>): Promise<void> {
  const db = await openDatabase(name, () => {});
  await write(db);
  db.close();
}

describe('the projects of this browser', () => {
  beforeEach(() => {
    name = `test-${Date.now()}-${count++}`;
    stores = [];
  });
  afterEach(async () => {
    for (const store of stores) await store.close();
    await deleteDB(name);
  });

  it('are still there after the page was closed, whole', async () => {
    const made = await open().create('cell', content());
    await stores[0].close();
    const store = open();
    expect(await store.get(made.id)).to.deep.equal(made);
    expect((await store.list()).map((entry) => entry.name)).to.deep.equal(['cell']);
  });

  it('get names of their own', async () => {
    const store = open();
    const names = [];
    for (const wish of ['cell', 'cell', ' cell ', '']) names.push((await store.create(wish, content())).name);
    expect(names).to.deep.equal(['cell', 'cell 2', 'cell 3', 'untitled']);
  });

  it('are saved on top of the revision they were read at', async () => {
    const store = open();
    const { id } = await store.create('cell', content());
    expect(await store.save(id, 1, content('second'))).to.deep.equal({ kind: 'saved', revision: 2 });
    expect(await store.save(id, 2, content('third'))).to.deep.equal({ kind: 'saved', revision: 3 });
    expect((await store.get(id))!.designText).to.contain('third');
  });

  it('are never overwritten by a second tab that read them earlier', async () => {
    const [one, two] = [open(), open()];
    const { id } = await one.create('cell', content());
    const outcomes = await Promise.all([one.save(id, 1, content('from one')), two.save(id, 1, content('from two'))]);
    expect(outcomes.map((outcome) => outcome.kind).sort()).to.deep.equal(['conflict', 'saved']);
    const conflict = outcomes.find((outcome) => outcome.kind === 'conflict');
    const kept = await one.get(id);
    expect(conflict).to.deep.equal({ kind: 'conflict', other: kept });
    expect(kept!.revision).to.equal(2);
  });

  it('tell a tab that saves a deleted project, and do not bring it back', async () => {
    const store = open();
    const { id } = await store.create('cell', content());
    await store.bin(id);
    expect(await store.delete(id)).to.equal(true);
    expect(await store.save(id, 1, content())).to.deep.equal({ kind: 'conflict', other: null });
    expect(await store.list()).to.deep.equal([]);
  });

  it('can be renamed and binned while another tab edits, without disturbing its saves', async () => {
    const store = open();
    const { id } = await store.create('cell', content());
    await store.rename(id, 'solar cell');
    await store.rename(id, '  ');
    await store.bin(id);
    expect(await store.save(id, 1, content('second'))).to.deep.equal({ kind: 'saved', revision: 2 });
    const record = (await store.get(id))!;
    expect(record.name).to.equal('solar cell');
    expect(record.binned).to.be.a('number');
    await store.takeOutOfBin(id);
    expect((await store.get(id))!.binned).to.equal(null);
  });

  it('are deleted for good only from the bin', async () => {
    const store = open();
    const { id } = await store.create('cell', content());
    expect(await store.delete(id)).to.equal(false);
    expect(await store.get(id)).not.to.equal(null);
  });

  it('are copied with their history and view under another name', async () => {
    const store = open();
    const { id } = await store.create('cell', content());
    const copy = (await store.copy(id))!;
    expect(copy.name).to.equal('cell (copy)');
    expect(copy.id).not.to.equal(id);
    expect(copy.view).to.deep.equal({ depth: 'even' });
    expect(await store.copy('nowhere')).to.equal(null);
  });

  it('are set aside as they are when they are damaged, and the others still open', async () => {
    const store = open();
    const good = await store.create('good', content());
    await raw(async (db) => {
      await db.put('projects', { ...good, id: 'cut', name: 'cut', designText: '{"format":"halfma' });
      await db.put('projects', { id: 'odd', designText: 7, note: 'keep me' });
    });
    expect((await store.list()).map((entry) => entry.id)).to.deep.equal([good.id]);
    const damaged = await store.damaged();
    expect(damaged.map(({ why }) => why).sort()).to.deep.equal(['its design is cut short or garbled', 'its name is no text']);
    expect(damaged.map(({ text }) => text).join()).to.contain('keep me').and.to.contain('halfma');
    await store.deleteDamaged(damaged[0].key);
    expect(await store.damaged()).to.have.length(1);
  });

  it('are set aside when a single one is opened and cannot be read', async () => {
    const store = open();
    const good = await store.create('good', content());
    await raw((db) => db.put('projects', { ...good, revision: 'x' }));
    expect(await store.get(good.id)).to.equal(null);
    expect((await store.damaged())[0].why).to.equal('its revision is no number');
  });

  it('keep small settings', async () => {
    const store = open();
    await store.setSetting('last', 'abc');
    expect(await store.setting('last')).to.equal('abc');
    expect(await store.setting('never')).to.equal(undefined);
  });

  it('lose nothing at whichever write the disk is full', async () => {
    const store = open();
    const { id } = await store.create('cell', content('first'));
    const put = IDBObjectStore.prototype.put;
    for (let k = 0; k < 4; k++) {
      let writes = 0;
      IDBObjectStore.prototype.put = function (...args) {
        if (writes++ === k) throw new DOMException('no room', 'QuotaExceededError');
        return put.apply(this, args);
      };
      try {
        let { revision, designText } = (await store.get(id))!;
        for (let i = 0; i < 4; i++) {
          const outcome = await store.save(id, revision, content(`k${k} i${i}`));
          if (i === k) {
            expect(outcome).to.have.nested.property('failure.code', 'full');
            expect((await store.get(id))!.designText).to.equal(designText);
          } else {
            expect(outcome.kind).to.equal('saved');
            ({ revision, designText } = (await store.get(id))!);
          }
        }
      } finally {
        IDBObjectStore.prototype.put = put;
      }
    }
  });
});

describe('the database', () => {
  const later: Migration = (db) => void (db as unknown as IDBDatabase).createObjectStore('later');

  beforeEach(() => {
    name = `test-${Date.now()}-${count++}`;
    stores = [];
  });
  afterEach(async () => {
    for (const store of stores) await store.close();
    await deleteDB(name);
  });

  it('climbs one version at a time and keeps what it held', async () => {
    const store = open();
    const { id } = await store.create('cell', content());
    await store.close();
    const steps: number[] = [];
    const logged = [...MIGRATIONS, (...args: Parameters<Migration>) => (steps.push(2), later(...args)), () => void steps.push(3)];
    const db = await openDatabase(name, () => {}, logged);
    expect(db.version).to.equal(MIGRATIONS.length + 2);
    expect(steps).to.deep.equal([2, 3]);
    expect(await db.get('projects', id)).to.have.property('name', 'cell');
    db.close();
  });

  it('lets a newer page go ahead and says so', async () => {
    const moments: DatabaseMoment[] = [];
    const store = open((moment) => moments.push(moment));
    const { id } = await store.create('cell', content());
    const db = await openDatabase(name, () => {}, [...MIGRATIONS, later]);
    expect(moments).to.deep.equal(['blocking']);
    // The old page can no longer save, and its words say why.
    const outcome = await store.save(id, 1, content());
    expect(outcome).to.have.nested.property('failure.code', 'newer');
    db.close();
  });

  it('says so when the browser cuts the connection, and the next call opens another', async () => {
    const moments: DatabaseMoment[] = [];
    const store = open((moment) => moments.push(moment));
    const { id } = await store.create('cell', content());
    // The connection that is in use, found by the next transaction on it.
    const transaction = IDBDatabase.prototype.transaction;
    let connection: IDBDatabase | undefined;
    IDBDatabase.prototype.transaction = function (this: IDBDatabase, ...given: Parameters<IDBDatabase['transaction']>) {
      connection = this;
      return transaction.apply(this, given);
    } as IDBDatabase['transaction'];
    try {
      await store.get(id);
    } finally {
      IDBDatabase.prototype.transaction = transaction;
    }
    connection!.close();
    connection!.dispatchEvent(new Event('close'));
    expect(moments).to.deep.equal(['terminated']);
    expect(await store.save(id, 1, content('after the cut'))).to.deep.equal({ kind: 'saved', revision: 2 });
  });

  it('that fails on its climb stays as it was, and every project in it', async () => {
    const store = open();
    const { id } = await store.create('cell', content());
    await store.close();
    const half: Migration = async (db, transaction) => {
      void (db as unknown as IDBDatabase).createObjectStore('half');
      await transaction.objectStore('projects').delete(id);
      throw new TypeError('a fault of the climb');
    };
    const outcome = await openDatabase(name, () => {}, [...MIGRATIONS, half]).then(
      (db) => (db.close(), 'opened'),
      () => 'refused',
    );
    expect(outcome).to.equal('refused');
    expect(await store.get(id)).to.have.property('name', 'cell');
  });

  it('says so when an older page holds it and does not let go', async () => {
    const holder = await openDB(name, MIGRATIONS.length, { upgrade: (db) => void db.createObjectStore('projects') });
    const moments: DatabaseMoment[] = [];
    const opening = openDatabase(name, (moment) => moments.push(moment), [...MIGRATIONS, later]);
    while (moments.length === 0) await new Promise((done) => setTimeout(done, 5));
    expect(moments).to.deep.equal(['blocked']);
    holder.close();
    (await opening).close();
  });
});
