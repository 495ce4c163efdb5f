import type { Migration } from '../database.ts';

/** The person's shelf: own materials, dopants and metals that outlive a project. */
export const to3: Migration = (db) => {
  db.createObjectStore('shelf', { keyPath: 'key' });
};
