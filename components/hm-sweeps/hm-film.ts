import { LitElement, html, nothing, svg, type PropertyValues, type TemplateResult } from 'lit';
import { guard } from 'lit/directives/guard.js';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import { drawFilmStrip, type FilmStrip } from '../../src/drawing/film-strip.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';
import type { Result } from '../../src/result/types.ts';
import { CHAIN } from '../../src/sweep/sweep.ts';
import { filmJob, planFilm, type FilmPlan, type Frame } from '../../src/sweep/film.ts';
import '../hm-field/hm-field.ts';
import { drawn } from '../shared/drawn.ts';
import { tell } from '../shared/events.ts';
import { controlLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';
import { panelLook } from '../shared/panel-look.ts';
import { tableLook } from '../shared/table-look.ts';
import { unitOf } from '../shared/typed-text.ts';
import { WidthController } from '../shared/width-controller.ts';
import { BatchController, type Pool } from './batch-controller.ts';
import { plotLook } from './hm-sweeps.styles.ts';
import { filmAbout, sweepBasis, TEMPERATURE } from './sweep-choices.ts';
import type { FilmView } from './sweeps-view.ts';

declare module '../shared/events.ts' {
  interface HalfmarkEvents {
    /** show this result on the plate instead of the design's own, marked with the words; null: the design's own again */
    'hm-frame': { result: Result; /** "frame at 77 K" */ words: string } | null;
  }
}

const LEAST_WIDTH = 320;
/** Time that a frame stands, ms. */
const FRAME_MS = 160;

/**
 * The temperature film: the design solved over a range of temperatures, and the plate stepped through it. Under the slider the regime of each layer over the
 * temperature. It plays only on a wish, and not at all where less motion is asked for: there it is stepped.
 *
 * @fires hm-frame   the frame to be shown on the plate; null when the film is closed, or is of an earlier design
 * @fires film-view  detail FilmView; does not bubble: the range was changed
 */
export class HmFilm extends LitElement {
  static override styles = [look, panelLook, controlLook, tableLook, plotLook];
  static override properties = {
    design: { attribute: false },
    view: { attribute: false },
    styleName: {},
    pool: { attribute: false },
    complaints: { state: true },
    at: { state: true },
    playing: { state: true },
    still: { state: true },
  };

  declare design: Design | null;
  declare view: FilmView | null;
  declare styleName: 'light' | 'dark';
  declare pool: Pool | null;
  declare private complaints: readonly Complaint[];
  /** index of the frame on the plate; null: the design's own */ declare private at: number | null;
  declare private playing: boolean;
  /** less motion is asked for */ declare private still: boolean;

  private readonly batch = new BatchController<Frame[]>(this, () => this.pool);
  private readonly box = new WidthController(this);
  private readonly motion = matchMedia('(prefers-reduced-motion: reduce)');
  private readonly followMotion = (): void => {
    this.still = this.motion.matches;
    if (this.still) this.playing = false;
  };
  private plan: FilmPlan | null = null;
  private judged: { plan: FilmPlan | null; design: Design | null; stale: boolean } = { plan: null, design: null, stale: false };
  private scale: 'linear' | 'log' = 'linear';
  private frames: (Frame | undefined)[] = [];
  private framesOf: unknown = null;
  private timer = 0;

  constructor() {
    super();
    this.design = null;
    this.view = null;
    this.styleName = 'light';
    this.pool = null;
    this.complaints = [];
    this.at = null;
    this.playing = false;
    this.still = false;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.followMotion();
    this.motion.addEventListener('change', this.followMotion);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.motion.removeEventListener('change', this.followMotion);
    clearTimeout(this.timer);
    this.playing = false;
    this.at = null;
  }

  protected override willUpdate(_: PropertyValues<this>): void {
    // A frame of another stack must not stand on the plate.
    if (this.at !== null && this.stale) this.close();
    if (this.plan === null || this.framesOf === this.batch.chunks) return;
    this.framesOf = this.batch.chunks;
    this.frames = new Array<Frame | undefined>(this.plan.temperatures.length).fill(undefined);
    for (const [chunk, list] of this.batch.chunks) list.forEach((frame, i) => (this.frames[chunk * CHAIN + i] = frame));
  }

  protected override updated(changed: PropertyValues): void {
    if (changed.has('playing') || changed.has('at')) {
      clearTimeout(this.timer);
      if (this.playing) this.timer = window.setTimeout(() => this.tick(), FRAME_MS);
    }
  }

  private get asked(): FilmView {
    return this.view ?? filmAbout(this.design!);
  }

  /** The temperature itself may change: it is what the film goes through. */
  private get stale(): boolean {
    const { plan, design, judged } = this;
    if (plan === null || design === null) return false;
    if (judged.plan !== plan || judged.design !== design) this.judged = { plan, design, stale: plan.design !== design && sweepBasis(plan.design, TEMPERATURE) !== sweepBasis(design, TEMPERATURE) };
    return this.judged.stale;
  }

  private set(change: Partial<FilmView>): void {
    this.view = { ...this.asked, ...change };
    this.dispatchEvent(new CustomEvent<FilmView>('film-view', { detail: this.view }));
  }

  private start(): void {
    const { from, to, frames, log } = this.asked;
    const request = { from, to, frames: frames.trim() === '' ? NaN : Number(frames), scale: log ? ('log' as const) : ('linear' as const) };
    const planned = planFilm(this.design!, request);
    this.complaints = planned.ok ? [] : planned.complaints;
    if (!planned.ok) return;
    this.close();
    this.plan = planned.plan;
    this.scale = request.scale;
    void this.batch.start({ kind: 'film', design: this.design!, request }, filmJob(planned.plan)).then(() => {
      if (this.batch.status === 'complete') tell(this, 'hm-say', { text: `Film ready: ${planned.plan.temperatures.length} frames.` });
    });
  }

  /** Shows a frame on the plate; one that has no answer is passed over. */
  private show(index: number): void {
    const frame = this.frames[index];
    this.at = index;
    if (frame && 'result' in frame) tell(this, 'hm-frame', { result: frame.result, words: `frame at ${writeNumber(frame.temperature_K, 4)} K` });
  }

  private close(): void {
    this.playing = false;
    if (this.at === null) return;
    this.at = null;
    tell(this, 'hm-frame', null);
  }

  private step(by: number): void {
    const last = this.frames.length - 1;
    this.show(Math.min(last, Math.max(0, (this.at ?? (by > 0 ? -1 : last + 1)) + by)));
  }

  private tick(): void {
    const next = (this.at ?? -1) + 1;
    this.show(next > this.frames.length - 1 ? 0 : next);
  }

  private play(): void {
    this.playing = !this.playing;
    if (this.playing && this.at === null) this.show(0);
  }

  private complaint(path: string): string | null {
    return this.complaints.find((c) => c.path === path)?.message ?? null;
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    const { from, to, frames, log } = this.asked;
    const others = this.complaints.filter(({ path }) => !['from', 'to', 'points'].includes(path));
    return html`<h3>Temperature film</h3>
      <div class="ask" role="group" aria-label="Range of the film">
        <hm-field label="from" .unit=${unitOf(from) ?? 'K'} .value=${from} .complaint=${this.complaint('from')} @field-accept=${(e: CustomEvent<string>) => this.set({ from: e.detail })}></hm-field>
        <hm-field label="to" .unit=${unitOf(to) ?? 'K'} .value=${to} .complaint=${this.complaint('to')} @field-accept=${(e: CustomEvent<string>) => this.set({ to: e.detail })}></hm-field>
        <hm-field class="short" label="frames" .value=${frames} .complaint=${this.complaint('points')} @field-accept=${(e: CustomEvent<string>) => this.set({ frames: e.detail })}></hm-field>
        <label class="check"><input type="checkbox" .checked=${log} @change=${(e: Event) => this.set({ log: (e.target as HTMLInputElement).checked })} /> logarithmic</label>
        <button type="button" class="go check" ?disabled=${this.batch.status === 'pending'} @click=${this.start}>Make the film</button>
      </div>
      ${this.complaints.length === 0 ? nothing : html`<div role="alert">${others.map(({ path, message }) => html`<p class="wrong">${path}: ${message}</p>`)}<span class="spoken">The film was not made: ${this.complaints.map(({ path, message }) => `${path} ${message}`).join('. ')}</span></div>`}
      ${this.renderState()} ${this.plan === null ? nothing : this.renderPlayer(this.plan)}`;
  }

  private renderState(): TemplateResult | typeof nothing {
    const { status, progress, reason } = this.batch;
    if (status === 'pending') return html`<div class="row"><progress aria-label="Film" max=${progress?.total ?? 1} .value=${progress?.done ?? 0}></progress><span>${progress?.done ?? 0} of ${progress?.total ?? 0} frames</span><button type="button" @click=${() => this.batch.stop()}>Stop</button></div>`;
    if (status === 'stopped') return html`<p role="status">Stopped: ${this.frames.filter((f) => f !== undefined).length} of ${this.frames.length} frames are there.</p>`;
    return status === 'error' ? html`<p class="wrong" role="alert">The program itself failed: ${reason}.</p>` : nothing;
  }

  private renderPlayer(plan: FilmPlan): TemplateResult {
    if (this.stale) return html`<p class="stale-mark">Of the design before the last change: make the film again.</p>`;
    const { temperatures } = plan;
    const { at } = this;
    const last = temperatures.length - 1;
    const strip = this.strip(plan);
    const frame = at === null ? null : this.frames[at];
    const words = at === null ? 'the design itself is on the plate' : `${writeNumber(temperatures[at], 4)} K: ${frameWords(frame, plan.design)}`;
    return html`<div class="row">
        ${this.still ? nothing : html`<button type="button" @click=${this.play}>${this.playing ? 'Pause' : 'Play'}</button>`}
        <button type="button" ?disabled=${at === 0} @click=${() => this.step(-1)}>Colder</button>
        <button type="button" ?disabled=${at === last} @click=${() => this.step(1)}>Warmer</button>
        <button type="button" ?disabled=${at === null} @click=${this.close}>Back to the design</button>
        <span class="reading">${at === null ? 'The plate shows the design itself.' : html`The plate shows <b>${writeNumber(temperatures[at], 4)} K</b>.`}</span>
      </div>
      <div class="picture">
        <svg width=${strip.width} height=${strip.height} viewBox="0 0 ${strip.width} ${strip.height}" role="img" aria-label="${strip.title}. ${strip.description}">
          ${guard([this.framesOf, this.styleName, this.box.width, plan], () => drawn(strip))}
          ${at === null ? nothing : svg`<g data-role="frame" stroke="currentColor"><line x1=${strip.x(temperatures[at])} x2=${strip.x(temperatures[at])} y1=${strip.area.top - 3} y2=${strip.area.bottom + 3} stroke-width="3"></line></g>`}
        </svg>
        <div class="surface" role="slider" tabindex="0" aria-label="frame of the film" aria-valuemin="0" aria-valuemax=${last} aria-valuenow=${at ?? 0} aria-valuetext=${words}
          @keydown=${this.key} @pointerdown=${this.press} @pointermove=${(e: PointerEvent) => e.buttons === 1 && this.press(e)}></div>
      </div>
      <p class="reading" aria-hidden="true">${at === null ? nothing : words}</p>
      ${this.frames.some((f) => f && 'regimes' in f && f.regimes.includes('degenerate')) ? html`<p class="doc">Degenerate: EF inside its band or within 3 kT of it. The regime map draws these two apart.</p>` : nothing}
      ${this.renderTable(plan)}
      ${[...new Set(this.frames.flatMap((f) => (f && 'gap' in f ? [f.gap] : [])))].map((reason) => html`<p class="wrong">Frames without an answer: ${reason.replace(/^no accepted answer: /, '')}.</p>`)}`;
  }

  private renderTable({ temperatures, design: { layers } }: FilmPlan): TemplateResult {
    return html`<details><summary>Regimes as a table, ${temperatures.length} temperatures</summary>
      <div class="scroll" role="region" aria-label="Regimes over the temperature, table" tabindex="0"><table>
        <thead><tr><th scope="col">temperature (K)</th>${layers.map(({ name }) => html`<th scope="col">${name}</th>`)}</tr></thead>
        <tbody>${guard([this.framesOf, temperatures], () => temperatures.map((t, i) => {
          const frame = this.frames[i];
          return html`<tr><th scope="row">${writeNumber(t, 4)}</th>${layers.map((_, l) => html`<td>${frame === undefined ? '–' : 'gap' in frame ? 'no answer' : frame.regimes[l]}</td>`)}</tr>`;
        }))}</tbody>
      </table></div></details>`;
  }

  private strip({ temperatures, design }: FilmPlan): FilmStrip {
    const layers = design.layers.map(({ name }, l) => ({ name, regimes: temperatures.map((_, i) => {
      const frame = this.frames[i];
      return frame && 'regimes' in frame ? frame.regimes[l] : null;
    }) }));
    const gaps = this.frames.flatMap((frame, index) => (frame && 'gap' in frame ? [{ index, reason: frame.gap }] : []));
    return drawFilmStrip({ temperatures, scale: this.scale, layers, gaps }, { width: Math.min(1000, Math.max(LEAST_WIDTH, this.box.width)), style: this.styleName });
  }

  private key(event: KeyboardEvent): void {
    const last = this.frames.length - 1;
    const acts: Record<string, () => void> = {
      ArrowLeft: () => this.step(-1), ArrowDown: () => this.step(-1), ArrowRight: () => this.step(1), ArrowUp: () => this.step(1),
      PageDown: () => this.step(-5), PageUp: () => this.step(5), Home: () => this.show(0), End: () => this.show(last), Escape: () => this.close(),
      ' ': () => (this.still ? this.step(1) : this.play()),
    };
    const act = acts[event.key];
    if (!act || event.ctrlKey || event.metaKey || event.altKey || (event.key === 'Escape' && this.at === null)) return;
    event.preventDefault();
    event.stopPropagation();
    if (event.key !== ' ') this.playing = false;
    act();
  }

  private press(event: PointerEvent): void {
    if (event.button > 0) return;
    const strip = this.strip(this.plan!);
    const distances = this.plan!.temperatures.map((t) => Math.abs(strip.x(t) - event.offsetX));
    this.playing = false;
    this.show(distances.indexOf(Math.min(...distances)));
  }
}

/** "cap degenerate, base freeze-out", or why there is nothing. */
function frameWords(frame: Frame | null | undefined, { layers }: Design): string {
  if (!frame) return 'not solved yet';
  return 'gap' in frame ? `no answer: ${frame.gap}` : layers.map(({ name }, l) => `${name} ${frame.regimes[l]}`).join(', ');
}

customElements.define('hm-film', HmFilm);

declare global {
  interface HTMLElementTagNameMap {
    'hm-film': HmFilm;
  }
}
