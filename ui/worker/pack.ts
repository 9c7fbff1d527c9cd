/** A run (or what there is of one) as a packet for the page. Pure; knows the simulator, not the page. */
import {
  basisOf,
  inUnit,
  measuredSentence,
  resultOf,
  type Case,
  type LimitAnswer,
  type Measured,
  type Profile,
  type QuantityKind,
  type ResultDocument,
  type Run,
  type SetpointCrossing,
} from '../../sim/index.ts';
import type { BedMap, InstrumentLane, LimitLane, MapQuantity, RunPacket, Series, SetpointLine } from './packet.ts';
import type { Quality } from './protocol.ts';

/** Packs a run as it stands. */
export function packRun(run: Run, caseText: string, quality: Quality): RunPacket {
  const { series, profiles, ...document } = resultOf(run, { caseText });
  const { plant, scenario } = run;
  const truths = series.signals.filter((s) => s.sort === 'true');
  return {
    scenario: scenario.id,
    quality,
    plant,
    duration: scenario.duration,
    time: Float64Array.from(series.time),
    series: truths.map(seriesOf),
    instruments: plant.instruments.map((_, i) => laneOf(run, document, series.signals, i)),
    limits: document.answers.limits.flatMap((answer) => limitOf(plant, answer, truths)),
    map: packMap(plant, run.profiles),
    steps: document.events.flatMap(({ kind, tag, time }) =>
      (kind === 'upset' || kind === 'action') && tag !== '' ? [{ id: tag, time }] : [],
    ),
    document,
    sentence: {
      case: document.summary.sentence,
      si: measuredSentence(run, { ...document, series, profiles }, 'si'),
      us: measuredSentence(run, { ...document, series, profiles }, 'us'),
    },
  };
}

type Signal = ResultDocument['series']['signals'][number];

function numbers(values: readonly (number | null)[]): Float64Array {
  return Float64Array.from(values, (v) => v ?? Number.NaN);
}

function seriesOf({ id, label, kind, unit, values }: Signal): Series {
  return { id, label, kind: kind as QuantityKind, unit, value: numbers(values) };
}

/** SI values to the unit in which the page receives them: a strength in its own, the rest as they are. */
function toLaneUnit(plant: Case, measured: Measured, unit: string): (value: number) => number {
  if (!('solute' in measured)) return (value) => value;
  const basis = basisOf(plant, measured.solute, plant.liquid.feed.temperature);
  const scale = { quantity: measured.quantity, basis, range: undefined };
  return (value) => inUnit(value, unit, scale);
}

function laneOf(
  run: Run,
  document: Pick<ResultDocument, 'answers' | 'events'>,
  signals: readonly Signal[],
  i: number,
): InstrumentLane {
  const { plant, recorder } = run;
  const instrument = plant.instruments[i];
  if (instrument === undefined) throw new RangeError(`no instrument ${i}`);
  const { tag, measured, unit } = instrument;
  const signal = signals.find((s) => s.sort === 'shown' && s.id === tag);
  const convert = toLaneUnit(plant, measured, unit);
  const range = instrument.range;
  return {
    tag,
    label: signal?.label ?? tag,
    kind: (signal?.kind ?? 'fraction') as QuantityKind,
    unit: 'solute' in measured ? unit : (signal?.unit ?? '1'),
    ownUnit: unit,
    truth: Float64Array.from(recorder.truth, (row) => convert(row[i] ?? Number.NaN)),
    shown: Float64Array.from(recorder.shown, (row) => convert(row[i] ?? Number.NaN)),
    range: range === undefined ? undefined : [convert(range[0]), convert(range[1])],
    lines: linesOf(plant, document, tag, convert),
  };
}

/** Alarms, trips, starts and controller setpoints on an instrument. */
function linesOf(
  plant: Case,
  { answers, events }: Pick<ResultDocument, 'answers' | 'events'>,
  tag: string,
  convert: (v: number) => number,
): SetpointLine[] {
  const crossings = ({ trueCrossing, shownCrossing }: SetpointCrossing) => ({
    trueCrossings: trueCrossing === null ? [] : [trueCrossing],
    shownCrossings: shownCrossing === null ? [] : [shownCrossing],
  });
  const alarms = answers.instants.alarms
    .filter((a) => a.setpoint.instrument === tag)
    .map((a): SetpointLine => ({
      tag: a.tag,
      role: 'alarm',
      side: a.setpoint.side,
      value: convert(a.setpoint.value),
      ...crossings(a.setpoint),
      acts: a.annunciations,
      inService: true,
    }));
  const trips = answers.instants.interlocks.flatMap((interlock) =>
    interlock.conditions
      .filter((c) => c.instrument === tag)
      .map((c): SetpointLine => ({
        tag: interlock.tag,
        role: plant.interlocks.find((x) => x.tag === interlock.tag)?.kind ?? 'trip',
        side: c.side,
        value: convert(c.value),
        ...crossings(c),
        acts: events.filter((e) => e.kind === 'interlock' && e.tag === interlock.tag).map((e) => e.time),
        inService: interlock.inService,
      })),
  );
  return [...alarms, ...trips];
}

function limitOf(plant: Case, answer: LimitAnswer, truths: readonly Signal[]): LimitLane[] {
  const limit = plant.limits.find((l) => l.id === answer.id);
  const signal = truths.find((s) => s.id === answer.quantity);
  if (limit === undefined || signal === undefined) return [];
  const { measured, unit, basis, averaging } = limit;
  const convert = toLaneUnit(plant, measured, unit);
  const isGas = measured.quantity === 'gas-outlet' || measured.quantity === 'gas-inlet';
  const moisture =
    isGas && basis === 'dry' ? truths.find((s) => s.id === `${measured.quantity}.moisture`)?.values : undefined;
  const value = numbers(signal.values);
  if (moisture !== undefined) {
    for (let k = 0; k < value.length; k++) value[k] = (value[k] ?? Number.NaN) / (1 - (moisture[k] ?? 0));
  }
  return [
    {
      id: limit.id,
      label: answer.label,
      kind: signal.kind as QuantityKind,
      unit: 'solute' in measured ? unit : signal.unit,
      ownUnit: unit,
      basis: isGas ? basis : undefined,
      side: limit.kind,
      limit: convert(limit.value),
      value: value.map(convert),
      averaging: averaging.kind === 'none' ? undefined : averaging,
    },
  ];
}

/** Profiles as flat fields, of the first zone of each bed. */
export function packMap(plant: Case, profiles: readonly Profile[]): BedMap {
  const first = profiles[0]?.beds.filter((b) => b.zone === 1) ?? [];
  const cells = first.reduce((sum, b) => sum + b.rows.length, 0);
  const edges = [0];
  const beds: number[] = [];
  for (const { bed, rows } of first) {
    beds.push(edges.length - 1);
    const height = (plant.column.beds[bed - 1]?.height ?? 0) / rows.length;
    for (let c = 0; c < rows.length; c++) edges.push((edges[edges.length - 1] ?? 0) + height);
  }
  const rows = profiles.flatMap((p) => p.beds.filter((b) => b.zone === 1).flatMap((b) => b.rows));
  type Row = (typeof rows)[number];
  const field = (read: (row: Row) => number): Float64Array => Float64Array.from(rows, read);
  const fields: Partial<Record<MapQuantity, Float64Array>> = {
    holdup: field((r) => r.holdup),
    liquidTemperature: field((r) => r.liquidTemperature),
    gasTemperature: field((r) => r.gasTemperature),
  };
  if (rows.some((r) => r.floodApproach !== null)) fields.floodApproach = field((r) => r.floodApproach ?? Number.NaN);
  plant.solutes.forEach((_, k) => {
    fields[`gas.${k}`] = field((r) => r.gas[k] ?? Number.NaN);
    fields[`liquid.${k}`] = field((r) => r.liquid[k] ?? Number.NaN);
  });
  return {
    time: Float64Array.from(profiles, (p) => p.time),
    cells,
    edges: Float64Array.from(edges),
    beds,
    fields,
    liquidVelocity: field((r) => r.liquidVelocity),
    gasFlow: field((r) => r.gasFlow),
  };
}

/** The buffers of a packet, for transfer. */
export function buffersOf(value: unknown, found: ArrayBuffer[] = []): ArrayBuffer[] {
  if (ArrayBuffer.isView(value)) {
    if (value.buffer instanceof ArrayBuffer && !found.includes(value.buffer)) found.push(value.buffer);
  } else if (typeof value === 'object' && value !== null) {
    for (const item of Object.values(value)) if (typeof item === 'object' && item !== null) buffersOf(item, found);
  }
  return found;
}
