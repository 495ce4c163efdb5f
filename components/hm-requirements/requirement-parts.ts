import { KINDS } from '../../src/quantity/kinds.ts';
import { REQUIREMENT_QUANTITIES, requirementQuantity, type RequirementOf, type RequirementQuantityName } from '../../src/design/requirement-quantities.ts';
import { BOUNDS } from '../../src/requirements/limits.ts';
import type { Design, Requirement } from '../../src/design/types.ts';
import type { RequirementResult } from '../../src/result/types.ts';

/** What a quantity can be asked of in this design: contacts, layers, or junctions by the layer above them. */
export function targetsOf(design: Design, quantity: RequirementQuantityName): { value: string; text: string }[] {
  const { of } = requirementQuantity(quantity);
  const contacts = of.includes('contact') ? ['top', 'bottom'].map((value) => ({ value, text: `${value} contact` })) : [];
  const layers = of.includes('layer') ? design.layers.map(({ name }) => ({ value: name, text: name })) : [];
  const junctions = of.includes('junction') ? design.layers.slice(0, -1).map(({ name }, i) => ({ value: name, text: `${name} / ${design.layers[i + 1].name}` })) : [];
  return [...contacts, ...layers, ...junctions];
}

/** The quantities by what they apply to, for a menu; one that applies to two stands under the first. */
export function quantityGroups(): { of: RequirementOf; quantities: { name: RequirementQuantityName; words: string }[] }[] {
  const names = Object.keys(REQUIREMENT_QUANTITIES) as RequirementQuantityName[];
  return (['contact', 'layer', 'junction'] as const).map((of) => ({
    of,
    quantities: names.filter((name) => requirementQuantity(name).of[0] === of).map((name) => ({ name, words: requirementQuantity(name).words })),
  }));
}

/** A limit to begin with: an example of the quantity's kind, in the direction that is usual. */
export function firstLimit(quantity: RequirementQuantityName): Pick<Requirement, 'max' | 'min'> {
  const { kind, usual } = requirementQuantity(quantity);
  // Of a flag a least limit asks for it; a largest one forbids it.
  if (kind === 'flag') return { min: true };
  return { [usual === 'min' ? 'min' : 'max']: KINDS[kind].example };
}

/**
 * What has to change with a requirement's quantity: a place where the new quantity is not known, and a limit of another kind.
 *
 * @returns null where the new quantity can be asked of nothing in this design
 */
export function fitting(design: Design, requirement: Requirement, quantity: RequirementQuantityName): Partial<Pick<Requirement, 'of' | 'max' | 'min'>> | null {
  const targets = targetsOf(design, quantity);
  if (targets.length === 0) return null;
  const of = targets.some(({ value }) => value === requirement.of) ? {} : { of: targets[0].value };
  const old = Object.hasOwn(REQUIREMENT_QUANTITIES, requirement.quantity) ? requirementQuantity(requirement.quantity as RequirementQuantityName).kind : null;
  return { ...of, ...(old === requirementQuantity(quantity).kind ? {} : firstLimit(quantity)) };
}

/** How a limit may be turned: of a flag it is asked for or forbidden, of a figure the largest or the least allowed. */
export const TURNS = [
  { bound: 'max', words: 'at most', flag: 'must not be' },
  { bound: 'min', words: 'at least', flag: 'must be' },
] as const;

/** The change that turns a limit to a bound; one that is there already is left alone. */
export function turned(requirement: Requirement, from: 'max' | 'min', to: 'max' | 'min'): Partial<Requirement> {
  const limit = requirement[from];
  return { [from]: undefined, [to]: typeof limit === 'boolean' ? to === 'min' : limit };
}

/** The bounds that a requirement has. */
export function boundsOf(requirement: Requirement): ('max' | 'min')[] {
  return BOUNDS.filter((bound) => requirement[bound] !== undefined);
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
