import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { CloseUp, CloseUpAnswer } from '../../src/contacts/close-up.ts';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import { carrierShown, closeUpTable, closeUpTitle, errorText, transmissionWords } from '../../src/drawing/contact-closeup-words.ts';
import { drawCloseUp } from '../../src/drawing/contact-closeup.ts';
import { decimalText, figureText } from '../../src/result/figure-text.ts';
import type { Result } from '../../src/result/types.ts';
import { comparedFigures, nearContactFigures } from '../../src/workings/panel-figures.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import { JobController } from '../hm-desk/job-controller.ts';
import '../hm-metals/hm-metals.ts';
import type { MetalsView } from '../hm-metals/hm-metals.ts';
import { drawn } from '../shared/drawn.ts';
import { focusedFigure, how, howLook, settleFigures, walkFigures } from '../shared/how.ts';
import { look } from '../shared/look.ts';
import { panelLook } from '../shared/panel-look.ts';
import { tableLook } from '../shared/table-look.ts';
import { WidthController } from '../shared/width-controller.ts';
import { styles } from './hm-contacts.styles.ts';

/** Narrowest and widest picture, px; two stand side by side where there is room. */
const WIDTH = { least: 300, most: 860, half: 560 };
const GAP = 32;
/** A design has stood still for this long before its contacts are looked at, ms: a drag is not followed, the plate does that. */
const QUIET = 200;

/**
 * The metal contacts from near, with their figures in words, and the metals that could be there.
 *
 * @fires hm-edit  a metal chosen from the ranking
 * @fires hm-view  { metals: MetalsView }
 * @fires hm-say
 */
export class HmContacts extends LitElement {
  static override styles = [look, panelLook, tableLook, howLook, styles];
  static override properties = {
    design: { attribute: false },
    complaints: { attribute: false },
    result: { attribute: false },
    stale: { type: Boolean },
    view: { attribute: false },
    run: { attribute: false },
    styleName: {},
  };

  declare design: Design | null;
  declare complaints: readonly Complaint[];
  declare result: Result | null;
  /** the result belongs to an earlier design */ declare stale: boolean;
  declare view: MetalsView;
  declare run: RunJob | null;
  declare styleName: 'light' | 'dark';

  private readonly near = new JobController<'closeUp'>(this, 'closeUp');
  private readonly compare = new JobController<'closeUp'>(this, 'closeUp');
  private readonly size = new WidthController(this, '.measure');
  private timer: ReturnType<typeof setTimeout> | undefined;
  private waitsFor: Design | null = null;

  constructor() {
    super();
    this.design = null;
    this.complaints = [];
    this.result = null;
    this.stale = false;
    this.view = {};
    this.run = null;
    this.styleName = 'light';
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    clearTimeout(this.timer);
    this.waitsFor = null;
  }

  protected override updated(): void {
    for (const list of this.renderRoot.querySelectorAll('dl')) settleFigures(list);
    const { design, result, stale, near } = this;
    if (design === null || result === null || stale || this.run === null || this.waitsFor === design) return;
    // A job that is on its way is let finish: ending its worker would cost more than what is left of it.
    if (near.progress !== null || near.input?.design === design) return;
    this.waitsFor = design;
    clearTimeout(this.timer);
    this.timer = setTimeout(() => {
      this.waitsFor = null;
      if (this.design === design && this.run !== null) void near.start(this.run, { design });
      else this.requestUpdate();
    }, near.value === null ? 0 : QUIET);
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    return html`<div class="measure">${this.renderNear()}</div>
      <hm-metals .design=${this.design} .view=${this.view} .run=${this.run}></hm-metals>`;
  }

  private renderNear(): TemplateResult {
    const { value, status, reason } = this.near;
    if (status === 'error') return html`<p class="state" role="status">${reason}</p>`;
    if (value === null) return html`<p class="state" role="status">${this.complaints.length > 0 ? 'No contact to look at until the design is mended.' : 'Looking at the contacts.'}</p>`;
    const answer = value.value;
    if (answer.kind === 'refused') return html`<p class="wrong" role="status">No contact to look at: ${answer.reason}.</p>`;
    if (answer.kind === 'complaints') return html`<p class="state" role="status">No contact to look at until the design is mended.</p>`;
    if (answer.contacts.length === 0) return html`<p class="state" role="status">Neither end has a metal: rank the metals below, or give an end one in the strip.</p>`;
    const stale = value.input.design !== this.design || this.stale;
    const { contacts } = answer;
    const total = this.size.width || WIDTH.half;
    const beside = contacts.length > 1 && total >= 2 * WIDTH.half + GAP;
    const width = Math.round(Math.min(WIDTH.most, Math.max(WIDTH.least, beside ? (total - GAP) / 2 : total)));
    return html`<div class="contacts">${contacts.map((contact) => this.renderContact(contact, value.input.design, width, stale))}</div>
      ${this.renderCompare(answer, stale)}`;
  }

  private renderContact(contact: CloseUp, design: Design, width: number, stale: boolean): TemplateResult {
    const height = Math.round(Math.min(420, Math.max(280, 0.5 * width)));
    const d = drawCloseUp(contact, { width, height, style: this.styleName });
    return html`<section class="contact ${stale ? 'stale' : ''}" aria-label=${closeUpTitle(contact)}>
      ${stale ? html`<p class="stale-mark">Of the design before the last change.</p>` : nothing}
      <div class="sides"><svg class="picture" width=${width} height=${height} viewBox="0 0 ${width} ${height}" role="img" aria-label=${d.description}>${drawn(d)}</svg>
      <div class="words"><dl @keydown=${walkFigures} @focusin=${focusedFigure}>${nearContactFigures(design, contact).map((figure) => html`<dt>${figure.name}</dt><dd>${how(figure, { walked: true })}${figure.note === undefined ? nothing : html` <span class="note">${figure.note}</span>`}</dd>`)}</dl>
      ${contact.notes.map((note) => html`<p class="wrong">${note}.</p>`)}
      ${this.renderTable(contact)}</div></div>
    </section>`;
  }

  private renderTable(contact: CloseUp): TemplateResult | typeof nothing {
    const rows = closeUpTable(contact);
    if (rows.length === 0) return nothing;
    return html`<details>
      <summary>T(E), f and T f of ${carrierShown(contact).words} as a table</summary>
      <div class="scroll" role="region" aria-label="Passage of ${closeUpTitle(contact)}" tabindex="0"><table>
        <thead><tr><th scope="col">E − EF (eV)</th><th scope="col">T</th><th scope="col">f</th><th scope="col">T f</th></tr></thead>
        <tbody>${rows.map(({ energy_eV, transmission, occupancy, product, peak }) => html`<tr class=${peak ? 'peak' : ''}><th scope="row">${decimalText(energy_eV, 4)}${peak ? ' (most passes)' : ''}</th><td>${figureText(transmission)}</td><td>${figureText(occupancy)}</td><td>${figureText(product)}</td></tr>`)}</tbody>
      </table></div>
    </details>`;
  }

  /** WKB, Kemble and the wave equation side by side, worked out when asked for. */
  private renderCompare(answer: Extract<CloseUpAnswer, { kind: 'seen' }>, stale: boolean): TemplateResult {
    const { value, progress, status, reason } = this.compare;
    const compared = value?.value.kind === 'seen' && value.input.design === this.design ? value.value.contacts : null;
    if (progress !== null) return html`<p class="state" role="status">Working out the transmissions. <button type="button" @click=${() => this.compare.stop()}>Stop</button></p>`;
    if (compared === null || stale) {
      return html`<p><button type="button" ?disabled=${stale} @click=${() => void this.compare.start(this.run!, { design: this.design!, options: { compare: true } })}>Compare WKB, Kemble and exact transmission</button> ${status === 'error' ? html`<span role="status">${reason}</span>` : nothing}</p>`;
    }
    const kinds = compared[0].compared ?? [];
    return html`<p class="state">Contact resistivity by kind of transmission, Ω cm², and how far the quadrature may be off. The design uses ${transmissionWords(answer.contacts[0].transmission)}.</p>
      <div class="compare" role="region" aria-label="Comparison" tabindex="0"><table aria-label="Transmissions compared">
      <thead><tr><th scope="col">Contact</th>${kinds.map(({ transmission }) => html`<th scope="col">${transmissionWords(transmission)}</th>`)}</tr></thead>
      <tbody>${compared.map((contact) => html`<tr><th scope="row">${closeUpTitle(contact)}</th>${(contact.compared ?? []).map(({ rho_c_ohm_cm2, error }, i) => html`<td>${how(comparedFigures(value!.input.design, contact)[i], { content: figureText(rho_c_ohm_cm2) })}${error === null ? nothing : html`<span class="off">${errorText(error)}</span>`}</td>`)}</tr>`)}</tbody>
    </table></div>`;
  }
}

customElements.define('hm-contacts', HmContacts);

declare global {
  interface HTMLElementTagNameMap {
    'hm-contacts': HmContacts;
  }
}
