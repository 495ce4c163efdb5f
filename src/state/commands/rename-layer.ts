import { produce } from 'immer';
import type { Design } from '../../design/types.ts';
import { layerAt } from './parts.ts';
import { isEnd } from './remove-layer.ts';

/** Gives a layer another name, and follows it through the interface rows and the requirements. A name that is taken is accepted here and complained of by the reader. */
export function renameLayer(design: Design, layer: number, name: string): Design {
  const old = layerAt(design, layer).name;
  if (old === name) return design;
  const shared = design.layers.some((other, index) => index !== layer && other.name === old);
  return produce(design, (draft) => {
    draft.layers[layer].name = name;
    // Of two layers with one name it is unknown which of them a row means.
    if (shared) return;
    for (const row of draft.interfaces ?? []) if (row.above === old) row.above = name;
    if (!isEnd(old)) for (const row of draft.requirements ?? []) if (row.of === old) row.of = name;
  });
}
