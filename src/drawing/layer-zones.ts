import type { Result } from '../result/types.ts';

/** Share of the axis dealt out evenly among the layers; the rest goes by bending. */
const EVEN_SHARE = 0.5;
/** Most of a stretch's room that its flat part may take. */
const QUIET_SHARE = 0.45;
/** Share of a layer's bending that its flat part may still hold; the second applies within the first, so that the tail of the bending gets room of its own. */
const QUIET_BENDING = [0.02, 0.002];

/** Depths, nm, and the room used up to each of them, 0..1. Both rise strictly; straight in between. */
export interface Zones {
  z: number[];
  room: number[];
}

/**
 * How an even-handed axis deals out its room.
 *
 * A layer gets EVEN_SHARE/layers, and of the rest a share as large as its share of all the bending (the integral of |dpsi|). Within a
 * layer the axis is straight, unless a long part of it is flat, as a wafer's bulk under its depletion region: that part is pressed into QUIET_SHARE
 * of the room, and once more within itself. So a depletion region keeps its shape, and 2 nm on 300 um can be read. Every share moves continuously with the result, so that
 * the axis does not jump while a value is dragged.
 */
export function layerZones(result: Result): Zones {
  const { layers, profile } = result;
  const nodes = nodesOfLayers(result);
  const bending = nodes.map(([first, last]) => sumOfSteps(profile.potential_V, first, last));
  // Below a microvolt the differences are rounding, not bending.
  const all = bending.reduce((sum, b) => sum + b, 0);
  const z = [0];
  const room = [0];
  layers.forEach((layer, i) => {
    const top = z[z.length - 1];
    const before = room[room.length - 1];
    const share = all > 1e-6 ? EVEN_SHARE / layers.length + (1 - EVEN_SHARE) * (bending[i] / all) : 1 / layers.length;
    if (bending[i] > 1e-6) {
      const [first, last] = nodes[i];
      const stretch = { z: profile.z_nm.slice(first, last + 1), psi: profile.potential_V.slice(first, last + 1) };
      for (const cut of cutsOf(stretch, bending[i], 0)) {
        // Rounding must not make two cuts one.
        if (cut.z <= z[z.length - 1] || cut.z >= top + layer.thickness_nm) continue;
        z.push(cut.z);
        room.push(before + share * cut.room);
      }
    }
    z.push(top + layer.thickness_nm);
    room.push(before + share);
  });
  return { z, room };
}

/** First and last node of each layer; [0, -1] where the profile has none. */
export function nodesOfLayers(result: Result): [number, number][] {
  const found: [number, number][] = result.layers.map(() => [0, -1]);
  const of = result.profile.layer;
  for (let i = 0; i < of.length; i++) {
    const range = found[of[i]];
    if (range[1] < range[0]) range[0] = i;
    range[1] = i;
  }
  return found;
}

function sumOfSteps(values: number[], first: number, last: number): number {
  let sum = 0;
  for (let i = first; i < last; i++) sum += Math.abs(values[i + 1] - values[i]);
  return sum;
}

/** Nodes of a part of a layer. */
interface Stretch {
  z: number[];
  psi: number[];
}

interface FlatPart {
  from: number;
  to: number;
  /** bending above it and below it, V */ above: number;
  below: number;
}

/** A depth and the share, 0..1, of the stretch's room used up to there. */
interface Cut {
  z: number;
  room: number;
}

/**
 * Where the scale changes within a stretch, from the top down.
 *
 * @param bending  of the whole layer, V
 * @param depth    0 for the layer, 1 for its flat part
 */
function cutsOf(stretch: Stretch, bending: number, depth: number): Cut[] {
  const allowed = QUIET_BENDING[depth] * bending;
  const top = stretch.z[0];
  const bottom = stretch.z[stretch.z.length - 1];
  const flat = flatPart(stretch, allowed);
  const length = (flat.to - flat.from) / (bottom - top);
  if (!(length > QUIET_SHARE)) return [];
  const roomAbove = bentRoomAbove(flat, length, (flat.from - top) / (bottom - top));
  const cuts: Cut[] = [];
  const least = 1e-9 * (bottom - top);
  if (flat.from - top > least && roomAbove > 1e-9) cuts.push({ z: flat.from, room: roomAbove });
  if (depth + 1 < QUIET_BENDING.length) {
    const inner = cutsOf(part(stretch, flat.from, flat.to), bending, depth + 1);
    for (const cut of inner) cuts.push({ z: cut.z, room: roomAbove + QUIET_SHARE * cut.room });
  }
  const roomBelow = roomAbove + QUIET_SHARE;
  if (bottom - flat.to > least && roomBelow < 1 - 1e-9) cuts.push({ z: flat.to, room: roomBelow });
  return cuts;
}

/** Room of the bent end above the flat part. The two ends share by length where the flat part is hardly pressed, half by bending where it is pressed hard. */
function bentRoomAbove(flat: FlatPart, length: number, lengthAbove: number): number {
  const pressed = 0.5 * Math.min(1, (length - QUIET_SHARE) / (1 - QUIET_SHARE));
  const byLength = length < 1 ? lengthAbove / (1 - length) : 0;
  const bent = flat.above + flat.below;
  const byBending = bent > 0 ? flat.above / bent : byLength;
  return (1 - QUIET_SHARE) * ((1 - pressed) * byLength + pressed * byBending);
}

/** The longest piece that holds at most `allowed` of the bending. Two pointers over the nodes, the far end interpolated. */
function flatPart({ z, psi }: Stretch, allowed: number): FlatPart {
  const last = z.length - 1;
  const all = sumOfSteps(psi, 0, last);
  let best: FlatPart = { from: z[0], to: z[0], above: 0, below: all };
  let end = 0;
  let held = 0;
  let above = 0;
  for (let i = 0; i < last; i++) {
    if (end < i) [end, held] = [i, 0];
    while (end < last && held + Math.abs(psi[end + 1] - psi[end]) <= allowed) {
      held += Math.abs(psi[end + 1] - psi[end]);
      end++;
    }
    const rest = end < last ? allowed - held : 0;
    const to = end < last ? z[end] + (rest / Math.abs(psi[end + 1] - psi[end])) * (z[end + 1] - z[end]) : z[end];
    if (to - z[i] > best.to - best.from) best = { from: z[i], to, above, below: Math.max(0, all - above - held - rest) };
    const step = Math.abs(psi[i + 1] - psi[i]);
    held = Math.max(0, held - step);
    above += step;
  }
  return best;
}

/** The nodes between two depths, the lower end interpolated; `from` is a node. */
function part({ z, psi }: Stretch, from: number, to: number): Stretch {
  const first = z.indexOf(from);
  let next = first;
  while (next < z.length && z[next] < to) next++;
  const at = Math.min(next, z.length - 1);
  const end = psi[at - 1] + ((to - z[at - 1]) / (z[at] - z[at - 1])) * (psi[at] - psi[at - 1]);
  return { z: [...z.slice(first, next), to], psi: [...psi.slice(first, next), end] };
}
