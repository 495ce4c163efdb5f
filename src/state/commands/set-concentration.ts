import { produce } from 'immer';
import type { Design, DopantRow } from '../../design/types.ts';
import { dopantAt } from './parts.ts';

/** Gives row `row` of a layer's dopants its concentration: as typed ("3e17 cm^-3", "2*Ncap"), graded, or implanted. */
export function setConcentration(design: Design, layer: number, row: number, concentration: DopantRow['concentration']): Design {
  return produce(design, (draft) => {
    dopantAt(draft, layer, row).concentration = concentration;
  });
}
