import { css } from 'lit';

export const styles = css`
  ul {
    margin: 0;
    padding-inline-start: 1.1rem;
  }
  .list {
    list-style: none;
    padding: 0;
    border-top: 1px solid var(--ink);
  }
  .list > li {
    display: flex;
    flex-wrap: wrap;
    align-items: center;
    gap: 0.3rem 1rem;
    padding: 0.3rem 0.4rem;
    border-bottom: 1px solid var(--line);
    --field-width: clamp(11rem, 28vw, 26rem);
  }
  .list > li.open {
    box-shadow: inset 3px 0 0 var(--choice);
    background: var(--wash);
  }
  .here {
    font-weight: 600;
    min-width: 7.5rem;
  }
  .to {
    min-width: 7.5rem;
  }
  .list label {
    display: inline-flex;
    align-items: center;
    gap: 0.35rem;
    min-height: 28px;
  }
  .new {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-end;
    gap: 0.4rem 0.75rem;
    --field-width: 11rem;
    margin-top: 0.5rem;
  }
  .ends,
  .end {
    display: flex;
    flex-wrap: wrap;
    align-items: flex-end;
    gap: 0.4rem 0.6rem;
  }
  .ends {
    gap: 0.4rem 1.5rem;
  }
  .end select {
    max-width: min(20rem, 84vw);
    text-overflow: ellipsis;
  }
  .log li {
    overflow-wrap: anywhere;
  }
`;
