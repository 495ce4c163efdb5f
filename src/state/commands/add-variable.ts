import { produce } from 'immer';
import type { Design, Variable } from '../../design/types.ts';

/** Puts a variable at the end of the list. */
export function addVariable(design: Design, variable: Variable): Design {
  return produce(design, (draft) => {
    (draft.variables ??= []).push(variable);
  });
}
