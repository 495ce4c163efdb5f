import type { Design } from '../../design/types.ts';

/**
 * Takes out the interface rows whose two layers no longer meet. An offset or a charge was written for that pair of layers; under another pair it would be a
 * wrong figure that nobody typed. Undo brings row and layers back together.
 * @param draft   after the change of the layers; changed in place
 * @param before  the design before it
 */
export function keepMetPairs(draft: Design, before: Design): void {
  if (draft.interfaces === undefined) return;
  const below = (design: Design, above: string): string | undefined => {
    const at = design.layers.findIndex((layer) => layer.name === above);
    return at < 0 ? undefined : design.layers[at + 1]?.name;
  };
  // A row that was wrong before (no such layer) is the person's to mend: it stays.
  draft.interfaces = draft.interfaces.filter((row) => below(before, row.above) === undefined || below(draft, row.above) === below(before, row.above));
}
