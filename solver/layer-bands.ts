import type { LocalBands } from './bands.ts';
import { localCharge } from './charge.ts';
import type { Assumptions, Layer } from './stack.ts';

/** The bands at one depth of a layer, with the composition and the narrowing of that place. `z` from the layer's top, cm; T in K. */
export function bandsAt(layer: Layer, z: number, T: number, a: Assumptions): LocalBands {
  return localCharge(layer, z, T, a).bands;
}
