import { css } from 'lit';

export const styles = css`
  :host {
    display: contents;
  }
  dialog {
    color: var(--ink);
    background: var(--ground);
    border: 0;
    border-inline-start: 1px solid var(--ink);
    padding: 0;
    overflow: auto;
    overscroll-behavior: contain;
    position: fixed;
    inset: 0 0 0 auto;
    width: min(34rem, 46vw);
    height: 100dvh;
    max-width: none;
    max-height: none;
    margin: 0;
    z-index: 5;
  }
  dialog.left {
    inset: 0 auto 0 0;
    border-inline-start: 0;
    border-inline-end: 1px solid var(--ink);
  }
  dialog::backdrop {
    background: rgb(0 0 0 / 0.45);
  }
  header {
    position: sticky;
    top: 0;
    z-index: 1;
    display: flex;
    flex-wrap: wrap;
    align-items: baseline;
    gap: 4px 8px;
    padding: 12px 18px 8px;
    background: var(--ground);
    border-bottom: 1px solid var(--ink);
  }
  h2 {
    flex: 1 1 10rem;
    margin: 0;
    font-size: 1.0625rem;
    font-weight: 600;
    overflow-wrap: anywhere;
  }
  h2:focus-visible {
    outline-offset: 3px;
  }
  .sheet {
    padding: 10px 18px 24px;
  }
  .value {
    margin: 0;
    font-size: 1.25rem;
  }
  .value span {
    display: block;
  }
  .words,
  .note,
  .quiet {
    color: var(--faint);
    margin: 0 0 6px;
  }
  h3 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 18px 0 4px;
    padding-top: 6px;
    border-top: 1px solid var(--line);
  }
  ol {
    list-style: none;
    margin: 0;
    padding: 0;
  }
  li.step {
    padding: 8px 0 10px;
  }
  li.step + li.step {
    border-top: 1px dotted var(--edge);
  }
  .formula {
    overflow-x: auto;
    padding: 2px 0;
  }
  math {
    font-size: 1.0625rem;
  }
  .comes {
    margin: 2px 0 4px;
    font-weight: 600;
  }
  table {
    width: 100%;
    border-collapse: collapse;
    font-size: 0.8125rem;
  }
  th,
  td {
    text-align: start;
    vertical-align: baseline;
    font-weight: 400;
    padding: 2px 10px 2px 0;
  }
  td.number {
    white-space: nowrap;
  }
  td:last-child {
    width: 100%;
    padding-inline-end: 0;
  }
  .source {
    display: block;
    color: var(--faint);
    overflow-wrap: anywhere;
  }
  details {
    margin-top: 14px;
    border-top: 1px solid var(--line);
    padding-top: 6px;
  }
  summary {
    font-weight: 600;
    font-size: 0.9375rem;
  }
  ul {
    margin: 4px 0;
    padding-inline-start: 1.1rem;
  }
  @media (max-width: 56rem) {
    dialog,
    dialog.left {
      inset: auto 0 0 0;
      width: 100%;
      height: min(88dvh, 100dvh);
      border-inline: 0;
      border-top: 1px solid var(--ink);
    }
    .sheet {
      padding: 8px 12px 20px;
    }
    header {
      padding: 8px 12px;
    }
  }
  @media print {
    dialog {
      display: none;
    }
  }
`;
