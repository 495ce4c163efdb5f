import { solveBands } from './solve-bands.ts';
import { isRefusal, type Refusal, type Solution } from './solution.ts';
import type { SolveOptions, Stack } from './stack.ts';
import { capacitancesOf, contactOf, junctionOf, layerOf, SIDES } from './stack-figures.ts';
import { warningsOf } from './warnings.ts';

/**
 * The one road through the solver: alignment, Poisson over the whole stack, then the figures of layers, junctions and contacts.
 *
 * @param stack    in solver units (units.ts)
 * @throws {RangeError} what solveBands refuses at its door
 * @returns the solution with its quality, or a refusal with its reason and without figures
 */
export function solveStack(stack: Stack, options: SolveOptions = {}): Solution | Refusal {
  const bands = solveBands(stack, options);
  if (isRefusal(bands)) return bands;
  const { profiles, quality } = bands;
  const layers = stack.layers.map((_, l) => layerOf(bands, l));
  const capacitances = capacitancesOf(bands);
  const solution: Solution = {
    stack, profiles, quality, layers,
    junctions: capacitances.map((capacitance, i) => ({ ...junctionOf(bands, i), capacitance })),
    contacts: SIDES.map((side) => contactOf(bands, side, options.contacts ?? true)),
    warnings: [],
  };
  solution.warnings = warningsOf(solution);
  return solution;
}
