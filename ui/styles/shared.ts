/** What several elements look alike in: controls, tables, focus. */
import { css } from 'lit';

export const controls = css`
  :host([hidden]) {
    display: none;
  }
  *,
  *::before,
  *::after {
    box-sizing: border-box;
  }
  button,
  select,
  input {
    font: inherit;
    color: inherit;
  }
  button,
  select {
    min-height: 28px;
    padding: 2px 10px;
    border: 1px solid var(--rule-strong);
    border-radius: 3px;
    background: var(--sheet);
    cursor: pointer;
  }
  button:hover:not(:disabled) {
    border-color: var(--accent);
  }
  button:disabled {
    opacity: 0.45;
    cursor: default;
  }
  button.plain {
    border-color: transparent;
    background: none;
    padding: 2px 6px;
  }
  button.main {
    background: var(--accent);
    border-color: var(--accent);
    color: var(--on-accent);
  }
  button[aria-pressed='true'] {
    background: var(--accent-soft);
    border-color: var(--accent);
  }
  input {
    min-height: 28px;
    padding: 2px 6px;
    border: 1px solid var(--rule-strong);
    border-radius: 3px;
    background: var(--sheet);
  }
  input[aria-invalid='true'] {
    border-color: var(--bad);
    outline: 1px solid var(--bad);
  }
  input[type='checkbox'] {
    min-height: 0;
  }
  :focus-visible {
    outline: 2px solid var(--accent);
    outline-offset: 1px;
  }
  h2,
  h3 {
    margin: 0;
    font-size: 13px;
    font-weight: 600;
  }
  .hidden-text {
    position: absolute;
    width: 1px;
    height: 1px;
    overflow: hidden;
    clip-path: inset(50%);
    white-space: nowrap;
  }
`;

export const tables = css`
  table {
    border-collapse: collapse;
    font-size: 13px;
  }
  th,
  td {
    padding: 2px 10px;
    text-align: right;
    border-bottom: 1px solid var(--rule);
    white-space: nowrap;
  }
  th {
    font-weight: 600;
    color: var(--ink-2);
  }
  th:first-child,
  td:first-child {
    text-align: left;
  }
`;
