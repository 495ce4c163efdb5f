import { css, html, type TemplateResult } from 'lit';
import type { PanelFigure } from '../../src/workings/panel-figures.ts';
import { tell } from './events.ts';

/** A figure that can be asked how it comes about, as the ledger's cells can: the same pointer, the same line under it. */
export const howLook = css`
  button.how {
    border: 0;
    background: none;
    padding: 0 2px;
    margin: 0 -2px;
    min-height: 24px;
    min-width: 24px;
    text-align: inherit;
    overflow-wrap: anywhere;
    cursor: help;
    text-decoration: underline dotted;
    text-decoration-color: var(--edge);
    text-underline-offset: 3px;
  }
  button.how:hover {
    text-decoration-color: currentcolor;
  }
  strong > button.how,
  b > button.how {
    font-weight: inherit;
  }
`;

/**
 * A figure as a button that asks for its workings.
 *
 * @param content  what is shown, where it is not the figure's own text
 * @param walked   one of many in a table: reached by the arrows (walkFigures), not by Tab
 * @fires hm-view  { workings: PanelFigure }
 */
export function how(figure: PanelFigure, { content, walked = false }: { content?: unknown; walked?: boolean } = {}): TemplateResult {
  const ask = (event: Event): void => tell(event.currentTarget as HTMLElement, 'hm-view', { change: { workings: figure } });
  return walked
    ? html`<button type="button" class="how" tabindex="-1" aria-haspopup="dialog" title="how?" @click=${ask}>${content ?? figure.text}</button>`
    : html`<button type="button" class="how" aria-haspopup="dialog" title="how?" @click=${ask}>${content ?? figure.text}</button>`;
}

/** The one of a list that belongs to a column. */
export function figureAt<F extends PanelFigure>(figures: readonly F[], column: F['asked']['column']): F | null {
  return figures.find(({ asked }) => asked.column === column) ?? null;
}

/** A sentence of which one part is the figure. */
export function sentenceWith(sentence: string, figure: PanelFigure | null, part = figure?.text ?? ''): TemplateResult {
  const at = figure === null || part === '' ? -1 : sentence.indexOf(part);
  return at < 0 ? html`${sentence}` : html`${sentence.slice(0, at)}${how(figure!, { content: part })}${sentence.slice(at + part.length)}`;
}

/** Rows that the arrows go up and down between. */
const ROWS = 'tr, dd, li';

/** Arrows, Home and End among the figures of an element: many figures take one stop of the Tab key. To be called for keydown on what holds them. */
export function walkFigures(event: KeyboardEvent): void {
  const here = (event.target as Element).closest<HTMLElement>('button.how');
  const all = here === null ? [] : figuresIn(event.currentTarget as HTMLElement);
  if (here === null || all.length === 0) return;
  const rows = [...new Set(all.map((b) => b.closest(ROWS)))].map((row) => all.filter((b) => b.closest(ROWS) === row));
  const r = rows.findIndex((row) => row.includes(here));
  const c = rows[r].indexOf(here);
  const to = { ArrowUp: rows[r - 1]?.[c] ?? rows[r - 1]?.at(-1), ArrowDown: rows[r + 1]?.[c] ?? rows[r + 1]?.at(-1), ArrowLeft: all[all.indexOf(here) - 1], ArrowRight: all[all.indexOf(here) + 1], Home: rows[r][0], End: rows[r].at(-1) }[event.key];
  if (to === undefined) return;
  event.preventDefault();
  stopAt(all, to);
  to.focus();
}

/** One of the walked figures is where Tab stops: the one that had the focus last, else the first. To be called after each rendering. */
export function settleFigures(holder: HTMLElement | null): void {
  if (holder === null) return;
  const all = figuresIn(holder);
  if (all.length > 0 && !all.some(({ tabIndex }) => tabIndex === 0)) all[0].tabIndex = 0;
}

/** Pressing one makes it the stop as well. */
export function focusedFigure(event: FocusEvent): void {
  const here = (event.target as Element).closest<HTMLElement>('button.how');
  if (here !== null) stopAt(figuresIn(event.currentTarget as HTMLElement), here);
}

const figuresIn = (holder: HTMLElement): HTMLElement[] => [...holder.querySelectorAll<HTMLElement>('button.how[tabindex]')];

function stopAt(all: readonly HTMLElement[], one: HTMLElement): void {
  for (const other of all) other.tabIndex = other === one ? 0 : -1;
}
