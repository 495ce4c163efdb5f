import { profileAt, type Boundary, type Layer, type Profiles, type Stack } from '../../solver/index.ts';
import { align, type Alignment } from '../../solver/alignment.ts';
import type { LocalBands } from '../../solver/bands.ts';
import { chargeAt, localCharge, type ChargeValues, type LocalCharge } from '../../solver/charge.ts';
import { neutralLevel } from '../../solver/fermi-level.ts';
import { NM_PER_CM } from '../../solver/units.ts';
import { catalogueOf, type Catalogue } from '../design/catalogue.ts';
import { toStack } from '../design/stack.ts';
import type { Design, LayerInput } from '../design/types.ts';
import type { Result } from '../result/types.ts';

/** What the workings of one result are made from. */
export interface Context {
  design: Design;
  result: Result;
  stack: Stack;
  catalogue: Catalogue;
  alignment: Alignment;
  profiles: Profiles;
  /** heights and steps that a tolerance has moved, as they were before it */ shifts: Shifts;
}

/** What of a corner is told from the nominal value on. */
export interface Shifts {
  barriers: { top?: BarrierShift; bottom?: BarrierShift };
  /** by the layer above: the stack whose offset there is not moved, and by how much Ec is, eV */ offsets: ReadonlyMap<number, { stack: Stack; amount: number }>;
}
export interface BarrierShift {
  nominal: Boundary;
  carrier: 'n' | 'p';
  /** eV */ amount: number;
}
export const NO_SHIFTS: Shifts = { barriers: {}, offsets: new Map() };

/** One place of a layer, neutral. */
export interface Point {
  layer: Layer;
  input: LayerInput;
  index: number;
  /** cm from the layer's top */ z: number;
  x: number;
  charge: LocalCharge;
  bands: LocalBands;
  /** eV */ ecMinusEf: number;
  values: ChargeValues;
}

/**
 * @param set  values that were in force for this result: variables by name, and "temperature"
 * @throws {RangeError} a design that the result cannot be of, since it has no stack
 */
export function contextOf(design: Design, result: Result, set: Readonly<Record<string, string>> = {}): Context {
  const reading = toStack(design, set);
  if (!reading.ok || reading.stack.layers.length !== result.layers.length) throw new RangeError('the result is not of this design');
  return contextAt(design, reading.stack, result);
}

/** The same of a stack that is at hand, such as one at a corner of its tolerances. @param result  of that very stack */
export function contextAt(design: Design, stack: Stack, result: Result, shifts = NO_SHIFTS): Context {
  return { design, result, stack, catalogue: catalogueOf(design.custom), alignment: align(stack), profiles: profilesOf(result), shifts };
}

export function pointOf({ stack, design }: Context, index: number, z: number): Point {
  const layer = stack.layers[index];
  const charge = localCharge(layer, z, stack.temperature, stack.assumptions);
  const { ecMinusEf } = neutralLevel(charge);
  const values: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
  chargeAt(charge, ecMinusEf, values);
  return { layer, input: design.layers[index], index, z, x: profileAt(layer.x, z, layer.thickness), charge, bands: charge.bands, ecMinusEf, values };
}

export const middleOf = (context: Context, index: number): Point => pointOf(context, index, context.stack.layers[index].thickness / 2);

/** The profile of a result in the solver's units. */
function profilesOf({ profile }: Result): Profiles {
  const array = (of: readonly number[], factor = 1): Float64Array => Float64Array.from(of, (v) => v * factor);
  return {
    z: array(profile.z_nm, 1 / NM_PER_CM), layer: Int32Array.from(profile.layer), ec: array(profile.ec_eV), ev: array(profile.ev_eV), psi: array(profile.potential_V), field: array(profile.field_V_cm),
    n: array(profile.n_cm3), p: array(profile.p_cm3), ionisedDonors: array(profile.ionised_donors_cm3), ionisedAcceptors: array(profile.ionised_acceptors_cm3), charge: array(profile.charge_cm3),
  };
}

/** The same point as a textbook has it: Boltzmann statistics, parabolic bands, every dopant charged. */
export function textbookOf(c: LocalCharge): { ecMinusEf: number; charge: LocalCharge } {
  const charge: LocalCharge = { bands: { ...c.bands, statistics: 'boltzmann', kaneN: 0, kaneP: 0 }, levels: c.levels.map((l) => ({ ...l, bound: 0 })), fixed: c.fixed };
  return { ecMinusEf: neutralLevel(charge).ecMinusEf, charge };
}
