import { css, html, LitElement, type TemplateResult } from 'lit';

import { StoreController } from '../../controllers/store-controller.ts';
import { EXAMPLES, exampleText } from '../../store/examples.ts';
import { omit } from '../../store/omit.ts';
import type { Session } from '../../store/session.ts';
import { LONGEST_LINK, packWork } from '../../store/share.ts';
import type { QuantityKind, Study, Units } from '../../store/shown.ts';
import type { Room, View } from '../../store/view.ts';
import { controls } from '../../styles/shared.ts';
import { unitChoices } from '../../format/units.ts';
import { REDO, UNDO } from '../icons.ts';
import { closeOnEscape, closeOnLeave, closeOnPressBeside } from '../menus.ts';
import { openFiles } from '../open-files.ts';
import { saveText } from '../save-file.ts';
import '../bw-trust/bw-trust.ts';

/** Rooms that there are, in order, and what they are called. */
export const ROOM_NAMES: readonly (readonly [Room, string])[] = [['upset', 'Upset']];

/** The bar: the case, the rooms, units, undo, files, the link, help, the trust mark. @fires bw-help */
export class BwBar extends LitElement {
  static override styles = [
    controls,
    css`
      :host {
        display: flex;
        flex-wrap: wrap;
        align-items: center;
        gap: 6px 10px;
        padding: 8px 16px;
        border-bottom: 1px solid var(--rule);
      }
      .name {
        width: 15em;
        font-weight: 600;
        border-color: transparent;
        background: none;
      }
      .name:hover,
      .name:focus {
        border-color: var(--rule-strong);
        background: var(--sheet);
      }
      nav {
        display: flex;
        gap: 2px;
      }
      nav button {
        border-color: transparent;
        background: none;
        border-radius: 0;
        border-bottom: 2px solid transparent;
      }
      nav button[aria-current='page'] {
        border-bottom-color: var(--accent);
        font-weight: 600;
      }
      .space {
        flex: 1;
      }
      details {
        position: relative;
      }
      summary {
        list-style: none;
        cursor: pointer;
        padding: 4px 10px;
        border: 1px solid var(--rule-strong);
        border-radius: 3px;
        background: var(--sheet);
      }
      summary::-webkit-details-marker {
        display: none;
      }
      .menu {
        position: absolute;
        left: 0;
        z-index: 20;
        margin-top: 4px;
        display: flex;
        flex-direction: column;
        padding: 6px;
        gap: 2px;
        background: var(--sheet);
        border: 1px solid var(--rule-strong);
        border-radius: 3px;
        min-width: 220px;
      }
      .menu button {
        text-align: left;
        white-space: nowrap;
      }
      .menu hr {
        width: 100%;
        border: 0;
        border-top: 1px solid var(--rule);
      }
      .menu h3 {
        padding: 2px 6px;
        color: var(--ink-2);
      }
      .menu label {
        display: flex;
        justify-content: space-between;
        gap: 12px;
        align-items: center;
        padding: 2px 6px;
      }
      @media (max-width: 720px) {
        :host {
          padding: 6px 8px;
        }
        .menu {
          position: fixed;
          left: 8px;
          right: 8px;
        }
      }
    `,
  ];
  static override properties = { session: { attribute: false } };
  declare session: Session | undefined;
  readonly follow = new StoreController(this, () => this.session);

  protected override render(): TemplateResult {
    const { session } = this;
    if (session === undefined) return html``;
    const { work, view, canUndo, canRedo, main, studies } = session.state;
    return html`
      <label
        ><span class="hidden-text">Name of the case file</span
        ><input
          class="name"
          .value=${work.name}
          autocomplete="off"
          spellcheck="false"
          @change=${(e: Event) => {
            session.rename((e.target as HTMLInputElement).value);
          }}
      /></label>
      <nav aria-label="Rooms">
        ${ROOM_NAMES.map(
          ([id, name]) =>
            html`<button
              aria-current=${view.room === id ? 'page' : 'false'}
              @click=${() => {
                session.setView({ room: id });
              }}
            >
              ${name}
            </button>`,
        )}
      </nav>
      <button aria-label="Undo" title="Undo (Ctrl Z)" ?disabled=${!canUndo} @click=${() => session.undo()}>
        ${UNDO}
      </button>
      <button aria-label="Redo" title="Redo (Ctrl Shift Z)" ?disabled=${!canRedo} @click=${() => session.redo()}>
        ${REDO}
      </button>
      ${this.#renderFiles(session)} ${this.#renderLook(session, work.units, view)}
      <button
        title="Keys and words (?)"
        @click=${() => this.dispatchEvent(new CustomEvent('bw-help', { bubbles: true, composed: true }))}
      >
        Help
      </button>
      <span class="space"></span>
      <bw-trust
        .run=${main}
        .studies=${studies}
        @bw-study=${(e: CustomEvent<{ study: Study }>) => void session.study(e.detail.study)}
        @bw-study-stop=${() => {
          session.stopStudies();
        }}
      ></bw-trust>
    `;
  }

  #renderFiles(session: Session): TemplateResult {
    const act = (run: () => void) => (event: Event) => {
      (event.currentTarget as HTMLElement).closest('details')?.removeAttribute('open');
      run();
    };
    return html`<details @keydown=${closeOnEscape} @focusout=${closeOnLeave} @toggle=${closeOnPressBeside}>
      <summary>Case</summary>
      <div class="menu">
        <button class="plain" @click=${act(() => this.renderRoot.querySelector<HTMLInputElement>('#file')?.click())}>
          Open a case file…
        </button>
        <button
          class="plain"
          @click=${act(() => {
            saveText(session.work.name, session.work.text, 'application/json');
          })}
        >
          Save the case file
        </button>
        <button class="plain" @click=${act(() => void this.#onShare(session))}>Copy a link with the case in it</button>
        <hr />
        <button class="plain" @click=${act(() => void this.#onExport(session, 'json'))}>Save the run as JSON</button>
        <button class="plain" @click=${act(() => void this.#onExport(session, 'csv'))}>Save the run as CSV</button>
        <hr />
        <h3>Examples</h3>
        ${EXAMPLES.map((name) => html`<button class="plain" @click=${act(() => void this.#onExample(session, name))}>${name.replaceAll('-', ' ')}</button>`)}
      </div>
      <input
        id="file"
        type="file"
        accept=".json,.csv,application/json,text/csv"
        multiple
        hidden
        aria-label="Case file"
        @change=${this.#onFile}
      />
    </details>`;
  }

  #renderLook(session: Session, units: Units, view: View): TemplateResult {
    return html`<details @keydown=${closeOnEscape} @focusout=${closeOnLeave} @toggle=${closeOnPressBeside}>
      <summary>Units and look</summary>
      <div class="menu">
        <label
          >Units
          <select
            @change=${(e: Event) => {
              session.setUnits({ system: (e.target as HTMLSelectElement).value as Units['system'], own: {} });
            }}
          >
            ${(
              [
                ['case', 'as the case states'],
                ['si', 'SI'],
                ['us', 'US customary'],
              ] as const
            ).map(([id, name]) => html`<option value=${id} ?selected=${units.system === id}>${name}</option>`)}
          </select></label
        >
        ${this.#renderOwnUnits(session, units)}
        <label
          >Look
          <select
            @change=${(e: Event) => {
              session.setView({ theme: (e.target as HTMLSelectElement).value as View['theme'] });
            }}
          >
            ${(
              [
                ['auto', 'as the system'],
                ['light', 'light'],
                ['dark', 'dark'],
              ] as const
            ).map(([id, name]) => html`<option value=${id} ?selected=${view.theme === id}>${name}</option>`)}
          </select></label
        >
      </div>
    </details>`;
  }

  #renderOwnUnits(session: Session, units: Units): TemplateResult {
    return html`${OWN_KINDS.map(
      ([kind, name]) =>
        html`<label
          >${name}
          <select
            @change=${(e: Event) => {
              const { value } = e.target as HTMLSelectElement;
              const others = omit(units.own, kind);
              session.setUnits({ own: value === '' ? others : { ...others, [kind]: value } });
            }}
          >
            <option value="">as above</option>
            ${unitChoices(kind).map((u) => html`<option value=${u} ?selected=${units.own[kind] === u}>${u}</option>`)}
          </select></label
        >`,
    )}`;
  }

  async #onShare(session: Session): Promise<void> {
    const packed = await packWork(session.work);
    if (!packed.ok) {
      session.notify(
        'plain',
        `The link would have ${packed.length} characters, more than the ${LONGEST_LINK} that travel safely. Save the case file and send that instead.`,
      );
      return;
    }
    const link = location.origin + location.pathname + packed.fragment;
    try {
      await navigator.clipboard.writeText(link);
      session.notify(
        'plain',
        `The link is copied: ${link.length} characters, with the whole case in it. Nothing was sent anywhere.`,
      );
    } catch {
      session.notify(
        'plain',
        `The link (${link.length} characters) could not be copied by itself; it is in the address line now.`,
      );
      history.replaceState(null, '', link);
    }
  }

  async #onExport(session: Session, form: 'json' | 'csv'): Promise<void> {
    try {
      const text = await session.exportRun(form);
      const base = session.work.name.replace(/\.json$/, '');
      saveText(`${base}-${session.work.scenario}.${form}`, text, form === 'json' ? 'application/json' : 'text/csv');
    } catch (error) {
      session.notify(
        'problem',
        `The run could not be saved: ${error instanceof Error ? error.message : String(error)}`,
      );
    }
  }

  async #onExample(session: Session, name: string): Promise<void> {
    session.open(`${name}.json`, await exampleText(name));
  }

  async #onFile(event: Event): Promise<void> {
    const input = event.target as HTMLInputElement;
    if (this.session !== undefined && input.files !== null) await openFiles(this.session, [...input.files]);
    input.value = '';
  }
}

/** Quantities whose unit can be chosen alone. */
const OWN_KINDS: readonly (readonly [QuantityKind, string])[] = [
  ['temperature', 'Temperatures'],
  ['pressure-difference', 'Pressure differences'],
  ['volume-flow', 'Liquid flows'],
  ['molar-flow', 'Gas flows'],
  ['length', 'Lengths'],
];

customElements.define('bw-bar', BwBar);
declare global {
  interface HTMLElementTagNameMap {
    'bw-bar': BwBar;
  }
  interface HTMLElementEventMap {
    'bw-help': CustomEvent;
  }
}
