import { produce } from 'immer';
import type { Design } from '../../design/types.ts';
import { partAt } from './parts.ts';

/** Takes a requirement out. */
export function removeRequirement(design: Design, requirement: number): Design {
  partAt(design.requirements ?? [], requirement, 'requirement');
  return produce(design, (draft) => {
    draft.requirements!.splice(requirement, 1);
  });
}
