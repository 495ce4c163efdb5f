import { LitElement, html, nothing, type TemplateResult } from 'lit';
import { repeat } from 'lit/directives/repeat.js';
import type { Variant } from '../../src/state/variants.ts';
import '../hm-field/hm-field.ts';
import { tell, type VariantAct } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import { panelLook } from '../shared/panel-look.ts';
import './hm-change-log.ts';
import { MOST_OVER, NO_VARIANTS, type VariantsShown, type VariantsView } from './variants-shown.ts';
import { styles } from './hm-variants.styles.ts';

/**
 * The variants of the project: copied, named, opened, put away and taken back; laid over the plate; compared in the ledger; below them what was changed between two of them or of their revisions.
 *
 * @fires hm-variant  an act on one of them
 * @fires hm-view     { variants: VariantsView }
 */
export class HmVariants extends LitElement {
  static override styles = [look, panelLook, styles];
  static override properties = { shown: { attribute: false }, wish: { state: true } };

  declare shown: VariantsShown;
  /** name typed for the next copy */ declare private wish: string;

  constructor() {
    super();
    this.shown = NO_VARIANTS;
    this.wish = '';
  }

  private remember(change: VariantsView): void {
    const { over, against } = this.shown;
    tell(this, 'hm-view', { change: { variants: { over: [...over], against, ...change } satisfies VariantsView } });
  }

  private act(act: VariantAct): void {
    tell(this, 'hm-variant', act);
  }

  private add(): void {
    this.act({ act: 'add', name: this.wish });
    this.wish = '';
  }

  override render(): TemplateResult | typeof nothing {
    const { all, over, against } = this.shown;
    if (all.list.length === 0) return nothing;
    const there = all.list.filter(({ removed }) => !removed);
    const away = all.list.filter(({ removed }) => removed);
    return html`<p class="doc">A variant is a copy of the design inside this project. The one on the page is edited, with an undo of its own; up to ${MOST_OVER} others are laid over the plate.</p>
      <ul class="list" aria-label="Variants">${repeat(there, ({ id }) => id, (variant) => this.renderRow(variant, there.length))}</ul>
      <div class="new">
        <hm-field label="name of the next" .hint=${'such as "thin cap"'} .value=${this.wish} @field-accept=${(e: CustomEvent<string>) => (this.wish = e.detail)}></hm-field>
        <button type="button" @click=${() => this.add()}>Copy what is on the page as a variant</button>
      </div>
      <hm-change-log .shown=${this.shown}></hm-change-log> ${away.length === 0 ? nothing : this.renderAway(away)}
      <p class="spoken" role="status">${over.length === 0 && against === null ? '' : this.spoken()}</p>`;
  }

  /** How far those that are looked at have been solved. */
  private spoken(): string {
    const waiting = [...this.shown.solved.values()].filter(({ status }) => status === 'pending').length;
    return waiting === 0 ? 'All variants that are shown are solved.' : `${waiting} still being solved.`;
  }

  private renderRow({ id, name }: Variant, count: number): TemplateResult {
    const { all, over, against, solved } = this.shown;
    const open = id === all.open;
    const known = solved.get(id);
    const laid = over.includes(id);
    const toggle = (): void => this.remember({ over: laid ? over.filter((other) => other !== id) : [...over, id] });
    return html`<li class=${open ? 'open' : ''} aria-current=${open ? 'true' : nothing}>
      ${open ? html`<span class="here">● on the page</span>` : html`<button type="button" class="to" @click=${() => this.act({ act: 'open', id })}>Open<span class="spoken"> ${name}</span></button>`}
      <hm-field label="name of ${name}" label-hidden .value=${name} @field-accept=${(e: CustomEvent<string>) => this.act({ act: 'rename', id, name: e.detail })}></hm-field>
      ${open ? nothing : html`<label><input type="checkbox" .checked=${laid} ?disabled=${!laid && over.length >= MOST_OVER} @change=${toggle} />over the plate<span class="spoken">: ${name}</span></label>
        <label><input type="checkbox" .checked=${against === id} @change=${() => this.remember({ against: against === id ? null : id })} />compare in the ledger<span class="spoken"> with ${name}</span></label>`}
      ${count < 2 ? nothing : html`<button type="button" @click=${() => this.act({ act: 'remove', id })}>Put away<span class="spoken"> ${name}</span></button>`}
      ${known?.status === 'pending' ? html`<span class="doc">being solved</span>` : known?.status === 'refused' ? html`<span class="wrong">no result: ${known.reason}</span>` : nothing}
    </li>`;
  }

  private renderAway(away: readonly Variant[]): TemplateResult {
    return html`<details>
      <summary>Put away: ${away.length}</summary>
      <ul class="list" aria-label="Variants put away">${away.map(({ id, name }) => html`<li>
        <span>${name}</span>
        <button type="button" @click=${() => this.act({ act: 'take-back', id })}>Take back<span class="spoken"> ${name}</span></button>
        <button type="button" @click=${() => this.act({ act: 'delete', id })}>Delete for good<span class="spoken">: ${name}</span></button>
      </li>`)}</ul>
    </details>`;
  }
}

customElements.define('hm-variants', HmVariants);

declare global {
  interface HTMLElementTagNameMap {
    'hm-variants': HmVariants;
  }
}
