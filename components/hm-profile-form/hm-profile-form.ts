import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import { complaintAt, complaintsWithin } from '../shared/complaint-at.ts';
import { formLook } from '../shared/form-look.ts';
import { pointsFrom, pointsText, reshaped, shapeOf, type DepthValue, type Shape } from '../shared/graded.ts';
import { look } from '../shared/look.ts';
import { select } from '../shared/select.ts';
import { completed } from '../shared/typed-text.ts';
import '../hm-field/hm-field.ts';

const SHAPE_WORDS: Record<Shape, string> = {
  constant: 'constant',
  linear: 'linear',
  gaussian: 'Gaussian',
  erfc: 'diffused (erfc)',
  implanted: 'implanted',
  points: 'measured points',
};

/**
 * A value through the depth of a layer: constant, graded, implanted or measured, each with its fields.
 *
 * @fires profile-accept  detail: the next value; does not leave the form around it
 */
export class HmProfileForm extends LitElement {
  static override styles = [look, formLook];
  static override shadowRootOptions: ShadowRootInit = { ...LitElement.shadowRootOptions, delegatesFocus: true };
  static override properties = { label: {}, value: { attribute: false }, unit: {}, implants: { type: Boolean }, thickness: {}, path: {}, complaints: { attribute: false } };

  declare label: string;
  declare value: DepthValue;
  /** what a bare number means; empty for a composition */ declare unit: string;
  /** may be implanted */ declare implants: boolean;
  /** of the layer, as typed */ declare thickness: string;
  /** of the value in the design: "layers[2].dopants[0].concentration" */ declare path: string;
  declare complaints: readonly Complaint[];

  constructor() {
    super();
    this.label = '';
    this.value = '';
    this.unit = '';
    this.implants = false;
    this.thickness = '100 nm';
    this.path = '';
    this.complaints = [];
  }

  override render(): TemplateResult {
    const shape = shapeOf(this.value);
    const shapes = (Object.keys(SHAPE_WORDS) as Shape[]).filter((s) => s !== 'implanted' || this.implants);
    const keys = { constant: [], points: ['points'], implanted: ['peak', 'depth', 'straggle', 'background'] }[shape as string] ?? ['from', 'to'];
    const others = complaintsWithin(this.complaints, this.path, keys.map((key) => `${this.path}.${key}`)).filter(() => shape !== 'constant');
    return html`<div class="row">
      ${this.renderFields(shape)}
      ${select({ id: 'shape', label: 'through the depth', value: shape, options: shapes.map((s) => ({ value: s, text: SHAPE_WORDS[s] })), onChoice: (s) => this.accept(reshaped(this.value, s as Shape, this.thickness)) })}
      ${others.map((text) => html`<span class="complaint">${text}</span>`)}
    </div>`;
  }

  private renderFields(shape: Shape): TemplateResult | TemplateResult[] | typeof nothing {
    const value = this.value;
    if (shape === 'constant') {
      return html`<hm-field .label=${this.label} .value=${String(value)} .unit=${this.unit} .complaint=${complaintsWithin(this.complaints, this.path)[0] ?? null} @field-accept=${(e: CustomEvent<string>) => this.accept(e.detail)}></hm-field>`;
    }
    if (typeof value !== 'object') return nothing;
    if ('points' in value) {
      return html`<hm-field lines .label="${this.label}, a line a point: depth; value" .value=${pointsText(value.points)} .complaint=${complaintsWithin(this.complaints, `${this.path}.points`)[0] ?? null} @field-accept=${(e: CustomEvent<string>) => this.accept({ points: pointsFrom(e.detail, completed, this.unit) })}></hm-field>`;
    }
    if ('peak' in value) {
      return [this.partField('peak', `${this.label}, peak`, value.peak, this.unit), this.partField('depth', 'peak below the top of the layer', value.depth, 'nm'), this.partField('straggle', 'straggle', value.straggle, 'nm'), this.partField('background', 'background', value.background ?? '', this.unit, 'none')];
    }
    return [this.partField('from', `${this.label}, top`, String(value.from), this.unit), this.partField('to', 'bottom', String(value.to), this.unit)];
  }

  private partField(key: string, label: string, text: string, unit: string, hint = ''): TemplateResult {
    return html`<hm-field
      .label=${label}
      .value=${text}
      .unit=${unit}
      .hint=${hint}
      .complaint=${complaintAt(this.complaints, `${this.path}.${key}`)}
      @field-accept=${(e: CustomEvent<string>) => this.accept(withPart(this.value as object, key, e.detail))}
    ></hm-field>`;
  }

  private accept(next: DepthValue): void {
    this.dispatchEvent(new CustomEvent('profile-accept', { detail: next }));
  }
}

/** An emptied part is left out: only the background may be, and the reader says so of the others. */
function withPart(value: object, key: string, text: string): DepthValue {
  const next = { ...value, [key]: text } as Record<string, unknown>;
  if (text === '' && key === 'background') delete next.background;
  return next as DepthValue;
}

customElements.define('hm-profile-form', HmProfileForm);

declare global {
  interface HTMLElementTagNameMap {
    'hm-profile-form': HmProfileForm;
  }
}
