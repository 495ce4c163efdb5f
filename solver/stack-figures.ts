import { junctionCapacitances } from './capacitance.ts';
import { contactFigures } from './contact.ts';
import { isFullyDepleted } from './depletion.ts';
import { junctionFigures } from './junction.ts';
import { layerFigures } from './layer.ts';
import type { ContactFigures, JunctionFigures, LayerFigures } from './solution.ts';
import type { SolvedBands } from './solve-bands.ts';

export const SIDES = ['top', 'bottom'] as const;

/**
 * Figures out of solved bands, one layer, junction or contact at a time. `solveStack` takes all of them; a run of many stacks takes those that it is asked for,
 * and gets the same digits.
 */
export function layerOf({ stack, profiles, space }: SolvedBands, index: number): LayerFigures {
  return layerFigures(stack.layers[index], stack.temperature, stack.assumptions, isFullyDepleted(stack, profiles, space, index));
}

/** Without its capacitance, which is worked out for the whole stack at once. */
export function junctionOf({ stack, alignment, profiles, space, sheets }: SolvedBands, index: number): Omit<JunctionFigures, 'capacitance'> {
  return junctionFigures(stack, alignment, profiles, space, sheets, index);
}

/** F/cm^2 [layers - 1]; null where it has no meaning. */
export function capacitancesOf({ stack, profiles, space }: SolvedBands): (number | null)[] {
  return junctionCapacitances(stack, profiles, space);
}

/** @param resistivity  whether to work out what the contact conducts as well, by far the larger part of the work */
export function contactOf({ stack, profiles, space }: SolvedBands, side: (typeof SIDES)[number], resistivity: boolean): ContactFigures {
  return contactFigures(stack, profiles, space, side, resistivity);
}
