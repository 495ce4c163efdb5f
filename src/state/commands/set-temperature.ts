import { produce } from 'immer';
import type { Design, Text } from '../../design/types.ts';

/** Temperature as typed: "300 K", "-40 degC". */
export function setTemperature(design: Design, temperature: Text): Design {
  return produce(design, (draft) => {
    draft.conditions.temperature = temperature;
  });
}
