import { css } from 'lit';

export const styles = css`
  .ask {
    --field-width: 6rem;
  }
  .state.stale,
  .stale-mark {
    font-style: italic;
    color: var(--faint);
  }
  .less {
    color: var(--trouble);
  }
  .less::before {
    content: '▲ ';
  }
  .pictures {
    display: flex;
    flex-wrap: wrap;
    gap: 0.25rem 1.5rem;
  }
  .pictures > * {
    min-width: 0;
  }
  fieldset {
    border: 1px solid var(--line);
    margin: 0.4rem 0;
    display: flex;
    flex-wrap: wrap;
    gap: 0.1rem 1rem;
    max-height: 14rem;
    overflow: auto;
  }
  fieldset label {
    display: inline-flex;
    align-items: center;
    gap: 0.35rem;
    min-height: 24px;
  }
  .figures {
    list-style: none;
    display: inline-flex;
    flex-wrap: wrap;
    gap: 0.25rem;
    margin: 0;
    padding: 0;
  }
  .add {
    max-width: 16rem;
  }
  .inputs {
    --field-width: 7rem;
  }
  .inputs th {
    max-width: 12rem;
    min-width: 6rem;
    text-align: start;
  }
  @media (max-width: 40rem) {
    .inputs {
      --field-width: 4.5rem;
    }
    .inputs th,
    .inputs td {
      padding-inline: 6px;
    }
    /* Room for the sentence under the field, which has no more width than it. */
    .inputs .refused {
      --field-width: 11rem;
    }
    .inputs td:nth-child(3) {
      white-space: normal;
      min-width: 6rem;
    }
  }
  .inputs tbody th,
  .inputs tbody td {
    vertical-align: top;
    line-height: 1.3;
    padding-block: 7px 3px;
  }
  .inputs select,
  .inputs button,
  .inputs hm-field {
    margin-block-start: -5px;
    vertical-align: top;
  }
  .inputs button {
    color: var(--ink);
  }
  .inputs thead th {
    /* Above a complaint that runs out of its cell. */
    z-index: 2;
  }
  .inputs hm-field {
    white-space: normal;
    --complaint-width: 24rem;
  }
  pre {
    margin: 0;
    padding: 0.3rem 0;
    font-size: 0.8125rem;
  }
  th:first-child,
  .words {
    text-align: start;
  }
  tbody th {
    max-width: 22rem;
    white-space: normal;
    min-width: 9rem;
  }
`;
