import { BOLTZMANN } from '../../solver/constants.ts';
import { contactCurve, isRefusal, solveStack, type CarrierCurve, type ContactFigures, type Solution, type Stack } from '../../solver/index.ts';
import { contactFigures } from '../../solver/contact.ts';
import { spaceChargeOf } from '../../solver/depletion.ts';
import { NM_PER_CM } from '../../solver/units.ts';
import type { Complaint } from '../design/complaint.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import type { Side } from './contact-surface.ts';

export type Transmission = Stack['assumptions']['transmission'];

/** How one carrier passes, as plain lists. Energies are the electron's, zero at EF: a hole's path runs downwards. */
export interface CarrierCloseUp {
  /** away from the gap [points] */ energy_eV: number[];
  transmission: number[];
  occupancy: number[];
  /** transmission times occupancy */ product: number[];
  /** band edge of the layer that the carriers come from */ edge_eV: number;
  /** highest point of the way, image force included */ top_eV: number;
  /** the band on the way, image force included; from the metal */ way: { s_nm: number[]; band_eV: number[] };
  /** energy at which most passes, and between which 10 and 90 % of the integral lie; null where nothing passes */ peak_eV: number | null;
  from_eV: number | null;
  to_eV: number | null;
  /** of the integral, at energies beyond the top */ overTop: number | null;
}

/** The contact resistivity by one kind of transmission. */
export interface Compared {
  transmission: Transmission;
  rho_c_ohm_cm2: number | null;
  /** relative, of the integrals */ error: number | null;
}

/** One metal contact from near. */
export interface CloseUp {
  side: Side;
  metal: string | null;
  /** under the metal */ layer: string;
  /** that holds the carriers; null where none is neutral */ reservoir: string | null;
  majority: 'n' | 'p';
  temperature_K: number;
  transmission: Transmission;
  imageForce: boolean;
  barrier_n_eV: number;
  barrier_p_eV: number;
  barrier_source: ContactFigures['barrierSource'];
  lowering_eV: number | null;
  e00_meV: number | null;
  e00_over_kT: number | null;
  transport: ContactFigures['transport'];
  depletion_nm: number | null;
  rho_c_ohm_cm2: number | null;
  rho_c_n_ohm_cm2: number | null;
  rho_c_p_ohm_cm2: number | null;
  rho_c_floor_ohm_cm2: number | null;
  rho_c_closed_form_ohm_cm2: number | null;
  closed_form: ContactFigures['closedForm'];
  rho_c_error: number | null;
  saturation_A_cm2: number | null;
  notes: string[];
  /** from the metal, an interface twice, without the image force */ bands: { s_nm: number[]; ec_eV: number[]; ev_eV: number[]; layer: number[] };
  electrons: CarrierCloseUp | null;
  holes: CarrierCloseUp | null;
  /** only where asked for */ compared: Compared[] | null;
}

export type CloseUpAnswer =
  | { kind: 'seen'; contacts: CloseUp[] }
  | { kind: 'complaints'; complaints: Complaint[] }
  | { kind: 'refused'; reason: string };

export interface CloseUpOptions {
  /** values for this run: variables by name, and "temperature" */ set?: Readonly<Record<string, string>>;
  /** work the contact resistivity out by WKB, by Kemble and exactly, side by side; some 0.1 s a contact */ compare?: boolean;
}

const KINDS: readonly Transmission[] = ['wkb', 'kemble', 'exact'];
/** Energies a kT, so that f and T f are smooth, and how many at least and at most; of the wave equation fewer, as each takes some 0.1 ms. */
const PER_KT = 5;
const POINTS = { least: 161, most: 1601, exact: 321 };

/** The metal contacts of a design from near, in steps of one solve or one contact. */
export function* closeUpSteps(design: Design, options: CloseUpOptions = {}): Generator<{ done: number; of: number; seen?: never }, CloseUpAnswer> {
  const { set = {}, compare = false } = options;
  const reading = toStack(design, set);
  if (!reading.ok) return { kind: 'complaints', complaints: reading.complaints };
  const { stack } = reading;
  const sides = (['top', 'bottom'] as const).filter((side) => stack[side].kind === 'barrier');
  const of = sides.length + 1;
  yield { done: 0, of };
  let solution: Solution;
  try {
    const answer = solveStack(stack);
    if (isRefusal(answer)) return { kind: 'refused', reason: answer.reason };
    solution = answer;
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return { kind: 'complaints', complaints: [{ path: '', message: error.message }] };
  }
  const contacts: CloseUp[] = [];
  for (const [i, side] of sides.entries()) {
    yield { done: i + 1, of };
    contacts.push(closeUpOf(solution, side, compare));
  }
  return { kind: 'seen', contacts };
}

/** The same at once. */
export function closeUps(design: Design, options: CloseUpOptions = {}): CloseUpAnswer {
  const steps = closeUpSteps(design, options);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

function closeUpOf(solution: Solution, side: Side, compare: boolean): CloseUp {
  const { stack, profiles } = solution;
  const f = solution.contacts.find((contact) => contact.side === side) as ContactFigures;
  const boundary = stack[side];
  const kT = BOLTZMANN * stack.temperature;
  const { transmission } = stack.assumptions;
  // Two points tell how far the energies reach.
  const rough = contactCurve(stack, profiles, side, {}, 2);
  const reach = Math.max(...[rough?.electrons, rough?.holes].map((c) => (c ? Math.abs(c.energy[1] - c.energy[0]) : 0)));
  const most = transmission === 'exact' ? POINTS.exact : POINTS.most;
  const curve = rough && contactCurve(stack, profiles, side, {}, Math.round(Math.min(most, Math.max(POINTS.least, (PER_KT * reach) / kT))));
  const index = side === 'top' ? 0 : stack.layers.length - 1;
  const under = solution.layers[index];
  return {
    side, metal: boundary.kind === 'barrier' ? boundary.metal : null, layer: under.name, reservoir: curve ? stack.layers[curve.reservoir].name : null,
    majority: (curve ? curve.majority === 'electron' : under.n >= under.p) ? 'n' : 'p', temperature_K: stack.temperature, transmission, imageForce: boundary.kind === 'barrier' && boundary.imageForce,
    barrier_n_eV: f.barrierN as number, barrier_p_eV: f.barrierP as number, barrier_source: f.barrierSource, lowering_eV: f.lowering,
    e00_meV: f.e00 === null ? null : 1000 * f.e00, e00_over_kT: f.e00 === null ? null : f.e00 / kT, transport: f.transport, depletion_nm: f.depletion === null ? null : f.depletion * NM_PER_CM,
    rho_c_ohm_cm2: finite(f.rhoC), rho_c_n_ohm_cm2: finite(f.rhoCn), rho_c_p_ohm_cm2: finite(f.rhoCp), rho_c_floor_ohm_cm2: finite(f.rhoCFloor),
    rho_c_closed_form_ohm_cm2: finite(f.rhoCClosedForm), closed_form: f.closedForm, rho_c_error: f.rhoError, saturation_A_cm2: f.saturationCurrent, notes: [...f.rhoCNotes],
    bands: bandsFrom(solution, side),
    electrons: curve?.electrons ? carrierCloseUp(curve.electrons) : null,
    holes: curve?.holes ? carrierCloseUp(curve.holes) : null,
    compared: compare ? KINDS.map((kind) => compared(solution, side, kind)) : null,
  };
}

function compared({ stack, profiles }: Solution, side: Side, transmission: Transmission): Compared {
  const other: Stack = { ...stack, assumptions: { ...stack.assumptions, transmission } };
  const f = contactFigures(other, profiles, spaceChargeOf(other, profiles), side);
  return { transmission, rho_c_ohm_cm2: finite(f.rhoC), error: f.rhoError };
}

function bandsFrom({ profiles }: Solution, side: Side): CloseUp['bands'] {
  const out: CloseUp['bands'] = { s_nm: [], ec_eV: [], ev_eV: [], layer: [] };
  const last = profiles.z.length - 1;
  for (let i = 0; i <= last; i++) {
    const node = side === 'top' ? i : last - i;
    out.s_nm.push(Math.abs(profiles.z[node] - profiles.z[side === 'top' ? 0 : last]) * NM_PER_CM);
    out.ec_eV.push(profiles.ec[node]);
    out.ev_eV.push(profiles.ev[node]);
    out.layer.push(profiles.layer[node]);
  }
  return out;
}

function carrierCloseUp(c: CarrierCurve): CarrierCloseUp {
  return {
    energy_eV: [...c.energy], transmission: [...c.transmission], occupancy: [...c.occupancy], product: [...c.product], edge_eV: c.edge, top_eV: c.top,
    way: { s_nm: Array.from(c.way.s, (s) => s * NM_PER_CM), band_eV: [...c.way.band] },
    ...whereItPasses(c),
  };
}

/** Where the current goes through: the highest T f, and the middle 80 % of its integral by trapezes. */
function whereItPasses({ energy, product, top }: CarrierCurve): Pick<CarrierCloseUp, 'peak_eV' | 'from_eV' | 'to_eV' | 'overTop'> {
  const sums = [0];
  let best = 0;
  for (let i = 1; i < product.length; i++) {
    sums.push(sums[i - 1] + ((product[i] + product[i - 1]) / 2) * Math.abs(energy[i] - energy[i - 1]));
    if (product[i] > product[best]) best = i;
  }
  const total = sums[sums.length - 1];
  if (!(total > 0)) return { peak_eV: null, from_eV: null, to_eV: null, overTop: null };
  const at = (share: number): number => {
    const i = sums.findIndex((sum) => sum >= share * total);
    const part = (share * total - sums[i - 1]) / (sums[i] - sums[i - 1]);
    return energy[i - 1] + part * (energy[i] - energy[i - 1]);
  };
  // The top lies between two energies, or beyond both ends.
  const j = energy.findIndex((e) => (energy[1] > energy[0] ? e >= top : e <= top));
  const below = j < 0 ? total : j === 0 ? 0 : sums[j - 1] + (sums[j] - sums[j - 1]) * ((top - energy[j - 1]) / (energy[j] - energy[j - 1]));
  return { peak_eV: energy[best], from_eV: at(0.1), to_eV: at(0.9), overTop: 1 - below / total };
}

const finite = (value: number | null): number | null => (value !== null && Number.isFinite(value) ? value : null);
