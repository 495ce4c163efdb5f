import { LitElement, html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import type { Design } from '../../src/design/types.ts';
import type { Drawing } from '../../src/drawing/shapes.ts';
import type { RequirementResult, Result } from '../../src/result/types.ts';
import type { Paper, SheetStyle } from '../../src/sheet/look.ts';
import type { SheetInput, SheetPlate } from '../../src/sheet/review-sheet.ts';
import type { SheetForm } from '../../src/sheet/takeaway.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import { fileName, saveFile } from '../shared/save-file.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import '../hm-dialog/hm-dialog.ts';
import './hm-sheet-sections.ts';
import { NOTHING_CHOSEN, type OtherDesign, type SectionsChosen } from './hm-sheet-sections.ts';
import { styles } from './hm-sheet.styles.ts';

const STYLES: [SheetStyle, string][] = [
  ['screen', 'as on the screen'],
  ['slide', 'for slides: large letters'],
  ['journal', 'black and white'],
];
const PAPERS: [Paper, string][] = [
  ['A4', 'A4, landscape'],
  ['letter', 'letter, landscape'],
];
const FORMS: Record<SheetForm, { words: string; ending: string; type: string }> = {
  pdf: { words: 'PDF, vector', ending: '-sheet.pdf', type: 'application/pdf' },
  svg: { words: 'SVG, a file a page', ending: '-sheet.zip', type: 'application/zip' },
  png: { words: 'PNG, double size', ending: '-sheet.zip', type: 'application/zip' },
};
/** ms from the last letter typed to the next picture of the page */
const PAUSE = 200;
/** ms after which the page says that it is still working on the sections */
const SLOW = 400;
const WORKING = 'Working out the further sections';
const AUTHOR_KEY = 'halfmark:author';

/**
 * The review sheet: its title block to fill in, its pages to look at, and the ways to take it away. `show()` opens it. The author's name is kept in this browser; a date stands on
 * the sheet only where the person put one.
 *
 * @fires hm-say  what became of a file
 */
export class HmSheet extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    design: { attribute: false },
    result: { attribute: false },
    requirements: { attribute: false },
    // A list that says the same is the same: the page makes it anew at every drawing.
    others: { attribute: false, hasChanged: (next: readonly OtherDesign[], before?: readonly OtherDesign[]) => !sameOthers(next, before) },
    ownName: { attribute: false },
    plateLook: { attribute: false },
    run: { attribute: false },
    stale: { type: Boolean },
    sections: { state: true },
    block: { state: true },
    sheetStyle: { state: true },
    paper: { state: true },
    pages: { state: true },
    shown: { state: true },
    remark: { state: true },
    busy: { state: true },
  };

  declare design: Design | null;
  declare result: Result | null;
  /** judged rows; null while they are not known */ declare requirements: readonly RequirementResult[] | null;
  /** variants of the project that are not on the page */ declare others: readonly OtherDesign[];
  /** of the variant on the page */ declare ownName: string;
  /** starts what the further sections have to have solved; without it they are left out */ declare run: RunJob | null;
  declare private sections: SectionsChosen;
  /** how the plate looks on the page */ declare plateLook: SheetPlate;
  /** the result is of an earlier design */ declare stale: boolean;
  declare private block: { title: string; author: string; date: string; revision: string };
  declare private sheetStyle: SheetStyle;
  declare private paper: Paper;
  declare private pages: Drawing[] | null;
  /** index of the page in the preview */ declare private shown: number;
  declare private remark: string;
  declare private busy: boolean;
  /** address of the page shown */ private picture = '';
  /** what the remark says of sections that cannot be had */ private lacking = '';
  private timer = 0;
  private call = 0;

  constructor() {
    super();
    this.design = null;
    this.result = null;
    this.requirements = null;
    this.others = [];
    this.ownName = '';
    this.sections = NOTHING_CHOSEN;
    this.plateLook = {};
    this.run = null;
    this.stale = false;
    this.block = { title: '', author: '', date: '', revision: '' };
    this.sheetStyle = 'screen';
    this.paper = 'A4';
    this.pages = null;
    this.shown = 0;
    this.remark = '';
    this.busy = false;
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    clearTimeout(this.timer);
  }

  show(): void {
    this.remark = '';
    this.shown = 0;
    this.block = { ...this.block, title: this.design?.title ?? '', author: this.block.author || keptAuthor() };
    void this.dialog.show();
    void this.draw();
  }

  private get dialog(): HmDialog {
    return this.renderRoot.querySelector<HmDialog>('hm-dialog')!;
  }

  protected override updated(changed: PropertyValues): void {
    const inputs = ['design', 'result', 'requirements', 'others', 'ownName', 'plateLook', 'sections', 'block', 'sheetStyle', 'paper'];
    if (!this.dialog.open || !inputs.some((name) => changed.has(name))) return;
    clearTimeout(this.timer);
    this.timer = window.setTimeout(() => void this.draw(), PAUSE);
  }

  private get input(): SheetInput | null {
    const { design, result } = this;
    if (design === null || result === null || this.stale) return null;
    return {
      ...this.block, design, result, style: this.sheetStyle, paper: this.paper, plate: this.plateLook,
      ...(this.requirements ? { requirements: this.requirements } : {}),
    };
  }

  /** With the sections that are switched on, and of those that cannot be had why not. */
  private async whole(): Promise<{ input: SheetInput | null; missing: string }> {
    const { input, sections, run, requirements } = this;
    if (input === null || run === null || sections === NOTHING_CHOSEN) return { input, missing: '' };
    const { over, corner, contacts } = sections;
    const others = this.others.filter(({ id }) => over.includes(id));
    const base = this.ownName || 'this design';
    const [{ furtherSections }, { sheetSolver }, { ledgerTables }] = await Promise.all([import('../../src/sheet/further.ts'), import('./sheet-solver.ts'), import('../../src/result/ledger.ts')]);
    const tables = ledgerTables(input.result);
    // A layer that is gone since takes its figures along.
    const workings = sections.workings.filter(({ table, index }) => tables.some(({ id, rows }) => id === table && rows.some((row) => row.index === index)));
    const { sections: further, missing } = await furtherSections(input.design, input.result, requirements, { over: others, base, corner, contacts, workings }, sheetSolver(run));
    return { input: { ...input, ...further }, missing: missing.join(' ') };
  }

  /** The picture of the pages. What draws them comes with the first one. */
  private async draw(): Promise<void> {
    const call = ++this.call;
    const slow = window.setTimeout(() => {
      if (call === this.call && !this.busy) this.remark = WORKING;
    }, SLOW);
    try {
      const { input, missing } = await this.whole();
      if (call !== this.call) return;
      if (missing !== '') this.remark = missing;
      else if (this.remark === WORKING || this.remark === this.lacking) this.remark = '';
      this.lacking = missing;
      if (input === null) {
        this.pages = null;
        return;
      }
      const { reviewSheet } = await import('../../src/sheet/review-sheet.ts');
      if (call !== this.call) return;
      this.pages = reviewSheet(input);
      this.shown = Math.min(this.shown, this.pages.length - 1);
      this.picture = pictureOf(this.pages[this.shown], (await import('../../src/drawing/svg-text.ts')).svgText);
      this.requestUpdate();
    } catch (error) {
      if (call === this.call) this.remark = `The sheet cannot be drawn (${words(error)}).`;
    } finally {
      clearTimeout(slow);
    }
  }

  private turn(by: number): void {
    if (!this.pages) return;
    this.shown = Math.min(Math.max(this.shown + by, 0), this.pages.length - 1);
    void this.draw();
  }

  private fill(key: keyof HmSheet['block'], value: string): void {
    this.block = { ...this.block, [key]: value };
    if (key === 'author') keepAuthor(value);
  }

  private today(): void {
    const now = new Date();
    const two = (n: number): string => String(n).padStart(2, '0');
    this.fill('date', `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`);
  }

  private async take(form: SheetForm): Promise<void> {
    const { input } = this;
    if (input === null || this.busy) return;
    const { ending, type } = FORMS[form];
    const name = fileName(this.block.title, ending);
    await this.making(async () => {
      const file = Promise.all([import('../../src/sheet/takeaway.ts'), this.whole()]).then(([{ sheetTakeaway }, whole]) => sheetTakeaway(form, whole.input ?? input));
      // Where the person gives the file up, nobody asks any more whether it could be made.
      file.catch(() => undefined);
      const outcome = await saveFile(name, type, file);
      return outcome === 'given up' ? 'No file was written.' : outcome === 'written' ? 'The sheet is written.' : `${name} is in the downloads.`;
    });
  }

  private async print(): Promise<void> {
    const { input } = this;
    if (input === null || this.busy) return;
    await this.making(async () => {
      const [{ reviewSheet }, { svgText }, { printPages }, whole] = await Promise.all([import('../../src/sheet/review-sheet.ts'), import('../../src/drawing/svg-text.ts'), import('./print-pages.ts'), this.whole()]);
      printPages(reviewSheet(whole.input ?? input).map(svgText), input.paper);
      return 'Handed to the printer’s dialog.';
    });
  }

  private async making(work: () => Promise<string>): Promise<void> {
    this.busy = true;
    this.remark = 'Making it';
    try {
      this.remark = await work();
      tell(this, 'hm-say', { text: this.remark });
    } catch (error) {
      this.remark = `That did not work (${words(error)}).`;
    } finally {
      this.busy = false;
    }
  }

  private field(key: keyof HmSheet['block'], label: string, of: { most: number; complete?: string }): TemplateResult {
    return html`<label class=${key}>${label}<input type="text" maxlength=${of.most} autocomplete=${of.complete ?? 'off'} .value=${this.block[key]} @input=${(e: Event) => this.fill(key, (e.target as HTMLInputElement).value)} /></label>`;
  }

  override render(): TemplateResult {
    const ready = this.input !== null;
    const count = this.pages?.length ?? 0;
    const page = this.pages?.[this.shown];
    return html`<hm-dialog heading="Review sheet">
      <p class="remark" role="status">${this.remark}</p>
      ${ready ? nothing : html`<p class="caution">The design on the page has no result yet. The sheet waits for it.</p>`}
      ${ready && this.requirements === null && (this.design?.requirements ?? []).length > 0 ? html`<p class="caution">The requirements are not judged yet; the sheet says so.</p>` : nothing}
      <div class="fields">
        ${this.field('title', 'Title', { most: 200 })} ${this.field('author', 'Author', { most: 100, complete: 'name' })}
        <div class="with-button">${this.field('date', 'Date', { most: 40 })}<button type="button" @click=${this.today}>Today</button></div>
        ${this.field('revision', 'Revision', { most: 40 })}
        <label>Look
          <select @change=${(e: Event) => (this.sheetStyle = (e.target as HTMLSelectElement).value as SheetStyle)}>
            ${STYLES.map(([name, said]) => html`<option value=${name} ?selected=${name === this.sheetStyle}>${said}</option>`)}
          </select>
        </label>
        <label>Paper
          <select @change=${(e: Event) => (this.paper = (e.target as HTMLSelectElement).value as Paper)}>
            ${PAPERS.map(([name, said]) => html`<option value=${name} ?selected=${name === this.paper}>${said}</option>`)}
          </select>
        </label>
      </div>
      <hm-sheet-sections .result=${this.stale ? null : this.result} .others=${this.others} ?judged=${(this.requirements ?? []).some(({ at }) => at !== null)} .chosen=${this.sections} @sections-change=${({ detail }: CustomEvent<SectionsChosen>) => (this.sections = detail)}></hm-sheet-sections>
      <div class="row">
        ${(Object.keys(FORMS) as SheetForm[]).map((form) => html`<button type="button" ?disabled=${!ready || this.busy} @click=${() => void this.take(form)}>${FORMS[form].words}</button>`)}
        <button type="button" ?disabled=${!ready || this.busy} @click=${() => void this.print()}>Print</button>
      </div>
      ${page
        ? html`<div class="row" role="group" aria-label="Pages">
              <button type="button" ?disabled=${this.shown === 0} @click=${() => this.turn(-1)}>Page before</button>
              <span>Page ${this.shown + 1} of ${count}</span>
              <button type="button" ?disabled=${this.shown === count - 1} @click=${() => this.turn(1)}>Next page</button>
            </div>
            <figure><img alt=${`${page.title}. ${page.description}`} width=${Math.round(page.width)} height=${Math.round(page.height)} src=${this.picture} /></figure>`
        : nothing}
    </hm-dialog>`;
  }
}

/** A drawing as the address of a picture, which `img-src data:` allows. */
function pictureOf(drawing: Drawing, write: (drawing: Drawing) => string): string {
  return `data:image/svg+xml;charset=utf-8,${encodeURIComponent(write(drawing))}`;
}

function words(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}

function sameOthers(a: readonly OtherDesign[], b: readonly OtherDesign[] = []): boolean {
  return a.length === b.length && a.every(({ id, name, design }, i) => id === b[i].id && name === b[i].name && design === b[i].design);
}

function keptAuthor(): string {
  try {
    return localStorage.getItem(AUTHOR_KEY) ?? '';
  } catch {
    return '';
  }
}

function keepAuthor(name: string): void {
  try {
    localStorage.setItem(AUTHOR_KEY, name);
  } catch {
    // The name is typed again next time.
  }
}

customElements.define('hm-sheet', HmSheet);

declare global {
  interface HTMLElementTagNameMap {
    'hm-sheet': HmSheet;
  }
}
