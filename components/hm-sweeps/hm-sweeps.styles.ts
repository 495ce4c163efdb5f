import { css } from 'lit';

/** What sweeps, film and map share. */
export const plotLook = css`
  p {
    margin: 0.2rem 0;
  }
  h3 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0.9rem 0 0.3rem;
  }
  .ask {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-start;
    gap: 0.4rem 0.75rem;
    --field-width: 7.5rem;
  }
  .ask + .ask {
    margin-top: 0.4rem;
  }
  .ask .short {
    --field-width: 4rem;
  }
  .select {
    display: inline-flex;
    flex-direction: column;
    gap: 1px;
    max-width: 100%;
  }
  .label {
    color: var(--faint);
    font-size: 0.8125rem;
  }
  select {
    max-width: min(100%, 18rem);
    min-height: 28px;
  }
  .complaint,
  .wrong {
    color: var(--trouble);
    font-size: 0.8125rem;
    max-width: 40rem;
  }
  .complaint::before,
  .wrong::before {
    content: '▲ ';
  }
  .check {
    display: inline-flex;
    align-items: center;
    gap: 6px;
    min-height: 28px;
    margin-top: 1.15rem;
  }
  .check input {
    width: 18px;
    height: 18px;
    min-height: 0;
    accent-color: var(--ink);
  }
  button {
    min-height: 28px;
  }
  .main {
    border-color: var(--ink);
    font-weight: 600;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.4rem 0.75rem;
    margin-top: 0.5rem;
  }
  progress {
    width: 8rem;
    accent-color: var(--choice);
  }
  .faint {
    color: var(--faint);
  }
  .stale-mark {
    font-style: italic;
  }
  .stale-mark::before {
    content: '▲ ';
  }
  .stale .picture svg {
    opacity: 0.6;
  }
  .picture {
    position: relative;
    width: fit-content;
    max-width: 100%;
    margin-top: 0.4rem;
  }
  .picture svg {
    display: block;
    max-width: 100%;
  }
  .surface {
    position: absolute;
    inset: 0;
    cursor: crosshair;
    touch-action: pan-y pinch-zoom;
  }
  .surface:focus-visible {
    outline-offset: -2px;
  }
  .reading {
    min-height: 1.4rem;
    line-height: 1.4rem;
    overflow-wrap: anywhere;
  }
  .reading b {
    font-weight: 600;
  }
  ol.key {
    list-style: none;
    margin: 0.3rem 0;
    padding: 0;
  }
  ol.key li {
    display: grid;
    grid-template-columns: 36px 1.1rem minmax(0, 1fr) auto;
    gap: 0.5rem;
    align-items: center;
    max-width: 44rem;
    padding: 1px 0;
    overflow-wrap: anywhere;
  }
  details {
    margin-top: 0.5rem;
  }
  summary {
    cursor: pointer;
    min-height: 24px;
  }
  .scroll {
    overflow: auto;
    max-height: 24rem;
    max-width: 100%;
    border-block: 1px solid var(--ink);
  }
  table {
    border-collapse: collapse;
  }
  th,
  td {
    text-align: end;
    font-weight: 400;
    padding: 2px 12px;
    vertical-align: bottom;
    white-space: nowrap;
  }
  thead th {
    position: sticky;
    inset-block-start: 0;
    background: var(--ground);
    font-weight: 600;
    max-width: 14rem;
    white-space: normal;
  }
`;

export const styles = css`
  ul.figures {
    display: flex;
    flex-wrap: wrap;
    gap: 4px 6px;
    list-style: none;
    margin: 0;
    padding: 0;
  }
  .figures button {
    font-size: 0.8125rem;
    text-align: start;
  }
  .figures button::after {
    content: ' ✕';
  }
  hm-film {
    border-top: 1px solid var(--line);
    margin-top: 1rem;
  }
`;
