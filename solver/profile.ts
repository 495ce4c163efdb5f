import { erfc, inverseErfc } from './erfc.ts';
import type { Layer, Profile } from './stack.ts';

/**
 * Value of a profile at a depth, in the profile's own unit.
 *
 * @param z          from the layer's top, cm
 * @param thickness  of the layer, cm, > 0
 *
 * With u = z/thickness: "linear" from + (to - from) u; "gaussian" from (to/from)^(u^2); "erfc" from erfc(u erfc^-1(to/from)), the last two
 * with the peak at the end of the larger value. "implant": peak exp[-(z - depth)^2/(2 straggle^2)] + background. "points": straight
 * between them (in the logarithm on a "log" scale, where both values are positive), the nearest value beyond them.
 */
export function profileAt(profile: Profile, z: number, thickness: number): number {
  switch (profile.kind) {
    case 'constant':
      return profile.value;
    case 'linear': {
      // Rounding may put the end of a layer a hair outside; a composition must not leave its range there.
      const u = Math.min(1, Math.max(0, z / thickness));
      return profile.from * (1 - u) + profile.to * u;
    }
    case 'gaussian':
    case 'erfc': {
      const { from, to, kind } = profile;
      const u = z / thickness;
      return from >= to ? falling(kind, from, to, u) : falling(kind, to, from, 1 - u);
    }
    case 'implant': {
      const u = (z - profile.depth) / profile.straggle;
      return profile.peak * Math.exp(-0.5 * u * u) + profile.background;
    }
    case 'points':
      return between(profile.z, profile.value, z, profile.scale === 'log');
  }
}

/** From the larger value at u = 0 to the smaller at u = 1. */
function falling(kind: 'gaussian' | 'erfc', from: number, to: number, u: number): number {
  // Rounding may put the end of a layer a hair outside.
  const v = Math.min(1, Math.max(0, u));
  if (from === to || v === 0) return from;
  // Neither shape reaches zero in a finite depth: with a zero at its end nothing is left of it below the peak.
  if (to === 0) return 0;
  const ratio = to / from;
  return kind === 'gaussian' ? from * Math.pow(ratio, v * v) : from * erfc(v * inverseErfc(ratio));
}

function between(zs: readonly number[], values: readonly number[], z: number, logarithmic: boolean): number {
  const last = zs.length - 1;
  if (last < 0) throw new RangeError('a profile of points needs at least one');
  if (!(z > zs[0])) return values[0];
  if (z >= zs[last]) return values[last];
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (zs[middle] <= z) low = middle;
    else high = middle;
  }
  const u = (z - zs[low]) / (zs[high] - zs[low]);
  if (logarithmic && values[low] > 0 && values[high] > 0) return values[low] * Math.pow(values[high] / values[low], u);
  return values[low] + (values[high] - values[low]) * u;
}

/** Whether nothing in the layer moves with depth. */
export function isUniform(layer: Layer): boolean {
  return isFlat(layer.x) && layer.dopants.every((d) => isFlat(d.concentration));
}

function isFlat(p: Profile): boolean {
  switch (p.kind) {
    case 'constant':
      return true;
    case 'implant':
      return p.peak === 0;
    case 'points':
      return p.value.every((v) => v === p.value[0]);
    default:
      return p.from === p.to;
  }
}

/** A depth of a layer, cm, where a profile peaks or bends, and the length over which it does. */
export interface Landmark {
  z: number;
  reach: number;
}

/** Where the profiles of a layer do what evenly spread nodes could miss: at an implant's peak, at each inner point of a measured profile. */
export function landmarksOf(layer: Layer): Landmark[] {
  return [layer.x, ...layer.dopants.map((d) => d.concentration)].flatMap((p): Landmark[] => {
    if (isFlat(p)) return [];
    if (p.kind === 'implant') return [{ z: p.depth, reach: p.straggle }];
    if (p.kind !== 'points') return [];
    return p.z.slice(1, -1).map((z, i) => ({ z, reach: Math.min(z - p.z[i], p.z[i + 2] - z) }));
  }).filter((mark) => mark.z > 0 && mark.z < layer.thickness && mark.reach > 0);
}
