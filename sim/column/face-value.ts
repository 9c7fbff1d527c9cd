/**
 * Face values of a quantity carried along a chain of cells whose states are cell means.
 * The interior form is the exact reconstruction of a + b exp(c z), the steady profile of a linear counter-current
 * bed; it is bounded by its neighbours, so it does not ring. The inlet form puts the same exponential through the
 * known inlet value and the first two means; the outlet form carries the last ratio on, as long as that is a profile.
 * Derivations: from the three means, or the inlet value and two means, of a + b exp(c z) on a uniform grid.
 */

/** Value at a face and its slopes to the three values it was made of (order of the arguments). */
export interface FaceValue {
  value: number;
  d1: number;
  d2: number;
  d3: number;
}

/** Differences below this are rounding of a flat profile. */
const FLAT = 1e-280;

/**
 * p(r) = r (r ln r - r + 1)/(r - 1)^2 and its slope; 0 for r <= 0, at most 1.
 * Near r = 1 the series of the quotient (five terms; next one below 1e-9 at the switch).
 */
function weight(r: number, out: { p: number; dp: number }): void {
  if (r <= 0) {
    out.p = 0;
    out.dp = 0;
    return;
  }
  if (r > 4) {
    out.p = 1; // reached at r = 3.4
    out.dp = 0;
    return;
  }
  const e = r - 1;
  if (Math.abs(e) < 0.02) {
    out.p = 1 / 2 + e * (1 / 3 + e * (-1 / 12 + e * (1 / 30 - e / 60)));
    out.dp = 1 / 3 + e * (-1 / 6 + e * (1 / 10 - e / 15));
    return;
  }
  const l = Math.log(r);
  const i = 1 / e;
  const i2 = i * i;
  const n = r * (r * l - e);
  const p = n * i2;
  if (p >= 1) {
    out.p = 1;
    out.dp = 0;
    return;
  }
  out.p = p;
  out.dp = (2 * r * l - e) * i2 - 2 * p * i;
}

const w = { p: 0, dp: 0 };

/** Face leaving cell `c`, with `u` its upstream and `d` its downstream neighbour; slopes to (u, c, d). */
export function interiorFace(u: number, c: number, d: number, out: FaceValue): void {
  const delta = c - u;
  const next = d - c;
  if (!(delta * next > FLAT)) {
    out.value = c;
    out.d1 = 0;
    out.d2 = 1;
    out.d3 = 0;
    return;
  }
  const r = next / delta;
  weight(r, w);
  out.value = c + w.p * delta;
  out.d1 = -w.p + w.dp * r;
  out.d2 = 1 + w.p - w.dp * (1 + r);
  out.d3 = w.dp;
}

/**
 * Ratio of two successive differences above which they are a front passing through, not a profile: a resolved bed's
 * stay below exp(|NOG (1 - 1/A)|/N), some 2. From there the outlet's extrapolation fades.
 */
const FRONT_RATIO = 4;
/** Least outlet value over the last mean where the profile falls: what is not negative stays so. */
const LEAST_SHARE = 0.5;

/** Face leaving the last cell `c`, with `u` and `uu` upstream; slopes to (uu, u, c). */
export function outletFace(uu: number, u: number, c: number, out: FaceValue): void {
  const delta = c - u;
  const before = u - uu;
  if (!(delta * before > FLAT)) {
    out.value = c;
    out.d1 = 0;
    out.d2 = 0;
    out.d3 = 1;
    return;
  }
  const r = delta / before;
  if (r < FRONT_RATIO) {
    weight(r, w);
  } else {
    const fade = FRONT_RATIO / r;
    w.p = fade * fade;
    w.dp = (-2 * w.p) / r;
  }
  const value = c + w.p * delta;
  if (delta < 0 && value < LEAST_SHARE * c) {
    out.value = LEAST_SHARE * c;
    out.d1 = 0;
    out.d2 = 0;
    out.d3 = LEAST_SHARE;
    return;
  }
  out.value = value;
  out.d1 = w.dp * r * r;
  out.d2 = -w.p - w.dp * r * (1 + r);
  out.d3 = 1 + w.p + w.dp * r;
}

/** Upper bound of the inlet weight: the inlet lies half a cell from the mean, so this doubles the interior's 1. */
const INLET_WEIGHT_LIMIT = 2;
const INLET_NODES = 600;
const INLET_RANGE = Math.log1p(40); // beyond s = 40 the weight is at its limit

/** Ratio of the first two differences, and the inlet weight, for the growth factor q = exp(lnq) of one cell. */
function inletShape(lnq: number): { s: number; p: number } {
  if (Math.abs(lnq) < 1e-3) {
    // Series in lnq of the quotients below.
    return { s: 2 + (4 / 3) * lnq + (5 / 9) * lnq * lnq, p: 1 + lnq / 3 + (lnq * lnq) / 18 };
  }
  const q = Math.exp(lnq);
  const denominator = Math.expm1(lnq) - lnq;
  return { s: (q - 1) ** 2 / denominator, p: (q * lnq - q + 1) / denominator };
}

/** Inlet weight against ln(1 + s): values and slopes at the nodes of a uniform grid. */
const inletTable = ((): { p: Float64Array; dp: Float64Array } => {
  const p = new Float64Array(INLET_NODES + 1);
  for (let k = 0; k <= INLET_NODES; k++) {
    const s = Math.expm1((INLET_RANGE * k) / INLET_NODES);
    if (s < 0.02) {
      p[k] = s; // q < exp(-50): the weight is s to the last digit
      continue;
    }
    let low = -60;
    let high = 12;
    for (let i = 0; i < 90; i++) {
      const middle = 0.5 * (low + high);
      if (inletShape(middle).s < s) low = middle;
      else high = middle;
    }
    p[k] = Math.min(inletShape(0.5 * (low + high)).p, 10);
  }
  const dp = new Float64Array(INLET_NODES + 1);
  for (let k = 0; k <= INLET_NODES; k++) {
    const a = Math.max(0, k - 1);
    const b = Math.min(INLET_NODES, k + 1);
    dp[k] = (p[b] - p[a]) / (b - a);
  }
  return { p, dp };
})();

/** Face leaving the first cell (mean `c1`, next mean `c2`) behind an inlet of value `f`; slopes to (f, c1, c2). */
export function inletFace(f: number, c1: number, c2: number, out: FaceValue): void {
  const delta = c1 - f;
  const next = c2 - c1;
  if (!(delta * next > FLAT)) {
    out.value = c1;
    out.d1 = 0;
    out.d2 = 1;
    out.d3 = 0;
    return;
  }
  const s = next / delta;
  let p: number;
  let dp: number;
  const u = (Math.log1p(s) * INLET_NODES) / INLET_RANGE;
  const k = Math.floor(u);
  if (!(k < INLET_NODES)) {
    p = INLET_WEIGHT_LIMIT;
    dp = 0;
  } else {
    const v = u - k;
    const p0 = inletTable.p[k];
    const p1 = inletTable.p[k + 1];
    const d0 = inletTable.dp[k];
    const d1 = inletTable.dp[k + 1];
    const b = 3 * (p1 - p0) - 2 * d0 - d1;
    const a = 2 * (p0 - p1) + d0 + d1;
    p = p0 + v * (d0 + v * (b + v * a));
    dp = ((d0 + v * (2 * b + 3 * v * a)) * (INLET_NODES / INLET_RANGE)) / (1 + s);
    if (p >= INLET_WEIGHT_LIMIT) {
      p = INLET_WEIGHT_LIMIT;
      dp = 0;
    } else if (p > s) {
      p = s; // exact for s -> 0, where the table may be above it by its own error: never past the second mean
      dp = 1;
    }
  }
  out.value = c1 + p * delta;
  out.d1 = -p + dp * s;
  out.d2 = 1 + p - dp * (1 + s);
  out.d3 = dp;
}
