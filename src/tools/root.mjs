// Where the project lies, so that every command works from any folder.
import { join, resolve } from 'node:path';

/** Top folder of the project. */
export const ROOT = resolve(import.meta.dirname, '../..');
/** What the commands make for themselves; safe to delete. */
export const CACHE = join(ROOT, 'node_modules/.cache');
