import { moved, readTolerance, type Tolerance } from '../design/tolerance.ts';
import type { Variable } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { evaluate, type Scope } from '../quantity/expression.ts';
import type { Value } from '../quantity/units.ts';

interface Row {
  text: string;
  /** value that no other variable decides */ fixed: Value | null;
  tolerance: Tolerance | null;
}

/**
 * The variables of a design moved within their tolerances, as readVariables gives them but quicker: what does not change from one variation to the next is read once.
 *
 * @returns null where a tolerance itself depends on another variable; then only the whole reading will do
 */
export function movedVariables(variables: readonly Variable[], overrides: Readonly<Record<string, string>>): ((moves: Readonly<Record<string, number>>) => Scope) | null {
  const { scope: nominal } = readVariables(variables, overrides);
  const rows = new Map<string, Row>();
  for (const { name, value, tolerance } of variables) {
    const text = Object.hasOwn(overrides, name) ? overrides[name] : value;
    if (tolerance !== undefined && usesNames(tolerance, nominal)) return null;
    const at = nominal.value(name) as Value;
    rows.set(name, { text, fixed: usesNames(text, nominal) ? null : at, tolerance: tolerance === undefined ? null : readTolerance(tolerance, at, nominal) });
  }
  return (moves) => {
    const values = new Map<string, Value>();
    const scope: Scope = {
      names: nominal.names,
      value(name) {
        const row = rows.get(name);
        if (!row) return undefined;
        let value = values.get(name);
        if (value === undefined) {
          const own = row.fixed ?? evaluate(row.text, scope);
          value = row.tolerance ? moved(own, row.tolerance, Object.hasOwn(moves, name) ? moves[name] : 0) : own;
          values.set(name, value);
        }
        return value;
      },
    };
    return scope;
  };
}

/** Whether a text names a variable; a share such as "10 %" is no expression and names none. */
function usesNames(text: string, { names }: Scope): boolean {
  return (text.match(/[A-Za-z][A-Za-z0-9_]*/g) ?? []).some((word) => names.includes(word));
}
