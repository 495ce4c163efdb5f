/** One step of a calculation on a stack of numbers: push a number, the temperature or the composition; or put a result in the place of what it was made of. */
export type FormulaStep = number | 'T' | 'x' | '+' | '-' | '*' | '/' | '^' | 'negate' | 'sqrt' | 'exp' | 'log' | 'log10' | 'abs' | 'min' | 'max';

/** A property as a calculation over T (K) and x, in postfix order: plain data, so that a stack can be copied to a worker or kept. */
export interface Formula {
  readonly steps: readonly FormulaStep[];
}

const OF_ONE: Readonly<Record<string, (a: number) => number>> = { negate: (a) => -a, sqrt: Math.sqrt, exp: Math.exp, log: Math.log, log10: Math.log10, abs: Math.abs };
const OF_TWO: Readonly<Record<string, (a: number, b: number) => number>> = { '+': (a, b) => a + b, '-': (a, b) => a - b, '*': (a, b) => a * b, '/': (a, b) => a / b, '^': Math.pow, min: Math.min, max: Math.max };

/**
 * @param T  K
 * @param x  composition
 * @returns  in the unit that the formula was made for; not finite where it has no value
 * @throws {RangeError} steps that do not fit together
 */
export function formulaAt({ steps }: Formula, T: number, x: number): number {
  const stack: number[] = [];
  for (const step of steps) {
    if (typeof step === 'number') stack.push(step);
    else if (step === 'T') stack.push(T);
    else if (step === 'x') stack.push(x);
    else {
      const last = stack.pop();
      const two = OF_TWO[step];
      const before = two === undefined ? undefined : stack.pop();
      if (last === undefined || (two !== undefined && before === undefined)) throw new RangeError('the steps of a formula do not fit together');
      stack.push(two === undefined ? OF_ONE[step](last) : two(before as number, last));
    }
  }
  if (stack.length !== 1) throw new RangeError('the steps of a formula do not fit together');
  return stack[0];
}
