import { produce } from 'immer';
import type { Design } from '../../design/types.ts';

/** Free text; empty takes it out. */
export function setNotes(design: Design, notes: string): Design {
  return produce(design, (draft) => {
    if (notes === '') delete draft.notes;
    else draft.notes = notes;
  });
}
