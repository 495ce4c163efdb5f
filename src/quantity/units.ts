import {
  absDependencies, addDependencies, create, createUnitDependencies, divideDependencies, multiplyDependencies, parseDependencies, powDependencies,
  subtractDependencies, unaryMinusDependencies, unitDependencies, type MathNode, type Unit,
} from 'mathjs';
import { ELEMENTARY_CHARGE } from '../../solver/constants.ts';

/**
 * The one place that imports mathjs: its parser, its units and its arithmetic, and nothing that evaluates text.
 *
 * absTol is 0, since the default of 1e-15 in SI calls every energy of the trade equal; eV is today's (the library's own is of 2010).
 */
const math = create(
  { absDependencies, addDependencies, createUnitDependencies, divideDependencies, multiplyDependencies, parseDependencies, powDependencies, subtractDependencies, unaryMinusDependencies, unitDependencies },
  { absTol: 0 },
);
math.createUnit!('eV', { definition: `${ELEMENTARY_CHARGE} J`, prefixes: 'short' }, { override: true });

export type { MathNode, Unit };

/** A pure number, or a number with a dimension. */
export type Value = number | Unit;

/** Units of the field, and no others: the library would read "h" as an hour and "kT" as a kilotesla. degC is read elsewhere, by itself only. */
export const UNIT_NAMES: readonly string[] = [
  'nm', 'um', 'mm', 'cm', 'm', 'pm', 'angstrom', 'eV', 'meV', 'ueV', 'keV', 'V', 'mV', 'uV', 'kV', 'MV', 'K', 's', 'ms', 'us', 'ns', 'ps', 'A', 'mA', 'uA', 'nA', 'pA', 'kA',
  'ohm', 'mohm', 'uohm', 'kohm', 'Mohm', 'F', 'mF', 'uF', 'nF', 'pF', 'fF', 'C', 'mC', 'uC', 'nC', 'Pa', 'kPa', 'MPa', 'GPa',
];

const units = new Map<string, Unit>();

/** One of UNIT_NAMES as a value; undefined for any other word. */
export function unitNamed(name: string): Unit | undefined {
  let unit = units.get(name);
  if (!unit && UNIT_NAMES.includes(name)) {
    unit = math.unit!(1, name);
    units.set(name, unit);
  }
  return unit;
}

export function parseTree(text: string): MathNode {
  return math.parse!(text);
}

export function isUnitValue(v: Value): v is Unit {
  return typeof v !== 'number';
}

/** @throws when the dimensions differ */
export function add(a: Value, b: Value): Value {
  return math.add!(a as never, b as never) as Value;
}

/** @throws when the dimensions differ */
export function subtract(a: Value, b: Value): Value {
  return math.subtract!(a as never, b as never) as Value;
}

export function multiply(a: Value, b: Value): Value {
  return math.multiply!(a as never, b as never) as unknown as Value;
}

export function divide(a: Value, b: Value): Value {
  return math.divide!(a as never, b as never) as Value;
}

export function negate(a: Value): Value {
  return math.unaryMinus!(a as never) as Value;
}

export function power(a: Value, exponent: number): Value {
  return math.pow!(a as never, exponent) as unknown as Value;
}

/** The value in a unit; null where the dimensions differ. A pure number has the unit ''. */
export function inUnit(v: Value, unit: string): number | null {
  if (typeof v === 'number') return unit === '' ? v : null;
  if (unit === '') return null;
  const target = targetUnit(unit);
  return v.equalBase(target) ? v.toNumber(unit) : null;
}

const targets = new Map<string, Unit>();
function targetUnit(unit: string): Unit {
  let target = targets.get(unit);
  if (!target) {
    target = math.unit!(unit);
    targets.set(unit, target);
  }
  return target;
}

/** a temperature, K */
export function kelvin(T: number): Unit {
  return math.unit!(T, 'K');
}

/** kelvin from degrees Celsius */
export function celsius(degrees: number): Unit {
  return math.unit!(degrees + 273.15, 'K');
}
