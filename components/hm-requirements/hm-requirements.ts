import { LitElement, html, nothing, svg, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import { REQUIREMENT_QUANTITIES, requirementQuantity, type RequirementQuantityName } from '../../src/design/requirement-quantities.ts';
import type { Design, Requirement } from '../../src/design/types.ts';
import { marginWords, verdictWords } from '../../src/requirements/verdict.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';
import { addRequirement, removeRequirement, setRequirement } from '../../src/state/commands/index.ts';
import { complaintsWithin } from '../shared/complaint-at.ts';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import '../hm-field/hm-field.ts';
import { marginShare, targetsOf } from './requirement-parts.ts';
import { styles } from './hm-requirements.styles.ts';

/** How it stands with judging. */
export interface Verdicts {
  status: 'initial' | 'pending' | 'complete' | 'error';
  /** of the last run, a row a limit */ rows: readonly RequirementResult[];
  /** the rows belong to an earlier design */ stale: boolean;
  progress: { done: number; of: number } | null;
  /** why there are no newer ones, in words */ reason: string | null;
}

const BOUNDS = ['max', 'min'] as const;

/**
 * The requirements: a row each with its limit, the worst case over temperatures and tolerances, its margin as a bar and in words, met or not.
 *
 * @fires hm-edit
 * @fires requirements-stop  the person does not want to wait for the verdicts
 */
export class HmRequirements extends LitElement {
  static override styles = [look, styles];
  static override properties = { design: { attribute: false }, complaints: { attribute: false }, verdicts: { attribute: false }, quantity: { state: true }, of: { state: true } };

  declare design: Design | null;
  declare complaints: readonly Complaint[];
  declare verdicts: Verdicts;
  /** of the one to be added */ declare private quantity: RequirementQuantityName;
  declare private of: string;

  constructor() {
    super();
    this.design = null;
    this.complaints = [];
    this.verdicts = { status: 'initial', rows: [], stale: false, progress: null, reason: null };
    this.quantity = 'contactResistivity';
    this.of = '';
  }

  private edit(i: number, change: Partial<Requirement>, label: string): void {
    tell(this, 'hm-edit', { next: setRequirement(this.design!, i, change), label });
  }

  private add(): void {
    const { kind, unit, usual } = requirementQuantity(this.quantity);
    const targets = targetsOf(this.design!, this.quantity);
    const of = targets.some(({ value }) => value === this.of) ? this.of : targets[0]?.value;
    if (of === undefined) return;
    const bound = usual === 'max' ? 'max' : 'min';
    const over = this.design!.conditions.temperatureRange === undefined ? {} : ({ over: 'temperatureRange' } as const);
    tell(this, 'hm-edit', { next: addRequirement(this.design!, { quantity: this.quantity, of, [bound]: kind === 'flag' ? true : `1 ${unit}`.trim(), ...over }), label: 'new requirement' });
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    const { requirements = [] } = this.design;
    let at = 0;
    return html`<h2>Requirements</h2>
      ${requirements.length === 0 ? html`<p>None yet. Each is held over the temperature range and all tolerances.</p>` : nothing}
      ${this.renderState(requirements.length)}
      <ul class=${this.verdicts.stale ? 'stale' : ''}>
        ${requirements.map((requirement, i) => {
          const bounds = BOUNDS.filter((bound) => requirement[bound] !== undefined);
          const rows = this.verdicts.rows.slice(at, (at += bounds.length));
          return this.renderRequirement(requirement, i, bounds, rows.every((row) => row.quantity === requirement.quantity && row.of === requirement.of) ? rows : []);
        })}
      </ul>
      ${this.renderAdd()}`;
  }

  private renderState(count: number): TemplateResult | typeof nothing {
    const { status, progress, stale, reason } = this.verdicts;
    if (count === 0) return nothing;
    if (progress !== null) {
      return html`<p class="state"><progress aria-label="Judging" max=${progress.of} .value=${progress.done}></progress> <button type="button" @click=${() => this.dispatchEvent(new CustomEvent('requirements-stop'))}>Stop</button></p>`;
    }
    if (status === 'error') return html`<p class="state" role="status">${reason}${stale ? ' Verdicts are of the stack before the last change.' : ''}</p>`;
    if (status !== 'complete') return html`<p class="state">Not judged yet.</p>`;
    const met = this.verdicts.rows.filter((row) => row.met).length;
    return html`<p class="state" role="status">${met} of ${this.verdicts.rows.length} met.</p>`;
  }

  private renderRequirement(requirement: Requirement, i: number, bounds: ('max' | 'min')[], rows: readonly RequirementResult[]): TemplateResult {
    const known = requirement.quantity in REQUIREMENT_QUANTITIES ? requirementQuantity(requirement.quantity as RequirementQuantityName) : null;
    const name = `${known?.words ?? requirement.quantity} of ${requirement.of}`;
    const wrong = complaintsWithin(this.complaints, `requirements[${i}]`);
    return html`<li>
      <div>
        <h3>${name}</h3>
        <div class="row">
          ${bounds.map((bound) => this.renderLimit(requirement, i, bound, name, known?.unit ?? ''))}
          <label class="check"><input type="checkbox" .checked=${requirement.over === 'temperatureRange'} @change=${(e: Event) => this.edit(i, { over: (e.target as HTMLInputElement).checked ? 'temperatureRange' : undefined }, `temperatures of a requirement`)} />over the temperature range</label>
          <button type="button" @click=${() => tell(this, 'hm-edit', { next: removeRequirement(this.design!, i), label: `requirement ${name} taken out` })}>Take out<span class="spoken">: ${name}</span></button>
        </div>
      </div>
      <div>${wrong.map((message) => html`<p class="wrong">${message}</p>`)} ${rows.map((row) => this.renderVerdict(row))}</div>
    </li>`;
  }

  private renderLimit(requirement: Requirement, i: number, bound: 'max' | 'min', name: string, unit: string): TemplateResult {
    const limit = requirement[bound]!;
    const words = bound === 'max' ? 'At most' : 'At least';
    if (typeof limit === 'boolean') {
      return html`<label>Is to be
        <select @change=${(e: Event) => this.edit(i, { [bound]: (e.target as HTMLSelectElement).value === 'yes' }, `limit of ${name}`)}>
          <option value="yes" .selected=${limit}>so</option><option value="no" .selected=${!limit}>not so</option>
        </select>
      </label>`;
    }
    return html`<hm-field .label=${words} .unit=${unit} .value=${limit} @field-accept=${(e: CustomEvent<string>) => this.edit(i, { [bound]: e.detail }, `limit of ${name}`)}></hm-field>
      <button type="button" title="turn the limit about" @click=${() => this.edit(i, bound === 'max' ? { max: undefined, min: limit } : { min: undefined, max: limit }, `limit of ${name}`)}>${bound === 'max' ? 'make it the least' : 'make it the most'}</button>`;
  }

  private renderVerdict(row: RequirementResult): TemplateResult {
    const verdict = verdictWords(row);
    const share = marginShare(row);
    const worst = row.worst === null || row.at === null ? '' : `worst ${typeof row.worst === 'boolean' ? (row.worst ? 'yes' : 'no') : `${writeNumber(row.worst, 3)} ${row.unit}`} at ${row.at.words}`;
    return html`<p class="verdict ${verdict.replace(' ', '-')}">
      <span><strong>${verdict}</strong>, margin ${marginWords(row)}</span>
      ${share === null ? nothing : html`<svg class="bar" viewBox="-50 0 100 8" width="100" height="8" aria-hidden="true">${svg`<rect x=${Math.min(0, 50 * share)} y="1" width=${Math.max(1, Math.abs(50 * share))} height="6" fill="currentColor"></rect><path d="M-50 4H50M0 0V8" stroke="currentColor" fill="none"></path>`}</svg>`}
      <span class="worst">${worst}${row.unanswered === null ? '' : `; no answer at ${row.unanswered.words}: ${row.unanswered.reason}`}</span>
    </p>`;
  }

  private renderAdd(): TemplateResult {
    const targets = targetsOf(this.design!, this.quantity);
    return html`<details>
      <summary>Add a requirement</summary>
      <div class="row">
        <label>Quantity
          <select @change=${(e: Event) => (this.quantity = (e.target as HTMLSelectElement).value as RequirementQuantityName)}>
            ${Object.entries(REQUIREMENT_QUANTITIES).map(([name, { words }]) => html`<option value=${name} .selected=${name === this.quantity}>${words}</option>`)}
          </select>
        </label>
        <label>of
          <select @change=${(e: Event) => (this.of = (e.target as HTMLSelectElement).value)}>
            ${targets.map(({ value, text }) => html`<option value=${value} .selected=${value === this.of}>${text}</option>`)}
          </select>
        </label>
        <button type="button" ?disabled=${targets.length === 0} @click=${this.add}>Add</button>
      </div>
      <p class="doc">${requirementQuantity(this.quantity).doc}</p>
    </details>`;
  }
}

customElements.define('hm-requirements', HmRequirements);

declare global {
  interface HTMLElementTagNameMap {
    'hm-requirements': HmRequirements;
  }
}
