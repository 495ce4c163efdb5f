import { LitElement, html, type TemplateResult } from 'lit';
import { look } from '../shared/look.ts';
import { styles } from './hm-dialog.styles.ts';

/**
 * A window over the page, with a heading and a way out: the button, Escape, or a press beside it. The focus returns to where it came from.
 *
 * @slot  what stands in it
 * @fires hm-closed  it was closed, by whatever way
 */
export class HmDialog extends LitElement {
  static override styles = [look, styles];
  static override properties = { heading: {}, open: { type: Boolean, reflect: true } };

  declare heading: string;
  declare open: boolean;

  constructor() {
    super();
    this.heading = '';
    this.open = false;
  }

  private get dialog(): HTMLDialogElement {
    return this.renderRoot.querySelector('dialog')!;
  }

  async show(): Promise<void> {
    this.open = true;
    await this.updateComplete;
    if (!this.dialog.open) this.dialog.showModal();
  }

  close(): void {
    this.dialog.close();
  }

  private closed(): void {
    this.open = false;
    this.dispatchEvent(new CustomEvent('hm-closed'));
  }

  /** A press on the dialog itself is one beside its content: the content fills it. */
  private pressed(event: MouseEvent): void {
    if (event.target === this.dialog) this.close();
  }

  override render(): TemplateResult {
    return html`<dialog aria-labelledby="heading" @close=${this.closed} @click=${this.pressed}>
      <div class="sheet">
        <header>
          <h2 id="heading">${this.heading}</h2>
          <button type="button" @click=${this.close}>Close</button>
        </header>
        <slot></slot>
      </div>
    </dialog>`;
  }
}

customElements.define('hm-dialog', HmDialog);

declare global {
  interface HTMLElementTagNameMap {
    'hm-dialog': HmDialog;
  }
}
