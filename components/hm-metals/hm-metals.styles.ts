import { css } from 'lit';

export const styles = css`
  p {
    margin: 0.2rem 0;
  }
  h3 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0.8rem 0 0.3rem;
  }
  .ask,
  .state {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.4rem 0.75rem;
    min-height: 28px;
  }
  .ask label {
    color: var(--faint);
  }
  .ask select {
    color: var(--ink);
    max-width: min(100%, 20rem);
  }
  button,
  select {
    min-height: 28px;
  }
  .go {
    border-color: var(--ink);
    font-weight: 600;
  }
  .state,
  .faint {
    color: var(--faint);
  }
  progress {
    width: 8rem;
    accent-color: var(--choice);
  }
  .wrong {
    color: var(--trouble);
  }
  .wrong::before,
  .stale-mark::before {
    content: '▲ ';
  }
  .stale-mark {
    font-style: italic;
  }
  .stale .scroll {
    opacity: 0.65;
  }
  .scroll {
    /* Holds the words for those who hear the page, which are placed out of sight. */
    position: relative;
    overflow: auto;
    max-height: 34rem;
    max-width: 100%;
    border-block: 1px solid var(--ink);
  }
  table {
    border-collapse: separate;
    border-spacing: 0;
    width: 100%;
  }
  th,
  td {
    text-align: start;
    vertical-align: baseline;
    font-weight: 400;
    padding: 3px 10px;
  }
  thead th {
    position: sticky;
    inset-block-start: 0;
    z-index: 2;
    background: var(--ground);
    box-shadow: inset 0 -1px 0 var(--line);
    vertical-align: bottom;
    line-height: 1.2;
    padding-block: 4px;
    font-weight: 600;
  }
  thead button {
    border: 0;
    background: none;
    padding: 2px 0;
    text-align: inherit;
    font-weight: 600;
    line-height: 1.2;
  }
  .unit {
    display: block;
    font-weight: 400;
    color: var(--faint);
    white-space: nowrap;
  }
  .arrow {
    display: inline-block;
    width: 1em;
    text-align: center;
  }
  .figure {
    text-align: end;
    white-space: nowrap;
  }
  tbody tr:not(.rivals):not(:first-child) > * {
    border-top: 1px solid var(--line);
  }
  tbody th {
    min-width: 4.5rem;
    overflow-wrap: anywhere;
    font-weight: 600;
  }
  th:first-child {
    position: sticky;
    inset-inline-start: 0;
    background: var(--ground);
    z-index: 1;
  }
  thead th:first-child {
    z-index: 3;
  }
  tr.present > th {
    box-shadow: inset 3px 0 0 var(--choice);
  }
  .note {
    display: block;
    color: var(--faint);
    font-size: 0.8125em;
    font-weight: 400;
  }
  .at {
    white-space: normal;
    min-width: 8rem;
  }
  .met::before {
    content: '✓ ';
  }
  .not-met {
    color: var(--trouble);
  }
  .not-met::before {
    content: '▲ ';
  }
  .span {
    display: block;
    margin-block-start: 2px;
    overflow: visible;
  }
  .span .axis {
    stroke: var(--line);
  }
  .span .band {
    fill: var(--occupancy);
    opacity: 0.45;
  }
  .span .to-worst {
    stroke: var(--ink);
  }
  .span .nominal {
    stroke: var(--ink);
    stroke-width: 2;
  }
  .span .limit {
    stroke: var(--trouble);
    stroke-dasharray: 2 2;
  }
  .rivals td {
    padding: 0 10px 8px;
  }
  .rivals ul {
    list-style: none;
    margin: 0;
    padding: 0.3rem 0.6rem;
    border-inline-start: 3px solid var(--line);
    position: sticky;
    inset-inline-start: 10px;
    max-width: min(100%, 44rem);
    width: max-content;
  }
  .rivals li {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.2rem 0.75rem;
    padding: 2px 0;
  }
  .rivals .words {
    flex: 1 1 16rem;
    min-width: 0;
    overflow-wrap: anywhere;
  }
  .in-use {
    font-weight: 600;
  }
  @media (max-width: 40rem) {
    th,
    td {
      padding-inline: 6px;
    }
    th:first-child {
      width: 1%;
      max-width: 6.5rem;
    }
    .rivals ul {
      width: calc(100vw - 4.5rem);
    }
  }
`;
