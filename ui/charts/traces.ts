/** Pieces that charts share. */
import type { Data } from 'plotly.js-dist-min';

import { decimate, type Points } from './decimate.ts';

/** How a line looks. */
export interface LineLook {
  readonly color: string;
  readonly width?: number;
  readonly dash?: 'solid' | 'dash' | 'dot';
}

/** A line through points. */
export function lineTrace({ x, y }: Points, { color, width = 1.6, dash = 'solid' }: LineLook): Data {
  return { type: 'scatter', mode: 'lines', x, y, line: { color, width, dash }, hoverinfo: 'skip', connectgaps: false };
}

/** The area between a curve and a level, where the curve is beyond it. */
export function beyondTraces({ x, y }: Points, level: number, side: 'max' | 'min', fill: string): Data[] {
  const beyond = y.map((v) => (side === 'max' ? Math.max(v, level) : Math.min(v, level)));
  if (!beyond.some((v) => v !== level)) return [];
  const bare = { type: 'scatter', mode: 'lines', x, line: { width: 0, color: fill }, hoverinfo: 'skip' } as const;
  return [
    { ...bare, y: y.map(() => level) },
    { ...bare, y: beyond, fill: 'tonexty', fillcolor: fill },
  ];
}

/** Marks at moments on a level. */
export function markTrace(
  times: readonly number[],
  level: number,
  color: string,
  symbol: 'circle' | 'circle-open' | 'triangle-up' | 'triangle-down',
  size = 7,
): Data[] {
  if (times.length === 0) return [];
  return [
    {
      type: 'scatter',
      mode: 'markers',
      x: [...times],
      y: times.map(() => level),
      marker: { color, symbol, size, line: { width: 1.4, color } },
      hoverinfo: 'skip',
    },
  ];
}

/** The points of a series in a window, in another unit. */
export function pointsOf(
  time: ArrayLike<number>,
  value: ArrayLike<number>,
  from: number,
  to: number,
  convert: (v: number) => number,
): Points {
  const { x, y } = decimate(time, value, from, to);
  return { x, y: y.map(convert) };
}

/** Lowest and highest finite number of lists; `undefined` without any. */
export function extent(...lists: readonly ArrayLike<number>[]): [number, number] | undefined {
  let low = Infinity;
  let high = -Infinity;
  for (const list of lists) {
    for (let i = 0; i < list.length; i++) {
      const v = list[i] ?? Number.NaN;
      if (v < low) low = v;
      if (v > high) high = v;
    }
  }
  return low <= high ? [low, high] : undefined;
}

/** A range with room around an extent, at least `least` wide; on a logarithmic scale in decades, as plotly takes it. */
export function rangeAround([low, high]: [number, number], isLog = false, least = 0): [number, number] {
  if (isLog) {
    const top = Math.log10(Math.max(high, 1e-12));
    const bottom = Math.log10(Math.max(low, high * 1e-6, 1e-12));
    const room = 0.06 * Math.max(top - bottom, 0.3);
    return [bottom - room, top + room];
  }
  const middle = 0.5 * (low + high);
  const wide = Math.max(high - low, least);
  if (wide > high - low) [low, high] = [middle - wide / 2, middle + wide / 2];
  const span = high - low;
  const room = span > 0 ? 0.08 * span : Math.max(0.05 * Math.abs(high), 1e-9);
  return [low >= 0 && low - room < 0 ? Math.min(0, low) : low - room, high + room];
}
