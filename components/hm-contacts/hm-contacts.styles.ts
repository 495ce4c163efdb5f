import { css } from 'lit';

export const styles = css`
  p {
    margin: 0.2rem 0;
  }
  .contacts {
    display: flex;
    flex-wrap: wrap;
    gap: 0.75rem 2rem;
  }
  .contact {
    flex: 1 1 34rem;
    min-width: 0;
  }
  .sides {
    display: flex;
    flex-wrap: wrap;
    gap: 0.25rem 2rem;
  }
  .words {
    flex: 1 1 20rem;
    min-width: 0;
  }
  .contact.stale .picture,
  .contact.stale dl {
    opacity: 0.65;
  }
  .stale-mark {
    font-style: italic;
  }
  .stale-mark::before,
  .wrong::before {
    content: '▲ ';
  }
  .wrong {
    color: var(--trouble);
  }
  .measure {
    min-width: 0;
  }
  .picture {
    display: block;
    max-width: 100%;
  }
  dl {
    display: grid;
    grid-template-columns: max-content minmax(0, 1fr);
    gap: 2px 12px;
    margin: 0.5rem 0;
  }
  dt {
    color: var(--faint);
  }
  dd {
    margin: 0;
    overflow-wrap: anywhere;
  }
  dd .note {
    color: var(--faint);
    font-size: 0.9em;
  }
  .state {
    color: var(--faint);
  }
  .compare {
    overflow-x: auto;
    max-width: 100%;
  }
  button {
    min-height: 28px;
  }
  summary {
    cursor: pointer;
    min-height: 24px;
  }
  .scroll {
    position: relative;
    overflow: auto;
    max-height: 20rem;
    border-block: 1px solid var(--ink);
  }
  table {
    border-collapse: collapse;
  }
  .compare tbody th {
    white-space: normal;
  }
  .off {
    display: block;
    color: var(--faint);
    font-size: 0.8125em;
  }
  th,
  td {
    text-align: end;
    font-weight: 400;
    padding: 2px 12px;
    white-space: nowrap;
    vertical-align: baseline;
  }
  th:first-child {
    text-align: start;
    padding-inline-start: 0;
  }
  thead th {
    font-weight: 600;
    border-bottom: 1px solid var(--line);
  }
  .scroll thead th {
    position: sticky;
    inset-block-start: 0;
    background: var(--ground);
  }
  tr.peak > * {
    font-weight: 600;
  }
`;
