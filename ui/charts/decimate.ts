/** Fewer points that look the same: per bucket of the axis the first, lowest, highest and last one stay. */

/** Points of a line. */
export interface Points {
  readonly x: number[];
  readonly y: number[];
}

/** Buckets of a chart: each keeps up to four points, and a chart takes at most 2000. */
const BUCKETS = 480;

/**
 * The points of a series within a window, thinned out. The neighbours just outside stay, so that lines reach the edge.
 *
 * @param value - Of the same length as `time`; NaN leaves a gap.
 */
export function decimate(
  time: ArrayLike<number>,
  value: ArrayLike<number>,
  from: number,
  to: number,
  buckets = BUCKETS,
): Points {
  const n = time.length;
  let first = 0;
  while (first < n - 1 && (time[first + 1] ?? 0) < from) first++;
  let last = n - 1;
  while (last > first && (time[last - 1] ?? 0) > to) last--;
  const x: number[] = [];
  const y: number[] = [];
  const put = (i: number): void => {
    x.push(time[i] ?? Number.NaN);
    y.push(value[i] ?? Number.NaN);
  };
  if (last - first + 1 <= 4 * buckets) {
    for (let i = first; i <= last; i++) put(i);
    return { x, y };
  }
  const width = (to - from) / buckets;
  let i = first;
  while (i <= last) {
    const bucket = Math.floor(((time[i] ?? 0) - from) / width);
    let end = i;
    let low = i;
    let high = i;
    while (end + 1 <= last && Math.floor(((time[end + 1] ?? 0) - from) / width) === bucket) {
      end++;
      if ((value[end] ?? 0) < (value[low] ?? 0)) low = end;
      if ((value[end] ?? 0) > (value[high] ?? 0)) high = end;
    }
    for (const k of [...new Set([i, low, high, end])].sort((a, b) => a - b)) put(k);
    i = end + 1;
  }
  return { x, y };
}

/** Index of the last time that is not later; -1 before the first. Times ascend. */
export function lastAt(time: ArrayLike<number>, t: number): number {
  let low = -1;
  let high = time.length;
  while (high - low > 1) {
    const mid = (low + high) >> 1;
    if ((time[mid] ?? Infinity) <= t) low = mid;
    else high = mid;
  }
  return low;
}

/** Value at a time, on the straight line between two moments. */
export function valueAtTime(time: ArrayLike<number>, value: ArrayLike<number>, t: number): number {
  const i = lastAt(time, t);
  if (i < 0) return value[0] ?? Number.NaN;
  const a = value[i] ?? Number.NaN;
  if (i + 1 >= time.length) return a;
  const t0 = time[i] ?? 0;
  const t1 = time[i + 1] ?? 0;
  const b = value[i + 1] ?? a;
  return t1 > t0 ? a + ((b - a) * (t - t0)) / (t1 - t0) : a;
}
