import { css } from 'lit';

export const styles = css`
  .head {
    display: flex;
    align-items: baseline;
    gap: 0.75rem;
    border-bottom: 1px solid var(--ink);
    padding-bottom: 0.2rem;
  }
  h2 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0;
  }
  p {
    margin: 0.2rem 0 0.4rem;
    color: var(--faint);
  }
  ul {
    list-style: none;
    margin: 0;
    padding: 0;
    display: grid;
    /* As many beside each other as there is room for: a tall column would leave the paper beside it blank. */
    grid-template-columns: repeat(auto-fill, minmax(15.5rem, 1fr));
    column-gap: 1.5rem;
  }
  li {
    padding: 0.3rem 0;
    border-bottom: 1px solid var(--line);
    --complaint-width: 8rem;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-start;
    gap: 0.25rem 0.5rem;
    --field-width: 5.75rem;
  }
  /* Both ends of a range stay beside each other, wherever the row breaks. */
  .range {
    display: flex;
    align-items: flex-start;
    gap: 0.5rem;
    --field-width: 7.2rem;
  }
  .value {
    --field-width: 8rem;
  }
  input[type='range'] {
    width: 100%;
    min-height: 28px;
    margin: 0.15rem 0 0;
    padding: 0;
    border: 0;
    accent-color: var(--choice);
  }
  summary {
    color: var(--faint);
    font-size: 0.8125rem;
  }
  .remove {
    min-height: 28px;
    /* As low as the fields beside it, which have their labels above. */
    margin-top: 1.15rem;
  }
  .note {
    font-size: 0.8125rem;
    overflow-wrap: anywhere;
  }
`;
