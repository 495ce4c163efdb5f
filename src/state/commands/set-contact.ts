import { produce } from 'immer';
import type { ContactInput, Design } from '../../design/types.ts';
import type { Side } from './parts.ts';

/** Gives one end of the stack its contact. */
export function setContact(design: Design, side: Side, contact: ContactInput): Design {
  return produce(design, (draft) => {
    draft[side] = contact;
  });
}
