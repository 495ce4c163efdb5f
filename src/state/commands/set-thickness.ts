import { produce } from 'immer';
import type { Design, Text } from '../../design/types.ts';
import { layerAt } from './parts.ts';

/** Gives layer number `layer` (0 at the surface) the thickness as typed, "80 nm" or an expression. */
export function setThickness(design: Design, layer: number, thickness: Text): Design {
  return produce(design, (draft) => {
    layerAt(draft, layer).thickness = thickness;
  });
}
