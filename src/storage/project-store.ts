import type { LooseEntry } from '../design/entry-key.ts';
import { freeName } from '../state/commands/free-name.ts';
import { openDatabase, type Database, type DatabaseMoment } from './database.ts';
import { storageFailure, type StorageFailure } from './failure.ts';
import { rawText, recordFault, type ProjectEntry, type ProjectRecord } from './record.ts';
import { keyOfItem, shelfFault, shelfKey, type ShelfItem } from './shelf.ts';

/** What an open project hands over to be saved. */
export type Content = Pick<ProjectRecord, 'designText' | 'history' | 'view' | 'variants'>;

export type SaveOutcome =
  | { kind: 'saved'; revision: number }
  /** somebody else saved in between, or (null) deleted it; nothing was written */ | { kind: 'conflict'; other: ProjectRecord | null }
  | { kind: 'failed'; failure: StorageFailure };

/** When a project that comes from elsewhere was made, changed, and put in the bin. */
export type NewTimes = Partial<Pick<ProjectRecord, 'created' | 'changed' | 'binned'>>;

export interface Damaged {
  key: number;
  found: number;
  why: string;
  text: string;
}

/**
 * The projects of this browser. Every method rejects with what the browser threw (see failure.ts), except `save`, whose failures are part of its job.
 * A record that cannot be read is moved into a store of its own as it is, in one transaction, and never deleted without being asked for.
 */
export class ProjectStore {
  #opening: Promise<Database> | null = null;
  readonly #name: string;
  readonly #told: (moment: DatabaseMoment) => void;
  readonly #now: () => number;

  constructor(told: (moment: DatabaseMoment) => void = () => {}, name = 'halfmark', now: () => number = () => Date.now()) {
    this.#told = told;
    this.#name = name;
    this.#now = now;
  }

  /** Projects, the one changed last first; those in the bin are among them. */
  async list(): Promise<ProjectEntry[]> {
    const records = await this.all();
    return records.map(({ id, name, created, changed, binned }) => ({ id, name, created, changed, binned })).sort((a, b) => b.changed - a.changed);
  }

  /** @returns null when there is none, or it was damaged and has been set aside */
  async get(id: string): Promise<ProjectRecord | null> {
    const value = await this.#with((db) => db.get('projects', id));
    if (value === undefined) return null;
    if (recordFault(value) === null) return value as ProjectRecord;
    await this.#tidyAway(id);
    return null;
  }

  /** Every whole project, for a backup. What is damaged is set aside on the way. */
  async all(): Promise<ProjectRecord[]> {
    const [keys, values] = await this.#with((db) => Promise.all([db.getAllKeys('projects'), db.getAll('projects')]));
    for (const [i, value] of values.entries()) if (recordFault(value) !== null) await this.#tidyAway(keys[i]);
    return values.filter((value): value is ProjectRecord => recordFault(value) === null);
  }

  /**
   * Adds a project under a name that is not taken yet.
   * @param id  a fresh one of the caller's. One that is there already was written by the same caller, who did not live to hear of it: it is saved anew, not added twice.
   */
  async create(name: string, content: Content, times: NewTimes = {}, id?: string): Promise<ProjectRecord> {
    return (await this.createAll([{ name, content, times, id }]))[0];
  }

  /** Adds several in one transaction: all of them, or none. */
  async createAll(projects: readonly { name: string; content: Content; times?: NewTimes; id?: string }[]): Promise<ProjectRecord[]> {
    const now = this.#now();
    return this.#with((db) =>
      written(db.transaction('projects', 'readwrite'), async ({ store }) => {
        const there = (await store.getAll()).filter((value): value is ProjectRecord => recordFault(value) === null);
        const taken = there.map((record) => record.name);
        const records = projects.map(({ name, content, times = {}, id = crypto.randomUUID() }): ProjectRecord => {
          const mine = there.find((record) => record.id === id);
          if (mine !== undefined) return { ...mine, ...content, changed: now, revision: mine.revision + 1 };
          const free = freeName(name.trim() || 'untitled', taken);
          taken.push(free);
          return { id, name: free, created: now, changed: now, revision: 1, binned: null, ...content, ...times };
        });
        for (const record of records) await (record.revision === 1 ? store.add(record) : store.put(record));
        return records;
      }),
    );
  }

  /**
   * Saves an open project on top of the revision it was read at. Reading, comparing and writing are one transaction, so of two tabs the second always finds out.
   */
  async save(id: string, revision: number, content: Content): Promise<SaveOutcome> {
    try {
      return await this.#with((db) =>
        written(db.transaction('projects', 'readwrite'), async ({ store }): Promise<SaveOutcome> => {
          const current = await store.get(id);
          const fault = recordFault(current);
          if (fault !== null || (current as ProjectRecord).revision !== revision) return { kind: 'conflict', other: fault === null ? (current as ProjectRecord) : null };
          const next: ProjectRecord = { ...(current as ProjectRecord), ...content, changed: this.#now(), revision: revision + 1 };
          await store.put(next);
          return { kind: 'saved', revision: next.revision };
        }),
      );
    } catch (error) {
      return { kind: 'failed', failure: storageFailure(error) };
    }
  }

  async rename(id: string, name: string): Promise<void> {
    await this.#change(id, (record) => ({ ...record, name: name.trim() || record.name }));
  }

  /** A second project with the same design, history, view and variants. @returns null when the first is gone */
  async copy(id: string): Promise<ProjectRecord | null> {
    const record = await this.get(id);
    if (record === null) return null;
    const { name, designText, history, view, variants } = record;
    return this.create(`${name} (copy)`, { designText, history, view, variants });
  }

  async bin(id: string): Promise<void> {
    await this.#change(id, (record) => ({ ...record, binned: this.#now() }));
  }

  async takeOutOfBin(id: string): Promise<void> {
    await this.#change(id, (record) => ({ ...record, binned: null }));
  }

  /** Deletes for good; only what is in the bin. @returns whether it did */
  async delete(id: string): Promise<boolean> {
    return this.#with((db) =>
      written(db.transaction('projects', 'readwrite'), async ({ store }) => {
        const value = await store.get(id);
        const inBin = recordFault(value) === null && (value as ProjectRecord).binned !== null;
        if (inBin) await store.delete(id);
        return inBin;
      }),
    );
  }

  /** What was set aside because it could not be read. */
  async damaged(): Promise<Damaged[]> {
    return (await this.#with((db) => db.getAll('damaged'))) as unknown as Damaged[];
  }

  async deleteDamaged(key: number): Promise<void> {
    await this.#with((db) => db.delete('damaged', key));
  }

  /** Sets a record aside as it is, also one whose design turned out unreadable when it was opened. */
  async setAside(id: string, why?: string): Promise<void> {
    await this.#with((db) =>
      written(db.transaction(['projects', 'damaged'], 'readwrite'), async (tx) => {
        const projects = tx.objectStore('projects');
        const value = await projects.get(id);
        if (value === undefined) return;
        await tx.objectStore('damaged').add({ found: this.#now(), why: why ?? recordFault(value) ?? 'it could not be opened', text: rawText(value) } as never);
        await projects.delete(id);
      }),
    );
  }

  /** The person's shelf, by name. What cannot be read is set aside. */
  async shelf(): Promise<ShelfItem[]> {
    const [keys, values] = await this.#with((db) => Promise.all([db.getAllKeys('shelf'), db.getAll('shelf')]));
    for (const [i, value] of values.entries()) {
      const why = shelfFault(value);
      if (why === null) continue;
      // If there is no room for it elsewhere it stays where it is, in nobody's way.
      await this.#with((db) =>
        written(db.transaction(['shelf', 'damaged'], 'readwrite'), async (tx) => {
          await tx.objectStore('damaged').add({ found: this.#now(), why, text: rawText(value) } as never);
          await tx.objectStore('shelf').delete(keys[i]);
        }),
      ).catch(() => {});
    }
    return values.filter((value): value is ShelfItem => shelfFault(value) === null);
  }

  /** Puts entries on the shelf, all or none; one of the same name gives way. */
  async shelve(entries: readonly LooseEntry[]): Promise<void> {
    const kept = this.#now();
    const items = entries.map((loose): ShelfItem => ({ key: shelfKey(keyOfItem(loose)), ...loose, kept }));
    await this.#with((db) =>
      written(db.transaction('shelf', 'readwrite'), async ({ store }) => {
        for (const item of items) await store.put(item);
      }),
    );
  }

  async unshelve(key: string): Promise<void> {
    await this.#with((db) => written(db.transaction('shelf', 'readwrite'), ({ store }) => store.delete(key)));
  }

  async setting(key: string): Promise<unknown> {
    return this.#with((db) => db.get('settings', key));
  }

  async setSetting(key: string, value: unknown): Promise<void> {
    await this.#with((db) => db.put('settings', value, key));
  }

  /** Closes the connection; the next call opens it again. */
  async close(): Promise<void> {
    const opening = this.#opening;
    this.#opening = null;
    await opening?.then((db) => db.close()).catch(() => {});
  }

  #db(): Promise<Database> {
    // A failed opening is not remembered: the next call tries again.
    this.#opening ??= openDatabase(this.#name, (moment) => {
      if (moment !== 'blocked') this.#opening = null;
      this.#told(moment);
    }).catch((error: unknown) => {
      this.#opening = null;
      throw error;
    });
    return this.#opening;
  }

  /** Works with the database. A connection that turns out to be cut is let go of, so that the next call opens another. */
  async #with<T>(work: (db: Database) => Promise<T>): Promise<T> {
    const opening = this.#db();
    const db = await opening;
    try {
      return await work(db);
    } catch (error) {
      if (storageFailure(error).code === 'lost' && this.#opening === opening) await this.close();
      throw error;
    }
  }

  /** Sets a damaged record aside if there is room for it; else it stays where it is, in nobody's way. */
  async #tidyAway(id: string): Promise<void> {
    await this.setAside(id).catch(() => {});
  }

  async #change(id: string, change: (record: ProjectRecord) => ProjectRecord): Promise<void> {
    await this.#with((db) =>
      written(db.transaction('projects', 'readwrite'), async ({ store }) => {
        const value = await store.get(id);
        if (recordFault(value) === null) await store.put(change(value as ProjectRecord));
      }),
    );
  }
}

/** Does the work of one transaction and waits until it is on the disk. Work that fails takes back what it had written. */
async function written<Tx extends { done: Promise<void>; abort(): void }, T>(tx: Tx, work: (tx: Tx) => Promise<T>): Promise<T> {
  // Heard here, whatever becomes of the work: what the work itself throws says more.
  const done = tx.done.then(
    () => null,
    (error: unknown) => ({ error }),
  );
  let value: T;
  try {
    value = await work(tx);
  } catch (error) {
    try {
      tx.abort();
    } catch {
      // It has ended already.
    }
    await done;
    throw error;
  }
  const failed = await done;
  if (failed !== null) throw failed.error;
  return value;
}
