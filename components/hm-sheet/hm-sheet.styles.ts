import { css } from 'lit';

export const styles = css`
  :host {
    display: contents;
  }
  .fields {
    display: grid;
    grid-template-columns: repeat(auto-fill, minmax(9rem, 1fr));
    gap: 0.5rem 0.75rem;
    margin: 0 0 0.6rem;
  }
  .fields label {
    display: flex;
    flex-direction: column;
    gap: 1px;
    color: var(--faint);
    font-size: 0.8125rem;
  }
  .fields label.title {
    grid-column: 1 / -1;
  }
  .fields input,
  .fields select {
    font-size: 0.875rem;
    color: var(--ink);
    min-height: 30px;
    width: 100%;
  }
  .with-button {
    display: flex;
    gap: 0.3rem;
    align-items: flex-end;
  }
  .with-button label {
    flex: 1;
    min-width: 0;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    gap: 0.4rem;
    align-items: center;
    margin: 0.5rem 0;
  }
  .row button,
  .with-button button {
    min-height: 30px;
  }
  figure {
    margin: 0.6rem 0 0;
    border: 1px solid var(--line);
  }
  img {
    display: block;
    width: 100%;
    height: auto;
  }
  .remark {
    font-weight: 600;
    margin: 0;
    min-height: 1.35em;
  }
  .caution {
    border-inline-start: 3px solid var(--choice);
    padding-inline-start: 0.6rem;
  }
  .quiet {
    color: var(--faint);
    margin: 0;
  }
`;
