import { css } from 'lit';

export const styles = css`
  :host {
    display: block;
    position: relative;
  }
  header {
    display: flex;
    align-items: center;
    gap: 10px;
    min-height: 24px;
    padding-left: var(--plot-left);
    padding-right: var(--plot-right);
  }
  h3 {
    font-weight: 500;
    white-space: nowrap;
    overflow: hidden;
    text-overflow: ellipsis;
  }
  @media (max-width: 720px) {
    header {
      flex-wrap: wrap;
      gap: 0 8px;
      padding-left: 8px;
    }
  }
  .space {
    flex: 1;
  }
  .picture,
  .plot {
    position: relative;
  }
  .sketch {
    position: absolute;
    inset: 0;
  }
  /* The few rules that a still chart needs of plotly's sheet, which stays outside this root. */
  .plot .main-svg {
    position: absolute;
    top: 0;
    left: 0;
    pointer-events: none;
    background: none !important;
  }
  .plot .svg-container {
    position: relative;
  }
  details {
    position: relative;
  }
  summary {
    list-style: none;
    cursor: pointer;
    min-width: 24px;
    min-height: 24px;
    text-align: center;
    color: var(--ink-2);
    border-radius: 3px;
  }
  summary::-webkit-details-marker {
    display: none;
  }
  .menu {
    position: absolute;
    right: 0;
    z-index: 5;
    display: flex;
    flex-direction: column;
    align-items: stretch;
    padding: 4px;
    background: var(--sheet);
    border: 1px solid var(--rule-strong);
    border-radius: 3px;
  }
  .menu button {
    text-align: left;
    white-space: nowrap;
  }
  .table {
    max-height: 260px;
    overflow: auto;
    margin: 4px var(--plot-right) 8px var(--plot-left);
    border: 1px solid var(--rule);
    background: var(--sheet);
  }
  thead th {
    position: sticky;
    top: 0;
    background: var(--sheet);
  }
`;
