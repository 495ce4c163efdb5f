import { css } from 'lit';

export const styles = css`
  .dopant {
    padding-block: 6px 8px;
  }
  .dopant + .dopant {
    border-top: 1px dotted var(--line);
  }
  .acts {
    display: flex;
    flex-wrap: wrap;
    gap: 6px;
    margin-top: 12px;
  }
  .acts button {
    min-height: 28px;
  }
  .acts .spread {
    margin-inline-end: auto;
  }
  .narrow {
    --field-width: 5rem;
  }
  .none {
    color: var(--faint);
    margin: 4px 0 6px;
  }
`;
