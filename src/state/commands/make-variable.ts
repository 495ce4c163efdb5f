import { produce } from 'immer';
import type { Design, Variable } from '../../design/types.ts';
import { dopantAt, layerAt } from './parts.ts';

/** A value of a layer that a variable can stand for: its thickness, or the concentration (the peak, where it is implanted) of one of its dopants. */
export type VariablePlace = { layer: number; part: 'thickness' } | { layer: number; part: 'concentration'; row: number };

/** The text at a place; null where the value goes through the depth and has no one text. */
export function textAtPlace(design: Design, place: VariablePlace): string | null {
  if (place.part === 'thickness') return layerAt(design, place.layer).thickness;
  const { concentration } = dopantAt(design, place.layer, place.row);
  if (typeof concentration === 'string') return concentration;
  return 'peak' in concentration ? concentration.peak : null;
}

/**
 * Makes a variable of the text at a place and puts its name there: the stack stays what it was.
 *
 * @param more  range, tolerance, note of the new variable
 * @throws {RangeError} the value there has no one text
 */
export function makeVariable(design: Design, place: VariablePlace, name: string, more: Omit<Variable, 'name' | 'value'> = {}): Design {
  const value = textAtPlace(design, place);
  if (value === null) throw new RangeError('a value that goes through the depth has no one text');
  return produce(design, (draft) => {
    (draft.variables ??= []).push({ name, value, ...more });
    if (place.part === 'thickness') draft.layers[place.layer].thickness = name;
    else {
      const target = dopantAt(draft, place.layer, place.row);
      if (typeof target.concentration === 'string') target.concentration = name;
      else if ('peak' in target.concentration) target.concentration.peak = name;
    }
  });
}
