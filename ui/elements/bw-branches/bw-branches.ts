import { css, html, LitElement, nothing, type TemplateResult } from 'lit';

import type { Comparison } from '../../store/comparison.ts';
import type { Branch } from '../../store/shown.ts';
import type { StepChoice } from '../../store/step-choices.ts';
import { controls, tables } from '../../styles/shared.ts';

/** Runs that leave the scenario, side by side, and the way to a new one. @fires bw-branch-add @fires bw-branch-remove @fires bw-branch-keep @fires bw-branch-later */
export class BwBranches extends LitElement {
  static override styles = [
    controls,
    tables,
    css`
      :host {
        display: block;
      }
      .scroll {
        overflow-x: auto;
      }
      .swatch {
        display: inline-block;
        width: 18px;
        border-top: 3px solid;
        vertical-align: middle;
        margin-right: 6px;
      }
      form {
        display: flex;
        flex-wrap: wrap;
        gap: 6px 10px;
        align-items: center;
        padding: 4px 0;
      }
      select {
        max-width: 22em;
      }
      th,
      td:first-child {
        white-space: normal;
      }
      th,
      td {
        padding: 2px 7px;
      }
      td.bad {
        color: var(--bad);
        font-weight: 600;
      }
      .stale {
        opacity: 0.55;
      }
    `,
  ];
  static override properties = {
    branches: { attribute: false },
    comparison: { attribute: false },
    choices: { attribute: false },
    when: { type: String },
    mainLabel: { type: String },
    most: { type: Number },
    stale: { attribute: false },
  };
  declare branches: readonly Branch[];
  declare comparison: Comparison;
  /** Actions that a branch may take. */ declare choices: readonly StepChoice[];
  /** The playhead in words. */ declare when: string;
  declare mainLabel: string;
  declare most: number;
  /** By row: whether newer figures are on their way. */ declare stale: readonly boolean[];

  constructor() {
    super();
    this.branches = [];
    this.comparison = { heads: [], rows: [] };
    this.choices = [];
    this.when = '';
    this.mainLabel = '';
    this.most = 4;
    this.stale = [];
  }

  protected override render(): TemplateResult {
    const { branches, most, when, choices } = this;
    return html`
      <form aria-label="New branch" @submit=${this.#onAdd}>
        <label for="action">At ${when}</label>
        <select id="action" ?disabled=${branches.length >= most}>
          ${choices.map((c, i) => html`<option value=${i}>${c.label}</option>`)}
        </select>
        <label><input type="checkbox" id="drop" checked /> in place of the later actions</label>
        <button ?disabled=${branches.length >= most}>Branch here</button>
        ${branches.length >= most ? html`<span>${most} branches at most: remove one first.</span>` : nothing}
      </form>
      ${branches.length === 0 ? nothing : this.#renderTable()}
    `;
  }

  #renderTable(): TemplateResult {
    const { comparison, branches, mainLabel, stale } = this;
    return html`<div class="scroll" tabindex="0" role="region" aria-label="Branches compared">
      <table>
        <thead>
          <tr>
            <th scope="col">run</th>
            ${comparison.heads.map((h) => html`<th scope="col">${h}</th>`)}
            <th scope="col">branch</th>
          </tr>
        </thead>
        <tbody>
          ${comparison.rows.map((row, i) => {
            const branch = i === 0 ? undefined : branches[i - 1];
            const line = branch?.line ?? 0;
            return html`<tr class=${stale[i] === true ? 'stale' : ''}>
              <td>
                <span class="swatch" style="border-color:var(--line-${line})"></span>${branch?.label ?? mainLabel}
              </td>
              ${row.map((cell) => html`<td class=${cell === 'NOT KEPT' ? 'bad' : ''}>${cell}</td>`)}
              ${row.length === 0 ? html`<td colspan=${comparison.heads.length}>being computed</td>` : nothing}
              <td>${branch === undefined ? nothing : this.#renderActs(branch)}</td>
            </tr>`;
          })}
        </tbody>
      </table>
    </div>`;
  }

  #renderActs(branch: Branch): TemplateResult {
    const tell = (name: string) => (): void => {
      this.dispatchEvent(new CustomEvent(name, { detail: { id: branch.id } }));
    };
    return html`<button class="plain" aria-label="Make a scenario of: ${branch.label}" @click=${tell('bw-branch-keep')}>
        Keep as scenario</button
      ><button class="plain" aria-label="Remove branch: ${branch.label}" @click=${tell('bw-branch-remove')}>
        Remove
      </button>`;
  }

  #onAdd(event: Event): void {
    event.preventDefault();
    const choice = this.choices[Number(this.renderRoot.querySelector<HTMLSelectElement>('#action')?.value)];
    if (choice === undefined) return;
    const keepsLater = this.renderRoot.querySelector<HTMLInputElement>('#drop')?.checked !== true;
    this.dispatchEvent(new CustomEvent('bw-branch-add', { detail: { choice, keepsLater } }));
  }
}

customElements.define('bw-branches', BwBranches);
declare global {
  interface HTMLElementTagNameMap {
    'bw-branches': BwBranches;
  }
  interface HTMLElementEventMap {
    'bw-branch-add': CustomEvent<{ choice: StepChoice; keepsLater: boolean }>;
    'bw-branch-remove': CustomEvent<{ id: string }>;
    'bw-branch-keep': CustomEvent<{ id: string }>;
  }
}
