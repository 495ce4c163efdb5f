import { produce } from 'immer';
import type { Design } from '../../design/types.ts';
import { partAt } from './parts.ts';

/** Takes a variable out. Expressions that still use it are complained of by the reader, with their place. */
export function removeVariable(design: Design, variable: number): Design {
  partAt(design.variables ?? [], variable, 'variable');
  return produce(design, (draft) => {
    draft.variables!.splice(variable, 1);
  });
}
