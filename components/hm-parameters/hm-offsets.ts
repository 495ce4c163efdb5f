import { LitElement, html, nothing, type TemplateResult } from 'lit';
import { isPair } from '../../src/design/offset.ts';
import type { Design } from '../../src/design/types.ts';
import { offsetComplaint, shownPairs, type ShownPair } from '../../src/parameters/pairs.ts';
import { removePairOffset, setPairOffset } from '../../src/state/commands/index.ts';
import '../hm-field/hm-field.ts';
import type { HmField } from '../hm-field/hm-field.ts';
import { tell } from '../shared/events.ts';
import { formLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';
import { styles } from './hm-parameters.styles.ts';

interface Editing {
  pair: string;
  edge: 'deltaEv' | 'deltaEc';
  constant: string;
  perX: string;
  source: string;
  trouble: { value: string | null; source: string | null };
}

/**
 * Band offsets of the pairs of materials that meet in the design: the published one, rivals to choose from, and one of the design's own with its source.
 * @fires hm-edit
 * @fires offset-shelve  detail: an own offset to be put on the person's shelf
 */
export class HmOffsets extends LitElement {
  static override styles = [look, formLook, styles];
  static override properties = { design: { attribute: false }, editing: { state: true } };

  declare design: Design | null;
  declare private editing: Editing | null;

  constructor() {
    super();
    this.design = null;
    this.editing = null;
  }

  override render(): TemplateResult | typeof nothing {
    const pairs = this.design === null ? [] : shownPairs(this.design);
    if (pairs.length === 0) return nothing;
    return html`<h3>Band offsets of pairs</h3><ul class="values">${pairs.map((pair) => this.renderPair(pair))}</ul>`;
  }

  private renderPair(pair: ShownPair): TemplateResult {
    const name = nameOf(pair);
    const editing = this.editing?.pair === name;
    const spoken = html`<span class="spoken"> offset of ${name}</span>`;
    return html`<li class=${pair.own ? 'changed' : ''}>
      <span>${pair.first} to ${pair.second}</span>
      <span class="figure"><strong>${pair.text ?? 'by rule'}</strong>${pair.own ? html` <span class="was">own${pair.presetText === null ? '' : `; published: ${pair.presetText}`}</span>` : nothing}</span>
      <span class="work">${pair.work}</span>
      <span class="acts">
        <button type="button" aria-expanded=${editing} @click=${() => (editing ? (this.editing = null) : void this.edit(pair))}>Change${spoken}</button>
        ${pair.own ? html`<button type="button" @click=${() => this.change(removePairOffset(this.design!, pair.first, pair.second), `offset of ${name} as published`)}>Reset${spoken}</button>
          <button type="button" @click=${() => this.shelve(pair)}>Put on your shelf<span class="spoken">: offset of ${name}</span></button>` : nothing}
      </span>
      ${pair.rivals.filter(({ chosen }) => !chosen).map(({ text, work, offset }) => html`<span class="rival">Also published: <strong>${text}</strong> <span class="checked">${work}</span><button type="button" @click=${() => this.change(setPairOffset(this.design!, offset), `another published offset of ${name}`)}>Use it<span class="spoken">: ${text} for ${name}</span></button></span>`)}
      ${editing ? this.renderForm(pair) : nothing}
    </li>`;
  }

  private renderForm(pair: ShownPair): TemplateResult {
    const e = this.editing!;
    const set = (change: Partial<Editing>): void => void (this.editing = { ...this.editing!, ...change });
    return html`<div class="row form">
      <label class="select"><span class="label">Edge</span><select @change=${(event: Event) => set({ edge: (event.target as HTMLSelectElement).value as Editing['edge'] })}>
        <option value="deltaEv" ?selected=${e.edge === 'deltaEv'}>ΔEv</option><option value="deltaEc" ?selected=${e.edge === 'deltaEc'}>ΔEc</option>
      </select></label>
      <hm-field label="${pair.second} less ${pair.first}" hint="0.3 eV" .value=${e.constant} .complaint=${e.trouble.value} @field-accept=${(event: CustomEvent<string>) => set({ constant: event.detail })}></hm-field>
      <hm-field label="for each x" hint="0 eV" .value=${e.perX} @field-accept=${(event: CustomEvent<string>) => set({ perX: event.detail })}></hm-field>
      <hm-field class="wide" label="Where it stands" hint="author, year, table" .value=${e.source} .complaint=${e.trouble.source} @field-accept=${(event: CustomEvent<string>) => set({ source: event.detail })}></hm-field>
      <button type="button" class="press" @click=${() => this.ready(pair)}>Use this offset</button>
      <button type="button" class="press" @click=${() => (this.editing = null)}>Leave it</button>
    </div>`;
  }

  private async edit(pair: ShownPair): Promise<void> {
    this.editing = { pair: nameOf(pair), edge: 'deltaEv', constant: '', perX: '', source: '', trouble: { value: null, source: null } };
    await this.updateComplete;
    await this.renderRoot.querySelector<HmField>('hm-field')?.edit();
  }

  private ready({ first, second }: ShownPair): void {
    const { edge, constant, perX, source } = this.editing!;
    const trouble = { value: offsetComplaint(this.design!, constant, perX), source: source.trim() === '' ? 'is empty; say where the offset stands: author, year, table, or the measurement' : null };
    if (trouble.value !== null || trouble.source !== null) return void (this.editing = { ...this.editing!, trouble });
    const step = { ...(constant.trim() === '' ? {} : { constant: constant.trim() }), ...(perX.trim() === '' ? {} : { perX: perX.trim() }) };
    this.editing = null;
    this.change(setPairOffset(this.design!, { first, second, [edge]: step, source: source.trim() }), `offset of ${first} to ${second}`);
  }

  private shelve({ first, second }: ShownPair): void {
    const own = this.design!.custom?.offsets?.find((row) => isPair(row, first, second));
    if (own !== undefined) this.dispatchEvent(new CustomEvent('offset-shelve', { detail: own }));
  }

  private change(next: Design, label: string): void {
    tell(this, 'hm-edit', { next, label });
  }
}

const nameOf = ({ first, second }: ShownPair): string => `${first} to ${second}`;

customElements.define('hm-offsets', HmOffsets);

declare global {
  interface HTMLElementTagNameMap {
    'hm-offsets': HmOffsets;
  }
}
