import { LitElement, html, nothing, svg, type PropertyValues, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import { requirementQuantity, type RequirementQuantityName } from '../../src/design/requirement-quantities.ts';
import type { Design, Requirement } from '../../src/design/types.ts';
import { quantityOf, quantityWords } from '../../src/requirements/limits.ts';
import { standingWords, verdictWords } from '../../src/requirements/verdict.ts';
import { MOBILITY_NOTE, restsOnMobility } from '../../src/result/mobility-note.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import { requirementFigures } from '../../src/workings/panel-figures.ts';
import { addRequirement, removeRequirement, setRequirement, setRequirementQuantity } from '../../src/state/commands/index.ts';
import { complaintAt, complaintsWithin } from '../shared/complaint-at.ts';
import { tell } from '../shared/events.ts';
import { figureAt, how, howLook } from '../shared/how.ts';
import { look } from '../shared/look.ts';
import { panelLook } from '../shared/panel-look.ts';
import { settledChoice } from '../shared/settled-choice.ts';
import '../hm-field/hm-field.ts';
import { TURNS, boundsOf, firstLimit, fitting, marginShare, quantityGroups, targetsOf, turned } from './requirement-parts.ts';
import { styles } from './hm-requirements.styles.ts';

/** How it stands with judging. */
export interface Verdicts {
  status: 'initial' | 'pending' | 'complete' | 'error';
  /** of the last run, a row a limit */ rows: readonly RequirementResult[];
  /** the rows belong to an earlier design */ stale: boolean;
  progress: { done: number; of: number } | null;
  /** why there are no newer ones, in words */ reason: string | null;
}

export const NO_VERDICTS: Verdicts = { status: 'initial', rows: [], stale: false, progress: null, reason: null };

function overRange({ over: _, ...rest }: Requirement, ranges: boolean): Requirement {
  return ranges ? { ...rest, over: 'temperatureRange' } : rest;
}

/** A figure and its unit stay on one line. */
const unbroken = (words: string): string => words.replace(/(\d) (?=%|[a-zA-Zµ])/g, '$1\u00a0');

const value = (event: Event): string => (event.target as HTMLSelectElement).value;

/**
 * The requirements, each a sentence that can be edited: what, of which part, at most or at least how much, at which temperatures. Beside it the worst case over
 * temperatures and tolerances, the margin as a bar and in words, met or not.
 *
 * @fires hm-edit
 * @fires hm-size  a variable is to be sized so that this requirement is met
 * @fires hm-act   'judge-stop', 'judge-again'
 */
export class HmRequirements extends LitElement {
  static override styles = [look, panelLook, howLook, styles];
  static override properties = { design: { attribute: false }, complaints: { attribute: false }, verdicts: { attribute: false }, draft: { state: true } };

  declare design: Design | null;
  declare complaints: readonly Complaint[];
  declare verdicts: Verdicts;
  /** the one to be added */ declare private draft: Requirement;

  constructor() {
    super();
    this.design = null;
    this.complaints = [];
    this.verdicts = NO_VERDICTS;
    this.draft = { quantity: 'contactResistivity', of: 'top', ...firstLimit('contactResistivity') };
  }

  protected override willUpdate(changed: PropertyValues<this>): void {
    if (!changed.has('design') || this.design === null) return;
    // What a design is to bear belongs to its whole temperature range, once it has one.
    const ranges = (design: Design | null | undefined): boolean => design?.conditions.temperatureRange !== undefined;
    if (ranges(this.design) !== ranges(changed.get('design'))) this.draft = overRange(this.draft, ranges(this.design));
    // The layer that it was for may have gone or have another name.
    const { draft } = this;
    const targets = targetsOf(this.design, draft.quantity as RequirementQuantityName);
    if (targets.length > 0 && !targets.some((target) => target.value === draft.of)) this.draft = { ...draft, of: targets[0].value };
  }

  private edit(i: number, change: Partial<Requirement>, label: string): void {
    tell(this, 'hm-edit', { next: setRequirement(this.design!, i, change), label });
  }

  private ask(i: number, requirement: Requirement, quantity: RequirementQuantityName): void {
    const instead = fitting(this.design!, requirement, quantity);
    if (instead !== null) tell(this, 'hm-edit', { next: setRequirementQuantity(this.design!, i, quantity, instead), label: `quantity of a requirement` });
  }

  private add(): void {
    tell(this, 'hm-edit', { next: addRequirement(this.design!, this.draft), label: 'new requirement' });
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    const { requirements = [] } = this.design;
    let at = 0;
    return html`${requirements.length === 0 ? html`<p>None yet. A requirement is held in its worst case: over the temperature range, if you say so, and over all tolerances.</p>` : nothing}
      ${this.renderState(requirements.length)}
      <ol class=${this.verdicts.stale ? 'stale' : ''}>
        ${requirements.map((requirement, i) => {
          const count = boundsOf(requirement).length;
          const first = at;
          const rows = this.verdicts.rows.slice(at, (at += count));
          return this.renderRequirement(requirement, i, first, rows.every((row) => row.quantity === requirement.quantity && row.of === requirement.of) ? rows : []);
        })}
      </ol>
      ${requirements.length === 0 ? nothing : html`<p class="doc">Bars: the limit in the middle, met to the right of it; half a bar is a factor of ten, or a difference as large as the limit.</p>`}
      ${requirements.some(({ quantity, over }) => over === 'temperatureRange' && restsOnMobility(quantity)) ? html`<p class="doc">${MOBILITY_NOTE}</p>` : nothing}
      ${this.renderAdd()}`;
  }

  /** One element that stays, so that a verdict is spoken when it comes; the rest stands beside it. */
  private renderState(count: number): TemplateResult | typeof nothing {
    const { status, progress } = this.verdicts;
    if (count === 0) return nothing;
    const act = (name: 'judge-stop' | 'judge-again', words: string): TemplateResult => html`<button type="button" @click=${() => tell(this, 'hm-act', { act: name })}>${words}</button>`;
    return html`<div class="state">
      <p role="status">${this.said()}</p>
      ${progress === null ? nothing : html`<progress aria-label="Judging" max=${progress.of} .value=${progress.done}></progress> ${act('judge-stop', 'Stop')}`}
      ${progress === null && status === 'error' ? act('judge-again', 'Judge again') : nothing}
    </div>`;
  }

  private said(): string {
    const { status, progress, stale, reason, rows } = this.verdicts;
    const older = stale ? ' Verdicts are of the stack before the last change.' : '';
    if (progress !== null) return `Judging the worst case.${older}`;
    if (status === 'error') return `${reason}${older}`;
    if (status !== 'complete') return `Not judged yet.${older}`;
    const met = rows.filter((row) => row.met).length;
    const count = met < rows.length ? `${met} of ${rows.length} met` : met === 1 ? 'The only one is met' : `All ${met} met`;
    return `${count}, judged in the worst case over temperatures and tolerances.`;
  }

  private renderRequirement(requirement: Requirement, i: number, first: number, rows: readonly RequirementResult[]): TemplateResult {
    const name = quantityWords(requirement);
    const path = `requirements[${i}]`;
    const wrong = complaintsWithin(this.complaints, path, [`${path}.max`, `${path}.min`]);
    const unmet = rows.some((row) => !row.met);
    return html`<li>
      <div class="sentence" role="group" aria-label="Requirement ${i + 1}: ${name}">
        <span class="number" aria-hidden="true">${i + 1}</span>
        ${this.renderQuantity(requirement, (quantity) => this.ask(i, requirement, quantity))}
        ${this.renderOf(requirement, (of) => this.edit(i, { of }, `place of a requirement`))}
        ${boundsOf(requirement).map((bound) => this.renderLimit(requirement, bound, complaintAt(this.complaints, `${path}.${bound}`), (change) => this.edit(i, change, `limit of ${name}`)))}
        ${this.renderOver(requirement, (over) => this.edit(i, { over }, 'temperatures of a requirement'))}
      </div>
      <div class="outcome">${wrong.map((message) => html`<p class="wrong">${message}</p>`)} ${rows.map((row, r) => this.renderVerdict(row, first + r, rows.length > 1))}
        ${unmet && !this.verdicts.stale ? html`<button type="button" class="size" @click=${() => tell(this, 'hm-size', { requirement: i })}>Size a variable to meet this<span class="spoken">: ${name}</span></button>` : nothing}
      </div>
      <div>
        <button type="button" @click=${() => tell(this, 'hm-edit', { next: removeRequirement(this.design!, i), label: `requirement ${name} taken out` })}>Take out<span class="spoken">: ${name}</span></button>
      </div>
    </li>`;
  }

  private renderQuantity(requirement: Requirement, choose: (quantity: RequirementQuantityName) => void): TemplateResult {
    const known = quantityOf(requirement.quantity) !== null;
    const { change, keydown, blur } = settledChoice(requirement.quantity, (name) => choose(name as RequirementQuantityName));
    return html`<select aria-label="Quantity" @change=${change} @keydown=${keydown} @blur=${blur}>
      ${known ? nothing : html`<option .value=${requirement.quantity} selected>${requirement.quantity} (unknown)</option>`}
      ${quantityGroups().map(
        ({ of, quantities }) => html`<optgroup label="of a ${of}">${quantities.map(({ name, words }) => html`<option value=${name} .selected=${name === requirement.quantity}>${words}</option>`)}</optgroup>`,
      )}
    </select>`;
  }

  private renderOf(requirement: Requirement, choose: (of: string) => void): TemplateResult {
    const known = quantityOf(requirement.quantity);
    const targets = known === null ? [] : targetsOf(this.design!, known.name);
    const there = targets.some((target) => target.value === requirement.of);
    return html`<span>of</span> <select aria-label="of" @change=${(e: Event) => choose(value(e))}>
      ${there ? nothing : html`<option .value=${requirement.of} selected>${requirement.of} (not there)</option>`}
      ${targets.map((target) => html`<option .value=${target.value} .selected=${target.value === requirement.of}>${target.text}</option>`)}
    </select>`;
  }

  private renderLimit(requirement: Requirement, bound: 'max' | 'min', complaint: string | null, change: (change: Partial<Requirement>) => void): TemplateResult {
    const limit = requirement[bound]!;
    const flag = typeof limit === 'boolean';
    const turns = TURNS.filter((turn) => turn.bound === bound || requirement[turn.bound] === undefined);
    return html`<select aria-label="Limit is" @change=${(e: Event) => change(turned(requirement, bound, value(e) as 'max' | 'min'))}>
        ${turns.map((turn) => html`<option value=${turn.bound} .selected=${turn.bound === bound}>${flag ? turn.flag : turn.words}</option>`)}
      </select>
      ${flag
        ? complaint === null ? nothing : html`<p class="wrong">${complaint}</p>`
        : html`<hm-field label-hidden .label=${bound === 'max' ? 'At most' : 'At least'} .unit=${quantityOf(requirement.quantity)?.unit ?? ''} .value=${limit} .complaint=${complaint} @field-accept=${(e: CustomEvent<string>) => change({ [bound]: e.detail })}></hm-field>`}`;
  }

  private renderOver(requirement: Requirement, choose: (over: Requirement['over']) => void): TemplateResult {
    const { temperature, temperatureRange } = this.design!.conditions;
    const ranges = requirement.over === 'temperatureRange';
    return html`<select aria-label="Temperatures" @change=${(e: Event) => choose(value(e) === 'range' ? 'temperatureRange' : undefined)}>
      <option value="one" .selected=${!ranges}>at ${temperature}</option>
      ${temperatureRange === undefined && !ranges ? nothing : html`<option value="range" .selected=${ranges}>${temperatureRange === undefined ? 'over a range that is not given' : `from ${temperatureRange[0]} to ${temperatureRange[1]}`}</option>`}
    </select>`;
  }

  /** @param index  among the limits of the design */
  private renderVerdict(row: RequirementResult, index: number, named: boolean): TemplateResult {
    const verdict = verdictWords(row);
    const share = marginShare(row);
    const figures = requirementFigures(this.design!, row, index);
    // Of an earlier design's rows the corner is no longer here to be solved.
    const shown = (column: (typeof figures)[number]['asked']['column']): unknown => {
      const figure = figureAt(figures, column);
      return figure === null ? nothing : this.verdicts.stale ? unbroken(figure.text) : how(figure, { content: unbroken(figure.text) });
    };
    const worst = figureAt(figures, 'worst') === null || row.at === null ? nothing : html`worst ${shown('worst')} at ${shown('corner')}`;
    const points = row.unanswered?.points ?? 0;
    return html`<div class="verdict ${verdict.replace(' ', '-')}">
      ${share === null ? html`<span class="bar"></span>` : html`<svg class="bar" viewBox="-51 0 102 12" width="102" height="12" aria-hidden="true">${svg`<path d="M-50 6H50M-50 3V9M50 3V9" stroke="currentColor" fill="none" opacity="0.5"></path><rect x=${Math.min(0, 50 * share)} y="3" width=${Math.max(1, Math.abs(50 * share))} height="6" fill="currentColor"></rect><path d="M0 0V12" class="limit" fill="none"></path>`}</svg>`}
      <span><strong>${verdict}</strong>${named ? ` (${row.bound === 'max' ? 'at most' : 'at least'})` : ''}, ${figureAt(figures, 'margin') === null ? standingWords(row) : shown('margin')}; limit ${shown('limit')}</span>
      <span class="worst">${worst}${row.corners_sufficed ? '' : '; worse inside the ranges than at their corners'}${row.unanswered === null ? '' : html`${worst === nothing ? '' : '; '}<b>no answer at ${points} ${points === 1 ? 'corner' : 'corners'}</b>, first at ${unbroken(row.unanswered.words)}: ${row.unanswered.reason}`}</span>
    </div>`;
  }

  private renderAdd(): TemplateResult {
    const { draft } = this;
    const quantity = draft.quantity as RequirementQuantityName;
    const change = (part: Partial<Requirement>): void => {
      const next = { ...this.draft, ...part };
      for (const key of ['max', 'min', 'over'] as const) if (next[key] === undefined) delete next[key];
      this.draft = next;
    };
    const choose = (name: RequirementQuantityName): void => {
      const { max: _, min: __, ...rest } = this.draft;
      this.draft = { ...rest, ...firstLimit(name), quantity: name, of: targetsOf(this.design!, name).some((target) => target.value === draft.of) ? draft.of : (targetsOf(this.design!, name)[0]?.value ?? draft.of) };
    };
    const [bound] = boundsOf(draft);
    return html`<fieldset class="add">
      <legend>Another requirement</legend>
      <div class="sentence">
        ${this.renderQuantity(draft, choose)} ${this.renderOf(draft, (of) => change({ of }))} ${this.renderLimit(draft, bound, null, change)} ${this.renderOver(draft, (over) => change({ over }))}
        <button type="button" ?disabled=${targetsOf(this.design!, quantity).length === 0} @click=${this.add}>Add</button>
      </div>
      <p class="doc">${requirementQuantity(quantity).doc}</p>
    </fieldset>`;
  }
}

customElements.define('hm-requirements', HmRequirements);

declare global {
  interface HTMLElementTagNameMap {
    'hm-requirements': HmRequirements;
  }
}
