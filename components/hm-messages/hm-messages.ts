import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Findings } from '../../src/state/session.ts';
import type { SavingState } from '../../src/storage/autosave.ts';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import { placeWords, targetOf } from './place-words.ts';
import { styles } from './hm-messages.styles.ts';

/** Complaints shown before "and more". */
const SHOWN = 5;
/** A solve longer than this is worth a word and a way to stop it, ms. */
const LONG_MS = 800;

/**
 * What the page has to say: why the design has no result, with the place and the mend; that the picture is of an earlier design; what the solver warns
 * of; that another tab saved the same project. Short remarks are spoken through a status region, in a line
 * that is always there: what comes and goes does not push the plate about.
 *
 * @fires hm-choose  to go to the layer or contact that a complaint is about
 * @fires hm-act     cancel, again, keep-mine, take-other
 */
export class HmMessages extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    findings: { attribute: false },
    saving: { attribute: false },
    remark: { attribute: false },
    layers: { attribute: false },
    long: { state: true },
  };

  declare findings: Findings;
  declare saving: SavingState;
  /** the last short remark */ declare remark: { text: string; urgent?: boolean } | null;
  /** names of the layers, from the surface down */ declare layers: readonly string[];
  /** the running solve takes its time */ declare private long: boolean;

  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor() {
    super();
    this.findings = { status: 'initial', result: null, stale: false, complaints: [], refusal: null };
    this.saving = { kind: 'saved' };
    this.remark = null;
    this.layers = [];
    this.long = false;
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    clearTimeout(this.timer);
  }

  protected override willUpdate(): void {
    if (this.findings.status !== 'pending') {
      clearTimeout(this.timer);
      this.timer = undefined;
      this.long = false;
    } else this.timer ??= setTimeout(() => (this.long = true), LONG_MS);
  }

  private act(act: 'cancel' | 'again' | 'keep-mine' | 'take-other'): void {
    tell(this, 'hm-act', { act });
  }

  override render(): TemplateResult {
    const { remark } = this;
    return html`
      ${this.renderConflict()}
      <div role="status">${this.renderTrouble()}</div>
      ${this.renderLong()}
      <div class="line">
        ${this.renderWarnings()}
        <p class="remark polite" role="status">${remark !== null && !remark.urgent ? remark.text : ''}</p>
        <p class="remark urgent" role="alert">${remark?.urgent ? remark.text : ''}</p>
      </div>
    `;
  }

  private renderConflict(): TemplateResult | typeof nothing {
    const { saving } = this;
    if (saving.kind === 'failed') return html`<section class="trouble" aria-label="Saving"><h2>Not saved</h2><p>${saving.failure.sentence}</p></section>`;
    if (saving.kind !== 'conflict') return nothing;
    const gone = saving.other === null;
    return html`<section class="trouble" aria-label="Saving">
      <h2>${gone ? 'This project was deleted in another tab' : 'This project was changed in another tab'}</h2>
      <p>${gone ? 'What is on this page is still here, and is not saved.' : 'Nothing has been overwritten. What is on this page is not saved until you choose.'}</p>
      <p>
        <button type="button" @click=${() => this.act('keep-mine')}>Keep mine as a copy</button>
        ${gone ? nothing : html`<button type="button" @click=${() => this.act('take-other')}>Take the other</button>`}
      </p>
    </section>`;
  }

  private renderTrouble(): TemplateResult | typeof nothing {
    const { complaints, refusal, result } = this.findings;
    if (complaints.length === 0 && refusal === null) return nothing;
    const kept = result === null ? '' : ' The picture shows the last design that was solved.';
    if (complaints.length === 0) {
      return html`<section class="trouble" aria-label="No result">
        <h2>No accepted answer</h2>
        <p>${refusal}${kept}</p>
        <p><button type="button" @click=${() => this.act('again')}>Try again</button></p>
      </section>`;
    }
    return html`<section class="trouble" aria-label="To mend">
      <h2>${complaints.length === 1 ? 'One thing to mend' : `${complaints.length} things to mend`}</h2>
      <ul>
        ${complaints.slice(0, SHOWN).map((complaint) => this.renderComplaint(complaint))}
      </ul>
      ${complaints.length > SHOWN ? html`<p>And ${complaints.length - SHOWN} more.</p>` : nothing}
      ${kept === '' ? nothing : html`<p>${kept}</p>`}
    </section>`;
  }

  private renderComplaint({ path, message }: Complaint): TemplateResult {
    const target = targetOf(path, this.layers);
    return html`<li>
      <span class="place">${placeWords(path, this.layers)}</span> ${message}
      ${target === null ? nothing : html`<button type="button" @click=${() => tell(this, 'hm-choose', target)}>Go there</button>`}
    </li>`;
  }

  private renderLong(): TemplateResult | typeof nothing {
    if (!this.long) return nothing;
    return html`<p class="long" role="status">Solving. <progress aria-label="Solving"></progress> <button type="button" @click=${() => this.act('cancel')}>Stop</button></p>`;
  }

  private renderWarnings(): TemplateResult | typeof nothing {
    const warnings = this.findings.result?.warnings ?? [];
    if (warnings.length === 0) return nothing;
    return html`<details>
      <summary>${warnings.length === 1 ? 'One caution with this result' : `${warnings.length} cautions with this result`}</summary>
      <ul>
        ${warnings.map((warning) => html`<li>${warning}</li>`)}
      </ul>
    </details>`;
  }
}

customElements.define('hm-messages', HmMessages);

declare global {
  interface HTMLElementTagNameMap {
    'hm-messages': HmMessages;
  }
}
