import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import { setBias, setTemperature, setTemperatureRange } from '../../src/state/commands/index.ts';
import { savingWords, type SavingState } from '../../src/storage/autosave.ts';
import { complaintAt } from '../shared/complaint-at.ts';
import { tell, type PageAct } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import type { Theme } from '../shared/theme.ts';
import type { HmField } from '../hm-field/hm-field.ts';
import '../hm-field/hm-field.ts';
import { styles } from './hm-conditions.styles.ts';

const THEMES: [Theme, string][] = [
  ['auto', 'as the system'],
  ['light', 'light'],
  ['dark', 'dark'],
];

/**
 * The head of the page: the project's name and how it stands with saving; the temperature with its range, and the bias; undo and redo; the ways to projects,
 * starters, files and exports; light or dark.
 *
 * @fires hm-edit    temperature, range, bias
 * @fires hm-rename  the project's name
 * @fires hm-act     undo, redo, projects, starters, open-file, leave, help, about
 * @fires hm-view    { theme } : the page keeps it for every project
 */
export class HmConditions extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    project: {},
    design: { attribute: false },
    complaints: { attribute: false },
    saving: { attribute: false },
    undoLabel: { attribute: false },
    redoLabel: { attribute: false },
    theme: {},
  };

  /** the project's name */ declare project: string;
  declare design: Design | null;
  declare complaints: readonly Complaint[];
  declare saving: SavingState;
  /** what undo would take back, in words */ declare undoLabel: string | null;
  declare redoLabel: string | null;
  declare theme: Theme;

  constructor() {
    super();
    this.project = '';
    this.design = null;
    this.complaints = [];
    this.saving = { kind: 'saved' };
    this.undoLabel = null;
    this.redoLabel = null;
    this.theme = 'auto';
  }

  private act(act: PageAct): void {
    tell(this, 'hm-act', { act });
  }

  private rename({ target, detail }: CustomEvent<string>): void {
    // A project without a name could not be found again.
    if (detail === '') (target as HmField).value = this.project;
    else tell(this, 'hm-rename', { name: detail });
  }

  private setTemperature(text: string): void {
    tell(this, 'hm-edit', { next: setTemperature(this.design!, text), label: 'temperature' });
  }

  private setRange(end: 0 | 1, text: string): void {
    const { temperature, temperatureRange } = this.design!.conditions;
    const range: [string, string] = temperatureRange ? [...temperatureRange] : [temperature, temperature];
    if (text === '') return tell(this, 'hm-edit', { next: setTemperatureRange(this.design!, undefined), label: 'temperature range' });
    range[end] = text;
    tell(this, 'hm-edit', { next: setTemperatureRange(this.design!, range), label: 'temperature range' });
  }

  override render(): TemplateResult {
    return html`
      <div class="who">
        <h1><span class="mark" aria-hidden="true"></span>Halfmark</h1>
        <hm-field class="project" label="Project" .value=${this.project} @field-accept=${this.rename}></hm-field>
        <p class="saving ${this.saving.kind}">${savingWords(this.saving)}</p>
      </div>
      ${this.design ? this.renderConditions(this.design) : nothing}
      <div class="acts">
        <div class="pair" role="group" aria-label="History">
          <button type="button" ?disabled=${this.undoLabel === null} title=${this.undoLabel === null ? 'nothing to undo' : `undo: ${this.undoLabel}`} @click=${() => this.act('undo')}>Undo</button>
          <button type="button" ?disabled=${this.redoLabel === null} title=${this.redoLabel === null ? 'nothing to redo' : `redo: ${this.redoLabel}`} @click=${() => this.act('redo')}>Redo</button>
        </div>
        <button type="button" @click=${() => this.act('projects')}>Projects</button>
        <button type="button" @click=${() => this.act('starters')}>Starters</button>
        <button type="button" @click=${() => this.act('open-file')}>Open file</button>
        <button type="button" @click=${() => this.act('leave')}>Take away</button>
        ${this.renderView()}
        <button type="button" aria-keyshortcuts="F1" @click=${() => this.act('help')}>Help</button>
        <button type="button" @click=${() => this.act('about')}>About</button>
      </div>
    `;
  }

  /** A menu of its own over the page, closed by Escape or a press elsewhere. */
  private renderView(): TemplateResult {
    return html`<button type="button" popovertarget="view">View</button>
      <fieldset id="view" popover>
        <legend>Light or dark</legend>
        ${THEMES.map(([theme, words]) => html`<label><input type="radio" name="theme" .checked=${this.theme === theme} @change=${() => tell(this, 'hm-view', { change: { theme } })} />${words}</label>`)}
      </fieldset>`;
  }

  private renderConditions({ conditions }: Design): TemplateResult {
    const range = conditions.temperatureRange;
    const complaint = (path: string): string | null => complaintAt(this.complaints, `conditions.${path}`);
    return html`<div class="conditions" role="group" aria-label="Conditions">
      <hm-field label="Temperature" unit="K" .value=${conditions.temperature} .complaint=${complaint('temperature')} @field-accept=${(e: CustomEvent<string>) => this.setTemperature(e.detail)}></hm-field>
      <hm-field label="Range, from" unit="K" hint="none" .value=${range?.[0] ?? ''} .complaint=${complaint('temperatureRange[0]') ?? complaint('temperatureRange')} @field-accept=${(e: CustomEvent<string>) => this.setRange(0, e.detail)}></hm-field>
      <hm-field label="to" unit="K" hint="none" .value=${range?.[1] ?? ''} .complaint=${complaint('temperatureRange[1]')} @field-accept=${(e: CustomEvent<string>) => this.setRange(1, e.detail)}></hm-field>
      ${this.renderBias(conditions.bias)}
    </div>`;
  }

  /** Only thermal equilibrium is solved: the bias is said, and a design that asks for another one can be brought back. */
  private renderBias(bias: string | undefined): TemplateResult {
    const said = complaintAt(this.complaints, 'conditions.bias');
    if (said !== null) {
      return html`<hm-field label="Bias" unit="V" .value=${bias ?? '0 V'} .complaint=${said} @field-accept=${(e: CustomEvent<string>) => tell(this, 'hm-edit', { next: setBias(this.design!, e.detail), label: 'bias' })}></hm-field>`;
    }
    return html`<p class="bias"><span>Bias</span> <strong>${bias ?? '0 V'}</strong> <small>only equilibrium is solved</small></p>`;
  }
}

customElements.define('hm-conditions', HmConditions);

declare global {
  interface HTMLElementTagNameMap {
    'hm-conditions': HmConditions;
  }
}
