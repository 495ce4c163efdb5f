import type { Migration } from '../database.ts';

/** The first shape: projects, what was found damaged, and small settings. */
export const to1: Migration = (db) => {
  db.createObjectStore('projects', { keyPath: 'id' });
  db.createObjectStore('damaged', { keyPath: 'key', autoIncrement: true });
  db.createObjectStore('settings');
};
