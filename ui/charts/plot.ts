/** The only door to plotly: loaded once, when the first chart is drawn. Charts stand still; the page moves over them. */
import type { Data, Layout } from 'plotly.js-dist-min';
import type * as Plotly from 'plotly.js-dist-min';

let loading: Promise<typeof Plotly> | undefined;

/** Whether it has been asked for. */
export function isPlotLoaded(): boolean {
  return loading !== undefined;
}

function loadPlotly(): Promise<typeof Plotly> {
  loading ??= import('plotly.js-dist-min').then((module) =>
    'default' in module ? (module.default as typeof Plotly) : module,
  );
  return loading;
}

const STILL = { staticPlot: true, displaylogo: false, showSendToCloud: false, displayModeBar: false } as const;

/** Draws, or draws again, into an element with a size. */
export async function drawPlot(target: HTMLElement, data: readonly Data[], layout: Partial<Layout>): Promise<void> {
  const plotly = await loadPlotly();
  if (!target.isConnected) return;
  await plotly.react(target, [...data], layout, STILL);
}

/** Frees what a chart holds. */
export async function purgePlot(target: HTMLElement): Promise<void> {
  if (loading !== undefined) (await loading).purge(target);
}

/** A picture of a chart as a data address. */
export async function plotImage(
  data: readonly Data[],
  layout: Partial<Layout>,
  format: 'png' | 'svg',
  size: { readonly width: number; readonly height: number },
): Promise<string> {
  const plotly = await loadPlotly();
  return plotly.toImage(
    { data: [...data], layout: { ...layout, ...size } },
    { format, ...size, ...(format === 'png' ? { scale: 2 } : {}) },
  );
}

/** Text as plotly shows it letter by letter: its own marks (tags, entities) are taken for nothing else. */
export function plainText(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('$', '&#36;');
}
