import { LitElement, html, type TemplateResult } from 'lit';
import '../hm-field/hm-field.ts';
import { formLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';

/** A measured barrier, ready to be put in. */
export interface BarrierReady {
  material: string;
  carrier: 'n' | 'p';
  height: string;
  source: string;
}

/**
 * A measured barrier of a metal on a material, with where it stands.
 * @fires barrier-ready  detail: BarrierReady
 */
export class HmBarrierForm extends LitElement {
  static override styles = [look, formLook];
  static override properties = { metal: {}, materials: { attribute: false }, judge: { attribute: false }, trouble: { state: true } };

  declare metal: string;
  /** that a barrier can be on; the first is offered */ declare materials: readonly string[];
  /** a sentence about what is wrong with a height, or null */ declare judge: (text: string) => string | null;
  declare private trouble: { height: string | null; source: string | null };

  private height = '';
  private source = '';

  constructor() {
    super();
    this.metal = '';
    this.materials = [];
    this.judge = () => null;
    this.trouble = { height: null, source: null };
  }

  private ready(): void {
    const [height, source] = [this.height.trim(), this.source.trim()];
    this.trouble = { height: this.judge(height), source: source === '' ? 'is empty; say where the barrier stands: author, year, table, or the measurement' : null };
    if (this.trouble.height !== null || this.trouble.source !== null) return;
    const chosen = (id: string): string => this.renderRoot.querySelector<HTMLSelectElement>(id)!.value;
    const detail: BarrierReady = { material: chosen('#material'), carrier: chosen('#carrier') === 'p' ? 'p' : 'n', height, source };
    [this.height, this.source] = ['', ''];
    this.dispatchEvent(new CustomEvent('barrier-ready', { detail }));
    this.requestUpdate();
  }

  override render(): TemplateResult {
    return html`<details><summary>Put in a measured barrier of ${this.metal}</summary><div class="row">
      <label class="select"><span class="label">On</span><select id="material">${this.materials.map((id) => html`<option value=${id}>${id}</option>`)}</select></label>
      <label class="select"><span class="label">For</span><select id="carrier"><option value="n">electrons</option><option value="p">holes</option></select></label>
      <hm-field label="Height" hint="0.6 eV" .value=${this.height} .complaint=${this.trouble.height} @field-accept=${(e: CustomEvent<string>) => (this.height = e.detail)}></hm-field>
      <hm-field class="wide" label="Where it stands" hint="author, year, table" .value=${this.source} .complaint=${this.trouble.source} @field-accept=${(e: CustomEvent<string>) => (this.source = e.detail)}></hm-field>
      <button type="button" class="press" @click=${this.ready}>Use this barrier</button>
    </div></details>`;
  }
}

customElements.define('hm-barrier-form', HmBarrierForm);

declare global {
  interface HTMLElementTagNameMap {
    'hm-barrier-form': HmBarrierForm;
  }
}
