import { LitElement, html, nothing, type TemplateResult } from 'lit';
import { changeLog } from '../../src/state/change-log.ts';
import { designAt, revisionsOf, type RevisionKey } from '../../src/state/revisions.ts';
import type { Variant } from '../../src/state/variants.ts';
import { controlLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';
import { panelLook } from '../shared/panel-look.ts';
import { select, type Option } from '../shared/select.ts';
import { NO_VARIANTS, type VariantsShown } from './variants-shown.ts';
import { styles } from './hm-variants.styles.ts';

type End = 'from' | 'to';

const NOW = 'now';
/** of a step's words in a menu; the whole is in the sentences below it */
const MOST_LABEL = 60;

/**
 * What was changed between two states of the designs of a project, in words: variants as they are now, or any step of theirs that undo remembers.
 *
 * Unless somebody chooses, it leads from the variant compared with, else the first other one, to the one on the page; with one variant alone, from its earliest revision to the present.
 */
export class HmChangeLog extends LitElement {
  static override styles = [look, panelLook, controlLook, styles];
  static override properties = { shown: { attribute: false }, chosen: { state: true } };

  declare shown: VariantsShown;
  /** what was chosen by hand */ declare private chosen: Partial<Record<End, RevisionKey>>;

  constructor() {
    super();
    this.shown = NO_VARIANTS;
    this.chosen = {};
  }

  private get ends(): Record<End, RevisionKey> {
    const { all, against } = this.shown;
    const other = all.list.find(({ id }) => id === against) ?? all.list.find(({ id, removed }) => id !== all.open && !removed);
    const there = (key: RevisionKey | undefined): RevisionKey | null => (key !== undefined && all.list.some(({ id }) => id === key.id) ? key : null);
    return {
      from: there(this.chosen.from) ?? (other === undefined ? { id: all.open, steps: 0 } : { id: other.id, steps: null }),
      to: there(this.chosen.to) ?? { id: all.open, steps: null },
    };
  }

  private variant(id: string): Variant {
    return this.shown.all.list.find((variant) => variant.id === id)!;
  }

  private choose(end: End, key: RevisionKey): void {
    this.chosen = { ...this.chosen, [end]: key };
  }

  override render(): TemplateResult | typeof nothing {
    if (this.shown.all.list.length === 0) return nothing;
    const { from, to } = this.ends;
    return html`<h3>What was changed</h3>
      <div class="ends">${this.renderEnd('from', from)} ${this.renderEnd('to', to)}
        <button type="button" @click=${() => (this.chosen = { from: to, to: from })}>The other way round</button>
      </div>
      <div role="status">${this.renderLog(from, to)}</div>`;
  }

  private renderEnd(end: End, key: RevisionKey): TemplateResult {
    const { all } = this.shown;
    const revisions = revisionsOf(this.variant(key.id)).slice(0, -1);
    const steps = key.steps === null || key.steps > revisions.length - 1 ? NOW : String(key.steps);
    const words = ({ steps: n, label }: { steps: number; label: string | null }): string => (label === null ? 'at the first step remembered' : `${n}: after ${short(label)}`);
    const options: Option[] = [{ value: NOW, text: 'as it is now' }, ...revisions.reverse().map((revision) => ({ value: String(revision.steps), text: words(revision) }))];
    return html`<div class="end">
      ${select({ id: `${end}-variant`, label: end === 'from' ? 'From' : 'To', value: key.id, options: all.list.map(({ id, name, removed }) => ({ value: id, text: removed ? `${name} (put away)` : name })), onChoice: (id) => this.choose(end, { id, steps: null }) })}
      ${select({ id: `${end}-revision`, label: end === 'from' ? 'revision it starts from' : 'revision it leads to', value: steps, options, onChoice: (value) => this.choose(end, { id: key.id, steps: value === NOW ? null : Number(value) }) })}
    </div>`;
  }

  private renderLog(from: RevisionKey, to: RevisionKey): TemplateResult {
    const [before, after] = [from, to].map(({ id, steps }) => designAt(this.variant(id), steps ?? Infinity));
    if (before === null || after === null) return html`<p class="wrong">What is stored of this revision does not lead back from the design as it is now; choose another one.</p>`;
    const changes = changeLog(before, after);
    return changes.length === 0 ? html`<p>Nothing: the two are equal.</p>` : html`<ul class="log">${changes.map((sentence) => html`<li>${sentence}</li>`)}</ul>`;
  }
}

function short(label: string): string {
  return label.length <= MOST_LABEL ? label : `${label.slice(0, MOST_LABEL - 1)}…`;
}

customElements.define('hm-change-log', HmChangeLog);

declare global {
  interface HTMLElementTagNameMap {
    'hm-change-log': HmChangeLog;
  }
}
