import { produce } from 'immer';
import type { Design, DopantRow, LayerInput } from '../../design/types.ts';
import { layerAt } from './parts.ts';

/** What may come with another material: a composition (null takes it out: a crystal has none) and dopants known in the new host. */
export interface MaterialChange {
  x?: LayerInput['x'] | null;
  dopants?: DopantRow[];
}

/** Gives a layer another material. Its dopants stay, known in the new host or not, unless others are given: what does not fit is said, not dropped. */
export function setMaterial(design: Design, layer: number, material: string, with_: MaterialChange = {}): Design {
  return produce(design, (draft) => {
    const target = layerAt(draft, layer);
    target.material = material;
    if (with_.x === null) delete target.x;
    else if (with_.x !== undefined) target.x = with_.x;
    if (with_.dopants !== undefined) target.dopants = with_.dopants;
  });
}
