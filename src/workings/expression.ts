import { fermiHalf, fermiMinusHalf } from '../../solver/index.ts';
import { carrierLog, type CarrierLog } from '../../solver/carriers.ts';
import { mfrac, mi, mn, mo, mrow, msqrt, msub, msup, signOf, type MathNode } from './math.ts';
import type { Known } from './known.ts';

/** A formula over quantities: it can be worked out and it can be set. */
export type Expression =
  | { kind: 'known'; of: Known }
  | { kind: 'number'; value: number; text: string }
  | { kind: 'sum'; terms: { sign: 1 | -1; of: Expression }[] }
  | { kind: 'product'; factors: Expression[] }
  | { kind: 'quotient'; over: Expression; under: Expression }
  | { kind: 'power'; base: Expression; exponent: Expression }
  | { kind: 'call'; law: LawName; of: Expression[] };

interface Law {
  work(...of: number[]): number;
  draw(of: MathNode[]): MathNode;
}

const bracketed = (of: MathNode[]): MathNode => mrow(mo('('), ...of.flatMap((node, i) => (i === 0 ? [node] : [mo(','), node])), mo(')'));
const named = (name: MathNode) => (of: MathNode[]): MathNode => mrow(name, mo('\u2061'), bracketed(of));
const kane: CarrierLog = { log: 0, slope: 0 };

/** The functions that a formula can name. Integrals of carriers are the solver's own. */
const LAWS = {
  exp: { work: Math.exp, draw: named(mi('exp')) },
  expm1: { work: Math.expm1, draw: (of) => mrow(named(mi('exp'))(of), mo('−'), mn('1')) },
  ln: { work: Math.log, draw: named(mi('ln')) },
  ln1p: { work: Math.log1p, draw: ([of]) => mrow(mi('ln'), mo('\u2061'), bracketed([mrow(mn('1'), mo('+'), of)])) },
  sqrt: { work: Math.sqrt, draw: ([of]) => msqrt(of) },
  abs: { work: Math.abs, draw: ([of]) => mrow(mo('|'), of, mo('|')) },
  max: { work: Math.max, draw: named(mi('max')) },
  min: { work: Math.min, draw: named(mi('min')) },
  tanh: { work: Math.tanh, draw: named(mi('tanh')) },
  cosh: { work: Math.cosh, draw: named(mi('cosh')) },
  artanh: { work: Math.atanh, draw: named(mi('artanh')) },
  sin: { work: Math.sin, draw: named(mi('sin')) },
  fermi: { work: fermiHalf, draw: named(msub(mi('F'), mi('1/2'))) },
  fermiSlope: { work: fermiMinusHalf, draw: named(msub(mi('F'), mi('−1/2'))) },
  kane: { work: (eta, a) => (carrierLog(eta, a, false, kane), Math.exp(kane.log)), draw: named(msub(mi('F'), mi('Kane'))) },
  kaneSlope: { work: (eta, a) => (carrierLog(eta, a, false, kane), Math.exp(kane.log) * kane.slope), draw: named(signOf('F_Kane^′')) },
  kaneBoltzmann: { work: (eta, a) => (carrierLog(eta, a, true, kane), Math.exp(kane.log)), draw: named(signOf('F_Kane^B')) },
} satisfies Record<string, Law>;

export type LawName = keyof typeof LAWS;

/**
 * Value of a formula, in the coherent units of its quantities.
 * @param of  value of a quantity; by default the one that it holds
 */
export function evaluate(e: Expression, of: (known: Known) => number = (known) => known.value): number {
  switch (e.kind) {
    case 'known':
      return of(e.of);
    case 'number':
      return e.value;
    case 'sum':
      return e.terms.reduce((sum, term) => sum + term.sign * evaluate(term.of, of), 0);
    case 'product':
      return e.factors.reduce((product, factor) => product * evaluate(factor, of), 1);
    case 'quotient':
      return evaluate(e.over, of) / evaluate(e.under, of);
    case 'power':
      return Math.pow(evaluate(e.base, of), evaluate(e.exponent, of));
    case 'call':
      return (LAWS[e.law] as Law).work(...e.of.map((part) => evaluate(part, of)));
  }
}

/** The formula as it is set. */
export function drawn(e: Expression): MathNode {
  switch (e.kind) {
    case 'known':
      return signOf(e.of.sign);
    case 'number':
      return mn(e.text);
    case 'sum':
      return mrow(...e.terms.flatMap(({ sign, of }, i) => [...(sign < 0 ? [mo('−')] : i > 0 ? [mo('+')] : []), i > 0 || sign < 0 ? inSum(of) : drawn(of)]));
    case 'product':
      return mrow(...e.factors.flatMap((factor, i) => [...(i === 0 ? [] : [mo(factor.kind === 'number' && factor.text !== 'π' ? '·' : '\u2062')]), isOpen(factor) ? bracketed([drawn(factor)]) : drawn(factor)]));
    case 'quotient':
      return mfrac(drawn(e.over), drawn(e.under));
    case 'power':
      return msup(e.base.kind === 'number' || (e.base.kind === 'known' && !isCompound(e.base.of)) ? drawn(e.base) : bracketed([drawn(e.base)]), drawn(e.exponent));
    case 'call':
      return (LAWS[e.law] as Law).draw(e.of.map(drawn));
  }
}

const isCompound = (known: Known): boolean => known.sign.includes('−') && !known.sign.startsWith('(');
/** Falls apart beside a factor without a bracket. */
const isOpen = (e: Expression): boolean => e.kind === 'sum' || (e.kind === 'known' && isCompound(e.of)) || (e.kind === 'call' && e.law === 'expm1');
const inSum = (e: Expression): MathNode => (isOpen(e) ? bracketed([drawn(e)]) : drawn(e));

/** Quantities of a formula, each once, in the order in which they appear. */
export function knownsOf(e: Expression): Known[] {
  const found = new Set<Known>();
  const look = (part: Expression): void => {
    switch (part.kind) {
      case 'known':
        found.add(part.of);
        return;
      case 'number':
        return;
      case 'sum':
        return part.terms.forEach(({ of }) => look(of));
      case 'product':
        return part.factors.forEach(look);
      case 'quotient':
        return [part.over, part.under].forEach(look);
      case 'power':
        return [part.base, part.exponent].forEach(look);
      case 'call':
        return part.of.forEach(look);
    }
  };
  look(e);
  return [...found];
}

export const isLaw = (name: string): name is LawName => Object.hasOwn(LAWS, name);
