import { css } from 'lit';

/** A part beside the strip that folds away: its heading in the line that opens it, with a rule below. What is in force stands behind the heading, quiet. */
export const foldLook = css`
  h2 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0;
    display: inline;
  }
  summary {
    border-bottom: 1px solid var(--ink);
    margin-bottom: 0.25rem;
    overflow-wrap: anywhere;
  }
  .inforce {
    color: var(--faint);
  }
`;
