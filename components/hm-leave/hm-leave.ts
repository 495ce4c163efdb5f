import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Design } from '../../src/design/types.ts';
import type { StyleName } from '../../src/drawing/styles.ts';
import type { Result } from '../../src/result/types.ts';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import type { OpenedFile, WrittenBack } from '../shared/opened-file.ts';
import { fileName, saveFile } from '../shared/save-file.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import '../hm-dialog/hm-dialog.ts';
import { styles } from './hm-leave.styles.ts';
import { csvBlob, designBlob, plateSvg, pngBlob, svgBlob, tsvBlob, type PlateLook } from './takeaways.ts';

const STYLES: [StyleName, string][] = [
  ['light', 'as on a light screen'],
  ['dark', 'as on a dark screen'],
  ['slide', 'for a slide: large, on white'],
  ['journal', 'for a journal: black and white'],
];

/**
 * Taking something away: the plate as SVG or PNG or to the clipboard, the profiles and the ledger as tables, the design as its file
 * or inside a link; the design back to the file that it was opened from. `show()` opens it.
 * The review sheet is asked for from here.
 * Where the figures belong to an earlier design than the one on the page, they are not given away.
 *
 * @fires hm-act  the review sheet
 */
export class HmLeave extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    design: { attribute: false },
    result: { attribute: false },
    stale: { type: Boolean },
    plateLook: { attribute: false },
    file: { attribute: false },
    trouble: { state: true },
    remark: { state: true },
    plateStyle: { state: true },
  };

  declare design: Design | null;
  declare result: Result | null;
  declare stale: boolean;
  /** how the plate looks on the page */ declare plateLook: PlateLook;
  /** that the design was opened from and can be written back to */ declare file: OpenedFile | null;
  /** why the last writing back came to nothing */ declare private trouble: WrittenBack | null;
  declare private remark: string;
  declare private plateStyle: StyleName;

  constructor() {
    super();
    this.design = null;
    this.result = null;
    this.stale = false;
    this.plateLook = {};
    this.file = null;
    this.trouble = null;
    this.remark = '';
    this.plateStyle = 'light';
  }

  show(): void {
    this.remark = '';
    this.trouble = null;
    void this.renderRoot.querySelector<HmDialog>('hm-dialog')!.show();
  }

  close(): void {
    this.renderRoot.querySelector<HmDialog>('hm-dialog')!.close();
  }

  /**
   * Saves the design at once, without the dialog: back to the file that it was opened from, else to one of its own. Where the file cannot be written the dialog opens, with the reason
   * and other ways.
   *
   * @returns what to say about it
   */
  async saveDesign(): Promise<string> {
    if (this.file === null) return this.designFile();
    const said = await this.writeBack();
    if (this.trouble !== null) {
      const { trouble } = this;
      if (!this.renderRoot.querySelector<HmDialog>('hm-dialog')!.open) this.show();
      this.trouble = trouble;
      this.remark = said;
    }
    return said;
  }

  private async writeBack(over = false): Promise<string> {
    const outcome = await this.file!.write(designBlob(this.design!), over);
    this.trouble = outcome.kind === 'written' ? null : outcome;
    return outcome.said;
  }

  private designFile(): Promise<string> {
    return this.written(fileName(this.design!.title, '.halfmark.json'), 'application/json', designBlob(this.design!));
  }

  private async written(name: string, type: string, content: Promise<Blob>): Promise<string> {
    const outcome = await saveFile(name, type, content);
    if (outcome === 'given up') return 'No file was written.';
    return outcome === 'written' ? 'The file is written.' : `${name} is in the downloads.`;
  }

  private async run(work: Promise<string>): Promise<void> {
    this.remark = 'Making it';
    try {
      this.remark = await work;
    } catch (error) {
      this.remark = `That did not work (${error instanceof Error ? error.message : String(error)}).`;
    }
  }

  private save(ending: string, type: string, make: (result: Result) => Promise<Blob>): void {
    const { result } = this;
    if (result !== null) void this.run(this.written(fileName(result.title, ending), type, make(result)));
  }

  private copyPicture(): void {
    const { result } = this;
    if (result === null) return;
    // The item is made at once and its content promised: a browser takes the clipboard away from a press that has been over for a while.
    const copy = async (): Promise<string> => {
      if (typeof ClipboardItem === 'undefined' || navigator.clipboard?.write === undefined) return 'This browser lets no page put pictures on the clipboard: take the PNG as a file.';
      await navigator.clipboard.write([new ClipboardItem({ 'image/png': pngBlob(result, this.plateLook, this.plateStyle) })]);
      return 'The plate is on the clipboard as PNG.';
    };
    void this.run(copy());
  }

  /** The file's text as a picture where the browser's clipboard takes one, and as text, which drawing programs read as a drawing. */
  private copySvg(): void {
    const { result } = this;
    if (result === null) return;
    const copy = async (): Promise<string> => {
      if (typeof ClipboardItem === 'undefined' || navigator.clipboard?.write === undefined) return 'This browser lets no page put drawings on the clipboard: take the SVG as a file.';
      const svg = plateSvg(result, this.plateLook, this.plateStyle);
      const as = (type: string): Promise<Blob> => svg.then((text) => new Blob([text], { type }));
      const picture = (ClipboardItem as { supports?(type: string): boolean }).supports?.('image/svg+xml') === true;
      await navigator.clipboard.write([new ClipboardItem({ 'text/plain': as('text/plain'), ...(picture ? { 'image/svg+xml': as('image/svg+xml') } : {}) })]);
      return picture ? 'The plate is on the clipboard as SVG, as a drawing and as text.' : 'The plate is on the clipboard as the text of its SVG.';
    };
    void this.run(copy());
  }

  private copyLink(): void {
    const { design } = this;
    if (design === null) return;
    const copy = async (): Promise<string> => {
      const { linkTo } = await import('../../src/export/link.ts');
      const link = await linkTo(design, location.href);
      await navigator.clipboard.writeText(link);
      return `The link is on the clipboard, ${link.length} characters. It holds the whole design; no server is asked for it.`;
    };
    void this.run(copy());
  }

  private renderBack(): TemplateResult | typeof nothing {
    const { file, trouble } = this;
    if (file === null) return nothing;
    return html`<div class="row"><button type="button" @click=${() => void this.run(this.writeBack())}>Save to ${file.name}</button></div>
      ${trouble === null
        ? nothing
        : html`<p class="caution">${trouble.said} Everything is still here: take the design as a new file${trouble.kind === 'changed' ? ', or write over what the other program left' : ''}.</p>
            ${trouble.kind === 'changed' ? html`<div class="row"><button type="button" @click=${() => void this.run(this.writeBack(true))}>Write over ${file.name}</button></div>` : nothing}`}`;
  }

  override render(): TemplateResult {
    const ready = this.result !== null && !this.stale;
    return html`<hm-dialog heading="Take away">
      <p class="remark" role="status">${this.remark}</p>
      ${ready ? nothing : html`<p class="caution">The design on the page has no result yet, so only its file can be taken.</p>`}
      <section aria-labelledby="of-sheet">
        <h3 id="of-sheet">The review sheet</h3>
        <div class="row"><button type="button" ?disabled=${!ready} @click=${() => tell(this, 'hm-act', { act: 'sheet' })}>Fill in and take away</button></div>
        <p class="quiet">Plate, layers, figures, requirements and the source of every parameter, as PDF, SVG, PNG or print.</p>
      </section>
      <section aria-labelledby="of-plate">
        <h3 id="of-plate">The plate</h3>
        <label>Look
          <select @change=${(e: Event) => (this.plateStyle = (e.target as HTMLSelectElement).value as StyleName)}>
            ${STYLES.map(([name, words]) => html`<option value=${name} ?selected=${name === this.plateStyle}>${words}</option>`)}
          </select>
        </label>
        <div class="row">
          <button type="button" ?disabled=${!ready} @click=${() => this.save('.svg', 'image/svg+xml', (r) => svgBlob(r, this.plateLook, this.plateStyle))}>SVG, vector</button>
          <button type="button" ?disabled=${!ready} @click=${() => this.save('.png', 'image/png', (r) => pngBlob(r, this.plateLook, this.plateStyle))}>PNG, double size</button>
          <button type="button" ?disabled=${!ready} @click=${this.copyPicture}>Copy as PNG</button>
          <button type="button" ?disabled=${!ready} @click=${this.copySvg}>Copy as SVG</button>
        </div>
      </section>
      <section aria-labelledby="of-figures">
        <h3 id="of-figures">The figures</h3>
        <div class="row">
          <button type="button" ?disabled=${!ready} @click=${() => this.save('-profile.csv', 'text/csv', csvBlob)}>Profiles through the depth, CSV</button>
          <button type="button" ?disabled=${!ready} @click=${() => this.save('-ledger.tsv', 'text/tab-separated-values', tsvBlob)}>Ledger, TSV</button>
        </div>
      </section>
      <section aria-labelledby="of-design">
        <h3 id="of-design">The design</h3>
        ${this.renderBack()}
        <div class="row"><button type="button" @click=${() => void this.run(this.designFile())}>Design file, JSON</button> <button type="button" @click=${this.copyLink}>Copy a link</button></div>
        <p class="quiet">Read again by dropping it on the page, and by the command line.</p>
      </section>
      <p class="caution">Estimates of an ideal one-dimensional structure from published parameters, to be confirmed by measurement before a process or a product relies on them.</p>
    </hm-dialog>`;
  }
}

customElements.define('hm-leave', HmLeave);

declare global {
  interface HTMLElementTagNameMap {
    'hm-leave': HmLeave;
  }
}
