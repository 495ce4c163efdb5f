import type { Asker } from '../design/ask.ts';
import type { Design } from '../design/types.ts';
import { evaluate, ExpressionError, type Scope } from '../quantity/expression.ts';
import { KINDS, type KindName } from '../quantity/kinds.ts';
import { inUnit, type Value } from '../quantity/units.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { writeQuantity } from '../quantity/write-quantity.ts';

/** The variable to size, in the solver's unit of its kind. */
export interface SizedVariable {
  name: string;
  kind: KindName;
  unit: string;
  /** as the design has it */ value: number;
  from: number;
  to: number;
  scale: 'linear' | 'log';
}

/** Densities are thought of in decades, however narrow their range. */
const BY_DECADES: readonly KindName[] = ['density', 'sheetDensity'];

/**
 * Reads the variable and its range; what is wrong goes to `ask`.
 *
 * @param scope  the design's variables for this run
 * @param ends   texts that win over the variable's own range, and a scale that wins over the one that the range suggests
 */
export function readSizedVariable(design: Design, name: string, scope: Scope, ends: { from?: string; to?: string; scale?: SizedVariable['scale'] }, ask: Asker): SizedVariable | null {
  const rows = design.variables ?? [];
  const row = rows.find((v) => v.name === name);
  if (!row) {
    ask.wrong('variables', `there is no variable ${quoted(name)} to size${didYouMean(name, rows.map((v) => v.name)) || (rows.length === 0 ? '; this design has none: make the value to size a variable with a range' : `; there are ${rows.map((v) => v.name).join(', ')}`)}`);
    return null;
  }
  const path = `variables[${rows.indexOf(row)}]`;
  const value = scope.value(name) as Value;
  const kind = kindOf(value);
  if (kind === null) {
    ask.wrong(`${path}.value`, `${quoted(row.value)} is of a kind that no part of a design takes`);
    return null;
  }
  const before = ask.complaints.length;
  const end = (own: string | undefined, i: 0 | 1): number => {
    const text = own ?? row.range?.[i];
    const at = own === undefined ? `${path}.range` : i === 0 ? '--from' : '--to';
    if (text === undefined) return ask.wrong(at, `is missing; to size ${name} there must be a range to search, such as ["${KINDS[kind].example.split(' or ')[0]}", ...], or ends for this run`);
    try {
      const found = evaluate(text, scope);
      return inUnit(found, KINDS[kind].unit) ?? ask.wrong(at, `${quoted(text)} ${typeof found === 'number' ? 'has no unit' : `is not of the kind of ${name}`}; write it such as "${KINDS[kind].example}"`);
    } catch (error) {
      if (!(error instanceof ExpressionError)) throw error;
      return ask.wrong(at, `${quoted(text)} ${error.message}`);
    }
  };
  const from = end(ends.from, 0);
  // One complaint is enough where the range is missing altogether.
  const to = ask.complaints.length > before && ends.to === undefined ? NaN : end(ends.to, 1);
  if (ask.complaints.length > before) return null;
  if (!(from < to)) {
    ask.wrong(ends.from !== undefined ? '--from' : ends.to !== undefined ? '--to' : `${path}.range`, 'is no range to search: its lower end must come first, and lie below its upper end');
    return null;
  }
  if (ends.scale === 'log' && !(from > 0)) {
    ask.wrong(ends.from !== undefined ? '--from' : `${path}.range`, 'is not above zero, and decades are counted from there; raise it, or search in even steps');
    return null;
  }
  const scale = ends.scale ?? (from > 0 && (to / from > 10 || BY_DECADES.includes(kind)) ? 'log' : 'linear');
  return { name, kind, unit: KINDS[kind].unit, value: inUnit(value, KINDS[kind].unit) as number, from, to, scale };
}

/** The exact text of a value, to set the variable with. */
export function exactText({ unit }: SizedVariable, value: number): string {
  return unit === '' ? String(value) : `${value} ${unit}`;
}

/** A value for people: "23 nm". */
export function shownText({ kind }: SizedVariable, value: number, digits = 4): string {
  return writeQuantity(value, kind, digits);
}

/** The first kind whose unit the value has. */
function kindOf(value: Value): KindName | null {
  for (const kind of Object.keys(KINDS) as KindName[]) if (inUnit(value, KINDS[kind].unit) !== null) return kind;
  return null;
}
