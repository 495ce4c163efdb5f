import type { Migration } from '../database.ts';
import { LONE } from '../kept-variants.ts';

/** A project holds variants: each that there is gets the one that it was. What is no record stays as it is, to be set aside when it is read. */
export const to2: Migration = async (_, transaction) => {
  for (let cursor = await transaction.objectStore('projects').openCursor(); cursor !== null; cursor = await cursor.continue()) {
    const { value } = cursor;
    if (typeof value === 'object' && value !== null && !Array.isArray(value) && !('variants' in value)) await cursor.update({ ...value, variants: structuredClone(LONE) });
  }
};
