import { produce } from 'immer';
import type { Design, Requirement } from '../../design/types.ts';

/** Puts a requirement at the end of the list. */
export function addRequirement(design: Design, requirement: Requirement): Design {
  return produce(design, (draft) => {
    (draft.requirements ??= []).push(requirement);
  });
}
