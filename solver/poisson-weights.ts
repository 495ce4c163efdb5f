/**
 * Weights of Poisson's equation: how much of the charge at each of three neighbouring nodes counts in a node's row, cm.
 *
 * A row is the equation integrated with the hat function of its node (1 at the node, straight to 0 at both neighbours), which makes the fluxes
 * exact: eps dpsi/dz between nodes is their difference quotient, whatever the charge does in between. Only the charge is approximated:
 * - box: the node's own charge over half of both cells, second order;
 * - compact: the parabola through three neighbouring nodes, fourth order (variable-step form of Numerov's rule; Jain, Iyengar and Subramanyam,
 *   Comput. Methods Appl. Mech. Eng. 42, 273, 1984, from memory). At a layer's ends the half hat with the parabola through the three nodes
 *   of that side, so that the rows of the two layers join with their sheet charge to the matching condition of the interface.
 * Since all hats of a layer sum to one, the rows sum to Gauss's law over it.
 */

/** Three weights of a row into out[o .. o + 2], for nodes at -h1, 0, h2. */
export function compactRow(h1: number, h2: number, out: Float64Array, o: number): void {
  out[o] = (h1 * h1 + h1 * h2 - h2 * h2) / (12 * h1);
  out[o + 2] = (h2 * h2 + h1 * h2 - h1 * h1) / (12 * h2);
  out[o + 1] = 0.5 * (h1 + h2) - out[o] - out[o + 2];
}

/**
 * Three weights of the half hat of an end node, 1 at the end and 0 at the next node, for nodes at 0, h1, h1 + h2 from that end.
 * `first` puts them in that order (top of a layer), else in the opposite one (bottom).
 */
export function compactEnd(h1: number, h2: number, first: boolean, out: Float64Array, o: number): void {
  const own = (h1 * (h2 / 3 + h1 / 4)) / (h1 + h2);
  const far = (-h1 * h1 * h1) / (12 * h2 * (h1 + h2));
  out[first ? o : o + 2] = own;
  out[o + 1] = 0.5 * h1 - own - far;
  out[first ? o + 2 : o] = far;
}

/** Charge of the half hat below an inner node, that is over the cell of length h2: weights for nodes at -h1, 0, h2. */
export function compactHalfBelow(h1: number, h2: number, out: Float64Array): void {
  out[0] = (-h2 * h2 * h2) / (12 * h1 * (h1 + h2));
  out[2] = (h2 * (h2 + 2 * h1)) / (12 * (h1 + h2));
  out[1] = 0.5 * h2 - out[0] - out[2];
}

/**
 * What the parabolas of one layer miss of the charge of each row, from the cubic and quartic through five nodes, C/cm^2 per unit of `rho` in C/cm^3.
 *
 * @param z    [nodes], at least 5, rising
 * @param rho  [nodes or more]; its divided differences are left in it
 * @param out  [nodes or more]: defects of the compact rows, ends included
 * @param fourth  [nodes or more]: memory for the fourth differences
 */
export function compactDefects(z: Float64Array, rho: Float64Array, out: Float64Array, fourth: Float64Array): void {
  const n = z.length;
  // Divided differences in place: after pass p, d[k] spans nodes k .. k + p.
  const third = rho;
  for (let p = 1; p <= 3; p++) for (let k = 0; k + p < n; k++) third[k] = (third[k + 1] - third[k]) / (z[k + p] - z[k]);
  for (let k = 0; k + 4 < n; k++) fourth[k] = (third[k + 1] - third[k]) / (z[k + 4] - z[k]);
  for (let k = 1; k + 1 < n; k++) {
    const h1 = z[k] - z[k - 1];
    const h2 = z[k + 1] - z[k];
    const [a, b] = [h1 * h1, h2 * h2];
    const m1 = (b - a) / 6;
    const m2 = (a * h1 + b * h2) / 12;
    const m3 = (b * b - a * a) / 20;
    const m4 = (a * a * h1 + b * b * h2) / 30;
    // Moments of the hat with t (t + h1)(t - h2), and with that times (t - s), s the place of the fourth node.
    const cubic = m3 + (h1 - h2) * m2 - h1 * h2 * m1;
    const below = k + 2 < n;
    const s = below ? z[k + 2] - z[k] : z[k - 2] - z[k];
    const quartic = m4 + (h1 - h2) * m3 - h1 * h2 * m2 - s * cubic;
    out[k] = third[below ? k - 1 : k - 2] * cubic + fourth[Math.min(Math.max(k - 2, 0), n - 5)] * quartic;
  }
  out[0] = endDefect(z[1] - z[0], z[2] - z[0], z[3] - z[0], third[0], fourth[0]);
  out[n - 1] = endDefect(z[n - 1] - z[n - 2], z[n - 1] - z[n - 3], z[n - 1] - z[n - 4], -third[n - 4], fourth[n - 5]);
}

/** The same for the half hat of an end, nodes at 0, a, b, c from it. */
function endDefect(a: number, b: number, c: number, third: number, fourth: number): number {
  const a3 = a * a * a;
  const cubic = (a3 * a) / 20 - ((a + b) * a3) / 12 + (b * a3) / 6;
  const quartic = (a3 * a * a) / 30 - ((a + b) * a3 * a) / 20 + (a * b * a3) / 12 - c * cubic;
  return third * cubic + fourth * quartic;
}
