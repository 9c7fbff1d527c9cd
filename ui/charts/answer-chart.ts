/** The answer lane: the limited quantity of a run and its branches, with every limit on it and what is beyond shaded. */
import type { Data, Layout } from 'plotly.js-dist-min';

import { clock, clockMarks } from '../format/clock.ts';
import { formatTime } from '../format/numbers.ts';
import { displayOf } from '../format/units.ts';
import type { Units } from '../store/work.ts';
import type { LimitLane, RunPacket } from '../worker/packet.ts';
import { trailingMean } from './average.ts';
import { baseLayout, type ChartSpec, type ChartTable, type Palette, type TimeAxis } from './chart.ts';
import { valueAtTime } from './decimate.ts';
import { plainText } from './plot.ts';
import { beyondTraces, extent, lineTrace, pointsOf, rangeAround } from './traces.ts';

/** A run among those that are compared. */
export interface ComparedRun {
  readonly label: string;
  /** Place among the line colours; 0: the run itself. */ readonly line: number;
  readonly packet: RunPacket;
}

/** What the lane shows of a run: the headline limit and the others on the same quantity. */
export function headlineLanes(packet: RunPacket): readonly LimitLane[] {
  const headline = packet.limits.find((l) => l.id === packet.document.summary.headline) ?? packet.limits[0];
  if (headline === undefined) return [];
  return packet.limits.filter(
    (l) =>
      l.label === headline.label && l.unit === headline.unit && l.basis === headline.basis && l.side === headline.side,
  );
}

export interface AnswerChartParts {
  readonly runs: readonly ComparedRun[];
  readonly axis: TimeAxis;
  readonly units: Units;
  readonly palette: Palette;
  readonly height: number;
  readonly isLog: boolean;
  readonly mostMarks: number;
}

/** The chart; undefined when the run has nothing that is limited and no outlet. */
export function answerChart({
  runs,
  axis,
  units,
  palette,
  height,
  isLog,
  mostMarks,
}: AnswerChartParts): ChartSpec | undefined {
  const main = runs[0];
  if (main === undefined) return undefined;
  const { packet } = main;
  const lanes = headlineLanes(packet);
  const first = lanes[0] ?? outletLane(packet);
  if (first === undefined) return undefined;
  const show = displayOf(first, units);
  const data: Data[] = [];
  const shapes: NonNullable<Layout['shapes']> = [];
  const labels: { level: number; text: string }[] = [];
  const levels: number[] = [];
  const direct = pointsOf(packet.time, first.value, axis.from, axis.to, (v) => show.convert(v));
  const averaged = (lane: LimitLane, run: RunPacket, value: Float64Array) =>
    pointsOf(run.time, trailingMean(run.time, value, lane.averaging?.window ?? 0), axis.from, axis.to, (v) =>
      show.convert(v),
    );
  const rolling = lanes.filter((l) => l.averaging?.kind === 'rolling');
  for (const lane of lanes) {
    const level = show.convert(lane.limit);
    levels.push(level);
    const curve = lane.averaging === undefined ? direct : averaged(lane, packet, lane.value);
    data.push(...beyondTraces(curve, level, lane.side, palette.badSoft));
    const dash = lane.averaging === undefined ? 'solid' : 'dash';
    shapes.push({
      type: 'line',
      xref: 'paper',
      x0: 0,
      x1: 1,
      y0: level,
      y1: level,
      line: { color: palette.bad, width: 1.2, dash },
    });
    const what = lane.averaging === undefined ? 'limit' : `limit of the ${formatTime(lane.averaging.window)} average`;
    labels.push({ level, text: `${what} ${show.text(lane.limit, 3)}` });
  }
  const curves: ArrayLike<number>[] = [];
  for (const run of [...runs].reverse()) {
    const lane = laneLike(run.packet, first);
    if (lane === undefined) continue;
    const color = palette.lines[run.line] ?? palette.ink;
    const points =
      run === main ? direct : pointsOf(run.packet.time, lane.value, axis.from, axis.to, (v) => show.convert(v));
    curves.push(points.y);
    for (const limited of rolling) {
      const mean = averaged(limited, run.packet, lane.value);
      data.push(lineTrace(mean, { color, width: 1.2, dash: 'dash' }));
      curves.push(mean.y);
    }
    data.push(lineTrace(points, { color, width: run === main ? 2 : 1.7 }));
  }
  const range = rangeAround(extent(levels, ...curves) ?? [0, 1], isLog);
  const layout = baseLayout(axis, palette, height, clockMarks(axis.from, axis.to, axis.upset, mostMarks), true);
  return {
    title: `${first.label}, ${show.unit}${first.basis === undefined ? '' : ` ${first.basis}`}`,
    summary: packet.sentence[units.system],
    data,
    layout: {
      ...layout,
      shapes,
      annotations: limitLabels(labels, range, isLog, height, palette),
      yaxis: {
        ...layout.yaxis,
        type: isLog ? 'log' : 'linear',
        range,
        ...(isLog ? { dtick: 1 } : {}),
      },
    },
    table: () => tableOf(runs, first, rolling, units, axis),
  };
}

/** Height of a label, px. */
const LABEL = 13;

/** What each limit is, at the right end of its line; one that would touch the one below it stands higher. */
function limitLabels(
  labels: readonly { readonly level: number; readonly text: string }[],
  range: readonly [number, number],
  isLog: boolean,
  height: number,
  palette: Palette,
): NonNullable<Layout['annotations']> {
  const at = (level: number): number => (isLog ? Math.log10(level) : level);
  const px = (level: number): number => ((at(level) - range[0]) / (range[1] - range[0])) * (height - 26);
  let free = -Infinity;
  return [...labels]
    .sort((a, b) => a.level - b.level)
    .map(({ level, text }) => {
      const up = Math.max(0, free - px(level));
      free = px(level) + up + LABEL;
      return {
        xref: 'paper',
        x: 1,
        xanchor: 'right',
        y: at(level),
        yanchor: 'bottom',
        yshift: up - 2,
        showarrow: false,
        text: plainText(text),
        font: { color: palette.bad, size: 11 },
      };
    });
}

function laneLike(packet: RunPacket, like: LimitLane): LimitLane | undefined {
  return packet.limits.find((l) => l.id === like.id) ?? (like.id === '' ? outletLane(packet) : undefined);
}

/** A case without limits: the first solute at the outlet. */
function outletLane(packet: RunPacket): LimitLane | undefined {
  const series = packet.series.find((s) => s.id.startsWith('gas-outlet.') && s.kind === 'gas-strength');
  if (series === undefined) return undefined;
  const { label, kind, unit, value } = series;
  return {
    id: '',
    label,
    kind,
    unit,
    ownUnit: 'ppmv',
    basis: undefined,
    side: 'max',
    limit: Number.NaN,
    value,
    averaging: undefined,
  };
}

function tableOf(
  runs: readonly ComparedRun[],
  first: LimitLane,
  rolling: readonly LimitLane[],
  units: Units,
  axis: TimeAxis,
): ChartTable {
  const main = runs[0]?.packet;
  const show = displayOf(first, units);
  const unit = `${show.unit}${first.basis === undefined ? '' : ` ${first.basis}`}`;
  const lanes = runs.flatMap((run) => {
    const lane = laneLike(run.packet, first);
    if (lane === undefined) return [];
    const means = rolling.map((l) => ({
      head: `${run.label}, ${clock(l.averaging?.window ?? 0)} average [${unit}]`,
      time: run.packet.time,
      value: trailingMean(run.packet.time, lane.value, l.averaging?.window ?? 0),
    }));
    return [{ head: `${run.label} [${unit}]`, time: run.packet.time, value: lane.value }, ...means];
  });
  const times = Array.from(main?.time ?? []).filter((t) => t >= axis.from && t <= axis.to);
  return {
    columns: ['time from the upset [s]', ...lanes.map((l) => l.head)],
    rows: times.map((t) => [t - axis.upset, ...lanes.map((l) => show.convert(valueAtTime(l.time, l.value, t)))]),
  };
}
