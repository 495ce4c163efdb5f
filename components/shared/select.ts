import { html, nothing, type TemplateResult } from 'lit';
import { settledChoice } from './settled-choice.ts';

export interface Option {
  value: string;
  text: string;
}

export interface SelectSettings {
  label: string;
  value: string;
  options: Option[];
  /** said in place of an option when `value` is none of them */ unknown?: string;
  complaint?: string | null;
  /** id, unique within the element, for the complaint's text */ id: string;
  onChoice: (value: string) => void;
}

/** A labelled menu. A value that the menu does not know stays visible as such: nothing is changed unasked, and what arrows and letters pass through is not chosen. */
export function select(s: SelectSettings): TemplateResult {
  const known = s.options.some((o) => o.value === s.value);
  const { change, keydown, blur } = settledChoice(s.value, s.onChoice);
  const options = known ? s.options : [{ value: s.value, text: s.unknown ?? `${s.value} (unknown)` }, ...s.options];
  return html`<label class="select">
    <span class="label">${s.label}</span>
    <select
      id=${s.id}
      aria-invalid=${s.complaint ? 'true' : nothing}
      aria-describedby=${s.complaint ? `${s.id}-complaint` : nothing}
      aria-description="arrows and letters look, Enter or leaving takes, Escape goes back"
      @change=${change}
      @keydown=${keydown}
      @blur=${blur}
    >
      ${options.map((o) => html`<option value=${o.value} .selected=${o.value === s.value}>${o.text}</option>`)}
    </select>
    ${s.complaint ? html`<span class="complaint" id="${s.id}-complaint">${s.complaint}</span>` : nothing}
  </label>`;
}
