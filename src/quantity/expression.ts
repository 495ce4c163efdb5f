import { didYouMean, quoted } from './wording.ts';
import { normalise } from './normalise.ts';
import { add, celsius, divide, isUnitValue, multiply, negate, parseTree, power, subtract, UNIT_NAMES, unitNamed, type MathNode, type Value } from './units.ts';

/** Names that an expression may use beside units: the design's variables. */
export interface Scope {
  /** @throws {ExpressionError} a variable that is wrong in itself */
  value(name: string): Value | undefined;
  names: readonly string[];
}

export const NO_NAMES: Scope = { value: () => undefined, names: [] };

/** A text that is no expression, or one that may not be asked. The message ends a sentence that begins with the text quoted. */
export class ExpressionError extends Error {
  override readonly name = 'ExpressionError';
}

const MOST_CHARACTERS = 500;
const MOST_NODES = 200;
const MOST_DEPTH = 120;
/** The largest exponent: units of the field need 3, and a tower of powers would only burn time. */
const MOST_EXPONENT = 24;
const MOST_PARSED = 4000;

/** Functions of pure numbers, with the count of arguments each takes. */
const FUNCTIONS: Readonly<Record<string, { arity: [number, number]; of(args: number[]): number }>> = {
  sqrt: { arity: [1, 1], of: ([a]) => Math.sqrt(a) },
  exp: { arity: [1, 1], of: ([a]) => Math.exp(a) },
  log: { arity: [1, 1], of: ([a]) => Math.log(a) },
  log10: { arity: [1, 1], of: ([a]) => Math.log10(a) },
};
/** Functions of values of one dimension. */
const CHOICES = ['min', 'max', 'abs'];
export const FUNCTION_NAMES: readonly string[] = [...Object.keys(FUNCTIONS), ...CHOICES];

const parsed = new Map<string, MathNode>();

/**
 * Reads one expression: numbers, units of the field, the scope's names, + - * / ^, brackets, sqrt exp log log10 min max abs. The parser is
 * mathjs's; the tree is walked here, so nothing of that library's language beyond these runs.
 *
 * @throws {ExpressionError}
 */
export function evaluate(text: string, scope: Scope): Value {
  if (text.length > MOST_CHARACTERS) throw new ExpressionError(`is longer than ${MOST_CHARACTERS} characters; split it into variables`);
  const plain = normalise(text);
  if (plain === '') throw new ExpressionError('is empty');
  const degrees = /^([-+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?)\s*degC$/.exec(plain);
  if (degrees) return celsius(Number(degrees[1]));
  if (/\bdegC\b/.test(plain)) throw new ExpressionError('uses degC in a calculation; write kelvin there, or a bare "25 degC"');
  const tree = treeOf(plain);
  const budget = { nodes: MOST_NODES };
  const value = walk(tree, scope, budget, 0);
  const size = isUnitValue(value) ? value.toSI().toNumeric() : value;
  if (!Number.isFinite(size)) throw new ExpressionError('is not a finite number');
  return value;
}

/**
 * The tree of a text that `normalise` has been through; whoever takes it sees to what may be in it.
 * @throws {ExpressionError} the text is no expression
 */
export function treeOf(plain: string): MathNode {
  let tree = parsed.get(plain);
  if (!tree) {
    try {
      tree = parseTree(plain);
    } catch {
      throw new ExpressionError('cannot be read; write a number with its unit, or an expression such as "2*Ncap"');
    }
    if (parsed.size >= MOST_PARSED) parsed.clear();
    parsed.set(plain, tree);
  }
  return tree;
}

function walk(node: MathNode, scope: Scope, budget: { nodes: number }, depth: number): Value {
  if (--budget.nodes < 0 || depth > MOST_DEPTH) throw new ExpressionError('is too long a calculation; split it into variables');
  const child = (n: MathNode): Value => walk(n, scope, budget, depth + 1);
  const n = node as MathNode & { type: string; value?: unknown; name?: string; op?: string; content?: MathNode; args?: MathNode[]; fn?: { name?: string; type?: string } };
  switch (n.type) {
    case 'ConstantNode':
      if (typeof n.value !== 'number') throw new ExpressionError(`contains ${quoted(n.value)}, which is no number`);
      return n.value;
    case 'ParenthesisNode':
      return child(n.content as MathNode);
    case 'SymbolNode':
      return named(n.name as string, scope);
    case 'OperatorNode':
      return operate(n.op as string, (n.args as MathNode[]).map(child));
    case 'FunctionNode':
      return call(n.fn?.type === 'SymbolNode' ? (n.fn.name as string) : '', (n.args as MathNode[]), child);
    default:
      throw new ExpressionError('contains something other than numbers, units, variables and + - * / ^');
  }
}

function named(name: string, scope: Scope): Value {
  const value = scope.value(name) ?? unitNamed(name);
  if (value === undefined) throw new ExpressionError(`uses ${quoted(name)}, which is neither a unit nor a variable of this design${didYouMean(name, [...scope.names, ...UNIT_NAMES])}`);
  return value;
}

function operate(op: string, args: Value[]): Value {
  try {
    if (args.length === 1 && op === '-') return negate(args[0]);
    if (args.length === 1 && op === '+') return args[0];
    if (args.length === 2) {
      const [a, b] = args;
      if (op === '+') return add(a, b);
      if (op === '-') return subtract(a, b);
      if (op === '*') return multiply(a, b);
      if (op === '/') return divide(a, b);
      if (op === '^') {
        if (isUnitValue(b) || !(Math.abs(b) <= MOST_EXPONENT)) throw new ExpressionError(`has an exponent that is not a pure number within ${MOST_EXPONENT}`);
        return power(a, b);
      }
    }
  } catch (error) {
    if (error instanceof ExpressionError) throw error;
    throw new ExpressionError('adds or subtracts quantities of different kinds');
  }
  throw new ExpressionError(`uses the operator ${quoted(op)}; only + - * / ^ are read`);
}

function call(name: string, args: MathNode[], child: (n: MathNode) => Value): Value {
  if (CHOICES.includes(name)) return choose(name, args, child);
  const known = Object.hasOwn(FUNCTIONS, name) ? FUNCTIONS[name] : undefined;
  if (!known) throw new ExpressionError(`calls ${quoted(name)}; the functions are ${FUNCTION_NAMES.join(', ')}`);
  if (args.length < known.arity[0] || args.length > known.arity[1]) throw new ExpressionError(`gives ${name} ${args.length} arguments`);
  const numbers = args.map((a) => {
    const v = child(a);
    if (isUnitValue(v)) throw new ExpressionError(`gives ${name} a quantity with a unit; divide it by that unit first`);
    return v;
  });
  return known.of(numbers);
}

function choose(name: string, args: MathNode[], child: (n: MathNode) => Value): Value {
  if (args.length === 0 || (name === 'abs' && args.length !== 1)) throw new ExpressionError(`gives ${name} ${args.length} arguments`);
  const values = args.map(child);
  if (name === 'abs') return size(values[0]) < 0 ? negate(values[0]) : values[0];
  return values.reduce((best, v) => {
    let difference: number;
    try {
      difference = size(subtract(v, best));
    } catch {
      throw new ExpressionError(`compares quantities of different kinds in ${name}`);
    }
    return (name === 'min' ? difference < 0 : difference > 0) ? v : best;
  });
}

const size = (v: Value): number => (isUnitValue(v) ? Number(v.toSI().toNumeric()) : v);
