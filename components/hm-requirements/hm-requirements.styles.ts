import { css } from 'lit';

export const styles = css`
  h2 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0 0 0.25rem;
    border-bottom: 1px solid var(--ink);
  }
  h3 {
    font-size: 0.875rem;
    font-weight: 600;
    margin: 0;
    overflow-wrap: anywhere;
  }
  p {
    margin: 0.2rem 0;
  }
  ul {
    list-style: none;
    margin: 0;
    padding: 0;
  }
  li {
    display: flex;
    flex-wrap: wrap;
    gap: 0.25rem 1.5rem;
    padding: 0.35rem 0;
    border-bottom: 1px solid var(--line);
  }
  li > div {
    flex: 1 1 24rem;
    min-width: 0;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-end;
    gap: 0.25rem 0.6rem;
    --field-width: 9rem;
  }
  .row button,
  select {
    min-height: 28px;
  }
  select {
    max-width: 100%;
  }
  .check {
    display: inline-flex;
    align-items: center;
    gap: 0.35rem;
    min-height: 28px;
  }
  .check input {
    width: 18px;
    height: 18px;
    min-height: 0;
    accent-color: var(--choice);
  }
  .state,
  .doc,
  .worst {
    color: var(--faint);
  }
  .state {
    display: flex;
    align-items: center;
    gap: 0.5rem;
    min-height: 28px;
  }
  progress {
    width: 8rem;
    accent-color: var(--choice);
  }
  .verdict {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.15rem 0.6rem;
  }
  .met strong::before {
    content: '✓ ';
  }
  .not-met strong,
  .wrong {
    color: var(--trouble);
  }
  .not-met strong::before,
  .wrong::before {
    content: '▲ ';
  }
  .no-answer strong::before {
    content: '? ';
  }
  .bar {
    color: var(--conduction);
  }
  .not-met .bar {
    color: var(--trouble);
  }
  .worst {
    flex-basis: 100%;
    overflow-wrap: anywhere;
  }
  .stale .verdict {
    font-style: italic;
    color: var(--faint);
  }
  summary {
    cursor: pointer;
    min-height: 24px;
  }
`;
