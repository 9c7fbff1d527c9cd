/**
 * A record as straight lines between points: integrals, crossings and peaks of it. Two points at one time are a step.
 * Knows no plant. Everything here is exact for the record itself; what lies between the points is the record's business.
 */

/** Points in order of time. */
export interface Trace {
  /** s, not descending. */ readonly time: ArrayLike<number>;
  readonly value: ArrayLike<number>;
}

/** A stretch of time; `open` when it lasts to the end of the record. */
export interface Interval {
  readonly from: number;
  readonly to: number;
  readonly open: boolean;
}

/** A moment and the value there. */
export interface Peak {
  readonly time: number;
  readonly value: number;
}

/** Which way is over the limit. */
export type Side = 'above' | 'below';

/** Intervals of neighbouring points that differ by more than this factor make no parabola: the points frame a kink. */
const MOST_UNEVEN = 4;

/** Integral of a trace from its start to any t; before its start it stands at its first value, after its end at its last. */
export function runningIntegral(trace: Trace): (t: number) => number {
  const { time, value } = trace;
  const n = time.length;
  const sum = new Float64Array(n);
  for (let i = 1; i < n; i++) sum[i] = sum[i - 1] + 0.5 * (value[i] + value[i - 1]) * (time[i] - time[i - 1]);
  return (t) => {
    if (n === 0) return 0;
    if (t <= time[0]) return value[0] * (t - time[0]);
    if (t >= time[n - 1]) return sum[n - 1] + value[n - 1] * (t - time[n - 1]);
    const i = lastAtOrBefore(time, t);
    const dt = t - time[i];
    const slope = (value[i + 1] - value[i]) / (time[i + 1] - time[i]);
    return sum[i] + dt * (value[i] + 0.5 * slope * dt);
  };
}

/** Integral over the whole trace of what is above zero. */
export function positiveIntegral(trace: Trace): number {
  const { time, value } = trace;
  let sum = 0;
  for (let i = 1; i < time.length; i++) {
    const dt = time[i] - time[i - 1];
    const a = value[i - 1];
    const b = value[i];
    if (a >= 0 && b >= 0) sum += 0.5 * (a + b) * dt;
    else if (a > 0) sum += (0.5 * a * a * dt) / (a - b);
    else if (b > 0) sum += (0.5 * b * b * dt) / (b - a);
  }
  return sum;
}

/** Value at t; at a step the later one. Before the start the first value, after the end the last. */
export function valueAt(trace: Trace, t: number): number {
  const { time, value } = trace;
  const n = time.length;
  if (n === 0) return Number.NaN;
  if (t < time[0]) return value[0];
  if (t >= time[n - 1]) return value[n - 1];
  const i = lastAtOrBefore(time, t);
  return value[i] + ((value[i + 1] - value[i]) * (t - time[i])) / (time[i + 1] - time[i]);
}

/** Times within which the trace is beyond a level; touching it does not count. */
export function intervalsBeyond(trace: Trace, level: number, side: Side): Interval[] {
  const { time, value } = trace;
  const n = time.length;
  const beyond = (v: number): boolean => (side === 'above' ? v > level : v < level);
  const found: Interval[] = [];
  let from: number | undefined = n > 0 && beyond(value[0]) ? time[0] : undefined;
  for (let i = 1; i < n; i++) {
    const before = beyond(value[i - 1]);
    const after = beyond(value[i]);
    if (before === after) continue;
    const t = time[i - 1] + ((level - value[i - 1]) / (value[i] - value[i - 1])) * (time[i] - time[i - 1]);
    if (after) from = t;
    else if (from !== undefined) {
      found.push({ from, to: t, open: false });
      from = undefined;
    }
  }
  if (from !== undefined) found.push({ from, to: time[n - 1], open: true });
  return found;
}

/** Sum of the lengths, s. */
export function totalTime(intervals: readonly Interval[]): number {
  return intervals.reduce((sum, { from, to }) => sum + (to - from), 0);
}

/**
 * Highest (or lowest) value and its time, refined by the parabola through the extreme point and its neighbours where
 * these frame a smooth top: not beside a step, not between very unlike intervals, not at the ends.
 *
 * @param refine - False for signals with corners of their own (noise, sampling): the highest point itself.
 */
export function peakOf(trace: Trace, side: Side, refine = true): Peak {
  const { time, value } = trace;
  const n = time.length;
  const sign = side === 'above' ? 1 : -1;
  let best = -1;
  for (let i = 0; i < n; i++) {
    if (Number.isFinite(value[i]) && (best < 0 || sign * value[i] > sign * value[best])) best = i;
  }
  if (best < 0) return { time: Number.NaN, value: Number.NaN };
  const found = { time: time[best], value: value[best] };
  if (!refine || best === 0 || best === n - 1) return found;
  const left = time[best] - time[best - 1];
  const right = time[best + 1] - time[best];
  if (!(left > 0 && right > 0) || Math.max(left, right) > MOST_UNEVEN * Math.min(left, right)) return found;
  return vertex(time[best - 1], value[best - 1], time[best], value[best], time[best + 1], value[best + 1]) ?? found;
}

/**
 * Extreme point of the parabola through three points, the times ascending; undefined where it is a line or the
 * extreme lies outside.
 */
export function vertex(t0: number, v0: number, t1: number, v1: number, t2: number, v2: number): Peak | undefined {
  const s01 = (v1 - v0) / (t1 - t0);
  const s12 = (v2 - v1) / (t2 - t1);
  const curvature = (s12 - s01) / (t2 - t0);
  const slope = s01 + curvature * (t1 - t0); // at t1
  if (curvature === 0) return undefined;
  const dt = -slope / (2 * curvature);
  const t = t1 + dt;
  if (!(t >= t0 && t <= t2)) return undefined;
  return { time: t, value: v1 + 0.5 * slope * dt };
}

/** Index i with time[i] <= t < time[i + 1]; t within the trace and before its end. */
function lastAtOrBefore(time: ArrayLike<number>, t: number): number {
  let low = 0;
  let high = time.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (time[middle] <= t) low = middle;
    else high = middle;
  }
  return low;
}
