import { LitElement, html, type TemplateResult } from 'lit';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import '../hm-dialog/hm-dialog.ts';
import { styles } from './hm-about.styles.ts';

/** Beside the page, under a name that the build gives it. */
const LICENCES = new URL('../../src/help/licences.txt', import.meta.url).href;

/** What the program is, what its figures are worth, where the work is kept, and whose work it carries. `show()` opens it. */
export class HmAbout extends LitElement {
  static override styles = [look, styles];
  static override properties = { program: {}, model: {}, presets: {} };

  /** versions as the result says them */ declare program: string;
  declare model: string;
  /** fingerprint of the published parameters */ declare presets: string;

  constructor() {
    super();
    this.program = '';
    this.model = '';
    this.presets = '';
  }

  show(): void {
    void this.renderRoot.querySelector<HmDialog>('hm-dialog')!.show();
  }

  /** The dialogs are modal: this one makes room. */
  private help(): void {
    this.renderRoot.querySelector<HmDialog>('hm-dialog')!.close();
    tell(this, 'hm-act', { act: 'help' });
  }

  override render(): TemplateResult {
    return html`<hm-dialog heading="About Halfmark">
      <p>Halfmark finds the Fermi level of each layer of a stack from its dopants and its temperature, and solves the whole stack self-consistently into one band diagram.</p>
      ${this.program === '' ? '' : html`<p class="quiet">Program ${this.program}, model ${this.model}${this.presets === '' ? '' : html`, parameters <span class="print">${this.presets}</span>`}. The review sheet and every result file carry the same words.</p>`}
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
        matters; it holds your shelf of own materials, dopants and metals as well.
      </p>
      <h3>Help and keys</h3>
      <p>F1 opens the help from anywhere: the first five minutes, a page for each method, and every key. <button type="button" @click=${() => this.help()}>Open the help</button></p>
      <h3>Licences</h3>
      <p>Halfmark carries the work of others with it. <a href=${LICENCES} target="_blank" rel="noopener">Their licences</a>, word for word.</p>
    </hm-dialog>`;
  }
}

customElements.define('hm-about', HmAbout);

declare global {
  interface HTMLElementTagNameMap {
    'hm-about': HmAbout;
  }
}
