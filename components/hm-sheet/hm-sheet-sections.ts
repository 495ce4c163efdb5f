import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Design } from '../../src/design/types.ts';
import { ledgerTables, type LedgerColumn, type LedgerRow, type LedgerTable } from '../../src/result/ledger.ts';
import type { Result } from '../../src/result/types.ts';
import type { Asked } from '../../src/workings/workings.ts';
import { look } from '../shared/look.ts';
import { styles } from './hm-sheet-sections.styles.ts';

/** Another design of the project. */
export interface OtherDesign {
  id: string;
  name: string;
  design: Design;
}

/** What is switched on. */
export interface SectionsChosen {
  /** ids of the others laid over this one */ over: readonly string[];
  corner: boolean;
  contacts: boolean;
  workings: readonly Asked[];
}

export const NOTHING_CHOSEN: SectionsChosen = { over: [], corner: false, contacts: false, workings: [] };

/** With the sheet's own they are four: more are not told apart on one plate. */
const MOST_OVER = 3;

/**
 * Sections that a sheet can have besides its usual ones.
 *
 * @fires sections-change  detail: what is chosen now
 */
export class HmSheetSections extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    result: { attribute: false },
    others: { attribute: false },
    judged: { type: Boolean },
    chosen: { attribute: false },
    row: { state: true },
    column: { state: true },
  };

  declare result: Result | null;
  declare others: readonly OtherDesign[];
  /** requirements with a worst case are known */ declare judged: boolean;
  declare chosen: SectionsChosen;
  /** of the figure to add, "layers 0" */ declare private row: string;
  declare private column: string;

  constructor() {
    super();
    this.result = null;
    this.others = [];
    this.judged = false;
    this.chosen = NOTHING_CHOSEN;
    this.row = 'layers 0';
    this.column = '';
  }

  private change(part: Partial<SectionsChosen>): void {
    // Kept at once: a second press may come before the sheet has handed the first one back.
    this.chosen = { ...this.chosen, ...part };
    this.dispatchEvent(new CustomEvent('sections-change', { detail: this.chosen }));
  }

  private box(words: string, of: { checked: boolean; able: boolean; why?: string; set(on: boolean): void }): TemplateResult {
    return html`<label class="box"><input type="checkbox" .checked=${of.checked && of.able} ?disabled=${!of.able} @change=${(e: Event) => of.set((e.target as HTMLInputElement).checked)} /><span>${words}${of.able || of.why === undefined ? nothing : html`<span class="quiet"> (${of.why})</span>`}</span></label>`;
  }

  private over(id: string, on: boolean): void {
    this.change({ over: on ? [...this.chosen.over, id] : this.chosen.over.filter((other) => other !== id) });
  }

  private get found(): { table: LedgerTable; row: LedgerRow; columns: LedgerColumn[]; column: LedgerColumn } | null {
    if (this.result === null) return null;
    const tables = ledgerTables(this.result);
    const all = tables.flatMap((table) => table.rows.map((row) => ({ table, row })));
    const at = all.find(({ table, row }) => keyOf(table, row) === this.row) ?? all[0];
    const { columns } = at.table;
    return { ...at, columns, column: columns.find(({ id }) => id === this.column) ?? columns.find(({ kind, usual }) => kind === 'figure' && usual) ?? columns[0] };
  }

  private add(): void {
    const { found } = this;
    if (found === null) return;
    const asked: Asked = { table: found.table.id, index: found.row.index, column: found.column.id };
    if (!this.chosen.workings.some((one) => same(one, asked))) this.change({ workings: [...this.chosen.workings, asked] });
  }

  override render(): TemplateResult {
    const { chosen, others, result } = this;
    const contact = (result?.contacts ?? []).some(({ kind }) => kind === 'barrier');
    return html`<details>
      <summary>Further sections</summary>
      <div class="boxes" role="group" aria-label="Further sections">
        ${others.map(({ id, name }) => this.box(`Laid over: ${name}`, { checked: chosen.over.includes(id), able: chosen.over.includes(id) || chosen.over.length < MOST_OVER, why: 'four designs are as many as can be told apart', set: (on) => this.over(id, on) }))}
        ${others.length === 0 ? html`<p class="quiet">Variants of the project can be laid over this one; it has no others.</p>` : nothing}
        ${this.box('The plate at the worst corner', { checked: chosen.corner, able: this.judged, why: 'no requirement is judged', set: (corner) => this.change({ corner }) })}
        ${this.box('The contacts from near', { checked: chosen.contacts, able: contact, why: 'the stack has no metal contact', set: (contacts) => this.change({ contacts }) })}
      </div>
      ${result === null ? nothing : this.renderWorkings()}
    </details>`;
  }

  private renderWorkings(): TemplateResult {
    const tables = ledgerTables(this.result!);
    const found = this.found!;
    return html`<div class="figures" role="group" aria-label="Workings">
        <label>Workings of
          <select @change=${(e: Event) => (this.row = (e.target as HTMLSelectElement).value)}>
            ${tables.map((table) => html`<optgroup label=${table.title}>${table.rows.map((row) => html`<option value=${keyOf(table, row)} ?selected=${row === found.row || keyOf(table, row) === keyOf(found.table, found.row)}>${row.name}</option>`)}</optgroup>`)}
          </select>
        </label>
        <label>Figure
          <select @change=${(e: Event) => (this.column = (e.target as HTMLSelectElement).value)}>
            ${found.columns.map(({ id, heading, words }) => html`<option value=${id} title=${words} ?selected=${id === found.column.id}>${heading}</option>`)}
          </select>
        </label>
        <button type="button" @click=${this.add}>Add</button>
      </div>
      ${this.chosen.workings.length === 0 ? nothing : html`<ul>${this.chosen.workings.map((asked) => this.renderAsked(asked, tables))}</ul>`}`;
  }

  private renderAsked(asked: Asked, tables: readonly LedgerTable[]): TemplateResult | typeof nothing {
    const table = tables.find(({ id }) => id === asked.table);
    const row = table?.rows.find(({ index }) => index === asked.index);
    const column = table?.columns.find(({ id }) => id === asked.column);
    if (!row || !column) return nothing;
    const words = `${column.heading} of ${row.name}`;
    return html`<li><span>${words}</span><button type="button" @click=${() => this.change({ workings: this.chosen.workings.filter((one) => !same(one, asked)) })}>Leave out<span class="spoken"> ${words}</span></button></li>`;
  }
}

const keyOf = (table: LedgerTable, row: LedgerRow): string => `${table.id} ${row.index}`;
const same = (a: Asked, b: Asked): boolean => a.table === b.table && a.index === b.index && a.column === b.column;

customElements.define('hm-sheet-sections', HmSheetSections);

declare global {
  interface HTMLElementTagNameMap {
    'hm-sheet-sections': HmSheetSections;
  }
}
