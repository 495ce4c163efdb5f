import { html, type TemplateResult } from 'lit';

export type MetalColumn = 'metal' | 'barrier' | 'basis' | 'rho' | 'band' | 'worst' | 'drawn' | 'regime' | 'acts';

const WIDE: readonly MetalColumn[] = ['metal', 'barrier', 'basis', 'rho', 'band', 'worst', 'drawn', 'regime', 'acts'];
/** What a choice needs first: the rest is reached by scrolling sideways. The act itself goes under the metal's name, which stays in view. */
const NARROW: readonly MetalColumn[] = ['metal', 'rho', 'worst', 'barrier', 'basis', 'band', 'drawn', 'regime'];
/** Below this width of the panel the table is wider than its frame by more than it shows, px. */
const NARROW_WIDTH = 640;
/** Columns that a metal without a figure has nothing for. */
const FIGURES: ReadonlySet<MetalColumn> = new Set<MetalColumn>(['rho', 'band', 'worst', 'drawn', 'regime']);

export function isNarrow(width: number): boolean {
  return width > 0 && width < NARROW_WIDTH;
}

export function metalColumns(narrow: boolean): readonly MetalColumn[] {
  return narrow ? NARROW : WIDE;
}

/** A row's cells in the order of its columns. @param absence  stands in place of the figures, where there are none: in the first of their columns that lie beside each other */
export function orderedCells(columns: readonly MetalColumn[], cells: Partial<Record<MetalColumn, TemplateResult>>, absence: TemplateResult | null): TemplateResult[] {
  const out: TemplateResult[] = [];
  let said = false;
  for (let i = 0; i < columns.length; i++) {
    const cell = cells[columns[i]];
    if (cell !== undefined) {
      out.push(cell);
      continue;
    }
    let last = i;
    while (last + 1 < columns.length && FIGURES.has(columns[last + 1])) last++;
    out.push(html`<td colspan=${last - i + 1}>${said ? '' : absence}</td>`);
    said = true;
    i = last;
  }
  return out;
}
