import { css } from 'lit';

export const styles = css`
  :host {
    display: contents;
  }
  .bar {
    display: flex;
    flex-wrap: wrap;
    gap: 0.4rem;
    margin-bottom: 0.6rem;
  }
  .button {
    position: relative;
    display: inline-flex;
    align-items: center;
    border: 1px solid var(--edge);
    border-radius: 2px;
    padding: 2px 6px;
    cursor: pointer;
  }
  .button:hover {
    background: var(--wash);
  }
  .button:focus-within {
    outline: 2px solid var(--choice);
    outline-offset: 1px;
  }
  .button input {
    position: absolute;
    inset: 0;
    opacity: 0;
    cursor: pointer;
  }
  ul {
    list-style: none;
    margin: 0;
    padding: 0;
  }
  li {
    display: grid;
    grid-template-columns: minmax(10rem, 1fr) auto auto;
    align-items: center;
    gap: 0.25rem 0.75rem;
    padding: 0.35rem 0;
    border-top: 1px solid var(--line);
    --field-width: 100%;
  }
  .open {
    box-shadow: inset 3px 0 0 var(--choice);
    padding-inline-start: 0.5rem;
  }
  hm-field,
  .name {
    min-width: 0;
    overflow-wrap: anywhere;
  }
  hm-field {
    display: block;
  }
  .when {
    color: var(--faint);
    font-size: 0.8125rem;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    gap: 0.3rem;
  }
  .sure {
    border-color: var(--trouble);
    color: var(--trouble);
    font-weight: 600;
  }
  h3 {
    font-size: 0.9375rem;
    margin: 1rem 0 0.25rem;
  }
  p {
    margin: 0 0 0.4rem;
  }
  .remark:empty {
    margin: 0;
  }
  @media (max-width: 640px) {
    li {
      grid-template-columns: 1fr;
    }
  }
`;
