import { css } from 'lit';

export const styles = css`
  p {
    margin: 0.2rem 0;
  }
  h3 {
    font-size: 0.875rem;
    font-weight: 600;
    margin: 0.6rem 0 0.2rem;
  }
  .ask,
  .put {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-end;
    gap: 0.4rem 0.75rem;
    --field-width: 8rem;
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
    max-width: min(100%, 20rem);
  }
  button,
  select {
    min-height: 28px;
  }
  .find {
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
  .wrong {
    color: var(--trouble);
  }
  .wrong::before {
    content: '▲ ';
  }
  .outcome {
    font-size: 1rem;
    font-weight: 600;
    color: var(--ink);
  }
  .sides {
    display: flex;
    flex-wrap: wrap;
    gap: 0.25rem 1.5rem;
  }
  .sides > :last-child {
    flex: 1 1 18rem;
    min-width: 0;
  }
  .picture {
    display: block;
    max-width: 100%;
  }
  .stale .picture {
    opacity: 0.8;
  }
  .outcome.stale,
  .stale .sides > :last-child {
    font-style: italic;
    color: var(--faint);
  }
  .outcome.stale::before {
    content: '▲ ';
  }
  ul {
    margin: 0;
    padding-inline-start: 1.1rem;
  }
  ol {
    list-style: none;
    margin: 0;
    padding: 0;
  }
  ol li {
    display: grid;
    grid-template-columns: 36px minmax(0, 1fr);
    gap: 0.6rem;
    padding: 0.2rem 0;
  }
  ol li > svg {
    margin-top: 0.3rem;
  }
  .asked b {
    box-shadow: inset 0 -3px 0 var(--choice);
  }
  .line {
    display: block;
    color: var(--faint);
    overflow-wrap: anywhere;
  }
  .met::before {
    content: '✓ ';
  }
  .not-met {
    color: var(--trouble);
  }
  .not-met::before {
    content: '▲ ';
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
  table {
    border-collapse: collapse;
  }
  th,
  td {
    text-align: end;
    font-weight: 400;
    padding: 2px 12px;
    vertical-align: bottom;
  }
  td,
  tbody th {
    white-space: nowrap;
  }
  thead th {
    position: sticky;
    inset-block-start: 0;
    background: var(--ground);
    font-weight: 600;
    max-width: 14rem;
  }
`;
