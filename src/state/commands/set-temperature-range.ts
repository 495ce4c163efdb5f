import { produce } from 'immer';
import type { Design, Text } from '../../design/types.ts';

/** The range that requirements are held over, coldest first; undefined takes it out. */
export function setTemperatureRange(design: Design, range: [Text, Text] | undefined): Design {
  return produce(design, (draft) => {
    if (range === undefined) delete draft.conditions.temperatureRange;
    else draft.conditions.temperatureRange = range;
  });
}
