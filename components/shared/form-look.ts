import { css } from 'lit';

/** Single controls, wherever they stand: a labelled menu, its complaint, a check with its words, a button in line with fields. */
export const controlLook = css`
  .select {
    display: inline-flex;
    flex-direction: column;
    gap: 1px;
    max-width: 100%;
  }
  .label,
  legend {
    color: var(--faint);
    font-size: 0.8125rem;
  }
  select[aria-invalid] {
    border-color: var(--trouble);
    border-width: 2px;
  }
  .select:has([data-waits]) .label::after {
    content: ' · Enter takes it';
    color: var(--ink);
  }
  [data-waits] {
    border-style: dashed;
  }
  .complaint {
    color: var(--trouble);
    font-size: 0.8125rem;
  }
  /* Takes no width from its row, as under a field. */
  .select .complaint {
    width: 0;
    min-width: 100%;
  }
  .complaint::before {
    content: '▲ ';
  }
  /* As low as a field beside it, which has its label above. */
  .check {
    display: inline-flex;
    align-items: center;
    gap: 6px;
    min-height: 28px;
    margin-top: 1.15rem;
  }
  .press {
    min-height: 28px;
    margin-top: 1.15rem;
  }
`;

/** Fields in a row that wraps; labels above; a complaint under its field. */
export const formLook = css`
  ${controlLook}
  .row {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-start;
    gap: 8px 12px;
  }
  .row + .row {
    margin-top: 10px;
  }
  .wide {
    --field-width: 11rem;
  }
  select {
    max-width: 16rem;
    min-height: 28px;
  }
  fieldset {
    border: 0;
    border-top: 1px solid var(--line);
    margin: 10px 0 0;
    padding: 4px 0 0;
    min-width: 0;
  }
  legend {
    padding: 0 8px 0 0;
  }
`;
