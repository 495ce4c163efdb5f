import { produce } from 'immer';
import { keyText, ownIndex, type EntryKey } from '../../design/entry-key.ts';
import type { Design } from '../../design/types.ts';
import { tidy } from './set-custom-value.ts';

/**
 * Takes an own entry out. Where it stood over a preset, the preset counts again; an entry without one must not be in use: the caller has asked usesOf.
 * @throws {RangeError} the design has no such entry
 */
export function removeCustomEntry(design: Design, key: EntryKey): Design {
  const at = ownIndex(design.custom, key);
  if (at < 0) throw new RangeError(`no own entry ${keyText(key)}`);
  return produce(design, (draft) => {
    draft.custom![key.list]!.splice(at, 1);
    tidy(draft);
  });
}
