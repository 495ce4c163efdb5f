import { css } from 'lit';

/** What the panels of the desk share: headings, the row that asks, what is running, what went wrong. Goes after `look`, before a panel's own rules. */
export const panelLook = css`
  p {
    margin: 0.2rem 0;
  }
  h3 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0.8rem 0 0.25rem;
  }
  button,
  select {
    min-height: 28px;
  }
  select {
    color: var(--ink);
    font-size: 0.875rem;
    max-width: min(100%, 23rem);
  }
  /* Choices before a run: label above its control. Heads in line: a complaint under one field must not push it up over its neighbours, which then could not be clicked. */
  .ask {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-start;
    gap: 0.4rem 0.75rem;
  }
  /* As low as the controls beside it, which have their labels above. */
  .ask > button {
    margin-top: 1.15rem;
  }
  .ask label:not(.check) {
    display: flex;
    flex-direction: column;
    gap: 1px;
    color: var(--faint);
    font-size: 0.8125rem;
    max-width: 100%;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.4rem 0.75rem;
  }
  /* The act that a panel is for. */
  .go {
    border-color: var(--ink);
    font-weight: 600;
  }
  .state,
  .doc,
  .faint {
    color: var(--faint);
  }
  .state {
    margin-top: 0.5rem;
  }
  p.outcome {
    font-size: 1rem;
    font-weight: 600;
    color: var(--ink);
  }
  .wrong {
    color: var(--trouble);
  }
  .wrong::before,
  .stale-mark::before {
    content: '▲ ';
  }
  .stale-mark,
  .outcome.stale {
    font-style: italic;
  }
  .picture {
    display: block;
    max-width: 100%;
  }
  .stale .picture {
    opacity: 0.7;
  }
`;

/** Words that say whether a limit is met; never by colour alone. */
export const verdictLook = css`
  .met::before {
    content: '✓ ';
  }
  .not-met {
    color: var(--trouble);
  }
  .not-met::before {
    content: '▲ ';
  }
`;
