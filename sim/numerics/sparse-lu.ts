/**
 * Sparse LU of `shift*M - J` in the row order given, without row exchanges: rows are eliminated upward, panel by
 * panel (sparse-symbolic.ts). This is the hottest code of an implicit integration. Two target rows and four pivot
 * rows are combined at a time, so that one load of U serves eight products. Order the unknowns so that
 * diagonals are strong; a pivot lost to cancellation is reported, not repaired.
 */

import {
  eliminateFourFromOne,
  eliminateFourFromTwo,
  eliminateOneFromOne,
  eliminateThreeFromTwo,
  eliminateTwoFromTwo,
} from './panel-kernels.ts';
import type { ShiftedSolver } from './shifted-solver.ts';
import { symbolicFactors } from './sparse-symbolic.ts';
import type { Panel } from './sparse-symbolic.ts';
import type { SparsePattern } from './sparse-pattern.ts';

/**
 * A pivot below this share of the largest value its place held during elimination has no digit left: 4 unit
 * roundings. Measured on the diagonal's own history, because entries of one row differ by units.
 */
const PIVOT_FLOOR = 4 * Number.EPSILON;
/** Pivot rows the widest kernel takes at once. */
const PIVOT_ROWS = 4;

/**
 * Solver for `shift*M - J` on a fixed pattern; fill-in and all memory are settled here.
 *
 * @param mass - Diagonal of M, length n, 1 for states and 0 for auxiliary unknowns; all ones when absent.
 */
export function createSparseSolver(pattern: SparsePattern, mass?: Float64Array): ShiftedSolver {
  const { n } = pattern;
  const { panels, entryPlace, diagonalPlace, size } = symbolicFactors(pattern);
  const values = new Float64Array(size); // L below (multipliers), U on and above the diagonal
  const inversePivot = new Float64Array(n);
  const pivotScale = new Float64Array(n); // largest value each diagonal place has held
  const massDiagonal = mass === undefined ? new Float64Array(n).fill(1) : Float64Array.from(mass);

  function factor(shift: number, jacobian: Float64Array): boolean {
    values.fill(0);
    for (let e = 0; e < entryPlace.length; e++) values[entryPlace[e]] = -jacobian[e];
    for (let i = 0; i < n; i++) {
      const place = diagonalPlace[i];
      const diagonal = values[place] + shift * massDiagonal[i];
      values[place] = diagonal;
      pivotScale[i] = Math.abs(diagonal);
    }
    for (let p = 0; p < panels.length; p++) {
      const panel = panels[p];
      const rows = panel.last - panel.first;
      for (let q = 0; q < panel.sources.length; q++) {
        const { panel: pivots, places } = panel.sources[q];
        eliminate(values, panel, 0, rows, pivots, places, 0, pivots.last - pivots.first, inversePivot);
        notePivots(panel, 0);
      }
      if (!factorPanel(panel)) return false;
    }
    return true;
  }

  function notePivots(panel: Panel, fromRow: number): void {
    for (let i = panel.first + fromRow; i < panel.last; i++) {
      const held = Math.abs(values[diagonalPlace[i]]);
      if (held > pivotScale[i]) pivotScale[i] = held;
    }
  }

  /** Factors the panel's own columns, four rows at a time, and takes the reciprocal pivots. */
  function factorPanel(panel: Panel): boolean {
    const rows = panel.last - panel.first;
    for (let k = 0; k < rows; k += PIVOT_ROWS) {
      const to = Math.min(k + PIVOT_ROWS, rows);
      for (let r = k; r < to; r++) {
        if (!takePivot(panel.first + r)) return false;
        if (r + 1 < to) {
          eliminate(values, panel, r + 1, to, panel, panel.ownPlaces, r, r + 1, inversePivot);
          notePivots(panel, r + 1);
        }
      }
      if (to < rows) {
        eliminate(values, panel, to, rows, panel, panel.ownPlaces, k, to, inversePivot);
        notePivots(panel, to);
      }
    }
    return true;
  }

  function takePivot(i: number): boolean {
    const pivot = values[diagonalPlace[i]];
    const pivotSize = Math.abs(pivot);
    inversePivot[i] = 1 / pivot;
    // Written so that NaN counts as singular.
    return pivotSize > PIVOT_FLOOR * pivotScale[i] && pivotSize < Infinity;
  }

  function solve(b: Float64Array): void {
    for (let p = 0; p < panels.length; p++) forwardPanel(values, panels[p], b);
    for (let p = panels.length - 1; p >= 0; p--) backwardPanel(values, panels[p], inversePivot, b);
  }

  return { n, factor, solve };
}

/** Eliminates pivot rows `from` .. `to`-1 of a panel from rows rFirst .. rLast-1 of `panel`, which may be the same one. */
function eliminate(
  values: Float64Array,
  panel: Panel,
  rFirst: number,
  rLast: number,
  pivots: Panel,
  places: Int32Array,
  from: number,
  to: number,
  inverse: Float64Array,
): void {
  const stride = pivots.width;
  const start = pivots.base + pivots.own;
  const width = panel.width;
  let k = from;
  for (; k + 4 <= to; k += 4) {
    const pivotRow = start + k * stride;
    const at = pivots.first + k;
    let row = panel.base + rFirst * width;
    let r = rFirst;
    for (; r + 2 <= rLast; r += 2, row += 2 * width) {
      eliminateFourFromTwo(values, row, row + width, places, k, pivotRow, stride, inverse, at);
    }
    if (r < rLast) eliminateFourFromOne(values, row, places, k, pivotRow, stride, inverse, at);
  }
  if (k + 3 === to) {
    const pivotRow = start + k * stride;
    const at = pivots.first + k;
    let row = panel.base + rFirst * width;
    let r = rFirst;
    for (; r + 2 <= rLast; r += 2, row += 2 * width) {
      eliminateThreeFromTwo(values, row, row + width, places, k, pivotRow, stride, inverse, at);
    }
    if (r < rLast) eliminateSingly(values, row, places, k, to, start, stride, inverse, pivots.first);
    return;
  }
  for (; k + 2 <= to; k += 2) {
    const pivotRow = start + k * stride;
    const at = pivots.first + k;
    let row = panel.base + rFirst * width;
    let r = rFirst;
    for (; r + 2 <= rLast; r += 2, row += 2 * width) {
      eliminateTwoFromTwo(values, row, row + width, places, k, pivotRow, stride, inverse, at);
    }
    if (r < rLast) eliminateSingly(values, row, places, k, k + 2, start, stride, inverse, pivots.first);
  }
  if (k < to) {
    const pivotRow = start + k * stride;
    let row = panel.base + rFirst * width;
    for (let r = rFirst; r < rLast; r++, row += width) {
      eliminateOneFromOne(values, row, places, k, pivotRow, inverse, pivots.first + k);
    }
  }
}

/** Eliminates pivot rows `from` .. `to`-1 from one row, one after the other. */
function eliminateSingly(
  values: Float64Array,
  row: number,
  places: Int32Array,
  from: number,
  to: number,
  start: number,
  stride: number,
  inverse: Float64Array,
  first: number,
): void {
  for (let k = from; k < to; k++) {
    eliminateOneFromOne(values, row, places, k, start + k * stride, inverse, first + k);
  }
}

/** b := L^-1 b on the rows of a panel; two rows share the loads of b. */
function forwardPanel(values: Float64Array, panel: Panel, b: Float64Array): void {
  const { first, last, base, width, own, columns } = panel;
  let i = first;
  for (; i + 2 <= last; i += 2) {
    const rowA = base + (i - first) * width;
    const rowB = rowA + width;
    const length = own + (i - first);
    let sumA = 0;
    let sumB = 0;
    for (let q = 0; q < length; q++) {
      const known = b[columns[q]];
      sumA += values[rowA + q] * known;
      sumB += values[rowB + q] * known;
    }
    const top = b[i] - sumA;
    b[i] = top;
    b[i + 1] -= sumB + values[rowB + length] * top;
  }
  if (i < last) {
    const row = base + (i - first) * width;
    const length = own + (i - first);
    let sum = 0;
    for (let q = 0; q < length; q++) sum += values[row + q] * b[columns[q]];
    b[i] -= sum;
  }
}

/** b := U^-1 b on the rows of a panel, last row first. */
function backwardPanel(values: Float64Array, panel: Panel, inversePivot: Float64Array, b: Float64Array): void {
  const { first, last, base, width, own, columns } = panel;
  let i = last - 1;
  for (; i - 1 >= first; i -= 2) {
    const rowB = base + (i - first) * width;
    const rowA = rowB - width;
    const diagonal = own + (i - first);
    let sumA = 0;
    let sumB = 0;
    for (let q = diagonal + 1; q < width; q++) {
      const known = b[columns[q]];
      sumA += values[rowA + q] * known;
      sumB += values[rowB + q] * known;
    }
    const bottom = (b[i] - sumB) * inversePivot[i];
    b[i] = bottom;
    b[i - 1] = (b[i - 1] - sumA - values[rowA + diagonal] * bottom) * inversePivot[i - 1];
  }
  if (i >= first) {
    const row = base + (i - first) * width;
    let sum = 0;
    for (let q = own + (i - first) + 1; q < width; q++) sum += values[row + q] * b[columns[q]];
    b[i] = (b[i] - sum) * inversePivot[i];
  }
}
