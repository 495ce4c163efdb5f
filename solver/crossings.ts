import { localCharge } from './charge.ts';
import { ELEMENTARY_CHARGE, EPSILON_0 } from './constants.ts';
import { isUniform, landmarksOf, profileAt, type Landmark } from './profile.ts';
import type { Assumptions, Layer } from './stack.ts';

/** Places of a layer that are asked for the sign of its net doping. */
const ASKED = 256;
const HALVINGS = 50;
/** A junction's width holds this many reaches: nodes at one and two of them on either side stand inside its depletion. */
const REACHES = 6;

/**
 * Junctions inside a graded layer: where donors and acceptors cross. The potential turns there by most of the gap within a depletion that can be a
 * thousandth of the layer; a mesh that steps over it sees neutral nodes on both sides, and nothing that would call for more.
 *
 * @returns depth of each crossing, and as its reach a share of the depletion width of a linearly graded junction, W = (12 eps V/[q a])^(1/3), a the slope of the
 *   doping and V the gap (Sze and Ng, Physics of Semiconductor Devices, 2007, section 2.2; from memory)
 */
export function crossingsOf(layer: Layer, T: number, assumptions: Assumptions): Landmark[] {
  if (isUniform(layer) || layer.dopants.length === 0) return [];
  const { thickness } = layer;
  const asked = [...Array.from({ length: ASKED + 1 }, (_, i) => (thickness * i) / ASKED), ...landmarksOf(layer).flatMap(({ z, reach }) => [-2, -1, 0, 1, 2].map((j) => z + j * reach))]
    .filter((z) => z >= 0 && z <= thickness)
    .sort((a, b) => a - b);
  const out: Landmark[] = [];
  let before = netAt(layer, asked[0]);
  for (let i = 1; i < asked.length; i++) {
    const net = netAt(layer, asked[i]);
    if (before * net < 0) out.push(crossing(layer, asked[i - 1], asked[i], T, assumptions));
    if (net !== 0) before = net;
  }
  return out.filter((mark) => mark.z > 0 && mark.z < thickness && mark.reach > 0);
}

function crossing(layer: Layer, above: number, below: number, T: number, assumptions: Assumptions): Landmark {
  const side = Math.sign(netAt(layer, above));
  const cell = below - above;
  let [low, high] = [above, below];
  for (let i = 0; i < HALVINGS; i++) {
    const middle = 0.5 * (low + high);
    if (netAt(layer, middle) * side > 0) low = middle;
    else high = middle;
  }
  const z = 0.5 * (low + high);
  const { bands } = localCharge(layer, z, T, assumptions);
  // The slope over a stretch of the width's own size: it and the width are found together, from the asked cell down.
  let width = cell;
  for (let i = 0; i < 4; i++) {
    const from = Math.max(0, z - width / 4);
    const to = Math.min(layer.thickness, z + width / 4);
    const slope = Math.abs(netAt(layer, to) - netAt(layer, from)) / (to - from);
    width = Math.cbrt((12 * bands.permittivity * EPSILON_0 * bands.gap) / (ELEMENTARY_CHARGE * slope));
  }
  return { z, reach: Math.min(width, layer.thickness) / REACHES };
}

/** All donors less all acceptors, compensating charges included, cm^-3. */
function netAt(layer: Layer, z: number): number {
  let net = 0;
  for (const d of layer.dopants) net += (d.kind === 'donor' ? 1 : -1) * profileAt(d.concentration, z, layer.thickness) * d.activation * (1 - d.compensation);
  return net;
}
