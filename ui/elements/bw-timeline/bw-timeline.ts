import { html, LitElement, nothing, type TemplateResult } from 'lit';

import { clock } from '../../format/clock.ts';
import type { Block } from '../../store/timeline.ts';
import { controls } from '../../styles/shared.ts';
import { SIGN } from '../signs.ts';
import { styles } from './bw-timeline.styles.ts';

/** px */
const ROW = 28;
const LETTER = 6.6;
/** Keyboard steps, s. */
const STEP = 1;
const LARGE_STEP = 10;
/** Pointer travel that makes a click a drag, px. */
const SLACK = 3;

interface Drag {
  readonly index: number;
  readonly kind: 'move' | 'stretch';
  readonly x: number;
  readonly from: number;
  isMoving: boolean;
}

/**
 * Upsets and actions as blocks on the time axis: drag to move, drag the right edge to stretch; with the keyboard arrows
 * move by a second (Shift: ten), Alt and arrows stretch, Delete removes, Enter opens.
 *
 * @fires bw-block-move - The person put a block at a time.
 * @fires bw-block-stretch - The person made a block last.
 * @fires bw-block-select - The person chose a block; -1: none.
 * @fires bw-block-remove - The person took a block away.
 * @fires bw-block-settle - A drag or a row of key presses is over.
 */
export class BwTimeline extends LitElement {
  static override styles = [controls, styles];
  static override properties = {
    blocks: { attribute: false },
    from: { type: Number },
    to: { type: Number },
    upset: { type: Number },
    selected: { type: Number },
  };
  declare blocks: readonly Block[];
  /** Shown part of the axis, s. */ declare from: number;
  declare to: number;
  /** Of the first upset, s. */ declare upset: number;
  declare selected: number;

  #drag: Drag | undefined;
  #width = 800;
  readonly #size = new ResizeObserver(() => {
    this.#width = this.clientWidth;
    this.requestUpdate();
  });

  constructor() {
    super();
    this.blocks = [];
    this.from = 0;
    this.to = 1;
    this.upset = 0;
    this.selected = -1;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.#size.observe(this);
  }
  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#size.disconnect();
  }

  #areaWidth(): number {
    return this.renderRoot.querySelector('.area')?.clientWidth ?? this.#width;
  }
  #px(time: number): number {
    return ((time - this.from) / (this.to - this.from)) * this.#areaWidth();
  }

  protected override render(): TemplateResult {
    const placed = this.blocks.filter((b) => b.start !== undefined);
    const waiting = this.blocks.filter((b) => b.start === undefined);
    const rows = this.#rows(placed);
    const height = Math.max(1, ...rows.map((r) => r + 1)) * ROW;
    return html`
      <div class="area" role="group" aria-label="Timeline of upsets and actions" style="height:${height}px">
        ${placed.length === 0 ? html`<div class="empty">Nothing happens yet: add an upset.</div>` : nothing}
        ${placed.map((block, i) => this.#renderBlock(block, rows[i] ?? 0))}
      </div>
      ${
        waiting.length === 0
          ? nothing
          : html`<div class="waiting">Did not come: ${waiting.map((block) => this.#renderBlock(block, 0))}</div>`
      }
    `;
  }

  /** Row of each block: the first in which it overlaps no other. */
  #rows(blocks: readonly Block[]): number[] {
    const ends: number[] = [];
    const order = blocks.map((_, i) => i).sort((a, b) => (blocks[a]?.start ?? 0) - (blocks[b]?.start ?? 0));
    const rows: number[] = blocks.map(() => 0);
    for (const i of order) {
      const block = blocks[i];
      if (block?.start === undefined) continue;
      const left = this.#px(block.start);
      const right = left + Math.max(this.#length(block), block.label.length * LETTER + 34);
      let row = ends.findIndex((end) => end < left);
      if (row < 0) row = ends.length;
      ends[row] = right;
      rows[i] = row;
    }
    return rows;
  }

  #length(block: Block): number {
    return block.lasts === undefined ? 0 : (block.lasts / (this.to - this.from)) * this.#areaWidth();
  }

  #renderBlock(block: Block, row: number): TemplateResult {
    const { start, lasts, role, trigger, index, label } = block;
    const place = start === undefined ? '' : `left:${this.#px(start)}px;top:${row * ROW + 2}px;`;
    const width = lasts === undefined ? '' : `width:${Math.max(8, this.#length(block))}px;`;
    const when = start === undefined ? 'has not come' : `at ${clock(start - this.upset)}`;
    const span = lasts === undefined ? '' : `, for ${clock(lasts)}`;
    const kinds = ['block', role, trigger === 'condition' ? 'condition' : '', lasts === undefined ? 'instant' : ''];
    return html`<button
      class=${kinds.join(' ')}
      style="${place}${width}"
      aria-pressed=${index === this.selected ? 'true' : 'false'}
      aria-label="${role === 'upset' ? 'Upset' : 'Action'}: ${label}, ${when}${span}"
      data-index=${index}
      title="${label}, ${when}${span}"
      @pointerdown=${(e: PointerEvent) => {
        this.#onPointerDown(e, block, 'move');
      }}
      @pointermove=${this.#onPointerMove}
      @pointerup=${this.#onPointerUp}
      @pointercancel=${this.#onPointerUp}
      @keydown=${(e: KeyboardEvent) => {
        this.#onKey(e, block);
      }}
      @click=${() => {
        this.#onClick(index);
      }}
    >
      <span class="text">${role === 'upset' ? SIGN.upset : SIGN.action}${label}</span>
      ${
        block.canStretch && lasts !== undefined
          ? html`<span
              class="handle"
              @pointerdown=${(e: PointerEvent) => {
                this.#onPointerDown(e, block, 'stretch');
              }}
            ></span>`
          : nothing
      }
    </button>`;
  }

  #onPointerDown(event: PointerEvent, block: Block, kind: Drag['kind']): void {
    if (event.button !== 0) return;
    event.stopPropagation();
    if (kind === 'move' ? !block.canMove : !block.canStretch) return;
    const button = this.renderRoot.querySelector<HTMLElement>(`.block[data-index="${block.index}"]`);
    button?.setPointerCapture(event.pointerId);
    this.#drag = {
      index: block.index,
      kind,
      x: event.clientX,
      from: kind === 'move' ? (block.start ?? 0) : (block.lasts ?? 0),
      isMoving: false,
    };
  }
  #onPointerMove(event: PointerEvent): void {
    const drag = this.#drag;
    if (drag === undefined) return;
    const dx = event.clientX - drag.x;
    if (!drag.isMoving && Math.abs(dx) < SLACK) return;
    drag.isMoving = true;
    const moved = drag.from + (dx / this.#areaWidth()) * (this.to - this.from);
    // Whole seconds, or tenths where the axis is short.
    const grain = this.to - this.from < 120 ? 0.1 : 1;
    this.#ask(drag.kind, drag.index, Math.max(0, Math.round(moved / grain) * grain));
  }
  #onPointerUp(): void {
    const drag = this.#drag;
    this.#drag = undefined;
    if (drag?.isMoving === true) {
      this.#justDragged = true;
      this.dispatchEvent(new CustomEvent('bw-block-settle', { bubbles: true, composed: true }));
    }
  }
  #justDragged = false;

  #onClick(index: number): void {
    if (this.#justDragged) {
      this.#justDragged = false;
      return;
    }
    this.#select(index === this.selected ? -1 : index);
  }

  #onKey(event: KeyboardEvent, block: Block): void {
    const direction = event.key === 'ArrowRight' ? 1 : event.key === 'ArrowLeft' ? -1 : 0;
    if (direction !== 0) {
      const by = direction * (event.shiftKey ? LARGE_STEP : STEP);
      if (event.altKey && block.canStretch) this.#ask('stretch', block.index, Math.max(STEP, (block.lasts ?? 0) + by));
      else if (!event.altKey && block.canMove) this.#ask('move', block.index, Math.max(0, (block.start ?? 0) + by));
    } else if (event.key === 'Delete' || event.key === 'Backspace') {
      this.dispatchEvent(
        new CustomEvent('bw-block-remove', { detail: { index: block.index }, bubbles: true, composed: true }),
      );
    } else {
      return;
    }
    event.preventDefault();
    event.stopPropagation();
  }

  #ask(kind: Drag['kind'], index: number, value: number): void {
    const name = kind === 'move' ? 'bw-block-move' : 'bw-block-stretch';
    this.dispatchEvent(new CustomEvent(name, { detail: { index, value }, bubbles: true, composed: true }));
  }
  #select(index: number): void {
    this.dispatchEvent(new CustomEvent('bw-block-select', { detail: { index }, bubbles: true, composed: true }));
  }
}

customElements.define('bw-timeline', BwTimeline);
declare global {
  interface HTMLElementTagNameMap {
    'bw-timeline': BwTimeline;
  }
  interface HTMLElementEventMap {
    'bw-block-move': CustomEvent<{ index: number; value: number }>;
    'bw-block-stretch': CustomEvent<{ index: number; value: number }>;
    'bw-block-select': CustomEvent<{ index: number }>;
    'bw-block-remove': CustomEvent<{ index: number }>;
    'bw-block-settle': CustomEvent;
  }
}
