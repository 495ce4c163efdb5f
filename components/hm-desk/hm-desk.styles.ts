import { css } from 'lit';

export const styles = css`
  [role='tablist'] {
    display: flex;
    flex-wrap: wrap;
    gap: 0 0.25rem;
    border-bottom: 1px solid var(--ink);
    margin-bottom: 0.5rem;
  }
  [role='tab'] {
    border: 1px solid transparent;
    border-bottom: 0;
    border-radius: 0;
    background: none;
    min-height: 32px;
    padding: 4px 12px;
    margin-bottom: -1px;
    font-size: 0.9375rem;
    color: var(--faint);
  }
  [role='tab'][aria-selected='true'] {
    color: var(--ink);
    font-weight: 600;
    border-color: var(--ink);
    background: var(--ground);
    box-shadow: inset 0 3px 0 var(--choice);
  }
  .remark {
    display: inline-block;
    max-width: 16rem;
    overflow: hidden;
    white-space: nowrap;
    text-overflow: ellipsis;
    vertical-align: bottom;
    font-weight: 400;
    font-size: 0.8125rem;
  }
  .remark.trouble {
    color: var(--trouble);
  }
  .remark.trouble::before {
    content: '▲ ';
  }
  [role='tabpanel'][hidden] {
    display: none;
  }
  p {
    margin: 0.2rem 0;
  }
  @media (forced-colors: active) {
    [role='tab'][aria-selected='true'] {
      outline: 2px solid Highlight;
      outline-offset: -3px;
    }
  }
`;
