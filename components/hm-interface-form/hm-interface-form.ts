import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design, InterfaceInput } from '../../src/design/types.ts';
import { setInterface } from '../../src/state/commands/index.ts';
import { complaintAt, complaintsWithin } from '../shared/complaint-at.ts';
import { tell } from '../shared/events.ts';
import { formLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';
import '../hm-field/hm-field.ts';

/** A bare number of a sheet charge gets no unit: charges per cm² and coulombs per m² are both usual, and lie 17 orders of magnitude apart. */
const FIELDS: { key: Exclude<keyof InterfaceInput, 'above'>; label: string; unit: string; hint: string }[] = [
  { key: 'sheetCharge', label: 'sheet charge (cm⁻² or C/m²)', unit: '', hint: 'none' },
  { key: 'dEc', label: 'ΔEc, below less above', unit: 'eV', hint: 'from the materials' },
  { key: 'dEv', label: 'ΔEv, below less above', unit: 'eV', hint: 'from the materials' },
];

/**
 * What is exceptional at an interface: a sheet charge, own offsets. An emptied field gives it back to the materials.
 *
 * @fires hm-edit
 */
export class HmInterfaceForm extends LitElement {
  static override styles = [look, formLook];
  static override shadowRootOptions: ShadowRootInit = { ...LitElement.shadowRootOptions, delegatesFocus: true };
  static override properties = { design: { attribute: false }, index: { type: Number }, complaints: { attribute: false } };

  declare design: Design;
  /** of the layer above */ declare index: number;
  declare complaints: readonly Complaint[];

  constructor() {
    super();
    this.index = 0;
    this.complaints = [];
  }

  override render(): TemplateResult | typeof nothing {
    const above = this.design?.layers[this.index];
    if (!above || !this.design.layers[this.index + 1]) return nothing;
    const place = this.design.interfaces?.findIndex((row) => row.above === above.name) ?? -1;
    const row = place < 0 ? undefined : this.design.interfaces![place];
    const path = `interfaces[${place}]`;
    return html`<div class="row wide">
      ${FIELDS.map((f) => html`<hm-field .label=${f.label} .value=${row?.[f.key] ?? ''} .unit=${f.unit} .hint=${f.hint} .complaint=${complaintAt(this.complaints, `${path}.${f.key}`)} @field-accept=${(e: CustomEvent<string>) => this.accept(f.key, f.label, e.detail)}></hm-field>`)}
      ${complaintsWithin(this.complaints, path, FIELDS.map((f) => `${path}.${f.key}`)).map((text) => html`<span class="complaint">${text}</span>`)}
    </div>`;
  }

  private accept(key: (typeof FIELDS)[number]['key'], label: string, text: string): void {
    const [above, below] = [this.design.layers[this.index].name, this.design.layers[this.index + 1].name];
    tell(this, 'hm-edit', { next: setInterface(this.design, this.index, { [key]: text === '' ? undefined : text }), label: `${label.split(',')[0]} at ${above} / ${below}` });
  }
}

customElements.define('hm-interface-form', HmInterfaceForm);

declare global {
  interface HTMLElementTagNameMap {
    'hm-interface-form': HmInterfaceForm;
  }
}
