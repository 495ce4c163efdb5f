import { produce } from 'immer';
import type { Design, DopantRow } from '../../design/types.ts';
import { layerAt } from './parts.ts';

/** Puts a dopant row at the end of a layer's list. */
export function addDopant(design: Design, layer: number, row: DopantRow): Design {
  return produce(design, (draft) => {
    (layerAt(draft, layer).dopants ??= []).push(row);
  });
}
