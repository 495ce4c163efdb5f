import { openDB, type DBSchema, type IDBPDatabase, type IDBPTransaction } from 'idb';
import { to1 } from './migrations/to-1.ts';
import { to2 } from './migrations/to-2.ts';
import { to3 } from './migrations/to-3.ts';

/** What stands in the database. Records are read with care: what is written here is what they should be, not what a damaged disk gives back. */
export interface HalfmarkDB extends DBSchema {
  projects: { key: string; value: unknown };
  /** set aside, never thrown away by the program */ damaged: { key: number; value: { found: number; why: string; text: string } };
  settings: { key: string; value: unknown };
  /** own entries that outlive a project, shelf.ts */ shelf: { key: string; value: unknown };
}

export type Database = IDBPDatabase<HalfmarkDB>;
type UpgradeTransaction = IDBPTransaction<HalfmarkDB, ('projects' | 'damaged' | 'settings' | 'shelf')[], 'versionchange'>;
/** Brings the database one version further, inside the upgrade's own transaction: it may wait for that one's requests, and for nothing else. */
export type Migration = (db: Database, transaction: UpgradeTransaction) => void | Promise<void>;

/** MIGRATIONS[n] leads from version n to n + 1. */
export const MIGRATIONS: readonly Migration[] = [to1, to2, to3];

/** The moments in the life of a database that a person has to hear of. */
export type DatabaseMoment =
  /** another tab holds an older version open and ours waits */ | 'blocked'
  /** another tab waits for us: this connection is closed now */ | 'blocking'
  /** the browser cut the connection */ | 'terminated';

/**
 * Opens the database, climbing from whatever version it has, one at a time.
 * @throws {DOMException} VersionError when a newer page has written it; others when the browser keeps nothing for this page
 */
export function openDatabase(name: string, told: (moment: DatabaseMoment) => void, migrations: readonly Migration[] = MIGRATIONS): Promise<Database> {
  return openDB<HalfmarkDB>(name, migrations.length, {
    async upgrade(db, from, to, transaction) {
      // Its failure is that of the opening, and told there.
      transaction.done.catch(() => undefined);
      try {
        for (let version = from; version < (to ?? migrations.length); version++) await migrations[version](db, transaction);
      } catch (error) {
        // Nothing half climbed: what was written is taken back, and the opening fails.
        if (!(error instanceof DOMException && error.name === 'AbortError')) transaction.abort();
      }
    },
    blocked: () => told('blocked'),
    blocking(_current, _wanted, event) {
      // Whoever waits gets the database at once; what is unsaved here is still in memory.
      (event.target as IDBDatabase).close();
      told('blocking');
    },
    terminated: () => told('terminated'),
  });
}
