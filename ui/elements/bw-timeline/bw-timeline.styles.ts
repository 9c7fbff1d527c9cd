import { css } from 'lit';

export const styles = css`
  :host {
    display: block;
    position: relative;
    touch-action: pan-y;
  }
  .area {
    position: relative;
    margin-left: var(--plot-left);
    margin-right: var(--plot-right);
    overflow: clip;
  }
  .block {
    position: absolute;
    height: 24px;
    min-height: 24px;
    padding: 0 8px;
    border: 1px solid var(--action-edge);
    border-left-width: 3px;
    border-radius: 0 3px 3px 0;
    background: var(--action);
    color: var(--ink);
    font-size: 12px;
    line-height: 22px;
    text-align: left;
    white-space: nowrap;
    overflow: visible;
    cursor: grab;
    touch-action: none;
  }
  .block.upset {
    border-color: var(--upset-edge);
    background: var(--upset);
  }
  .block.instant {
    border-right-color: transparent;
    border-top-color: transparent;
    border-bottom-color: transparent;
  }
  .block.condition {
    border-style: dashed;
    cursor: pointer;
  }
  .block[aria-pressed='true'] {
    outline: 2px solid var(--accent);
    outline-offset: 1px;
  }
  .block .text {
    position: sticky;
    left: 0;
    pointer-events: none;
  }
  .handle {
    position: absolute;
    top: 0;
    right: -5px;
    width: 11px;
    height: 24px;
    cursor: ew-resize;
  }
  .handle::after {
    content: '';
    position: absolute;
    left: 4px;
    top: 5px;
    height: 14px;
    border-left: 2px solid currentColor;
    opacity: 0.5;
  }
  .waiting {
    padding-left: var(--plot-left);
    color: var(--ink-2);
    font-size: 12px;
    display: flex;
    flex-wrap: wrap;
    gap: 8px;
    align-items: center;
  }
  .waiting .block {
    position: static;
  }
  .empty {
    color: var(--ink-2);
    padding: 4px 0;
  }
`;
