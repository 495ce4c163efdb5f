import { LitElement, html, nothing, svg, type PropertyValues, type TemplateResult } from 'lit';
import { guard } from 'lit/directives/guard.js';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import type { Result } from '../../src/result/types.ts';
import { drawContourMap, type ContourMap } from '../../src/drawing/contour-map.ts';
import { lineCode } from '../../src/drawing/margin-plot.ts';
import { styleOf } from '../../src/drawing/styles.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { drawSweepPlot, type SweepPlot } from '../../src/drawing/sweep-plot.ts';
import { sweepCsvHeading, sweepCsvRows } from '../../src/sweep/csv.ts';
import { figuresOf } from '../../src/sweep/figures.ts';
import { planSweep, pointsOf, sweepJob, sweepResult, type SweepPlan, type SweepPoint, type SweepResult } from '../../src/sweep/sweep.ts';
import '../hm-field/hm-field.ts';
import { drawn } from '../shared/drawn.ts';
import { tell } from '../shared/events.ts';
import { controlLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';
import { panelLook } from '../shared/panel-look.ts';
import { tableLook } from '../shared/table-look.ts';
import { fileName, saveFile } from '../shared/save-file.ts';
import { select } from '../shared/select.ts';
import { unitOf } from '../shared/typed-text.ts';
import { WidthController } from '../shared/width-controller.ts';
import { BatchController, type Pool } from './batch-controller.ts';
import './hm-film.ts';
import { plotLook, styles } from './hm-sweeps.styles.ts';
import { axisAbout, axisOptions, axisRequest, firstFigures, heldAxis, heldFilm, putIntoDesign, sweepBasis } from './sweep-choices.ts';
import { figureText, gapLines, mapPicture, placeOf, placeWords, plotPicture, putText, withUnit } from './sweep-picture.ts';
import { cursorAt, cursorMoved, cursorShapes } from './sweep-cursor.ts';
import type { AxisView, SweepsView } from './sweeps-view.ts';

const LEAST_WIDTH = 320;
const MOST_WIDTH = 1000;
/** Rows of a table that a page can hold; the file has them all. */
const MOST_ROWS = 500;

/**
 * Sweeps: figures against one quantity as curves, against two as a map, drawn as they come. The pointer or the arrow keys read a point; a click or Enter puts it
 * into the design. Under it the temperature film.
 *
 * @fires hm-edit   the values of a point put into the design
 * @fires hm-view   { sweeps: SweepsView }
 * @fires hm-say
 * @fires hm-frame  of the film
 */
export class HmSweeps extends LitElement {
  static override styles = [look, panelLook, controlLook, tableLook, plotLook, styles];
  static override properties = {
    design: { attribute: false },
    result: { attribute: false },
    view: { attribute: false },
    styleName: {},
    pool: { attribute: false },
    complaints: { state: true },
    cursor: { state: true },
  };

  declare design: Design | null;
  /** of the design, for which figures there are; null: not known */ declare result: Result | null;
  declare view: SweepsView;
  declare styleName: 'light' | 'dark';
  /** a pool of someone else; null: one of its own */ declare pool: Pool | null;
  /** why the last one asked for was refused */ declare private complaints: readonly Complaint[];
  /** index of the point that is read; null: none */ declare private cursor: number | null;

  private readonly batch = new BatchController<SweepPoint[]>(this, () => this.pool);
  private readonly box = new WidthController(this);
  private asked: { plan: SweepPlan; basis: string } | null = null;
  private swept: SweepResult | null = null;
  private resultOf: unknown = null;
  private drawnFrom: unknown[] = [];
  private judged: { plan: SweepPlan | null; design: Design | null; stale: boolean } = { plan: null, design: null, stale: false };
  private picture: { plot: SweepPlot; map: null } | { plot: null; map: ContourMap } | null = null;

  constructor() {
    super();
    this.design = null;
    this.result = null;
    this.view = {};
    this.styleName = 'light';
    this.pool = null;
    this.complaints = [];
    this.cursor = null;
  }

  protected override willUpdate(_: PropertyValues<this>): void {
    if (this.asked === null) return;
    const { plan } = this.asked;
    if (this.resultOf !== this.batch.chunks) {
      this.resultOf = this.batch.chunks;
      this.swept = sweepResult(plan, this.batch.chunks);
    }
    const inputs = [this.resultOf, this.design, this.styleName, this.box.width, this.shown, plan];
    if (inputs.every((input, i) => input === this.drawnFrom[i])) return;
    this.drawnFrom = inputs;
    const width = Math.min(MOST_WIDTH, Math.max(LEAST_WIDTH, this.box.width));
    const look = { width, style: this.styleName, prefix: 'sweep' } as const;
    const result = this.swept!;
    this.picture = plan.axes.length === 1 ? { plot: drawSweepPlot(plotPicture(plan, result, this.design!), look), map: null } : { plot: null, map: drawContourMap(mapPicture(plan, result, this.shown, this.design!), { ...look, height: Math.round(Math.min(520, Math.max(320, 0.62 * width))) }) };
  }

  // What is asked.

  private get first(): AxisView {
    return heldAxis(this.design!, this.view.first) ?? axisAbout(this.design!, 'temperature');
  }

  private get second(): AxisView | null {
    return heldAxis(this.design!, this.view.second);
  }

  private get figures(): string[] {
    const known = new Set(figuresOf(this.design!).map(({ path }) => path));
    const chosen = (Array.isArray(this.view.figures) ? this.view.figures : []).filter((path) => known.has(path));
    return chosen.length > 0 ? chosen : firstFigures(this.design!, this.result).map(({ path }) => path);
  }

  /** Index of the figure that a map shows. */
  private get shown(): number {
    return Math.max(0, this.asked?.plan.figures.findIndex(({ path }) => path === this.view.shown) ?? 0);
  }

  private remember(change: SweepsView): void {
    this.view = { ...this.view, ...change };
    tell(this, 'hm-view', { change: { sweeps: this.view } });
  }

  private start(): void {
    const { second, figures } = this;
    const request = { axis: axisRequest(this.first), ...(second === null ? {} : { second: axisRequest(second) }), figures };
    const planned = planSweep(this.design!, request);
    this.complaints = planned.ok ? [] : planned.complaints;
    if (!planned.ok) return;
    const { plan } = planned;
    this.asked = { plan, basis: sweepBasis(plan.design, plan.axes.map(({ place }) => place)) };
    this.cursor = null;
    void this.batch.start({ kind: 'sweep', design: this.design!, request }, sweepJob(plan)).then(() => this.ended(plan));
  }

  private ended(plan: SweepPlan): void {
    if (this.asked?.plan !== plan || this.swept === null) return;
    const { status } = this.batch;
    if (status === 'complete') tell(this, 'hm-say', { text: `Sweep ready: ${plan.points} points${this.swept.gaps.length > 0 ? `, ${this.swept.gaps.length} without an answer` : ''}.` });
  }

  /** What was swept may change: a point put into the design leaves the sweep as good as it was. */
  private get stale(): boolean {
    const { plan, basis } = this.asked!;
    const { design, judged } = this;
    if (judged.plan !== plan || judged.design !== design) this.judged = { plan, design, stale: sweepBasis(design!, plan.axes.map(({ place }) => place)) !== basis };
    return this.judged.stale;
  }

  // Reading and putting.

  private put(index: number): void {
    const { plan } = this.asked!;
    if (this.stale || (this.swept!.figures.length > 0 && this.swept!.gaps.some((gap) => gap.index === index))) return;
    const parts = placeOf(plan, index);
    const next = parts.reduce((design, { axis, at }) => putIntoDesign(design, axis.place, putText(axis, at)), this.design!);
    const words = parts.map(({ axis, at }) => `${axis.place.words} ${putText(axis, at)}`).join(', ');
    tell(this, 'hm-edit', { next, label: `${words}, from the sweep` });
    tell(this, 'hm-say', { text: `Now on the plate: ${words}. Undo takes it back.` });
  }

  private key(event: KeyboardEvent): void {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    if (event.key === 'Enter' && this.cursor !== null) this.put(this.cursor);
    else if (event.key === 'Escape' && this.cursor !== null) this.cursor = null;
    else {
      const to = cursorMoved(this.asked!.plan, this.cursor, event.key, event.shiftKey ? 10 : 1);
      if (to === null) return;
      this.cursor = to;
    }
    event.preventDefault();
    event.stopPropagation();
  }

  private point(event: PointerEvent): void {
    this.cursor = cursorAt(this.asked!.plan, this.picture!, event.offsetX, event.offsetY);
  }

  /** A finger that is lifted leaves its reading, and with it the button under the picture. */
  private leave(event: PointerEvent): void {
    if (event.pointerType !== 'touch') this.cursor = null;
  }

  private press(event: PointerEvent): void {
    this.point(event);
    // A finger reads; it has the button for the rest.
    if (event.button === 0 && event.pointerType === 'mouse' && this.cursor !== null) this.put(this.cursor);
  }

  // Taking away.

  private async save(ending: '.csv' | '.svg'): Promise<void> {
    const { plan } = this.asked!;
    const text = ending === '.csv' ? sweepCsvHeading(plan) + sweepCsvRows(plan, pointsOf(plan, this.batch.chunks)) : svgText((this.picture!.plot ?? this.picture!.map)!);
    const type = ending === '.csv' ? 'text/csv' : 'image/svg+xml';
    const name = fileName(`${plan.design.title} against ${plan.axes.map(({ place }) => place.words).join(' and ')}`, ending);
    const outcome = await saveFile(name, type, new Blob([text], { type })).catch(() => null);
    if (outcome !== 'given up') tell(this, 'hm-say', outcome === null ? { text: `${name} could not be written.`, urgent: true } : { text: `${name} written.` });
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    return html`${this.renderAsk()} ${this.renderState()} ${this.asked === null ? nothing : this.renderFound()}
      <hm-film .design=${this.design} .view=${heldFilm(this.view.film)} .styleName=${this.styleName} .pool=${this.batch.pool} @film-view=${(e: CustomEvent) => this.remember({ film: e.detail })}></hm-film>`;
  }

  private complaint(path: string): string | null {
    return this.complaints.find((c) => c.path === path)?.message ?? null;
  }

  private renderAsk(): TemplateResult {
    const { second, figures } = this;
    const all = figuresOf(this.design!);
    const words = new Map(all.map((f) => [f.path, f.words]));
    const asMenu = all.filter(({ path }) => !figures.includes(path)).map(({ path, words: text, unit }) => ({ value: path, text: unit === '' ? text : `${text} (${unit})` }));
    const shownAtFields = ['variable', 'from', 'to', 'points'].flatMap((path) => [path, `second.${path}`]);
    return html`${this.renderAxis(this.first, '', 'Sweep')}
      ${second === null ? html`<p><button type="button" @click=${() => this.addSecond()}>Sweep a second quantity as well</button></p>` : this.renderAxis(second, 'second.', 'and')}
      <div class="row"><ul class="figures" aria-label="Figures of the sweep">${figures.map((path) => html`<li><button type="button" aria-label="Leave out ${words.get(path)}" ?disabled=${figures.length === 1} @click=${() => this.remember({ figures: figures.filter((p) => p !== path) })}>${words.get(path)}</button></li>`)}</ul>
        ${select({ id: 'add', label: 'Show another figure', value: '', unknown: 'choose', options: asMenu, complaint: this.complaint('figure'), onChoice: (path) => this.remember({ figures: [...figures, path] }) })}</div>
      <div class="row"><button type="button" class="go" ?disabled=${this.batch.status === 'pending'} @click=${this.start}>Run the sweep</button></div>
      ${this.complaints.length === 0 ? nothing : html`<div role="alert">${this.complaints.filter(({ path }) => path !== 'figure' && !shownAtFields.includes(path)).map(({ path, message }) => html`<p class="wrong">${path}: ${message}</p>`)}<span class="spoken">The sweep was not run: ${this.complaints.map(({ path, message }) => `${path} ${message}`).join('. ')}</span></div>`}`;
  }

  private addSecond(): void {
    const other = axisOptions(this.design!).find(({ value }) => value !== this.first.variable);
    if (other === undefined) return;
    this.remember({ first: { ...this.first, points: '25' }, second: { ...axisAbout(this.design!, other.value), points: '17' } });
  }

  private renderAxis(axis: AxisView, prefix: '' | 'second.', label: string): TemplateResult {
    const key = prefix === '' ? 'first' : 'second';
    const set = (change: Partial<AxisView>): void => this.remember({ [key]: { ...axis, ...change } });
    const unit = unitOf(axis.from) ?? unitOf(axis.to) ?? '';
    return html`<div class="ask" role="group" aria-label=${prefix === '' ? 'First axis' : 'Second axis'}>
      ${select({ id: `${key}-variable`, label, value: axis.variable, options: axisOptions(this.design!), complaint: this.complaint(`${prefix}variable`), onChoice: (name) => this.remember({ [key]: { ...axisAbout(this.design!, name), points: axis.points } }) })}
      <hm-field label="from" .unit=${unit} .value=${axis.from} .complaint=${this.complaint(`${prefix}from`)} @field-accept=${(e: CustomEvent<string>) => set({ from: e.detail })}></hm-field>
      <hm-field label="to" .unit=${unit} .value=${axis.to} .complaint=${this.complaint(`${prefix}to`)} @field-accept=${(e: CustomEvent<string>) => set({ to: e.detail })}></hm-field>
      <hm-field class="short" label="points" .value=${axis.points} .complaint=${this.complaint(`${prefix}points`)} @field-accept=${(e: CustomEvent<string>) => set({ points: e.detail })}></hm-field>
      <label class="check"><input type="checkbox" .checked=${axis.log} @change=${(e: Event) => set({ log: (e.target as HTMLInputElement).checked })} /> logarithmic</label>
      ${prefix === '' ? nothing : html`<button type="button" class="check" @click=${() => this.remember({ second: null })}>Leave it out</button>`}
    </div>`;
  }

  private renderState(): TemplateResult | typeof nothing {
    const { status, progress, reason } = this.batch;
    if (status === 'pending') {
      const { done, total } = progress ?? { done: 0, total: 1 };
      return html`<div class="row"><progress aria-label="Sweep" max=${total} .value=${done}></progress><span>${done} of ${total} points</span><button type="button" @click=${() => this.batch.stop()}>Stop</button></div>`;
    }
    if (status === 'stopped') return html`<p role="status">Stopped: ${this.swept?.done ?? 0} of ${this.asked?.plan.points ?? 0} points are there.</p>`;
    if (status === 'error') return html`<p class="wrong" role="alert">The program itself failed: ${reason}.</p>`;
    return nothing;
  }

  private renderFound(): TemplateResult {
    const { plan } = this.asked!;
    const { picture, stale, cursor } = this;
    const result = this.swept!;
    const drawing = (picture!.plot ?? picture!.map)!;
    const two = plan.axes.length === 2;
    return html`<div class=${stale ? 'found stale' : 'found'}>
      ${stale ? html`<p class="stale-mark">Of the design before the last change: run the sweep again.</p>` : nothing}
      ${two && plan.figures.length > 1 ? select({ id: 'shown', label: 'Map of', value: plan.figures[this.shown].path, options: plan.figures.map(({ path, words }) => ({ value: path, text: words })), onChoice: (path) => this.remember({ shown: path }) }) : nothing}
      <div class="picture" @pointerleave=${this.leave}>
        <svg width=${drawing.width} height=${drawing.height} viewBox="0 0 ${drawing.width} ${drawing.height}" role="img" aria-label=${drawing.title}>
          ${guard([drawing], () => drawn(drawing))} ${cursor === null ? nothing : cursorShapes(plan, result, picture!, cursor)}
        </svg>
        <div class="surface" role="slider" tabindex="0" aria-label="point of the sweep" aria-describedby="summary" aria-valuemin="0" aria-valuemax=${plan.points - 1} aria-valuenow=${cursor ?? 0} aria-valuetext=${cursor === null ? 'not reading; press an arrow key' : this.readingText(cursor)}
          @keydown=${this.key} @pointermove=${this.point} @pointerdown=${this.press}></div>
      </div>
      ${this.renderReading()}
      ${two ? nothing : this.renderKey()}
      <p id="summary" class="faint">${drawing.description}</p>
      ${result.notes.map((note) => html`<p class="doc">${note}</p>`)}
      ${gapLines(plan, result).map((line) => html`<p class="wrong">${line}</p>`)}
      <div class="row"><button type="button" @click=${() => this.save('.csv')}>CSV</button><button type="button" @click=${() => this.save('.svg')}>SVG</button></div>
      ${this.renderTable()}
    </div>`;
  }

  private readingText(index: number): string {
    const { plan } = this.asked!;
    return `${placeWords(plan, index)}: ${plan.figures.map(({ words }, f) => `${words} ${figureText(this.swept!, f, index)}`).join(', ')}`;
  }

  private renderReading(): TemplateResult {
    const { plan } = this.asked!;
    const { cursor } = this;
    if (cursor === null) return html`<p class="reading faint">Point at the picture, or use the arrow keys, to read a point; click or Enter puts it on the plate.</p>`;
    const { words } = plan.figures[this.shown];
    return html`<div class="row reading"><span aria-hidden="true"><b>${placeWords(plan, cursor)}</b>${plan.axes.length === 2 ? html` ${words} <b>${figureText(this.swept!, this.shown, cursor)}</b>` : nothing}</span>
      <button type="button" ?disabled=${this.stale} @click=${() => this.put(cursor)}>Put it into the design</button></div>`;
  }

  /** The curves with their lines, and what each is at the point that is read. */
  private renderKey(): TemplateResult {
    const style = styleOf(this.styleName);
    return html`<ol class="key">${this.asked!.plan.figures.map(({ words }, i) => {
      const { dash, width, color } = lineCode(i, style);
      return html`<li><svg width="36" height="10" aria-hidden="true">${svg`<line x1="0" x2="36" y1="5" y2="5" stroke=${color} stroke-width=${width} stroke-dasharray=${dash ?? nothing}></line>`}</svg><b>${i + 1}</b><span>${words}</span><span>${this.cursor === null ? nothing : figureText(this.swept!, i, this.cursor)}</span></li>`;
    })}</ol>`;
  }

  private renderTable(): TemplateResult {
    const { plan } = this.asked!;
    const result = this.swept!;
    const rows = Math.min(plan.points, MOST_ROWS);
    const heading = (words: string, unit: string): TemplateResult => html`<th scope="col">${unit === '' ? words : `${words} (${unit})`}</th>`;
    return html`<details><summary>Figures as a table, ${rows < plan.points ? `the first ${rows} of ${plan.points} points; the CSV has them all` : `${rows} points`}</summary>
      <div class="scroll" role="region" aria-label="Figures of the sweep, table" tabindex="0"><table>
        <thead><tr>${plan.axes.map(({ place, unit }) => heading(place.words, unit))}${plan.figures.map(({ words, unit }) => heading(words, unit))}</tr></thead>
        <tbody>${guard([this.resultOf], () => Array.from({ length: rows }, (_, k) => html`<tr>${placeOf(plan, k).map(({ axis, at }, a) => (a === 0 ? html`<th scope="row">${withUnit(axis.values[at], '')}</th>` : html`<td>${withUnit(axis.values[at], '')}</td>`))}${plan.figures.map((_f, f) => html`<td>${result.figures[f].values[k] === null ? figureText(result, f, k) : withUnit(result.figures[f].values[k]!, '')}</td>`)}</tr>`))}</tbody>
      </table></div></details>`;
  }
}

customElements.define('hm-sweeps', HmSweeps);

declare global {
  interface HTMLElementTagNameMap {
    'hm-sweeps': HmSweeps;
  }
}
