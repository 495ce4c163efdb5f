import type { Result } from '../result/types.ts';

/** Share of the axis dealt out evenly among the layers; the rest goes by bending. */
const EVEN_SHARE = 0.5;
/** Most of a layer's room that its flat part may take. */
const QUIET_SHARE = 0.45;
/** Share of a layer's bending that its flat part may still hold. */
const QUIET_BENDING = 0.02;

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
 * of the room. So a depletion region keeps its shape, and 2 nm on 300 um can be read. Every share moves continuously with the result, so that
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
    const flat = bending[i] > 1e-6 ? flatPart(profile.z_nm, profile.potential_V, nodes[i], bending[i]) : null;
    if (flat) {
      const cuts = splitRoom(layer.thickness_nm, flat, top);
      for (const cut of cuts) {
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

interface FlatPart {
  from: number;
  to: number;
  /** share of the layer's bending above it and below it */ above: number;
  below: number;
}

/** The longest stretch of the layer that holds at most QUIET_BENDING of its bending. Two pointers over the nodes, the far end interpolated. */
function flatPart(z: number[], psi: number[], [first, last]: [number, number], bending: number): FlatPart | null {
  const allowed = QUIET_BENDING * bending;
  let best: FlatPart | null = null;
  let end = first;
  let held = 0;
  let above = 0;
  for (let i = first; i < last; i++) {
    if (end < i) [end, held] = [i, 0];
    while (end < last) {
      const step = Math.abs(psi[end + 1] - psi[end]);
      if (held + step > allowed) break;
      held += step;
      end++;
    }
    let to = z[end];
    if (end < last) to += ((allowed - held) / Math.abs(psi[end + 1] - psi[end])) * (z[end + 1] - z[end]);
    if (!best || to - z[i] > best.to - best.from) best = { from: z[i], to, above: above / bending, below: Math.max(0, 1 - (above + (end < last ? allowed : held)) / bending) };
    const step = Math.abs(psi[i + 1] - psi[i]);
    held = Math.max(0, held - step);
    above += step;
  }
  return best;
}

/** Where the scale of a layer changes: depth and the share of the layer's room used up to there. */
function splitRoom(thickness: number, flat: FlatPart, top: number): { z: number; room: number }[] {
  const length = (flat.to - flat.from) / thickness;
  if (length <= QUIET_SHARE) return [];
  const lengthAbove = (flat.from - top) / thickness;
  const busyLength = 1 - length;
  const busyBending = flat.above + flat.below;
  // The two bent ends share by length where the flat part is hardly pressed, half by bending where it is pressed hard.
  const pressed = 0.5 * Math.min(1, (length - QUIET_SHARE) / (1 - QUIET_SHARE));
  const byLength = busyLength > 0 ? lengthAbove / busyLength : 0;
  const byBending = busyBending > 0 ? flat.above / busyBending : byLength;
  const aboveRoom = (1 - QUIET_SHARE) * ((1 - pressed) * byLength + pressed * byBending);
  const least = 1e-9 * thickness;
  const cuts: { z: number; room: number }[] = [];
  if (flat.from - top > least && aboveRoom > 1e-9) cuts.push({ z: flat.from, room: aboveRoom });
  const belowRoom = aboveRoom + QUIET_SHARE;
  const bottom = top + thickness;
  if (bottom - flat.to > least && belowRoom < 1 - 1e-9) cuts.push({ z: flat.to, room: belowRoom });
  return cuts;
}
