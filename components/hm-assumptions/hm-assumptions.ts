import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { AssumptionsInput, Design } from '../../src/design/types.ts';
import { setAssumption } from '../../src/state/commands/index.ts';
import { tell } from '../shared/events.ts';
import { foldLook } from '../shared/fold-look.ts';
import { look } from '../shared/look.ts';
import { styles } from './hm-assumptions.styles.ts';

const STATISTICS: [NonNullable<AssumptionsInput['statistics']>, string][] = [
  ['fermi-dirac', 'Fermi–Dirac'],
  ['boltzmann', 'Boltzmann, for comparison'],
];
const ALIGNMENT: [NonNullable<AssumptionsInput['alignment']>, string][] = [
  ['offsets', 'published offsets'],
  ['affinity', 'electron affinities'],
];

const TRANSMISSION: [NonNullable<AssumptionsInput['transmission']>, string][] = [
  ['wkb', 'WKB'],
  ['kemble', 'WKB with reflection at the top (Kemble)'],
  ['exact', 'the wave equation itself'],
];

/**
 * What the solution takes for granted, said in a line, and changed when it is opened.
 * @fires hm-edit
 */
export class HmAssumptions extends LitElement {
  static override styles = [look, foldLook, styles];
  static override properties = { design: { attribute: false } };

  declare design: Design | null;

  constructor() {
    super();
    this.design = null;
  }

  private set<K extends keyof AssumptionsInput>(key: K, value: AssumptionsInput[K], words: string): void {
    tell(this, 'hm-edit', { next: setAssumption(this.design!, key, value), label: words });
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    const { statistics = 'fermi-dirac', alignment = 'offsets', narrowing = false, nonParabolic = false, transmission = 'wkb' } = this.design.assumptions ?? {};
    const words = [nameOf(STATISTICS, statistics), nameOf(ALIGNMENT, alignment), ...(transmission === 'wkb' ? [] : [nameOf(TRANSMISSION, transmission)]), ...(narrowing ? ['gap narrowing'] : []), ...(nonParabolic ? ['non-parabolic'] : [])];
    return html`<details>
      <summary><h2>Assumptions</h2> <span class="inforce">${words.join('; ')}</span></summary>
      <label>Statistics
        <select @change=${(e: Event) => this.set('statistics', (e.target as HTMLSelectElement).value as typeof statistics, 'statistics')}>
          ${STATISTICS.map(([value, words]) => html`<option value=${value} .selected=${value === statistics}>${words}</option>`)}
        </select>
      </label>
      <label>Bands line up by
        <select @change=${(e: Event) => this.set('alignment', (e.target as HTMLSelectElement).value as typeof alignment, 'alignment of the bands')}>
          ${ALIGNMENT.map(([value, words]) => html`<option value=${value} .selected=${value === alignment}>${words}</option>`)}
        </select>
      </label>
      <label>Tunnelling at contacts by
        <select @change=${(e: Event) => this.set('transmission', (e.target as HTMLSelectElement).value as typeof transmission, 'transmission')}>
          ${TRANSMISSION.map(([value, words]) => html`<option value=${value} .selected=${value === transmission}>${words}</option>`)}
        </select>
      </label>
      <label class="check"><input type="checkbox" .checked=${narrowing} @change=${(e: Event) => this.set('narrowing', (e.target as HTMLInputElement).checked, 'gap narrowing')} />The gap narrows with doping</label>
      <label class="check"><input type="checkbox" .checked=${nonParabolic} @change=${(e: Event) => this.set('nonParabolic', (e.target as HTMLInputElement).checked, 'non-parabolic bands')} />Bands are not parabolic</label>
    </details>`;
  }
}

function nameOf<T extends string>(list: [T, string][], value: T): string {
  return list.find(([candidate]) => candidate === value)?.[1] ?? value;
}

customElements.define('hm-assumptions', HmAssumptions);

declare global {
  interface HTMLElementTagNameMap {
    'hm-assumptions': HmAssumptions;
  }
}
