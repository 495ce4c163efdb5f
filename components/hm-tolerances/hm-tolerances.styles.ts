import { css } from 'lit';

export const styles = css`
  p {
    margin: 0.2rem 0;
  }
  h3 {
    font-size: 0.875rem;
    font-weight: 600;
    margin: 0.8rem 0 0.2rem;
  }
  .ask {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-end;
    gap: 0.4rem 0.75rem;
    --field-width: 6rem;
  }
  .ask label {
    display: flex;
    flex-direction: column;
    gap: 1px;
    color: var(--faint);
    font-size: 0.8125rem;
    max-width: 100%;
  }
  select {
    font-size: 0.875rem;
    color: var(--ink);
    max-width: min(100%, 22rem);
  }
  button,
  select {
    min-height: 28px;
  }
  .go {
    border-color: var(--ink);
    font-weight: 600;
  }
  .state,
  .doc {
    color: var(--faint);
  }
  .state {
    margin-top: 0.5rem;
  }
  .state.outcome {
    font-size: 1rem;
    font-weight: 600;
    color: var(--ink);
  }
  .state.stale,
  .stale-mark {
    font-style: italic;
    color: var(--faint);
  }
  .stale-mark::before,
  .wrong::before,
  .less::before {
    content: '▲ ';
  }
  .wrong,
  .less {
    color: var(--trouble);
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.5rem;
  }
  progress {
    width: 8rem;
    accent-color: var(--choice);
  }
  .pictures {
    display: flex;
    flex-wrap: wrap;
    gap: 0.25rem 1.5rem;
  }
  .pictures > * {
    min-width: 0;
  }
  .picture {
    display: block;
    max-width: 100%;
  }
  .stale .picture {
    opacity: 0.8;
  }
  fieldset {
    border: 1px solid var(--line);
    margin: 0.4rem 0;
    display: flex;
    flex-wrap: wrap;
    gap: 0.1rem 1rem;
    max-height: 14rem;
    overflow: auto;
  }
  fieldset label {
    display: inline-flex;
    align-items: center;
    gap: 0.35rem;
    min-height: 24px;
  }
  fieldset input {
    width: 16px;
    height: 16px;
    min-height: 0;
    accent-color: var(--ink);
  }
  summary {
    cursor: pointer;
    min-height: 24px;
  }
  .scroll {
    overflow: auto;
    max-height: 24rem;
    border-block: 1px solid var(--ink);
  }
  pre {
    margin: 0;
    padding: 0.3rem 0;
    font-size: 0.8125rem;
  }
  table {
    border-collapse: collapse;
  }
  th,
  td {
    text-align: end;
    font-weight: 400;
    padding: 2px 10px;
    vertical-align: bottom;
    white-space: nowrap;
  }
  th:first-child,
  .words {
    text-align: start;
  }
  tbody th {
    max-width: 22rem;
    white-space: normal;
    min-width: 9rem;
  }
  thead th {
    position: sticky;
    inset-block-start: 0;
    background: var(--ground);
    font-weight: 600;
  }
`;
