import type { Layer, Stack } from '../../solver/index.ts';
import { leadingDopant } from './regime-map.ts';

/** Where a layer of the design lies on a map of one of them. */
export interface MapMark {
  layer: number;
  name: string;
  /** active concentration of its leading dopant, cm^-3 */ doping: number;
  /** K */ temperature: number;
  /** operating range, K */ range: [number, number] | null;
  /** same material, composition and dopants in the same proportion: the map holds for this layer; otherwise it is only a place */ same: boolean;
}

/** The doped layers of the mapped layer's material as marks on its map. */
export function mapMarks(stack: Stack, mapped: number, range: [number, number] | null): MapMark[] {
  const own = stack.layers[mapped];
  return stack.layers.flatMap((layer, l) => {
    const leading = layer.material.id === own.material.id ? leadingDopant(layer) : null;
    return leading ? [{ layer: l, name: layer.name, doping: leading.concentration, temperature: stack.temperature, range, same: l === mapped || alike(layer, own) }] : [];
  });
}

function alike(a: Layer, b: Layer): boolean {
  return recipe(a) === recipe(b);
}

/** All that decides a map besides the scale of the doping, as text. */
function recipe(layer: Layer): string {
  const scale = leadingDopant(layer)?.concentration ?? 1;
  const middle = layer.dopants.map((d) => ({ ...d, concentration: d.concentration.kind === 'constant' ? Number((d.concentration.value / scale).toPrecision(9)) : d.concentration }));
  return JSON.stringify({ x: layer.x, middle });
}
