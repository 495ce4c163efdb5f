import { css } from 'lit';

export const styles = css`
  .tools {
    display: flex;
    flex-wrap: wrap;
    gap: 4px 18px;
    margin-bottom: 4px;
    font-size: 0.8125rem;
  }
  .set {
    display: inline-flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 3px;
  }
  .of {
    color: var(--faint);
    margin-inline-end: 2px;
  }
  .left-out {
    color: var(--faint);
  }
  .beside {
    display: grid;
    grid-template-columns: minmax(0, 1fr) auto;
    align-items: start;
  }
  .picture {
    position: relative;
  }
  ::slotted([slot='rail']) {
    width: var(--hm-rail-width, 13rem);
    margin-inline-start: 8px;
  }
  .empty {
    min-height: 18rem;
  }
  @media (max-width: 48rem) {
    .beside {
      grid-template-columns: minmax(0, 1fr);
    }
    ::slotted([slot='rail']) {
      width: auto;
      margin-inline-start: 0;
    }
  }
  svg {
    display: block;
    width: 100%;
    overflow: hidden;
  }
  .surface {
    position: absolute;
    inset: 0;
    touch-action: pan-y pinch-zoom;
    cursor: crosshair;
  }
  .surface.held {
    cursor: grabbing;
  }
  .surface.on-figure {
    cursor: move;
  }
  .surface:focus-visible {
    outline-offset: -2px;
  }
  .reading {
    display: flex;
    flex-wrap: wrap;
    gap: 2px 14px;
    margin: 2px 0 0;
  }
  .symbol {
    color: var(--faint);
  }
  .part {
    white-space: nowrap;
  }
  .reading .where {
    font-weight: 600;
    white-space: normal;
    overflow-wrap: anywhere;
  }
  .hint {
    color: var(--faint);
    margin: 2px 0 0;
  }
  /* Room for the figures whether there are any or not: what lies below must not jump when the pointer comes and goes. */
  .hint,
  .reading {
    min-height: 1.4rem;
    line-height: 1.4rem;
    align-content: start;
  }
  @media (max-width: 90rem) {
    .hint,
    .reading {
      min-height: 2.8rem;
    }
  }
  @media (max-width: 48rem) {
    .hint,
    .reading {
      min-height: 5.6rem;
    }
  }
  @media (pointer: coarse) {
    .keys {
      display: none;
    }
  }
  .empty {
    display: grid;
    place-content: center;
    border: 1px dashed var(--edge);
    color: var(--faint);
    text-align: center;
    padding: 16px;
  }
  .notice {
    border-inline-start: 3px solid var(--trouble);
    padding-inline-start: 8px;
    margin: 0 0 6px;
  }
  .notice.late {
    border-color: var(--choice);
  }
  .data p {
    max-width: 70rem;
    margin: 8px 0;
  }
  .scroll {
    max-height: 22rem;
  }
  th,
  td {
    padding-inline: 10px;
    text-align: start;
  }
  .figure {
    text-align: end;
  }
  .unit {
    display: block;
    color: var(--faint);
    font-weight: 400;
  }
  .dimensions {
    border: 1px solid var(--line);
    margin: 6px 0;
    padding: 4px 10px 8px;
  }
  .dimensions legend {
    color: var(--faint);
    padding: 0 4px;
  }
  .dimensions ul {
    list-style: none;
    margin: 0 0 6px;
    padding: 0;
  }
  .dimensions li {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0 12px;
    min-height: 28px;
  }
  .dimensions label {
    display: inline-flex;
    gap: 6px;
    align-items: center;
    min-width: 9rem;
    min-height: 24px;
  }
  .meaning,
  .none {
    color: var(--faint);
    margin: 0;
  }
  .moves {
    margin-inline-start: auto;
  }
`;
