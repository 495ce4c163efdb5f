import { produce } from 'immer';
import type { Design } from '../../design/types.ts';
import { keepMetPairs } from './met-pairs.ts';
import { layerAt } from './parts.ts';

/**
 * Takes a layer out, and with it its requirements and the interface rows on its two sides. The last layer stays: a stack has at least one.
 */
export function removeLayer(design: Design, layer: number): Design {
  const { name } = layerAt(design, layer);
  if (design.layers.length === 1) return design;
  return produce(design, (draft) => {
    draft.layers.splice(layer, 1);
    keepMetPairs(draft, design);
    draft.interfaces = draft.interfaces?.filter((row) => row.above !== name);
    if (draft.interfaces === undefined) delete draft.interfaces;
    if (draft.requirements !== undefined && !isEnd(name)) draft.requirements = draft.requirements.filter((row) => row.of !== name);
  });
}

/** A requirement of "top" or "bottom" means the contact there, whatever the layers are called. */
export function isEnd(name: string): boolean {
  return name === 'top' || name === 'bottom';
}
