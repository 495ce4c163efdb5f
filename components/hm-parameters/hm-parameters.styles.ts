import { css } from 'lit';

export const styles = css`
  h3 {
    font-size: 0.875rem;
    font-weight: 600;
    margin: 0.75rem 0 0.25rem;
  }
  p {
    margin: 0.25rem 0 0.5rem;
    max-width: 60rem;
  }
  .quiet {
    color: var(--faint);
  }
  .own {
    margin: 0 0 0.75rem;
    padding: 0.25rem 0.6rem;
    border-left: 3px solid var(--choice);
  }
  .own ul,
  .values {
    list-style: none;
    margin: 0;
    padding: 0;
  }
  details {
    border-top: 1px solid var(--line);
  }
  details > div {
    padding: 0 0 0.5rem;
  }
  summary {
    min-height: 28px;
    padding: 4px 0;
  }
  .mark {
    border: 1px solid var(--choice);
    border-radius: 2px;
    padding: 0 4px;
    font-size: 0.8125rem;
    white-space: nowrap;
  }
  .values > li {
    display: grid;
    grid-template-columns: minmax(9rem, 14rem) minmax(8rem, 13rem) minmax(0, 1fr) auto;
    gap: 0.1rem 0.75rem;
    align-items: baseline;
    padding: 0.2rem 0;
    border-top: 1px dotted var(--line);
  }
  .values > li.changed {
    box-shadow: inset 3px 0 0 var(--choice);
    padding-left: 0.5rem;
  }
  .figure,
  .work {
    overflow-wrap: anywhere;
  }
  .was,
  .checked {
    display: block;
    color: var(--faint);
    font-size: 0.8125rem;
  }
  .acts {
    display: flex;
    flex-wrap: wrap;
    gap: 4px;
  }
  hm-value-form,
  .form {
    grid-column: 1 / -1;
    margin: 0.25rem 0;
  }
  .rival {
    grid-column: 1 / -1;
    display: flex;
    flex-wrap: wrap;
    gap: 0.1rem 0.5rem;
    align-items: baseline;
    padding-left: 1rem;
    overflow-wrap: anywhere;
  }
  .rival .checked {
    display: inline;
    flex: 1 1 16rem;
  }
  .row {
    margin-top: 0.5rem;
  }
  @media (max-width: 720px) {
    .values > li {
      grid-template-columns: minmax(0, 1fr) auto;
    }
    .work {
      grid-column: 1 / -1;
      order: 3;
    }
    .acts {
      grid-column: 1 / -1;
      order: 4;
    }
    hm-value-form,
    .form,
    .rival {
      order: 5;
    }
    .figure {
      text-align: right;
      max-width: 11rem;
    }
  }
`;
