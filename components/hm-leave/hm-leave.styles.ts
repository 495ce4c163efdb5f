import { css } from 'lit';

export const styles = css`
  :host {
    display: contents;
  }
  h3 {
    font-size: 0.9375rem;
    margin: 0.9rem 0 0.35rem;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    gap: 0.4rem;
    margin: 0.35rem 0;
  }
  .row button,
  select {
    min-height: 30px;
  }
  .quiet {
    color: var(--faint);
    margin: 0;
  }
  .remark {
    font-weight: 600;
    margin: 0;
  }
  .caution {
    border-inline-start: 3px solid var(--choice);
    padding-inline-start: 0.6rem;
  }
`;
