import { produce } from 'immer';
import type { Design, Text } from '../../design/types.ts';

/** Voltage of the top against the bottom, as typed; undefined takes it out, which means 0 V. */
export function setBias(design: Design, bias: Text | undefined): Design {
  return produce(design, (draft) => {
    if (bias === undefined) delete draft.conditions.bias;
    else draft.conditions.bias = bias;
  });
}
