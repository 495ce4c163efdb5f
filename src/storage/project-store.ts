import { freeName } from '../state/commands/free-name.ts';
import { openDatabase, type Database, type DatabaseMoment } from './database.ts';
import { storageFailure, type StorageFailure } from './failure.ts';
import { rawText, recordFault, type ProjectEntry, type ProjectRecord } from './record.ts';

/** What an open project hands over to be saved. */
export type Content = Pick<ProjectRecord, 'designText' | 'history' | 'view'>;

export type SaveOutcome =
  | { kind: 'saved'; revision: number }
  /** somebody else saved in between, or (null) deleted it; nothing was written */ | { kind: 'conflict'; other: ProjectRecord | null }
  | { kind: 'failed'; failure: StorageFailure };

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
    const records = await this.#readAll();
    return records.map(({ id, name, created, changed, binned }) => ({ id, name, created, changed, binned })).sort((a, b) => b.changed - a.changed);
  }

  /** @returns null when there is none, or it was damaged and has been set aside */
  async get(id: string): Promise<ProjectRecord | null> {
    const value = await (await this.#db()).get('projects', id);
    if (value === undefined) return null;
    if (recordFault(value) === null) return value as ProjectRecord;
    await this.setAside(id);
    return null;
  }

  /** Every whole project, for a backup. */
  async all(): Promise<ProjectRecord[]> {
    return this.#readAll();
  }

  /** Adds a project under a name that is not taken yet. */
  async create(name: string, content: Content, times: { created?: number; changed?: number; binned?: number | null } = {}): Promise<ProjectRecord> {
    const now = this.#now();
    const tx = (await this.#db()).transaction('projects', 'readwrite');
    const taken = (await tx.store.getAll()).map((value) => (recordFault(value) === null ? (value as ProjectRecord).name : ''));
    const record: ProjectRecord = { id: crypto.randomUUID(), name: freeName(name.trim() || 'untitled', taken), created: now, changed: now, revision: 1, binned: null, ...content, ...times };
    await Promise.all([tx.store.add(record), tx.done]);
    return record;
  }

  /**
   * Saves an open project on top of the revision it was read at. Reading, comparing and writing are one transaction, so of two tabs the second always finds out.
   */
  async save(id: string, revision: number, content: Content): Promise<SaveOutcome> {
    try {
      const tx = (await this.#db()).transaction('projects', 'readwrite');
      const current = await tx.store.get(id);
      const fault = recordFault(current);
      if (fault !== null || (current as ProjectRecord).revision !== revision) {
        await tx.done;
        return { kind: 'conflict', other: fault === null ? (current as ProjectRecord) : null };
      }
      const next: ProjectRecord = { ...(current as ProjectRecord), ...content, changed: this.#now(), revision: revision + 1 };
      await Promise.all([tx.store.put(next), tx.done]);
      return { kind: 'saved', revision: next.revision };
    } catch (error) {
      if (storageFailure(error).code === 'lost') this.#opening = null;
      return { kind: 'failed', failure: storageFailure(error) };
    }
  }

  async rename(id: string, name: string): Promise<void> {
    await this.#change(id, (record) => ({ ...record, name: name.trim() || record.name }));
  }

  /** A second project with the same design, history and view. @returns null when the first is gone */
  async copy(id: string): Promise<ProjectRecord | null> {
    const record = await this.get(id);
    if (record === null) return null;
    const { name, designText, history, view } = record;
    return this.create(`${name} (copy)`, { designText, history, view });
  }

  async bin(id: string): Promise<void> {
    await this.#change(id, (record) => ({ ...record, binned: this.#now() }));
  }

  async takeOutOfBin(id: string): Promise<void> {
    await this.#change(id, (record) => ({ ...record, binned: null }));
  }

  /** Deletes for good; only what is in the bin. @returns whether it did */
  async delete(id: string): Promise<boolean> {
    const tx = (await this.#db()).transaction('projects', 'readwrite');
    const value = await tx.store.get(id);
    const inBin = recordFault(value) === null && (value as ProjectRecord).binned !== null;
    if (inBin) await tx.store.delete(id);
    await tx.done;
    return inBin;
  }

  /** What was set aside because it could not be read. */
  async damaged(): Promise<Damaged[]> {
    return (await (await this.#db()).getAll('damaged')) as unknown as Damaged[];
  }

  async deleteDamaged(key: number): Promise<void> {
    await (await this.#db()).delete('damaged', key);
  }

  /** Sets a record aside as it is, also one whose design turned out unreadable when it was opened. */
  async setAside(id: string, why?: string): Promise<void> {
    const tx = (await this.#db()).transaction(['projects', 'damaged'], 'readwrite');
    const projects = tx.objectStore('projects');
    const value = await projects.get(id);
    if (value !== undefined) {
      await tx.objectStore('damaged').add({ found: this.#now(), why: why ?? recordFault(value) ?? 'it could not be opened', text: rawText(value) });
      await projects.delete(id);
    }
    await tx.done;
  }

  async setting(key: string): Promise<unknown> {
    return (await this.#db()).get('settings', key);
  }

  async setSetting(key: string, value: unknown): Promise<void> {
    await (await this.#db()).put('settings', value, key);
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

  async #readAll(): Promise<ProjectRecord[]> {
    const tx = (await this.#db()).transaction(['projects', 'damaged'], 'readwrite');
    const good: ProjectRecord[] = [];
    for (let cursor = await tx.objectStore('projects').openCursor(); cursor; cursor = await cursor.continue()) {
      const fault = recordFault(cursor.value);
      if (fault === null) good.push(cursor.value as ProjectRecord);
      else {
        await tx.objectStore('damaged').add({ found: this.#now(), why: fault, text: rawText(cursor.value) } as never);
        await cursor.delete();
      }
    }
    await tx.done;
    return good;
  }

  async #change(id: string, change: (record: ProjectRecord) => ProjectRecord): Promise<void> {
    const tx = (await this.#db()).transaction('projects', 'readwrite');
    const value = await tx.store.get(id);
    if (recordFault(value) === null) await tx.store.put(change(value as ProjectRecord));
    await tx.done;
  }
}
