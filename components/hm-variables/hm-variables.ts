import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design, Variable } from '../../src/design/types.ts';
import { addVariable, freeName, removeVariable, renameVariable, setVariable } from '../../src/state/commands/index.ts';
import { complaintAt } from '../shared/complaint-at.ts';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import { unitOf } from '../shared/typed-text.ts';
import type { HmField } from '../hm-field/hm-field.ts';
import '../hm-field/hm-field.ts';
import { STEPS, sliderOf, textAt } from './slider.ts';
import { styles } from './hm-variables.styles.ts';

/**
 * The design's variables: name, value, tolerance. One with a range has a slider under it, and the bands follow while it is pulled.
 * @fires hm-edit
 */
export class HmVariables extends LitElement {
  static override styles = [look, styles];
  static override properties = { design: { attribute: false }, complaints: { attribute: false } };

  declare design: Design | null;
  declare complaints: readonly Complaint[];

  /** counts the pulls, so that each is one step of undo */ private pulls = 0;

  /** how many variables there will be once the one that was asked for is in the design */ private awaited: number | null = null;

  constructor() {
    super();
    this.design = null;
    this.complaints = [];
  }

  protected override updated(): void {
    const { length } = this.design?.variables ?? [];
    if (this.awaited !== length) return;
    this.awaited = null;
    // What a new variable needs first is a name that says something.
    void this.renderRoot.querySelector<HmField>('li:last-child hm-field')?.edit();
  }

  private set(i: number, change: Partial<Omit<Variable, 'name'>>, label: string, join?: string): void {
    tell(this, 'hm-edit', { next: setVariable(this.design!, i, change), label, join });
  }

  private setRange(i: number, end: 0 | 1, text: string): void {
    const { name, value, range = [value, value] } = this.design!.variables![i];
    const next: [string, string] = [...range];
    next[end] = text;
    this.set(i, { range: text === '' ? undefined : next }, `range of ${name}`);
  }

  private rename(i: number, name: string): void {
    const { name: old } = this.design!.variables![i];
    tell(this, 'hm-edit', { next: renameVariable(this.design!, i, name), label: `name of ${old}` });
  }

  private add(): void {
    const { variables = [] } = this.design!;
    // Names in expressions hold no space: v, v2, v3.
    const name = freeName('v', variables.map((variable) => variable.name.replace(/^v(\d+)$/, 'v $1'))).replace(' ', '');
    this.awaited = variables.length + 1;
    tell(this, 'hm-edit', { next: addVariable(this.design!, { name, value: '1e17 cm^-3' }), label: `new variable ${name}` });
  }

  override render(): TemplateResult | typeof nothing {
    if (this.design === null) return nothing;
    const { variables = [] } = this.design;
    return html`<div class="head"><h2>Variables</h2> <button type="button" @click=${this.add}>Add a variable</button></div>
      ${variables.length === 0 ? html`<p>Give a value a name, and use the name in place of figures: <code>2*Ncap</code>.</p>` : html`<ul>${variables.map((variable, i) => this.renderVariable(variable, i))}</ul>`}`;
  }

  private renderVariable(variable: Variable, i: number): TemplateResult {
    const { name, value, tolerance = '', range, note } = variable;
    const complaint = (key: string): string | null => complaintAt(this.complaints, `variables[${i}].${key}`);
    // A bare number keeps the unit that the variable has.
    const unit = unitOf(value) ?? '';
    return html`<li>
      <div class="row">
        <hm-field label="Name" .value=${name} .complaint=${complaint('name')} @field-accept=${(e: CustomEvent<string>) => this.rename(i, e.detail)}></hm-field>
        <hm-field class="value" label="Value of ${name}" .unit=${unit} .value=${value} .complaint=${complaint('value')} @field-accept=${(e: CustomEvent<string>) => this.set(i, { value: e.detail }, `value of ${name}`)}></hm-field>
      </div>
      ${this.renderSlider(variable, i)}
      <details>
        <summary>${tolerance === '' ? 'Tolerance, range' : `± ${tolerance}, range`}<span class="spoken"> of ${name}</span></summary>
        <div class="row">
          <hm-field label="Tolerance" hint="10 %" unit="%" .value=${tolerance} .complaint=${complaint('tolerance')} @field-accept=${(e: CustomEvent<string>) => this.set(i, { tolerance: e.detail === '' ? undefined : e.detail }, `tolerance of ${name}`)}></hm-field>
          <div class="range">
            <hm-field label="Range, from" hint="none" .unit=${unit} .value=${range?.[0] ?? ''} .complaint=${complaint('range[0]') ?? complaint('range')} @field-accept=${(e: CustomEvent<string>) => this.setRange(i, 0, e.detail)}></hm-field>
            <hm-field label="to" hint="none" .unit=${unit} .value=${range?.[1] ?? ''} .complaint=${complaint('range[1]')} @field-accept=${(e: CustomEvent<string>) => this.setRange(i, 1, e.detail)}></hm-field>
          </div>
          <button type="button" class="remove" @click=${() => tell(this, 'hm-edit', { next: removeVariable(this.design!, i), label: `variable ${name} taken out` })}>Take out<span class="spoken"> ${name}</span></button>
        </div>
        ${note === undefined ? nothing : html`<p class="note">${note}</p>`}
      </details>
    </li>`;
  }

  private renderSlider(variable: Variable, i: number): TemplateResult | typeof nothing {
    const slider = sliderOf(variable);
    if (slider === null) return nothing;
    const pull = (event: Event): void => {
      const text = textAt(slider, Number((event.target as HTMLInputElement).value) / STEPS);
      this.set(i, { value: text }, `value of ${variable.name}`, `pull:${this.pulls}`);
    };
    return html`<input
      type="range"
      min="0"
      max=${STEPS}
      .value=${String(Math.round(slider.at * STEPS))}
      aria-label="Value of ${variable.name}"
      aria-valuetext=${variable.value}
      @input=${pull}
      @change=${() => this.pulls++}
    />`;
  }
}

customElements.define('hm-variables', HmVariables);

declare global {
  interface HTMLElementTagNameMap {
    'hm-variables': HmVariables;
  }
}
