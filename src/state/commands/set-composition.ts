import { produce } from 'immer';
import type { Design, LayerInput } from '../../design/types.ts';
import { layerAt } from './parts.ts';

/** Gives a layer its composition x, as typed or graded; undefined takes it out. */
export function setComposition(design: Design, layer: number, x: LayerInput['x']): Design {
  return produce(design, (draft) => {
    const target = layerAt(draft, layer);
    if (x === undefined) delete target.x;
    else target.x = x;
  });
}
