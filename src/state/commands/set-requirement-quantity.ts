import { produce } from 'immer';
import type { Design, Requirement } from '../../design/types.ts';
import { partAt } from './parts.ts';

/**
 * Lets a requirement ask for another quantity. What it is asked of and its limits stay, unless others are given because the old ones make no sense of the new
 * quantity.
 */
export function setRequirementQuantity(design: Design, requirement: number, quantity: string, instead: Partial<Pick<Requirement, 'of' | 'max' | 'min'>> = {}): Design {
  return produce(design, (draft) => {
    const target = partAt(draft.requirements ?? [], requirement, 'requirement');
    target.quantity = quantity;
    if (instead.of !== undefined) target.of = instead.of;
    if (instead.max === undefined && instead.min === undefined) return;
    delete target.max;
    delete target.min;
    if (instead.max !== undefined) target.max = instead.max;
    if (instead.min !== undefined) target.min = instead.min;
  });
}
