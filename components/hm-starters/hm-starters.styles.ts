import { css } from 'lit';

export const styles = css`
  :host {
    display: contents;
  }
  p {
    margin: 0 0 0.75rem;
  }
  ul {
    list-style: none;
    margin: 0;
    padding: 0;
    display: grid;
    grid-template-columns: repeat(auto-fill, minmax(13rem, 1fr));
    gap: 0.6rem;
  }
  li {
    display: flex;
  }
  button {
    flex: 1;
    display: flex;
    flex-direction: column;
    gap: 0.2rem;
    text-align: start;
    padding: 0.6rem 0.7rem;
    border-color: var(--line);
    border-inline-start: 4px solid var(--conduction);
  }
  .summary {
    font-weight: 600;
  }
  .summary::first-letter {
    text-transform: uppercase;
  }
  .layers {
    margin-top: auto;
    color: var(--faint);
    font-size: 0.8125rem;
    overflow-wrap: anywhere;
  }
`;
