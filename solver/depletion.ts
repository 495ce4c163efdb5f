import { localCharge, netDoping } from './charge.ts';
import { isUniform } from './profile.ts';
import type { Profiles } from './solution.ts';
import type { Stack } from './stack.ts';

/** Net charge over dopant charge at a depletion edge. */
const EDGE = 0.5;
/** Net doping below this share of the layer's largest says nothing: near the crossing of donors and acceptors the ratio is noise. */
const BARE = 1e-3;
/** A depleted layer may hold this share of its thickness at inner interfaces where a neighbour's carriers spill in (common practice, no source). */
const SKIN = 0.1;

/** What the solved charge is compared with, node by node. */
export interface SpaceCharge {
  /** first and last node of each layer */ ranges: [number, number][];
  /** all donors less all acceptors, charged or not, cm^-3 [nodes] */ net: Float64Array;
  /** largest |net| of each layer, cm^-3 [layers]; 0 in an undoped layer and in an insulator */ most: Float64Array;
}

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

export function spaceChargeOf(stack: Stack, profiles: Profiles): SpaceCharge {
  const ranges = layerRanges(profiles, stack.layers.length);
  const net = new Float64Array(profiles.z.length);
  const most = new Float64Array(stack.layers.length);
  stack.layers.forEach((layer, l) => {
    const [first, last] = ranges[l];
    const at = (s: number): number => {
      const c = localCharge(layer, profiles.z[s] - profiles.z[first], stack.temperature, stack.assumptions);
      return c.bands.insulator ? 0 : netDoping(c);
    };
    if (isUniform(layer)) net.fill(at(first), first, last + 1);
    else for (let s = first; s <= last; s++) net[s] = at(s);
    for (let s = first; s <= last; s++) most[l] = Math.max(most[l], Math.abs(net[s]));
  });
  return { ranges, net, most };
}

/** Charge at node s over that of its bare dopants: 1 where depleted, 0 where neutral, negative in accumulation; NaN where there is next to no doping. */
export function depletedShare(profiles: Profiles, space: SpaceCharge, s: number): number {
  const net = space.net[s];
  return Math.abs(net) > BARE * space.most[profiles.layer[s]] ? profiles.charge[s] / net : NaN;
}

/**
 * Width, cm, over which a layer is depleted, counted from its end at `from` ("top" or "bottom" of the layer): to where the net charge
 * falls to half of the dopant charge.
 *
 * @returns null without doping, which leaves nothing to compare with; 0 where that end is neutral, accumulated or less than half depleted
 *   (the width goes to 0 steadily there); the thickness where the edge lies beyond the layer
 *
 * In a graded layer, stretches without doping to speak of (the tail under the interface, the crossing of donors and acceptors) end no depletion.
 */
export function depletionFrom(stack: Stack, profiles: Profiles, space: SpaceCharge, layer: number, from: 'top' | 'bottom'): number | null {
  if (space.most[layer] === 0) return null;
  const [first, last] = space.ranges[layer];
  const step = from === 'top' ? 1 : -1;
  const [start, end] = from === 'top' ? [first, last] : [last, first];
  let edge = -1;
  let share = NaN;
  for (let s = start; step * (end - s) >= 0; s += step) {
    const next = depletedShare(profiles, space, s);
    if (Number.isNaN(next)) continue;
    if (next < EDGE) {
      if (edge < 0) return 0;
      // Between neighbouring nodes the charge runs nearly straight; across a bare stretch the edge is the last depleted node.
      const u = s === edge + step ? (share - EDGE) / (share - next) : 0;
      return Math.abs(profiles.z[edge] + u * (profiles.z[s] - profiles.z[edge]) - profiles.z[start]);
    }
    edge = s;
    share = next;
  }
  return stack.layers[layer].thickness;
}

/**
 * Whether a doped layer holds no neutral part, be it depleted from one side or from both: its charge falls nowhere below half of its dopants', but for
 * thin skins at inner interfaces where a neighbour's carriers spill in. An undoped layer has nothing to deplete: false.
 */
export function isFullyDepleted(stack: Stack, profiles: Profiles, space: SpaceCharge, layer: number): boolean {
  if (space.most[layer] === 0) return false;
  const [first, last] = space.ranges[layer];
  const { z } = profiles;
  const filled = (s: number): boolean => depletedShare(profiles, space, s) < EDGE;
  let a = first;
  let b = last;
  // The ends of the stack belong to the contacts: what is neutral there is neutral.
  if (layer > 0) while (a < last && filled(a)) a++;
  if (layer + 1 < stack.layers.length) while (b > first && filled(b)) b--;
  if (z[a] - z[first] + (z[last] - z[b]) > SKIN * stack.layers[layer].thickness) return false;
  for (let s = a; s <= b; s++) if (filled(s)) return false;
  return true;
}
