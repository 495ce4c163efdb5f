import { LitElement, html, nothing, type TemplateResult } from 'lit';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import '../hm-dialog/hm-dialog.ts';
import { styles } from './hm-starters.styles.ts';

/** A worked design on the shelf. */
export interface StarterCard {
  id: string;
  title: string;
  /** one line */ summary: string;
  /** materials from the surface down */ layers: string[];
}

/**
 * The shelf of worked designs. Each opens as a project of its own, so nothing that is there is replaced. `show()` opens it.
 * @fires hm-starter
 */
export class HmStarters extends LitElement {
  static override styles = [look, styles];
  static override properties = { starters: { attribute: false } };

  /** null while they are being fetched */ declare starters: readonly StarterCard[] | null;

  constructor() {
    super();
    this.starters = null;
  }

  private get dialog(): HmDialog {
    return this.renderRoot.querySelector('hm-dialog')!;
  }

  show(): void {
    void this.dialog.show();
  }

  private take(id: string): void {
    this.dialog.close();
    tell(this, 'hm-starter', { id });
  }

  override render(): TemplateResult {
    return html`<hm-dialog heading="Worked designs to start from">
      <p>Invented scenarios, ready to be pulled about. Each opens as a project of its own.</p>
      ${this.starters === null ? html`<p role="status">Fetching the shelf</p>` : nothing}
      <ul>
        ${(this.starters ?? []).map(
          (starter) => html`<li>
            <button type="button" @click=${() => this.take(starter.id)}>
              <span class="summary">${starter.summary}</span>
              <span class="title">${starter.title}</span>
              <span class="layers">${starter.layers.join(' | ')}</span>
            </button>
          </li>`,
        )}
      </ul>
    </hm-dialog>`;
  }
}

customElements.define('hm-starters', HmStarters);

declare global {
  interface HTMLElementTagNameMap {
    'hm-starters': HmStarters;
  }
}
