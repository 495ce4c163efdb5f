import { REQUIREMENT_QUANTITIES, requirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import type { Design, Requirement } from '../design/types.ts';

/** One limit as it is written in the design, before anything is read. A requirement with both "max" and "min" has two. */
export interface WrittenLimit {
  /** index of its requirement in the design */ row: number;
  requirement: Requirement;
  bound: 'max' | 'min';
  limit: string | boolean;
}

export const BOUNDS = ['max', 'min'] as const;

/** All limits in the order in which they are judged. */
export function writtenLimits({ requirements = [] }: Pick<Design, 'requirements'>): WrittenLimit[] {
  return requirements.flatMap((requirement, row) =>
    BOUNDS.flatMap((bound) => {
      const limit = requirement[bound];
      return limit === undefined ? [] : [{ row, requirement, bound, limit }];
    }),
  );
}

/** The quantity of a requirement; null for one that the program does not know. */
export function quantityOf(name: string): (ReturnType<typeof requirementQuantity> & { name: RequirementQuantityName }) | null {
  return Object.hasOwn(REQUIREMENT_QUANTITIES, name) ? { ...requirementQuantity(name as RequirementQuantityName), name: name as RequirementQuantityName } : null;
}

/** "contact resistivity of top" */
export function quantityWords({ quantity, of }: Pick<Requirement, 'quantity' | 'of'>): string {
  return `${quantityOf(quantity)?.words ?? quantity} of ${of}`;
}

/** "contact resistivity of top, at most 1e-6 ohm cm^2", as written. */
export function limitWords({ requirement, bound, limit }: WrittenLimit): string {
  if (typeof limit === 'boolean') return `${requirement.of} ${limit ? '' : 'not '}${quantityOf(requirement.quantity)?.words ?? requirement.quantity}`;
  return `${quantityWords(requirement)}, at ${bound === 'max' ? 'most' : 'least'} ${limit}`;
}
