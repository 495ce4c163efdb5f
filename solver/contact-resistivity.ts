import { barrierShape, highestEdge, type BarrierShape } from './barrier-shape.ts';
import { richardson, type Carrier } from './carrier-constants.ts';
import { BOLTZMANN } from './constants.ts';
import type { ContactPath } from './contact-path.ts';
import { GENTLE, waveSteps, waveTransmission } from './exact-transmission.ts';
import { profileAt } from './profile.ts';
import { integrate } from './quadrature.ts';
import type { Stack } from './stack.ts';
import { kembleExponent, wkbExponent, type Dispersion } from './wkb.ts';

export type Transmission = 'wkb' | 'kemble' | 'exact';

export interface ResistivityOptions {
  /** by default that of the stack's assumptions */ transmission?: Transmission;
  /** by default one band */ dispersion?: Dispersion;
  /** by default that of the boundary */ imageForce?: boolean;
  /** relative error asked of the integral, 2e-6 by default */ accuracy?: number;
}

/** What one carrier conducts across a contact. */
export interface CarrierConductance {
  /** natural logarithm of 1/rho_c, ohm^-1 cm^-2 */ log: number;
  /** relative, of the integrals over energy and depth */ error: number;
  /** the same with T = 1 above the neutral edge */ logFloor: number;
  transmission: Transmission;
}

/** A carrier that cannot be computed, and which constant is missing, for a sentence. */
export interface MissingConstant {
  missing: string;
}

export function isMissing(c: CarrierConductance | MissingConstant): c is MissingConstant {
  return 'missing' in c;
}

/** ln of Fermi's occupancy at an energy over kT. */
export function logOccupancy(u: number): number {
  return u > 0 ? -u - Math.log1p(Math.exp(-u)) : -Math.log1p(Math.exp(u));
}

/** ln of ln(1 + exp(-u)): the integral of the occupancy above u, in kT. */
export function logOccupancyAbove(u: number): number {
  return u > 30 ? -u : Math.log(u < 0 ? -u + Math.log1p(Math.exp(u)) : Math.log1p(Math.exp(-u)));
}

/** The transmission's logarithm against the carrier's energy, eV. */
export type LogTransmission = (energy: number) => number;

/** @param steps  of the exact way, steps a cell */
export function logTransmission(shape: BarrierShape, kind: Transmission, dispersion: Dispersion = 'one-band', steps = 4): LogTransmission {
  if (kind === 'exact') {
    const way = waveSteps(shape, steps);
    return (energy) => waveTransmission(way, energy);
  }
  if (kind === 'kemble') return (energy) => -softPlus(kembleExponent(shape, energy, dispersion));
  return (energy) => (energy >= shape.top ? 0 : -wkbExponent(shape, energy, dispersion));
}

/** ln(1 + e^x). */
function softPlus(x: number): number {
  return x > 0 ? x + Math.log1p(Math.exp(-x)) : Math.log1p(Math.exp(x));
}

const ACCURACY = 2e-6;
/** Of the wave's way, relative in T. */
const WAVE_ACCURACY = 3e-6;
/** Places at which the window is looked for, and how far below the peak it ends, in natural logarithms. */
const SCAN = 24;
const DEPTH = 18;
const MOST_DIVISION = 16;
/** Panels that an integral may take. A wave kept between two steps of a thick undoped layer rings in energy more finely than can be followed: the error says so. */
const MOST_PANELS = { wkb: 60, kemble: 60, exact: 14 };
/** With T = 1 above the top, a part so small that T is not looked at there. */
const NEXT_TO_NOTHING = 1e-7;
/** Reach above the barrier and above EF, kT. */
const REACH = 32;
/** A barrier below this many kT stops nobody. */
const NO_BARRIER = 1e-3;

/**
 * 1/rho_c of one carrier at zero bias: (A/k^2) Int T(E) f(E) dE, from the band edge of the neutral layer upwards. Padovani and Stratton, Solid-State Electron. 9, 695
 * (1966); Chang, Fang and Sze, Solid-State Electron. 14, 541 (1971). A is that of the neutral layer, from which the carriers come.
 *
 * @returns what is missing where the layer has no Richardson constant, or a layer on the way no tunnelling mass (asked for only where there is a barrier)
 *
 * The variable is E = edge + (top - edge) sin^2(theta), which smooths the integrand at both ends. Its peak is looked for first; what lies e^-18 below
 * it is left out. A carrier without a barrier has T = 1, but in the exact transmission, where the step to the metal's band throws some back.
 */
export function carrierConductance(stack: Stack, path: ContactPath, carrier: Carrier, options: ResistivityOptions = {}): CarrierConductance | MissingConstant {
  const kT = BOLTZMANN * stack.temperature;
  const layer = stack.layers[path.reservoir];
  const x = profileAt(layer.x, path.side === 'top' ? 0 : layer.thickness, layer.thickness);
  const constant = richardson(layer.material, x, carrier);
  if (constant === undefined) return { missing: `the ${carrier} Richardson constant of ${layer.material.id}` };
  const edge = carrier === 'electron' ? path.ecMinusEf : path.efMinusEv;
  const front = Math.log(constant / BOLTZMANN ** 2) + Math.log(kT);
  const logFloor = front + logOccupancyAbove(edge / kT);
  const kind = options.transmission ?? stack.assumptions.transmission;
  if (highestEdge(path, carrier) <= edge + NO_BARRIER * kT && kind !== 'exact') return { log: logFloor, error: 0, logFloor, transmission: kind };
  const shape = carrierBarrier(stack, path, carrier, kind, options.imageForce);
  if ('missing' in shape) return shape;
  // The image force may have taken the whole barrier.
  if (shape.layer.length === 0 || (kind !== 'exact' && shape.top <= edge + NO_BARRIER * kT)) return { log: logFloor, error: 0, logFloor, transmission: kind };
  const { log, error } = logIntegral(shape, kind, options.dispersion ?? 'one-band', options.accuracy ?? ACCURACY);
  return { log: front + log, error, logFloor, transmission: kind };
}

/** The barrier of a carrier as one kind of transmission needs it; image force by default as the boundary says. */
export function carrierBarrier(stack: Stack, path: ContactPath, carrier: Carrier, kind: Transmission, imageForce?: boolean): BarrierShape | MissingConstant {
  const boundary = stack[path.side];
  const shape = barrierShape(stack, path, carrier, imageForce ?? (boundary.kind === 'barrier' && boundary.imageForce), kind === 'exact');
  const unknown = shape.weight.findIndex((w) => !(w > 0));
  return unknown < 0 ? shape : { missing: `the ${carrier} tunnelling mass of ${stack.layers[shape.layer[Math.floor(unknown / 3)]].material.id}` };
}

/** ln of Int T f dE/kT above the neutral edge, with its relative error. */
function logIntegral(shape: BarrierShape, kind: Transmission, dispersion: Dispersion, accuracy: number): { log: number; error: number } {
  const { edge, top, kT } = shape;
  const range = top - edge;
  const rough: LogTransmission = (energy) => (energy >= top ? 0 : -wkbExponent(shape, energy, dispersion));
  /** ln of T f dE/dtheta/kT */
  const mapped = (transmission: LogTransmission, theta: number): number => {
    const energy = edge + range * Math.sin(theta) ** 2;
    return transmission(energy) + logOccupancy(energy / kT) + Math.log((range / kT) * Math.sin(2 * theta));
  };
  const above = logOccupancyAbove(top / kT);
  let peak = above;
  let peakEnergy = top;
  const within = { from: 0, to: Math.PI / 2, peak: Math.PI / 4 };
  const climbs = range > NO_BARRIER * kT;
  if (climbs) {
    const logs = Array.from({ length: SCAN }, (_, j) => mapped(rough, ((j + 0.5) / SCAN) * (Math.PI / 2)));
    const best = logs.indexOf(Math.max(...logs));
    const place = (j: number): number => ((j + 0.5) / SCAN) * (Math.PI / 2);
    peak = Math.max(above, logs[best]);
    within.peak = place(best);
    const kept = logs.map((v, j) => (v > peak - DEPTH ? j : -1)).filter((j) => j >= 0);
    within.from = kept.length > 0 && kept[0] > 0 ? place(kept[0] - 1) : 0;
    within.to = kept.length > 0 && kept[kept.length - 1] < SCAN - 1 ? place(kept[kept.length - 1] + 1) : Math.PI / 2;
    if (logs[best] > above) peakEnergy = edge + range * Math.sin(within.peak) ** 2;
  }
  const { transmission, error: stepError } = settled(shape, kind, dispersion, peakEnergy);
  let sum = 0;
  let error = 0;
  if (climbs) {
    const ends = [within.from, within.to];
    if (within.peak > within.from && within.peak < within.to) ends.push(within.peak);
    // The occupancy's knee at EF, and where it has died away.
    for (const energy of [0, REACH * kT]) {
      const u = (energy - edge) / range;
      const theta = u > 0 && u < 1 ? Math.asin(Math.sqrt(u)) : -1;
      if (theta > within.from && theta < within.to) ends.push(theta);
    }
    ends.sort((a, b) => a - b);
    const below = integrate((theta) => Math.exp(mapped(transmission, theta) - peak), ends, accuracy, accuracy * Math.exp(above - peak), MOST_PANELS[kind]);
    sum += below.value;
    error += below.error;
  }
  if (kind === 'wkb' || Math.exp(above - peak) < NEXT_TO_NOTHING * sum) sum += Math.exp(above - peak);
  else {
    const first = Math.max(top, edge);
    const ends = [first, first + 5 * kT, Math.max(first + 6 * kT, 12 * kT), Math.max(first, 0) + REACH * kT];
    if (first + 5 * kT < 0) ends.splice(2, 0, 0);
    const rest = integrate((energy) => Math.exp(transmission(energy) + logOccupancy(energy / kT) - peak) / kT, ends, accuracy, accuracy * sum, MOST_PANELS[kind]);
    sum += rest.value;
    error += rest.error;
  }
  return { log: peak + Math.log(sum), error: error / sum + stepError };
}

/** The transmission with as many steps as its accuracy needs, and how far off it is in depth at the energy that counts, relative. */
function settled(shape: BarrierShape, kind: Transmission, dispersion: Dispersion, energy: number): { transmission: LogTransmission; error: number } {
  if (kind !== 'exact') {
    const transmission = logTransmission(shape, kind, dispersion);
    // Over the top the exponent counts only where it is small, and so is its error.
    const error = energy < shape.top ? Math.abs(wkbExponent(shape, energy, dispersion, true) - wkbExponent(shape, energy, dispersion)) : 0;
    return { transmission, error };
  }
  // The edge itself passes nothing.
  const low = Math.max(energy, shape.edge + 0.5 * shape.kT);
  const energies = [low, low + shape.kT];
  let steps = 1;
  let coarse = logTransmission(shape, kind, dispersion, steps);
  for (;;) {
    const fine = logTransmission(shape, kind, dispersion, 2 * steps);
    // Fourth order: the finer one is off by a fifteenth of the difference.
    const error = Math.max(...energies.map((e) => Math.abs(fine(e) - coarse(e)))) / 15;
    if (error < WAVE_ACCURACY || steps >= MOST_DIVISION) return { transmission: fine, error: error + GENTLE ** 2 };
    steps *= 2;
    coarse = fine;
  }
}
