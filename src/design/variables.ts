import { evaluate, ExpressionError, FUNCTION_NAMES, type Scope } from '../quantity/expression.ts';
import { UNIT_NAMES, type Value } from '../quantity/units.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Complaint } from './complaint.ts';
import type { Variable } from './types.ts';

/** The design's variables as a scope for expressions, with what is wrong with them. */
export interface Variables {
  scope: Scope;
  complaints: Complaint[];
}

/**
 * Reads the variables; each may use others, in any order, but not in a circle.
 *
 * @param overrides  values for this run, by name (`--set NAME=VALUE`); a name that is no variable is a complaint
 */
export function readVariables(rows: readonly Variable[], overrides: Readonly<Record<string, string>> = {}): Variables {
  const complaints: Complaint[] = [];
  const texts = new Map<string, { text: string; path: string }>();
  rows.forEach((row, i) => {
    const path = `variables[${i}]`;
    if (!/^[A-Za-z][A-Za-z0-9_]*$/.test(row.name)) complaints.push({ path: `${path}.name`, message: `${quoted(row.name)} is no name for a variable; letters, digits and _ will do, a letter first` });
    else if (UNIT_NAMES.includes(row.name) || FUNCTION_NAMES.includes(row.name) || ['degC', 'temperature'].includes(row.name)) complaints.push({ path: `${path}.name`, message: `${quoted(row.name)} has a meaning of its own; choose another name` });
    else if (texts.has(row.name)) complaints.push({ path: `${path}.name`, message: `${quoted(row.name)} is there twice; each variable needs a name of its own` });
    else texts.set(row.name, { text: Object.hasOwn(overrides, row.name) ? overrides[row.name] : row.value, path: Object.hasOwn(overrides, row.name) ? `--set ${row.name}` : `${path}.value` });
  });
  for (const name of Object.keys(overrides)) {
    if (!rows.some((row) => row.name === name)) complaints.push({ path: `--set ${name}`, message: `there is no variable ${quoted(name)} in this design${didYouMean(name, ['temperature', ...texts.keys()])}` });
  }

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
        const value = evaluate(row.text, scope);
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
  return { scope, complaints };
}
