/**
 * Raw instants: when true and shown values pass each setpoint, when alarms annunciate and interlocks act, when
 * commands are given and what the worst after them is. Every reported time can so say which pair it is made of.
 */
import type { Condition } from '../case/case.ts';
import { intervalsBeyond, peakOf, type Side } from './piecewise.ts';
import type {
  AlarmInstants,
  CommandInstant,
  InterlockInstants,
  LimitAnswer,
  SetpointCrossing,
} from './result-schema.ts';
import { instrumentTrace, milligramsPerNormal, onBasis, traceOf, type RunRecord } from './run-record.ts';

/** Slack with which a recorded crossing counts as not later than the act it led to, s. */
const SLACK = 1e-6;

/** Instants of each alarm. */
export function alarmInstants(record: RunRecord): AlarmInstants[] {
  return record.plant.alarms.map((alarm) => {
    const of = (kind: 'alarm' | 'alarm-cleared'): number[] =>
      record.events.filter((e) => e.kind === kind && e.tag === alarm.tag).map((e) => e.time);
    const annunciations = of('alarm');
    const condition = {
      instrument: alarm.instrument,
      kind: alarm.kind === 'high' ? 'above' : 'below',
      value: alarm.setpoint,
      holdFor: alarm.onDelay,
    } as const;
    return {
      tag: alarm.tag,
      setpoint: crossingOf(record, condition, annunciations[0]),
      onDelay: alarm.onDelay,
      annunciations,
      cleared: of('alarm-cleared'),
    };
  });
}

/** Instants of each interlock. */
export function interlockInstants(record: RunRecord): InterlockInstants[] {
  const { interlocksInService } = record.scenario;
  return record.plant.interlocks.map((interlock) => {
    const acts = record.events.filter((e) => e.kind === 'interlock' && e.tag === interlock.tag).map((e) => e.time);
    const decided = acts[0] === undefined ? undefined : acts[0] - interlock.delay;
    return {
      tag: interlock.tag,
      inService: interlocksInService === 'all' || interlocksInService.includes(interlock.tag),
      conditions: interlock.conditions.map((condition) => crossingOf(record, condition, decided)),
      acts,
    };
  });
}

/**
 * Crossings of a setpoint.
 *
 * @param held - When the condition had held long enough, s; its crossing is then exactly `holdFor` before that, if the
 *   record has a crossing there. Undefined: it never did.
 */
function crossingOf(record: RunRecord, condition: Condition, held: number | undefined): SetpointCrossing {
  const { instrument, kind: side, value, holdFor } = condition;
  const i = record.plant.instruments.findIndex((x) => x.tag === instrument);
  const starts = (which: 'truth' | 'shown'): number[] =>
    intervalsBeyond(instrumentTrace(record, i, which), value, side).map(({ from }) => from);
  const shown = starts('shown');
  const shownCrossing = held === undefined ? (shown[0] ?? null) : located(shown, held - holdFor, record);
  const truth = starts('truth');
  const before = shownCrossing === null ? undefined : lastNotAfter(truth, shownCrossing + SLACK);
  return { instrument, side, value, trueCrossing: before ?? truth[0] ?? null, shownCrossing };
}

/** The crossing that the run located at `t`, where the record has one within its spacing; else the last before. */
function located(recorded: readonly number[], t: number, record: RunRecord): number | null {
  const spacing = record.plant.run.recordEvery;
  const near = lastNotAfter(recorded, t + spacing);
  if (near === undefined) return recorded[0] ?? null;
  return Math.abs(near - t) <= spacing ? t : near;
}

function lastNotAfter(times: readonly number[], t: number): number | undefined {
  return times.filter((x) => x <= t).pop();
}

/** Commands and upsets, each with the worst of the headline quantity up to the next one. */
export function commandInstants(record: RunRecord, headline: LimitAnswer | undefined): CommandInstant[] {
  const given = record.events.filter((e) => e.kind === 'upset' || e.kind === 'action' || e.kind === 'interlock');
  const limit = record.plant.limits.find((l) => l.id === headline?.id);
  const end = record.time[record.time.length - 1];
  return given.map((event, i) => {
    const base = { time: event.time, by: event.kind as CommandInstant['by'], tag: event.tag, text: event.text };
    if (limit === undefined || headline === undefined) return { ...base, peakAfter: null };
    const next = given.slice(i + 1).find((e) => e.time > event.time)?.time ?? end;
    const trace = onBasis(record, limit, traceOf(record, headline.quantity));
    const rows = record.time.flatMap((t, k) => (t >= event.time && t <= next ? [k] : []));
    const side: Side = limit.kind === 'max' ? 'above' : 'below';
    const peak = peakOf({ time: rows.map((k) => trace.time[k]), value: rows.map((k) => trace.value[k]) }, side);
    if (!Number.isFinite(peak.value)) return { ...base, peakAfter: null };
    return { ...base, peakAfter: { ...peak, mgPerNm3: milligramsPerNormal(record.plant, limit.measured, peak.value) } };
  });
}
