import { LitElement, html, nothing, svg, type PropertyValues, type SVGTemplateResult, type TemplateResult } from 'lit';
import { guard } from 'lit/directives/guard.js';
import { layerEdges } from '../../src/drawing/depth-axis.ts';
import type { Variant } from '../../src/drawing/marks/variants.ts';
import { drawPlate, type Plate } from '../../src/drawing/plate.ts';
import type { Result } from '../../src/result/types.ts';
import { drawn } from '../shared/drawn.ts';
import { tell, type HalfmarkEvents } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import { tableLook } from '../shared/table-look.ts';
import { WidthController } from '../shared/width-controller.ts';
import { panned, zoomed, zoomedEnergies, zoomedOnto } from './depth-window.ts';
import { styles } from './hm-plate.styles.ts';
import { plateTable } from './plate-table.ts';
import { dimensionPanel, tools, type ToolsInput } from './plate-tools.ts';
import { heldView, type PlateView } from './plate-view.ts';
import { readingAt, readingParts, readingSentence, depthText, type Reading } from './reading.ts';

/** What the strip and the rail need to stand in line with the plate: detail of `plate-drawn`. */
export type PlateAxes = Plate['axes'] & { /** px of the whole picture */ width: number; height: number };

/** Width to height of the picture, and the ends of its height, px. */
const SHAPE = 0.5;
const HEIGHTS = [300, 600] as const;
/** Below this width nothing can be drawn (a page not laid out yet), px. */
const LEAST_WIDTH = 200;
const ZOOM_STEP = 1.6;
/** px that an arrow key moves the reading cursor by; ten times with Shift */
const CURSOR_STEP = 2;

let plates = 0;

/**
 * The band diagram. The pointer or the arrow keys read it at a depth; dragging, the wheel (with Ctrl, or over an axis) and the keys + − 0 look at a part of it;
 * figures of dimension lines are dragged, put away and put back.
 *
 * @slot rail  stands beside the picture, its top in line with the picture's; below it where there is no room
 * @fires hm-depth     the reading cursor moved; null when the pointer left
 * @fires hm-view      { change } with keys of PlateView
 * @fires plate-drawn  detail PlateAxes, does not bubble: the axes have changed; told of drawings, not of acts, for the strip and the rail to stand in line
 */
export class HmPlate extends LitElement {
  static override styles = [look, tableLook, styles];
  static override properties = {
    result: { attribute: false },
    // By its contents: the page hands over a new record with every pointer move, and the picture is not drawn anew for that.
    view: { attribute: false, hasChanged: (next: PlateView, before: PlateView | undefined) => JSON.stringify(next) !== JSON.stringify(before) },
    stale: { type: Boolean, reflect: true },
    notice: {},
    depth_nm: { attribute: false },
    chosen: { attribute: false },
    variants: { attribute: false },
    ownName: {},
    open: { state: true },
    dark: { state: true },
    holding: { state: true },
    overFigure: { state: true },
    live: { state: true },
  };

  declare result: Result | null;
  declare view: PlateView;
  /** the result is of the stack before the last change */ declare stale: boolean;
  /** why there is no newer picture, in words */ declare notice: string | null;
  /** where the reading cursor stands, nm; null: nowhere */ declare depth_nm: number | null;
  /** what is chosen in the strip: a zoom without a pointer goes there */ declare chosen: HalfmarkEvents['hm-choose'];
  /** other results to lay over this one */ declare variants: readonly Variant[];
  /** what the plate's own result is called beside them; empty: it is not named */ declare ownName: string;
  declare private open: { dimensions: boolean; table: boolean };
  declare private dark: boolean;
  declare private holding: boolean;
  declare private overFigure: boolean;
  /** the view while something is dragged: whoever draws this element anew meanwhile hands over the one before */ declare private live: PlateView | null;

  private plate: Plate | null = null;
  private readonly ids = `plate-${++plates}`;
  private hold: { kind: 'pan'; x: number; started: boolean } | { kind: 'figure'; id: string; x: number; y: number; from: [number, number] } | null = null;
  private readonly room = new WidthController(this, '.frame');
  private drawnWidth = 0;
  private readonly darkness = matchMedia('(prefers-color-scheme: dark)');
  private readonly followDarkness = (): void => void (this.dark = this.darkness.matches);
  private lastTold = '';

  constructor() {
    super();
    this.result = null;
    this.view = {};
    this.stale = false;
    this.notice = null;
    this.depth_nm = null;
    this.chosen = null;
    this.variants = [];
    this.ownName = '';
    this.open = { dimensions: false, table: false };
    this.dark = false;
    this.holding = false;
    this.overFigure = false;
    this.live = null;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.followDarkness();
    this.darkness.addEventListener('change', this.followDarkness);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.darkness.removeEventListener('change', this.followDarkness);
  }

  private get seen(): PlateView {
    return this.live ?? this.view;
  }

  /** Of the picture as it stands; null while there is none. */
  get axes(): PlateAxes | null {
    return this.plate && { ...this.plate.axes, width: this.plate.width, height: this.plate.height };
  }

  private get total(): number {
    return this.result ? layerEdges(this.result)[this.result.layers.length] : 0;
  }

  private get height(): number {
    return Math.round(Math.min(Math.max(this.room.width * SHAPE, HEIGHTS[0]), HEIGHTS[1]));
  }

  protected override willUpdate(changed: PropertyValues): void {
    const drawnFrom = ['result', 'view', 'live', 'stale', 'dark', 'variants', 'ownName'];
    if (this.room.width === this.drawnWidth && !drawnFrom.some((name) => changed.has(name))) return;
    this.drawnWidth = this.room.width;
    this.plate = this.draw();
  }

  private draw(): Plate | null {
    if (!this.result || this.room.width < LEAST_WIDTH) return null;
    const view = heldView(this.seen);
    return drawPlate(this.result, { ...view, style: view.style ?? (this.dark ? 'dark' : 'light'), stale: this.stale, variants: [...this.variants], ...(this.ownName === '' ? {} : { base: this.ownName }), width: this.room.width, height: this.height, frame: 'bare', prefix: this.ids });
  }

  protected override updated(): void {
    const { axes } = this;
    if (!axes) return;
    // Functions of an axis are new ones each time; what they compute with is what counts.
    const told = JSON.stringify([axes.depth.mode, axes.depth.range, axes.depth.window, axes.depth.edges, axes.energy.range, axes.energy.domain, axes.height]);
    if (told === this.lastTold) return;
    this.lastTold = told;
    this.dispatchEvent(new CustomEvent<PlateAxes>('plate-drawn', { detail: axes }));
  }

  override render(): TemplateResult {
    const { plate, result } = this;
    const reading = result && this.depth_nm !== null ? readingAt(result, this.depth_nm) : null;
    const input: ToolsInput = {
      view: this.seen, dimensions: plate?.dimensions ?? [], open: this.open, zoomedIn: this.seen.window !== undefined || this.seen.energyWindow !== undefined,
      change: (change) => this.change(change), zoom: (factor) => this.zoom(factor), whole: () => this.whole(), toggle: (panel) => (this.open = { ...this.open, [panel]: !this.open[panel] }),
    };
    return html`
      ${result ? tools(input) : nothing}
      ${this.renderNotice()}
      ${this.open.dimensions && result ? dimensionPanel(input) : nothing}
      <div class="beside">
        <div class="frame">${plate && result ? this.renderPicture(plate, result, reading) : html`<div class="empty">${result ? '' : 'No band diagram yet: it is drawn as soon as the stack is solved.'}</div>`}</div>
        <slot name="rail"></slot>
      </div>
      ${plate && result ? this.renderReading(result, reading) : nothing}
      ${this.open.table && plate && result ? plateTable(result, plate.axes.depth, plate.description) : nothing}
    `;
  }

  private renderNotice(): TemplateResult | typeof nothing {
    if (this.notice) return html`<p class="notice" role="status">${this.notice}${this.result ? ' The picture is of the stack before that.' : ''}</p>`;
    return nothing;
  }

  private renderPicture(plate: Plate, result: Result, reading: Reading | null): TemplateResult {
    const words = reading ? readingSentence(reading, result.layers[reading.layer].name) : 'not reading; press an arrow key';
    return html`<div class="picture" @pointerleave=${this.pointerLeft}>
        <svg width=${plate.width} height=${plate.height} viewBox="0 0 ${plate.width} ${plate.height}" role="img" aria-label=${plate.title} aria-describedby="words">
          ${guard([plate], () => drawn(plate))} ${reading ? this.renderCursor(plate, reading) : nothing}
        </svg>
        <div
          class="surface ${this.holding ? 'held' : ''} ${this.overFigure ? 'on-figure' : ''}"
          role="slider"
          tabindex="0"
          aria-label="reading depth"
          aria-keyshortcuts="+ - 0 Alt+ArrowLeft Alt+ArrowRight Shift+ArrowUp Shift+ArrowDown"
          aria-orientation="horizontal"
          aria-valuemin="0"
          aria-valuemax=${Number(this.total.toPrecision(6))}
          aria-valuenow=${Number((reading?.z_nm ?? 0).toPrecision(6))}
          aria-valuetext=${words}
          @keydown=${this.key}
          @wheel=${this.wheel}
          @dblclick=${this.doubled}
          @pointerdown=${this.pointerDown}
          @pointermove=${this.pointerMove}
          @pointerup=${this.pointerUp}
          @pointercancel=${this.pointerUp}
        ></div>
      </div>
      <p class="spoken" id="words">${plate.description}</p>`;
  }

  private renderReading(result: Result, reading: Reading | null): TemplateResult {
    if (!reading) return html`<p class="hint">Point at a depth to read the figures there. <span class="keys">Keys: arrows read, + − 0 look nearer, farther, at all; Alt ← → move along, Shift ↑ ↓ stretch the energies.</span></p>`;
    return html`<p class="reading" aria-hidden="true">
      <span class="where">${depthText(reading.z_nm)} in ${result.layers[reading.layer].name}</span>
      ${readingParts(reading).map((p) => html`<span class="part"><span class="symbol">${p.symbol}</span> ${p.figure} ${p.unit}</span>`)}
    </p>`;
  }

  /** The reading cursor: an upright line, with a ring on each band edge. */
  private renderCursor(plate: Plate, reading: Reading): SVGTemplateResult | typeof nothing {
    const { depth, energy, area } = plate.axes;
    const x = depth.x(reading.z_nm);
    if (x < area.left - 0.5 || x > area.right + 0.5) return nothing;
    const ef = efAt(this.result!, reading);
    const rings = [ef + reading.ec_minus_ef_eV, ef - reading.ef_minus_ev_eV].map(energy.y).filter((y) => y >= area.top && y <= area.bottom);
    return svg`<g data-role="reading-cursor" stroke="currentColor" fill="none">
      <line x1=${x} x2=${x} y1=${area.top} y2=${area.bottom} stroke-width="1" opacity="0.7"></line>
      ${rings.map((y) => svg`<circle cx=${x} cy=${y} r="3.5" stroke-width="1.5"></circle>`)}
    </g>`;
  }

  // What a person does.

  private change(change: Partial<PlateView>): void {
    this.view = { ...this.view, ...change };
    tell(this, 'hm-view', { change });
  }

  private read(z_nm: number | null): void {
    if (z_nm === this.depth_nm) return;
    this.depth_nm = z_nm;
    tell(this, 'hm-depth', { depth_nm: z_nm });
  }

  private zoom(factor: number, x?: number): void {
    if (!this.plate) return;
    const { depth, area } = this.plate.axes;
    this.change({ window: x === undefined ? zoomedOnto(depth, this.total, this.interest(depth.depth((area.left + area.right) / 2)), factor) : zoomed(depth, this.total, x, factor) });
  }

  /** The depth that a person looks at, nm: that of the reading, of what is chosen in the strip, else the one given. */
  private interest(otherwise: number): number {
    if (this.depth_nm !== null) return this.depth_nm;
    const { chosen, result } = this;
    if (chosen === null || result === null) return otherwise;
    const edges = layerEdges(result);
    if (chosen.kind === 'contact') return chosen.index === 0 ? 0 : this.total;
    const below = edges[chosen.index + 1];
    if (below === undefined) return otherwise;
    return chosen.kind === 'interface' ? below : (edges[chosen.index] + below) / 2;
  }

  private zoomEnergy(factor: number, y?: number): void {
    if (!this.plate) return;
    const { energy, area } = this.plate.axes;
    this.change({ energyWindow: zoomedEnergies(energy.domain, energy.energy(y ?? (area.top + area.bottom) / 2), factor) });
  }

  private whole(): void {
    this.change({ window: undefined, energyWindow: undefined });
  }

  private key(event: KeyboardEvent): void {
    if (event.ctrlKey || event.metaKey || !this.plate) return;
    const { depth, area } = this.plate.axes;
    const acts: Record<string, () => void> = {
      ArrowLeft: () => (event.altKey ? this.pan(-40) : this.step(-CURSOR_STEP * (event.shiftKey ? 10 : 1))),
      ArrowRight: () => (event.altKey ? this.pan(40) : this.step(CURSOR_STEP * (event.shiftKey ? 10 : 1))),
      ArrowUp: () => (event.shiftKey ? this.zoomEnergy(ZOOM_STEP) : this.step(CURSOR_STEP)),
      ArrowDown: () => (event.shiftKey ? this.zoomEnergy(1 / ZOOM_STEP) : this.step(-CURSOR_STEP)),
      Home: () => this.read(depth.depth(area.left)),
      End: () => this.read(depth.depth(area.right)),
      Escape: () => this.read(null),
      '+': () => this.zoom(ZOOM_STEP),
      '=': () => this.zoom(ZOOM_STEP),
      '-': () => this.zoom(1 / ZOOM_STEP),
      '0': () => this.whole(),
    };
    const act = acts[event.key];
    if (!act || (event.key === 'Escape' && this.depth_nm === null)) return;
    event.preventDefault();
    event.stopPropagation();
    act();
  }

  /** The cursor by px of the axis; where it leaves the part in view, that follows. */
  private step(dx: number): void {
    const { depth, area } = this.plate!.axes;
    const from = this.depth_nm === null ? (area.left + area.right) / 2 : depth.x(this.depth_nm);
    const to = Math.min(Math.max(from + dx, depth.x(0)), depth.x(this.total));
    this.read(Math.min(Math.max(depth.depth(to), 0), this.total));
    if (to < area.left || to > area.right) this.pan(to < area.left ? to - area.left - 20 : to - area.right + 20);
  }

  private pan(dx: number): void {
    if (this.plate && this.view.window) this.change({ window: panned(this.plate.axes.depth, this.total, dx) });
  }

  private wheel(event: WheelEvent): void {
    if (!this.plate) return;
    const { area } = this.plate.axes;
    const { offsetX: x, offsetY: y } = event;
    const overEnergy = x < area.left && y < area.bottom;
    // The page keeps its scrolling over the picture itself.
    if (!event.ctrlKey && y < area.bottom && !overEnergy) return;
    event.preventDefault();
    const factor = Math.exp(-event.deltaY * (event.deltaMode === 0 ? 0.0025 : 0.08));
    if (overEnergy) this.zoomEnergy(factor, y);
    else this.zoom(factor, x);
  }

  private doubled(event: MouseEvent): void {
    const id = this.figureAt(event.offsetX, event.offsetY);
    if (id === null) this.whole();
  }

  /** The dimension line whose figure lies there. */
  private figureAt(x: number, y: number): string | null {
    const found = this.plate?.dimensions.find(({ box, hidden }) => box && !hidden && x >= box.x - 2 && x <= box.x + box.w + 2 && y >= box.y - 2 && y <= box.y + box.h + 2);
    return found?.id ?? null;
  }

  private pointerDown(event: PointerEvent): void {
    if (event.button !== 0) return;
    const { offsetX: x, offsetY: y } = event;
    const id = this.figureAt(x, y);
    this.hold = id === null ? { kind: 'pan', x, started: false } : { kind: 'figure', id, x, y, from: heldView(this.view).moved?.[id] ?? [0, 0] };
    if (id !== null) event.preventDefault();
    (event.currentTarget as Element).setPointerCapture(event.pointerId);
    if (event.pointerType !== 'mouse') this.readAt(x);
  }

  private pointerMove(event: PointerEvent): void {
    const { hold } = this;
    const { offsetX: x, offsetY: y } = event;
    if (hold?.kind === 'figure') {
      // Live, and told once it is let go: a drag is one change of the view.
      this.live = { ...this.seen, moved: { ...this.seen.moved, [hold.id]: [hold.from[0] + x - hold.x, hold.from[1] + y - hold.y] } };
      this.holding = true;
    } else if (hold?.kind === 'pan' && this.seen.window && this.plate && (hold.started || Math.abs(x - hold.x) > 4)) {
      this.live = { ...this.seen, window: panned(this.plate.axes.depth, this.total, hold.x - x) };
      Object.assign(hold, { x, started: true });
      this.holding = true;
    } else {
      this.overFigure = this.figureAt(x, y) !== null;
      this.readAt(x);
    }
  }

  private pointerUp(): void {
    const { hold } = this;
    this.hold = null;
    if (!this.holding) return;
    this.holding = false;
    const { moved, window } = this.seen;
    this.live = null;
    this.change(hold?.kind === 'figure' ? { moved } : { window });
  }

  private pointerLeft(event: PointerEvent): void {
    // A finger leaves when it is lifted: what it read stays to be read.
    if (this.hold || event.pointerType === 'touch') return;
    this.overFigure = false;
    // A reading made by keys stays: the picture still has the focus.
    if (!this.renderRoot.querySelector('.surface')?.matches(':focus-visible')) this.read(null);
  }

  private readAt(x: number): void {
    const { depth, area } = this.plate!.axes;
    this.read(x < area.left || x > area.right ? null : Math.min(Math.max(depth.depth(x), 0), this.total));
  }
}

/** Fermi level on the energy axis at a reading: it is not flat under bias. */
function efAt(result: Result, reading: Reading): number {
  const { z_nm, ef_eV } = result.profile;
  let i = z_nm.findIndex((z) => z >= reading.z_nm);
  if (i < 0) i = z_nm.length - 1;
  return ef_eV[i];
}

customElements.define('hm-plate', HmPlate);

declare global {
  interface HTMLElementTagNameMap {
    'hm-plate': HmPlate;
  }
}
