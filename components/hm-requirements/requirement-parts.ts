import { requirementQuantity, type RequirementQuantityName } from '../../src/design/requirement-quantities.ts';
import type { Design } from '../../src/design/types.ts';
import type { RequirementResult } from '../../src/result/types.ts';

/** What a quantity can be asked of in this design: contacts, layers, or junctions by the layer above them. */
export function targetsOf(design: Design, quantity: RequirementQuantityName): { value: string; text: string }[] {
  const { of } = requirementQuantity(quantity);
  const contacts = of.includes('contact') ? ['top', 'bottom'].map((value) => ({ value, text: `${value} contact` })) : [];
  const layers = of.includes('layer') ? design.layers.map(({ name }) => ({ value: name, text: name })) : [];
  const junctions = of.includes('junction') ? design.layers.slice(0, -1).map(({ name }, i) => ({ value: name, text: `${name} / ${design.layers[i + 1].name}` })) : [];
  return [...contacts, ...layers, ...junctions];
}

/** A factor of ten, or a difference as large as the limit, fills a half of the bar. */
export function marginShare({ margin, margin_kind, limit, met }: RequirementResult): number | null {
  if (margin === null) return met ? 1 : null;
  if (margin_kind === 'ratio') return margin > 0 ? held(Math.log10(margin)) : -1;
  const size = typeof limit === 'number' && limit !== 0 ? Math.abs(limit) : 1;
  return held(margin / size);
}

/** -1 to 1: not met lies left of the middle, met right of it. */
function held(share: number): number {
  return Math.min(Math.max(share, -1), 1);
}
