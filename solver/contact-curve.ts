import type { BarrierShape } from './barrier-shape.ts';
import { contactPath, type ContactPath } from './contact-path.ts';
import type { Carrier } from './carrier-constants.ts';
import { logOccupancy } from './contact-integral.ts';
import { carrierBarrier, type ResistivityOptions } from './contact-resistivity.ts';
import { spaceChargeOf } from './depletion.ts';
import { GAUSS_3 } from './quadrature.ts';
import type { Profiles } from './solution.ts';
import type { Stack } from './stack.ts';
import { logTransmission, type Transmission } from './transmission.ts';

/** How one carrier passes a contact, energy by energy. Energies are the electron's, eV, zero at EF: a hole's band lies below. */
export interface CarrierCurve {
  carrier: Carrier;
  /** from the band edge of the neutral layer away from EF's side of the gap [points] */ energy: Float64Array;
  transmission: Float64Array;
  /** by electrons, or for holes their absence [points] */ occupancy: Float64Array;
  /** transmission times occupancy: what the contact resistivity integrates [points] */ product: Float64Array;
  /** band edge of the neutral layer */ edge: number;
  /** the barrier's top, image force included */ top: number;
  /** the band on the way, image force included; an interface twice. Empty where the neutral layer begins at the metal. */
  way: { /** from the metal, cm */ s: Float64Array; band: Float64Array; layer: Int32Array };
}

export interface ContactCurve {
  side: 'top' | 'bottom';
  transmission: Transmission;
  majority: Carrier;
  /** index of the layer that holds the carriers */ reservoir: number;
  /** null where a tunnelling mass is missing */ electrons: CarrierCurve | null;
  holes: CarrierCurve | null;
}

/** Reach above the barrier's top and EF, kT. */
const REACH = 10;

/**
 * T(E), f(E) and their product for both carriers of a contact, for a close-up picture.
 *
 * @param options  another transmission, dispersion or image force than the stack's own, for comparison
 * @param points   energies a carrier
 * @returns null at an end that is no barrier, and where no layer is neutral
 */
export function contactCurve(stack: Stack, profiles: Profiles, side: 'top' | 'bottom', options: ResistivityOptions = {}, points = 161): ContactCurve | null {
  if (stack[side].kind !== 'barrier') return null;
  const path = contactPath(stack, profiles, spaceChargeOf(stack, profiles), side);
  if (!path) return null;
  const transmission = options.transmission ?? stack.assumptions.transmission;
  return {
    side, transmission, majority: path.electrons ? 'electron' : 'hole', reservoir: path.reservoir,
    electrons: curveOf(stack, path, 'electron', transmission, options, points),
    holes: curveOf(stack, path, 'hole', transmission, options, points),
  };
}

function curveOf(stack: Stack, path: ContactPath, carrier: Carrier, kind: Transmission, options: ResistivityOptions, points: number): CarrierCurve | null {
  const shape = carrierBarrier(stack, path, carrier, kind, options.imageForce);
  if ('missing' in shape) return null;
  const sign = carrier === 'electron' ? 1 : -1;
  const log = logTransmission(shape, kind, options.dispersion, 8);
  const last = Math.max(shape.top, 0) + REACH * shape.kT;
  const array = (): Float64Array => new Float64Array(points);
  const curve: CarrierCurve = { carrier, energy: array(), transmission: array(), occupancy: array(), product: array(), edge: sign * shape.edge, top: sign * shape.top, way: wayOf(shape, sign) };
  for (let i = 0; i < points; i++) {
    const energy = shape.edge + ((last - shape.edge) * i) / (points - 1);
    curve.energy[i] = sign * energy;
    // Without a way there is nothing to be thrown back by.
    curve.transmission[i] = shape.layer.length === 0 ? 1 : Math.exp(log(energy));
    curve.occupancy[i] = Math.exp(logOccupancy(energy / shape.kT));
    curve.product[i] = curve.transmission[i] * curve.occupancy[i];
  }
  return curve;
}

function wayOf(shape: BarrierShape, sign: number): CarrierCurve['way'] {
  const cells = shape.layer.length;
  const way = { s: new Float64Array(5 * cells), band: new Float64Array(5 * cells), layer: new Int32Array(5 * cells) };
  for (let k = 0; k < cells; k++) {
    const [from, to] = [shape.edges[k], shape.edges[k + 1]];
    const s = [from, ...GAUSS_3.nodes.map((u) => from + u * (to - from)), to];
    const band = [shape.before[k], ...shape.height.subarray(3 * k, 3 * k + 3), shape.after[k]];
    for (let g = 0; g < 5; g++) {
      way.s[5 * k + g] = s[g];
      way.band[5 * k + g] = sign * band[g];
      way.layer[5 * k + g] = shape.layer[k];
    }
  }
  return way;
}
