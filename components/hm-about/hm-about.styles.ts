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
  a {
    color: inherit;
  }
  .print {
    overflow-wrap: anywhere;
  }
`;
