import { LitElement, html, type TemplateResult } from 'lit';
import { look } from '../shared/look.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import '../hm-dialog/hm-dialog.ts';
import { styles } from './hm-about.styles.ts';

const KEYS: [keys: string[], what: string][] = [
  [['Ctrl Z', '⌘ Z'], 'take the last change back'],
  [['Ctrl Shift Z', '⌘ ⇧ Z'], 'do it again'],
  [['Ctrl O', '⌘ O'], 'open a design file'],
  [['Ctrl S', '⌘ S'], 'save the design to the file it was opened from, else take it away as a file'],
  [['← →'], 'in the strip: choose a layer or a contact'],
  [['Enter', 'Escape'], 'in the strip: edit the chosen one, and back'],
  [['[', ']'], 'in the strip: thinner, thicker'],
  [['Alt ←', 'Alt →'], 'in the strip: move the layer'],
];

/** What the program is, what its figures are worth, which keys it knows, and where the work is kept. `show()` opens it. */
export class HmAbout extends LitElement {
  static override styles = [look, styles];
  static override properties = { program: {}, model: {} };

  /** versions as the result says them */ declare program: string;
  declare model: string;

  constructor() {
    super();
    this.program = '';
    this.model = '';
  }

  show(): void {
    void this.renderRoot.querySelector<HmDialog>('hm-dialog')!.show();
  }

  override render(): TemplateResult {
    return html`<hm-dialog heading="About Halfmark">
      <p>Halfmark finds the Fermi level of each layer of a stack from its dopants and its temperature, and solves the whole stack self-consistently into one band diagram.</p>
      ${this.program === '' ? '' : html`<p class="quiet">Program ${this.program}, model ${this.model}.</p>`}
      <h3>Cautions</h3>
      <p class="caution">
        Results are estimates of an ideal one-dimensional structure in thermal equilibrium, from published parameters. Confirm them by measurement before a process or a product relies on
        them.
      </p>
      <p class="caution">
        Hazardous gases, acids, high voltage and lasers are governed by your site's own safety rules, local codes and licensed practice. Nothing here is a process recipe.
      </p>
      <h3>Where your work is</h3>
      <p>
        In this browser, on this machine. Nothing is sent anywhere. A browser can be told to forget what a page has saved: take a backup from the list of projects when the work
        matters.
      </p>
      <h3>Keys</h3>
      <dl>
        ${KEYS.map(([keys, what]) => html`<div><dt>${keys.map((key, i) => html`${i > 0 ? ' or ' : ''}<kbd>${key}</kbd>`)}</dt><dd>${what}</dd></div>`)}
      </dl>
    </hm-dialog>`;
  }
}

customElements.define('hm-about', HmAbout);

declare global {
  interface HTMLElementTagNameMap {
    'hm-about': HmAbout;
  }
}
