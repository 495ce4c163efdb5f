import { produce } from 'immer';
import type { Design, DopantRow } from '../../design/types.ts';
import { dopantAt } from './parts.ts';

/**
 * Changes a dopant row: its species, level, model, activation or compensation. A key given as undefined is taken out. Naming a `dopant` takes out the
 * level given outright (kind, depth, degeneracy), and the other way round: a row holds one or the other.
 */
export function setDopant(design: Design, layer: number, row: number, change: Partial<DopantRow>): Design {
  return produce(design, (draft) => {
    const dopant = dopantAt(draft, layer, row);
    const outright = change.kind !== undefined || change.depth !== undefined || change.degeneracy !== undefined;
    if (change.dopant !== undefined) for (const key of ['kind', 'depth', 'degeneracy'] as const) delete dopant[key];
    else if (outright) delete dopant.dopant;
    Object.assign(dopant, change);
    for (const key of Object.keys(change) as (keyof DopantRow)[]) if (change[key] === undefined) delete dopant[key];
  });
}
