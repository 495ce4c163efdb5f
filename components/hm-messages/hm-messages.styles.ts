import { css } from 'lit';

export const styles = css`
  h2 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0;
  }
  p {
    margin: 0.2rem 0;
  }
  ul {
    margin: 0.2rem 0;
    padding-inline-start: 1.1rem;
  }
  li {
    overflow-wrap: anywhere;
  }
  .trouble {
    border: 1px solid var(--trouble);
    border-inline-start-width: 5px;
    border-radius: 2px;
    padding: 0.4rem 0.7rem;
    margin-bottom: 0.5rem;
  }
  .trouble h2::before {
    content: '▲ ';
    color: var(--trouble);
  }
  .place {
    font-weight: 600;
  }
  .long {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.5rem;
  }
  .line {
    display: flex;
    flex-wrap: wrap;
    gap: 0 1.5rem;
    min-height: 24px;
  }
  .line details[open] {
    flex-basis: 100%;
  }
  .remark {
    margin: 0;
    min-width: 0;
    overflow-wrap: anywhere;
    color: var(--faint);
  }
  .urgent {
    color: var(--trouble);
  }
`;
