import { css } from 'lit';

export const styles = css`
  :host {
    display: block;
  }
  .room {
    display: grid;
    grid-template-columns: 266px minmax(0, 1fr);
    gap: 0 8px;
    padding: 0 16px 0 8px;
  }
  aside {
    position: sticky;
    top: 8px;
    align-self: start;
  }
  .sentence {
    margin: 10px 0 6px;
    font-size: 17px;
    line-height: 1.35;
    min-height: 2.7em;
    padding-left: 8px;
    padding-right: var(--plot-right);
  }
  .sentence.stale {
    opacity: 0.6;
  }
  .state {
    min-height: 22px;
    font-size: 12.5px;
    color: var(--ink-2);
    padding-left: 8px;
    display: flex;
    gap: 10px;
    align-items: center;
  }
  .work {
    display: flex;
    gap: 10px;
    align-items: center;
    animation: appear 0s 0.5s both;
  }
  @keyframes appear {
    from {
      visibility: hidden;
    }
    to {
      visibility: visible;
    }
  }
  progress {
    width: 160px;
  }
  .issues {
    margin: 8px 0;
    padding: 8px 12px;
    background: var(--bad-soft);
    border-left: 3px solid var(--bad);
  }
  .issues ul {
    margin: 4px 0 0;
    padding-left: 18px;
  }
  .stack {
    position: relative;
    touch-action: pan-y;
    cursor: crosshair;
  }
  .stack bw-chart {
    border-top: 1px solid var(--rule);
  }
  .head {
    position: absolute;
    z-index: 3;
    top: 0;
    bottom: 0;
    left: var(--plot-left);
    width: 0;
    border-left: 2px solid var(--accent);
    pointer-events: none;
    will-change: transform;
  }
  .scale {
    display: flex;
    align-items: center;
    gap: 6px;
    font-size: 12px;
    color: var(--ink-2);
    white-space: nowrap;
  }
  .scale .bar {
    width: 110px;
    height: 9px;
  }
  bw-step-editor {
    display: block;
    position: relative;
    z-index: 4;
    background: var(--paper);
  }
  .lanes-head,
  .below {
    padding-left: 8px;
  }
  .lanes-head {
    display: flex;
    flex-wrap: wrap;
    gap: 4px 14px;
    align-items: center;
    padding-top: 8px;
    cursor: default;
  }
  .legend {
    color: var(--ink-2);
    font-size: 12px;
  }
  .below {
    padding-bottom: 16px;
  }
  .below h2 {
    margin: 14px 0 4px;
  }
  .desk {
    position: sticky;
    bottom: 0;
    z-index: 10;
    grid-column: 1 / -1;
    margin: 0 -16px 0 -8px;
    padding: 6px 16px 8px 8px;
    background: var(--paper);
    border-top: 1px solid var(--rule-strong);
    display: grid;
    grid-template-columns: 266px minmax(0, 1fr);
    gap: 4px 8px;
  }
  .controls {
    grid-column: 1 / -1;
    display: flex;
    flex-wrap: wrap;
    gap: 6px 12px;
    align-items: center;
  }
  .space {
    flex: 1;
  }
  .scenario {
    max-width: 100%;
    width: 258px;
  }
  .axis {
    position: relative;
    grid-column: 2;
  }
  .desk-side {
    grid-column: 1;
    font-size: 12.5px;
    display: grid;
    gap: 6px;
    align-content: start;
    padding-right: 8px;
  }
  .ruler {
    position: relative;
    height: 30px;
    margin-left: var(--plot-left);
    margin-right: var(--plot-right);
    border-bottom: 1px solid var(--rule-strong);
    font-size: 11px;
    color: var(--ink-2);
    cursor: crosshair;
    touch-action: none;
  }
  .tick {
    position: absolute;
    bottom: 0;
    height: 6px;
    border-left: 1px solid var(--rule-strong);
  }
  .tick span {
    position: absolute;
    bottom: 6px;
    transform: translateX(-50%);
    white-space: nowrap;
  }
  .tick.first span {
    transform: none;
  }
  .tick.last span {
    transform: translateX(-100%);
  }
  .marks {
    position: relative;
    height: 14px;
    margin-left: var(--plot-left);
    margin-right: var(--plot-right);
    font-size: 10px;
    line-height: 14px;
    color: var(--ink-2);
  }
  .mark {
    position: absolute;
    transform: translateX(-50%);
  }
  .mark.bad {
    color: var(--bad);
  }
  .up {
    position: relative;
  }
  .up > summary {
    list-style: none;
    cursor: pointer;
    padding: 4px 10px;
    border: 1px solid var(--rule-strong);
    border-radius: 3px;
    background: var(--sheet);
    white-space: nowrap;
  }
  .up > summary::-webkit-details-marker {
    display: none;
  }
  .up > .menu {
    position: absolute;
    bottom: calc(100% + 4px);
    right: 0;
    z-index: 20;
    max-height: min(60vh, 520px);
    overflow: auto;
    padding: 8px;
    background: var(--sheet);
    border: 1px solid var(--rule-strong);
    border-radius: 3px;
    display: grid;
    gap: 2px;
  }
  .menu.two {
    grid-template-columns: auto auto;
    gap: 0 16px;
  }
  .menu button {
    display: block;
    width: 100%;
    text-align: left;
    white-space: nowrap;
  }
  .menu label {
    display: flex;
    justify-content: space-between;
    gap: 10px;
    align-items: center;
  }
  .events td {
    text-align: left;
    white-space: normal;
  }
  .events button {
    padding: 0 4px;
    min-height: 24px;
  }
  @media (max-width: 900px) {
    .room,
    .desk {
      grid-template-columns: minmax(0, 1fr);
    }
    aside {
      position: static;
      order: 2;
      grid-column: 1;
    }
    .axis,
    .desk-side {
      grid-column: 1;
    }
    .sentence {
      font-size: 15px;
    }
    .room {
      padding: 0 6px;
    }
    .desk {
      order: 3;
      margin: 0 -6px;
      padding: 6px;
    }
    .desk.is-long {
      position: static;
    }
    .desk-side,
    .zoom {
      display: none;
    }
    .scenario {
      width: 100%;
    }
    .controls > label {
      flex-basis: 100%;
    }
    .controls {
      gap: 4px 6px;
    }
    .up > .menu {
      position: fixed;
      left: 8px;
      right: 8px;
      bottom: 80px;
    }
    .menu.two {
      grid-template-columns: 1fr;
    }
  }
`;
