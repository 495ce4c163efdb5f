import { css } from 'lit';

export const styles = css`
  :host {
    display: block;
    margin: 0.4rem 0;
  }
  summary {
    cursor: pointer;
    font-weight: 600;
    font-size: 0.9375rem;
    min-height: 24px;
  }
  .boxes {
    display: grid;
    grid-template-columns: repeat(auto-fill, minmax(15rem, 1fr));
    gap: 0 0.75rem;
  }
  .boxes p {
    grid-column: 1 / -1;
    margin: 0.2rem 0;
  }
  .box {
    display: flex;
    gap: 0.45rem;
    align-items: center;
    min-height: 28px;
    overflow-wrap: anywhere;
  }
  .figures {
    display: flex;
    flex-wrap: wrap;
    gap: 0.4rem 0.75rem;
    align-items: flex-end;
    margin-top: 0.4rem;
  }
  .figures label {
    display: flex;
    flex-direction: column;
    gap: 1px;
    color: var(--faint);
    font-size: 0.8125rem;
    min-width: 0;
  }
  .figures select {
    font-size: 0.875rem;
    color: var(--ink);
    min-height: 30px;
    max-width: 100%;
  }
  button {
    min-height: 30px;
  }
  ul {
    list-style: none;
    margin: 0.4rem 0 0;
    padding: 0;
  }
  li {
    display: flex;
    gap: 0.6rem;
    align-items: center;
    min-height: 32px;
    overflow-wrap: anywhere;
  }
  .quiet {
    color: var(--faint);
  }
`;
