import { css } from 'lit';

export const styles = css`
  .ask,
  .state {
    min-height: 28px;
  }
  .state {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.4rem 0.75rem;
  }
  .stale .scroll {
    opacity: 0.65;
  }
  .scroll {
    max-height: 34rem;
  }
  table {
    /* Collapsed borders stay behind when the headings are held in view. */
    border-collapse: separate;
    border-spacing: 0;
    width: 100%;
  }
  th,
  td {
    white-space: normal;
  }
  thead th {
    z-index: 2;
    box-shadow: inset 0 -1px 0 var(--line);
    padding-block: 4px;
  }
  thead button {
    padding: 2px 0;
  }
  tbody tr:not(.rivals):not(:first-child) > * {
    border-top: 1px solid var(--line);
  }
  tbody th {
    min-width: 4.5rem;
    overflow-wrap: anywhere;
    font-weight: 600;
  }
  tbody th button {
    display: block;
    white-space: nowrap;
    overflow-wrap: normal;
    margin-block-start: 4px;
    padding-inline: 4px;
  }
  thead th:first-child {
    z-index: 3;
  }
  tr.present > th {
    box-shadow: inset 3px 0 0 var(--choice);
  }
  .note {
    display: block;
  }
  .at {
    white-space: normal;
    min-width: 8rem;
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
    .at {
      min-width: 5.5rem;
    }
    .rivals ul {
      width: calc(100vw - 4.5rem);
    }
  }
`;
