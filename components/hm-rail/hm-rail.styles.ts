import { css } from 'lit';

export const styles = css`
  svg {
    display: block;
    max-width: 100%;
  }
  :host([stale]) svg {
    opacity: 0.45;
  }
  details {
    font-size: 0.8125rem;
  }
  summary {
    min-height: 24px;
    align-content: center;
    color: var(--faint);
  }
  details p {
    margin: 0.2rem 0;
  }
  th,
  td {
    padding: 1px 5px;
  }
  .empty {
    display: grid;
    place-content: center;
    height: 100%;
    min-height: 8rem;
    padding: 8px;
    border: 1px dashed var(--line);
    color: var(--faint);
    text-align: center;
    font-size: 0.8125rem;
  }
`;
