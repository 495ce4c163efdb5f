import { LitElement, html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import type { BarrierValue } from '../../src/contacts/barrier-values.ts';
import { orderedRows, rankingBasis, type MetalOrder, type OrderBy } from '../../src/contacts/metal-order.ts';
import { majorityBarrier, originWords, rankingSentence, regimeOf, valueOf, valueWords } from '../../src/contacts/metal-words.ts';
import type { MetalRow, Ranking } from '../../src/contacts/rank-metals.ts';
import type { Design } from '../../src/design/types.ts';
import { decimalText, figureText } from '../../src/result/figure-text.ts';
import { setContact, type Side } from '../../src/state/commands/index.ts';
import { metalFigures } from '../../src/workings/panel-figures.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import type { JobInput } from '../../src/workers/job-messages.ts';
import { JobController } from '../hm-desk/job-controller.ts';
import { tell } from '../shared/events.ts';
import { figureAt, focusedFigure, how, howLook, settleFigures, walkFigures } from '../shared/how.ts';
import { look } from '../shared/look.ts';
import { panelLook, verdictLook } from '../shared/panel-look.ts';
import { sortedTableLook, tableLook } from '../shared/table-look.ts';
import { isNarrow, metalColumns, orderedCells, type MetalColumn } from './metal-columns.ts';
import { resistivitySpan, spanScale, type SpanScale } from './resistivity-span.ts';
import { WidthController } from '../shared/width-controller.ts';
import { styles } from './hm-metals.styles.ts';

/** What the project remembers of the ranking. */
export interface MetalsView {
  side?: Side;
  order?: MetalOrder;
}

const USUAL: MetalOrder = { by: 'worst', descending: false };

/** Metals ranked on one end; what is shown belongs to `design` and `side`. */
interface Shown {
  rows: MetalRow[];
  majority: Ranking['majority'];
  limit: number | null;
  ranking: Ranking | null;
}

/**
 * Every metal on one end of the stack, by the worst contact resistivity that it would have there. The values of its barrier stand side by side; each can be run
 * with, and the metal be put on the stack with it.
 *
 * @fires hm-edit  the chosen metal on the stack
 * @fires hm-view  { metals: MetalsView }
 * @fires hm-say
 */
export class HmMetals extends LitElement {
  static override styles = [look, panelLook, verdictLook, tableLook, sortedTableLook, howLook, styles];
  static override properties = {
    design: { attribute: false },
    view: { attribute: false },
    run: { attribute: false },
    open: { state: true },
    rivals: { state: true },
  };

  declare design: Design | null;
  declare view: MetalsView;
  declare run: RunJob | null;
  /** metal whose values are shown */ declare private open: string | null;
  /** rows that were run with another value, by metal; of the last ranking */ declare private rivals: ReadonlyMap<string, MetalRow>;

  private readonly job = new JobController<'metals'>(this, 'metals');
  private readonly again = new JobController<'metals'>(this, 'metals');
  private readonly box = new WidthController(this);
  private taken: unknown = null;

  constructor() {
    super();
    this.design = null;
    this.view = {};
    this.run = null;
    this.open = null;
    this.rivals = new Map();
  }

  protected override willUpdate(_: PropertyValues<this>): void {
    const { value } = this.again;
    if (value === null || value === this.taken) return;
    this.taken = value;
    if (value.value.kind !== 'ranked') return;
    const [row] = value.value.rows;
    if (row === undefined) return;
    this.rivals = new Map([...this.rivals, [row.metal, row]]);
    tell(this, 'hm-say', { text: `${row.metal} with ${decimalText(majorityBarrier(row, value.value.majority))} eV: worst ${row.blocks !== null ? 'without a finite resistivity' : row.worst_ohm_cm2 === null ? 'not known' : `${figureText(row.worst_ohm_cm2)} ohm cm²`}.` });
  }

  protected override updated(): void {
    settleFigures(this.renderRoot.querySelector('tbody'));
  }

  private get side(): Side {
    const { top, bottom } = this.design!;
    return this.view.side ?? (top.kind !== 'barrier' && bottom.kind === 'barrier' ? 'bottom' : 'top');
  }

  private get narrow(): boolean {
    return isNarrow(this.box.width);
  }

  private get order(): MetalOrder {
    return this.view.order ?? USUAL;
  }

  private change(view: MetalsView): void {
    this.view = { ...this.view, ...view };
    tell(this, 'hm-view', { change: { metals: this.view } });
  }

  private rank(): void {
    this.again.stop();
    this.rivals = new Map();
    this.open = null;
    void this.job.start(this.run!, { design: this.design!, options: { side: this.side } });
  }

  private rerun({ metal }: MetalRow, { key }: BarrierValue): void {
    const asked = this.job.input!;
    void this.again.start(this.run!, { design: asked.design, options: { side: asked.options.side, rerun: { metal, key } } });
  }

  private choose({ metal, contact }: MetalRow, side: Side): void {
    tell(this, 'hm-edit', { next: setContact(this.design!, side, contact), label: `${metal} as the ${side} contact` });
    tell(this, 'hm-say', { text: `${metal} is the ${side} contact now.` });
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null || this.run === null) return nothing;
    return html`<h3>Metals on this surface</h3>${this.renderAsk()} ${this.renderState()} ${this.renderShown()}`;
  }

  private renderAsk(): TemplateResult {
    const { layers } = this.design!;
    const names = { top: layers[0].name, bottom: layers[layers.length - 1].name };
    return html`<div class="ask" role="group" aria-label="What to rank">
      <label>On the <select @change=${(e: Event) => this.change({ side: (e.target as HTMLSelectElement).value as Side })}>
        ${(['top', 'bottom'] as const).map((side) => html`<option value=${side} .selected=${side === this.side}>${side}: ${names[side]}</option>`)}
      </select></label>
      <button type="button" class="go" ?disabled=${this.job.progress !== null} @click=${() => this.rank()}>Rank the metals</button>
    </div>`;
  }

  private renderState(): TemplateResult | typeof nothing {
    const { progress, status, reason, value } = this.job;
    if (progress !== null) {
      return html`<p class="state"><progress aria-label="Ranking" max=${progress.of} .value=${progress.done}></progress> ${Math.max(0, progress.done - 1)} of ${progress.of - 1} metals. <button type="button" @click=${() => this.job.stop()}>Stop</button></p>`;
    }
    if (status === 'error') return html`<p class="state" role="status">${reason}</p>`;
    if (value?.value.kind === 'complaints') return html`<div role="alert">${value.value.complaints.map(({ path, message }) => html`<p class="wrong">${path === '' ? '' : `${path}: `}${message}.</p>`)}</div>`;
    if (value === null) return html`<p class="state" role="status">Each metal of the presets and of this design, with its measured, pinned or ideal barrier, judged over the temperatures and the tolerances.</p>`;
    return nothing;
  }

  /** What is known: the ranking, or the metals that a running one has come to; a stopped one keeps those. */
  private shown(): Shown | null {
    const { progress, status, value, seen } = this.job;
    const done = value?.value.kind === 'ranked' ? value.value : null;
    if (progress === null && status !== 'error' && done !== null) return { rows: done.rows, majority: done.majority, limit: done.limit_ohm_cm2, ranking: done };
    if (seen.length === 0) return null;
    // Only the end of a ranking says which carrier is the majority: until then the one whose barrier is taken stands in.
    return { rows: seen, majority: seen[0].contact.carrier ?? 'n', limit: null, ranking: null };
  }

  private renderShown(): TemplateResult | typeof nothing {
    const shown = this.shown();
    const asked = this.job.input;
    if (shown === null || asked === null) return nothing;
    const { side } = asked.options;
    const stale = rankingBasis(asked.design, side) !== rankingBasis(this.design!, side);
    const rows = orderedRows(shown.rows.map((row) => this.rivals.get(row.metal) ?? row), this.order, shown.majority);
    const scale = spanScale(rows, shown.limit);
    const columns = metalColumns(this.narrow);
    const headings: Record<MetalColumn, TemplateResult> = {
      metal: this.heading('metal', 'Metal', ''),
      barrier: this.heading('barrier', shown.majority === 'n' ? 'φBn' : 'φBp', 'eV'),
      basis: html`<th scope="col">Barrier</th>`,
      rho: this.heading('rho', 'Contact resistivity', 'Ω cm²'),
      band: html`<th scope="col" class="figure">Least … most<span class="unit">Ω cm²</span></th>`,
      worst: this.heading('worst', 'Worst', 'Ω cm²'),
      drawn: html`<th scope="col"><span class="spoken">Drawn</span></th>`,
      regime: this.heading('regime', 'Transport', ''),
      acts: html`<th scope="col"><span class="spoken">Acts</span></th>`,
    };
    return html`<div class=${stale ? 'stale' : ''}>
      ${stale ? html`<p class="stale-mark">Ranked for the design before the last change: rank again.</p>` : nothing}
      ${shown.ranking === null ? nothing : html`<p role="status">${rankingSentence(shown.ranking)}</p>`}
      ${(shown.ranking?.notes ?? []).map((note) => html`<p class="wrong">${note}.</p>`)}
      ${this.narrow ? html`<p class="doc">Barriers, spans and regimes stand to the right: the table scrolls sideways.</p>` : nothing}
      <div class="scroll" role="region" aria-label="Metals, figures" tabindex="0">
        <table>
          <thead><tr>${columns.map((column) => headings[column])}</tr></thead>
          <tbody @keydown=${walkFigures} @focusin=${focusedFigure}>${rows.map((row) => this.renderRow(row, shown, scale, asked, stale))}</tbody>
        </table>
      </div>
    </div>`;
  }

  private heading(by: OrderBy, words: string, unit: string): TemplateResult {
    const { order } = this;
    const here = order.by === by;
    const figure = by !== 'metal' && by !== 'regime';
    return html`<th scope="col" class=${figure ? 'figure' : ''} aria-sort=${here ? (order.descending ? 'descending' : 'ascending') : 'none'}>
      <button type="button" title="press to sort" @click=${() => this.change({ order: { by, descending: here && !order.descending } })}>${words}<span class="arrow" aria-hidden="true">${here ? (order.descending ? '↓' : '↑') : ''}</span>${unit === '' ? nothing : html`<span class="unit">${unit}</span>`}</button>
    </th>`;
  }

  private renderRow(row: MetalRow, { majority, limit, ranking }: Shown, scale: SpanScale | null, asked: JobInput<'metals'>, stale: boolean): TemplateResult {
    const { side } = asked.options;
    // While the ranking runs its temperature is not told yet.
    const figures = ranking === null ? [] : metalFigures(asked.design, ranking, row);
    const shown = (column: (typeof figures)[number]['asked']['column'], text: string): unknown => {
      const figure = figureAt(figures, column);
      return figure === null ? text : how(figure, { content: text, walked: true });
    };
    const barrier = shown(majority === 'n' ? 'barrierN' : 'barrierP', decimalText(majorityBarrier(row, majority)));
    const contact = this.design![side];
    const present = contact.kind === 'barrier' && contact.metal === row.metal;
    const open = this.open === row.metal;
    const value = valueOf(row);
    const choice = row.reason !== null && row.rho_c_ohm_cm2 === null ? nothing : html`<button type="button" @click=${() => this.choose(row, side)} ?disabled=${stale}>Choose<span class="spoken"> ${row.metal}</span></button>`;
    const name = html`<th scope="row">${row.metal}<span class="note">${row.own ? 'own entry' : row.name === row.metal ? '' : row.name}${present ? html` <b>on the stack${contact.barrier === undefined ? '' : `, barrier given as ${contact.barrier}`}</b>` : nothing}</span>${this.narrow ? choice : nothing}</th>`;
    const values = row.values.length === 0 ? nothing : html`<button type="button" class="plain" aria-expanded=${open} aria-controls=${open ? 'values-open' : nothing} @click=${() => (this.open = open ? null : row.metal)}>${row.values.length} ${row.values.length === 1 ? 'value' : 'values'}<span class="spoken"> of ${row.metal}</span> ${open ? '▾' : '▸'}</button>`;
    const common = { metal: name, barrier: html`<td class="figure">${barrier}</td>`, basis: html`<td>${value === null ? (row.rho_c_ohm_cm2 === null ? nothing : '–') : valueWords(value)} ${values}</td>`, acts: html`<td class="figure">${choice}</td>` };
    const absence = row.rho_c_ohm_cm2 !== null ? null : row.blocks === null ? html`<span class="faint">No figure: ${row.reason}.</span>` : html`<span class="not-met">${row.reason}</span>`;
    const cells = row.rho_c_ohm_cm2 === null ? common : {
      ...common,
      rho: html`<td class="figure">${shown('rho', figureText(row.rho_c_ohm_cm2))}</td>`,
      band: html`<td class="figure">${row.band_ohm_cm2 === null ? '–' : html`${shown('least', figureText(row.band_ohm_cm2[0], 2))} … ${shown('most', figureText(row.band_ohm_cm2[1], 2))}`}</td>`,
      worst: html`<td class="figure"><span class=${row.blocks !== null ? 'not-met' : limit === null || row.worst_ohm_cm2 === null ? '' : row.worst_ohm_cm2 <= limit ? 'met' : 'not-met'}>${shown('worst', row.blocks === null ? figureText(row.worst_ohm_cm2) : 'blocks')}</span><span class="note at">${row.blocks === null ? '' : 'no finite resistivity, '}${row.worst_at ?? row.reason}</span></td>`,
      drawn: html`<td>${scale === null ? nothing : resistivitySpan(row, scale, limit)}</td>`,
      regime: html`<td>${regimeOf(row)}<span class="note">${row.e00_over_kT === null ? nothing : html`E00/kT ${shown('e00OverKt', figureText(row.e00_over_kT, 2))}`}</span>${row.notes.map((note) => html`<span class="note">${note}</span>`)}</td>`,
    };
    const main = html`<tr class=${present ? 'present' : ''}>${orderedCells(metalColumns(this.narrow), cells, absence)}</tr>`;
    return html`${main}${open ? this.renderValues(row, asked, ranking, stale) : nothing}`;
  }

  private renderValues(row: MetalRow, asked: JobInput<'metals'>, ranking: Ranking | null, stale: boolean): TemplateResult {
    const barrier = (value: BarrierValue, column: 'barrierN' | 'barrierP', text: string): unknown => {
      const figure = ranking === null ? null : figureAt(metalFigures(asked.design, ranking, row, value), column);
      return figure === null ? text : how(figure, { content: text, walked: true });
    };
    const running = this.again.progress !== null;
    return html`<tr class="rivals"><td colspan=${metalColumns(this.narrow).length}><ul id="values-open" aria-label="Values of the barrier of ${row.metal}">
      ${row.values.map((value) => {
        const used = value.key === row.value;
        return html`<li>
          <span class="words ${used ? 'in-use' : ''}">φBn ${barrier(value, 'barrierN', decimalText(value.barrier_n_eV))} eV, φBp ${barrier(value, 'barrierP', decimalText(value.barrier_p_eV))} eV: ${valueWords(value)}<span class="note">${originWords(value)}</span></span>
          ${used ? html`<span class="faint">in use</span>` : html`<button type="button" ?disabled=${running || stale || this.job.progress !== null} @click=${() => this.rerun(row, value)}>Run with this<span class="spoken"> value of ${row.metal}, ${decimalText(value.barrier_n_eV)} eV</span></button>`}
        </li>`;
      })}
    </ul></td></tr>`;
  }
}

customElements.define('hm-metals', HmMetals);

declare global {
  interface HTMLElementTagNameMap {
    'hm-metals': HmMetals;
  }
}
