import { LitElement, css, html, nothing, type TemplateResult } from 'lit';
import { KINDS } from '../../src/quantity/kinds.ts';
import type { KindName } from '../../src/quantity/kinds.ts';
import type { HmField } from '../hm-field/hm-field.ts';
import '../hm-field/hm-field.ts';
import { formLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';

const FORMULA_HINTS: Partial<Record<KindName, string>> = { energy: '1.52 eV - 5.4e-4 eV/K * T^2/(T + 204 K)', number: '12.4 * (1 + 1.2e-4/K * T)' };

/**
 * One value of an entry and where it stands, before they go into the design.
 *
 * @fires value-ready  detail: { text, source } both said, the value one that the reader of designs takes
 * @fires value-drop   nothing is changed
 */
export class HmValueForm extends LitElement {
  static override styles = [
    look,
    formLook,
    css`
      p {
        margin: 0.25rem 0;
        max-width: 60rem;
        overflow-wrap: anywhere;
      }
      .quiet {
        color: var(--faint);
      }
      .formula {
        --field-width: min(28rem, calc(100vw - 3rem));
      }
    `,
  ];
  static override properties = { words: {}, kind: {}, value: {}, judge: { attribute: false }, preview: { attribute: false }, over: { attribute: false }, trouble: { state: true } };

  declare words: string;
  declare kind: KindName;
  declare value: string;
  /** a sentence about what is wrong with a text, or null */ declare judge: (text: string) => string | null;
  /** what a formula comes to at a few places, in words; null for a value that is none */ declare preview: ((text: string) => string | null) | null;
  /** names that a formula may use */ declare over: readonly string[] | null;
  declare private trouble: { value: string | null; source: string | null };

  private source = '';
  private typed: string | null = null;

  constructor() {
    super();
    this.words = '';
    this.kind = 'number';
    this.value = '';
    this.judge = () => null;
    this.preview = null;
    this.over = null;
    this.trouble = { value: null, source: null };
  }

  async edit(): Promise<void> {
    await this.updateComplete;
    await this.renderRoot.querySelector<HmField>('#value')!.edit();
  }

  private async ready(): Promise<void> {
    const text = (this.typed ?? this.value).trim();
    const source = this.source.trim();
    this.trouble = { value: this.judge(text), source: source === '' ? 'is empty; say where the value stands: author, year, table, or the measurement' : null };
    if (this.trouble.value === null && this.trouble.source === null) return void this.dispatchEvent(new CustomEvent('value-ready', { detail: { text, source } }));
    await this.updateComplete;
    this.renderRoot.querySelector<HTMLElement>(this.trouble.value === null ? '#source' : '#value')!.focus();
  }

  private left(event: CustomEvent<string>): void {
    if (event.detail === 'Escape') {
      event.stopPropagation();
      this.drop();
    } else void this.ready();
  }

  private drop(): void {
    this.dispatchEvent(new CustomEvent('value-drop'));
  }

  private accept(text: string): void {
    this.typed = text;
    if (this.preview !== null) this.requestUpdate();
    if (this.trouble.value !== null) this.trouble = { ...this.trouble, value: this.judge(text) };
  }

  private acceptSource(text: string): void {
    this.source = text;
    if (text !== '') this.trouble = { ...this.trouble, source: null };
  }

  override render(): TemplateResult {
    const { units, example } = KINDS[this.kind];
    const formula = this.preview !== null;
    const text = this.typed ?? this.value;
    const comesTo = this.preview?.(text) ?? null;
    return html`${formula ? html`<p class="quiet">A formula over ${(this.over ?? []).map((name) => (name === 'T' ? 'T, the temperature with its unit (T / (300 K))' : 'x, the composition, a pure number')).join(' and ')}; + - * / ^, sqrt, exp, log, log10, min, max, abs, units and the design's variables.</p>` : nothing}
      <div class="row" @field-leave=${this.left}>
      <hm-field id="value" class=${formula ? 'formula' : ''} label="New ${this.words}" .unit=${formula ? '' : (units[0] ?? '')} hint=${formula ? FORMULA_HINTS[this.kind] ?? example : example} .value=${text} .complaint=${this.trouble.value} @field-accept=${(e: CustomEvent<string>) => this.accept(e.detail)}></hm-field>
      <hm-field id="source" class="wide" label="Where it stands" hint="author, year, table" .value=${this.source} .complaint=${this.trouble.source} @field-accept=${(e: CustomEvent<string>) => this.acceptSource(e.detail)}></hm-field>
      <button type="button" class="press" @click=${this.ready}>Use this value</button>
      <button type="button" class="press" @click=${this.drop}>Leave it</button>
    </div>
    ${formula ? html`<p class="quiet" role="status">${comesTo === null ? '' : `It comes to: ${comesTo}.`}</p>` : nothing}`;
  }
}

customElements.define('hm-value-form', HmValueForm);

declare global {
  interface HTMLElementTagNameMap {
    'hm-value-form': HmValueForm;
  }
}
