import { css } from 'lit';

/**
 * The page's few colours as an element sees them, with the light and dark values for an element that stands alone, and the controls that every
 * element shares. The page sets --hm-ground, --hm-ink, --hm-conduction, --hm-valence, --hm-occupancy, --hm-choice, --hm-trouble.
 */
export const look = css`
  :host {
    --ground: var(--hm-ground, light-dark(#fbfaf6, #14171c));
    --ink: var(--hm-ink, light-dark(#1f2430, #e6e3da));
    --conduction: var(--hm-conduction, light-dark(#0b6e75, #4fb3b9));
    --valence: var(--hm-valence, light-dark(#a4502b, #e0906a));
    --occupancy: var(--hm-occupancy, light-dark(#5b3fa8, #a793e8));
    --choice: var(--hm-choice, light-dark(#b47a00, #e2b04a));
    --trouble: var(--hm-trouble, light-dark(#b3261e, #f28b82));
    /* Words that stand back: still 4.5 to 1 on the ground. */
    --faint: color-mix(in srgb, var(--ink) 72%, var(--ground));
    --line: color-mix(in srgb, var(--ink) 22%, var(--ground));
    --edge: color-mix(in srgb, var(--ink) 58%, var(--ground));
    --wash: color-mix(in srgb, var(--ink) 5%, var(--ground));
    display: block;
    color: var(--ink);
    background: var(--ground);
    font-family: var(--hm-font, -apple-system, 'Segoe UI', Roboto, 'Helvetica Neue', Arial, 'Liberation Sans', 'DejaVu Sans', sans-serif);
    font-size: 0.875rem;
    line-height: 1.35;
    font-variant-numeric: tabular-nums;
  }
  :host([hidden]) {
    display: none;
  }
  *,
  ::before,
  ::after {
    box-sizing: border-box;
  }
  button,
  select,
  input {
    font: inherit;
    font-variant-numeric: inherit;
    color: inherit;
    min-height: 24px;
    border: 1px solid var(--edge);
    border-radius: 2px;
    background: var(--ground);
    padding: 2px 6px;
    margin: 0;
  }
  button {
    min-width: 24px;
    cursor: pointer;
  }
  input[type='checkbox'],
  input[type='radio'] {
    flex: none;
    width: 16px;
    height: 16px;
    min-height: 0;
    accent-color: var(--ink);
  }
  progress {
    width: 8rem;
    accent-color: var(--choice);
  }
  summary {
    cursor: pointer;
    min-height: 24px;
  }
  button.plain {
    border-color: transparent;
    background: none;
  }
  button:hover:not(:disabled) {
    background: var(--wash);
  }
  button[aria-pressed='true'],
  button[aria-checked='true'] {
    border-color: var(--ink);
    box-shadow: inset 0 -2px 0 var(--choice);
  }
  button:disabled {
    color: var(--faint);
    border-style: dotted;
    cursor: default;
  }
  :focus-visible {
    outline: 2px solid var(--choice);
    outline-offset: 1px;
  }
  .spoken {
    position: absolute;
    width: 1px;
    height: 1px;
    overflow: hidden;
    clip-path: inset(50%);
    white-space: nowrap;
  }
  @media (forced-colors: active) {
    button[aria-pressed='true'],
    button[aria-checked='true'] {
      outline: 2px solid Highlight;
    }
  }
`;
