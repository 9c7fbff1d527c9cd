/**
 * The page. Rooms are elements `bw-<name>-room` with a `session`; each has its line in `#renderRoom` and its name in
 * `bw-bar`. Elements live one to a folder, take data by property, and ask by event; those of a room may call the acts of
 * the session. Colours come from `styles/tokens.css`, controls and tables from `styles/shared.ts`, charts are `bw-chart`
 * fed by a pure `charts/*-chart.ts`.
 */
import { css, html, LitElement, type TemplateResult } from 'lit';

import { StoreController } from '../../controllers/store-controller.ts';
import type { Session } from '../../store/session.ts';
import { controls } from '../../styles/shared.ts';
import { openFiles } from '../open-files.ts';
import { saveText } from '../save-file.ts';
import { ROOM_NAMES } from '../bw-bar/bw-bar.ts';
import '../bw-help/bw-help.ts';
import '../bw-notices/bw-notices.ts';
import '../bw-upset-room/bw-upset-room.ts';

/** The whole page: bar, messages, the room that is open, the keys. */
export class BwApp extends LitElement {
  static override styles = [
    controls,
    css`
      :host {
        display: block;
      }
      .over {
        outline: 3px dashed var(--accent);
        outline-offset: -6px;
      }
      .start {
        padding: 3rem 16px;
        color: var(--ink-2);
      }
      h1 {
        margin: 0;
      }
    `,
  ];
  static override properties = { session: { attribute: false }, isOver: { state: true } };
  declare session: Session | undefined;
  declare private isOver: boolean;
  readonly follow = new StoreController(this, () => this.session);
  readonly #dark = matchMedia('(prefers-color-scheme: dark)');

  constructor() {
    super();
    this.isOver = false;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    document.addEventListener('keydown', this.#onKey);
    document.addEventListener('dragover', this.#onDragOver);
    document.addEventListener('dragleave', this.#onDragLeave);
    document.addEventListener('drop', this.#onDrop);
    this.#dark.addEventListener('change', this.#onTheme);
    this.#onTheme();
  }
  override disconnectedCallback(): void {
    super.disconnectedCallback();
    document.removeEventListener('keydown', this.#onKey);
    document.removeEventListener('dragover', this.#onDragOver);
    document.removeEventListener('dragleave', this.#onDragLeave);
    document.removeEventListener('drop', this.#onDrop);
    this.#dark.removeEventListener('change', this.#onTheme);
  }

  protected override willUpdate(): void {
    this.#onTheme();
  }

  protected override render(): TemplateResult {
    const { session } = this;
    if (session === undefined) return html`<main class="start">Starting…</main>`;
    const { notices } = session.state;
    return html`
      <header>
        <h1 class="hidden-text">Bedwave: ${session.work.name}</h1>
        <bw-bar .session=${session} @bw-help=${this.#onHelp}></bw-bar>
      </header>
      <bw-notices
        .notices=${notices}
        @bw-dismiss=${(e: CustomEvent<{ id: number }>) => {
          session.dismiss(e.detail.id);
        }}
      ></bw-notices>
      <main class=${this.isOver ? 'over' : ''}>${this.#renderRoom(session)}</main>
      <bw-help></bw-help>
    `;
  }

  #renderRoom(session: Session): TemplateResult {
    switch (session.state.view.room) {
      case 'upset':
      case 'plant':
      case 'setpoint':
      case 'drill':
      case 'record':
        return html`<bw-upset-room .session=${session}></bw-upset-room>`;
    }
  }

  /** The theme is on the root, where tokens and charts read it. */
  readonly #onTheme = (): void => {
    const chosen = this.session?.state.view.theme ?? 'auto';
    const theme = chosen === 'auto' ? (this.#dark.matches ? 'dark' : 'light') : chosen;
    if (document.documentElement.dataset['theme'] === theme) return;
    document.documentElement.dataset['theme'] = theme;
    document.dispatchEvent(new CustomEvent('bw-theme'));
  };

  #onHelp(): void {
    this.renderRoot.querySelector('bw-help')?.open();
  }

  readonly #onKey = (event: KeyboardEvent): void => {
    const { session } = this;
    if (session === undefined) return;
    const isTyping = event
      .composedPath()
      .some((e) => e instanceof HTMLInputElement || e instanceof HTMLTextAreaElement);
    if (event.ctrlKey || event.metaKey) {
      const key = event.key.toLowerCase();
      if (key === 'z' && !isTyping) {
        if (event.shiftKey) session.redo();
        else session.undo();
      } else if (key === 'y' && !isTyping) session.redo();
      else if (key === 's') saveText(session.work.name, session.work.text, 'application/json');
      else if (key === 'o')
        this.renderRoot.querySelector('bw-bar')?.renderRoot.querySelector<HTMLInputElement>('#file')?.click();
      else return;
      event.preventDefault();
      return;
    }
    if (isTyping || event.altKey) return;
    if (event.key === '?') this.#onHelp();
    else if (event.key === 'Escape') session.stop();
    else {
      const room = ROOM_NAMES[Number(event.key) - 1];
      if (room !== undefined) session.setView({ room: room[0] });
    }
  };

  readonly #onDragOver = (event: DragEvent): void => {
    if (event.dataTransfer?.types.includes('Files') !== true) return;
    event.preventDefault();
    this.isOver = true;
  };
  readonly #onDragLeave = (event: DragEvent): void => {
    if (event.relatedTarget === null) this.isOver = false;
  };
  readonly #onDrop = (event: DragEvent): void => {
    event.preventDefault();
    this.isOver = false;
    const files = [...(event.dataTransfer?.files ?? [])];
    if (this.session !== undefined && files.length > 0) void openFiles(this.session, files);
  };
}

customElements.define('bw-app', BwApp);
declare global {
  interface HTMLElementTagNameMap {
    'bw-app': BwApp;
  }
  interface DocumentEventMap {
    'bw-theme': CustomEvent;
  }
}
