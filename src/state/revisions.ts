import { checkDesign } from '../design/read.ts';
import type { Design } from '../design/types.ts';
import { apply, inverse, type Json } from './difference.ts';
import { readHistory } from './history.ts';
import type { Variant } from './variants.ts';

/** A design as it once stood: how many of the remembered steps led to it, and what the last of them was. */
export interface Revision {
  /** 0: the earliest that is remembered */ steps: number;
  /** null at the earliest */ label: string | null;
}

/** A place in the history of a variant. `steps` null: as it is now, wherever that moves to. */
export interface RevisionKey {
  id: string;
  steps: number | null;
}

/** Every stored revision of a variant, the one that it is now last. Steps taken back are none. */
export function revisionsOf({ history }: Pick<Variant, 'history'>): Revision[] {
  return [{ steps: 0, label: null }, ...readHistory(history).past.map(({ label }, i): Revision => ({ steps: i + 1, label }))];
}

/**
 * The design of a variant as it stood after so many of its remembered steps.
 *
 * @param steps  beyond the present, as after an undo: the present
 * @returns null where the history is not that of the design, as in a record mixed up in storage
 */
export function designAt({ design, history }: Pick<Variant, 'design' | 'history'>, steps: number): Design | null {
  const { past } = readHistory(history);
  if (steps >= past.length) return design;
  try {
    const back = past.slice(steps).reverse();
    const then = back.reduce((now, { changes }) => apply(now, inverse(changes)), design as unknown as Json);
    // What was kept is asked for its shape, as a file would be: a mixed up record can lead to anything.
    const reading = checkDesign(then);
    return reading.ok ? reading.design : null;
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}
