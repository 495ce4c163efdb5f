import type { Result } from '../result/types.ts';
import { nodesOfLayers } from './layer-nodes.ts';

/** Share of the axis dealt out evenly among the layers; the rest goes by bending. */
const EVEN_SHARE = 0.5;
/** Most of a layer's room that is dealt out by its field instead of its length. */
const FIELD_SHARE = 0.6;
/** A layer that bends by this much, V, gets half of FIELD_SHARE: what bends less is drawn to scale. */
const SLIGHT = 0.01;

/** Depths, nm, and the room used up to each of them, 0..1. Both rise strictly; straight in between. */
export interface DepthRoom {
  z: number[];
  room: number[];
}

/**
 * How an even-handed axis deals out its room.
 *
 * A layer gets EVEN_SHARE/layers, and of the rest a share as large as its share of all the bending (the integral of |dpsi|). Within a layer, FIELD_SHARE of its room is
 * dealt out along the integral of sqrt|dpsi/dz|, the rest along its length. So 2 nm on 300 um can be read, and so can 100 nm of depletion or a
 * 5 nm well at the top of a thick layer. The root leaves a parabola of the potential rounded, (1 - u)^(4/3), where the field itself would draw it straight; a uniform
 * field stays straight. All shares move continuously with the result, and the axis does not jump while a value is dragged.
 */
export function depthRoom(result: Result): DepthRoom {
  const { layers, profile } = result;
  const nodes = nodesOfLayers(result);
  const bending = nodes.map(([first, last]) => sumOfCells(first, last, (i) => Math.abs(profile.potential_V[i + 1] - profile.potential_V[i])));
  const all = bending.reduce((sum, b) => sum + b, 0);
  const z = [0];
  const room = [0];
  layers.forEach((layer, i) => {
    const top = z[z.length - 1];
    const before = room[room.length - 1];
    const bottom = top + layer.thickness_nm;
    // Below a microvolt the differences are rounding, not bending.
    const share = all > 1e-6 ? EVEN_SHARE / layers.length + (1 - EVEN_SHARE) * (bending[i] / all) : 1 / layers.length;
    const [first, last] = nodes[i];
    const field = (FIELD_SHARE * bending[i]) / (bending[i] + SLIGHT);
    const root = (j: number): number => Math.sqrt(Math.abs(profile.potential_V[j + 1] - profile.potential_V[j]) * (profile.z_nm[j + 1] - profile.z_nm[j]));
    const roots = sumOfCells(first, last, root);
    let passed = 0;
    for (let j = first; j + 1 < last && roots > 0; j++) {
      passed += root(j);
      const at = profile.z_nm[j + 1];
      const used = before + share * ((1 - field) * ((at - top) / layer.thickness_nm) + field * (passed / roots));
      if (!(at > z[z.length - 1] && at < bottom && used > room[room.length - 1])) continue;
      z.push(at);
      room.push(used);
    }
    z.push(bottom);
    room.push(before + share);
  });
  return { z, room };
}

function sumOfCells(first: number, last: number, of: (cell: number) => number): number {
  let sum = 0;
  for (let i = first; i < last; i++) sum += of(i);
  return sum;
}
