import { css } from 'lit';

export const styles = css`
  :host {
    display: contents;
  }
  p {
    margin: 0.4rem 0;
    max-width: 64ch;
  }
  h3 {
    font-size: 0.9375rem;
    margin: 1rem 0 0.25rem;
  }
  .quiet {
    color: var(--faint);
  }
  .caution {
    border-inline-start: 3px solid var(--choice);
    padding-inline-start: 0.6rem;
  }
  dl {
    margin: 0;
  }
  dl div {
    display: flex;
    flex-wrap: wrap;
    gap: 0 0.75rem;
    padding: 0.15rem 0;
    border-top: 1px solid var(--line);
  }
  dt {
    min-width: 12rem;
  }
  dd {
    margin: 0;
  }
  kbd {
    font: inherit;
    border: 1px solid var(--edge);
    border-radius: 2px;
    padding: 0 0.3rem;
  }
`;
