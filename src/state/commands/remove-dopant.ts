import { produce } from 'immer';
import type { Design } from '../../design/types.ts';
import { dopantAt, layerAt } from './parts.ts';

/** Takes row `row` out of a layer's dopants. */
export function removeDopant(design: Design, layer: number, row: number): Design {
  return produce(design, (draft) => {
    dopantAt(draft, layer, row);
    layerAt(draft, layer).dopants?.splice(row, 1);
  });
}
