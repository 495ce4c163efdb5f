import { LitElement, css, html, nothing, type TemplateResult } from 'lit';
import type { Design } from '../../src/design/types.ts';
import { setNotes } from '../../src/state/commands/index.ts';
import '../hm-field/hm-field.ts';
import { tell } from '../shared/events.ts';
import { foldLook } from '../shared/fold-look.ts';
import { look } from '../shared/look.ts';

/**
 * The notes of the design: free text, kept in its file and printed on the review sheet.
 * @fires hm-edit
 */
export class HmNotes extends LitElement {
  static override styles = [
    look,
    foldLook,
    css`
      hm-field {
        display: block;
        --field-width: 100%;
      }
    `,
  ];
  static override properties = { design: { attribute: false } };

  declare design: Design | null;

  constructor() {
    super();
    this.design = null;
  }

  private accept(text: string): void {
    tell(this, 'hm-edit', { next: setNotes(this.design!, text), label: 'notes' });
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    const { notes = '' } = this.design;
    const [first] = notes.trim().split('\n');
    return html`<details>
      <summary><h2>Notes</h2> <span class="inforce">${first === '' ? 'none' : first.length > 60 ? `${first.slice(0, 59)}…` : first}</span></summary>
      <hm-field label="Notes of this design, printed on the review sheet" lines .value=${notes} @field-accept=${(e: CustomEvent<string>) => this.accept(e.detail)}></hm-field>
    </details>`;
  }
}

customElements.define('hm-notes', HmNotes);

declare global {
  interface HTMLElementTagNameMap {
    'hm-notes': HmNotes;
  }
}
