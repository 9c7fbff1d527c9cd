/** The bed map: depth against time, colour for one quantity of each segment. */
import { clockMarks } from '../format/clock.ts';
import { displayOf, type Display } from '../format/units.ts';
import type { Units } from '../store/work.ts';
import type { BedMap, MapQuantity, RunPacket } from '../worker/packet.ts';
import { baseLayout, type ChartSpec, type Palette, type TimeAxis } from './chart.ts';
import { CIVIDIS } from './cividis.ts';
import { lastAt } from './decimate.ts';
import { formatNumber } from '../../sim/index.ts';

/** A quantity that a map can show. */
export interface MapChoice {
  readonly id: MapQuantity;
  readonly label: string;
  readonly isLog: boolean;
  readonly display: Display;
}

/** What the maps of a run can show. */
export function mapChoices({ plant, map }: RunPacket, units: Units): MapChoice[] {
  const strength = (kind: 'gas-strength' | 'liquid-strength') => displayOf({ kind, unit: 'mol/mol' }, units);
  const temperature = displayOf({ kind: 'temperature', unit: 'K' }, units);
  const share = displayOf({ kind: 'fraction', unit: '1' }, units);
  const all: MapChoice[] = [
    ...plant.solutes.map(({ name }, k): MapChoice => ({
      id: `gas.${k}`,
      label: `${name} in the gas`,
      isLog: true,
      display: strength('gas-strength'),
    })),
    ...plant.solutes.map(({ name }, k): MapChoice => ({
      id: `liquid.${k}`,
      label: `${name} in the liquid`,
      isLog: false,
      display: strength('liquid-strength'),
    })),
    { id: 'holdup', label: 'liquid hold-up', isLog: false, display: share },
    { id: 'liquidTemperature', label: 'liquid temperature', isLog: false, display: temperature },
    { id: 'gasTemperature', label: 'gas temperature', isLog: false, display: temperature },
    { id: 'floodApproach', label: 'approach to flood', isLog: false, display: share },
  ];
  return all.filter(({ id }) => map.fields[id] !== undefined);
}

/** The choice, or the first there is. */
export function chosenMap(packet: RunPacket, id: MapQuantity, units: Units): MapChoice | undefined {
  const choices = mapChoices(packet, units);
  return choices.find((c) => c.id === id) ?? choices[0];
}

/** How values turn into shares of the colour scale: the whole run on one scale. */
export interface ColorScale {
  /** In the unit shown. */ readonly low: number;
  readonly high: number;
  share(si: number): number;
}

/** Decades that a logarithmic scale shows at most. */
const MOST_DECADES = 4;

export function colorScale(map: BedMap, { id, isLog, display }: MapChoice): ColorScale {
  const field = map.fields[id] ?? new Float64Array();
  let low = Infinity;
  let high = -Infinity;
  for (const v of field) {
    if (v < low) low = v;
    if (v > high) high = v;
  }
  if (!(low <= high)) [low, high] = [0, 1];
  if (isLog && high > 0) low = Math.max(low, high / 10 ** MOST_DECADES);
  const f = (v: number): number => (isLog ? Math.log(Math.max(v, low)) : v);
  const a = f(low);
  const b = f(high);
  const share = (si: number): number => (b > a ? (f(si) - a) / (b - a) : 0.5);
  return { low: display.convert(low), high: display.convert(high), share };
}

/** Columns that a map is drawn with. */
const COLUMNS = 360;

export interface MapChartParts {
  readonly packet: RunPacket;
  readonly choice: MapChoice;
  readonly axis: TimeAxis;
  readonly units: Units;
  readonly palette: Palette;
  readonly height: number;
  readonly mostMarks: number;
}

/** The map as a chart. */
export function mapChart({ packet, choice, axis, units, palette, height, mostMarks }: MapChartParts): ChartSpec {
  const { map } = packet;
  const { cells } = map;
  const depth = displayOf({ kind: 'length', unit: 'm' }, units);
  const field = map.fields[choice.id] ?? new Float64Array();
  const scale = colorScale(map, choice);
  const x = Array.from({ length: COLUMNS }, (_, k) => axis.from + ((k + 0.5) * (axis.to - axis.from)) / COLUMNS);
  const z = Array.from({ length: cells }, (_, c) => x.map((t) => scale.share(fieldAt(map, field, c, t))));
  const edges = Array.from(map.edges, (d) => depth.convert(d));
  const bottom = edges[edges.length - 1] ?? 1;
  const layout = baseLayout(axis, palette, height, clockMarks(axis.from, axis.to, axis.upset, mostMarks), false);
  return {
    title: `${choice.label} along the bed`,
    heading: 'Bed map',
    summary: `Depth against time; ${choice.label} from ${formatNumber(scale.low, 3)} to ${formatNumber(scale.high, 3)} ${choice.display.unit}${choice.isLog ? ', logarithmic scale' : ''}.`,
    data: [
      {
        type: 'heatmap',
        x: Array.from({ length: COLUMNS + 1 }, (_, k) => axis.from + (k * (axis.to - axis.from)) / COLUMNS),
        y: edges,
        z,
        zmin: 0,
        zmax: 1,
        colorscale: CIVIDIS,
        showscale: false,
        hoverinfo: 'skip',
      },
    ],
    layout: {
      ...layout,
      yaxis: {
        ...layout.yaxis,
        range: [bottom, 0],
        title: { text: `depth, ${depth.unit}`, standoff: 4 },
        nticks: 5,
        showgrid: false,
      },
      xaxis: { ...layout.xaxis, showgrid: false },
      // Joints between beds.
      shapes: map.beds.slice(1).map((first) => ({
        type: 'line',
        xref: 'paper',
        x0: 0,
        x1: 1,
        y0: edges[first] ?? 0,
        y1: edges[first] ?? 0,
        line: { color: palette.paper, width: 2 },
      })),
    },
    table: () => ({
      columns: [
        'time from the upset [s]',
        ...Array.from({ length: cells }, (_, c) => {
          const middle = 0.5 * ((map.edges[c] ?? 0) + (map.edges[c + 1] ?? 0));
          return `${choice.label} at ${depth.text(middle, 3)} [${choice.display.unit}]`;
        }),
      ],
      rows: Array.from(map.time).flatMap((t, k) =>
        t < axis.from || t > axis.to
          ? []
          : [
              [
                t - axis.upset,
                ...Array.from({ length: cells }, (_, c) => choice.display.convert(field[k * cells + c] ?? Number.NaN)),
              ],
            ],
      ),
    }),
  };
}

/** Value of a cell at a time, on the straight line between two moments. */
export function fieldAt({ time, cells }: BedMap, field: Float64Array, cell: number, t: number): number {
  const k = Math.max(0, lastAt(time, t));
  const a = field[k * cells + cell] ?? Number.NaN;
  if (k + 1 >= time.length) return a;
  const t0 = time[k] ?? 0;
  const t1 = time[k + 1] ?? t0;
  const b = field[(k + 1) * cells + cell] ?? a;
  return t1 > t0 ? a + Math.min(Math.max((t - t0) / (t1 - t0), 0), 1) * (b - a) : a;
}
