import { produce } from 'immer';
import { ownIndex, type EntryKey } from '../../design/entry-key.ts';
import type { Design, MetalInput } from '../../design/types.ts';

type Barrier = NonNullable<MetalInput['barriers']>[number];

/**
 * Adds a measured barrier to a metal, in the design's own entry of it (a copy of `base` where there is none yet). One of the same material and carrier gives way.
 *
 * @param base  what the design uses now
 */
export function addBarrier(design: Design, key: EntryKey, base: MetalInput, barrier: Barrier): Design {
  return produce(design, (draft) => {
    const rows = ((draft.custom ??= {}).metals ??= []);
    const at = ownIndex(design.custom, key);
    if (at < 0) rows.push(structuredClone(base));
    const entry = rows[at < 0 ? rows.length - 1 : at];
    const others = (entry.barriers ?? []).filter((row) => row.material !== barrier.material || row.carrier !== barrier.carrier);
    entry.barriers = [...others, barrier];
  });
}
