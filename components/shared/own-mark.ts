import { html, type TemplateResult } from 'lit';

/** Stands behind what rests on values of the design's own: a sign that is no colour. */
export const OWN_SIGN = '†';

/** What the sign says, below the place where it stands. */
export const OWN_WORDS = `${OWN_SIGN} with values of this design's own in place of published ones; Parameters lists them.`;

/** @param of  the entries, in words: "Si, P in Si" */
export function ownMark(of: string): TemplateResult {
  return html`<span class="own-mark" title="own values of ${of}"><span aria-hidden="true"> ${OWN_SIGN}</span><span class="spoken"> (own values of ${of})</span></span>`;
}
