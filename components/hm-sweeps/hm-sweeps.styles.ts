import { css } from 'lit';

/** What sweeps, film and map share beyond every panel: a picture that is read by a cursor. */
export const plotLook = css`
  .ask {
    --field-width: 7.5rem;
  }
  .ask + .ask {
    margin-top: 0.4rem;
  }
  .ask .short {
    --field-width: 4rem;
  }
  .wrong {
    font-size: 0.8125rem;
    max-width: 40rem;
  }
  .row {
    margin-top: 0.5rem;
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
