import { css } from 'lit';

export const styles = css`
  :host {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-end;
    gap: 0.4rem 0.8rem;
    border-bottom: 1px solid var(--ink);
    padding: 0.4rem 0 0.5rem;
  }
  .who {
    display: grid;
    grid-template-columns: auto auto;
    align-items: end;
    gap: 0 1rem;
  }
  h1 {
    display: flex;
    align-items: center;
    gap: 0.4rem;
    margin: 0 0 0.15rem;
    font-size: 1.25rem;
    font-weight: 600;
    letter-spacing: 0.01em;
  }
  /* The half mark: occupancy one half, at the Fermi level. */
  .mark {
    width: 0.9rem;
    height: 1.1rem;
    border: 1.5px solid var(--ink);
    background: linear-gradient(to top, var(--occupancy) 50%, transparent 50%);
  }
  .project {
    --field-width: 11.5rem;
  }
  .saving {
    grid-column: 1 / -1;
    margin: 0.1rem 0 0;
    font-size: 0.8125rem;
    color: var(--faint);
    /* However long the words are, the head keeps its places. */
    width: 0;
    min-width: 100%;
  }
  .saving.failed,
  .saving.conflict {
    color: var(--trouble);
    font-weight: 600;
  }
  .conditions {
    display: flex;
    flex-wrap: wrap;
    align-items: end;
    gap: 0.4rem 0.75rem;
    --field-width: 5.5rem;
  }
  .bias {
    margin: 0;
    font-size: 0.875rem;
    line-height: 1.2;
    max-width: 8rem;
  }
  .bias span,
  .bias small {
    color: var(--faint);
    font-size: 0.8125rem;
  }
  .bias small {
    display: block;
  }
  .acts {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.4rem;
    margin-inline-start: auto;
  }
  .acts button {
    min-height: 30px;
  }
  .pair {
    display: flex;
    gap: 0.2rem;
    margin-inline-end: 0.4rem;
  }
  fieldset {
    border: 1px solid var(--ink);
    border-radius: 2px;
    padding: 0.5rem 0.75rem;
    color: var(--ink);
    background: var(--ground);
  }
  fieldset label {
    display: flex;
    align-items: center;
    gap: 0.5rem;
    min-height: 28px;
  }
  @media (max-width: 640px) {
    .who,
    .conditions,
    .acts {
      width: 100%;
      margin: 0;
    }
    .acts button {
      min-height: 36px;
    }
  }
`;
