import { css } from 'lit';

export const styles = css`
  :host {
    min-height: 100dvh;
  }
  .page {
    max-width: 160rem;
    margin-inline: auto;
    padding: 0 clamp(0.5rem, 1.5vw, 1.75rem) 2rem;
  }
  hm-messages {
    margin-block: 0.4rem;
  }
  main {
    display: grid;
    grid-template-columns: minmax(0, 1fr) clamp(14rem, 19vw, 24rem);
    gap: 0.25rem 1rem;
    align-items: start;
  }
  .diagram,
  .under {
    grid-column: 1;
    min-width: 0;
  }
  .beside {
    grid-column: 2;
    min-width: 0;
  }
  .assumed {
    grid-column: 2;
    min-width: 0;
    margin-top: 0.25rem;
  }
  .variables,
  .figures {
    grid-column: 1 / -1;
    min-width: 0;
    margin-top: 0.75rem;
  }
  .drop {
    position: fixed;
    inset: 0.75rem;
    z-index: 10;
    display: grid;
    place-content: center;
    margin: 0;
    font-size: 1.25rem;
    color: var(--ink);
    background: color-mix(in srgb, var(--ground) 88%, transparent);
    border: 3px dashed var(--choice);
    pointer-events: none;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    gap: 0.5rem;
  }
  @media (max-width: 900px) {
    main {
      grid-template-columns: minmax(0, 1fr);
    }
    .beside {
      grid-column: 1;
      grid-row: 3;
    }
    .under {
      grid-row: 2;
    }
    .assumed {
      grid-column: 1;
      grid-row: 4;
    }
  }
  @media print {
    header,
    hm-messages {
      display: none;
    }
  }
  .frame {
    margin: 0 0 0.25rem;
    padding-left: 0.5rem;
    border-left: 3px solid var(--hm-choice, #b47a00);
  }
`;
