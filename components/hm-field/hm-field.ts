import { LitElement, html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import { look } from '../shared/look.ts';
import { completed } from '../shared/typed-text.ts';
import { styles } from './hm-field.styles.ts';

/**
 * A value as text. Enter or leaving the field accepts it, Escape puts the former text back. A bare number gets its unit. A bad value keeps its text,
 * with the complaint under it.
 *
 * @fires field-accept  detail: the text, only if it is another one; does not leave the form that holds the field
 * @fires field-leave   detail: 'Enter' (without a change) or 'Escape'; crosses the forms' shadow roots, so that what opened them can take the focus back
 * @cssproperty --field-width
 */
export class HmField extends LitElement {
  static override styles = [look, styles];
  static override shadowRootOptions: ShadowRootInit = { ...LitElement.shadowRootOptions, delegatesFocus: true };
  static override properties = {
    label: {},
    labelHidden: { type: Boolean, attribute: 'label-hidden', reflect: true },
    value: {},
    unit: {},
    hint: {},
    complaint: {},
    lines: { type: Boolean },
  };

  declare label: string;
  /** the label is for readers only: what stands around the field says it already */ declare labelHidden: boolean;
  declare value: string;
  /** what a bare number means; empty: bare numbers stay bare */ declare unit: string;
  /** shown while the field is empty */ declare hint: string;
  declare complaint: string | null;
  /** several lines; Enter starts a new one, leaving the field accepts */ declare lines: boolean;

  constructor() {
    super();
    this.label = '';
    this.labelHidden = false;
    this.value = '';
    this.unit = '';
    this.hint = '';
    this.complaint = null;
    this.lines = false;
  }

  private get box(): HTMLInputElement | HTMLTextAreaElement {
    return this.renderRoot.querySelector<HTMLInputElement | HTMLTextAreaElement>('#box')!;
  }

  protected override updated(changed: PropertyValues): void {
    // Text being typed is not overwritten by an answer that comes in meanwhile.
    if (changed.has('value') && !(this.matches(':focus-within') && this.box.value !== changed.get('value'))) this.box.value = this.value;
  }

  /** Puts the cursor in with all text selected: what is typed next replaces it. */
  async edit(): Promise<void> {
    await this.updateComplete;
    this.box.focus();
    this.box.select();
  }

  private accept(): boolean {
    const text = this.lines ? this.box.value.trim() : completed(this.box.value, this.unit, this.value);
    this.box.value = text;
    if (text === this.value) return false;
    this.value = text;
    this.dispatchEvent(new CustomEvent('field-accept', { detail: text }));
    return true;
  }

  private leave(key: 'Enter' | 'Escape'): void {
    this.dispatchEvent(new CustomEvent('field-leave', { detail: key, bubbles: true, composed: true }));
  }

  private key(event: KeyboardEvent): void {
    // Keys of the strip (arrows, Delete, brackets) are text here.
    event.stopPropagation();
    if (event.key === 'Enter' && !this.lines && !event.isComposing) {
      event.preventDefault();
      if (this.accept()) this.box.select();
      else this.leave('Enter');
    } else if (event.key === 'Escape') {
      event.preventDefault();
      this.box.value = this.value;
      this.leave('Escape');
    }
  }

  override render(): TemplateResult {
    const invalid = this.complaint ? 'true' : nothing;
    const about = this.complaint ? 'complaint' : nothing;
    return html`<label for="box">${this.label}</label>${this.lines
        ? html`<textarea id="box" rows="4" spellcheck="false" placeholder=${this.hint} aria-invalid=${invalid} aria-describedby=${about} @keydown=${this.key} @blur=${this.accept}></textarea>`
        : html`<input id="box" autocomplete="off" autocapitalize="off" spellcheck="false" placeholder=${this.hint} aria-invalid=${invalid} aria-describedby=${about} @keydown=${this.key} @blur=${this.accept} />`}${this.complaint
        ? html`<span class="complaint" id="complaint">${this.complaint}</span>`
        : nothing}`;
  }
}

customElements.define('hm-field', HmField);

declare global {
  interface HTMLElementTagNameMap {
    'hm-field': HmField;
  }
}
