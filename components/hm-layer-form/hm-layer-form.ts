import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design, DopantModel, DopantRow, LayerInput } from '../../src/design/types.ts';
import { addDopant, removeDopant, renameLayer, setComposition, setConcentration, setDopant, setMaterial, setThickness } from '../../src/state/commands/index.ts';
import { complaintAt, complaintsWithin } from '../shared/complaint-at.ts';
import { tell } from '../shared/events.ts';
import { formLook } from '../shared/form-look.ts';
import type { DepthValue } from '../shared/graded.ts';
import { look } from '../shared/look.ts';
import type { DopantChoice, MaterialChoice } from '../shared/menus.ts';
import { select, type Option } from '../shared/select.ts';
import type { HmField } from '../hm-field/hm-field.ts';
import '../hm-field/hm-field.ts';
import '../hm-profile-form/hm-profile-form.ts';
import { carriedDopants } from './carried-dopants.ts';
import { styles } from './hm-layer-form.styles.ts';

const MODELS: Record<DopantModel, string> = { dilute: 'dilute (isolated level)', merging: 'merging with the band', screened: 'screened level', complete: 'complete ionisation' };

/** What a dopant given outright can be solved with: the other models take parameters that it does not have. */
const MODELS_OUTRIGHT: readonly DopantModel[] = ['dilute', 'complete'];

/** The menu of models, the usual one in words: what is taken unasked decides how many carriers there are. */
function modelOptions(models: readonly DopantModel[]): Option[] {
  return [{ value: '', text: `usual: ${MODELS[models[0]]}` }, ...models.map((value) => ({ value, text: MODELS[value] }))];
}

/** A new row starts lightly enough to change nothing by surprise (common practice, no source). */
const FIRST_CONCENTRATION = '1e16 cm^-3';

/**
 * Everything about one layer, in full: name, material, composition, thickness, and its dopants.
 *
 * @fires hm-edit
 * @fires hm-say   a dopant was exchanged because the new material does not know it
 */
export class HmLayerForm extends LitElement {
  static override styles = [look, formLook, styles];
  static override properties = {
    design: { attribute: false },
    index: { type: Number },
    materials: { attribute: false },
    dopants: { attribute: false },
    complaints: { attribute: false },
  };

  declare design: Design;
  declare index: number;
  declare materials: readonly MaterialChoice[];
  declare dopants: readonly DopantChoice[];
  declare complaints: readonly Complaint[];

  constructor() {
    super();
    this.index = 0;
    this.materials = [];
    this.dopants = [];
    this.complaints = [];
  }

  private get layer(): LayerInput | undefined {
    return this.design?.layers[this.index];
  }

  private get path(): string {
    return `layers[${this.index}]`;
  }

  /** The cursor into the thickness, its text selected. */
  async edit(): Promise<void> {
    await this.updateComplete;
    await this.renderRoot.querySelector<HmField>('#thickness')?.edit();
  }

  override render(): TemplateResult | typeof nothing {
    const { layer, path } = this;
    if (!layer) return nothing;
    const rows = layer.dopants ?? [];
    const isAlloy = layer.x !== undefined || this.materials.find((m) => m.id === layer.material)?.alloy === true;
    return html`
      <div class="row">
        <hm-field id="thickness" .label=${'thickness'} .value=${layer.thickness} .unit=${'nm'} .complaint=${complaintAt(this.complaints, `${path}.thickness`)} @field-accept=${(e: CustomEvent<string>) => this.edited(setThickness(this.design, this.index, e.detail), 'thickness')}></hm-field>
        ${select({ id: 'material', label: 'material', value: layer.material, options: this.materials.map((m) => ({ value: m.id, text: m.name === m.id ? m.id : `${m.id} – ${m.name}` })), complaint: complaintAt(this.complaints, `${path}.material`), onChoice: (id) => this.exchangeMaterial(id) })}
        ${isAlloy ? this.renderComposition(layer) : nothing}
        <hm-field .label=${'name'} .value=${layer.name} .complaint=${complaintAt(this.complaints, `${path}.name`)} @field-accept=${(e: CustomEvent<string>) => this.edited(renameLayer(this.design, this.index, e.detail), 'name')}></hm-field>
        ${complaintsWithin(this.complaints, path, ['thickness', 'material', 'name', 'x', 'dopants'].map((k) => `${path}.${k}`)).map((text) => html`<span class="complaint">${text}</span>`)}
      </div>
      <fieldset>
        <legend>dopants</legend>
        ${rows.length === 0 ? html`<p class="none">undoped</p>` : rows.map((row, r) => this.renderDopant(row, r, layer))}
        <button type="button" id="add-dopant" @click=${this.add}>Add a dopant</button>
      </fieldset>
    `;
  }

  private renderComposition(layer: LayerInput): TemplateResult {
    return html`<hm-profile-form class="narrow" .label=${'x'} .value=${layer.x ?? ''} .thickness=${layer.thickness} .path=${`${this.path}.x`} .complaints=${this.complaints} @profile-accept=${(e: CustomEvent<LayerInput['x']>) => this.edited(setComposition(this.design, this.index, e.detail === '' ? undefined : e.detail), 'composition')}></hm-profile-form>`;
  }

  private renderDopant(row: DopantRow, r: number, layer: LayerInput): TemplateResult {
    const path = `${this.path}.dopants[${r}]`;
    const outright = row.dopant === undefined;
    const here = this.dopants.filter((d) => d.host === layer.material);
    const options = [...here.map((d) => ({ value: d.id, text: `${d.id}, ${d.kind}` })), { value: ':donor', text: 'donor given outright' }, { value: ':acceptor', text: 'acceptor given outright' }];
    const own = ['dopant', 'concentration', 'model', 'activation', 'compensation', 'depth', 'degeneracy'].map((k) => `${path}.${k}`);
    return html`<div class="dopant row" role="group" aria-label="dopant ${r + 1}">
      ${select({ id: `dopant-${r}`, label: 'dopant', value: outright ? `:${row.kind ?? 'donor'}` : row.dopant!, unknown: `${row.dopant} (unknown in ${layer.material})`, options, complaint: complaintAt(this.complaints, `${path}.dopant`), onChoice: (id) => this.exchangeDopant(r, id) })}
      ${outright ? html`${this.rowField(r, 'depth', 'level depth', row.depth ?? '', 'eV')} ${this.rowField(r, 'degeneracy', 'degeneracy', String(row.degeneracy ?? ''), '', row.kind === 'acceptor' ? '4' : '2')}` : nothing}
      <hm-profile-form id="concentration-${r}" .label=${'concentration'} implants .value=${row.concentration} .unit=${'cm^-3'} .thickness=${layer.thickness} .path=${`${path}.concentration`} .complaints=${this.complaints} @profile-accept=${(e: CustomEvent<DepthValue>) => this.edited(setConcentration(this.design, this.index, r, e.detail as DopantRow['concentration']), 'doping')}></hm-profile-form>
      ${select({ id: `model-${r}`, label: 'ionisation model', value: row.model ?? '', unknown: `${row.model} (no parameters)`, options: modelOptions(outright ? MODELS_OUTRIGHT : (here.find((d) => d.id === row.dopant)?.models ?? MODELS_OUTRIGHT)), complaint: complaintAt(this.complaints, `${path}.model`), onChoice: (m) => this.edited(setDopant(this.design, this.index, r, { model: m === '' ? undefined : (m as DopantModel) }), 'ionisation model') })}
      ${this.rowField(r, 'activation', 'active share', String(row.activation ?? ''), '', '1')}
      ${this.rowField(r, 'compensation', 'compensated share', String(row.compensation ?? ''), '', '0')}
      <button type="button" class="press" @click=${() => this.edited(removeDopant(this.design, this.index, r), 'dopant taken out')}>Remove<span class="spoken"> dopant ${r + 1}</span></button>
      ${complaintsWithin(this.complaints, path, own).map((text) => html`<span class="complaint">${text}</span>`)}
    </div>`;
  }

  private rowField(r: number, key: 'activation' | 'compensation' | 'depth' | 'degeneracy', label: string, value: string, unit: string, hint = ''): TemplateResult {
    return html`<hm-field class="narrow" .label=${label} .value=${value} .unit=${unit} .hint=${hint} .complaint=${complaintAt(this.complaints, `${this.path}.dopants[${r}].${key}`)} @field-accept=${(e: CustomEvent<string>) => this.edited(setDopant(this.design, this.index, r, { [key]: e.detail === '' ? undefined : e.detail }), label)}></hm-field>`;
  }

  private exchangeDopant(r: number, id: string): void {
    const kind = id === ':donor' ? 'donor' : id === ':acceptor' ? 'acceptor' : null;
    const row = this.layer!.dopants![r];
    // 45 meV is where shallow levels of silicon lie; a start, shown at once in its own field.
    const change: Partial<DopantRow> = kind === null ? { dopant: id } : { kind, depth: row.depth ?? '45 meV', degeneracy: undefined };
    this.edited(setDopant(this.design, this.index, r, change), 'dopant');
  }

  private exchangeMaterial(id: string): void {
    const layer = this.layer!;
    const { dopants, changes } = carriedDopants(layer.dopants ?? [], layer.material, id, this.dopants);
    const choice = this.materials.find((m) => m.id === id);
    const x = choice?.alloy === undefined ? undefined : choice.alloy ? (layer.x ?? '0.3') : null;
    if (changes.length > 0) tell(this, 'hm-say', { text: `${layer.name} is ${id} now; ${changes.join(', ')}, since ${id} knows no such dopant. Undo brings back ${layer.material} with ${changes.length === 1 ? 'its dopant' : 'its dopants'}.` });
    this.edited(setMaterial(this.design, this.index, id, { x, dopants: layer.dopants === undefined ? undefined : dopants }), 'material');
  }

  private add(): void {
    const first = this.dopants.find((d) => d.host === this.layer!.material);
    const row: DopantRow = first ? { dopant: first.id, concentration: FIRST_CONCENTRATION } : { kind: 'donor', depth: '45 meV', concentration: FIRST_CONCENTRATION };
    this.edited(addDopant(this.design, this.index, row), 'dopant added');
  }

  private edited(next: Design, what: string): void {
    tell(this, 'hm-edit', { next, label: `${what} of ${this.layer!.name}` });
  }
}

customElements.define('hm-layer-form', HmLayerForm);

declare global {
  interface HTMLElementTagNameMap {
    'hm-layer-form': HmLayerForm;
  }
}
