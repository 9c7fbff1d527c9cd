/** The norm in which local errors are measured: root mean square, each component in units of its tolerance. */

/** Weights atol + rtol*max(|a|, |b|) of each component, written to `out` [HairerNorsettWanner1993, II.4.11]. */
export function errorWeights(
  a: Float64Array,
  b: Float64Array,
  rtol: Float64Array,
  atol: Float64Array,
  out: Float64Array,
): void {
  for (let i = 0; i < out.length; i++) {
    const sizeA = Math.abs(a[i]);
    const sizeB = Math.abs(b[i]);
    out[i] = atol[i] + rtol[i] * (sizeA > sizeB ? sizeA : sizeB);
  }
}

/** sqrt(mean((e_i / w_i)^2)) over the weights' length; NaN where an entry is. A component at zero with weight zero counts nothing. */
export function weightedRms(e: Float64Array, weights: Float64Array): number {
  const n = weights.length;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    if (e[i] === 0) continue; // also spares 0/0 where atol = 0 and y = 0
    const ratio = e[i] / weights[i];
    sum += ratio * ratio;
  }
  return Math.sqrt(sum / n);
}

/** Index of the component that weighs most; a component that is not finite goes first. */
export function worstComponent(e: Float64Array, weights: Float64Array): number {
  let worst = 0;
  let largest = -1;
  for (let i = 0; i < weights.length; i++) {
    const ratio = Math.abs(e[i] / weights[i]);
    if (!Number.isFinite(e[i])) return i;
    if (ratio > largest) {
      largest = ratio;
      worst = i;
    }
  }
  return worst;
}

/** Index of the first entry among the first n that is not finite, or -1. */
export function firstNotFinite(v: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i++) sum += v[i];
  if (Number.isFinite(sum)) return -1;
  for (let i = 0; i < n; i++) if (!Number.isFinite(v[i])) return i;
  return -1; // only the sum overflowed
}
