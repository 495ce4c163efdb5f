import type { Formula, FormulaStep } from '../../solver/formula.ts';
import { evaluate, treeOf, type Scope } from './expression.ts';
import { KINDS, type KindName } from './kinds.ts';
import { normalise } from './normalise.ts';
import { readQuantity } from './read-quantity.ts';
import { isUnitValue, kelvin, unitNamed, type MathNode, type Value } from './units.ts';

/** What a formula may run over, beside the design's variables. */
export type Over = 'T' | 'x';

export type FormulaReading = { ok: true; formula: Formula; /** which of both stand in it */ over: ReadonlySet<Over> } | { ok: false; message: string };

/** Places that a formula is tried at for its dimension. Only one where it has a finite value is needed; others are asked about later, over the design's own range. */
const TRIED: readonly [T: number, x: number][] = [[300, 0.5], [293.7, 0.37], [77.3, 0.11]];

/**
 * Reads a formula over T (a temperature, with its unit) and x (a pure number): the language of `evaluate`, units and all, with these two names more. Within a
 * formula they win over variables of the same name.
 *
 * The dimension is judged once, with units; what is handed on counts plain numbers in SI, and comes out in the solver's unit of the kind.
 *
 * @param over  which of both may stand in it
 */
export function readFormula(text: string, kind: KindName, over: readonly Over[], scope: Scope): FormulaReading {
  let first: string | null = null;
  for (const [T, x] of TRIED) {
    const reading = readQuantity(text, kind, withBoth(scope, over, T, x));
    if (!reading.ok) {
      first ??= reading.message;
      continue;
    }
    // A share is no expression of the language; it stands still.
    if (/%\s*$/.test(text)) return { ok: true, formula: { steps: [reading.value] }, over: new Set() };
    const steps: FormulaStep[] = [];
    collect(treeOf(normalise(text)), scope, over, steps);
    const { unit } = KINDS[kind];
    if (unit !== '') steps.push(inSI(evaluate(`1 ${unit}`, scope)), '/');
    return { ok: true, formula: { steps }, over: new Set(over.filter((name) => steps.includes(name))) };
  }
  return { ok: false, message: first as string };
}

function withBoth(scope: Scope, over: readonly Over[], T: number, x: number): Scope {
  const own: Record<Over, Value> = { T: kelvin(T), x };
  return { value: (name) => ((over as readonly string[]).includes(name) ? own[name as Over] : scope.value(name)), names: [...over, ...scope.names] };
}

/** `readQuantity` has been through this very tree: nothing is in it that `evaluate` does not take. */
function collect(node: MathNode, scope: Scope, over: readonly Over[], steps: FormulaStep[]): void {
  const n = node as MathNode & { type: string; value?: number; name?: string; op?: string; content?: MathNode; args?: MathNode[]; fn?: { name?: string } };
  const args = n.args ?? [];
  switch (n.type) {
    case 'ConstantNode':
      return void steps.push(n.value as number);
    case 'ParenthesisNode':
      return collect(n.content as MathNode, scope, over, steps);
    case 'SymbolNode': {
      const name = n.name as string;
      return void steps.push((over as readonly string[]).includes(name) ? (name as Over) : inSI((scope.value(name) ?? unitNamed(name)) as Value));
    }
    case 'OperatorNode':
      for (const part of args) collect(part, scope, over, steps);
      if (args.length === 2) steps.push(n.op as FormulaStep);
      else if (n.op === '-') steps.push('negate');
      return;
    case 'FunctionNode':
      args.forEach((part, i) => {
        collect(part, scope, over, steps);
        if (i > 0) steps.push(n.fn!.name as FormulaStep);
      });
      if (args.length === 1 && n.fn!.name !== 'min' && n.fn!.name !== 'max') steps.push(n.fn!.name as FormulaStep);
  }
}

const inSI = (value: Value): number => (isUnitValue(value) ? Number(value.toSI().toNumeric()) : value);
