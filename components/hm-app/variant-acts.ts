import type { Session } from '../../src/state/session.ts';
import { addVariant, deleteVariant, openVariant, removeVariant, renameVariant, takeBackVariant, type VariantList } from '../../src/state/variants.ts';
import type { VariantAct } from '../shared/events.ts';

/** Carries out an act on the variants. @returns what it came to, as a sentence for the person; null where it changed nothing */
export function actOnVariants(session: Session, act: VariantAct): string | null {
  const before = session.variants;
  const next = changed(before, act);
  if (next === before) return null;
  session.changeVariants(next);
  const name = (id: string): string => (next.list.find((variant) => variant.id === id) ?? before.list.find((variant) => variant.id === id))!.name;
  const opened = next.open === before.open ? '' : ` ${name(next.open)} is on the page now.`;
  switch (act.act) {
    case 'add':
      return `Copied.${opened}`;
    case 'open':
      return opened.trim();
    case 'rename':
      return `Renamed to ${name(act.id)}.`;
    case 'remove':
      return `${name(act.id)} is put away, and can be taken back.${opened}`;
    case 'take-back':
      return `${name(act.id)} is back.`;
    case 'delete':
      return `${name(act.id)} is deleted.`;
  }
}

function changed(all: VariantList, act: VariantAct): VariantList {
  switch (act.act) {
    case 'add':
      return addVariant(all, act.name);
    case 'rename':
      return renameVariant(all, act.id, act.name);
    case 'open':
      return openVariant(all, act.id);
    case 'remove':
      return removeVariant(all, act.id);
    case 'take-back':
      return takeBackVariant(all, act.id);
    case 'delete':
      return deleteVariant(all, act.id);
  }
}
