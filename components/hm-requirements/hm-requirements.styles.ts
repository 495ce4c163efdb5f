import { css } from 'lit';

export const styles = css`
  ol {
    list-style: none;
    margin: 0;
    padding: 0;
    border-top: 1px solid var(--ink);
  }
  ol:empty {
    border: 0;
  }
  li {
    display: grid;
    grid-template-columns: minmax(0, 1fr) minmax(0, 28rem) max-content;
    gap: 0.25rem 1.25rem;
    align-items: start;
    padding: 0.4rem 0;
    border-bottom: 1px solid var(--line);
  }
  .sentence {
    display: flex;
    flex-wrap: wrap;
    align-items: baseline;
    gap: 0.3rem 0.4rem;
    min-width: 0;
    --field-width: 9.5rem;
  }
  .number {
    min-width: 1.2em;
    font-weight: 600;
  }
  select {
    max-width: min(100%, 17rem);
    /* As wide as the choice, where browsers know it: the row reads as a sentence. */
    field-sizing: content;
  }
  .size {
    margin: 0.3rem 0 0 calc(102px + 0.6rem);
    border-color: var(--choice);
    border-width: 2px;
  }
  .doc {
    font-size: 0.8125rem;
  }
  .state {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.5rem;
    min-height: 28px;
    margin-top: 0;
  }
  .verdict {
    display: grid;
    grid-template-columns: max-content minmax(0, 1fr);
    align-items: center;
    gap: 0.1rem 0.6rem;
    padding-top: 0.2rem;
  }
  .met strong::before {
    content: '✓ ';
  }
  .not-met strong {
    color: var(--trouble);
  }
  .not-met strong::before {
    content: '▲ ';
  }
  .no-answer strong::before {
    content: '? ';
  }
  .bar {
    width: 102px;
    color: var(--conduction);
  }
  .not-met .bar {
    color: var(--trouble);
  }
  .limit {
    stroke: var(--ink);
    stroke-width: 2;
  }
  .worst {
    color: var(--faint);
    grid-column: 2;
    overflow-wrap: anywhere;
  }
  .wrong {
    font-size: 0.8125rem;
  }
  .stale .verdict {
    font-style: italic;
    color: var(--faint);
  }
  .stale .bar {
    opacity: 0.6;
  }
  fieldset {
    border: 0;
    margin: 0.6rem 0 0;
    padding: 0;
    min-width: 0;
  }
  legend {
    padding: 0;
    color: var(--faint);
    font-size: 0.8125rem;
  }
  @container (max-width: 64rem) {
    li {
      grid-template-columns: minmax(0, 1fr) max-content;
    }
    .sentence {
      grid-column: 1 / -1;
    }
  }
  @container (max-width: 34rem) {
    li {
      grid-template-columns: minmax(0, 1fr);
    }
  }
  :host {
    container-type: inline-size;
  }
`;
