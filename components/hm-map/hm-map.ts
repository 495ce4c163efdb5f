import { LitElement, html, nothing, svg, type PropertyValues, type SVGTemplateResult, type TemplateResult } from 'lit';
import { guard } from 'lit/directives/guard.js';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import { hatched } from '../../src/drawing/area-hatch.ts';
import { classTint, HATCH } from '../../src/drawing/regime-look.ts';
import { drawRegimeMap, mapIndexAt, type RegimeMapPlot } from '../../src/drawing/regime-map-plot.ts';
import { styleOf } from '../../src/drawing/styles.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { mapJob, planMap, type MapPlan, type MapRequest } from '../../src/map/map-job.ts';
import { DEGENERACIES, type RegimeMap } from '../../src/map/regime-map.ts';
import { BatchController, type Pool } from '../hm-sweeps/batch-controller.ts';
import { plotLook } from '../hm-sweeps/hm-sweeps.styles.ts';
import { drawn } from '../shared/drawn.ts';
import { tell, type HalfmarkEvents } from '../shared/events.ts';
import { controlLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';
import { panelLook } from '../shared/panel-look.ts';
import { tableLook } from '../shared/table-look.ts';
import { fileName, saveFile } from '../shared/save-file.ts';
import { select } from '../shared/select.ts';
import { WidthController } from '../shared/width-controller.ts';
import { styles } from './hm-map.styles.ts';
import { ERROR_WORDS, mapCsv, mapReading, markRows, tableTemperatures } from './map-table.ts';
import type { MapView } from './map-view.ts';

const LEAST_WIDTH = 320;
const MOST_WIDTH = 960;
/** Points of the map along each axis: a point for every few px of the picture. */
const POINTS = 180;
const HOTTEST = [400, 1000] as const;
const COLDEST = 4;
const DOPING: readonly [number, number] = [1e12, 1e21];

/**
 * The regime map of one layer: doping against temperature, with the design's own layers. It is made anew as the design changes. The pointer and the arrow keys read it.
 *
 * @fires hm-view  { map: MapView }
 * @fires hm-say
 */
export class HmMap extends LitElement {
  static override styles = [look, panelLook, controlLook, tableLook, plotLook, styles];
  static override properties = {
    design: { attribute: false },
    view: { attribute: false },
    chosen: { attribute: false },
    styleName: {},
    pool: { attribute: false },
    cursor: { state: true },
  };

  declare design: Design | null;
  declare view: MapView;
  declare chosen: HalfmarkEvents['hm-choose'];
  declare styleName: 'light' | 'dark';
  /** a pool of someone else; null: one of its own */ declare pool: Pool | null;
  /** index of the point that is read; null: none */ declare private cursor: number | null;

  private readonly batch = new BatchController<RegimeMap | null>(this, () => this.pool, 1);
  private readonly box = new WidthController(this);
  private complaints: readonly Complaint[] = [];
  /** what the batch that runs, or ran last, was asked */ private asked: { design: Design; key: string; plan: MapPlan } | null = null;
  private found: { design: Design; layer: number; plan: MapPlan; map: RegimeMap } | null = null;
  /** of the last batch: the layer is an insulator */ private none = false;
  private drawing: RegimeMapPlot | null = null;
  private drawnFrom: unknown[] = [];

  constructor() {
    super();
    this.design = null;
    this.view = {};
    this.chosen = null;
    this.styleName = 'light';
    this.pool = null;
    this.cursor = null;
  }

  private get hottest(): number {
    return HOTTEST.find((t) => t === this.view.hottest) ?? 1000;
  }

  /** Index of the layer that is mapped. */
  private get layer(): number {
    const { layers } = this.design!;
    const named = layers.findIndex(({ name }) => name === this.view.layer);
    if (named >= 0) return named;
    if (this.chosen?.kind === 'layer' && layers[this.chosen.index]?.dopants?.length) return this.chosen.index;
    return Math.max(0, layers.findIndex(({ dopants }) => (dopants?.length ?? 0) > 0));
  }

  protected override willUpdate(changed: PropertyValues<this>): void {
    if (this.design === null) return;
    if (changed.has('design') || changed.has('view') || changed.has('chosen')) this.ask();
    const { found } = this;
    // The hatches take some ten ms: not for every move of the pointer.
    const inputs = [found, this.box.width, this.styleName, this.view.noErrors];
    if (inputs.every((input, i) => input === this.drawnFrom[i])) return;
    this.drawnFrom = inputs;
    const width = Math.min(MOST_WIDTH, Math.max(LEAST_WIDTH, this.box.width));
    this.drawing = found && drawRegimeMap(
      { layer: `${found.plan.stack.layers[found.layer].name}, ${found.plan.stack.layers[found.layer].material.id}`, map: found.map, marks: found.plan.marks, errors: this.view.noErrors !== true },
      { width, height: Math.round(Math.min(560, Math.max(380, 0.62 * width))), style: this.styleName, prefix: 'map' },
    );
  }

  private get request(): MapRequest {
    return { layer: this.layer, columns: POINTS, rows: POINTS, doping: DOPING, temperature: [COLDEST, this.hottest] };
  }

  /** A map takes a tenth of a second: one that runs is let to its end, and the newest wish follows it. */
  private ask(): void {
    const design = this.design!;
    const { request } = this;
    const key = JSON.stringify(request);
    if (this.asked?.design === design && this.asked.key === key) return;
    const planned = planMap(design, request);
    this.complaints = planned.ok ? [] : planned.complaints;
    if (!planned.ok || this.batch.status === 'pending') return;
    this.asked = { design, key, plan: planned.plan };
    const { plan } = planned;
    void this.batch.start({ kind: 'map', design, request }, mapJob(plan)).then(() => {
      const map = this.batch.chunks.get(0);
      if (map) this.found = { design, layer: request.layer, plan, map };
      this.none = map === null;
      this.cursor = null;
      // The design may have gone on meanwhile.
      if (this.isConnected && this.design !== null) this.ask();
      this.requestUpdate();
    });
  }

  private remember(change: MapView): void {
    this.view = { ...this.view, ...change };
    tell(this, 'hm-view', { change: { map: this.view } });
  }

  private point(event: PointerEvent): void {
    this.cursor = mapIndexAt(this.found!.map, this.drawing!.area, event.offsetX, event.offsetY);
  }

  private key(event: KeyboardEvent): void {
    const { map } = this.found!;
    const [columns, rows] = [map.doping.length, map.temperature.length];
    const by = event.shiftKey ? 20 : 2;
    const step = { ArrowLeft: [-by, 0], ArrowRight: [by, 0], ArrowUp: [0, by], ArrowDown: [0, -by], Home: [-columns, 0], End: [columns, 0], PageUp: [0, rows], PageDown: [0, -rows] }[event.key];
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    if (event.key === 'Escape' && this.cursor !== null) this.cursor = null;
    else if (step === undefined) return;
    else {
      const from = this.cursor ?? this.home;
      const c = Math.min(columns - 1, Math.max(0, (from % columns) + (this.cursor === null ? 0 : step[0])));
      const r = Math.min(rows - 1, Math.max(0, Math.floor(from / columns) + (this.cursor === null ? 0 : step[1])));
      this.cursor = r * columns + c;
    }
    event.preventDefault();
    event.stopPropagation();
  }

  /** Where reading begins: at the layer itself. */
  private get home(): number {
    const { map, layer, plan } = this.found!;
    const { area, x, y } = this.drawing!;
    const mark = plan.marks.find((m) => m.layer === layer);
    return mark ? mapIndexAt(map, area, x(mark.doping), y(mark.temperature)) : 0;
  }

  private async save(ending: '.csv' | '.svg'): Promise<void> {
    const text = ending === '.csv' ? mapCsv(this.found!.map) : svgText(this.drawing!);
    const type = ending === '.csv' ? 'text/csv' : 'image/svg+xml';
    const name = fileName(`${this.design!.title} regimes of ${this.found!.plan.stack.layers[this.found!.layer].name}`, ending);
    const outcome = await saveFile(name, type, new Blob([text], { type })).catch(() => null);
    if (outcome !== 'given up') tell(this, 'hm-say', outcome === null ? { text: `${name} could not be written.`, urgent: true } : { text: `${name} written.` });
  }

  override render(): TemplateResult | typeof nothing {
    const { design } = this;
    if (design === null) return nothing;
    const { status, reason } = this.batch;
    return html`<div class="ask" role="group" aria-label="What the map shows">
        ${select({ id: 'layer', label: 'Layer', value: design.layers[this.layer]?.name ?? '', options: design.layers.map(({ name }) => ({ value: name, text: name })), onChoice: (layer) => this.remember({ layer }) })}
        ${select({ id: 'hottest', label: 'Up to', value: String(this.hottest), options: HOTTEST.map((t) => ({ value: String(t), text: `${t} K` })), onChoice: (t) => this.remember({ hottest: Number(t) }) })}
        <label class="check"><input type="checkbox" .checked=${this.view.noErrors !== true} @change=${(e: Event) => this.remember({ noErrors: !(e.target as HTMLInputElement).checked })} /> where the textbook is wrong</label>
      </div>
      ${this.complaints.length > 0 ? html`<div role="alert">${this.complaints.map(({ message }) => html`<p class="wrong">This layer ${message}.</p>`)}</div>` : nothing}
      ${this.none ? html`<p role="status">An insulator has no carriers to map: choose another layer.</p>` : nothing}
      ${status === 'error' ? html`<p class="wrong" role="alert">The program itself failed: ${reason}.</p>` : status === 'pending' && this.found === null ? html`<p role="status">Making the map</p>` : nothing}
      ${this.found === null || this.none ? nothing : this.renderMap()}`;
  }

  private renderMap(): TemplateResult {
    const { map, design, layer, plan } = this.found!;
    const drawing = this.drawing!;
    const { cursor } = this;
    const stale = design !== this.design || layer !== this.layer;
    const reading = cursor === null ? null : mapReading(map, cursor);
    const text = reading === null ? 'not reading; press an arrow key' : `${reading.where}: ${reading.words}, ${reading.parts.map(({ symbol, figure }) => `${symbol} ${figure}`).join(', ')}`;
    return html`<div class=${stale ? 'found stale' : 'found'}>
      <div class="picture" @pointerleave=${() => (this.cursor = null)}>
        <svg width=${drawing.width} height=${drawing.height} viewBox="0 0 ${drawing.width} ${drawing.height}" role="img" aria-label=${drawing.title}>
          ${guard([drawing], () => drawn(drawing))} ${cursor === null ? nothing : this.crosshair(cursor)}
        </svg>
        <div class="surface" role="slider" tabindex="0" aria-label="point of the map" aria-describedby="summary" aria-valuemin="0" aria-valuemax=${map.regime.length - 1} aria-valuenow=${cursor ?? 0} aria-valuetext=${text}
          @keydown=${this.key} @pointermove=${this.point} @pointerdown=${this.point}></div>
      </div>
      <p class="reading ${reading === null ? 'faint' : ''}" aria-hidden="true">${reading === null ? 'Point at the map, or use the arrow keys, to read it.' : html`<b>${reading.where}</b> <span class="part">${reading.words}</span> ${reading.parts.map(({ symbol, figure }) => html`<span class="part"><span>${symbol}</span> ${figure}</span>`)}`}</p>
      ${this.renderKey()}
      <p id="summary" class="faint">${drawing.description}</p>
      <div class="row"><button type="button" @click=${() => this.save('.csv')}>CSV</button><button type="button" @click=${() => this.save('.svg')}>SVG</button></div>
      <details><summary>The design’s layers as a table</summary>
        <div class="scroll" role="region" aria-label="Regimes of the layers, table" tabindex="0"><table>
          <thead><tr><th scope="col">layer</th><th scope="col">active doping</th>${tableTemperatures(map).map((row) => html`<th scope="col">at ${Number(map.temperature[row].toPrecision(3))} K</th>`)}</tr></thead>
          <tbody>${markRows(map, plan.marks).map(({ name, doping, cells }) => html`<tr><th scope="row">${name}</th><td>${doping}</td>${cells.map((cell) => html`<td>${cell}</td>`)}</tr>`)}</tbody>
        </table></div>
      </details>
    </div>`;
  }

  private crosshair(cursor: number): SVGTemplateResult {
    const { map } = this.found!;
    const { area, x, y } = this.drawing!;
    const at = { x: x(map.doping[cursor % map.doping.length]), y: y(map.temperature[Math.floor(cursor / map.doping.length)]) };
    return svg`<g data-role="crosshair" stroke="currentColor" fill="none"><line x1=${at.x} x2=${at.x} y1=${area.top} y2=${area.bottom}></line><line x1=${area.left} x2=${area.right} y1=${at.y} y2=${at.y}></line></g>`;
  }

  /** What tints, hatches and lines stand for; the areas bear their words as well, where there is room. */
  private renderKey(): TemplateResult {
    const style = styleOf(this.styleName);
    const swatch = (fill: string, hatch: string): TemplateResult => html`<svg width="30" height="16" aria-hidden="true">${svg`<rect x="0.5" y="0.5" width="29" height="15" fill=${fill} stroke=${style.ink}></rect><path d=${hatch} stroke=${style.faint} fill="none"></path>`}</svg>`;
    const line = (stroke: string, dash: string, width: number): TemplateResult => html`<svg width="30" height="16" aria-hidden="true">${svg`<line x1="0" x2="30" y1="8" y2="8" stroke=${stroke} stroke-width=${width} stroke-dasharray=${dash} stroke-linecap="round"></line>`}</svg>`;
    const box = { left: 1, right: 29, top: 1, bottom: 15 };
    return html`<ul class="key" aria-label="Key of the map">
      ${(['freeze-out', 'extrinsic', 'intrinsic'] as const).map((name) => html`<li>${swatch(classTint(name, style), '')}${name}</li>`)}
      ${DEGENERACIES.flatMap((name) => (HATCH[name] === null ? [] : [html`<li>${swatch(style.ground, hatched(box, HATCH[name]!, 1, () => true))}${name === 'transitional' ? 'transitional: EF within 3 kT of its band' : 'degenerate: EF inside its band'}</li>`]))}
      <li>${line(style.ink, '10 3 2 3', 1.6)}Mott density</li>
      ${this.view.noErrors === true ? nothing : html`<li>${line(style.valence, '1.5 3', 1.5)}the textbook’s EF is off by ${ERROR_WORDS} meV</li>`}
    </ul>`;
  }
}

customElements.define('hm-map', HmMap);

declare global {
  interface HTMLElementTagNameMap {
    'hm-map': HmMap;
  }
}
