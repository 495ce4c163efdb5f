import { LitElement, html, nothing, svg, type PropertyValues, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import { drawMarginPlot, lineCode } from '../../src/drawing/margin-plot.ts';
import type { Drawing } from '../../src/drawing/shapes.ts';
import { styleOf } from '../../src/drawing/styles.ts';
import { limitWords, writtenLimits } from '../../src/requirements/limits.ts';
import type { LookedAt, SearchedRange, SizedAnswer } from '../../src/requirements/size.ts';
import { unansweredWords, verdictWords } from '../../src/requirements/verdict.ts';
import type { Tolerances } from '../../src/requirements/uncertainties.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import { sizingBasis, textWithin } from '../../src/requirements/sized-value.ts';
import { makeVariable, setVariable, textAtPlace } from '../../src/state/commands/index.ts';
import { bestFigures, sizingFigures, type PanelFigure } from '../../src/workings/panel-figures.ts';
import type { RequirementAsked } from '../../src/workings/requirement-workings.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import { JobController } from '../hm-desk/job-controller.ts';
import '../hm-field/hm-field.ts';
import { drawn } from '../shared/drawn.ts';
import { tell } from '../shared/events.ts';
import { figureAt, how, howLook, sentenceWith } from '../shared/how.ts';
import { look } from '../shared/look.ts';
import { panelLook, verdictLook } from '../shared/panel-look.ts';
import { tableLook } from '../shared/table-look.ts';
import { unitOf } from '../shared/typed-text.ts';
import { WidthController } from '../shared/width-controller.ts';
import { cautionList, widerRemark } from './best-remarks.ts';
import { choiceOptions, likelyVariable, nameForPlace, rangeAbout, type ChoiceOption } from './sizing-choices.ts';
import { saveSizing, type SizingFile } from './sizing-files.ts';
import { marginTable, pictureOf, type Known } from './sizing-picture.ts';
import type { SizingView } from './sizing-view.ts';
import { blockerWords, edgeWords, marginLine, outcomeWords } from './sizing-words.ts';
import { WiderJudging } from './wider-judging.ts';
import { styles } from './hm-sizing.styles.ts';

const LEAST_WIDTH = 320;
/** px of an exported picture, for a slide of 16 to 9. */
const SLIDE = [1280, 720] as const;

/**
 * Sizing: the values of one variable at which every requirement is met in its worst case. The margins are drawn against the variable; what closes each interval
 * is said; the best value, or any other, is put into the design.
 *
 * @fires hm-edit  another range, a variable made of a value of the stack, a value put into the design
 * @fires hm-view  { sizing: SizingView }
 * @fires hm-say
 */
export class HmSizing extends LitElement {
  static override styles = [look, panelLook, verdictLook, tableLook, howLook, styles];
  static override properties = {
    design: { attribute: false },
    complaints: { attribute: false },
    view: { attribute: false },
    run: { attribute: false },
    wish: { attribute: false },
    styleName: {},
    key: { state: true },
    ends: { state: true },
    other: { state: true },
  };

  declare design: Design | null;
  declare complaints: readonly Complaint[];
  declare view: SizingView;
  declare run: RunJob | null;
  /** the requirement that is asked about, from a press beside it */ declare wish: { requirement: number; wish: number } | null;
  declare styleName: 'light' | 'dark';
  /** key of the choice in the menu; null: what the view remembers */ declare private key: string | null;
  /** range typed for a value that is no variable yet */ declare private ends: [string, string] | null;
  /** what was last searched: a range about the value stays when a found value is put in */ private searched: { name: string; ends: [string, string] } | null = null;
  /** value typed to be put into the design; null: the best one */ declare private other: string | null;

  private readonly job = new JobController(this, 'size');
  private readonly wider = new WiderJudging(this);
  private readonly box = new WidthController(this);

  constructor() {
    super();
    this.design = null;
    this.complaints = [];
    this.view = {};
    this.run = null;
    this.wish = null;
    this.styleName = 'light';
    this.key = null;
    this.ends = null;
    this.other = null;
  }

  protected override willUpdate(changed: PropertyValues<this>): void {
    const { value } = this.job;
    this.wider.follow(this.run, value, () => {
      const best = value?.value.kind === 'sized' ? this.putText(value.value) : null;
      return best === null || value?.value.kind !== 'sized' ? null : { design: value.input.design, variable: value.value.variable, text: best, counted: this.counted };
    });
    const row = this.wish === null ? undefined : this.design?.requirements?.[this.wish.requirement];
    if (!changed.has('wish') || row === undefined) return;
    const name = likelyVariable(this.design!, row.of);
    if (name !== null) this.key = `v ${name}`;
  }

  /** What is chosen: as pressed here, else as remembered, else the first variable with a range, else anything. */
  private chosen({ variables, places }: { variables: ChoiceOption[]; places: ChoiceOption[] }): ChoiceOption | undefined {
    const all = [...variables, ...places];
    const ranged = variables.find(({ choice }) => choice.kind === 'variable' && this.variable(choice.name)?.range !== undefined);
    return all.find(({ key }) => key === this.key) ?? all.find(({ key }) => key === `v ${this.view.variable}`) ?? ranged ?? all[0];
  }

  private variable(name: string) {
    return this.design!.variables?.find((row) => row.name === name);
  }

  private choose(key: string): void {
    this.key = key;
    this.ends = null;
    if (key.startsWith('v ')) this.remember({ variable: key.slice(2) });
  }

  private remember(change: SizingView): void {
    this.view = { ...this.view, ...change };
    tell(this, 'hm-view', { change: { sizing: this.view } });
  }

  /** The texts of the range to search. */
  private range({ choice }: ChoiceOption): [string, string] {
    if (choice.kind === 'place') return this.ends ?? rangeAbout(textAtPlace(this.design!, choice.place) ?? '') ?? ['', ''];
    const row = this.variable(choice.name);
    const searched = this.searched?.name === choice.name ? this.searched.ends : undefined;
    return row?.range ?? searched ?? rangeAbout(row?.value ?? '') ?? ['', ''];
  }

  private setEnd(option: ChoiceOption, end: 0 | 1, text: string): void {
    const ends: [string, string] = [...this.range(option)];
    ends[end] = text;
    const { choice } = option;
    if (choice.kind === 'place') this.ends = ends;
    else tell(this, 'hm-edit', { next: setVariable(this.design!, this.design!.variables!.findIndex(({ name }) => name === choice.name), { range: ends }), label: `range of ${choice.name}` });
  }

  private find(option: ChoiceOption): void {
    const { choice } = option;
    const [from, to] = this.range(option);
    let design = this.design!;
    let name = choice.kind === 'variable' ? choice.name : '';
    if (choice.kind === 'place') {
      name = nameForPlace(design, choice.place);
      design = makeVariable(design, choice.place, name, { range: [from, to] });
      tell(this, 'hm-edit', { next: design, label: `variable ${name} made of a value` });
      tell(this, 'hm-say', { text: `${name} now stands for that value in the stack.` });
      this.choose(`v ${name}`);
    }
    this.other = null;
    this.searched = { name, ends: [from, to] };
    void this.job.start(this.run!, { design, options: { variable: name, from, to, ...(this.view.scale === undefined ? {} : { scale: this.view.scale }), ...(this.view.tolerances === undefined ? {} : { tolerances: this.view.tolerances }) } });
  }

  private put(name: string, text: string): void {
    const index = this.design!.variables?.findIndex((row) => row.name === name) ?? -1;
    if (index < 0) return;
    tell(this, 'hm-edit', { next: setVariable(this.design!, index, { value: text }), label: `${name} as sized` });
    tell(this, 'hm-say', { text: `${name} is ${text} now.` });
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    const options = choiceOptions(this.design);
    const option = this.chosen(options);
    if (writtenLimits(this.design).length === 0) return html`<p>A size is found for what the design has to meet: give it a requirement first, under Requirements.</p>`;
    if (option === undefined) return html`<p>There is nothing to size: give a layer a thickness or a dopant.</p>`;
    return html`${this.renderWish()} ${this.renderAsk(options, option)} ${this.renderState()} ${this.renderFound()}`;
  }

  private renderWish(): TemplateResult | typeof nothing {
    const limits = writtenLimits(this.design!);
    const at = limits.findIndex(({ row }) => row === this.wish?.requirement);
    if (at < 0) return nothing;
    return html`<p>For requirement ${at + 1}, ${limitWords(limits[at])}${limits.length > 1 ? '; the others are kept as well' : ''}.</p>`;
  }

  private renderAsk({ variables, places }: { variables: ChoiceOption[]; places: ChoiceOption[] }, option: ChoiceOption): TemplateResult {
    const [from, to] = this.range(option);
    const running = this.job.progress !== null;
    const unit = unitOf(from) ?? unitOf(to) ?? '';
    const { choice } = option;
    const make = choice.kind === 'place' ? `Make it a variable and find its values` : 'Find the values that meet everything';
    const item = ({ key, text }: ChoiceOption): TemplateResult => html`<option .value=${key} .selected=${key === option.key}>${text}</option>`;
    return html`<div class="ask" role="group" aria-label="What to size">
      <label>Size <select @change=${(e: Event) => this.choose((e.target as HTMLSelectElement).value)}>
        ${variables.length === 0 ? nothing : html`<optgroup label="variables">${variables.map(item)}</optgroup>`}
        ${places.length === 0 ? nothing : html`<optgroup label="values, to be made variables">${places.map(item)}</optgroup>`}
      </select></label>
      <hm-field label="from" .unit=${unit} .value=${from} .complaint=${this.complaint('--from')} @field-accept=${(e: CustomEvent<string>) => this.setEnd(option, 0, e.detail)}></hm-field>
      <hm-field label="to" .unit=${unit} .value=${to} .complaint=${this.complaint('--to')} @field-accept=${(e: CustomEvent<string>) => this.setEnd(option, 1, e.detail)}></hm-field>
      <label>by <select @change=${(e: Event) => this.remember({ scale: ({ log: 'log', linear: 'linear' } as const)[(e.target as HTMLSelectElement).value] })}>
        <option value="" .selected=${this.view.scale === undefined}>what suits it</option>
        <option value="log" .selected=${this.view.scale === 'log'}>decades</option>
        <option value="linear" .selected=${this.view.scale === 'linear'}>even steps</option>
      </select></label>
      <label>within <select @change=${(e: Event) => this.remember({ tolerances: ({ stated: 'stated', none: 'none' } as const)[(e.target as HTMLSelectElement).value] })}>
        <option value="" .selected=${this.view.tolerances === undefined}>all tolerances</option>
        <option value="stated" .selected=${this.view.tolerances === 'stated'}>those that the design states</option>
        <option value="none" .selected=${this.view.tolerances === 'none'}>no tolerance</option>
      </select></label>
      <button type="button" class="go" ?disabled=${running} @click=${() => this.find(option)}>${make}</button>
    </div>`;
  }

  /** What the last search found wrong with this end. */
  private complaint(path: string): string | null {
    const { value } = this.job;
    if (value?.value.kind !== 'complaints' || this.job.progress !== null) return null;
    return value.value.complaints.find((c) => c.path === path)?.message ?? null;
  }

  /** One element that stays, so that what becomes of a search is spoken. */
  private renderState(): TemplateResult {
    const { progress, value } = this.job;
    const answer = progress === null && value?.value.kind === 'sized' ? value.value : null;
    return html`<p class=${answer === null || this.job.status === 'error' ? 'state' : `state outcome ${this.stale ? 'stale' : ''}`} role="status">${this.said(answer)}</p>
      ${progress === null
        ? this.renderWrong()
        : html`<p class="row"><progress aria-label="Searching" max=${progress.of} .value=${progress.done}></progress> ${progress.done} solves of about ${progress.of}. <button type="button" @click=${() => this.job.stop()}>Stop</button></p>`}`;
  }

  private said(answer: SizedAnswer | null): string {
    const { progress, status, reason, value } = this.job;
    if (progress !== null) return 'Searching. The margins below are those of the corners that are known so far.';
    if (status === 'error') return `${reason}${answer === null ? '' : ' What stands below was found before.'}`;
    if (answer !== null) return `${this.recounted ? 'Found within other tolerances: find the values again. ' : this.stale ? 'Found for the design before the last change: find the values again. ' : ''}${outcomeWords(answer)}`;
    return value === null ? 'Each value is judged in the worst case, over temperatures and tolerances: that takes a few hundred solves.' : '';
  }

  private renderWrong(): TemplateResult | typeof nothing {
    const { value } = this.job;
    if (value?.value.kind !== 'complaints') return nothing;
    const rest = value.value.complaints.filter(({ path }) => path !== '--from' && path !== '--to');
    return html`<div role="alert">${rest.map(({ path, message }) => html`<p class="wrong">${/\.range$/.test(path) ? 'The range' : path}: ${message}.</p>`)}</div>`;
  }

  /** What was found belongs to another design than the one on the page. */
  private get stale(): boolean {
    const { value } = this.job;
    return value?.value.kind === 'sized' && (this.recounted || sizingBasis(value.input.design, value.value.variable) !== sizingBasis(this.design!, value.value.variable));
  }

  /** What is known: the answer, or what a running search has looked at so far. */
  private renderFound(): TemplateResult | typeof nothing {
    const { progress, value, input, seen } = this.job;
    if (progress !== null && input !== null) {
      const range = seen.find((piece): piece is SearchedRange => !('value' in piece));
      const looks = seen.filter((piece): piece is LookedAt => 'value' in piece);
      // The last look at a value counts: later ones know more corners.
      const scan = [...new Map(looks.map((point) => [point.value, point])).values()];
      if (range === undefined || scan.length < 2) return nothing;
      return html`<div class="found">${this.renderPicture({ ...range, scan }, input.design)}</div>`;
    }
    if (value?.value.kind !== 'sized') return nothing;
    const answer = value.value;
    const { design } = value.input;
    const { stale } = this;
    return html`<div class="found ${stale ? 'stale' : ''}">
      <div class="sides">
        <div>${this.renderPicture(answer, design)} ${this.renderFiles(answer, design)}</div>
        <div>${this.renderIntervals(answer, design)} ${this.renderKey(answer, design)} ${stale ? nothing : this.renderPut(answer)}</div>
      </div>
      ${this.renderNotes(answer)} ${this.renderTable(answer, design)}
    </div>`;
  }

  /** @param design  whose requirements were asked for; the value that the variable has is that of the page's design */
  private picture(known: Known, design: Design, width: number, height: number): Drawing {
    const picture = pictureOf(known, { ...design, variables: this.design!.variables ?? [] }, this.wish?.requirement ?? null);
    return drawMarginPlot(picture, { width, height, style: this.styleName, prefix: 'sizing' });
  }

  private renderPicture(known: Known, design: Design): TemplateResult {
    const width = Math.max(LEAST_WIDTH, this.pictureWidth);
    const height = Math.round(Math.min(400, Math.max(260, 0.5 * width)));
    const d = this.picture(known, design, width, height);
    return html`<svg class="picture" width=${width} height=${height} viewBox="0 0 ${width} ${height}" role="img" aria-label=${d.description}>${drawn(d)}</svg>`;
  }

  private renderFiles(answer: SizedAnswer, design: Design): TemplateResult {
    const save = async (ending: SizingFile): Promise<void> => {
      const { name, outcome } = await saveSizing(ending, answer, design, () => this.picture(answer, design, ...SLIDE));
      if (outcome !== 'given up') tell(this, 'hm-say', outcome === null ? { text: `${name} could not be written.`, urgent: true } : { text: `${name} written.` });
    };
    const button = (ending: SizingFile, words: string): TemplateResult => html`<button type="button" @click=${() => save(ending)}>${words}<span class="spoken">, margins against ${answer.variable}</span></button>`;
    return html`<p class="row">${button('.svg', 'SVG')} ${button('.png', 'PNG')} ${button('.csv', 'CSV')}</p>`;
  }

  private get pictureWidth(): number {
    const { width } = this.box;
    return width > 1000 ? Math.round(0.62 * width) : width;
  }

  /** Other tolerances are to count than those that it was found with. */
  private get recounted(): boolean {
    return (this.view.tolerances ?? 'all') !== this.counted;
  }

  /** Which tolerances the answer was found with. */
  private get counted(): Tolerances {
    return this.job.value?.input.options.tolerances ?? 'all';
  }

  private renderIntervals(answer: SizedAnswer, design: Design): TemplateResult | typeof nothing {
    const { intervals } = answer;
    if (intervals.length === 0) return nothing;
    const figures = sizingFigures(design, answer, this.counted);
    const end = (i: number, column: 'from' | 'to'): TemplateResult => {
      const figure = figures.find(({ asked }) => asked.column === column && asked.index === i)!;
      return html`<li>${sentenceWith(edgeWords(intervals[i][column], column === 'from' ? 'below' : 'above'), figure)}</li>`;
    };
    return html`<h3>What ends it</h3><ul>${intervals.flatMap((_, i) => [end(i, 'from'), end(i, 'to')])}</ul>`;
  }

  private renderKey(answer: SizedAnswer, design: Design): TemplateResult {
    const style = styleOf(this.styleName);
    const { best, blockers } = answer;
    const against = new Map(blockerWords(answer).map(({ index, words }) => [index, words]));
    const heading = best === null ? 'The requirements' : `At ${best.text}${blockers.length > 0 ? ', the nearest' : ', the best'}`;
    const rows = bestFigures(design, answer, this.counted);
    return html`<h3>${sentenceWith(heading, figureAt(sizingFigures(design, answer, this.counted), 'best'))}</h3>
      <ol>${writtenLimits(design).map((limit, i) => {
        const { dash, width, color } = lineCode(i, style);
        const row = best?.requirements[i];
        return html`<li class=${limit.row === this.wish?.requirement ? 'asked' : ''}>
          <svg width="36" height="10" aria-hidden="true">${svg`<line x1="0" x2="36" y1="5" y2="5" stroke=${color} stroke-width=${width} stroke-dasharray=${dash ?? nothing}></line>`}</svg>
          <span><b>${i + 1}</b> ${rows[i] === undefined ? limitWords(limit) : sentenceWith(limitWords(limit), figureAt(rows[i], 'limit'), typeof limit.limit === 'string' ? limit.limit : '')}${row === undefined ? nothing : html`<span class="line ${row.met ? 'met' : 'not-met'}">${this.renderMargin(row, rows[i])}</span>`}${against.has(i) ? html`<span class="line">${against.get(i)}</span>` : nothing}</span>
        </li>`;
      })}</ol>`;
  }

  /** As marginLine says it, each figure to be asked. */
  private renderMargin(row: RequirementResult, figures: readonly PanelFigure<RequirementAsked>[]): TemplateResult {
    const figure = (column: RequirementAsked['column']): unknown => {
      const found = figureAt(figures, column);
      return found === null ? nothing : how(found);
    };
    if (figureAt(figures, 'margin') === null) return html`${marginLine(row)}`;
    return html`${verdictWords(row)}, ${figure('margin')}: worst ${figure('worst')}${row.at === null ? nothing : html` at ${figure('corner')}`}${row.unanswered === null ? nothing : `; ${unansweredWords(row, ['corner', 'corners'])}`}`;
  }

  /** The best value as it is put into the design. */
  private putText(answer: SizedAnswer): string | null {
    const { best, intervals } = answer;
    if (best === null) return null;
    const home = intervals.find(({ from, to }) => best.value >= from.value && best.value <= to.value);
    return textWithin(answer, best.value, home === undefined ? [answer.from, answer.to] : [home.from.value, home.to.value]);
  }

  private renderPut(answer: SizedAnswer): TemplateResult | typeof nothing {
    const { variable, best } = answer;
    const text = this.putText(answer);
    if (best === null || text === null) return nothing;
    const { rows, running } = this.wider;
    const other = this.other ?? '';
    return html`<h3>Put into the design</h3>
      <p class="put"><button type="button" @click=${() => this.put(variable, text)}>${variable} = ${text}</button></p>
      <div role="status">${rows === null ? (running ? html`<p class="doc">Being judged with all tolerances.</p>` : nothing) : widerRemark(text, rows)}</div>
      ${cautionList(best.text, best.cautions)}
      <p class="put"><hm-field label="or another value" .hint=${text} .unit=${unitOf(text) ?? ''} .value=${other} @field-accept=${(e: CustomEvent<string>) => (this.other = e.detail)}></hm-field>
        <button type="button" ?disabled=${other === ''} @click=${() => this.put(variable, other)}>Put it in</button></p>`;
  }

  private renderNotes({ intervals, confirmed, refusal, resolution, evaluations }: SizedAnswer): TemplateResult {
    return html`<p class="doc">
      ${confirmed ? (intervals.length > 0 ? 'Ends, values inside and the best one were judged in full.' : 'The nearest was judged in full.') : 'Not confirmed: a worse corner turned up at the last judgement; narrow the range.'}
      An interval narrower than ${Number((100 * resolution).toPrecision(2))} % of the range can have been missed. ${evaluations} solves.
      ${refusal === null ? nothing : html`Some values have no answer: ${refusal}.`}
    </p>`;
  }

  private renderTable(answer: SizedAnswer, design: Design): TemplateResult {
    const { headings, rows } = marginTable(answer, design);
    return html`<details>
      <summary>Margins as a table, ${rows.length} values</summary>
      <div class="scroll" role="region" aria-label="Margins, figures" tabindex="0">
        <table><thead><tr>${headings.map((heading) => html`<th scope="col">${heading}</th>`)}</tr></thead>
        <tbody>${rows.map(([first, ...rest]) => html`<tr><th scope="row">${first}</th>${rest.map((cell) => html`<td>${cell}</td>`)}</tr>`)}</tbody></table>
      </div>
    </details>`;
  }
}

customElements.define('hm-sizing', HmSizing);

declare global {
  interface HTMLElementTagNameMap {
    'hm-sizing': HmSizing;
  }
}
