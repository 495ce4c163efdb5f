import { css } from 'lit';

export const styles = css`
  label {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    justify-content: space-between;
    gap: 0.1rem 0.5rem;
    padding: 0.15rem 0;
    color: var(--faint);
  }
  select {
    min-height: 28px;
    max-width: 100%;
    color: var(--ink);
  }
  .check {
    justify-content: flex-start;
    flex-wrap: nowrap;
    min-height: 28px;
    color: var(--ink);
  }
`;
