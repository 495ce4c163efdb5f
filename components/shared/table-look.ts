import { css } from 'lit';

/** Tables of figures that scroll inside their own frame, with the headings held in view. */
export const tableLook = css`
  .scroll {
    /* Holds the words for those who hear the page, which are placed out of sight. */
    position: relative;
    overflow: auto;
    max-height: 24rem;
    max-width: 100%;
    border-block: 1px solid var(--ink);
  }
  table {
    border-collapse: collapse;
  }
  th,
  td {
    text-align: end;
    font-weight: 400;
    padding: 2px 12px;
    vertical-align: baseline;
    white-space: nowrap;
  }
  thead th {
    position: sticky;
    inset-block-start: 0;
    z-index: 1;
    background: var(--ground);
    font-weight: 600;
    vertical-align: bottom;
    max-width: 14rem;
    white-space: normal;
  }
`;

/** Tables of words and figures whose headings sort and whose first column stays in view: the ledger, the ranking of metals. */
export const sortedTableLook = css`
  th,
  td {
    text-align: start;
    vertical-align: baseline;
    font-weight: 400;
    padding: 3px 10px;
  }
  thead th {
    vertical-align: bottom;
    line-height: 1.2;
  }
  thead button {
    border: 0;
    background: none;
    text-align: inherit;
    font-weight: 600;
    line-height: 1.2;
  }
  .unit {
    display: block;
    font-weight: 400;
    color: var(--faint);
    white-space: nowrap;
  }
  .arrow {
    display: inline-block;
    width: 1em;
    text-align: center;
  }
  .figure {
    text-align: end;
    white-space: nowrap;
  }
  th:first-child {
    position: sticky;
    inset-inline-start: 0;
    background: var(--ground);
    z-index: 1;
  }
  .note {
    color: var(--faint);
    font-size: 0.8125em;
    font-weight: 400;
  }
`;
