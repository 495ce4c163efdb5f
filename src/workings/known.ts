import { BOLTZMANN, ELECTRON_MASS, ELEMENTARY_CHARGE, EPSILON_0, PLANCK } from '../../solver/constants.ts';
import { printedUnits } from '../quantity/printed-units.ts';

/** Where a value comes from. */
export type Origin =
  | { from: 'source'; /** key of presets/sources.json */ key: string; text: string; checked: 'page' | 'memory' | 'computed' | null; note: string }
  | { from: 'own value'; text: string }
  | { from: 'this design' }
  | { from: 'solved' }
  | { from: 'worked out' }
  | { from: 'usual tolerance' }
  | { from: 'constant' };

/** A quantity in a formula. */
export interface Known {
  /** short notation of its sign, math.ts: "E_g" */ sign: string;
  words: string;
  /** in units that fit each other throughout the formula */ value: number;
  /** of the value as shown */ unit: string;
  /** one of the shown unit in the formula's; 1 where they are the same */ scale: number;
  origin: Origin;
  /** where it stands in the presets or the design: "Si gap.zeroK" */ path: string;
}

export const SOLVED: Origin = { from: 'solved' };
export const DESIGN: Origin = { from: 'this design' };
export const WORKED: Origin = { from: 'worked out' };

/** @param value  in the formula's units @param unit  as typed or as printed; it is shown as printed */
export function known(sign: string, words: string, value: number, unit: string, origin: Origin, more: { scale?: number; path?: string } = {}): Known {
  return { sign, words, value, unit: printedUnits(unit), origin, scale: more.scale ?? 1, path: more.path ?? '' };
}

const constant = (sign: string, words: string, value: number, unit: string): Known => known(sign, words, value, unit, { from: 'constant' });

/** SI 2019 and CODATA 2018, as solver/constants.ts holds them. */
export const charge = constant('q', 'elementary charge', ELEMENTARY_CHARGE, 'C');
export const vacuumPermittivity = constant('ε_0', 'electric constant', EPSILON_0, 'F/cm');
export const boltzmann = constant('k', 'Boltzmann constant', BOLTZMANN, 'eV/K');
export const planck = constant('h', 'Planck constant', PLANCK, 'J s');
export const electronMass = constant('m_0', 'electron mass', ELECTRON_MASS, 'kg');

/** kT in eV; `joule` for formulas in SI. */
export function thermal(T: number): Known {
  return known('kT', `thermal energy at ${Number(T.toPrecision(6))} K`, BOLTZMANN * T, 'eV', WORKED);
}
export function thermalJoule(T: number): Known {
  return known('kT', `thermal energy at ${Number(T.toPrecision(6))} K`, BOLTZMANN * T * ELEMENTARY_CHARGE, 'eV', WORKED, { scale: ELEMENTARY_CHARGE });
}
export function temperatureOf(T: number): Known {
  return known('T', 'temperature', T, 'K', DESIGN, { path: 'conditions.temperature' });
}
