import { drawn, evaluate, knownsOf, type Expression } from './expression.ts';
import type { Known } from './known.ts';
import { mathText, mo, mrow, signOf, type MathNode } from './math.ts';

/**
 * One line of the workings: a formula that gives a value; an equation that a solved value fulfils; or a law that the whole stack was solved with, from which a value was read.
 */
export type Step =
  | { kind: 'formula'; result: Known; formula: Expression; note: string }
  | { kind: 'equation'; result: Known; left: Expression; right: Expression; note: string }
  | { kind: 'law'; law: MathNode; note: string };

export function step(result: Known, formula: Expression, note = ''): Step {
  return { kind: 'formula', result, formula, note };
}
export function equation(result: Known, left: Expression, right: Expression, note = ''): Step {
  return { kind: 'equation', result, left, right, note };
}
export function law(law: MathNode, note: string): Step {
  return { kind: 'law', law, note };
}

/** The quantity that the last line gives, laws aside; null without one. */
export function lastResult({ steps }: { steps: readonly Step[] }): Known | null {
  const last = steps.findLast((s) => s.kind !== 'law');
  return last === undefined ? null : last.result;
}

/** A step as it is shown: the formula, and every number as it is printed. */
export interface ShownStep {
  math: MathNode;
  /** the same on one line */ text: string;
  symbols: { known: Known; sign: MathNode; value: string }[];
  /** what comes out, printed; null of a law */ result: { known: Known; value: string; /** by what is shown, in the shown unit */ again: number } | null;
  note: string;
}

/** Digits to which results are shown, and least and most digits of what goes in. */
export const RESULT_DIGITS = 5;
const LEAST_DIGITS = 4;
const MOST_DIGITS = 17;

/** Text of a number that reads back to itself at that many digits; powers of ten as they are typed. */
export function printed(value: number, digits: number): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (!Number.isFinite(value)) return size === Infinity ? '∞' : '–';
  const rounded = Number(value.toPrecision(digits));
  if (size >= 1e-3 && size < 1e6) return String(rounded).includes('e') ? rounded.toFixed(digits) : String(rounded).replace('-', '−');
  const [mantissa, exponent] = rounded.toExponential().split('e');
  return `${mantissa.replace('-', '−')}e${exponent.replace('+', '').replace('-', '−')}`;
}

/** Number of a printed text. */
export function readPrinted(text: string): number {
  return text === '∞' ? Infinity : Number(text.replaceAll('−', '-'));
}

/**
 * The step with as many digits of what goes in as it takes to work the shown result out again by hand: exponentials of cold layers and differences of near values take many.
 */
export function shown(s: Step): ShownStep {
  if (s.kind === 'law') return { math: s.law, text: mathText(s.law), symbols: [], result: null, note: s.note };
  const { result } = s;
  const knowns = s.kind === 'formula' ? knownsOf(s.formula) : [...new Set([...knownsOf(s.left), ...knownsOf(s.right)])];
  const math = s.kind === 'formula' ? mrow(signOf(result.sign), mo('='), drawn(s.formula)) : mrow(drawn(s.left), mo('='), drawn(s.right));
  let digits = LEAST_DIGITS;
  let values = new Map<Known, string>();
  for (; digits <= MOST_DIGITS; digits++) {
    values = new Map(knowns.map((known) => [known, printed(known.value / known.scale, digits)]));
    if (isClosed(s, values)) break;
  }
  const again = s.kind === 'formula' ? evaluate(s.formula, reader(values)) / result.scale : result.value / result.scale;
  return {
    math,
    text: mathText(math),
    symbols: knowns.map((known) => ({ known, sign: signOf(known.sign), value: values.get(known)! })),
    result: { known: result, value: printed(result.value / result.scale, RESULT_DIGITS), again },
    note: s.note,
  };
}

const reader = (values: ReadonlyMap<Known, string>) => (known: Known): number => readPrinted(values.get(known)!) * known.scale;

/** Whether the printed numbers give the result to its printed digits; of an equation, whether its two sides agree to as many. */
export function isClosed(s: Exclude<Step, { kind: 'law' }>, values: ReadonlyMap<Known, string>): boolean {
  const of = reader(values);
  if (s.kind === 'equation') return agree(evaluate(s.left, of), evaluate(s.right, of));
  return agree(evaluate(s.formula, of), s.result.value);
}

/** To half a unit of the last shown digit. */
export function agree(a: number, b: number): boolean {
  if (a === b) return true;
  return Math.abs(a - b) <= 0.5 * 10 ** (1 - RESULT_DIGITS) * 10 ** Math.floor(Math.log10(Math.max(Math.abs(a), Math.abs(b))));
}

/** "Ec−EF = 0.0123 eV". */
export function knownText(known: Known, value: string): string {
  return `${mathText(signOf(known.sign))} = ${value}${known.unit === '' ? '' : ` ${known.unit}`}`;
}
