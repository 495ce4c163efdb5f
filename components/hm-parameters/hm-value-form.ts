import { LitElement, html, type TemplateResult } from 'lit';
import { KINDS } from '../../src/quantity/kinds.ts';
import type { KindName } from '../../src/quantity/kinds.ts';
import type { HmField } from '../hm-field/hm-field.ts';
import '../hm-field/hm-field.ts';
import { formLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';

/**
 * One value of an entry and where it stands, before they go into the design.
 *
 * @fires value-ready  detail: { text, source } both said, the value one that the reader of designs takes
 * @fires value-drop   nothing is changed
 */
export class HmValueForm extends LitElement {
  static override styles = [look, formLook];
  static override properties = { words: {}, kind: {}, value: {}, judge: { attribute: false }, trouble: { state: true } };

  declare words: string;
  declare kind: KindName;
  declare value: string;
  /** a sentence about what is wrong with a text, or null */ declare judge: (text: string) => string | null;
  declare private trouble: { value: string | null; source: string | null };

  private source = '';
  private typed: string | null = null;

  constructor() {
    super();
    this.words = '';
    this.kind = 'number';
    this.value = '';
    this.judge = () => null;
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
    if (this.trouble.value !== null) this.trouble = { ...this.trouble, value: this.judge(text) };
  }

  private acceptSource(text: string): void {
    this.source = text;
    if (text !== '') this.trouble = { ...this.trouble, source: null };
  }

  override render(): TemplateResult {
    const { units, example } = KINDS[this.kind];
    return html`<div class="row" @field-leave=${this.left}>
      <hm-field id="value" label="New ${this.words}" .unit=${units[0] ?? ''} hint=${example} .value=${this.typed ?? this.value} .complaint=${this.trouble.value} @field-accept=${(e: CustomEvent<string>) => this.accept(e.detail)}></hm-field>
      <hm-field id="source" class="wide" label="Where it stands" hint="author, year, table" .value=${this.source} .complaint=${this.trouble.source} @field-accept=${(e: CustomEvent<string>) => this.acceptSource(e.detail)}></hm-field>
      <button type="button" class="press" @click=${this.ready}>Use this value</button>
      <button type="button" class="press" @click=${this.drop}>Leave it</button>
    </div>`;
  }
}

customElements.define('hm-value-form', HmValueForm);

declare global {
  interface HTMLElementTagNameMap {
    'hm-value-form': HmValueForm;
  }
}
