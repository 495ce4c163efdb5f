import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import type { DepthAxis } from '../../src/drawing/depth-axis.ts';
import type { LayerResult, Result } from '../../src/result/types.ts';
import { setConcentration, setThickness, type Side } from '../../src/state/commands/index.ts';
import { ownOfContact, ownOfLayer, ownRows } from '../../src/parameters/own-entries.ts';
import { complaintAt, complaintsWithin } from '../shared/complaint-at.ts';
import { tell, type HalfmarkEvents } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import type { DopantChoice, MaterialChoice, MetalChoice } from '../shared/menus.ts';
import { OWN_WORDS, ownMark } from '../shared/own-mark.ts';
import { WidthController } from '../shared/width-controller.ts';
import { plainThickness } from '../shared/typed-text.ts';
import type { HmField } from '../hm-field/hm-field.ts';
import type { HmLayerForm } from '../hm-layer-form/hm-layer-form.ts';
import '../hm-contact-form/hm-contact-form.ts';
import '../hm-field/hm-field.ts';
import '../hm-interface-form/hm-interface-form.ts';
import '../hm-layer-form/hm-layer-form.ts';
import { contactText, dopantName, fitsColumn, layerLines, layerSentence } from './column-text.ts';
import { columnValues, dopingKind } from './column-values.ts';
import { scaledThickness } from './edge-drag.ts';
import { styles } from './hm-strip.styles.ts';
import { copied, inserted, moved, removed, type StackAct } from './strip-acts.ts';
import { cards } from './strip-cards.ts';
import { stripGeometry, type Span, type StripGeometry } from './strip-geometry.ts';
import { meaningOf } from './strip-keys.ts';
import { insertLane, interfaceLane } from './strip-lanes.ts';
import { StripPointer, type StripSurface } from './strip-pointer.ts';

type Choice = HalfmarkEvents['hm-choose'];
/** A value being typed over its place in the column. */
type InPlace = { layer: number; what: 'thickness' } | { layer: number; what: 'doping'; row: number };

/** Narrower than this a contact's words stand upright, px. */
const CONTACT_ROOM = 66;

/**
 * The stack as its own editor: a column a layer under its place on the plate's depth axis, the contacts at both ends, and the chosen one's form below.
 *
 * Drag an edge for a thickness, a column for its place; press a value and type. Keys: arrows choose, Enter edits, Escape leads back, Alt and arrows move, Delete
 * takes out, Insert or + puts in, [ and ] change the thickness by 5 %, arrow down goes to the interface under the layer.
 *
 * @fires hm-edit, hm-choose, hm-say
 */
export class HmStrip extends LitElement implements StripSurface {
  static override styles = [look, styles];
  static override properties = {
    design: { attribute: false },
    result: { attribute: false },
    axis: { attribute: false },
    chosen: { attribute: false },
    stale: { type: Boolean },
    complaints: { attribute: false },
    materials: { attribute: false },
    dopants: { attribute: false },
    metals: { attribute: false },
    inPlace: { state: true },
  };

  declare design: Design | null;
  /** the last one solved; its thicknesses are what an edge drags */ declare result: Result | null;
  /** of the plate above */ declare axis: DepthAxis | null;
  declare chosen: Choice;
  /** the result is of the stack before the last change */ declare stale: boolean;
  declare complaints: readonly Complaint[];
  declare materials: readonly MaterialChoice[];
  declare dopants: readonly DopantChoice[];
  declare metals: readonly MetalChoice[];
  declare private inPlace: InPlace | null;

  private readonly pointer = new StripPointer(this);
  private focusNext: 'column' | 'form' | 'inplace' | null = null;
  private readonly room = new WidthController(this);

  constructor() {
    super();
    this.design = null;
    this.result = null;
    this.axis = null;
    this.chosen = null;
    this.stale = false;
    this.complaints = [];
    this.materials = [];
    this.dopants = [];
    this.metals = [];
    this.inPlace = null;
  }

  protected override updated(): void {
    const columns = this.renderRoot.querySelector<HTMLElement>('.columns');
    if (columns && this.design) {
      const g = this.geometry();
      const widths = [g.top.left, ...[g.top, ...g.layers, g.bottom].map((s) => Math.max(0, s.right - s.left))];
      columns.style.gridTemplateColumns = widths.map((w) => `${w}px`).join(' ');
    }
    // Through the style sheet's object model, which a strict content security policy allows; style attributes it does not.
    for (const [key, property] of [['left', 'left'], ['width', 'width'], ['shift', 'margin-left']]) {
      for (const item of this.renderRoot.querySelectorAll<HTMLElement>(`[data-${key}]`)) item.style.setProperty(property, `${item.dataset[key]}px`);
    }
    this.placeField();
    const focus = this.focusNext;
    this.focusNext = null;
    if (focus === 'column') this.renderRoot.querySelector<HTMLElement>('.column[tabindex="0"]')?.focus();
    if (focus === 'form') this.focusForm();
    if (focus === 'inplace') void this.renderRoot.querySelector<HmField>('.inplace hm-field')?.edit();
  }

  private geometry(): StripGeometry {
    return stripGeometry(this.axis, this.design!.layers.length, this.room.width);
  }

  override render(): TemplateResult | typeof nothing {
    const { design } = this;
    if (!design || this.room.width === 0) return nothing;
    const g = this.geometry();
    return html`
      ${insertLane(design, g.edges, this.room.width, (at) => this.act(inserted(design, at)))}
      <div class="stack" @pointermove=${this.pointer.move} @pointerup=${this.pointer.up} @pointercancel=${this.pointer.cancel} @keydown=${this.key}>
        <div class="columns" role="listbox" aria-label="layer stack, surface to bottom" aria-orientation="horizontal" @pointerdown=${(e: PointerEvent) => this.pointer.press(e)} @click=${this.pressed}>
          ${this.renderContact('top', g)} ${design.layers.map((_, i) => this.renderLayer(i, g))} ${this.renderContact('bottom', g)}
        </div>
        ${g.edges.map((x, i) => (i === 0 || x === null || this.thickness(i - 1) === null ? nothing : html`<div class="edge ${this.pointer.edge?.layer === i - 1 ? 'held' : ''}" data-left=${x} title="drag: thickness of ${design.layers[i - 1].name}" @pointerdown=${(e: PointerEvent) => this.grabEdge(e, i - 1, g)}></div>`))}
        ${this.pointer.lifted ? html`<div class="landing" data-left=${this.landingX(g)}></div>` : nothing}
        ${this.renderInPlace()}
      </div>
      ${interfaceLane(design, g.edges, this.room.width, this.chosen?.kind === 'interface' ? this.chosen.index : null, this.complaints, (index) => this.choose({ kind: 'interface', index }, 'form'))}
      ${cards(g.layers, this.slim(g), this.room.width, this.chosen?.kind === 'layer' ? this.chosen.index : null, (i) => this.renderValues(i), this.pressed)}
      ${this.renderOwn(design)} ${this.renderEditor()}
    `;
  }

  /** What the sign behind a material, a dopant or a metal means; nothing where there is none. */
  private renderOwn(design: Design): TemplateResult | typeof nothing {
    const { layers, contacts } = ownRows(design);
    return layers.size + contacts.size === 0 ? nothing : html`<p class="hint">${OWN_WORDS}</p>`;
  }

  private renderContact(side: Side, g: StripGeometry): TemplateResult {
    const index = side === 'top' ? 0 : 1;
    const isChosen = this.chosen?.kind === 'contact' && this.chosen.index === index;
    const span = g[side];
    const beside = this.result?.layers.at(side === 'top' ? 0 : -1)?.type;
    const lines = contactText(this.design![side], this.result?.contacts.find((c) => c.side === side), beside);
    const wrong = complaintsWithin(this.complaints, side);
    // An end that lies outside of the part in view must not look as if it touched the layers that are in it.
    const away = g.edges.at(side === 'top' ? 0 : -1) === null;
    return html`<div
      role="option"
      class="column contact ${side} ${span.right - span.left < CONTACT_ROOM ? 'slim' : ''} ${wrong.length > 0 ? 'wrong' : ''}"
      data-contact=${index}
      aria-selected=${isChosen}
      title=${away ? 'beyond the part of the depth in view' : nothing}
      tabindex=${isChosen ? 0 : -1}
    >
      <span class="spoken">${side} contact: </span><span class="lines"><span class="name">${away && side === 'top' ? '‹ ' : ''}${lines[0]}${ownOfContact(this.design!.custom, this.design![side]) ? ownMark(lines[0]) : nothing}${away && side === 'bottom' ? ' ›' : ''}</span>${lines.slice(1).map((line) => html`<span class="value">${line}</span>`)}</span><span class="spoken">${wrong.join('; ')}</span>
    </div>`;
  }

  private renderLayer(i: number, g: StripGeometry): TemplateResult {
    const layers = this.design!.layers;
    const isChosen = this.chosen?.kind === 'layer' && this.chosen.index === i;
    // One column is always in reach of Tab.
    const inReach = isChosen || (this.chosen?.kind === 'interface' ? this.chosen.index === i : this.chosen === null && i === 0);
    const wrong = complaintsWithin(this.complaints, `layers[${i}]`);
    const width = g.layers[i].right - g.layers[i].left;
    const fits = this.fits(i, g);
    const kind = dopingKind(layers[i], this.solved(i), this.dopants);
    const own = ownRows(this.design!).layers.get(layers[i].name);
    return html`<div
      role="option"
      class="column layer ${kind} ${i === layers.length - 1 ? 'last' : ''} ${width < 1.5 ? 'gone' : fits ? '' : 'slim'} ${wrong.length > 0 ? 'wrong' : ''} ${this.pointer.lifted?.from === i ? 'lifted' : ''}"
      data-layer=${i}
      aria-selected=${isChosen}
      tabindex=${inReach ? 0 : -1}
    >
      ${fits ? html`${this.renderValues(i)}<span class="spoken">${wrong.join('; ')}</span>` : html`${width >= 12 ? html`<span class="number" aria-hidden="true">${i + 1}</span>` : nothing}<span class="spoken">${layerSentence(layers[i], i, layers.length, wrong)}</span>`}${own === undefined ? nothing : html`<span class="spoken">; own values of ${own}</span>`}
    </div>`;
  }

  private renderValues(i: number): TemplateResult {
    return columnValues(this.design!, i, this.stale ? undefined : this.solved(i), this.complaints);
  }

  /** The layer as solved, where the result is of as many layers as the design. */
  private solved(i: number): LayerResult | undefined {
    return this.result?.layers.length === this.design!.layers.length ? this.result.layers[i] : undefined;
  }

  private slim(g: StripGeometry): Set<number> {
    return new Set(g.layers.flatMap((s, i) => (s.right - s.left >= 1.5 && !this.fits(i, g) ? [i] : [])));
  }

  private fits(i: number, g: StripGeometry): boolean {
    return fitsColumn(layerLines(this.design!.layers[i], i, this.stale ? undefined : this.solved(i), ownOfLayer(this.design!.custom, this.design!.layers[i])), g.layers[i].right - g.layers[i].left);
  }

  private renderInPlace(): TemplateResult | typeof nothing {
    const at = this.inPlace;
    const layer = at && this.design!.layers[at.layer];
    if (!at || !layer) return nothing;
    const row = at.what === 'doping' ? layer.dopants?.[at.row] : undefined;
    if (at.what === 'doping' && !row) return nothing;
    const path = at.what === 'thickness' ? `layers[${at.layer}].thickness` : `layers[${at.layer}].dopants[${at.row}].concentration`;
    return html`<div class="inplace">
      <hm-field
        .label=${at.what === 'thickness' ? `thickness of ${layer.name}` : `${dopantName(row!)} in ${layer.name}`}
        .value=${at.what === 'thickness' ? layer.thickness : String(row!.concentration)}
        .unit=${at.what === 'thickness' ? 'nm' : 'cm^-3'}
        .complaint=${complaintAt(this.complaints, path)}
        @field-accept=${(e: CustomEvent<string>) => this.acceptInPlace(at, e.detail)}
        @field-leave=${() => this.leaveInPlace(true)}
        @focusout=${() => this.leaveInPlace(false)}
      ></hm-field>
    </div>`;
  }

  private renderEditor(): TemplateResult {
    const { chosen, design } = this;
    const count = design!.layers.length;
    if (chosen?.kind === 'layer' && design!.layers[chosen.index]) {
      const i = chosen.index;
      return this.editor(`Layer ${i + 1} of ${count}: ${design!.layers[i].name}`, html`
        <hm-layer-form .design=${design!} .index=${i} .materials=${this.materials} .dopants=${this.dopants} .complaints=${this.complaints}></hm-layer-form>
        <div class="acts">
          <button type="button" @click=${() => this.act(inserted(design!, i))}>Put a layer above</button>
          <button type="button" @click=${() => this.act(inserted(design!, i + 1))}>Put a layer below</button>
          <button type="button" @click=${() => this.act(copied(design!, i))}>Copy</button>
          <button type="button" ?disabled=${i === 0} @click=${() => this.act(moved(design!, i, i - 1))}>Move up</button>
          <button type="button" ?disabled=${i === count - 1} @click=${() => this.act(moved(design!, i, i + 1))}>Move down</button>
          <button type="button" ?disabled=${count === 1} @click=${() => this.act(removed(design!, i))}>Take out</button>
          ${i < count - 1 ? html`<button type="button" @click=${() => this.choose({ kind: 'interface', index: i }, 'form')}>Interface to ${design!.layers[i + 1].name}…</button>` : nothing}
        </div>`);
    }
    if (chosen?.kind === 'interface' && design!.layers[chosen.index + 1]) {
      const i = chosen.index;
      return this.editor(`Interface ${design!.layers[i].name} / ${design!.layers[i + 1].name}`, html`<hm-interface-form .design=${design!} .index=${i} .complaints=${this.complaints}></hm-interface-form>`);
    }
    if (chosen?.kind === 'contact') {
      const side: Side = chosen.index === 0 ? 'top' : 'bottom';
      return this.editor(side === 'top' ? 'Top contact' : 'Bottom contact', html`<hm-contact-form .design=${design!} .side=${side} .metals=${this.metals} .complaints=${this.complaints}></hm-contact-form>`);
    }
    return html`<p class="hint">Choose a column to see everything about it; press a value to type another; drag an edge for a thickness, a column for its place. Keys: <kbd>←</kbd> <kbd>→</kbd> choose, <kbd>Enter</kbd> edit, <kbd>Alt ←</kbd> <kbd>Alt →</kbd> move, <kbd>+</kbd> put a layer in, <kbd>Delete</kbd> take out, <kbd>[</kbd> <kbd>]</kbd> thinner, thicker.</p>`;
  }

  private editor(title: string, content: TemplateResult): TemplateResult {
    return html`<section class="editor" aria-label=${title} @keydown=${(e: KeyboardEvent) => e.key === 'Escape' && this.backToColumn()} @field-leave=${(e: CustomEvent<string>) => e.detail === 'Escape' && this.backToColumn()}>
      <header><h3>${title}</h3></header>
      ${content}
    </section>`;
  }

  private choose(choice: Choice, focus: HmStrip['focusNext'] = null): void {
    this.chosen = choice;
    this.focusNext = focus;
    this.requestUpdate();
    tell(this, 'hm-choose', choice);
  }

  private act(act: StackAct | null): void {
    if (!act) return;
    tell(this, 'hm-edit', { next: act.next, label: act.label });
    this.choose({ kind: 'layer', index: act.chosen }, 'column');
    tell(this, 'hm-say', { text: act.said });
  }

  /** nm: as typed where that is a plain length, else as solved; null while the result is of another stack. */
  private thickness(i: number): number | null {
    return plainThickness(this.design!.layers[i].thickness) ?? this.solved(i)?.thickness_nm ?? null;
  }

  private acceptInPlace(at: InPlace, text: string): void {
    const next = at.what === 'thickness' ? setThickness(this.design!, at.layer, text) : setConcentration(this.design!, at.layer, at.row, text);
    tell(this, 'hm-edit', { next, label: `${at.what} of ${this.design!.layers[at.layer].name}` });
    // A text that is no quantity stays, marked in its column and complained of in the form below.
    this.leaveInPlace(true);
  }

  private leaveInPlace(focusColumn: boolean): void {
    if (!this.inPlace) return;
    this.inPlace = null;
    if (focusColumn) this.focusNext = 'column';
  }

  private placeField(): void {
    const field = this.renderRoot.querySelector<HTMLElement>('.inplace');
    if (!field || !this.inPlace) return;
    const value = this.inPlace.what === 'thickness' ? 'thickness' : `doping ${this.inPlace.row}`;
    const anchor = this.renderRoot.querySelector<HTMLElement>(`[data-layer="${this.inPlace.layer}"] [data-value="${value}"]`);
    const [host, place] = [this.renderRoot.querySelector('.stack')!.getBoundingClientRect(), (anchor ?? this).getBoundingClientRect()];
    field.style.left = `${Math.max(0, Math.min(place.left - host.left - 6, host.width - field.offsetWidth))}px`;
    field.style.top = `${place.top - host.top - 28}px`;
  }

  private focusForm(): void {
    const form = this.renderRoot.querySelector<HTMLElement>('.editor :is(hm-layer-form, hm-interface-form, hm-contact-form)');
    if (form?.localName === 'hm-layer-form') void (form as HmLayerForm).edit();
    else if (form) void (form as LitElement).updateComplete.then(() => form.focus());
  }

  private backToColumn(): void {
    this.focusNext = 'column';
    this.requestUpdate();
  }

  private pressed(event: MouseEvent): void {
    if (this.pointer.swallowsClick()) return;
    const target = event.target as Element;
    const column = target.closest<HTMLElement>('[data-layer], [data-contact]');
    if (!column) return;
    if (column.dataset.contact !== undefined) return this.choose({ kind: 'contact', index: Number(column.dataset.contact) }, 'column');
    const layer = Number(column.dataset.layer);
    const [what, row] = target.closest<HTMLElement>('[data-value]')?.dataset.value?.split(' ') ?? [];
    const concentration = what === 'doping' ? this.design!.layers[layer].dopants![Number(row)].concentration : null;
    if (what === 'thickness') this.inPlace = { layer, what };
    else if (what === 'doping' && typeof concentration === 'string') this.inPlace = { layer, what, row: Number(row) };
    this.choose({ kind: 'layer', index: layer }, this.inPlace ? 'inplace' : 'column');
  }

  private grabEdge(event: PointerEvent, layer: number, g: StripGeometry): void {
    const thickness = this.thickness(layer);
    if (event.button !== 0 || thickness === null) return;
    const follows = this.axis?.edges.length === g.edges.length;
    const span = follows ? { left: this.axis!.edges[layer], right: this.axis!.edges[layer + 1] } : g.layers[layer];
    this.pointer.grab(event, layer, span.right - span.left, thickness);
    this.choose({ kind: 'layer', index: layer }, 'column');
  }

  thicknessText(layer: number): string {
    return this.design!.layers[layer].thickness;
  }

  spans(): Span[] {
    return this.geometry().layers;
  }

  leftEnd(): number {
    return this.getBoundingClientRect().left;
  }

  dragThickness(layer: number, text: string, join: string): void {
    tell(this, 'hm-edit', { next: setThickness(this.design!, layer, text), label: `thickness of ${this.design!.layers[layer].name}`, join });
  }

  dropEdge(layer: number, before: string): void {
    const { name, thickness } = this.design!.layers[layer];
    if (thickness !== before) tell(this, 'hm-say', { text: `${name}: ${thickness}, was ${before}.` });
  }

  dropColumn(from: number, to: number): void {
    this.act(moved(this.design!, from, to));
  }

  private landingX(g: StripGeometry): number {
    const { from, to } = this.pointer.lifted!;
    return to <= from ? g.layers[to].left : g.layers[to].right;
  }

  private key(event: KeyboardEvent): void {
    // Brackets are behind AltGr on many keyboards, which some systems report as Ctrl and Alt.
    if ((event.ctrlKey || event.metaKey) && !event.getModifierState('AltGraph')) return;
    if (event.key === 'Escape') {
      if (!this.pointer.busy) return;
      this.pointer.cancel();
    } else {
      const meaning = meaningOf(event, this.design!, this.chosen ?? { kind: 'layer', index: 0 });
      if (!meaning) return;
      if (meaning.kind === 'choose') this.choose(meaning.choice, meaning.focus);
      else if (meaning.kind === 'act') this.act(meaning.act);
      else if (meaning.kind === 'nudge') this.nudge(meaning.layer, meaning.share);
      else if (meaning.kind === 'say') tell(this, 'hm-say', { text: meaning.text });
    }
    event.preventDefault();
    event.stopPropagation();
  }

  private nudge(layer: number, share: number): void {
    const thickness = this.thickness(layer);
    if (thickness === null) return;
    const { name, thickness: before } = this.design!.layers[layer];
    const text = scaledThickness(thickness, share, before);
    this.dragThickness(layer, text, `nudge ${layer}`);
    tell(this, 'hm-say', { text: `${name}: ${text}` });
  }
}

customElements.define('hm-strip', HmStrip);

declare global {
  interface HTMLElementTagNameMap {
    'hm-strip': HmStrip;
  }
}
