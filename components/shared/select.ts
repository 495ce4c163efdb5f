import { html, nothing, type TemplateResult } from 'lit';

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

/** A labelled menu. A value that the menu does not know stays visible as such: nothing is changed unasked. */
export function select(s: SelectSettings): TemplateResult {
  const known = s.options.some((o) => o.value === s.value);
  const options = known ? s.options : [{ value: s.value, text: s.unknown ?? `${s.value} (unknown)` }, ...s.options];
  return html`<label class="select">
    <span class="label">${s.label}</span>
    <select
      id=${s.id}
      aria-invalid=${s.complaint ? 'true' : nothing}
      aria-describedby=${s.complaint ? `${s.id}-complaint` : nothing}
      @change=${(event: Event) => s.onChoice((event.target as HTMLSelectElement).value)}
    >
      ${options.map((o) => html`<option value=${o.value} .selected=${o.value === s.value}>${o.text}</option>`)}
    </select>
    ${s.complaint ? html`<span class="complaint" id="${s.id}-complaint">${s.complaint}</span>` : nothing}
  </label>`;
}
