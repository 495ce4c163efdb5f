import { css } from 'lit';

export const styles = css`
  .bar {
    display: flex;
    flex-wrap: wrap;
    align-items: baseline;
    gap: 4px 8px;
    margin: 12px 0 4px;
  }
  section:first-of-type .bar {
    margin-top: 0;
  }
  h3 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0;
    margin-inline-end: auto;
  }
  .scroll {
    overflow-x: auto;
    border-block: 1px solid var(--ink);
    /* Keeps the first column's shadow and long words inside the region. */
    max-width: 100%;
  }
  table {
    border-collapse: collapse;
    width: 100%;
  }
  thead th {
    border-bottom: 1px solid var(--line);
    padding-block: 0;
  }
  thead button {
    padding: 4px 0;
  }
  tbody th button {
    border: 0;
    background: none;
    padding: 0;
    text-align: start;
    overflow-wrap: anywhere;
  }
  tbody th {
    min-width: 8.5rem;
  }
  tbody tr + tr > * {
    border-top: 1px solid var(--line);
  }
  tbody tr.chosen > * {
    background: color-mix(in srgb, var(--choice) 12%, var(--ground));
  }
  tbody tr.chosen th {
    box-shadow: inset 3px 0 0 var(--choice);
  }
  thead th.figure {
    white-space: normal;
    min-width: 4.5rem;
  }
  thead th.figure button {
    text-align: end;
  }
  th.words:not(:first-child),
  td.words {
    min-width: 8rem;
    padding-inline-start: 18px;
  }
  td span {
    display: block;
  }
  td .change {
    color: var(--faint);
    font-size: 0.8125em;
    border-inline-end: 2px solid var(--choice);
    padding-inline-end: 4px;
  }
  .against {
    margin: 0.2rem 0;
    color: var(--faint);
  }
  td.asks {
    cursor: help;
  }
  td.asks:hover span:first-child {
    text-decoration: underline dotted;
  }
  fieldset {
    flex-basis: 100%;
    display: flex;
    flex-wrap: wrap;
    gap: 2px 14px;
    border: 1px solid var(--line);
    margin: 0 0 4px;
    padding: 4px 8px;
  }
  legend {
    padding: 0 4px;
    color: var(--faint);
  }
  fieldset label {
    display: inline-flex;
    align-items: center;
    gap: 5px;
    min-height: 24px;
  }
  .quality {
    margin: 10px 0 0;
    color: var(--faint);
  }
  .hint {
    color: var(--faint);
    margin: 0 0 8px;
  }
  .stale-mark {
    color: var(--ink);
    border-inline-start: 3px solid var(--choice);
    padding-inline-start: 6px;
    margin: 0 0 6px;
  }
  /* Dimmed and slanted: still to be read, not to be taken for the figures of now. */
  :host([stale]) :is(.scroll, thead button, tbody button) {
    color: var(--faint);
    font-style: italic;
  }
  .empty {
    color: var(--faint);
    margin: 0;
  }
  @media (max-width: 40rem) {
    tbody th {
      min-width: 5rem;
    }
    th:first-child {
      max-width: 8rem;
    }
    th,
    td {
      padding-inline: 7px;
    }
  }
`;
