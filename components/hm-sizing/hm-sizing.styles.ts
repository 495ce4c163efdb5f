import { css } from 'lit';

export const styles = css`
  .ask,
  .put {
    --field-width: 8rem;
  }
  .put {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-end;
    gap: 0.4rem 0.75rem;
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
  .cautions::before {
    content: '▲ ';
  }
  .cautions + ul,
  [role='status'] ul {
    margin-block-end: 0.4rem;
    overflow-wrap: anywhere;
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
`;
