import { css } from 'lit';

export const styles = css`
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
  .measure {
    min-width: 0;
  }
  dl {
    display: grid;
    grid-template-columns: max-content minmax(0, 1fr);
    gap: 2px 12px;
    margin: 0.5rem 0;
  }
  dt {
    /* Beside the first line of a figure, whose button is taller than its words. */
    padding-block: 3px;
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
  .compare {
    overflow-x: auto;
    max-width: 100%;
  }
  .scroll {
    max-height: 20rem;
  }
  .compare tbody th {
    white-space: normal;
  }
  .off {
    display: block;
    color: var(--faint);
    font-size: 0.8125em;
  }
  th:first-child {
    text-align: start;
    padding-inline-start: 0;
  }
  thead th {
    border-bottom: 1px solid var(--line);
  }
  tr.peak > * {
    font-weight: 600;
  }
`;
