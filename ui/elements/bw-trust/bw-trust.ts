import { css, html, LitElement, nothing, type TemplateResult } from 'lit';

import { formatNumber, formatTime } from '../../format/numbers.ts';
import type { RunState, Study } from '../../store/shown.ts';
import type { StudyState } from '../../store/session.ts';
import { controls, tables } from '../../styles/shared.ts';
import { closeOnEscape, closeOnPressBeside } from '../menus.ts';
import { SIGN } from '../signs.ts';

/** How far the run on the screen can be believed: a mark, and each part of it in a sentence. @fires bw-study @fires bw-study-stop */
export class BwTrust extends LitElement {
  static override styles = [
    controls,
    tables,
    css`
      :host {
        display: block;
        position: relative;
      }
      summary {
        list-style: none;
        cursor: pointer;
        padding: 4px 10px;
        border: 1px solid var(--rule-strong);
        border-radius: 3px;
        white-space: nowrap;
      }
      summary::-webkit-details-marker {
        display: none;
      }
      summary.bad {
        border-color: var(--bad);
        color: var(--bad);
      }
      .sheet {
        position: absolute;
        right: 0;
        z-index: 20;
        width: min(560px, calc(100vw - 24px));
        max-height: 80vh;
        overflow: auto;
        margin-top: 4px;
        padding: 12px 16px;
        background: var(--sheet);
        border: 1px solid var(--rule-strong);
      }
      h3 {
        margin-top: 10px;
      }
      h3:first-child {
        margin-top: 0;
      }
      p {
        margin: 2px 0 4px;
      }
      ul {
        margin: 2px 0;
        padding-left: 18px;
      }
      progress {
        width: 140px;
        vertical-align: middle;
      }
      .scroll {
        overflow-x: auto;
      }
      @media (max-width: 720px) {
        .sheet {
          position: fixed;
          left: 12px;
          right: 12px;
        }
      }
    `,
  ];
  static override properties = { run: { attribute: false }, studies: { attribute: false } };
  declare run: RunState | undefined;
  declare studies: Readonly<Partial<Record<Study, StudyState>>>;

  constructor() {
    super();
    this.studies = {};
  }

  protected override render(): TemplateResult {
    const packet = this.run?.packet;
    if (packet === undefined) return html`<details><summary>not computed yet</summary></details>`;
    const { closure, warnings, outcome } = packet.document;
    const isDraft = packet.quality === 'draft' || this.run?.isStale === true;
    const cautions = warnings.filter((w) => w.time !== null).length;
    const isBad = !closure.ok || outcome.kind === 'failed';
    const words = outcome.kind === 'failed' ? 'stopped early' : closure.ok ? 'balance closes' : 'balance open';
    return html`<details @keydown=${closeOnEscape} @toggle=${closeOnPressBeside}>
      <summary class=${isBad ? 'bad' : ''}>
        ${isBad ? SIGN.beyond : SIGN.kept}${words}${cautions > 0 ? html` · ${cautions} ${cautions === 1 ? 'caution' : 'cautions'}` : nothing}${isDraft ? html` · draft` : nothing}
      </summary>
      <div class="sheet">
        <h3>Balance</h3>
        <p>
          ${
            closure.worst === null
              ? 'The balance could not be formed.'
              : `What came in less what went out agrees with what is held to ${formatNumber(closure.worst, 2)} of the amount at worst; aimed at ${formatNumber(closure.target, 2)}, called open beyond ${formatNumber(closure.limit, 2)}.`
          }
          It proves the book-keeping, not the correlations.
        </p>
        ${outcome.failure === null ? nothing : html`<p><strong>${outcome.failure.text}</strong> What was computed before is kept.</p>`}
        <h3>Ranges and other cautions</h3>
        ${
          warnings.length === 0
            ? html`<p>Every correlation stayed within its published range.</p>`
            : html`<ul>
                ${warnings.map((w) => html`<li>${w.time === null ? '' : `from ${formatTime(w.time)} after the start: `}${w.text}</li>`)}
              </ul>`
        }
        <h3>Twice the segments</h3>
        <p>How much the cutting of the bed into segments decides: the same run on twice as many.</p>
        ${this.#renderStudy('convergence')}
        <h3>Second opinion</h3>
        <p>
          The same equations by an independent integrator. It proves the integration, not the physics, and takes long.
        </p>
        ${this.#renderStudy('second-opinion')}
        <p>${packet.document.summary.caution}</p>
      </div>
    </details>`;
  }

  #renderStudy(study: Study): TemplateResult {
    const state = this.studies[study];
    const ask = (): void => {
      this.dispatchEvent(new CustomEvent('bw-study', { detail: { study } }));
    };
    if (state?.progress !== undefined) {
      return html`<p>
        <progress max="1" value=${state.progress} aria-label="Progress"></progress> ${Math.round(100 * state.progress)}
        %
        <button @click=${() => this.dispatchEvent(new CustomEvent('bw-study-stop'))}>Stop</button>
      </p>`;
    }
    if (state?.answer === undefined) {
      return html`<p>
        ${state?.trouble === undefined ? nothing : html`${state.trouble} `}<button @click=${ask}>Compute</button>
      </p>`;
    }
    const { answer } = state;
    if (answer.study === 'second-opinion') {
      const { agreesWithin, worstSignal, note, method } = answer.block;
      return html`<p>
        ${agreesWithin === null ? note : `Agrees within ${formatNumber(100 * agreesWithin, 2)} % of each signal's span (worst: ${worstSignal ?? ''}); ${method}.`}
      </p>`;
    }
    return html`<div class="scroll">
      <table>
        <thead>
          <tr>
            <th>figure</th>
            <th>${answer.block.segments[0]} segments</th>
            <th>${answer.block.segments[1]}</th>
            <th>difference</th>
          </tr>
        </thead>
        <tbody>
          ${answer.block.headline.map(
            ({ id, unit, valueN, value2N, difference }) =>
              html`<tr>
                <td>${id} [${unit}]</td>
                <td>${valueN === null ? 'none' : formatNumber(valueN, 4)}</td>
                <td>${value2N === null ? 'none' : formatNumber(value2N, 4)}</td>
                <td>${difference === null ? '' : `${formatNumber(100 * difference, 2)} %`}</td>
              </tr>`,
          )}
        </tbody>
      </table>
    </div>`;
  }
}

customElements.define('bw-trust', BwTrust);
declare global {
  interface HTMLElementTagNameMap {
    'bw-trust': BwTrust;
  }
  interface HTMLElementEventMap {
    'bw-study': CustomEvent<{ study: Study }>;
    'bw-study-stop': CustomEvent;
  }
}
