import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { EnergyAxis } from '../../src/drawing/energy-axis.ts';
import { lengthText } from '../../src/drawing/figures.ts';
import { drawRail } from '../../src/drawing/rail.ts';
import { railRows } from '../../src/drawing/rail-table.ts';
import type { StyleName } from '../../src/drawing/styles.ts';
import { decimalText, figureText } from '../../src/result/figure-text.ts';
import type { Result } from '../../src/result/types.ts';
import { drawn } from '../shared/drawn.ts';
import { look } from '../shared/look.ts';
import { tableLook } from '../shared/table-look.ts';
import { WidthController } from '../shared/width-controller.ts';
import { styles } from './hm-rail.styles.ts';

/** A page not laid out yet, px. */
const LEAST_WIDTH = 60;

let rails = 0;

/**
 * f(E), g(E) and their product at the depth that is read on the plate, on the plate's energy axis. While nothing is read it keeps the last depth, or shows the middle
 * of the stack.
 */
export class HmRail extends LitElement {
  static override styles = [look, tableLook, styles];
  static override properties = {
    result: { attribute: false },
    energy: { attribute: false },
    height: { type: Number },
    depth_nm: { attribute: false },
    styleName: {},
    stale: { type: Boolean, reflect: true },
    dark: { state: true },
    tabled: { state: true },
  };

  declare result: Result | null;
  /** the plate's */ declare energy: EnergyAxis | null;
  /** the plate's, px */ declare height: number;
  /** null: nothing is read just now */ declare depth_nm: number | null;
  /** style of the drawing; by default light or dark as the page */ declare styleName: StyleName | undefined;
  declare stale: boolean;
  declare private dark: boolean;
  /** the table is open: it is made only then */ declare private tabled: boolean;

  private kept_nm: number | null = null;
  private readonly ids = `rail-${++rails}`;
  private readonly room = new WidthController(this);
  private readonly darkness = matchMedia('(prefers-color-scheme: dark)');
  private readonly followDarkness = (): void => void (this.dark = this.darkness.matches);

  constructor() {
    super();
    this.result = null;
    this.energy = null;
    this.height = 400;
    this.depth_nm = null;
    this.stale = false;
    this.dark = false;
    this.tabled = false;
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

  protected override willUpdate(): void {
    if (this.depth_nm !== null) this.kept_nm = this.depth_nm;
  }

  override render(): TemplateResult {
    const { result, energy } = this;
    if (!result || !energy || this.room.width < LEAST_WIDTH) return html`<div class="empty">Occupancy at a depth stands here.</div>`;
    const total = result.layers.reduce((sum, layer) => sum + layer.thickness_nm, 0);
    // A depth kept from a thicker stack may lie outside of this one.
    const depth = Math.min(this.kept_nm ?? total / 2, total);
    const drawing = drawRail(result, depth, { width: this.room.width, height: this.height, energy, style: this.styleName ?? (this.dark ? 'dark' : 'light'), prefix: this.ids });
    return html`<svg width=${drawing.width} height=${drawing.height} viewBox="0 0 ${drawing.width} ${drawing.height}" role="img" aria-label=${drawing.title} aria-describedby="words">${drawn(drawing)}</svg>
      <p class="spoken" id="words">${drawing.description}</p>
      <details @toggle=${(event: Event) => (this.tabled = (event.target as HTMLDetailsElement).open)}>
        <summary>Occupancy as a table</summary>
        ${this.tabled ? this.renderTable(result, depth, energy) : nothing}
      </details>`;
  }

  private renderTable(result: Result, depth_nm: number, { domain }: EnergyAxis): TemplateResult {
    return html`<p>At ${lengthText(depth_nm)}; g, and g f of electrons or g (1 − f) of holes, in cm⁻³ eV⁻¹.</p>
      <div class="scroll" role="region" aria-label="Occupancy, table" tabindex="0"><table>
        <thead><tr><th scope="col">E (eV)</th><th scope="col">f</th><th scope="col">g</th><th scope="col">carriers</th></tr></thead>
        <tbody>${railRows(result, depth_nm, domain).map(({ energy_eV, occupancy, states, carriers }) => html`<tr><th scope="row">${decimalText(energy_eV, 3)}</th><td>${figureText(occupancy)}</td><td>${figureText(states)}</td><td>${figureText(carriers)}</td></tr>`)}</tbody>
      </table></div>`;
  }
}

customElements.define('hm-rail', HmRail);

declare global {
  interface HTMLElementTagNameMap {
    'hm-rail': HmRail;
  }
}
