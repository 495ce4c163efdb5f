import { LitElement, html, nothing, type TemplateResult } from 'lit';
import { keyText, ownIndex, type EntryKey, type LooseEntry } from '../../src/design/entry-key.ts';
import type { Design, OffsetInput } from '../../src/design/types.ts';
import { isPair } from '../../src/design/offset.ts';
import { asCustom, withCompanions } from '../../src/parameters/companions.ts';
import { takeEntries } from '../../src/state/commands/index.ts';
import { keyOfItem, type ShelfItem } from '../../src/storage/shelf.ts';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import { LISTS } from './entry-acts.ts';
import { styles } from './hm-shelf.styles.ts';

/**
 * The person's shelf: own entries that are kept in this browser beside all projects, taken into the design and taken off again.
 *
 * @fires hm-shelf, hm-edit, hm-say
 */
export class HmShelf extends LitElement {
  static override styles = [look, styles];
  static override properties = { design: { attribute: false }, items: { state: true }, gone: { state: true } };

  declare design: Design | null;
  /** null: not known, or kept nowhere */ declare private items: readonly ShelfItem[] | null;
  /** taken off last, to be put back */ declare private gone: ShelfItem | null;

  private readonly seen = (): void => void (document.visibilityState === 'visible' && this.look());

  constructor() {
    super();
    this.design = null;
    this.items = null;
    this.gone = null;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    // Another tab may have put something there.
    document.addEventListener('visibilitychange', this.seen);
    this.look();
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    document.removeEventListener('visibilitychange', this.seen);
  }

  private look(): void {
    tell(this, 'hm-shelf', { act: 'look', answer: (items) => (this.items = items) });
  }

  /** Puts an own entry of the design there, with what it cannot do without. */
  put(key: EntryKey): void {
    const entries = withCompanions(this.design?.custom ?? {}, key);
    const more = entries.length - 1;
    this.store(entries, `${keyText(key)} is on your shelf${more === 0 ? '' : `, with ${more} that ${more === 1 ? 'belongs' : 'belong'} to it`}.`);
  }

  /** Puts an own offset of a pair there. */
  putOffset(offset: OffsetInput): void {
    const loose: LooseEntry = { list: 'offsets', entry: offset };
    this.store([loose], `${nameOf(loose)} is on your shelf.`);
  }

  private store(entries: readonly LooseEntry[], said: string): void {
    tell(this, 'hm-shelf', {
      act: 'put', entries,
      answer: (items) => {
        this.items = items;
        this.gone = null;
        if (items !== null) tell(this, 'hm-say', { text: said });
      },
    });
  }

  private take(item: ShelfItem): void {
    const entries: readonly LooseEntry[] = item.list === 'offsets' ? [{ list: item.list, entry: item.entry }] : withCompanions(asCustom(this.items ?? []), keyOfItem(item) as EntryKey);
    const name = nameOf(item);
    tell(this, 'hm-edit', { next: takeEntries(this.design!, entries), label: `${name} from the shelf` });
    tell(this, 'hm-say', { text: `${name} is in this design now.` });
  }

  private async drop(item: ShelfItem): Promise<void> {
    await new Promise<void>((done) => tell(this, 'hm-shelf', { act: 'drop', key: item.key, answer: (items) => {
      this.items = items;
      if (items !== null) this.gone = item;
      done();
    } }));
    await this.updateComplete;
    this.renderRoot.querySelector<HTMLElement>('.back')?.focus();
  }

  /** How the design stands to what lies on the shelf. */
  private standing(item: ShelfItem): 'absent' | 'same' | 'other' {
    const { custom } = this.design!;
    const own = item.list === 'offsets' ? custom?.offsets?.find((row) => isPair(row, item.entry.first, item.entry.second)) : custom?.[item.list]?.[ownIndex(custom, keyOfItem(item) as EntryKey)];
    if (own === undefined) return 'absent';
    return JSON.stringify(own) === JSON.stringify(item.entry) ? 'same' : 'other';
  }

  override render(): TemplateResult | typeof nothing {
    const { items, gone, design } = this;
    if (design === null) return nothing;
    return html`<section aria-label="Your shelf">
      <h3>Your shelf</h3>
      <p class="quiet">Own entries kept in this browser beside all projects. A design that uses one carries a copy of its own; the backup of the projects holds the shelf too.</p>
      ${items === null ? html`<p>This browser keeps no shelf for this page.</p>` : items.length === 0 && gone === null ? html`<p>Nothing yet. An own entry is put here with the button beside it.</p>` : html`<ul>${items.map((item) => this.renderItem(item))}</ul>`}
      ${gone === null ? nothing : html`<p role="status">${nameOf(gone)} was taken off the shelf. <button type="button" class="back" @click=${() => this.store([gone], `${nameOf(gone)} is on your shelf again.`)}>Put it back</button></p>`}
    </section>`;
  }

  private renderItem(item: ShelfItem): TemplateResult {
    const name = nameOf(item);
    const standing = this.standing(item);
    return html`<li>
      <span class="name"><strong>${name}</strong>${item.list !== 'offsets' && item.entry.name && item.entry.name !== name ? ` ${item.entry.name}` : ''}, ${item.list === 'offsets' ? 'band offset' : LISTS[item.list].one}</span>
      <span class="acts">
        ${standing === 'same' ? html`<span class="quiet">in this design</span>` : html`<button type="button" @click=${() => this.take(item)}>${standing === 'other' ? html`Take in place of the design's own` : html`Take into this design`}<span class="spoken">: ${name}</span></button>`}
        <button type="button" @click=${() => void this.drop(item)}>Take off the shelf<span class="spoken">: ${name}</span></button>
      </span>
    </li>`;
  }
}

function nameOf(item: LooseEntry): string {
  return item.list === 'offsets' ? `${item.entry.first} to ${item.entry.second}` : keyText(keyOfItem(item));
}

customElements.define('hm-shelf', HmShelf);

declare global {
  interface HTMLElementTagNameMap {
    'hm-shelf': HmShelf;
  }
}
