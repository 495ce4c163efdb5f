import { css } from 'lit';

export const styles = css`
  :host {
    display: contents;
  }
  dialog {
    width: min(46rem, calc(100vw - 2rem));
    max-height: calc(100dvh - 2rem);
    padding: 0;
    overflow: auto;
    color: var(--ink);
    background: var(--ground);
    border: 1px solid var(--ink);
    border-radius: 2px;
  }
  dialog::backdrop {
    background: rgb(0 0 0 / 0.45);
  }
  .sheet {
    padding: 1rem 1.25rem 1.25rem;
  }
  header {
    display: flex;
    align-items: baseline;
    gap: 1rem;
    border-bottom: 1px solid var(--ink);
    padding-bottom: 0.5rem;
    margin-bottom: 0.75rem;
  }
  h2 {
    flex: 1;
    margin: 0;
    font-size: 1.125rem;
    font-weight: 600;
  }
  @media (max-width: 480px) {
    .sheet {
      padding: 0.75rem;
    }
  }
`;
