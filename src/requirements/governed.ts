import { evaluate, ExpressionError, type Scope } from '../quantity/expression.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';

/** The variables that any text of the design uses, requirements' limits aside, directly or through the values of other variables. */
export function variablesUsed(design: Design, set: Readonly<Record<string, string>>): ReadonlySet<string> {
  const { layers, top, bottom, interfaces, custom } = design;
  return usedIn(design, set, { layers, top, bottom, interfaces, custom });
}

/** Whether anything at all uses a variable, limits of requirements and the conditions among it. */
export function isUsed(design: Design, set: Readonly<Record<string, string>>, name: string): boolean {
  const { variables: _, title: _t, notes: _n, ...rest } = design;
  return usedIn(design, set, rest).has(name);
}

/** Whether a variable is a share of atoms and nothing else: every text that uses it is an active or a compensated share by itself. Such a share ends at 0 and at 1, whatever its tolerance. */
export function isShareOfAtoms(design: Design, set: Readonly<Record<string, string>>, name: string): boolean {
  const bare = (text: unknown): boolean => typeof text === 'string' && text.trim() === name;
  const layers = design.layers.map((layer) => ({
    ...layer,
    dopants: (layer.dopants ?? []).map(({ activation = 1, compensation = 0, ...row }) => ({ ...row, activation: bare(activation) ? 1 : activation, compensation: bare(compensation) ? 0 : compensation })),
  }));
  return isUsed(design, set, name) && !isUsed({ ...design, layers }, set, name);
}

function usedIn(design: Design, set: Readonly<Record<string, string>>, parts: object): ReadonlySet<string> {
  const rows = design.variables ?? [];
  const { temperature: _, ...overrides } = set;
  const { scope } = readVariables(rows, overrides);
  const texts = new Map(rows.map((row) => [row.name, Object.hasOwn(overrides, row.name) ? overrides[row.name] : row.value]));
  const used = new Set<string>();
  const take = (name: string): void => {
    if (used.has(name)) return;
    used.add(name);
    for (const other of namesIn(texts.get(name) ?? '', scope)) take(other);
  };
  for (const text of textsIn(parts)) for (const name of namesIn(text, scope)) take(name);
  return used;
}

/**
 * Asks whether a text of the design, or any text inside an object of it, uses a variable with a stated tolerance, directly or through the values of
 * other variables.
 */
export function governedBy(design: Design, set: Readonly<Record<string, string>>): (...parts: unknown[]) => boolean {
  const rows = design.variables ?? [];
  const { temperature: _, ...overrides } = set;
  const { scope } = readVariables(rows, overrides);
  const stated = new Set(rows.filter((row) => row.tolerance !== undefined).map((row) => row.name));
  const texts = new Map(rows.map((row) => [row.name, Object.hasOwn(overrides, row.name) ? overrides[row.name] : row.value]));
  const known = new Map<string, boolean>();
  const governs = (name: string): boolean => {
    const before = known.get(name);
    if (before !== undefined) return before;
    // A circle among the variables has been complained of by then; here it must only end.
    known.set(name, stated.has(name));
    const answer = stated.has(name) || namesIn(texts.get(name) ?? '', scope).some(governs);
    known.set(name, answer);
    return answer;
  };
  return (...parts) => parts.some((part) => textsIn(part).some((text) => namesIn(text, scope).some(governs)));
}

function textsIn(part: unknown): string[] {
  if (typeof part === 'string') return [part];
  return part !== null && typeof part === 'object' ? Object.values(part).flatMap(textsIn) : [];
}

/** The scope's names that a text uses. */
function namesIn(text: string, scope: Scope): string[] {
  const names = new Set<string>();
  try {
    evaluate(text, { names: scope.names, value: (name) => { const value = scope.value(name); if (value !== undefined) names.add(name); return value; } });
  } catch (error) {
    // Words such as "material" or "30 %" are no expressions and use no variable.
    if (!(error instanceof ExpressionError)) throw error;
  }
  return [...names];
}
