import { LitElement, html, type TemplateResult } from 'lit';
import { readMarkdown, type Block } from '../../src/help/markdown.ts';
import { HELP_PAGES } from '../../src/help/pages.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import '../hm-dialog/hm-dialog.ts';
import { look } from '../shared/look.ts';
import { helpPage } from './help-page.ts';
import { styles } from './hm-help.styles.ts';

/** The help: its pages, each fetched when it is first read. `show()` opens it. */
export class HmHelp extends LitElement {
  static override styles = [look, styles];
  static override properties = { at: { state: true }, read: { state: true } };

  /** file of the page that is open */ declare private at: string;
  /** pages so far; null for one that could not be fetched */ declare private read: Readonly<Record<string, readonly Block[] | null>>;

  constructor() {
    super();
    this.at = HELP_PAGES[0].file;
    this.read = {};
  }

  /** @param file  of a page; without one the page that was read last */
  async show(file: string = this.at): Promise<void> {
    await this.updateComplete;
    await this.renderRoot.querySelector<HmDialog>('hm-dialog')!.show();
    await this.go(file, false);
  }

  private async go(file: string, focus: boolean): Promise<void> {
    this.at = file;
    if (!this.read[file]) {
      const { address } = HELP_PAGES.find((page) => page.file === file)!;
      const blocks = await fetch(address).then(async (answer) => (answer.ok ? readMarkdown(await answer.text()) : null)).catch(() => null);
      this.read = { ...this.read, [file]: blocks };
    }
    await this.updateComplete;
    if (focus && this.at === file) this.renderRoot.querySelector<HTMLElement>('h3')?.focus();
  }

  override render(): TemplateResult {
    const blocks = this.read[this.at];
    const known = (file: string): boolean => HELP_PAGES.some((page) => page.file === file);
    return html`<hm-dialog heading="Help">
      <nav aria-label="Pages of the help">${HELP_PAGES.map(({ file, title }) => html`<button type="button" aria-current=${file === this.at ? 'page' : 'false'} @click=${() => void this.go(file, true)}>${title}</button>`)}</nav>
      <article>
        ${blocks === undefined ? html`<p role="status">Coming</p>` : blocks === null ? html`<p role="alert">This page could not be fetched. <button type="button" @click=${() => void this.go(this.at, true)}>Try again</button></p>` : helpPage(blocks, known, (file) => void this.go(file, true))}
      </article>
    </hm-dialog>`;
  }
}

customElements.define('hm-help', HmHelp);

declare global {
  interface HTMLElementTagNameMap {
    'hm-help': HmHelp;
  }
}
