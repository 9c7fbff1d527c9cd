import { html, LitElement, nothing, svg, type PropertyValues, type TemplateResult } from 'lit';

import { tableCsv, type ChartSpec } from '../../charts/chart.ts';
import { dropDraw, queueDraw } from '../../charts/draw-queue.ts';
import { drawPlot, isPlotLoaded, plotImage, purgePlot } from '../../charts/plot.ts';
import { sketchOf } from '../../charts/sketch.ts';
import { controls, tables } from '../../styles/shared.ts';
import { formatNumber } from '../../format/numbers.ts';
import { MORE } from '../icons.ts';
import { closeOnEscape, closeOnLeave, closeOnPressBeside } from '../menus.ts';
import { fileName, saveAddress, saveText } from '../save-file.ts';
import { styles } from './bw-chart.styles.ts';

/** Rows of a table that are put into the page; all are in the CSV. */
const MOST_ROWS = 400;
/** Picture that is saved, px. */
const PICTURE = { width: 1200, height: 420 };

/**
 * One chart with its title, its numbers as a table, and what it can be saved as. Draws only while it is in sight.
 *
 * @slot tools - Beside the title: choices that belong to the chart.
 * @slot readout - At the right of the title: values at the playhead.
 */
export class BwChart extends LitElement {
  static override styles = [controls, tables, styles];
  static override properties = {
    spec: { attribute: false },
    height: { type: Number },
    showsTable: { state: true },
    isPlotted: { state: true },
  };
  declare spec: ChartSpec | undefined;
  /** px */ declare height: number;
  declare private showsTable: boolean;
  /** Until then a sketch stands in. */ declare private isPlotted: boolean;

  #isInSight = false;
  #drawn: ChartSpec | undefined;
  #width = 0;
  readonly #sight = new IntersectionObserver(
    (entries) => {
      this.#isInSight = entries.some((e) => e.isIntersecting);
      this.#draw();
    },
    { rootMargin: '150px' },
  );
  readonly #size = new ResizeObserver(() => {
    if (this.clientWidth === this.#width) return;
    this.#width = this.clientWidth;
    this.#drawn = undefined;
    this.#draw();
  });

  constructor() {
    super();
    this.height = 120;
    this.showsTable = false;
    this.isPlotted = false;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.#sight.observe(this);
    this.#size.observe(this);
  }
  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#sight.disconnect();
    this.#size.disconnect();
    dropDraw(this);
    this.#drawn = undefined;
    this.isPlotted = false;
    const { plot } = this;
    if (plot !== null) void purgePlot(plot);
  }

  protected get plot(): HTMLElement | null {
    return this.renderRoot.querySelector<HTMLElement>('.plot');
  }

  protected override updated(changed: PropertyValues<this>): void {
    if (changed.has('spec')) this.#draw();
  }

  #draw(): void {
    const { spec } = this;
    if (!this.#isInSight || spec === undefined || spec === this.#drawn) return;
    queueDraw(this, async () => {
      const { plot } = this;
      if (plot === null || this.spec === undefined) return;
      // The sketch is on the screen before the library is read, which takes a second.
      if (!isPlotLoaded()) await painted();
      this.#drawn = this.spec;
      await drawPlot(plot, this.spec.data, { ...this.spec.layout, width: plot.clientWidth, autosize: false });
      this.isPlotted = true;
      this.dispatchEvent(new CustomEvent('bw-drawn', { bubbles: true, composed: true }));
    });
  }

  protected override render(): TemplateResult {
    const { spec, height } = this;
    return html`
      <header>
        <h3>${spec?.heading ?? spec?.title}</h3>
        <slot name="tools"></slot>
        <span class="space"></span>
        <slot name="readout"></slot>
        ${spec === undefined ? nothing : this.#renderMenu(spec)}
      </header>
      <div class="picture" role="img" aria-label=${spec?.summary ?? ''} style="height:${height}px">
        ${this.isPlotted || spec === undefined || this.clientWidth === 0 ? nothing : this.#renderSketch(spec)}
        <div class="plot" style="height:${height}px"></div>
      </div>
      ${this.showsTable && spec !== undefined ? this.#renderTable(spec) : nothing}
    `;
  }

  #renderSketch(spec: ChartSpec): TemplateResult {
    const width = this.clientWidth;
    return html`<svg class="sketch" width=${width} height=${this.height} aria-hidden="true">
      ${sketchOf(spec, width, this.height).map(
        (p) =>
          svg`<path d=${p.d} stroke=${p.stroke} stroke-width=${p.width} stroke-dasharray=${p.dash} fill=${p.fill} />`,
      )}
    </svg>`;
  }

  #renderMenu(spec: ChartSpec): TemplateResult {
    return html`<details @focusout=${closeOnLeave} @keydown=${closeOnEscape} @toggle=${closeOnPressBeside}>
      <summary aria-label="Numbers and files of: ${spec.title}">${MORE}</summary>
      <div class="menu">
        <button class="plain" aria-pressed=${this.showsTable ? 'true' : 'false'} @click=${this.#onTable}>
          Numbers as a table
        </button>
        <button class="plain" @click=${this.#onCsv}>Save as CSV</button>
        <button class="plain" @click=${() => this.#onPicture('png')}>Save as PNG</button>
        <button class="plain" @click=${() => this.#onPicture('svg')}>Save as SVG</button>
      </div>
    </details>`;
  }

  #renderTable(spec: ChartSpec): TemplateResult {
    const { columns, rows } = spec.table();
    const step = Math.max(1, Math.ceil(rows.length / MOST_ROWS));
    const some = rows.filter((_, i) => i % step === 0);
    return html`<div class="table" tabindex="0" role="region" aria-label="Numbers of: ${spec.title}">
      <table>
        <thead>
          <tr>
            ${columns.map((c) => html`<th scope="col">${c}</th>`)}
          </tr>
        </thead>
        <tbody>
          ${some.map(
            (row) =>
              html`<tr>
                ${row.map((v) => html`<td>${typeof v === 'number' ? formatNumber(v, 4) : v}</td>`)}
              </tr>`,
          )}
        </tbody>
      </table>
    </div>`;
  }

  #closeMenu(): void {
    this.renderRoot.querySelector('details')?.removeAttribute('open');
  }
  #onTable(): void {
    this.showsTable = !this.showsTable;
    this.#closeMenu();
  }
  #onCsv(): void {
    if (this.spec === undefined) return;
    saveText(`${fileName(this.spec.title)}.csv`, tableCsv(this.spec.table()), 'text/csv');
    this.#closeMenu();
  }
  async #onPicture(format: 'png' | 'svg'): Promise<void> {
    const { spec } = this;
    if (spec === undefined) return;
    this.#closeMenu();
    const background = getComputedStyle(this).getPropertyValue('--paper').trim();
    const layout = {
      ...spec.layout,
      title: { text: spec.title.replaceAll('<', '&lt;'), font: { size: 14 } },
      margin: { l: 70, r: 20, t: 40, b: 44 },
      paper_bgcolor: background,
      plot_bgcolor: background,
      xaxis: { ...spec.layout.xaxis, showticklabels: true, title: { text: 'time from the upset, h:mm:ss' } },
    };
    saveAddress(`${fileName(spec.title)}.${format}`, await plotImage(spec.data, layout, format, PICTURE));
  }
}

/** Resolves when what was rendered has been painted. */
function painted(): Promise<void> {
  return new Promise((resolve) => {
    requestAnimationFrame(() => {
      setTimeout(resolve, 0);
    });
  });
}

customElements.define('bw-chart', BwChart);
declare global {
  interface HTMLElementTagNameMap {
    'bw-chart': BwChart;
  }
}
