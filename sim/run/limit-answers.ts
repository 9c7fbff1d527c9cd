/** What became of each limit: peaks, times beyond, averages, recovery, mass over the permit; true and as shown. */
import type { Case, Limit } from '../case/case.ts';
import {
  averageIntervals,
  averagePeak,
  blockAverages,
  invalidTime,
  isValid,
  rollingAverage,
  type BlockAverage,
} from './averages.ts';
import {
  intervalsBeyond,
  peakOf,
  positiveIntegral,
  totalTime,
  type Interval,
  type Peak,
  type Side,
  type Trace,
} from './piecewise.ts';
import type { AverageAnswer, Exceedance, LimitAnswer, Point, Recovery } from './result-schema.ts';
import {
  badTimes,
  firstUpset,
  instrumentTrace,
  isGasStrength,
  isSameQuantity,
  milligramsPerNormal,
  onBasis,
  quantityIndex,
  recordedId,
  traceOf,
  type RunRecord,
} from './run-record.ts';

/** Band around the initial value within which a quantity counts as recovered, over its scale. */
export const RECOVERY_BAND = 0.05;

/** Answers by limit, in the case's order. */
export function limitAnswers(record: RunRecord): LimitAnswer[] {
  return record.plant.limits.map((limit) => limitAnswer(record, limit));
}

function limitAnswer(record: RunRecord, limit: Limit): LimitAnswer {
  const { plant } = record;
  const { measured, averaging } = limit;
  const id = recordedId(plant, measured);
  const observed = record.quantities[quantityIndex(record, id)];
  const side: Side = limit.kind === 'max' ? 'above' : 'below';
  const trace = onBasis(record, limit, traceOf(record, id));
  const mg = (value: number): number | null => milligramsPerNormal(plant, measured, value);
  const point = ({ time, value }: Peak): Point => ({ time, value, mgPerNm3: mg(value) });
  const over = exceedanceOf(intervalsBeyond(trace, limit.value, side));
  const average = averageOf(limit, trace, [], point);
  const judged = average === null ? over : average.over;
  return {
    id: limit.id,
    label: observed?.label ?? id,
    quantity: id,
    solute: 'solute' in measured ? plant.solutes[measured.solute].id : null,
    unit: observed?.unit ?? '1',
    shownUnit: limit.unit,
    kind: limit.kind,
    limit: { value: limit.value, mgPerNm3: mg(limit.value) },
    basis: limit.basis,
    averaging: { kind: averaging.kind, window: averaging.kind === 'none' ? null : averaging.window },
    initial: point({ time: trace.time[0], value: trace.value[0] }),
    peak: point(peakOf(trace, side)),
    over,
    average,
    shown: shownAnswers(record, limit, side, point),
    kept: isKept(limit, average, judged, side),
    massOver: massOver(record, limit),
    recovery: recoveryOf(record, limit, trace),
  };
}

/** Kept: never beyond; a finished or filled-up block counts like a moment. */
function isKept(limit: Limit, average: AverageAnswer | null, judged: Exceedance, side: Side): boolean {
  if (average?.blocks === null || average?.blocks === undefined) return judged.first === null;
  return !average.blocks.some((b) => b.value !== null && isBeyond(b.value, limit.value, side));
}

function isBeyond(value: number, limit: number, side: Side): boolean {
  return side === 'above' ? value > limit : value < limit;
}

function exceedanceOf(intervals: readonly Interval[]): Exceedance {
  return { intervals: [...intervals], first: intervals[0]?.from ?? null, total: totalTime(intervals) };
}

/** The average that a limit asks for; null when it asks for none. */
function averageOf(
  limit: Limit,
  trace: Trace,
  bad: readonly Interval[],
  point: (p: Peak) => Point,
): AverageAnswer | null {
  const { averaging } = limit;
  if (averaging.kind === 'none') return null;
  const side: Side = limit.kind === 'max' ? 'above' : 'below';
  const rolling = rollingAverage(trace, averaging.window, bad);
  const top = averagePeak(rolling, side);
  const rest = {
    invalidTime: invalidTime(rolling),
    leastValidShare: rolling.validShare.reduce((a, b) => Math.min(a, b), 1),
  };
  if (averaging.kind === 'rolling') {
    const over = exceedanceOf(averageIntervals(rolling, limit.value, side));
    return { peak: top === undefined ? null : point(top), over, blocks: null, worstAlignment: null, ...rest };
  }
  const blocks = blockAverages(trace, averaging.window, bad);
  const valid = blocks.filter((b) => isValid(b.validShare));
  const worst = worstBlock(valid, side);
  return {
    peak: worst === undefined ? null : point({ time: worst.to, value: worst.value }),
    over: exceedanceOf(
      valid
        .filter((b) => isBeyond(b.value, limit.value, side))
        .map(({ from, to, complete }) => ({ from, to, open: !complete })),
    ),
    blocks: blocks.map((b) => ({ ...b, value: isValid(b.validShare) ? b.value : null })),
    worstAlignment: top === undefined ? null : point(top),
    ...rest,
  };
}

function worstBlock(blocks: readonly BlockAverage[], side: Side): BlockAverage | undefined {
  const sign = side === 'above' ? 1 : -1;
  return blocks.reduce<BlockAverage | undefined>(
    (worst, b) => (worst === undefined || sign * b.value > sign * worst.value ? b : worst),
    undefined,
  );
}

/** The same figures from what the control room sees; dry gas by the true moisture. */
function shownAnswers(record: RunRecord, limit: Limit, side: Side, point: (p: Peak) => Point): LimitAnswer['shown'] {
  return record.plant.instruments.flatMap((instrument, i) => {
    if (!isSameQuantity(instrument.measured, limit.measured)) return [];
    const raw = instrumentTrace(record, i, 'shown');
    const trace = onBasis(record, limit, raw);
    const bad = badTimes(record, instrument.tag);
    const peak = peakOf(trace, side, false);
    const end = instrument.range?.[side === 'above' ? 1 : 0];
    const at = Array.from(raw.time).indexOf(peak.time);
    return [
      {
        instrument: instrument.tag,
        peak: point(peak),
        atRangeEnd: end !== undefined && raw.value[at] === end,
        bad,
        average: averageOf(limit, trace, bad, point),
      },
    ];
  });
}

/**
 * Mass emitted above a limit of the gas outlet, kg:  M integral max(0, n_solute - y_limit G) dt,  G dry where the
 * limit is. Null for other limits.
 */
function massOver(record: RunRecord, limit: Limit): number | null {
  const { measured, kind } = limit;
  if (kind !== 'max' || !isGasStrength(measured) || measured.quantity !== 'gas-outlet') return null;
  const solute = record.plant.solutes[measured.solute];
  const emitted = traceOf(record, `stack-flow.${solute.id}`).value;
  const gas = traceOf(record, 'stack-flow').value;
  const moisture = traceOf(record, 'gas-outlet.moisture').value;
  const value = record.time.map((_, i) => {
    const share = limit.basis === 'dry' ? 1 - moisture[i] : 1;
    return emitted[i] - limit.value * share * gas[i];
  });
  return solute.molarMass * positiveIntegral({ time: record.time, value });
}

/** Scale of the recovery band: the larger of initial value and limit; for temperatures their distance. */
function recoveryScale(plant: Case, limit: Limit, initial: number): number {
  if (limit.measured.quantity.endsWith('temperature')) return Math.abs(limit.value - initial);
  return Math.max(Math.abs(initial), Math.abs(limit.value));
}

/** When a limited quantity is back within the band around its initial value, for good. */
function recoveryOf(record: RunRecord, limit: Limit, trace: Trace): Recovery {
  const initial = trace.value[0];
  const band = RECOVERY_BAND * recoveryScale(record.plant, limit, initial);
  const start = firstUpset(record) ?? 0;
  if (record.scenario.initial !== 'steady') return { outcome: 'no-steady-start', band, time: null, after: null };
  const away = intervalsBeyond(
    { time: trace.time, value: Array.from(trace.value, (v) => Math.abs(v - initial)) },
    band,
    'above',
  );
  const last = away[away.length - 1];
  if (last === undefined) return { outcome: 'never-left', band, time: null, after: null };
  if (last.open) return { outcome: 'not-recovered', band, time: null, after: null };
  return { outcome: 'recovered', band, time: last.to, after: last.to - start };
}
