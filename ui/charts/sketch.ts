/**
 * A chart's lines as bare paths, to stand in while the charting library loads: on the same scales, without its axes and
 * letters. Pure.
 */
import type { ChartSpec } from './chart.ts';

/** One path. */
export interface SketchPath {
  readonly d: string;
  readonly stroke: string;
  readonly width: number;
  readonly dash: string;
  readonly fill: string;
}

/** What is read of a line trace. */
interface Trace {
  readonly mode?: string;
  readonly x?: readonly number[];
  readonly y?: readonly number[];
  readonly fill?: string;
  readonly fillcolor?: string;
  readonly line?: { readonly color?: string; readonly width?: number; readonly dash?: string };
}
interface Line {
  readonly y0?: number;
  readonly line?: { readonly color?: string; readonly dash?: string };
}

const DASHES: Readonly<Record<string, string>> = { dash: '6 4', dot: '2 3' };

/** Paths of a chart of a size, px; none for a chart without lines. */
export function sketchOf({ data, layout }: ChartSpec, width: number, height: number): SketchPath[] {
  const margin = { l: 0, r: 0, t: 0, b: 0, ...layout.margin };
  const [x0, x1] = pair(layout.xaxis?.range);
  const [y0, y1] = pair(layout.yaxis?.range);
  const isLog = layout.yaxis?.type === 'log';
  const px = (x: number): number => margin.l + ((x - x0) / (x1 - x0)) * (width - margin.l - margin.r);
  const py = (y: number): number => {
    const at = isLog ? Math.log10(Math.max(y, 1e-12)) : y;
    return margin.t + ((y1 - at) / (y1 - y0)) * (height - margin.t - margin.b);
  };
  const through = (xs: readonly number[], ys: readonly number[]): string =>
    xs.map((x, i) => `${i === 0 ? 'M' : 'L'}${px(x).toFixed(1)} ${py(ys[i] ?? 0).toFixed(1)}`).join('');
  const paths: SketchPath[] = [];
  for (const shape of (layout.shapes ?? []) as readonly Line[]) {
    if (typeof shape.y0 !== 'number') continue;
    const { color = 'none', dash = '' } = shape.line ?? {};
    paths.push({
      d: through([x0, x1], [shape.y0, shape.y0]),
      stroke: color,
      width: 1,
      dash: DASHES[dash] ?? '',
      fill: 'none',
    });
  }
  let before: Trace | undefined;
  for (const trace of data as readonly Trace[]) {
    const { x, y, line } = trace;
    if (trace.mode === 'lines' && x !== undefined && y !== undefined) {
      if (trace.fill === 'tonexty' && before?.x !== undefined && before.y !== undefined) {
        const back = `${through([...before.x].reverse(), [...before.y].reverse()).replace('M', 'L')}Z`;
        paths.push({ d: through(x, y) + back, stroke: 'none', width: 0, dash: '', fill: trace.fillcolor ?? 'none' });
      } else if ((line?.width ?? 1) > 0) {
        paths.push({
          d: through(x, y),
          stroke: line?.color ?? 'none',
          width: line?.width ?? 1,
          dash: DASHES[line?.dash ?? ''] ?? '',
          fill: 'none',
        });
      }
    }
    before = trace;
  }
  return paths;
}

function pair(range: unknown): readonly [number, number] {
  return Array.isArray(range) && range.length === 2 ? [Number(range[0]), Number(range[1])] : [0, 1];
}
