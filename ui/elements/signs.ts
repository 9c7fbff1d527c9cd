/** Signs for what happens: told apart by shape, drawn like those in the charts. */
import { html, svg, type TemplateResult } from 'lit';

const sign = (path: string, isFilled: boolean): TemplateResult =>
  html`<svg
    viewBox="0 0 12 12"
    width="10"
    height="10"
    aria-hidden="true"
    focusable="false"
    style="vertical-align:-1px;margin-right:3px"
  >
    ${svg`<path d=${path} fill=${isFilled ? 'currentColor' : 'none'} stroke="currentColor" stroke-width="1.5" stroke-linejoin="round" stroke-linecap="round" />`}
  </svg>`;

const CIRCLE = 'M6 1.5 A4.5 4.5 0 1 1 5.99 1.5 Z';
const CROSS = 'M2 2 L10 10 M10 2 L2 10';
const TICK = 'M1.5 6.5 L4.5 9.5 L10.5 2.5';
const WAVES = 'M1 4 Q3.5 1.5 6 4 T11 4 M1 8.5 Q3.5 6 6 8.5 T11 8.5';

export const SIGN = {
  upset: sign('M1 2 H11 L6 11 Z', true),
  action: sign(CIRCLE, true),
  alarm: sign('M1 10.5 L6 1 L11 10.5 Z', true),
  cleared: sign('M1 10.5 L6 1 L11 10.5 Z', false),
  interlock: sign('M6 0.8 L11.2 6 L6 11.2 L0.8 6 Z', true),
  beyond: sign(CROSS, false),
  kept: sign(TICK, false),
  flooding: sign(WAVES, false),
  caution: sign('M6 1.5 V7.5 M6 10.3 V10.4', false),
  truth: sign(CIRCLE, false),
  shown: sign(CIRCLE, true),
} as const;

/** Sign of a kind of event. */
export const EVENT_SIGN: Readonly<Record<string, TemplateResult>> = {
  upset: SIGN.upset,
  action: SIGN.action,
  alarm: SIGN.alarm,
  'alarm-cleared': SIGN.cleared,
  interlock: SIGN.interlock,
  'limit-crossed': SIGN.beyond,
  'limit-kept-again': SIGN.kept,
  flooding: SIGN.flooding,
  'flooding-over': SIGN.kept,
  'carry-over': SIGN.flooding,
  'carry-over-over': SIGN.kept,
  'range-left': SIGN.caution,
  'interlock-refused': SIGN.beyond,
  'command-refused': SIGN.beyond,
};
