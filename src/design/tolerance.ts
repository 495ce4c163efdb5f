import { evaluate, ExpressionError, type Scope } from '../quantity/expression.ts';
import { normalise } from '../quantity/normalise.ts';
import { add, isUnitValue, multiply, subtract, type Value } from '../quantity/units.ts';

/** How far a variable may lie from its value, to both sides: a share of the value, or an amount of its own kind. */
export type Tolerance = { kind: 'share'; share: number } | { kind: 'amount'; amount: Value };

/**
 * Reads "10 %", "0.05 eV", "2 nm"; a sign for both sides in front of it is taken as said.
 *
 * @param value  of the variable, whose kind an amount must have
 * @throws {ExpressionError} the message ends a sentence that begins with the text quoted
 */
export function readTolerance(text: string, value: Value, scope: Scope): Tolerance {
  const plain = normalise(text).replace(/^(?:±|\+\/-|\+-)\s*/, '');
  if (plain.startsWith('-')) throw new ExpressionError('is negative; a tolerance counts to both sides, write it without the sign');
  const percent = /^(\d+\.?\d*|\.\d+)\s*%$/.exec(plain);
  if (percent) {
    const share = Number(percent[1]) / 100;
    if (share >= 1) throw new ExpressionError('is the whole value or more; a tolerance stays below 100 %');
    return { kind: 'share', share };
  }
  if (/degC/.test(plain)) throw new ExpressionError('is a temperature, not a difference of temperatures; write it in K');
  const amount = evaluate(plain, scope);
  try {
    subtract(value, amount);
  } catch {
    throw new ExpressionError("is not of the kind of the variable's value; write a share such as \"10 %\", or an amount in the unit of the value");
  }
  if (isUnitValue(value) !== isUnitValue(amount)) throw new ExpressionError("is not of the kind of the variable's value; write a share such as \"10 %\", or an amount in the unit of the value");
  if (sizeOf(amount) < 0) throw new ExpressionError('is negative; a tolerance counts to both sides, write it without the sign');
  return { kind: 'amount', amount };
}

/** The value moved by a signed count of its tolerance: -1 is its lower end, 1 its upper. */
export function moved(value: Value, tolerance: Tolerance, count: number): Value {
  if (count === 0) return value;
  return tolerance.kind === 'share' ? multiply(value, 1 + count * tolerance.share) : add(value, multiply(tolerance.amount, count));
}

export function isZero(tolerance: Tolerance): boolean {
  return tolerance.kind === 'share' ? tolerance.share === 0 : sizeOf(tolerance.amount) === 0;
}

function sizeOf(value: Value): number {
  return isUnitValue(value) ? Number(value.toSI().toNumeric()) : value;
}
