/** An instrument's lane: what is so, what it shows, its alarms and trips, and every crossing. */
import type { Data, Layout } from 'plotly.js-dist-min';

import { clock, clockMarks } from '../format/clock.ts';
import { displayOf } from '../format/units.ts';
import type { Units } from '../store/work.ts';
import type { InstrumentLane, SetpointLine } from '../worker/packet.ts';
import type { ComparedRun } from './answer-chart.ts';
import { baseLayout, type ChartSpec, type Palette, type TimeAxis } from './chart.ts';
import { plainText } from './plot.ts';
import { extent, lineTrace, markTrace, pointsOf, rangeAround } from './traces.ts';

/** Least part of an instrument's range that a lane shows: noise and rounding stay small. */
const LEAST_SPAN = 0.04;

export interface LaneChartParts {
  readonly tag: string;
  readonly runs: readonly ComparedRun[];
  readonly axis: TimeAxis;
  readonly units: Units;
  readonly palette: Palette;
  readonly height: number;
  readonly mostMarks: number;
}

/** The chart of an instrument; undefined when the run has none of that tag. */
export function laneChart({
  tag,
  runs,
  axis,
  units,
  palette,
  height,
  mostMarks,
}: LaneChartParts): ChartSpec | undefined {
  const main = runs[0];
  const lane = laneOf(main, tag);
  if (main === undefined || lane === undefined) return undefined;
  const show = displayOf(lane, units);
  const convert = (v: number): number => show.convert(v);
  const { time } = main.packet;
  const data: Data[] = [];
  const curves: ArrayLike<number>[] = [];
  for (const run of [...runs].slice(1).reverse()) {
    const other = laneOf(run, tag);
    if (other === undefined) continue;
    const points = pointsOf(run.packet.time, other.shown, axis.from, axis.to, convert);
    curves.push(points.y);
    data.push(lineTrace(points, { color: palette.lines[run.line] ?? palette.ink, width: 1.4 }));
  }
  const truth = pointsOf(time, lane.truth, axis.from, axis.to, convert);
  const shown = pointsOf(time, lane.shown, axis.from, axis.to, convert);
  data.push(
    lineTrace(truth, { color: palette.quiet, width: 1.1, dash: 'dot' }),
    lineTrace(shown, { color: palette.ink, width: 1.7 }),
  );
  const [low, high] = extent(truth.y, shown.y, ...curves) ?? [0, 1];
  const { near, shapes, annotations } = linesOf(lane.lines, convert, [low, high], palette, (v) => show.text(v, 3));
  for (const line of lane.lines) {
    const level = convert(line.value);
    const color = line.role === 'alarm' ? palette.shown : palette.bad;
    data.push(
      ...markTrace(line.trueCrossings, level, color, 'circle-open'),
      ...markTrace(line.shownCrossings, level, color, 'circle'),
      ...markTrace(line.acts, level, color, line.side === 'above' ? 'triangle-up' : 'triangle-down', 9),
    );
  }
  const layout = baseLayout(axis, palette, height, clockMarks(axis.from, axis.to, axis.upset, mostMarks), false);
  const whole =
    lane.range === undefined
      ? Math.max(Math.abs(low), Math.abs(high))
      : convert(lane.range[1]) - convert(lane.range[0]);
  const range = rangeAround(extent(near, [low, high]) ?? [0, 1], false, LEAST_SPAN * whole);
  return {
    title: `${tag} ${lane.label}, ${show.unit}`,
    summary: summaryOf(lane, axis, (v) => show.text(v, 3)),
    data,
    layout: { ...layout, shapes, annotations, yaxis: { ...layout.yaxis, range, nticks: 3 } },
    table: () => ({
      columns: ['time from the upset [s]', `${tag} true [${show.unit}]`, `${tag} shown [${show.unit}]`],
      rows: Array.from(time).flatMap((t, i) =>
        t < axis.from || t > axis.to
          ? []
          : [[t - axis.upset, convert(lane.truth[i] ?? Number.NaN), convert(lane.shown[i] ?? Number.NaN)]],
      ),
    }),
  };
}

function laneOf(run: ComparedRun | undefined, tag: string): InstrumentLane | undefined {
  return run?.packet.instruments.find((i) => i.tag === tag);
}

/** Setpoints as lines with their tag; those far beyond what happens are left out of the scale. */
function linesOf(
  lines: readonly SetpointLine[],
  convert: (v: number) => number,
  [low, high]: readonly [number, number],
  palette: Palette,
  text: (v: number) => string,
): { near: number[]; shapes: NonNullable<Layout['shapes']>; annotations: NonNullable<Layout['annotations']> } {
  const reach = 2 * Math.max(high - low, 0.25 * Math.max(Math.abs(low), Math.abs(high)));
  const drawn = lines
    .map((line) => ({ line, level: convert(line.value) }))
    .filter(
      ({ line, level }) =>
        line.acts.length > 0 || line.shownCrossings.length > 0 || (level > low - reach && level < high + reach),
    );
  const span = extent(
    drawn.map(({ level }) => level),
    [low, high],
  ) ?? [low, high];
  const middle = 0.5 * (span[0] + span[1]);
  return {
    near: drawn.map(({ level }) => level),
    shapes: drawn.map(({ line, level }) => ({
      type: 'line',
      xref: 'paper',
      x0: 0,
      x1: 1,
      y0: level,
      y1: level,
      opacity: line.inService ? 1 : 0.45,
      line: {
        color: line.role === 'alarm' ? palette.shown : palette.bad,
        width: 1,
        dash: line.role === 'alarm' ? 'dash' : 'solid',
      },
    })),
    annotations: drawn.map(({ line, level }) => ({
      xref: 'paper',
      x: 1,
      xanchor: 'right',
      y: level,
      // Away from the nearer edge of the lane.
      yanchor: level > middle ? 'top' : 'bottom',
      yshift: level > middle ? 2 : -2,
      showarrow: false,
      text: plainText(`${line.tag} ${text(line.value)}${line.inService ? '' : ' (not in service)'}`),
      font: { size: 10, color: line.role === 'alarm' ? palette.shown : palette.bad },
    })),
  };
}

function summaryOf(lane: InstrumentLane, axis: TimeAxis, text: (value: number) => string): string {
  const when = (t: number): string => clock(t - axis.upset);
  const said = lane.lines.flatMap((line) => {
    if (line.acts.length > 0)
      return [`${line.tag} ${line.role === 'alarm' ? 'annunciates' : 'acts'} at ${line.acts.map(when).join(', ')}`];
    return line.shownCrossings.length > 0
      ? [`${line.tag} is crossed at ${line.shownCrossings.map(when).join(', ')}`]
      : [];
  });
  const range = extent(lane.shown);
  const course = range === undefined ? 'nothing shown' : `shows ${text(range[0])} to ${text(range[1])}`;
  return `${lane.tag} ${course}; ${said.length === 0 ? 'no setpoint is crossed' : said.join('; ')}.`;
}
