import { requirementQuantity } from '../design/requirement-quantities.ts';
import type { ReadRequirement } from '../design/requirements.ts';

/** Largest logarithm of a ratio that is told apart: a figure of zero meets any largest limit without end. */
const MOST = 700;

/**
 * How well a figure meets its limit: zero at the limit, above where it is met. Natural logarithm of the ratio, or the difference in the quantity's own
 * steps; so margins of different sorts can be set side by side.
 *
 * @param figure  in the quantity's result unit; of a flag as figureOf gives it
 */
export function scoreOf(requirement: ReadRequirement, figure: number): number {
  const { margin, step, kind } = requirementQuantity(requirement.quantity);
  if (kind === 'flag') return (requirement.limit === true ? figure : -figure) / step;
  const limit = requirement.limit as number;
  if (margin === 'difference') return (requirement.bound === 'max' ? limit - figure : figure - limit) / step;
  const log = figure > 0 ? Math.log(figure / limit) : -MOST;
  return Math.max(-MOST, Math.min(MOST, requirement.bound === 'max' ? -log : log));
}

/** The margin as it is told: a ratio (0 where nothing is left of it), or a difference in the quantity's `marginUnit`; null without end. */
export function marginOf(requirement: ReadRequirement, score: number): number | null {
  const { margin, step } = requirementQuantity(requirement.quantity);
  if (margin === 'difference') return score * step;
  if (score <= -MOST) return 0;
  return score >= MOST ? null : Math.exp(score);
}
