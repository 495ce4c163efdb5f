import type { DopantInput, DopantModel } from './types.ts';

/** The models that a dopant has parameters for, the one that is taken unasked first: the entry's own `model`, else "merging" where it can be, else "dilute". */
export function modelsKnown({ merging, screened, model }: Pick<DopantInput, 'merging' | 'screened' | 'model'>): DopantModel[] {
  const known: DopantModel[] = [...(merging ? (['merging'] as const) : []), 'dilute', ...(screened ? (['screened'] as const) : []), 'complete'];
  return model !== undefined && known.includes(model) ? [model, ...known.filter((m) => m !== model)] : known;
}
