import type { Profiles } from '../../solver/solution.ts';

/**
 * Largest distance of two solutions of one stack, V: at each node of `fine` the potential there, against the cubic through potentials and fields of `other`
 * (Hermite), which is how everything between nodes is read. So nodes and what lies between them are both judged.
 */
export function largestDistance(other: Profiles, fine: Profiles): { distance: number; layer: number; depth: number } {
  let worst = { distance: 0, layer: 0, depth: 0 };
  const layers = other.layer[other.layer.length - 1] + 1;
  let [f, o] = [0, 0];
  for (let l = 0; l < layers; l++) {
    const [fineTop, otherTop] = [fine.z[f], other.z[o]];
    let last = o;
    while (last + 1 < other.layer.length && other.layer[last + 1] === l) last++;
    for (; f < fine.layer.length && fine.layer[f] === l; f++) {
      const depth = fine.z[f] - fineTop;
      while (o + 1 < last && other.z[o + 1] - otherTop < depth) o++;
      const h = other.z[o + 1] - other.z[o];
      const u = Math.min(1, Math.max(0, (depth - (other.z[o] - otherTop)) / h));
      const distance = Math.abs(hermite(other.psi[o], other.psi[o + 1], -h * other.field[o], -h * other.field[o + 1], u) - fine.psi[f]);
      if (!(distance <= worst.distance)) worst = { distance, layer: l, depth };
    }
    o = last + 1;
  }
  return worst;
}

/** Cubic on 0..1 with these values and slopes at its ends. */
function hermite(a: number, b: number, slopeA: number, slopeB: number, u: number): number {
  const v = 1 - u;
  return a * v * v * (1 + 2 * u) + b * u * u * (1 + 2 * v) + u * v * (slopeA * v - slopeB * u);
}
