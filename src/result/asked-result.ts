import { capacitancesOf, contactOf, junctionOf, layerOf, type SolvedBands } from '../../solver/index.ts';
import { contactResult, junctionResult, layerResult } from './from-solution.ts';
import type { ContactResult, JunctionResult, ProfileResult, Result } from './types.ts';

/** What figures are read from: a result's rows and the run of its conduction edge. A whole result is one. */
export type AskedResult = Pick<Result, 'conditions' | 'layers' | 'junctions' | 'contacts'> & { profile: Pick<ProfileResult, 'ec_eV'> };

/** What is known of a contact before anybody asks what it conducts. */
const CHEAP: readonly (keyof ContactResult)[] = ['side', 'kind', 'metal', 'barrier_n_eV', 'barrier_p_eV', 'barrier_source', 'lowering_eV', 'surface_field_V_cm', 'e00_meV', 'transport', 'depletion_nm'];

/**
 * The rows of a result, each worked out when it is first read: a run of ten thousand stacks that asks for one sheet resistance works out no other layer, no capacitance and no
 * contact. What is read has the digits of the whole result.
 *
 * @throws {RangeError} not here but where a row is read that the solver cannot work out
 */
export function askedResult(bands: SolvedBands): AskedResult {
  const { stack, profiles } = bands;
  const capacitances = once(() => capacitancesOf(bands));
  return {
    conditions: { temperature_K: stack.temperature, bias_V: 0 },
    layers: rows(stack.layers.length, (l) => layerResult(layerOf(bands, l), bands, l)),
    junctions: rows(Math.max(0, stack.layers.length - 1), (i) => junctionRow(bands, i, capacitances)),
    contacts: rows(2, (i) => contactRow(bands, i === 0 ? 'top' : 'bottom')),
    get profile() {
      return { ec_eV: Array.from(profiles.ec) };
    },
  };
}

function junctionRow(bands: SolvedBands, i: number, capacitances: () => readonly (number | null)[]): JunctionResult {
  const row = junctionResult({ ...junctionOf(bands, i), capacitance: null }, bands);
  return Object.defineProperty(row, 'capacitance_F_cm2', { get: () => capacitances()[i], enumerable: true });
}

function contactRow(bands: SolvedBands, side: 'top' | 'bottom'): ContactResult {
  const row = contactResult(contactOf(bands, side, false), bands);
  const whole = once(() => contactResult(contactOf(bands, side, true), bands));
  for (const key of Object.keys(row) as (keyof ContactResult)[]) if (!CHEAP.includes(key)) Object.defineProperty(row, key, { get: () => whole()[key], enumerable: true });
  return row;
}

/** A list whose elements are made when they are first read. */
function rows<T extends object>(count: number, make: (index: number) => T): T[] {
  const made = new Array<T | null>(count).fill(null);
  return new Proxy(made, {
    get(target, key, receiver) {
      const index = typeof key === 'string' ? Number(key) : NaN;
      if (!(index >= 0 && index < count)) return Reflect.get(target, key, receiver) as unknown;
      return (target[index] ??= make(index));
    },
  }) as T[];
}

function once<T>(make: () => T): () => T {
  let made: { value: T } | null = null;
  return () => (made ??= { value: make() }).value;
}
