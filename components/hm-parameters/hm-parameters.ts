import { LitElement, html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import { repeat } from 'lit/directives/repeat.js';
import { catalogueOf, presetCatalogue, type Catalogue } from '../../src/design/catalogue.ts';
import type { Complaint } from '../../src/design/complaint.ts';
import { keyText, sameKey, type EntryKey } from '../../src/design/entry-key.ts';
import { placeOfPath } from '../../src/design/entry-path.ts';
import type { Design, MetalInput, OffsetInput } from '../../src/design/types.ts';
import { allKeys, checkedWords, entryOf, keysInUse, kindOf, presetOf, shownEntry, type ShownEntry, type ShownValue } from '../../src/parameters/entry-view.ts';
import { formulaPreview, valueComplaint } from '../../src/parameters/check-value.ts';
import { chooseRival, rivalsOf, type Rival } from '../../src/parameters/rivals.ts';
import { formulaOver, valueKind } from '../../src/parameters/value-kind.ts';
import { parameterWords } from '../../src/parameters/parameter-words.ts';
import { addBarrier, resetCustomValue, setCustomValue } from '../../src/state/commands/index.ts';
import { complaintsWithin } from '../shared/complaint-at.ts';
import { tell } from '../shared/events.ts';
import { formLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';
import { copied, freeId, LISTS, ownKeys, removed } from './entry-acts.ts';
import type { HmField } from '../hm-field/hm-field.ts';
import '../hm-field/hm-field.ts';
import type { BarrierReady } from './hm-barrier-form.ts';
import './hm-barrier-form.ts';
import './hm-offsets.ts';
import './hm-shelf.ts';
import type { HmValueForm } from './hm-value-form.ts';
import './hm-value-form.ts';
import { styles } from './hm-parameters.styles.ts';

interface Editing {
  key: EntryKey;
  path: string;
}

/**
 * Every material, dopant and metal that the design uses, value by value, with where each value stands; a value can be changed within this design, entries can be added and taken out.
 *
 * @fires hm-edit, hm-say
 */
export class HmParameters extends LitElement {
  static override styles = [look, formLook, styles];
  static override properties = { design: { attribute: false }, complaints: { attribute: false }, asked: { state: true }, open: { state: true }, editing: { state: true }, nameTrouble: { state: true } };

  declare design: Design | null;
  declare complaints: readonly Complaint[];
  /** shown on request, beside what the design uses */ declare private asked: readonly EntryKey[];
  /** whose values are spread out, by list and text */ declare private open: ReadonlySet<string>;
  declare private editing: Editing | null;

  /** the name of a copy that cannot be, by the entry that it was asked of */ declare private nameTrouble: { of: string; words: string } | null;

  private catalogue: Catalogue = catalogueOf(undefined);

  constructor() {
    super();
    this.design = null;
    this.complaints = [];
    this.asked = [];
    this.open = new Set();
    this.editing = null;
    this.nameTrouble = null;
  }

  protected override willUpdate(changed: PropertyValues<this>): void {
    if (this.design !== null && (changed.has('design') || !this.hasUpdated)) this.catalogue = catalogueOf(this.design.custom);
  }

  override render(): TemplateResult | typeof nothing {
    const { design, catalogue } = this;
    if (design === null) return nothing;
    const used = keysInUse(design, catalogue);
    const own = ownKeys(design).filter((key) => !used.some((u) => sameKey(u, key)));
    const more = this.asked.filter((key) => entryOf(catalogue, key) !== null && ![...used, ...own].some((u) => sameKey(u, key)));
    const shown = (keys: readonly EntryKey[]): TemplateResult[] | unknown => repeat(keys, name, (key) => this.renderEntry(key, used));
    return html`<p class="quiet">Published values, each with where it stands and how that was checked. A value that you change counts in this design alone, and travels with its file.</p>
      ${this.renderOwnValues()}
      <h3>In this design</h3>
      ${shown(used)} <hm-offsets .design=${design} @offset-shelve=${(e: CustomEvent<OffsetInput>) => this.renderRoot.querySelector('hm-shelf')!.putOffset(e.detail)}></hm-offsets> ${own.length === 0 ? nothing : html`<h3>Own entries, not in use</h3>${shown(own)}`} ${more.length === 0 ? nothing : html`<h3>Looked up</h3>${shown(more)}`} ${this.renderRequest([...used, ...own, ...more])} <hm-shelf .design=${design}></hm-shelf>`;
  }

  /** All that the design says differently, in one place. */
  private renderOwnValues(): TemplateResult | typeof nothing {
    const entries = ownKeys(this.design!).map((key) => shownEntry(this.catalogue, key)).filter((entry): entry is ShownEntry => entry !== null);
    if (entries.length === 0) return nothing;
    const rows = entries.flatMap((entry) =>
      entry.preset
        ? entry.values.filter(({ own }) => own).map((v) => html`<li>${entry.text}: ${v.words} <strong>${v.text}</strong>${v.presetText === null ? '' : ` instead of ${v.presetText}`}</li>`)
        : [html`<li>${entry.text}: an entry of this design</li>`],
    );
    const offsets = entries.some(({ key, preset }) => key.list === 'materials' && preset);
    return html`<section class="own" aria-label="Own values in use">
      <h3>Own values</h3>
      <ul>${rows}</ul>
      ${offsets ? html`<p class="quiet">A published band offset belongs to the published material: at its interfaces a changed material lines up by its natural scale or its affinity, unless the interface gives an offset, or the design an own one of the pair.</p>` : nothing}
    </section>`;
  }

  private renderEntry(key: EntryKey, used: readonly EntryKey[]): TemplateResult {
    const entry = shownEntry(this.catalogue, key)!;
    const changed = entry.values.filter(({ own }) => own).length;
    const open = this.open.has(name(key));
    const mark = !entry.own ? nothing : html` <span class="mark">${entry.preset ? (changed === 1 ? '1 own value' : `${changed} own values`) : 'own entry'}</span>`;
    return html`<details ?open=${open} @toggle=${(e: Event) => this.toggle(key, (e.target as HTMLDetailsElement).open)}>
      <summary><strong>${entry.text}</strong> ${entry.name === entry.text ? '' : entry.name}, ${LISTS[key.list].one}${mark}</summary>
      ${open ? this.renderValues(entry, used) : nothing}
    </details>`;
  }

  private renderValues(entry: ShownEntry, used: readonly EntryKey[]): TemplateResult {
    const { key } = entry;
    const inUse = used.some((u) => sameKey(u, key));
    return html`<div>
      <ul class="values">${repeat(entry.values, ({ path }) => path, (value) => this.renderValue(entry, value))}</ul>
      ${this.editing !== null && sameKey(this.editing.key, key) && !entry.values.some(({ path }) => path === this.editing!.path) ? this.renderForm(key, this.editing.path, parameterWords(this.editing.path), '') : nothing}
      <div class="row">
        ${entry.missing.length === 0 ? nothing : html`<label class="select"><span class="label">Put in a value of ${entry.text}</span><select @change=${(e: Event) => this.putIn(key, e.target as HTMLSelectElement)}><option value="">choose</option>${entry.missing.map(({ path, words }) => html`<option value=${path}>${words}</option>`)}</select></label>`}
        ${entry.formulas.length === 0 ? nothing : html`<label class="select"><span class="label">Write by a formula in ${entry.text}</span><select @change=${(e: Event) => this.putIn(key, e.target as HTMLSelectElement)}><option value="">choose</option>${entry.formulas.map(({ path, words }) => html`<option value=${path}>${words}</option>`)}</select></label>`}
        <hm-field label="Name of a copy of ${entry.text}" .value=${freeId(this.catalogue, key)} .complaint=${this.nameTrouble?.of === name(key) ? this.nameTrouble.words : null}></hm-field>
        <button type="button" class="press" @click=${(e: Event) => this.copy(key, (e.currentTarget as HTMLElement).previousElementSibling as HmField)}>Copy<span class="spoken"> ${entry.text}</span> as a new ${LISTS[key.list].one}</button>
        ${entry.own ? html`<button type="button" class="press" @click=${() => this.renderRoot.querySelector('hm-shelf')!.put(key)}>Put on your shelf<span class="spoken">: ${entry.text}</span></button>` : nothing}
        ${entry.own ? html`<button type="button" class="press" @click=${() => this.takeOut(key)}>${entry.preset ? `All published values of ${entry.text} again` : `Take out ${entry.text}${inUse ? ' (in use)' : ''}`}</button>` : nothing}
      </div>
      ${key.list === 'metals' ? html`<hm-barrier-form .metal=${entry.text} .materials=${this.hosts} .judge=${(text: string) => this.heightComplaint(key, text)} @barrier-ready=${(e: CustomEvent<BarrierReady>) => this.putBarrier(key, e.detail)}></hm-barrier-form>` : nothing}
    </div>`;
  }

  /** Materials that a contact can be on, those of the design first. */
  private get hosts(): string[] {
    const known = [...this.catalogue.materials.values()].filter(({ entry }) => !entry.insulator).map(({ entry }) => entry.id);
    return [...new Set([...this.design!.layers.map(({ material }) => material).filter((id) => known.includes(id)), ...known])];
  }

  private heightComplaint(key: EntryKey, text: string): string | null {
    return valueComplaint(this.design!, key, entryOf(this.catalogue, key)!.entry, 'workFunction', text, false);
  }

  private putBarrier(key: EntryKey, barrier: BarrierReady): void {
    const words = `barrier of ${key.id} on ${barrier.material}`;
    tell(this, 'hm-edit', { next: addBarrier(this.design!, key, entryOf(this.catalogue, key)!.entry as MetalInput, barrier), label: words });
    tell(this, 'hm-say', { text: `The ${words} is ${barrier.height} in this design.` });
  }

  private renderRival(key: EntryKey, rival: Rival): TemplateResult {
    const values = rival.values.map(({ path, text }) => (rival.values.length === 1 && !path.endsWith('.formula') ? text : `${parameterWords(path)} ${text}`)).join(', ');
    const how = { page: 'seen in print', memory: 'from memory of the cited work', computed: 'derived from the cited work' }[rival.checked];
    if (rival.chosen) return this.renderPreset(key, rival);
    return html`<span class="rival">Also published: <strong>${values}</strong> <span class="checked">${rival.work}; ${how}${rival.note === '' ? '' : `; ${rival.note}`}</span>
      <button type="button" @click=${() => this.choose(key, rival, values)}>Use it<span class="spoken">: ${values} for ${keyText(key)}</span></button></span>`;
  }

  /** Beside a rival that is in use: what it took the place of, and the way back. */
  private renderPreset(key: EntryKey, { values }: Rival): TemplateResult {
    const preset = presetOf(key)!;
    const of = (path: string): string => path.replace(/\.formula$/, '');
    const rows = (shownEntry(presetCatalogue, key)?.values ?? []).filter((row) => values.some(({ path }) => row.path === path || row.path === of(path) || row.path.startsWith(`${of(path)}.`)));
    const words = rows.map(({ words, text }) => (rows.length === 1 ? text : `${words} ${text}`)).join(', ');
    const back = (): void => tell(this, 'hm-edit', { next: values.reduce((design, { path }) => resetCustomValue(design, key, preset, path), this.design!), label: `preset values of ${keyText(key)}` });
    return html`<span class="rival">The preset has <strong>${words === '' ? 'the rule between its ends' : words}</strong> <span class="checked">${[...new Set(rows.map(({ work }) => work))].join('; ')}</span>
      <button type="button" @click=${back}>Back to it<span class="spoken">: ${words} for ${keyText(key)}</span></button></span>`;
  }

  private choose(key: EntryKey, rival: Rival, values: string): void {
    tell(this, 'hm-edit', { next: chooseRival(this.design!, key, entryOf(this.catalogue, key)!.entry, rival), label: `another published value of ${keyText(key)}` });
    tell(this, 'hm-say', { text: `${keyText(key)} has ${values} in this design.` });
  }

  private renderValue(entry: ShownEntry, value: ShownValue): TemplateResult {
    const { key } = entry;
    const editing = this.editing !== null && sameKey(this.editing.key, key) && this.editing.path === value.path;
    const found = entryOf(this.catalogue, key)!;
    const wrong = entry.own ? complaintsWithin(this.complaints, `${found.path}${placeOfPath(found.entry, value.path)}`) : [];
    const what = html`<span class="spoken"> ${value.words} of ${entry.text}</span>`;
    return html`<li class=${value.own && entry.preset ? 'changed' : ''}>
      <span>${value.words}</span>
      <span class="figure"><strong>${value.text}</strong>${value.own && value.presetText !== null ? html` <span class="was">own; published: ${value.presetText}</span>` : nothing}${wrong.map((w) => html`<span class="complaint">${w}</span>`)}</span>
      <span class="work">${value.work}<span class="checked">${checkedWords(value.origin, value.own)}${value.origin.note === '' ? '' : `; ${value.origin.note}`}</span></span>
      <span class="acts">
        <button type="button" aria-expanded=${editing} data-path=${value.path} @click=${() => (editing ? this.leave() : this.edit(key, value.path))}>Change${what}</button>
        ${value.own && entry.preset ? html`<button type="button" @click=${() => this.reset(key, value)}>Reset${what}</button>` : nothing}
      </span>
      ${rivalsOf(key, found.entry).filter((rival) => shownAt(rival, entry) === value.path).map((rival) => this.renderRival(key, rival))}
      ${editing ? this.renderForm(key, value.path, value.words, value.edited) : nothing}
    </li>`;
  }

  private renderForm(key: EntryKey, path: string, words: string, text: string): TemplateResult {
    const { entry } = entryOf(this.catalogue, key)!;
    const list = Array.isArray((entry as unknown as Record<string, unknown>)[path]) || text.includes(';') || path.startsWith('validity');
    return html`<hm-value-form
      .words=${words}
      .kind=${valueKind(path)}
      .value=${text}
      .preview=${path.endsWith('.formula') ? (typed: string) => formulaPreview(this.design!, key, entry, path, typed) : null}
      .over=${formulaOver(kindOf(key, entry), path)}
      .judge=${(typed: string) => valueComplaint(this.design!, key, entry, path, typed, list)}
      @value-ready=${(e: CustomEvent<{ text: string; source: string }>) => this.put(key, path, words, e.detail)}
      @value-drop=${this.leave}
    ></hm-value-form>`;
  }

  /** Any preset, to be looked at. */
  private renderRequest(shown: readonly EntryKey[]): TemplateResult {
    const others = allKeys(this.catalogue).filter((key) => !shown.some((s) => sameKey(s, key)));
    return html`<div class="row"><label class="select"><span class="label">Look up another</span><select @change=${(e: Event) => this.ask(others, e.target as HTMLSelectElement)}>
      <option value="">material, dopant or metal</option>
      ${(['materials', 'dopants', 'metals'] as const).map((list) => html`<optgroup label=${LISTS[list].many}>${others.filter((key) => key.list === list).map((key) => html`<option value=${name(key)}>${keyText(key)}</option>`)}</optgroup>`)}
    </select></label></div>`;
  }

  private toggle(key: EntryKey, open: boolean): void {
    if (open === this.open.has(name(key))) return;
    this.open = new Set(open ? [...this.open, name(key)] : [...this.open].filter((n) => n !== name(key)));
  }

  private ask(others: readonly EntryKey[], menu: HTMLSelectElement): void {
    const key = others.find((other) => name(other) === menu.value);
    menu.value = '';
    if (key === undefined) return;
    this.asked = [...this.asked, key];
    this.toggle(key, true);
  }

  private putIn(key: EntryKey, menu: HTMLSelectElement): void {
    const path = menu.value;
    menu.value = '';
    if (path !== '') void this.edit(key, path);
  }

  private async edit(key: EntryKey, path: string): Promise<void> {
    this.editing = { key, path };
    await this.updateComplete;
    await this.renderRoot.querySelector<HmValueForm>('hm-value-form')?.edit();
  }

  /** The focus goes back to the button that opened the form. */
  private async leave(): Promise<void> {
    const { editing } = this;
    this.editing = null;
    await this.updateComplete;
    if (editing !== null) this.renderRoot.querySelector<HTMLElement>(`details[open] button[data-path="${CSS.escape(editing.path)}"]`)?.focus();
  }

  private put(key: EntryKey, path: string, words: string, { text, source }: { text: string; source: string }): void {
    const { entry } = entryOf(this.catalogue, key)!;
    tell(this, 'hm-edit', { next: setCustomValue(this.design!, key, entry, path, text, source), label: `${words} of ${keyText(key)}` });
    tell(this, 'hm-say', { text: `${words} of ${keyText(key)} is ${text} in this design.` });
    void this.leave();
  }

  private reset(key: EntryKey, { path, words }: ShownValue): void {
    tell(this, 'hm-edit', { next: resetCustomValue(this.design!, key, presetOf(key)!, path), label: `${words} of ${keyText(key)} as published` });
  }

  private copy(key: EntryKey, field: HmField): void {
    const id = field.value.trim();
    const taken = id === '' || id.length > 200 || entryOf(this.catalogue, { ...key, id }) !== null;
    this.nameTrouble = taken ? { of: name(key), words: id === '' ? 'is empty; a copy needs a name' : 'is taken or too long; another name is wanted' } : null;
    if (taken) return field.focus();
    tell(this, 'hm-edit', { next: copied(this.design!, this.catalogue, key, id), label: `new ${LISTS[key.list].one} ${id}` });
    tell(this, 'hm-say', { text: `${id} is in the design now and in the menus of the layers.` });
    this.toggle({ ...key, id }, true);
  }

  private takeOut(key: EntryKey): void {
    const outcome = removed(this.design!, key);
    if (typeof outcome === 'string') tell(this, 'hm-say', { text: outcome, urgent: true });
    else tell(this, 'hm-edit', { next: outcome, label: `own ${LISTS[key.list].one} ${keyText(key)} taken out` });
  }
}

/** The row that a rival stands in: that of its value, or of the law that it would take the place of. */
function shownAt({ path }: Rival, { values }: ShownEntry): string | undefined {
  const law = path.split('.')[0];
  return (values.find((value) => value.path === path) ?? values.find((value) => value.path === `${law}.formula`) ?? values.find((value) => value.path.startsWith(law) || value.path.endsWith(`.${law}`)))?.path;
}

const name = (key: EntryKey): string => `${key.list} ${keyText(key)}`;

customElements.define('hm-parameters', HmParameters);

declare global {
  interface HTMLElementTagNameMap {
    'hm-parameters': HmParameters;
  }
}
