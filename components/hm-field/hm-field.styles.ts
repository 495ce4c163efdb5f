import { css } from 'lit';

export const styles = css`
  :host {
    display: inline-block;
    background: none;
    max-width: 100%;
  }
  label {
    display: block;
    color: var(--faint);
    font-size: 0.8125rem;
    margin-bottom: 1px;
  }
  :host([label-hidden]) label {
    position: absolute;
    width: 1px;
    height: 1px;
    overflow: hidden;
    clip-path: inset(50%);
  }
  input,
  textarea {
    font: inherit;
    color: inherit;
    background: var(--ground);
    border: 1px solid var(--edge);
    border-radius: 2px;
    padding: 2px 6px;
    width: var(--field-width, 9rem);
    max-width: 100%;
    min-height: 28px;
  }
  textarea {
    min-height: 5.5rem;
  }
  [aria-invalid] {
    border: 2px solid var(--trouble);
  }
  .complaint {
    display: block;
    color: var(--trouble);
    font-size: 0.8125rem;
    /* Takes no width from its row: what stands beside the field keeps its place, and the sentence runs on under it. */
    width: var(--complaint-width, 15rem);
    max-width: 88vw;
    margin-inline-end: -88vw;
    position: relative;
    z-index: 1;
    background: var(--ground);
  }
  .complaint::before {
    content: '▲ ';
  }
  @media (max-width: 40rem) {
    .complaint {
      width: 0;
      min-width: 100%;
      margin: 0;
    }
  }
`;
