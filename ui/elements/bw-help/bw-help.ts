import { css, html, LitElement, type TemplateResult } from 'lit';

import { controls } from '../../styles/shared.ts';

const KEYS: readonly (readonly [string, string])[] = [
  ['← →', 'move the playhead by a step; with Shift ten steps'],
  ['Home, End', 'playhead to the start, to the end'],
  ['Space', 'play, stop'],
  ['+ −, 0', 'show less time, more time, all of it'],
  ['B', 'to the branch form'],
  ['Ctrl Z, Ctrl Shift Z', 'undo, redo'],
  ['Ctrl O, Ctrl S', 'open, save the case file'],
  ['1, 2', 'the rooms'],
  ['on a block: ← →', 'move by a second; Shift: ten; Alt: make it longer or shorter'],
  ['on a block: Enter, Delete', 'open its fields, remove it'],
  ['Esc', 'stop the calculation, close what is open'],
  ['?', 'this sheet'],
];

const WORDS: readonly (readonly [string, string])[] = [
  [
    'answer lane',
    'the limited quantity with its limits; what is beyond is shaded. Dashed: the average that a limit asks for.',
  ],
  ['bed map', 'depth of the packing against time, coloured by one quantity of each segment.'],
  [
    'lane',
    'one instrument: dotted what is so, full what it shows (lag, dead time, range end). Dashed lines are alarms, full lines are trips. An open circle: the true value passes; a full one: the shown value passes; a triangle: it annunciates or acts.',
  ],
  ['upset, action', 'an upset starts trouble; an action answers it.'],
  ['branch', 'the same run with another action from a moment on.'],
  ['draft', 'a quick run on few segments that stands in until the whole one is there.'],
  ['approach to flood', 'gas velocity over the velocity at which the bed floods.'],
  ['hold-up', 'liquid in the bed, as a share of its volume.'],
];

/** Keys and words, on a sheet over the page. */
export class BwHelp extends LitElement {
  static override styles = [
    controls,
    css`
      dialog {
        max-width: 720px;
        color: var(--ink);
        background: var(--sheet);
        border: 1px solid var(--rule-strong);
        padding: 16px 22px;
      }
      dialog::backdrop {
        background: rgb(0 0 0 / 35%);
      }
      dl {
        display: grid;
        grid-template-columns: auto 1fr;
        gap: 4px 16px;
        margin: 8px 0 14px;
      }
      dt {
        font-weight: 600;
      }
      dd {
        margin: 0;
      }
    `,
  ];

  /** Opens the sheet. */
  open(): void {
    this.renderRoot.querySelector('dialog')?.showModal();
  }

  protected override render(): TemplateResult {
    const list = (entries: typeof KEYS): TemplateResult =>
      html`<dl>
        ${entries.map(
          ([k, v]) =>
            html`<dt>${k}</dt>
              <dd>${v}</dd>`,
        )}
      </dl>`;
    return html`<dialog aria-labelledby="title">
      <h2 id="title">Keys</h2>
      ${list(KEYS)}
      <h2>Words</h2>
      ${list(WORDS)}
      <p>The results are an engineering estimate, not a certificate. Nothing leaves this machine.</p>
      <form method="dialog"><button class="main">Close</button></form>
    </dialog>`;
  }
}

customElements.define('bw-help', BwHelp);
declare global {
  interface HTMLElementTagNameMap {
    'bw-help': BwHelp;
  }
}
