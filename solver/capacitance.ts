import { carrierLog, type CarrierLog } from './carriers.ts';
import { distance, localCharge, type LocalCharge } from './charge.ts';
import { ELEMENTARY_CHARGE, EPSILON_0 } from './constants.ts';
import { depletedShare, type SpaceCharge } from './depletion.ts';
import { logNeutralShare } from './dopants.ts';
import { isUniform } from './profile.ts';
import type { Profiles } from './solution.ts';
import type { Stack } from './stack.ts';
import { TridiagonalFactors } from './tridiagonal.ts';

/** A node is taken as the neutral side of a junction when its charge is below this share of its dopants'. */
const NEUTRAL = 0.5;

/** How fast each kind of charge answers the potential, V^-1 cm^-3, >= 0. */
interface Response {
  /** electrons, and donors, which trade with them */ n: number;
  /** holes, and acceptors */ p: number;
}

/**
 * Capacitance of the junction below layer `index` at zero bias, F/cm^2: dQ/dV of the solved charge.
 *
 * A small voltage dV is put on the n side: the electrons' level shifts by dV throughout, the holes' stays (flat quasi-Fermi levels, as across any
 * depletion layer that carries no heavy current). The linear equation d/dz(eps d(dpsi)/dz) = q [kn (dpsi - dV) + kp dpsi] with the solved kn = d(n - N_D+)/dpsi
 * and kp = -d(p - N_A-)/dpsi is solved between the two neutral sides; C is the hole charge that it moves, over dV. So C = eps/W, where W is the
 * distance of the two moved charges. Dopants answer as well: it is the capacitance at low frequency.
 *
 * Checked: test/solver/capacitance.test.ts. Equal doping of 1e17: sqrt(q eps N/[4 (Vbi - 2kT/q)]) to 1e-5. One-sided junctions lie above sqrt(q eps N/[2 (Vbi - 2kT/q)])
 * (Sze and Ng, Physics of Semiconductor Devices, 2007, section 2.2; from memory), since the heavy side's carriers spill over and stand closer: by 2 % at 1e18/1e16, 7 % at
 * 1e18/1e15, 11 % at 1e19/1e15.
 *
 * @returns null where it has no meaning: sides of one kind (n+/n), no depletion, an undoped or insulating side, a side without a neutral part
 */
export function junctionCapacitance(stack: Stack, profiles: Profiles, space: SpaceCharge, index: number): number | null {
  const above = mostNeutral(profiles, space, index);
  const below = mostNeutral(profiles, space, index + 1);
  if (above < 0 || below < 0 || !(space.net[above] * space.net[below] < 0)) return null;
  // The n side of a junction that depletes lies at the higher potential.
  if (!((profiles.psi[below] - profiles.psi[above]) * space.net[below] > 0)) return null;
  const levelN = space.net[below] > 0 ? 1 : 0;

  const step = space.ranges[index][1];
  const sides = Array.from({ length: below - above + 1 }, (_, k) => above + k);
  const fine = movedCharge(stack, profiles, space, index, sides, levelN);
  // Meshes are halved ones: every other node is a mesh too, and from both the second-order rule gives a fourth-order figure.
  const every = sides.filter((s) => (s - space.ranges[s <= step ? index : index + 1][0]) % 2 === 0);
  if (!every.includes(step)) return fine;
  const coarse = movedCharge(stack, profiles, space, index, every, levelN);
  return fine === null || coarse === null ? fine : fine + (fine - coarse) / 3;
}

/** The linear problem on the given sides of nodes, both sides of the interface among them; the moved charge over dV, F/cm^2. */
function movedCharge(stack: Stack, profiles: Profiles, space: SpaceCharge, index: number, sides: number[], levelN: number): number | null {
  const levelP = 1 - levelN;
  const nodes = sides.length - 1; // the interface stands in the profiles twice
  const lower = new Float64Array(nodes);
  const diagonal = new Float64Array(nodes);
  const upper = new Float64Array(nodes);
  const psi = new Float64Array(nodes);
  const holes = new Float64Array(nodes);
  const step = space.ranges[index][1];
  let left: Response & { eps: number } = { n: 0, p: 0, eps: 0 };
  let uniform: LocalCharge | null = null;
  for (let k = 0; k < sides.length; k++) {
    const s = sides[k];
    const l = s <= step ? index : index + 1;
    const layer = stack.layers[l];
    if (k === 0 || s === step + 1) uniform = isUniform(layer) ? localCharge(layer, 0, stack.temperature, stack.assumptions) : null;
    const c = uniform ?? localCharge(layer, profiles.z[s] - profiles.z[space.ranges[l][0]], stack.temperature, stack.assumptions);
    const here = { ...responseAt(c, profiles.ec[s]), eps: c.bands.permittivity * EPSILON_0 };
    if (k > 0 && s !== step + 1) {
      const i = k - (s > step ? 1 : 0);
      const h = profiles.z[s] - profiles.z[sides[k - 1]];
      const conductance = (left.eps + here.eps) / (2 * h);
      upper[i - 1] = lower[i] = -conductance;
      const half = (ELEMENTARY_CHARGE * h) / 2;
      for (const [at, r] of [[i - 1, left], [i, here]] as const) {
        diagonal[at] += conductance + half * (r.n + r.p);
        psi[at] += half * (r.n * levelN + r.p * levelP);
        holes[at] += half * r.p;
      }
    }
    left = here;
  }
  // Both neutral sides follow their own majority.
  const last = nodes - 1;
  upper[0] = lower[last] = 0;
  diagonal[0] = diagonal[last] = 1;
  psi[0] = space.net[sides[0]] > 0 ? levelN : levelP;
  psi[last] = space.net[sides[nodes]] > 0 ? levelN : levelP;
  const factors = new TridiagonalFactors(nodes);
  if (!factors.factor(lower, diagonal, upper)) return null;
  factors.solve(psi);
  let moved = 0;
  for (let i = 0; i < nodes; i++) moved += holes[i] * (psi[i] - levelP);
  return Number.isFinite(moved) ? Math.abs(moved) : null;
}

/** Node, every other one counted, of the layer whose charge is the smallest share of its dopants'; -1 where the layer is undoped or nowhere neutral. */
function mostNeutral(profiles: Profiles, space: SpaceCharge, layer: number): number {
  if (space.most[layer] === 0) return -1;
  let best = -1;
  let least = NEUTRAL;
  for (let s = space.ranges[layer][0]; s <= space.ranges[layer][1]; s += 2) {
    const share = Math.abs(depletedShare(profiles, space, s));
    if (share < least) {
      least = share;
      best = s;
    }
  }
  return best;
}

const electrons: CarrierLog = { log: 0, slope: 0 };
const holes: CarrierLog = { log: 0, slope: 0 };

function responseAt(c: LocalCharge, ecMinusEf: number): Response {
  const b = c.bands;
  const boltzmann = b.statistics === 'boltzmann';
  carrierLog(-ecMinusEf / b.kT, b.kaneN * b.kT, boltzmann, electrons);
  carrierLog((ecMinusEf - b.gap) / b.kT, b.kaneP * b.kT, boltzmann, holes);
  const out = { n: b.nc * Math.exp(electrons.log) * electrons.slope, p: b.nv * Math.exp(holes.log) * holes.slope };
  for (const level of c.levels) {
    if (level.bound === 0) continue;
    const u = distance(b, level, ecMinusEf);
    const slope = level.density * level.bound * Math.exp(logNeutralShare(u, level.logG) + logNeutralShare(-u, -level.logG));
    if (level.donor) out.n += slope;
    else out.p += slope;
  }
  out.n /= b.kT;
  out.p /= b.kT;
  return out;
}
