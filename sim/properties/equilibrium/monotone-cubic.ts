// Interpolation through points without overshoot: where the points rise, so does the curve.

/** A curve through points; flat arrays of equal length, x strictly increasing. */
export interface MonotoneCurve {
  readonly x: Float64Array;
  readonly y: Float64Array;
  /** Slopes at the points. */
  readonly d: Float64Array;
}

/**
 * Monotone piecewise cubic by Fritsch and Carlson.
 *
 *   d_k from neighbouring secants (weighted harmonic mean, zero at a turning point), ends by three points
 *
 * @param x - Abscissae, strictly increasing; at least two.
 * @param y - Ordinates.
 * @returns The curve; once continuously differentiable, monotone on each interval, exact for a line.
 * @remarks Error: third order between smooth points, second where the limiter acts.
 * Source: [FritschCarlson1980] with the slopes of [FritschButland1984] (weighted for unequal
 *   spacing). Departs: end slopes are the three-point formula, limited to three times the secant.
 */
export function monotoneCubic(x: readonly number[], y: readonly number[]): MonotoneCurve {
  const n = x.length;
  const d = new Float64Array(n);
  const secant = (k: number): number => (y[k + 1] - y[k]) / (x[k + 1] - x[k]);
  for (let k = 1; k < n - 1; k++) {
    const left = secant(k - 1);
    const right = secant(k);
    if (left * right <= 0) continue;
    const hl = x[k] - x[k - 1];
    const hr = x[k + 1] - x[k];
    const w1 = 2 * hr + hl;
    const w2 = hr + 2 * hl;
    d[k] = (w1 + w2) / (w1 / left + w2 / right);
  }
  if (n === 2) {
    d[0] = secant(0);
    d[1] = d[0];
  } else if (n > 2) {
    d[0] = endSlope(x[1] - x[0], x[2] - x[1], secant(0), secant(1));
    d[n - 1] = endSlope(x[n - 1] - x[n - 2], x[n - 2] - x[n - 3], secant(n - 2), secant(n - 3));
  }
  return { x: Float64Array.from(x), y: Float64Array.from(y), d };
}

function endSlope(hNear: number, hFar: number, near: number, far: number): number {
  const slope = ((2 * hNear + hFar) * near - hNear * far) / (hNear + hFar);
  if (slope * near <= 0) return 0;
  if (near * far <= 0 && Math.abs(slope) > 3 * Math.abs(near)) return 3 * near;
  return Math.abs(slope) > 3 * Math.abs(near) ? 3 * near : slope;
}

/** Index of the interval that holds `at`; the first or the last when it lies outside. */
function interval(x: Float64Array, at: number): number {
  let low = 0;
  let high = x.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (x[middle] <= at) low = middle;
    else high = middle;
  }
  return low;
}

/** Ordinate at `at`; beyond the ends a straight line with the end slope. */
export function curveValue(curve: MonotoneCurve, at: number): number {
  const { x, y, d } = curve;
  const last = x.length - 1;
  if (at <= x[0]) return y[0] + d[0] * (at - x[0]);
  if (at >= x[last]) return y[last] + d[last] * (at - x[last]);
  const k = interval(x, at);
  const h = x[k + 1] - x[k];
  const s = (at - x[k]) / h;
  const r = 1 - s;
  return y[k] * r * r * (1 + 2 * s) + d[k] * h * s * r * r + y[k + 1] * s * s * (3 - 2 * s) - d[k + 1] * h * s * s * r;
}

/** Derivative at `at`; constant beyond the ends. */
export function curveSlope(curve: MonotoneCurve, at: number): number {
  const { x, y, d } = curve;
  const last = x.length - 1;
  if (at <= x[0]) return d[0];
  if (at >= x[last]) return d[last];
  const k = interval(x, at);
  const h = x[k + 1] - x[k];
  const s = (at - x[k]) / h;
  const r = 1 - s;
  return (6 * s * r * (y[k + 1] - y[k])) / h + d[k] * r * (1 - 3 * s) + d[k + 1] * s * (3 * s - 2);
}
