import { produce } from 'immer';
import type { AssumptionsInput, Design } from '../../design/types.ts';

/** Sets one assumption; undefined gives it back to its default. */
export function setAssumption<K extends keyof AssumptionsInput>(design: Design, key: K, value: AssumptionsInput[K]): Design {
  return produce(design, (draft) => {
    const assumptions = (draft.assumptions ??= {});
    if (value === undefined) delete assumptions[key];
    else assumptions[key] = value;
  });
}
