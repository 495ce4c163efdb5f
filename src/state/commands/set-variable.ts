import { produce } from 'immer';
import type { Design, Variable } from '../../design/types.ts';
import { partAt } from './parts.ts';

/** Changes a variable's value, tolerance, range or note; a key given as undefined is taken out. Its name is changed by renameVariable. */
export function setVariable(design: Design, variable: number, change: Partial<Omit<Variable, 'name'>>): Design {
  return produce(design, (draft) => {
    const target = partAt(draft.variables ?? [], variable, 'variable');
    Object.assign(target, change);
    if ('tolerance' in change && change.tolerance === undefined) delete target.tolerance;
    if ('range' in change && change.range === undefined) delete target.range;
    if ('note' in change && change.note === undefined) delete target.note;
  });
}
