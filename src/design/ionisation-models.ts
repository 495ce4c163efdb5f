import type { DopantInput, DopantModel } from './types.ts';

/** The models that a dopant has parameters for, the one that is taken unasked first. */
export function modelsKnown({ merging, screened }: Pick<DopantInput, 'merging' | 'screened'>): DopantModel[] {
  return [...(merging ? (['merging'] as const) : []), 'dilute', ...(screened ? (['screened'] as const) : []), 'complete'];
}
