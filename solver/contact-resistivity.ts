import { barrierShape, highestEdge, type BarrierShape } from './barrier-shape.ts';
import { richardson, type Carrier } from './carrier-constants.ts';
import { BOLTZMANN } from './constants.ts';
import type { ContactPath } from './contact-path.ts';
import { ACCURACY, logIntegral, logOccupancyAbove } from './contact-integral.ts';
import { profileAt } from './profile.ts';
import type { Stack } from './stack.ts';
import type { Transmission } from './transmission.ts';
import type { Dispersion } from './wkb.ts';

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
  /** energies times depths that the transmission was looked at for */ work: number;
}

/** A carrier that cannot be computed, and what is missing, for a sentence. */
export interface MissingConstant {
  missing: string;
}

export function isMissing(c: CarrierConductance | MissingConstant): c is MissingConstant {
  return 'missing' in c;
}

/** A barrier below this many kT stops nobody. */
const NO_BARRIER = 1e-3;

/**
 * 1/rho_c of one carrier at zero bias: (A/k^2) Int T(E) f(E) dE, from the band edge of the neutral layer upwards. Padovani and Stratton, Solid-State Electron. 9, 695
 * (1966); Chang, Fang and Sze, Solid-State Electron. 14, 541 (1971). A is that of the neutral layer, from which the carriers come.
 *
 * @returns what is missing where the layer has no Richardson constant, a layer on the way no tunnelling mass (asked for only where there is a barrier), or the way is too long for a wave
 *
 * How the integral is done: contact-integral.ts. A carrier without a barrier has T = 1, but in the exact transmission, where the step to the metal's band throws some back.
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
  if (highestEdge(path, carrier) <= edge + NO_BARRIER * kT && kind !== 'exact') return { log: logFloor, error: 0, logFloor, transmission: kind, work: 0 };
  const shape = carrierBarrier(stack, path, carrier, kind, options.imageForce);
  if ('missing' in shape) return shape;
  // The image force may have taken the whole barrier.
  if (shape.layer.length === 0 || (kind !== 'exact' && shape.top <= edge + NO_BARRIER * kT)) return { log: logFloor, error: 0, logFloor, transmission: kind, work: 0 };
  const finer = (fineness: number): BarrierShape => {
    const fine = carrierBarrier(stack, path, carrier, kind, options.imageForce, fineness);
    return 'missing' in fine ? shape : fine;
  };
  const { log, error, work } = logIntegral(shape, finer, kind, options.dispersion ?? 'one-band', options.accuracy ?? ACCURACY);
  if (error === Infinity) return { missing: `steps enough to follow ${carrier} waves on their way ("wkb" has no such trouble)` };
  return { log: front + log, error, logFloor, transmission: kind, work };
}

/** The barrier of a carrier as one kind of transmission needs it; image force by default as the boundary says. @param fineness  cells as many times finer than usual */
export function carrierBarrier(stack: Stack, path: ContactPath, carrier: Carrier, kind: Transmission, imageForce?: boolean, fineness = 1): BarrierShape | MissingConstant {
  const boundary = stack[path.side];
  const shape = barrierShape(stack, path, carrier, imageForce ?? (boundary.kind === 'barrier' && boundary.imageForce), kind === 'exact', fineness);
  const unknown = shape.weight.findIndex((w) => !(w > 0));
  return unknown < 0 ? shape : { missing: `the ${carrier} tunnelling mass of ${stack.layers[shape.layer[Math.floor(unknown / 3)]].material.id}` };
}
