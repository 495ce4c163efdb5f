import { netDoping } from './charge.ts';
import { localCharge } from './charge.ts';
import type { Profiles } from './solution.ts';
import type { Stack } from './stack.ts';

/** Node range of each layer in profiles: [first, last] by layer. */
export function layerRanges(profiles: Profiles, layers: number): [number, number][] {
  const ranges: [number, number][] = Array.from({ length: layers }, () => [-1, -1]);
  for (let s = 0; s < profiles.layer.length; s++) {
    const r = ranges[profiles.layer[s]];
    if (r[0] < 0) r[0] = s;
    r[1] = s;
  }
  return ranges;
}

/** Charge at node s over the charge of its bare dopants: 1 where depleted, 0 where neutral, negative in accumulation; NaN without doping. */
function depletedShare(stack: Stack, profiles: Profiles, s: number, layerTop: number): number {
  const layer = stack.layers[profiles.layer[s]];
  const net = netDoping(localCharge(layer, profiles.z[s] - layerTop, stack.temperature, stack.assumptions));
  return net === 0 ? NaN : profiles.charge[s] / net;
}

/**
 * Width, cm, over which the layer is depleted, counted from its end at `from` ("top" or "bottom" of the layer): to where the net charge
 * falls to half of the dopant charge. 0 where that end is neutral or accumulated.
 */
export function depletionFrom(stack: Stack, profiles: Profiles, layer: number, from: 'top' | 'bottom'): number {
  const [first, last] = layerRanges(profiles, stack.layers.length)[layer];
  const top = profiles.z[first];
  const step = from === 'top' ? 1 : -1;
  const start = from === 'top' ? first : last;
  const end = from === 'top' ? last : first;
  let previous = depletedShare(stack, profiles, start, top);
  if (!(previous >= 0.5)) return 0;
  for (let s = start + step; step > 0 ? s <= end : s >= end; s += step) {
    const share = depletedShare(stack, profiles, s, top);
    if (!(share >= 0.5)) {
      const u = Number.isFinite(share) ? (previous - 0.5) / (previous - share) : 0;
      return Math.abs(profiles.z[s - step] + u * (profiles.z[s] - profiles.z[s - step]) - profiles.z[start]);
    }
    previous = share;
  }
  return stack.layers[layer].thickness;
}

/** A doped layer whose charge falls nowhere below half of its dopants'. */
export function isFullyDepleted(stack: Stack, profiles: Profiles, layer: number): boolean {
  const [first, last] = layerRanges(profiles, stack.layers.length)[layer];
  for (let s = first; s <= last; s++) if (!(depletedShare(stack, profiles, s, profiles.z[first]) >= 0.5)) return false;
  return true;
}
