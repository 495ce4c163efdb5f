import { LitElement, html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { drawHistogram } from '../../src/drawing/histogram.ts';
import type { Drawing } from '../../src/drawing/shapes.ts';
import { drawTornado, tornadoHeight } from '../../src/drawing/tornado.ts';
import { setVariable } from '../../src/state/commands/index.ts';
import { figuresOf } from '../../src/sweep/figures.ts';
import { choicesFor, inputRows, type InputRow } from '../../src/tolerance/input-rows.ts';
import type { InputChoices } from '../../src/tolerance/inputs.ts';
import { variationReport } from '../../src/tolerance/report.ts';
import { summaryCsv } from '../../src/tolerance/summary-csv.ts';
import type { WorkerPool } from '../../src/workers/pool.ts';
import { startPool } from '../../src/workers/start-pool.ts';
import '../hm-field/hm-field.ts';
import { drawn } from '../shared/drawn.ts';
import { tell } from '../shared/events.ts';
import { howLook, settleFigures } from '../shared/how.ts';
import { look } from '../shared/look.ts';
import { panelLook } from '../shared/panel-look.ts';
import { tableLook } from '../shared/table-look.ts';
import { fileName, saveFile } from '../shared/save-file.ts';
import { WidthController } from '../shared/width-controller.ts';
import { addedFigures, inputTable, withChoice } from './tolerance-inputs.ts';
import { histogramOf, tornadoOf, usualShown } from './tolerance-pictures.ts';
import { ToleranceRun, type Found } from './tolerance-run.ts';
import { gapList, spreadTable, yieldTable } from './tolerance-tables.ts';
import { runWords } from './tolerance-words.ts';
import type { TolerancesView } from './tolerances-view.ts';
import { styles } from './hm-tolerances.styles.ts';

const LEAST_WIDTH = 320;
const HISTOGRAM_HEIGHT = 230;
const USUAL = { count: '1000', seed: '1' } as const;

/**
 * Tolerances: the design drawn many times within them, on all cores. Yield against the requirements, how each figure spreads, and what moves it.
 *
 * @fires hm-view  { tolerances: TolerancesView }
 * @fires hm-edit  another tolerance of a variable
 * @fires hm-say   a file was written, a text copied, or could not be
 */
export class HmTolerances extends LitElement {
  static override styles = [look, panelLook, tableLook, howLook, styles];
  static override properties = {
    design: { attribute: false },
    complaints: { attribute: false },
    view: { attribute: false },
    styleName: {},
    pool: { attribute: false },
  };

  declare design: Design | null;
  declare complaints: readonly Complaint[];
  declare view: TolerancesView;
  declare styleName: 'light' | 'dark';
  /** starts the workers of one run; tests give their own */ declare pool: () => WorkerPool;

  private readonly job = new ToleranceRun(this);
  private readonly box = new WidthController(this);
  private stale = false;
  /** a variable's tolerance that was typed and cannot be */ private refused: { label: string; text: string; message: string } | null = null;
  private listed = { from: [] as unknown[], rows: null as InputRow[] | null };
  private written = { design: null as Design | null, text: '' };

  constructor() {
    super();
    this.design = null;
    this.complaints = [];
    this.view = {};
    this.styleName = 'light';
    this.pool = startPool;
  }

  protected override willUpdate(_: PropertyValues): void {
    const { found } = this.job;
    this.stale = found !== null && this.design !== null && found.plan.design !== this.design && JSON.stringify(found.plan.design) !== this.ownText();
  }

  protected override updated(): void {
    for (const body of this.renderRoot.querySelectorAll('tbody')) settleFigures(body);
  }

  /** The design as text, made anew only for another one. */
  private ownText(): string {
    if (this.written.design !== this.design) this.written = { design: this.design, text: JSON.stringify(this.design) };
    return this.written.text;
  }

  private remember(change: TolerancesView): void {
    this.view = { ...this.view, ...change };
    tell(this, 'hm-view', { change: { tolerances: this.view } });
  }

  private start(): void {
    const { count = USUAL.count, seed = USUAL.seed, distribution = 'normal', tolerances = 'all' } = this.view;
    const { added, choices } = this;
    const figures = added.length === 0 ? {} : { figures: [...figuresOf(this.design!, 'usual').map(({ path }) => path), ...added] };
    const inputs = choicesFor((this.inputs ?? []).map(({ label }) => label), choices);
    void this.job.start(this.design!, { count: whole(count), seed: whole(seed), distribution, tolerances, ...figures, ...(Object.keys(inputs).length === 0 ? {} : { inputs }) }, this.pool());
  }

  /** Figures beside the usual ones that this design has. */
  private get added(): string[] {
    const known = new Set(figuresOf(this.design!).map(({ path }) => path));
    return (Array.isArray(this.view.figures) ? this.view.figures : []).filter((path) => known.has(path));
  }

  private get choices(): InputChoices {
    const { inputs } = this.view;
    return typeof inputs === 'object' && inputs !== null ? inputs : {};
  }

  /** What will be moved; read anew only where something of it has changed. Null while the design cannot be read. */
  private get inputs(): InputRow[] | null {
    const { distribution = 'normal', tolerances = 'all' } = this.view;
    const from = [this.design, this.choices, distribution, tolerances];
    if (from.some((part, i) => part !== this.listed.from[i])) this.listed = { from, rows: inputRows(this.design!, { distribution, tolerances, choices: this.choices }) };
    return this.listed.rows;
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    return html`${this.renderAsk()} ${this.renderInputs()} ${this.renderState()} ${this.job.found === null ? nothing : this.renderFound(this.job.found)}`;
  }

  private renderAsk(): TemplateResult {
    const { count = USUAL.count, seed = USUAL.seed, distribution = 'normal', tolerances = 'all' } = this.view;
    const field = (label: string, value: string, path: 'count' | 'seed'): TemplateResult =>
      html`<hm-field label=${label} .value=${value} .complaint=${this.wrong(path)} @field-accept=${(e: CustomEvent<string>) => this.remember({ [path]: e.detail })}></hm-field>`;
    return html`<div class="ask" role="group" aria-label="Tolerance run">
      ${field('variations', count, 'count')} ${field('seed', seed, 'seed')}
      <label>drawn <select @change=${(e: Event) => this.remember({ distribution: (e.target as HTMLSelectElement).value === 'uniform' ? 'uniform' : 'normal' })}>
        <option value="normal" .selected=${distribution === 'normal'}>normal, tolerance two standard deviations</option>
        <option value="uniform" .selected=${distribution === 'uniform'}>uniform between the ends of the tolerance</option>
      </select></label>
      <label>tolerances <select @change=${(e: Event) => this.remember({ tolerances: (e.target as HTMLSelectElement).value === 'stated' ? 'stated' : 'all' })}>
        <option value="all" .selected=${tolerances === 'all'}>stated, and usual ones for the rest</option>
        <option value="stated" .selected=${tolerances === 'stated'}>only those that the design states</option>
      </select></label>
      <button type="button" class="go" ?disabled=${this.job.progress !== null || this.complaints.length > 0} @click=${() => this.start()}>Draw the variations</button>
    </div>`;
  }

  private renderInputs(): TemplateResult {
    const { inputs, added } = this;
    const { distribution = 'normal' } = this.view;
    const refused = new Map(this.job.complaints.flatMap(({ path, message }) => (path.startsWith('inputs.') ? [[path.slice('inputs.'.length), message]] : [])));
    const all = figuresOf(this.design!);
    const usual = new Set(figuresOf(this.design!, 'usual').map(({ path }) => path));
    const typed = this.refused;
    const rows = typed === null ? inputs : (inputs?.map((row) => (row.label === typed.label ? { ...row, tolerance: typed.text, complaint: typed.message } : row)) ?? null);
    return html`${rows === null || rows.length === 0 ? nothing : inputTable(rows, distribution, refused, {
      tolerance: (row, text) => this.wishTolerance(row, text),
      distribution: (row, own) => this.remember({ inputs: withChoice(this.choices, row.label, { distribution: own }) }),
    })}
    ${addedFigures(all, usual, added, this.wrong('figure'), (figures) => this.remember({ figures, ...(this.view.shown === undefined ? {} : { shown: [...this.view.shown, ...figures.filter((path) => !added.includes(path))] }) }))}`;
  }

  /** A variable's tolerance is the design's own, so that its requirements are judged with it too. */
  private wishTolerance({ label, variable }: InputRow, text: string | null): void {
    const index = this.design!.variables?.findIndex(({ name }) => name === variable) ?? -1;
    // What the last run was refused for may be mended by this.
    this.job.complaints = this.job.complaints.filter(({ path }) => path !== `inputs.${label}`);
    if (index < 0) this.remember({ inputs: withChoice(this.choices, label, { tolerance: text }) });
    else {
      const next = setVariable(this.design!, index, { tolerance: text ?? undefined });
      const reading = toStack(next);
      // What cannot be read must not take the design with it: it stands in its field with the reason.
      this.refused = reading.ok || text === null ? null : { label, text, message: reading.complaints[0].message };
      if (this.refused === null) tell(this, 'hm-edit', { next, label: `tolerance of ${label}` });
      else this.requestUpdate();
    }
  }

  private wrong(path: string): string | null {
    return this.job.complaints.find((complaint) => complaint.path === path)?.message ?? null;
  }

  private renderState(): TemplateResult {
    const { progress, found, status } = this.job;
    const ended = found !== null && progress === null && status !== 'error';
    return html`<p class="state ${ended ? 'outcome' : ''} ${this.stale ? 'stale' : ''}" role="status">${this.said()}</p>
      ${progress === null
        ? this.renderWrong()
        : html`<p class="row"><progress aria-label="Variations solved" max=${progress.total} .value=${progress.done}></progress> ${progress.done} of ${progress.total} solves. <button type="button" @click=${() => this.job.stop()}>Stop</button></p>`}`;
  }

  private said(): string {
    const { progress, status, found, reason } = this.job;
    if (progress !== null) return 'Drawing variations. What stands below is of those that are in.';
    if (status === 'error') return `${reason ?? 'This run cannot be made.'}${found === null ? '' : ' What stands below was found before.'}`;
    if (status === 'stopped' && found === null) return 'Stopped before anything was known.';
    if (found !== null) return `${this.stale ? 'For the design before the last change: ' : ''}${runWords(found.result, status === 'stopped')}`;
    return this.complaints.length > 0 ? 'The design has to be put right first.' : 'Doping, thickness, barriers and offsets are drawn within their tolerances, and each variation is solved. The same seed gives the same variations.';
  }

  private renderWrong(): TemplateResult | typeof nothing {
    const rest = this.job.complaints.filter(({ path }) => path !== 'count' && path !== 'seed' && path !== 'figure');
    return rest.length === 0 ? nothing : html`<div role="alert">${rest.map(({ path, message }) => html`<p class="wrong">${path.replace(/^inputs\./, '')}: ${message}.</p>`)}</div>`;
  }

  private renderFound(found: Found): TemplateResult {
    const { result } = found;
    const shown = this.shown(found);
    return html`<div class="found ${this.stale ? 'stale' : ''}">
      ${this.stale ? html`<p class="stale-mark">Drawn for the design before the last change: draw the variations again.</p>` : nothing}
      ${yieldTable(result)} ${gapList(result)} ${result.notes.map((note) => html`<p class="doc">${note}</p>`)} ${this.renderChoice(found, shown)} ${shown.map((path, i) => this.renderPictures(found, path, i))}
      <details>
        <summary>All figures as a table, ${result.figures.length} rows</summary>
        ${spreadTable(result)}
      </details>
      <details>
        <summary>The summary as text</summary>
        <div class="scroll" role="region" aria-label="Summary as text" tabindex="0"><pre>${variationReport(result)}</pre></div>
        <p><button type="button" @click=${() => this.copy(result.title, variationReport(result))}>Copy the text</button></p>
      </details>
      <p class="row"><button type="button" @click=${() => this.save(found)}>Save the summary as CSV</button></p>
    </div>`;
  }

  private shown({ result }: Found): string[] {
    const known = new Set(result.figures.map(({ path }) => path));
    return (this.view.shown ?? [...usualShown(result.figures), ...this.added]).filter((path) => known.has(path));
  }

  private renderChoice({ result }: Found, shown: readonly string[]): TemplateResult {
    const toggle = (path: string): void => this.remember({ shown: shown.includes(path) ? shown.filter((other) => other !== path) : [...shown, path] });
    return html`<details>
      <summary>Figures drawn: ${shown.length} of ${result.figures.length}</summary>
      <fieldset aria-label="Figures drawn">${result.figures.map(({ path, words }) => html`<label><input type="checkbox" .checked=${shown.includes(path)} @change=${() => toggle(path)} />${words}</label>`)}</fieldset>
    </details>`;
  }

  private renderPictures(found: Found, path: string, i: number): TemplateResult {
    const figure = found.result.figures.find((row) => row.path === path)!;
    const full = Math.max(LEAST_WIDTH, this.box.width);
    const width = full >= 900 ? Math.floor((full - 24) / 2) : full;
    const histogram = histogramOf(found, path);
    const tornado = tornadoOf(found, path);
    const style = this.styleName;
    return html`<h3>${figure.words}</h3>
      <div class="pictures">
        <div>${histogram === null ? html`<p class="doc">No variation has this figure.</p>` : picture(drawHistogram(histogram, { width, height: HISTOGRAM_HEIGHT, style, prefix: `spread-${i}` }))}</div>
        <div>${tornado === null ? html`<p class="doc">None of the tolerances moves it.</p>` : html`${picture(drawTornado(tornado, { width, height: tornadoHeight(tornado.bars.length), style, prefix: `tornado-${i}` }))}
          ${tornado.left === 0 ? nothing : html`<p class="doc">${tornado.left} more move it less.</p>`}`}</div>
      </div>`;
  }

  private async save({ result }: Found): Promise<void> {
    try {
      const outcome = await saveFile(fileName(`${result.title} tolerances`, '.csv'), 'text/csv', new Blob([summaryCsv(result)], { type: 'text/csv' }));
      tell(this, 'hm-say', { text: outcome === 'given up' ? 'No file was written.' : 'The summary is in a file.' });
    } catch (error) {
      tell(this, 'hm-say', { text: `The file could not be written (${error instanceof Error ? error.message : String(error)}).`, urgent: true });
    }
  }

  private async copy(title: string, text: string): Promise<void> {
    try {
      await navigator.clipboard.writeText(text);
      tell(this, 'hm-say', { text: `Summary of ${title} copied.` });
    } catch {
      tell(this, 'hm-say', { text: 'The browser did not allow copying; the summary can be saved as a file instead.', urgent: true });
    }
  }
}

function picture(d: Drawing): TemplateResult {
  return html`<svg class="picture" width=${d.width} height=${d.height} viewBox="0 0 ${d.width} ${d.height}" role="img" aria-label=${d.description}>${drawn(d)}</svg>`;
}

/** "1000", "1 000" and "1e3" are whole numbers; what is none is told by the plan. */
function whole(text: string): number {
  const plain = text.replace(/[\s_\u2009\u202f]/g, '');
  return /^[+-]?\d+(?:e\+?\d+)?$/i.test(plain) ? Number(plain) : Number.NaN;
}

customElements.define('hm-tolerances', HmTolerances);

declare global {
  interface HTMLElementTagNameMap {
    'hm-tolerances': HmTolerances;
  }
}
