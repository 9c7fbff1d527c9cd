import { css, html, LitElement, nothing, type TemplateResult } from 'lit';

import { valueAtTime } from '../../charts/decimate.ts';
import { StoreController } from '../../controllers/store-controller.ts';
import type { Display } from '../../format/units.ts';
import type { Playhead } from '../../store/playhead.ts';

/** A value that is read off at the playhead. */
export interface ReadOff {
  readonly label: string;
  readonly time: ArrayLike<number>;
  readonly value: ArrayLike<number>;
  readonly display: Display;
  readonly color?: string | undefined;
}

/** Values at the playhead, beside a chart's title. Draws nothing but itself when the playhead moves. */
export class BwReadout extends LitElement {
  static override styles = css`
    :host {
      display: flex;
      flex-wrap: wrap;
      justify-content: flex-end;
      gap: 0 12px;
      font-size: 12px;
      color: var(--ink-2);
    }
    b {
      font-weight: 600;
      color: var(--ink);
    }
    [style] b {
      color: inherit;
    }
  `;
  static override properties = { values: { attribute: false }, playhead: { attribute: false } };
  declare values: readonly ReadOff[];
  declare playhead: Playhead | undefined;
  readonly follow = new StoreController(this, () => this.playhead);

  constructor() {
    super();
    this.values = [];
  }

  protected override render(): TemplateResult {
    const t = this.playhead?.time ?? 0;
    return html`${this.values.map(
      ({ label, time, value, display, color }) =>
        html`<span style=${color === undefined ? nothing : `color:${color}`}
          >${label} <b>${display.text(valueAtTime(time, value, t), 3)}</b></span
        >`,
    )}`;
  }
}

customElements.define('bw-readout', BwReadout);
declare global {
  interface HTMLElementTagNameMap {
    'bw-readout': BwReadout;
  }
}
