import { LitElement, html, nothing, type TemplateResult } from 'lit';
import { ledgerTables, qualityLine, sortedRows, tableTsv, type LedgerColumn, type LedgerRow, type LedgerTable, type Order, type TableId } from '../../src/result/ledger.ts';
import { cellDifference, loneRows, partnerRow } from '../../src/result/ledger-difference.ts';
import type { OwnRows } from '../../src/parameters/own-entries.ts';
import type { Result } from '../../src/result/types.ts';
import { OWN_WORDS, ownMark } from '../shared/own-mark.ts';
import { look } from '../shared/look.ts';
import { sortedTableLook } from '../shared/table-look.ts';
import { tell, type HalfmarkEvents } from '../shared/events.ts';
import { styles } from './hm-ledger.styles.ts';

/** What a person has chosen to see of a table. */
export interface LedgerView {
  columns?: Partial<Record<TableId, string[]>>;
  order?: Partial<Record<TableId, Order>>;
}

const KIND_OF: Record<TableId, 'layer' | 'interface' | 'contact'> = { layers: 'layer', junctions: 'interface', contacts: 'contact' };

/**
 * The figures of the result: a row a layer, a row a junction, a row a contact, and a line on how good the answer is.
 *
 * Headings sort, columns can be chosen, a table is copied as tab-separated text. With `workings`, every figure can be asked for its workings: arrows
 * walk the figures, Enter or a click asks.
 *
 * @fires hm-choose  a row's name was pressed
 * @fires hm-view    { ledger: LedgerView } when columns or order change; { workings: { table, index, column } } when a figure is asked "how?"
 * @fires hm-say     the table was copied, or could not be
 */
export class HmLedger extends LitElement {
  static override styles = [look, sortedTableLook, styles];
  static override properties = {
    result: { attribute: false },
    view: { attribute: false },
    chosen: { attribute: false },
    stale: { type: Boolean, reflect: true },
    workings: { type: Boolean },
    against: { attribute: false },
    own: { attribute: false },
    choosing: { state: true },
    at: { state: true },
  };

  declare result: Result | null;
  declare view: LedgerView;
  /** the row to mark, as told by hm-choose */ declare chosen: HalfmarkEvents['hm-choose'];
  declare stale: boolean;
  declare workings: boolean;
  /** another result whose figures are set under these where they differ */ declare against: { name: string; result: Result } | null;
  /** what of the design's own stands behind a row, by the row's name: ownRows of src/parameters */ declare own: OwnRows | null;
  /** the table whose columns are being chosen */ declare private choosing: TableId | null;
  /** the figure that the arrows stand on */ declare private at: { table: TableId; row: number; column: number };

  /** tables of the other result */ private others: LedgerTable[] = [];

  constructor() {
    super();
    this.result = null;
    this.view = {};
    this.chosen = null;
    this.stale = false;
    this.workings = false;
    this.against = null;
    this.own = null;
    this.choosing = null;
    this.at = { table: 'layers', row: 0, column: 0 };
  }

  override render(): TemplateResult {
    const { result } = this;
    if (!result) return html`<p class="empty">No figures yet: they stand here as soon as the stack is solved.</p>`;
    return html`
      ${this.stale ? html`<p class="stale-mark">Figures of the stack before the last change.</p>` : nothing}
      ${this.workings ? html`<p class="hint">How does a figure come about? Press it, or walk to it with the arrows and press Enter.</p>` : nothing}
      ${this.renderAgainst(result)} ${ledgerTables(result).map((table) => this.renderTable(table))}
      ${this.own !== null && Object.values(this.own).some(({ size }) => size > 0) ? html`<p class="hint">${OWN_WORDS}</p>` : nothing}
      <p class="quality">${qualityLine(result)}</p>
    `;
  }

  /** What the small lines under the figures are, and which rows only one of the two has. */
  private renderAgainst(result: Result): TemplateResult | typeof nothing {
    const { against } = this;
    this.others = against === null ? [] : ledgerTables(against.result);
    if (against === null) return nothing;
    const lone = loneRows(ledgerTables(result), this.others);
    const rows = (what: 'here' | 'there'): string => lone.flatMap((row) => row[what]).join(', ');
    return html`<p class="against">Small lines under a figure: its value in ${against.name}, the change from there to here, and the change in per cent. No line: the two are the same.
      ${rows('here') === '' ? nothing : html`Only here: ${rows('here')}.`} ${rows('there') === '' ? nothing : html`Only in ${against.name}: ${rows('there')}.`}</p>`;
  }

  private renderDifference(table: LedgerTable, column: LedgerColumn, row: LedgerRow): TemplateResult | typeof nothing {
    const partner = this.others.length === 0 ? null : partnerRow(table, row, this.others);
    const difference = partner === null ? null : cellDifference(column, row.cells[column.id], partner.cells[column.id]);
    if (difference === null) return nothing;
    const { other, change, percent } = difference;
    return html`<span class="change">was ${other}</span>${change === null ? nothing : html`<span class="change">${change}${percent === null ? nothing : html` (${percent})`}</span>`}`;
  }

  private shownColumns(table: LedgerTable): LedgerColumn[] {
    const ids = this.view.columns?.[table.id];
    return ids ? table.columns.filter((c) => ids.includes(c.id)) : table.columns.filter((c) => c.usual);
  }

  private orderOf(table: LedgerTable): Order {
    const order = this.view.order?.[table.id] ?? { column: '', descending: false };
    // A column that has been taken out no longer orders the rows: nobody could see why they stand as they do.
    return order.column === '' || this.shownColumns(table).some((c) => c.id === order.column) ? order : { column: '', descending: false };
  }

  private renderTable(table: LedgerTable): TemplateResult {
    const columns = this.shownColumns(table);
    const order = this.orderOf(table);
    const rows = sortedRows(table, order);
    const open = this.choosing === table.id;
    return html`
      <section aria-labelledby="of-${table.id}">
        <div class="bar">
          <h3 id="of-${table.id}">${table.title}</h3>
          <button type="button" aria-expanded=${open} @click=${() => (this.choosing = open ? null : table.id)}>Columns<span class="spoken"> of ${table.title}</span></button>
          <button type="button" @click=${() => this.copy(table, columns, rows)}>Copy<span class="spoken"> ${table.title}</span> as table</button>
          ${open ? this.renderChoice(table, columns) : nothing}
        </div>
        <div class="scroll" role="region" aria-label="${table.title}, figures" tabindex="0">
          <table role=${this.workings ? 'grid' : nothing}>
            <thead>
              <tr>
                ${this.renderHeading(table, { id: '', heading: table.of[0].toUpperCase() + table.of.slice(1), words: 'in the order of the stack', unit: '', kind: 'words', usual: true }, order)}
                ${columns.map((column) => this.renderHeading(table, column, order))}
              </tr>
            </thead>
            <tbody @keydown=${(event: KeyboardEvent) => this.walk(event, table, columns, rows)}>
              ${rows.map((row, r) => this.renderRow(table, columns, row, r))}
            </tbody>
          </table>
        </div>
      </section>
    `;
  }

  private renderChoice(table: LedgerTable, shown: LedgerColumn[]): TemplateResult {
    return html`<fieldset>
      <legend>Columns of ${table.title.toLowerCase()}</legend>
      ${table.columns.map(
        (c) => html`<label title=${c.words}><input type="checkbox" .checked=${shown.includes(c)} @change=${() => this.toggleColumn(table, c)} />${c.heading}</label>`,
      )}
    </fieldset>`;
  }

  private renderHeading(table: LedgerTable, column: LedgerColumn, order: Order): TemplateResult {
    const sorted = order.column === column.id;
    const isStackOrder = column.id === '' && !order.descending;
    return html`<th scope="col" class=${column.kind} aria-sort=${sorted && !isStackOrder ? (order.descending ? 'descending' : 'ascending') : 'none'}>
      <button type="button" title="${column.words}; press to sort" @click=${() => this.sortBy(table, column, order)}>
        ${column.heading}<span class="arrow" aria-hidden="true">${sorted && !isStackOrder ? (order.descending ? '↓' : '↑') : ''}</span>
        ${column.unit === '' ? nothing : html`<span class="unit">${column.unit}</span>`}
      </button>
    </th>`;
  }

  private renderRow(table: LedgerTable, columns: LedgerColumn[], row: LedgerRow, r: number): TemplateResult {
    const isChosen = this.chosen?.kind === KIND_OF[table.id] && this.chosen.index === row.index;
    const own = this.own?.[table.id].get(row.name);
    return html`<tr class=${isChosen ? 'chosen' : ''} aria-current=${isChosen ? 'true' : nothing}>
      <th scope="row"><button type="button" aria-label="choose ${row.name}" @click=${() => tell(this, 'hm-choose', { kind: KIND_OF[table.id], index: row.index })}>${row.name}</button>${own === undefined ? nothing : ownMark(own)}</th>
      ${columns.map((column, c) => this.renderCell(table, column, row, r, c))}
    </tr>`;
  }

  private renderCell(table: LedgerTable, column: LedgerColumn, row: LedgerRow, r: number, c: number): TemplateResult {
    const cell = row.cells[column.id];
    const content = html`${cell.lines.map((line) => html`<span>${line}</span>`)}${cell.note ? html`<span class="note">${cell.note}</span>` : nothing}${this.renderDifference(table, column, row)}`;
    if (!this.workings) return html`<td class=${column.kind}>${content}</td>`;
    const standsHere = this.at.table === table.id ? this.at.row === r && this.at.column === c : r === 0 && c === 0;
    return html`<td
      class="${column.kind} asks"
      tabindex=${standsHere ? 0 : -1}
      aria-haspopup="dialog"
      data-cell="${table.id} ${r} ${c}"
      @focus=${() => (this.at = { table: table.id, row: r, column: c })}
      @click=${() => this.ask(table, row, column)}
      >${content}</td>`;
  }

  private sortBy(table: LedgerTable, column: LedgerColumn, order: Order): void {
    const again = order.column === column.id;
    // Figures are first asked for their largest, words and the stack's own order from the start; a third press gives the stack's order back.
    const first = column.kind === 'figure';
    const next: Order = !again ? { column: column.id, descending: column.id === '' ? false : first } : order.descending === first && column.id !== '' ? { column: column.id, descending: !first } : { column: '', descending: column.id === '' && !order.descending };
    this.change({ ...this.view, order: { ...this.view.order, [table.id]: next } });
  }

  private toggleColumn(table: LedgerTable, column: LedgerColumn): void {
    const shown = this.shownColumns(table).map((c) => c.id);
    const next = shown.includes(column.id) ? shown.filter((id) => id !== column.id) : [...shown, column.id];
    this.change({ ...this.view, columns: { ...this.view.columns, [table.id]: next } });
  }

  private change(view: LedgerView): void {
    this.view = view;
    tell(this, 'hm-view', { change: { ledger: view } });
  }

  private ask(table: LedgerTable, row: LedgerRow, column: LedgerColumn): void {
    tell(this, 'hm-view', { change: { workings: { table: table.id, index: row.index, column: column.id } } });
  }

  private async copy(table: LedgerTable, columns: LedgerColumn[], rows: LedgerRow[]): Promise<void> {
    try {
      await navigator.clipboard.writeText(tableTsv(table, columns, rows));
      tell(this, 'hm-say', { text: `${table.title} copied as a table.` });
    } catch {
      tell(this, 'hm-say', { text: 'The browser did not allow copying; the tables can be exported as a file instead.', urgent: true });
    }
  }

  private walk(event: KeyboardEvent, table: LedgerTable, columns: LedgerColumn[], rows: LedgerRow[]): void {
    const cell = (event.target as Element).closest<HTMLElement>('td[data-cell]');
    if (!cell) return;
    const [, r, c] = cell.dataset.cell!.split(' ').map(Number);
    const steps: Record<string, [number, number]> = { ArrowUp: [r - 1, c], ArrowDown: [r + 1, c], ArrowLeft: [r, c - 1], ArrowRight: [r, c + 1], Home: [r, 0], End: [r, columns.length - 1] };
    if (event.key === 'Enter' || event.key === ' ') this.ask(table, rows[r], columns[c]);
    else if (steps[event.key]) {
      const [row, column] = steps[event.key];
      const next = this.renderRoot.querySelector<HTMLElement>(`td[data-cell="${table.id} ${row} ${column}"]`);
      next?.focus();
    } else return;
    event.preventDefault();
  }
}

customElements.define('hm-ledger', HmLedger);

declare global {
  interface HTMLElementTagNameMap {
    'hm-ledger': HmLedger;
  }
}
