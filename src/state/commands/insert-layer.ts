import { produce } from 'immer';
import type { Design, LayerInput } from '../../design/types.ts';
import { freeName } from './free-name.ts';
import { keepMetPairs } from './met-pairs.ts';

/**
 * Puts a layer in front of layer number `at`; `at` = number of layers puts it at the bottom. A name that is taken gets a number: names are unique.
 * @throws {RangeError} at outside 0..number of layers
 */
export function insertLayer(design: Design, at: number, layer: LayerInput): Design {
  if (!Number.isInteger(at) || at < 0 || at > design.layers.length) throw new RangeError(`no place ${at} among ${design.layers.length} layers`);
  return produce(design, (draft) => {
    draft.layers.splice(at, 0, { ...layer, name: freeName(layer.name, design.layers.map((other) => other.name)) });
    keepMetPairs(draft, design);
  });
}
