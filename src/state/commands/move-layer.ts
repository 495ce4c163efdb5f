import { produce } from 'immer';
import type { Design } from '../../design/types.ts';
import { keepMetPairs } from './met-pairs.ts';
import { layerAt } from './parts.ts';

/** Moves a layer so that it is number `to` afterwards. Interface rows stay where their two layers still meet. */
export function moveLayer(design: Design, from: number, to: number): Design {
  layerAt(design, from);
  layerAt(design, to);
  if (from === to) return design;
  return produce(design, (draft) => {
    const [moved] = draft.layers.splice(from, 1);
    draft.layers.splice(to, 0, moved);
    keepMetPairs(draft, design);
  });
}
