/** Signs of buttons, drawn: fonts differ in what they have, and some draw a sign as a picture. */
import { html, svg, type TemplateResult } from 'lit';

const icon = (path: string, filled = false): TemplateResult =>
  html`<svg viewBox="0 0 16 16" width="14" height="14" aria-hidden="true" focusable="false" style="vertical-align:-2px">
    ${svg`<path d=${path} fill=${filled ? 'currentColor' : 'none'} stroke="currentColor" stroke-width="1.7" stroke-linecap="round" stroke-linejoin="round" />`}
  </svg>`;

export const PLAY = icon('M4 2.5 V13.5 L13 8 Z', true);
export const PAUSE = icon('M4.5 3 V13 M11.5 3 V13');
export const STEP_BACK = icon('M10.5 3 L5 8 L10.5 13');
export const STEP_ON = icon('M5.5 3 L11 8 L5.5 13');
export const UNDO = icon('M6 3 L2.5 6.5 L6 10 M3 6.5 H9.5 A4 4 0 0 1 9.5 13.5 H7');
export const REDO = icon('M10 3 L13.5 6.5 L10 10 M13 6.5 H6.5 A4 4 0 0 0 6.5 13.5 H9');
export const CLOSE = icon('M4 4 L12 12 M12 4 L4 12');
export const MORE = icon('M3 8 H3.01 M8 8 H8.01 M13 8 H13.01');
export const PLUS = icon('M8 3 V13 M3 8 H13');
export const MINUS = icon('M3 8 H13');
