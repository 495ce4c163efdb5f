import { css } from 'lit';

export const styles = css`
  svg {
    display: block;
    max-width: 100%;
  }
  :host([stale]) svg {
    opacity: 0.45;
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
