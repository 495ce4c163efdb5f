import { metalWorkings } from './metal-workings.ts';
import { nearContactWorkings } from './near-contact-workings.ts';
import { requirementWords } from '../requirements/verdict.ts';
import { closeUpTitle } from '../drawing/contact-closeup-words.ts';
import { PANEL_QUANTITIES, type PanelQuantity } from '../quantity/panel-quantities.ts';
import { assembled } from './assembled.ts';
import type { Context } from './context.ts';
import type { PanelAsked, PanelFigure } from './panel-figures.ts';
import { requirementWorkings } from './requirement-workings.ts';
import { sizingWorkings } from './sizing-workings.ts';
import { spreadWorkings } from './spread-workings.ts';
import type { Found, Workings } from './workings.ts';

/** How a figure of a panel comes about. What it takes beyond the panel's own answer, a stack at a corner, is solved once more: some milliseconds. */
export function panelWorkings({ asked, text }: Pick<PanelFigure, 'asked' | 'text'>): Workings {
  const { found, context } = foundOf(asked);
  const { heading, words } = (PANEL_QUANTITIES[asked.table] as Record<string, PanelQuantity>)[asked.column];
  return assembled(found, context, { asked, title: `${heading} of ${subjectOf(asked)}`, words, value: [text], unit: '' });
}

function foundOf(asked: PanelAsked): { found: Found; context: Context | null } {
  switch (asked.table) {
    case 'requirement':
      return requirementWorkings(asked);
    case 'sizing':
      return sizingWorkings(asked);
    case 'metal':
      return metalWorkings(asked);
    case 'nearContact':
      return nearContactWorkings(asked);
    case 'spread':
      return { found: spreadWorkings(asked), context: null };
  }
}

/** What the figure belongs to. */
function subjectOf(asked: PanelAsked): string {
  switch (asked.table) {
    case 'requirement':
      return requirementWords(asked.row);
    case 'sizing':
      return asked.answer.variable;
    case 'metal':
      return `${asked.row.metal} on the ${asked.side} surface`;
    case 'nearContact':
      return closeUpTitle(asked.contact);
    case 'spread':
      return asked.figure === null ? 'all requirements' : asked.figure.words;
  }
}
