import { css, html, LitElement, svg, type PropertyValues, type TemplateResult } from 'lit';

import { cividis } from '../../charts/cividis.ts';
import { valueAtTime } from '../../charts/decimate.ts';
import { colorScale, fieldAt, type ColorScale, type MapChoice } from '../../charts/map-chart.ts';
import { StoreController } from '../../controllers/store-controller.ts';
import { clock } from '../../format/clock.ts';
import { massText } from '../../format/numbers.ts';
import { displayOf } from '../../format/units.ts';
import type { Playhead } from '../../store/playhead.ts';
import type { RunPacket, Units } from '../../store/shown.ts';

/** The drawing, px. */
const WIDTH = 250;
const HEIGHT = 400;
const SHELL = { left: 84, right: 166, top: 46, bottom: 350 };
const BED = { left: 88, right: 162, top: 92, bottom: 280 };
const SUMP = { top: 300, bottom: 348 };

/**
 * The column at the playhead: in each segment the liquid it holds as the thickness of a bar, coloured as in the map; what
 * comes and goes in numbers.
 */
export class BwColumn extends LitElement {
  static override styles = css`
    :host {
      display: block;
    }
    .drawing {
      position: relative;
      width: ${WIDTH}px;
      height: ${HEIGHT}px;
      margin: 0 auto;
    }
    svg,
    canvas {
      position: absolute;
      inset: 0;
    }
    text {
      font-size: 11.5px;
      fill: var(--ink);
    }
    .quiet {
      fill: var(--ink-2);
    }
    .line {
      stroke: var(--rule-strong);
      fill: none;
      stroke-width: 1.4;
    }
    .flow {
      stroke: var(--ink-2);
      fill: none;
      stroke-width: 1.4;
    }
    .off {
      stroke-dasharray: 2 4;
    }
    .head {
      fill: var(--ink-2);
    }
    .sump {
      fill: var(--liquid);
      opacity: 0.55;
    }
    dl {
      display: grid;
      grid-template-columns: 1fr auto;
      gap: 2px 8px;
      margin: 4px 8px 0;
      font-size: 12.5px;
    }
    dt {
      color: var(--ink-2);
    }
    dd {
      margin: 0;
      text-align: right;
    }
    .scale {
      display: flex;
      align-items: center;
      gap: 6px;
      margin: 2px 8px 6px;
      font-size: 11.5px;
      color: var(--ink-2);
      white-space: nowrap;
    }
    .bar {
      flex: 1;
      height: 8px;
      border: 1px solid var(--rule);
    }
  `;
  static override properties = {
    packet: { attribute: false },
    choice: { attribute: false },
    playhead: { attribute: false },
    units: { attribute: false },
    upset: { type: Number },
  };
  declare packet: RunPacket | undefined;
  declare choice: MapChoice | undefined;
  declare playhead: Playhead | undefined;
  declare units: Units | undefined;
  declare upset: number;

  #scale: ColorScale | undefined;
  #thickest = 1;
  readonly follow = new StoreController(this, () => this.playhead);

  protected override willUpdate(changed: PropertyValues<this>): void {
    const { packet, choice } = this;
    if (packet === undefined || choice === undefined || !(changed.has('packet') || changed.has('choice'))) return;
    this.#scale = colorScale(packet.map, choice);
    let most = 0;
    for (const h of packet.map.fields.holdup ?? []) most = Math.max(most, h);
    this.#thickest = most > 0 ? most : 1;
  }

  protected override render(): TemplateResult {
    const { packet, choice, playhead, units } = this;
    if (packet === undefined || playhead === undefined || units === undefined) return html`<div class="drawing"></div>`;
    const t = playhead.time;
    const read = (id: string): number => {
      const s = packet.series.find((x) => x.id === id);
      return s === undefined ? Number.NaN : valueAtTime(packet.time, s.value, t);
    };
    const text = (id: string, figures = 3): string => {
      const s = packet.series.find((x) => x.id === id);
      return s === undefined ? '' : displayOf(s, units).text(read(id), figures);
    };
    const { plant } = packet;
    const first = plant.solutes[0]?.id ?? '';
    const level = Math.min(1, read('sump-level') / plant.liquid.sump.overflowLevel);
    const liquidOn = read('liquid-flow') > 1e-9;
    const gasOn = read('gas-flow') > 1e-9;
    return html`
      <div
        class="drawing"
        role="img"
        aria-label="The column at ${clock(t - this.upset)} from the upset: outlet ${text(`gas-outlet.${first}`)}, liquid ${text('liquid-flow')}, pressure drop ${text('bed-dp')}"
      >
        <svg viewBox="0 0 ${WIDTH} ${HEIGHT}" aria-hidden="true">
          ${this.#frame(level, liquidOn, gasOn)}${svg`
          <text x="146" y="12">${text(`gas-outlet.${first}`)}</text>
          <text x="146" y="26" class="quiet">${text('gas-outlet-temperature')}</text>
          <text x="4" y="62">${text('liquid-flow')}</text>
          <text x="4" y="90" class="quiet">${text('liquid-inlet-temperature')}</text>
          <text x="172" y="186">${text('bed-dp')}</text>
          <text x="172" y="276">${text('gas-flow')}</text>
          <text x="172" y="304" class="quiet">${text(`gas-inlet.${first}`)}</text>
          <text x="4" y="330">${text('sump-level')}</text>
          <text x="136" y="384">${text(`liquid-outlet.${first}`)}</text>
          <text x="136" y="397" class="quiet">${text('liquid-outlet-temperature')}</text>`}
        </svg>
        <canvas
          width=${WIDTH * 2}
          height=${HEIGHT * 2}
          style="width:${WIDTH}px;height:${HEIGHT}px"
          aria-hidden="true"
        ></canvas>
      </div>
      ${
        choice === undefined || this.#scale === undefined
          ? ''
          : html`<div class="scale">
              <span>${choice.label}</span>
              <span>${numberText(this.#scale.low)}</span>
              <span
                class="bar"
                style="background:linear-gradient(to right, ${[0, 0.25, 0.5, 0.75, 1].map(cividis).join(',')})"
              ></span>
              <span>${numberText(this.#scale.high)} ${choice.display.unit === '1' ? '' : choice.display.unit}</span>
            </div>`
      }
      <dl>
        <dt>mean hold-up</dt>
        <dd>${text('holdup')}</dd>
        <dt>flood approach</dt>
        <dd>${text('flood-approach')}</dd>
        <dt>pump speed</dt>
        <dd>${text('pump-speed')}</dd>
        <dt>emitted</dt>
        <dd>${massText(3600 * read(`stack-flow.${first}`) * (plant.solutes[0]?.molarMass ?? 0), units.system)}/h</dd>
      </dl>
    `;
  }

  #frame(level: number, liquidOn: boolean, gasOn: boolean): TemplateResult {
    const { left, right, top, bottom } = SHELL;
    const height = (SUMP.bottom - SUMP.top) * level;
    const off = (on: boolean): string => (on ? 'flow' : 'flow off');
    return svg`
      <path class="line" d="M${left} ${top} Q${left} 34 112 32 V8 M138 32 Q${right} 34 ${right} ${top} V${bottom} Q125 362 ${left} ${bottom} V${top}" />
      <path class="line" d="M138 8 V32" />
      <path class=${off(gasOn)} d="M125 30 V6" /><path class="head" d="M121 8 L125 0 L129 8 Z" />
      <path class=${off(liquidOn)} d="M4 72 H116" /><path class="head" d="M116 68 L124 72 L116 76 Z" />
      <path class="line" d="M98 78 H152 M104 78 V84 M116 78 V84 M134 78 V84 M146 78 V84" />
      <path class="line" d="M88 56 L96 50 L104 56 L112 50 L120 56 L128 50 L136 56 L144 50 L152 56 L160 50" />
      <rect class="line" x=${BED.left} y=${BED.top} width=${BED.right - BED.left} height=${BED.bottom - BED.top} />
      <path class=${off(gasOn)} d="M246 288 H150" /><path class="head" d="M152 284 L144 288 L152 292 Z" />
      <rect class="sump" x=${left + 1} y=${SUMP.bottom - height} width=${right - left - 2} height=${height} />
      <path class="flow" d="M125 358 V392" /><path class="head" d="M121 388 L125 396 L129 388 Z" />
      <text x="4" y="344" class="quiet">sump</text>`;
  }

  protected override updated(): void {
    const { packet, choice, playhead } = this;
    const canvas = this.renderRoot.querySelector('canvas');
    const ink = canvas?.getContext('2d');
    if (canvas === null || ink === null || ink === undefined || packet === undefined || playhead === undefined) return;
    ink.setTransform(2, 0, 0, 2, 0, 0);
    ink.clearRect(0, 0, WIDTH, HEIGHT);
    const { map } = packet;
    const field = choice === undefined ? undefined : map.fields[choice.id];
    const holdup = map.fields.holdup ?? new Float64Array();
    const depth = map.edges[map.edges.length - 1] ?? 1;
    const y = (d: number): number => BED.top + 1 + ((BED.bottom - BED.top - 2) * d) / depth;
    const room = BED.right - BED.left - 4;
    for (let c = 0; c < map.cells; c++) {
      const top = y(map.edges[c] ?? 0);
      const height = y(map.edges[c + 1] ?? 0) - top;
      const share = field === undefined ? 0.5 : (this.#scale?.share(fieldAt(map, field, c, playhead.time)) ?? 0.5);
      const width = Math.max(1, room * Math.min(1, fieldAt(map, holdup, c, playhead.time) / this.#thickest));
      ink.fillStyle = cividis(share);
      ink.fillRect(BED.left + 2 + (room - width) / 2, top, width, Math.max(height - 0.4, 0.6));
    }
  }
}

function numberText(value: number): string {
  return Number(value.toPrecision(2)).toString();
}

customElements.define('bw-column', BwColumn);
declare global {
  interface HTMLElementTagNameMap {
    'bw-column': BwColumn;
  }
}
