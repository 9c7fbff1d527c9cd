import { css, html, LitElement, type TemplateResult } from 'lit';

import { StoreController } from '../../controllers/store-controller.ts';
import { clock } from '../../format/clock.ts';
import type { Playhead } from '../../store/playhead.ts';
import { controls } from '../../styles/shared.ts';
import { PAUSE, PLAY, STEP_BACK, STEP_ON } from '../icons.ts';

const SPEEDS = [1, 10, 30, 60, 120, 600];

/** Plays, steps and tells the playhead. Playing goes by the frame; it stops where the scenario ends. */
export class BwTransport extends LitElement {
  static override styles = [
    controls,
    css`
      :host {
        display: flex;
        align-items: center;
        gap: 6px;
        flex-wrap: wrap;
      }
      output {
        min-width: 5.6em;
        font-size: 16px;
        font-weight: 600;
        text-align: right;
      }
      .of {
        color: var(--ink-2);
      }
      @media (max-width: 720px) {
        .of {
          display: none;
        }
      }
    `,
  ];
  static override properties = { playhead: { attribute: false }, upset: { type: Number }, grain: { type: Number } };
  declare playhead: Playhead | undefined;
  /** Of the first upset, s. */ declare upset: number;
  /** What a step is, s. */ declare grain: number;

  #frame = 0;
  #last = 0;
  readonly follow = new StoreController(this, () => this.playhead);

  constructor() {
    super();
    this.upset = 0;
    this.grain = 1;
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    cancelAnimationFrame(this.#frame);
    this.#frame = 0;
  }

  protected override render(): TemplateResult {
    const { playhead } = this;
    const isPlaying = playhead?.isPlaying === true;
    return html`
      <button
        aria-label="Step back"
        title="Step back (left arrow)"
        @click=${() => playhead?.seek(playhead.time - this.grain)}
      >
        ${STEP_BACK}
      </button>
      <button
        class="main"
        aria-label=${isPlaying ? 'Stop playing' : 'Play'}
        title="Play or stop (space)"
        @click=${() => playhead?.play(!isPlaying)}
      >
        ${isPlaying ? PAUSE : PLAY}
      </button>
      <button
        aria-label="Step on"
        title="Step on (right arrow)"
        @click=${() => playhead?.seek(playhead.time + this.grain)}
      >
        ${STEP_ON}
      </button>
      <label
        ><span class="hidden-text">Speed of playing</span>
        <select @change=${this.#onSpeed}>
          ${SPEEDS.map((s) => html`<option value=${s} ?selected=${s === playhead?.speed}>${s} ×</option>`)}
        </select></label
      >
      <output aria-label="Playhead, time from the upset">${clock((playhead?.time ?? 0) - this.upset, true)}</output>
      <span class="of">from the upset</span>
    `;
  }

  protected override updated(): void {
    if (this.playhead?.isPlaying === true && this.#frame === 0) {
      this.#last = performance.now();
      this.#frame = requestAnimationFrame(this.#onFrame);
    }
  }

  readonly #onFrame = (now: number): void => {
    this.#frame = 0;
    const { playhead } = this;
    if (playhead?.isPlaying !== true) return;
    playhead.tick(Math.min(0.25, (now - this.#last) / 1000));
    this.#last = now;
    this.#frame = requestAnimationFrame(this.#onFrame);
  };

  #onSpeed(event: Event): void {
    if (this.playhead !== undefined) this.playhead.speed = Number((event.target as HTMLSelectElement).value);
  }
}

customElements.define('bw-transport', BwTransport);
declare global {
  interface HTMLElementTagNameMap {
    'bw-transport': BwTransport;
  }
}
