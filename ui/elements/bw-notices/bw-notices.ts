import { css, html, LitElement, nothing, type TemplateResult } from 'lit';

import type { Notice } from '../../store/session.ts';
import { controls } from '../../styles/shared.ts';

/** What the person is told, until it is put away. @fires bw-dismiss */
export class BwNotices extends LitElement {
  static override styles = [
    controls,
    css`
      :host {
        display: block;
      }
      div {
        display: flex;
        gap: 12px;
        align-items: start;
        padding: 6px 16px;
        background: var(--accent-soft);
        border-bottom: 1px solid var(--rule);
      }
      .problem {
        background: var(--bad-soft);
      }
      p {
        margin: 0;
        flex: 1;
        padding-top: 4px;
      }
      ul {
        margin: 2px 0 4px;
        padding-left: 18px;
        max-height: 140px;
        overflow: auto;
      }
    `,
  ];
  static override properties = { notices: { attribute: false } };
  declare notices: readonly Notice[];

  constructor() {
    super();
    this.notices = [];
  }

  protected override render(): TemplateResult {
    return html`<section aria-live="polite" aria-label="Messages">
      ${this.notices.map(
        ({ id, tone, text, details }) =>
          html`<div class=${tone}>
            <p>
              ${tone === 'problem' ? html`<strong>Note: </strong>` : nothing}${text}
              ${
                details.length === 0
                  ? nothing
                  : html`<ul>
                      ${details.map((d) => html`<li>${d}</li>`)}
                    </ul>`
              }
            </p>
            <button @click=${() => this.dispatchEvent(new CustomEvent('bw-dismiss', { detail: { id } }))}>
              Put away
            </button>
          </div>`,
      )}
    </section>`;
  }
}

customElements.define('bw-notices', BwNotices);
declare global {
  interface HTMLElementTagNameMap {
    'bw-notices': BwNotices;
  }
  interface HTMLElementEventMap {
    'bw-dismiss': CustomEvent<{ id: number }>;
  }
}
