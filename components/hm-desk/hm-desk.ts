import { LitElement, html, noChange, nothing, type PropertyValues, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import type { Variant } from '../../src/drawing/marks/variants.ts';
import type { Result } from '../../src/result/types.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import { NO_VARIANTS, type VariantsShown } from '../hm-variants/variants-shown.ts';
import type { Verdicts } from '../hm-requirements/hm-requirements.ts';
import { tell, type HalfmarkEvents } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import { DESK_PANELS, type DeskContext, type DeskPanel } from './desk-panels.ts';
import { styles } from './hm-desk.styles.ts';

/** What the project remembers of the desk. */
export interface DeskView {
  open?: string;
}

const NOT_JUDGED: Verdicts = { status: 'initial', rows: [], stale: false, progress: null, reason: null };

/**
 * The desk under the plate: panels behind tabs. Each panel is fetched when its tab is first opened and then stays, so that what runs in it goes on.
 *
 * @fires hm-view  { desk: DeskView } when another tab is opened; the panels' own events pass through
 */
export class HmDesk extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    design: { attribute: false },
    complaints: { attribute: false },
    result: { attribute: false },
    stale: { type: Boolean },
    view: { attribute: false },
    chosen: { attribute: false },
    verdicts: { attribute: false },
    variants: { attribute: false },
    against: { attribute: false },
    run: { attribute: false },
    styleName: {},
    panels: { attribute: false },
    states: { state: true },
    sizeFor: { state: true },
  };

  declare design: Design | null;
  declare complaints: readonly Complaint[];
  declare result: Result | null;
  declare stale: boolean;
  /** of the project */ declare view: Readonly<Record<string, unknown>>;
  declare chosen: HalfmarkEvents['hm-choose'];
  declare verdicts: Verdicts;
  declare variants: VariantsShown;
  /** the variant that the ledger compares with, once it is solved */ declare against: Variant | null;
  declare run: RunJob | null;
  declare styleName: 'light' | 'dark';
  declare panels: readonly DeskPanel[];
  /** how far each panel that was opened has been fetched */ declare private states: Readonly<Record<string, 'coming' | 'there' | 'missing'>>;
  declare private sizeFor: DeskContext['sizeFor'];

  /** quantity and place of the requirement that a variable is sized for */ private asked = '';

  constructor() {
    super();
    this.design = null;
    this.complaints = [];
    this.result = null;
    this.stale = false;
    this.view = {};
    this.chosen = null;
    this.verdicts = NOT_JUDGED;
    this.variants = NO_VARIANTS;
    this.against = null;
    this.run = null;
    this.styleName = 'light';
    this.panels = DESK_PANELS;
    this.states = {};
    this.sizeFor = null;
  }

  /** Id of the open tab. What the project remembers may be of another version of the page. */
  private get open(): string {
    const { open } = (this.view.desk ?? {}) as DeskView;
    return this.panels.some(({ id }) => id === open) ? (open as string) : this.panels[0].id;
  }

  protected override willUpdate(changed: PropertyValues<this>): void {
    // The requirement that was asked about has gone, or another one has taken its place in the list.
    const { sizeFor } = this;
    if (changed.has('design') && sizeFor !== null && this.askedFor(sizeFor.requirement) !== this.asked) this.sizeFor = null;
    const { open } = this;
    if (this.states[open] === undefined) void this.fetch(open);
  }

  private async fetch(id: string): Promise<void> {
    this.states = { ...this.states, [id]: 'coming' };
    const state = await this.panels.find((panel) => panel.id === id)!.load().then(() => 'there' as const, () => 'missing' as const);
    this.states = { ...this.states, [id]: state };
  }

  /** Opens a tab, as a press on it does. */
  show(id: string): void {
    this.view = { ...this.view, desk: { open: id } satisfies DeskView };
    tell(this, 'hm-view', { change: { desk: { open: id } } });
  }

  private askedFor(requirement: number): string {
    const row = this.design?.requirements?.[requirement];
    return `${row?.quantity} of ${row?.of}`;
  }

  private async sizeWish({ detail }: CustomEvent<HalfmarkEvents['hm-size']>): Promise<void> {
    this.asked = this.askedFor(detail.requirement);
    this.sizeFor = { requirement: detail.requirement, wish: (this.sizeFor?.wish ?? 0) + 1 };
    this.show('sizing');
    // The button that was pressed is hidden now: the focus goes where the work goes on.
    await this.updateComplete;
    this.tab('sizing')?.focus();
  }

  private tab(id: string): HTMLElement | null {
    return this.renderRoot.querySelector<HTMLElement>(`#tab-${id}`);
  }

  private async key(event: KeyboardEvent, at: number): Promise<void> {
    const count = this.panels.length;
    const to = { ArrowRight: (at + 1) % count, ArrowLeft: (at + count - 1) % count, Home: 0, End: count - 1 }[event.key];
    if (to === undefined) return;
    event.preventDefault();
    const { id } = this.panels[to];
    this.show(id);
    await this.updateComplete;
    this.tab(id)?.focus();
  }

  override render(): TemplateResult | typeof nothing {
    const { design, run } = this;
    if (design === null || run === null) return nothing;
    const { complaints, result, stale, view, chosen, verdicts, variants, against, styleName, sizeFor, open } = this;
    const context: DeskContext = { design, complaints, result, stale, view, chosen, verdicts, variants, against, run, styleName, sizeFor };
    return html`<div role="tablist" aria-label="Under the plate">${this.panels.map((panel, i) => this.renderTab(panel, i, context))}</div>
      ${this.panels.map(
        (panel) => html`<div role="tabpanel" id="panel-${panel.id}" aria-labelledby="tab-${panel.id}" ?hidden=${panel.id !== open} @hm-size=${this.sizeWish}>${this.renderPanel(panel, context)}</div>`,
      )}`;
  }

  private renderTab(panel: DeskPanel, i: number, context: DeskContext): TemplateResult {
    const selected = panel.id === this.open;
    const remark = panel.remark?.(context) ?? null;
    return html`<button
      type="button"
      role="tab"
      id="tab-${panel.id}"
      aria-selected=${selected}
      aria-controls="panel-${panel.id}"
      tabindex=${selected ? 0 : -1}
      @click=${() => this.show(panel.id)}
      @keydown=${(event: KeyboardEvent) => void this.key(event, i)}
    >${panel.title}${remark === null ? nothing : html` <span class="remark ${remark.trouble ? 'trouble' : ''}">${remark.text}</span>`}</button>`;
  }

  private renderPanel(panel: DeskPanel, context: DeskContext): TemplateResult | typeof nothing | typeof noChange {
    // What nobody sees is not drawn anew at every move of a drag.
    if (panel.id !== this.open) return noChange;
    const state = this.states[panel.id];
    if (state === 'there') return panel.draw(context);
    if (state === 'missing') return html`<p role="alert">This part of the page could not be fetched. <button type="button" @click=${() => void this.fetch(panel.id)}>Try again</button></p>`;
    return state === 'coming' ? html`<p role="status">Coming</p>` : nothing;
  }
}

customElements.define('hm-desk', HmDesk);

declare global {
  interface HTMLElementTagNameMap {
    'hm-desk': HmDesk;
  }
}
