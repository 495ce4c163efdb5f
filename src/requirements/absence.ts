import { isAlloy, type Boundary, type Layer, type Stack } from '../../solver/index.ts';
import { requirementQuantity } from '../design/requirement-quantities.ts';
import type { ReadRequirement } from '../design/requirements.ts';

const SURFACES: Record<Exclude<Boundary['kind'], 'barrier'>, string> = { neutral: 'a neutral contact', pinned: 'a pinned surface without a metal', open: 'an open surface' };

/** Why a stack that was solved has no figure for a requirement, and what would give it one: a sentence without its stop. */
export function absenceOf({ quantity, of, target }: ReadRequirement, stack: Stack): string {
  const { words } = requirementQuantity(quantity);
  const lacks = `has no ${words}`;
  if (target.kind === 'contact') {
    const { kind } = target.index === 0 ? stack.top : stack.bottom;
    if (kind !== 'barrier') return `the ${of} is ${SURFACES[kind]}, which ${lacks}; give it a metal or a barrier, or ask it of the other end`;
  }
  if (target.kind === 'layer') {
    const layer = stack.layers[target.index];
    if (!isAlloy(layer.material) && layer.material.insulator) return `${of} is an insulator, which ${lacks}`;
    const doping = dopingAbsence(quantity, layer);
    if (doping !== null) return `${of} ${doping}`;
  }
  return `the result ${lacks} of ${of} there`;
}

function dopingAbsence(quantity: ReadRequirement['quantity'], { dopants }: Layer): string | null {
  if (quantity !== 'ionisedShare' && quantity !== 'solubility') return null;
  if (dopants.length === 0) return 'has no dopant';
  return quantity === 'solubility' ? 'has no dopant whose published solubility is known' : null;
}
