import { css } from 'lit';

export const styles = css`
  nav {
    display: flex;
    flex-wrap: wrap;
    gap: 4px;
    margin-bottom: 0.75rem;
  }
  nav button[aria-current='page'] {
    border-color: var(--ink);
    box-shadow: inset 0 -2px 0 var(--choice);
    font-weight: 600;
  }
  h3 {
    font-size: 1.125rem;
    margin: 0 0 0.5rem;
  }
  h4 {
    font-size: 0.9375rem;
    margin: 1rem 0 0.25rem;
  }
  p,
  li {
    line-height: 1.5;
    overflow-wrap: break-word;
  }
  li + li {
    margin-top: 0.3rem;
  }
  ul,
  ol {
    padding-left: 1.4rem;
  }
  code,
  pre {
    font-family: ui-monospace, 'DejaVu Sans Mono', monospace;
    font-size: 0.8125rem;
  }
  pre {
    overflow-x: auto;
    padding: 0.5rem 0.75rem;
    background: var(--wash);
    border-left: 3px solid var(--occupancy);
  }
  img {
    display: block;
    max-width: 100%;
    max-height: 30rem;
    margin: 0.75rem auto;
    border: 1px solid var(--line);
  }
  .table {
    overflow-x: auto;
  }
  table {
    border-collapse: collapse;
    min-width: 60%;
  }
  th,
  td {
    text-align: left;
    vertical-align: top;
    padding: 0.2rem 0.75rem 0.2rem 0;
    border-bottom: 1px solid var(--line);
  }
  .go {
    border: 0;
    padding: 0 2px;
    text-decoration: underline;
    text-align: left;
    background: none;
  }
`;
