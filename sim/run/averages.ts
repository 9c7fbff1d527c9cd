/**
 * Averages over a permit's averaging time, exact for the recorded straight lines. The history before the record is its
 * first value: a run starts at rest. Stretches of bad data are left out; what is left must be a stated share of the
 * window, else the average is marked invalid.
 */
import { bracketedRoot } from '../numerics/bracketed-root.ts';
import { runningIntegral, vertex, type Interval, type Peak, type Side, type Trace } from './piecewise.ts';

/** Least share of valid data in a window for a valid average. Engineering judgement: two thirds; permits differ. */
export const LEAST_VALID_SHARE = 2 / 3;
/** Slack on it: rounding at the very moment at which an average turns valid. */
const SHARE_SLACK = 1e-9;
/** Root tolerance of times, s. */
const TIME_TOLERANCE = 1e-9;

/** Whether a share of valid data makes a valid average. */
export function isValid(share: number): boolean {
  return share >= LEAST_VALID_SHARE - SHARE_SLACK;
}

/** An average that runs with time. */
export interface RollingAverage {
  /** Moments between which the average is monotone, s, and its values there (NaN without any valid data). */
  readonly time: readonly number[];
  readonly value: readonly number[];
  /** Share of valid data in the window, 0..1. */ readonly validShare: readonly number[];
  /** At any time of the record. */ readonly at: (t: number) => number;
}

/** One block of a block average. */
export interface BlockAverage {
  readonly from: number;
  readonly to: number;
  readonly value: number;
  readonly validShare: number;
  /** False for the last block when the record ends within it: filled up with the last value. */
  readonly complete: boolean;
}

/** Mean over any window, and its share of valid data. */
function windowMean(
  trace: Trace,
  bad: readonly Interval[],
): (from: number, to: number) => { mean: number; share: number } {
  const integral = runningIntegral(trace);
  return (from, to) => {
    let sum = integral(to) - integral(from);
    let length = to - from;
    for (const stretch of bad) {
      const a = Math.max(from, stretch.from);
      const b = Math.min(to, stretch.to);
      if (b <= a) continue;
      sum -= integral(b) - integral(a);
      length -= b - a;
    }
    const share = length / (to - from);
    return { mean: share > 1e-9 ? sum / length : Number.NaN, share: Math.max(0, share) };
  };
}

/**
 * Mean over the last `window` seconds, at every t of the record.
 *
 * @param bad - Stretches to leave out, in order, not overlapping.
 */
export function rollingAverage(trace: Trace, window: number, bad: readonly Interval[] = []): RollingAverage {
  const { time: t } = trace;
  const first = t[0];
  const last = t[t.length - 1];
  const mean = windowMean(trace, bad);
  const marks = new Set<number>();
  const mark = (at: number): void => {
    if (at >= first && at <= last) marks.add(at);
  };
  for (let i = 0; i < t.length; i++) {
    mark(t[i]);
    mark(t[i] + window);
  }
  for (const { from, to } of bad) for (const edge of [from, to]) for (const at of [edge, edge + window]) mark(at);
  const breaks = [...marks].sort((a, b) => a - b);
  // Between marks the valid share is a straight line: where it passes the least share, validity changes.
  const shares = breaks.map((b) => mean(b - window, b).share);
  breaks.slice(1).forEach((b, i) => {
    const from = shares[i] - LEAST_VALID_SHARE;
    const to = shares[i + 1] - LEAST_VALID_SHARE;
    if (from * to < 0) mark(breaks[i] + (from / (from - to)) * (b - breaks[i]));
  });
  breaks.splice(0, breaks.length, ...[...marks].sort((a, b) => a - b));
  const time: number[] = [];
  const value: number[] = [];
  const validShare: number[] = [];
  const at = (when: number): number => mean(when - window, when).mean;
  const put = (when: number): void => {
    const m = mean(when - window, when);
    time.push(when);
    value.push(m.mean);
    validShare.push(m.share);
  };
  breaks.forEach((b, i) => {
    if (i > 0) {
      // Between breaks the average is a parabola: its top, if it has one inside, is a moment of its own.
      const a = breaks[i - 1];
      const middle = 0.5 * (a + b);
      const top = vertex(a, value[value.length - 1], middle, at(middle), b, at(b));
      if (top !== undefined && top.time > a && top.time < b) put(top.time);
    }
    put(b);
  });
  return { time, value, validShare, at };
}

/** Extreme of an average among its valid moments; undefined when none is valid. */
export function averagePeak(average: RollingAverage, side: Side): Peak | undefined {
  const sign = side === 'above' ? 1 : -1;
  let best: Peak | undefined;
  average.time.forEach((time, i) => {
    const value = average.value[i];
    if (!isValid(average.validShare[i]) || !Number.isFinite(value)) return;
    if (best === undefined || sign * value > sign * best.value) best = { time, value };
  });
  return best;
}

/** Times within which an average is beyond a level; invalid moments do not count as beyond. */
export function averageIntervals(average: RollingAverage, level: number, side: Side): Interval[] {
  const { time, value, validShare } = average;
  const beyond = (i: number): boolean =>
    isValid(validShare[i]) && (side === 'above' ? value[i] > level : value[i] < level);
  const found: Interval[] = [];
  let from: number | undefined;
  for (let i = 0; i < time.length; i++) {
    const now = beyond(i);
    if (now === (from !== undefined)) continue;
    const t = i === 0 ? time[0] : crossingTime(average, i, level);
    if (now) from = t;
    else if (from !== undefined) {
      found.push({ from, to: t, open: false });
      from = undefined;
    }
  }
  if (from !== undefined) found.push({ from, to: time[time.length - 1], open: true });
  return found;
}

/** Where the average passes the level between moments i - 1 and i; the later moment where it turns valid or invalid. */
function crossingTime({ time, value, at }: RollingAverage, i: number, level: number): number {
  const ga = value[i - 1] - level;
  const gb = value[i] - level;
  if (!(ga * gb < 0)) return ga === 0 ? time[i - 1] : time[i];
  return bracketedRoot((t) => at(t) - level, time[i - 1], time[i], ga, gb, TIME_TOLERANCE).after;
}

/** Time without a valid average, s. */
export function invalidTime({ time, validShare }: RollingAverage): number {
  let sum = 0;
  for (let i = 1; i < time.length; i++) {
    if (0.5 * (validShare[i] + validShare[i - 1]) < LEAST_VALID_SHARE) sum += time[i] - time[i - 1];
  }
  return sum;
}

/** Means over blocks that follow each other from the start of the record. */
export function blockAverages(trace: Trace, window: number, bad: readonly Interval[] = []): BlockAverage[] {
  const { time } = trace;
  const first = time[0];
  const last = time[time.length - 1];
  const mean = windowMean(trace, bad);
  const blocks: BlockAverage[] = [];
  for (let k = 0; k === 0 || first + k * window < last; k++) {
    const from = first + k * window;
    const to = from + window;
    const m = mean(from, to);
    blocks.push({ from, to, value: m.mean, validShare: m.share, complete: to <= last });
  }
  return blocks;
}
