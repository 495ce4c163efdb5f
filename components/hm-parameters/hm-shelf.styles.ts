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
  ul {
    list-style: none;
    margin: 0;
    padding: 0;
  }
  li {
    display: flex;
    flex-wrap: wrap;
    gap: 0.25rem 0.75rem;
    align-items: center;
    justify-content: space-between;
    padding: 0.25rem 0;
    border-top: 1px solid var(--line);
  }
  .name {
    min-width: 0;
    overflow-wrap: anywhere;
  }
  .acts {
    display: flex;
    flex-wrap: wrap;
    gap: 4px;
    align-items: center;
  }
`;
