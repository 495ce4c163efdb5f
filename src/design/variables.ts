import { evaluate, ExpressionError, FUNCTION_NAMES, type Scope } from '../quantity/expression.ts';
import { isUnitValue, subtract, UNIT_NAMES, type Value } from '../quantity/units.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Complaint } from './complaint.ts';
import { moved, readTolerance, type Tolerance } from './tolerance.ts';
import type { Variable } from './types.ts';

/** The design's variables as a scope for expressions, with what is wrong with them. */
export interface Variables {
  scope: Scope;
  complaints: Complaint[];
  /** what is wrong with tolerances and ranges: told last, since a value of the wrong kind makes those wrong as well */ afterthoughts: Complaint[];
  /** as stated, by name */ tolerances: ReadonlyMap<string, Tolerance>;
}

/**
 * Reads the variables; each may use others, in any order, but not in a circle.
 *
 * @param overrides  values for this run, by name (`--set NAME=VALUE`); a name that is no variable is a complaint
 * @param moves      signed counts of a variable's stated tolerance by which it lies off its value, by name; -1 is its lower end
 */
export function readVariables(rows: readonly Variable[], overrides: Readonly<Record<string, string>> = {}, moves: Readonly<Record<string, number>> = {}): Variables {
  const complaints: Complaint[] = [];
  const afterthoughts: Complaint[] = [];
  const texts = new Map<string, { text: string; path: string; row: Variable; at: string }>();
  rows.forEach((row, i) => {
    const path = `variables[${i}]`;
    if (!/^[A-Za-z][A-Za-z0-9_]*$/.test(row.name)) complaints.push({ path: `${path}.name`, message: `${quoted(row.name)} is no name for a variable; letters, digits and _ will do, a letter first` });
    else if (UNIT_NAMES.includes(row.name) || FUNCTION_NAMES.includes(row.name) || ['degC', 'temperature'].includes(row.name)) complaints.push({ path: `${path}.name`, message: `${quoted(row.name)} has a meaning of its own; choose another name` });
    else if (texts.has(row.name)) complaints.push({ path: `${path}.name`, message: `${quoted(row.name)} is there twice; each variable needs a name of its own` });
    else texts.set(row.name, { text: Object.hasOwn(overrides, row.name) ? overrides[row.name] : row.value, path: Object.hasOwn(overrides, row.name) ? `--set ${row.name}` : `${path}.value`, row, at: path });
  });
  for (const name of Object.keys(overrides)) {
    if (!rows.some((row) => row.name === name)) complaints.push({ path: `--set ${name}`, message: `there is no variable ${quoted(name)} in this design${didYouMean(name, ['temperature', ...texts.keys()])}` });
  }

  const tolerances = new Map<string, Tolerance>();
  /** The value where it lies within its tolerance; a tolerance that cannot be read is a complaint and moves nothing. */
  const toleranced = (name: string, value: Value, { tolerance: text }: Variable, path: string): Value => {
    if (text === undefined) return value;
    try {
      const tolerance = readTolerance(text, value, scope);
      tolerances.set(name, tolerance);
      return moved(value, tolerance, Object.hasOwn(moves, name) ? moves[name] : 0);
    } catch (error) {
      if (!(error instanceof ExpressionError)) throw error;
      afterthoughts.push({ path: `${path}.tolerance`, message: `${quoted(text)} ${error.message}` });
      return value;
    }
  };

  const values = new Map<string, Value | null>();
  const open: string[] = [];
  const names = [...texts.keys()];
  const scope: Scope = {
    names,
    value(name) {
      const row = texts.get(name);
      if (!row) return undefined;
      const known = values.get(name);
      if (known !== undefined) {
        if (known === null) throw new ExpressionError(`uses the variable ${quoted(name)}, which cannot be read`);
        return known;
      }
      if (open.includes(name)) {
        const circle = [...open.slice(open.indexOf(name)), name].join(' -> ');
        throw new ExpressionError(`goes in a circle: ${circle}; give one of them a value of its own`);
      }
      open.push(name);
      try {
        const nominal = evaluate(row.text, scope);
        const value = toleranced(name, nominal, row.row, row.at);
        values.set(name, value);
        return value;
      } catch (error) {
        if (!(error instanceof ExpressionError)) throw error;
        values.set(name, null);
        complaints.push({ path: row.path, message: `${quoted(row.text)} ${error.message}` });
        throw new ExpressionError(`uses the variable ${quoted(name)}, which cannot be read`);
      } finally {
        open.pop();
      }
    },
  };
  for (const name of names) {
    try {
      scope.value(name);
    } catch (error) {
      if (!(error instanceof ExpressionError)) throw error;
    }
  }
  checkRanges(rows, texts, scope, afterthoughts);
  return { scope, complaints, afterthoughts, tolerances };
}

/** A range has two ends of the variable's own kind, the lower one first. */
function checkRanges(rows: readonly Variable[], texts: ReadonlyMap<string, unknown>, scope: Scope, complaints: Complaint[]): void {
  rows.forEach(({ name, range }, i) => {
    if (range === undefined || !texts.has(name)) return;
    let value: Value;
    try {
      value = scope.value(name) as Value;
    } catch (error) {
      // What is wrong with the value has been said.
      if (error instanceof ExpressionError) return;
      throw error;
    }
    try {
      const [from, to] = range.map((text) => evaluate(text, scope));
      const difference = subtract(to, from);
      if (isUnitValue(value) !== isUnitValue(from) || isUnitValue(value) !== isUnitValue(to)) throw new ExpressionError('of another kind');
      subtract(value, from);
      if (!((isUnitValue(difference) ? Number(difference.toSI().toNumeric()) : difference) > 0)) complaints.push({ path: `variables[${i}].range`, message: `runs from ${quoted(range[0])} to ${quoted(range[1])}; put the lower end first` });
    } catch {
      complaints.push({ path: `variables[${i}].range`, message: `${quoted(range[0])} to ${quoted(range[1])} is no range of the kind of ${quoted(name)}; write both ends with the unit of its value` });
    }
  });
}
