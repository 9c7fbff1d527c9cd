/** Averages over a trailing window, as limits judge them: exact integrals of straight lines. */

/**
 * Trailing mean of a series at its own times. Before the start the quantity stands at its first value.
 *
 * @param time - s, ascending.
 * @param window - s.
 */
export function trailingMean(time: ArrayLike<number>, value: ArrayLike<number>, window: number): Float64Array {
  const n = time.length;
  const sum = new Float64Array(n);
  for (let i = 1; i < n; i++) {
    const dt = (time[i] ?? 0) - (time[i - 1] ?? 0);
    sum[i] = (sum[i - 1] ?? 0) + 0.5 * dt * ((value[i] ?? 0) + (value[i - 1] ?? 0));
  }
  const start = time[0] ?? 0;
  const first = value[0] ?? 0;
  const out = new Float64Array(n);
  let k = 0;
  for (let i = 0; i < n; i++) {
    const from = (time[i] ?? 0) - window;
    let before: number;
    if (from <= start) before = (from - start) * first;
    else {
      while ((time[k + 1] ?? Infinity) <= from) k++;
      const t0 = time[k] ?? 0;
      const t1 = time[k + 1] ?? t0;
      const a = value[k] ?? 0;
      const b = value[k + 1] ?? a;
      const dt = from - t0;
      const at = t1 > t0 ? a + ((b - a) * dt) / (t1 - t0) : a;
      before = (sum[k] ?? 0) + 0.5 * dt * (a + at);
    }
    out[i] = ((sum[i] ?? 0) - before) / window;
  }
  return out;
}
