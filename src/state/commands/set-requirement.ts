import { produce } from 'immer';
import type { Design, Requirement } from '../../design/types.ts';
import { partAt } from './parts.ts';

/** Changes a requirement; a key given as undefined is taken out. */
export function setRequirement(design: Design, requirement: number, change: Partial<Requirement>): Design {
  return produce(design, (draft) => {
    const target = partAt(draft.requirements ?? [], requirement, 'requirement');
    Object.assign(target, change);
    for (const key of ['max', 'min', 'over'] as const) if (key in change && change[key] === undefined) delete target[key];
  });
}
