/**
 * Several smooth functions of one variable, sampled once on a uniform grid and read back as cubics.
 * Values at the nodes are exact; slopes at the nodes are central differences of fourth order, so the reading is
 * C1 and its error falls with the fourth power of the spacing. Outside the grid the end cubics' tangents continue.
 */

/** Uniform grid and cubic coefficients; column `i` of interval `k` starts at 4 (k columns + i). */
export interface HermiteTable {
  readonly lower: number;
  readonly upper: number;
  readonly inverseSpacing: number;
  readonly intervals: number;
  readonly columns: number;
  readonly coefficients: Float64Array;
}

/**
 * Samples the functions.
 *
 * @param functions - One for each column; smooth on [lower, upper] and a little beyond (two spacings each side).
 * @param lower - Start of the grid.
 * @param upper - End of the grid, above `lower`.
 * @param intervals - Number of intervals, at least 1.
 */
export function createHermiteTable(
  functions: readonly ((x: number) => number)[],
  lower: number,
  upper: number,
  intervals: number,
): HermiteTable {
  const columns = functions.length;
  const spacing = (upper - lower) / intervals;
  const coefficients = new Float64Array(4 * columns * intervals);
  functions.forEach((f, i) => {
    // Values on the grid with two nodes beyond each end, for the central differences.
    const value = Float64Array.from({ length: intervals + 5 }, (_, k) => f(lower + (k - 2) * spacing));
    const slope = (k: number): number => (value[k] - 8 * value[k + 1] + 8 * value[k + 3] - value[k + 4]) / 12; // per spacing
    for (let k = 0; k < intervals; k++) {
      const v0 = value[k + 2];
      const v1 = value[k + 3];
      const d0 = slope(k);
      const d1 = slope(k + 1);
      const at = 4 * (k * columns + i);
      coefficients[at] = v0;
      coefficients[at + 1] = d0;
      coefficients[at + 2] = 3 * (v1 - v0) - 2 * d0 - d1;
      coefficients[at + 3] = 2 * (v0 - v1) + d0 + d1;
    }
  });
  return { lower, upper, inverseSpacing: 1 / spacing, intervals, columns, coefficients };
}

/** Reads all columns at `x` into `out[offset..]`. */
export function readHermiteTable(table: HermiteTable, x: number, out: Float64Array, offset: number): void {
  const columns = table.columns;
  const c = table.coefficients;
  let u = (x - table.lower) * table.inverseSpacing;
  let k = Math.floor(u);
  if (!(k >= 0)) k = 0; // also catches NaN, which then shows in the result
  if (k >= table.intervals) k = table.intervals - 1;
  u -= k;
  let at = 4 * k * columns;
  if (u >= 0 && u <= 1) {
    for (let i = 0; i < columns; i++, at += 4) {
      out[offset + i] = c[at] + u * (c[at + 1] + u * (c[at + 2] + u * c[at + 3]));
    }
    return;
  }
  const edge = u < 0 ? 0 : 1;
  for (let i = 0; i < columns; i++, at += 4) {
    const value = c[at] + edge * (c[at + 1] + c[at + 2] + c[at + 3]);
    const slope = c[at + 1] + edge * (2 * c[at + 2] + 3 * c[at + 3]);
    out[offset + i] = value + slope * (u - edge);
  }
}

/** Reads one column at `x`. */
export function readHermiteColumn(table: HermiteTable, column: number, x: number): number {
  const c = table.coefficients;
  let u = (x - table.lower) * table.inverseSpacing;
  let k = Math.floor(u);
  if (!(k >= 0)) k = 0;
  if (k >= table.intervals) k = table.intervals - 1;
  u -= k;
  const at = 4 * (k * table.columns + column);
  if (u >= 0 && u <= 1) return c[at] + u * (c[at + 1] + u * (c[at + 2] + u * c[at + 3]));
  const edge = u < 0 ? 0 : 1;
  const slope = c[at + 1] + edge * (2 * c[at + 2] + 3 * c[at + 3]);
  return c[at] + edge * (c[at + 1] + c[at + 2] + c[at + 3]) + slope * (u - edge);
}

/** Slope of one column at `x`: that of the cubics that are read, exactly. */
export function readHermiteSlope(table: HermiteTable, column: number, x: number): number {
  const c = table.coefficients;
  let u = (x - table.lower) * table.inverseSpacing;
  let k = Math.floor(u);
  if (!(k >= 0)) k = 0;
  if (k >= table.intervals) k = table.intervals - 1;
  u -= k;
  const within = u < 0 ? 0 : u > 1 ? 1 : u;
  const at = 4 * (k * table.columns + column);
  return table.inverseSpacing * (c[at + 1] + within * (2 * c[at + 2] + within * 3 * c[at + 3]));
}
