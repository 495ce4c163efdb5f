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
 * Capacitance of every junction of the stack at zero bias, F/cm^2 [layers - 1]: dQ/dV of the solved charge.
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
 * The neutral sides are the nearest ones: a layer next to the interface that is undoped (p-i-n) or depleted throughout hands on to the layer behind it.
 *
 * Interfaces between the same two neutral sides share one capacitance, so each stretch of the stack is solved once however many layers it holds.
 *
 * @returns null where it has no meaning: sides of one kind (n+/n, or a cut inside one side's depletion), no depletion, an insulator in between, a side
 *   that is neutral nowhere
 */
export function junctionCapacitances(stack: Stack, profiles: Profiles, space: SpaceCharge): (number | null)[] {
  const neutral = stack.layers.map((_, l) => neutralNode(stack, profiles, space, l));
  const downTo = nearestNeutral(neutral, 1);
  const upTo = nearestNeutral(neutral, -1);
  // Stretches between neutral sides do not overlap: the last one is the only one that can be met again.
  let last: { above: number; below: number; capacitance: number | null } | null = null;
  return Array.from({ length: Math.max(0, stack.layers.length - 1) }, (_, index) => {
    const above = upTo[index];
    const below = downTo[index + 1];
    if (above < 0 || below < 0 || !(space.net[above] * space.net[below] < 0)) return null;
    const step = space.ranges[index][1];
    const handedOn = profiles.layer[above] !== index || profiles.layer[below] !== index + 1;
    if (handedOn && space.net[step] * space.net[step + 1] > 0) return null;
    if (last?.above !== above || last.below !== below) last = { above, below, capacitance: capacitanceBetween(stack, profiles, space, above, below) };
    return last.capacitance;
  });
}

/** Capacitance between two neutral sides of opposite doping, F/cm^2; null where they do not deplete each other. */
function capacitanceBetween(stack: Stack, profiles: Profiles, space: SpaceCharge, above: number, below: number): number | null {
  // The n side of a junction that depletes lies at the higher potential.
  if (!((profiles.psi[below] - profiles.psi[above]) * space.net[below] > 0)) return null;
  const levelN = space.net[below] > 0 ? 1 : 0;
  const answers = answersOf(stack, profiles, space, above, below);
  const fine = movedCharge(profiles, answers, above, below, 1, levelN);
  // Meshes are halved ones: every other node is a mesh too, and from both the second-order rule gives a fourth-order figure.
  for (let l = profiles.layer[above]; l <= profiles.layer[below]; l++) {
    const first = Math.max(above, space.ranges[l][0]);
    if ((Math.min(below, space.ranges[l][1]) - first) % 2 !== 0) return fine;
  }
  const coarse = movedCharge(profiles, answers, above, below, 2, levelN);
  return fine === null || coarse === null ? fine : fine + (fine - coarse) / 3;
}

/** Responses and permittivity (F/cm) of the sides `above` to `below` of the profiles [sides]. */
interface Answers {
  n: Float64Array;
  p: Float64Array;
  eps: Float64Array;
}

function answersOf(stack: Stack, profiles: Profiles, space: SpaceCharge, above: number, below: number): Answers {
  const sides = below - above + 1;
  const out: Answers = { n: new Float64Array(sides), p: new Float64Array(sides), eps: new Float64Array(sides) };
  let uniform: LocalCharge | null = null;
  for (let s = above; s <= below; s++) {
    const l = profiles.layer[s];
    const layer = stack.layers[l];
    if (s === above || l !== profiles.layer[s - 1]) uniform = isUniform(layer) ? localCharge(layer, 0, stack.temperature, stack.assumptions) : null;
    const c = uniform ?? localCharge(layer, profiles.z[s] - profiles.z[space.ranges[l][0]], stack.temperature, stack.assumptions);
    const { n, p } = responseAt(c, profiles.ec[s]);
    out.n[s - above] = n;
    out.p[s - above] = p;
    out.eps[s - above] = c.bands.permittivity * EPSILON_0;
  }
  return out;
}

/** The linear problem on every `stride`-th node from `above` to `below`, both sides of each interface among them; the moved charge over dV, F/cm^2. */
function movedCharge(profiles: Profiles, answers: Answers, above: number, below: number, stride: number, levelN: number): number | null {
  const levelP = 1 - levelN;
  // Interfaces stand in the profiles twice, in the equations once.
  const nodes = (below - above - (profiles.layer[below] - profiles.layer[above])) / stride + 1;
  const lower = new Float64Array(nodes);
  const diagonal = new Float64Array(nodes);
  const upper = new Float64Array(nodes);
  const psi = new Float64Array(nodes);
  const holes = new Float64Array(nodes);
  const { n, p, eps } = answers;
  const add = (i: number, side: number, half: number): void => {
    diagonal[i] += half * (n[side] + p[side]);
    psi[i] += half * (n[side] * levelN + p[side] * levelP);
    holes[i] += half * p[side];
  };
  let left = above;
  for (let i = 1; i < nodes; i++) {
    if (profiles.layer[left + 1] !== profiles.layer[left]) left++;
    const s = left + stride;
    const h = profiles.z[s] - profiles.z[left];
    const conductance = (eps[left - above] + eps[s - above]) / (2 * h);
    upper[i - 1] = lower[i] = -conductance;
    diagonal[i - 1] += conductance;
    diagonal[i] += conductance;
    const half = (ELEMENTARY_CHARGE * h) / 2;
    add(i - 1, left - above, half);
    add(i, s - above, half);
    left = s;
  }
  // Both neutral sides follow their own majority: with the voltage counted so that the lower side takes it, 0 above and 1 below.
  const last = nodes - 1;
  upper[0] = lower[last] = 0;
  diagonal[0] = diagonal[last] = 1;
  psi[0] = 0;
  psi[last] = 1;
  const factors = new TridiagonalFactors(nodes);
  if (!factors.factor(lower, diagonal, upper)) return null;
  factors.solve(psi);
  let moved = 0;
  for (let i = 0; i < nodes; i++) moved += holes[i] * (psi[i] - levelP);
  return Number.isFinite(moved) ? Math.abs(moved) : null;
}

/** What `neutralNode` says of a layer without a neutral part, and of an insulator. */
const NOWHERE = -1;
const INSULATOR = -2;

/** Node, every other one counted, of a layer whose charge is the smallest share of its dopants'; NOWHERE where none is neutral. */
function neutralNode(stack: Stack, profiles: Profiles, space: SpaceCharge, layer: number): number {
  if (localCharge(stack.layers[layer], 0, stack.temperature, stack.assumptions).bands.insulator) return INSULATOR;
  let best = NOWHERE;
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

/** The neutral node of each layer or, failing that, of the nearest one beyond it (`step` 1: below); negative where an insulator or the end of the stack comes first. */
function nearestNeutral(neutral: readonly number[], step: -1 | 1): number[] {
  const out = [...neutral];
  let met = NOWHERE;
  for (let l = step > 0 ? out.length - 1 : 0; l >= 0 && l < out.length; l -= step) {
    if (out[l] === NOWHERE) out[l] = met;
    met = out[l];
  }
  return out;
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
