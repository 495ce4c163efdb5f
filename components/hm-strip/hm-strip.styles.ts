import { css } from 'lit';

export const styles = css`
  :host {
    position: relative;
  }
  .lane {
    position: relative;
    height: 26px;
  }
  .lane button {
    position: absolute;
    top: 1px;
    width: 24px;
    height: 24px;
    padding: 0;
    margin-left: -12px;
    border: 0;
    background: none;
    line-height: 1;
    color: var(--faint);
  }
  .lane button:hover,
  .lane button.chosen {
    color: var(--ink);
    background: var(--wash);
  }
  .lane button.own {
    color: var(--ink);
    font-weight: 700;
  }
  .lane button.chosen {
    box-shadow: inset 0 -2px 0 var(--choice);
  }
  .lane button.wrong {
    color: var(--trouble);
  }
  .stack {
    position: relative;
  }
  .columns {
    display: grid;
    min-height: 92px;
    align-items: stretch;
    outline: none;
    touch-action: pan-y pinch-zoom;
  }
  .column {
    position: relative;
    overflow: hidden;
    border-block: 1px solid var(--ink);
    padding: 3px 5px 5px;
    min-width: 0;
    cursor: default;
    user-select: none;
  }
  .column.layer {
    border-inline-start: 1px solid var(--ink);
  }
  .column.layer.last {
    border-inline-end: 1px solid var(--ink);
  }
  .column.contact {
    border-block: 0;
    padding-block: 7px 6px;
    color: var(--faint);
    font-size: 0.8125rem;
  }
  .column.contact.top {
    grid-column: 2;
    text-align: end;
  }
  .column.slim {
    padding-inline: 0;
    text-align: center;
  }
  .column.contact.slim .lines {
    writing-mode: vertical-rl;
    max-height: 84px;
    margin-inline: auto;
  }
  .column.donor {
    border-top: 4px solid var(--conduction);
  }
  .column.acceptor {
    border-top: 4px double var(--valence);
  }
  .column.undoped {
    border-top: 4px dotted var(--edge);
  }
  .column:hover {
    background: var(--wash);
  }
  .column[aria-selected='true'] {
    background: color-mix(in srgb, var(--choice) 13%, var(--ground));
    color: var(--ink);
    box-shadow: inset 0 -4px 0 var(--choice);
  }
  .column:focus-visible {
    outline: 2px solid var(--choice);
    outline-offset: -3px;
  }
  .column.wrong {
    box-shadow: inset 0 0 0 2px var(--trouble);
  }
  .column.column.gone {
    padding: 0;
    border-width: 0;
    box-shadow: none;
  }
  .column.lifted {
    opacity: 0.5;
  }
  .name {
    font-weight: 600;
    overflow-wrap: anywhere;
  }
  .number {
    color: var(--faint);
    font-weight: 400;
    font-size: 0.8125rem;
  }
  .value {
    display: block;
    overflow-wrap: anywhere;
    border-radius: 2px;
  }
  .layer .value,
  .card .value {
    cursor: text;
  }
  .layer .value:hover,
  .card .value:hover {
    text-decoration: underline dotted;
    text-underline-offset: 3px;
  }
  .value.wrong {
    color: var(--trouble);
    text-decoration: underline wavy;
  }
  .edge {
    position: absolute;
    top: 0;
    bottom: 0;
    width: 13px;
    margin-left: -6px;
    cursor: ew-resize;
    touch-action: none;
    z-index: 2;
  }
  .edge::after {
    content: '';
    position: absolute;
    left: 4px;
    width: 5px;
    top: calc(50% - 10px);
    height: 20px;
    border-inline: 1px solid var(--edge);
    background: var(--ground);
    opacity: 0;
  }
  .edge:hover::after,
  .edge.held::after,
  .stack:hover .edge::after {
    opacity: 1;
  }
  .edge.held::after {
    border-color: var(--choice);
  }
  .landing {
    position: absolute;
    top: -4px;
    bottom: -4px;
    width: 4px;
    margin-left: -2px;
    background: var(--choice);
    z-index: 3;
    pointer-events: none;
  }
  .inplace {
    position: absolute;
    z-index: 4;
    --field-width: 8.5rem;
    background: var(--ground);
    border: 1px solid var(--ink);
    padding: 4px 6px;
    box-shadow: 0 2px 8px rgb(0 0 0 / 25%);
  }
  .leaders {
    display: block;
    width: 100%;
    height: 14px;
  }
  .cards {
    display: flex;
    align-items: stretch;
  }
  .card {
    flex: none;
    overflow: hidden;
    border-inline-start: 1px solid var(--edge);
    padding: 0 4px 2px 5px;
    font-size: 0.8125rem;
    cursor: default;
  }
  .card.chosen {
    background: color-mix(in srgb, var(--choice) 13%, var(--ground));
    box-shadow: inset 0 -3px 0 var(--choice);
  }
  .editor {
    border-top: 1px solid var(--line);
    margin-top: 10px;
    padding-top: 8px;
  }
  .editor header {
    display: flex;
    flex-wrap: wrap;
    align-items: baseline;
    gap: 4px 12px;
    margin-bottom: 6px;
  }
  h3 {
    font-size: 0.9375rem;
    font-weight: 600;
    margin: 0;
  }
  .hint {
    color: var(--faint);
    font-size: 0.8125rem;
    margin: 6px 0 0;
  }
  .acts {
    display: flex;
    flex-wrap: wrap;
    gap: 6px;
    margin-top: 12px;
  }
  .acts button {
    min-height: 28px;
  }
  kbd {
    font: inherit;
    border: 1px solid var(--line);
    border-radius: 2px;
    padding: 0 3px;
  }
  @media (pointer: coarse) {
    .edge {
      width: 24px;
      margin-left: -12px;
    }
    .edge::after {
      left: 9px;
      opacity: 1;
    }
  }
  @media (forced-colors: active) {
    .column[aria-selected='true'],
    .card.chosen {
      outline: 3px solid Highlight;
      outline-offset: -3px;
    }
    .landing {
      background: Highlight;
    }
  }
`;
