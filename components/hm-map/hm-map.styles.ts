import { css } from 'lit';

export const styles = css`
  .part {
    margin-inline-start: 0.9rem;
    white-space: nowrap;
  }
  .part span {
    color: var(--faint);
  }
  ul.key {
    display: flex;
    flex-wrap: wrap;
    gap: 0.2rem 1.1rem;
    list-style: none;
    margin: 0.3rem 0;
    padding: 0;
  }
  ul.key li {
    display: inline-flex;
    align-items: center;
    gap: 0.4rem;
  }
  td,
  tbody th {
    text-align: start;
  }
  thead th {
    text-align: start;
  }
`;
