/**
 * LU factorisation of a small dense matrix by row exchanges: Gaussian elimination with partial pivoting
 * [GolubVanLoan2013, algorithm 3.4.1], and the same for `shift*M - J` on a sparse pattern.
 */

import type { ShiftedSolver } from './shifted-solver.ts';
import type { SparsePattern } from './sparse-pattern.ts';

/** A pivot below this share of the largest entry its column started with has no digit left: 4 unit roundings. */
const PIVOT_FLOOR = 4 * Number.EPSILON;

/** Factors a dense matrix in place and solves with it. */
export interface DenseLu {
  readonly n: number;
  /** Row-major n x n; the caller fills it before `factor`, which overwrites it. */
  readonly matrix: Float64Array;
  /** False when the matrix is singular to working precision or has an entry that is not finite. */
  factor(): boolean;
  /** Replaces b (length >= n) by the solution; needs a successful `factor`. */
  solve(b: Float64Array): void;
}

/** A dense solver for n x n matrices; all memory is taken here. */
export function createDenseLu(n: number): DenseLu {
  const matrix = new Float64Array(n * n);
  const exchange = new Int32Array(n); // row that took part in exchange k
  const columnScale = new Float64Array(n); // largest entry of each column at the start

  function factor(): boolean {
    columnScale.fill(0);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        const size = Math.abs(matrix[i * n + j]);
        if (size > columnScale[j]) columnScale[j] = size;
      }
    }
    for (let k = 0; k < n; k++) {
      let best = k;
      let bestSize = Math.abs(matrix[k * n + k]);
      for (let i = k + 1; i < n; i++) {
        const size = Math.abs(matrix[i * n + k]);
        if (size > bestSize) {
          best = i;
          bestSize = size;
        }
      }
      // Written so that NaN counts as singular.
      if (!(bestSize > PIVOT_FLOOR * columnScale[k] && bestSize < Infinity)) return false;
      exchange[k] = best;
      if (best !== k) {
        for (let j = 0; j < n; j++) {
          const held = matrix[k * n + j];
          matrix[k * n + j] = matrix[best * n + j];
          matrix[best * n + j] = held;
        }
      }
      const inversePivot = 1 / matrix[k * n + k];
      for (let i = k + 1; i < n; i++) {
        const factorIk = matrix[i * n + k] * inversePivot;
        matrix[i * n + k] = factorIk;
        if (factorIk === 0) continue;
        for (let j = k + 1; j < n; j++) matrix[i * n + j] -= factorIk * matrix[k * n + j];
      }
    }
    return true;
  }

  function solve(b: Float64Array): void {
    for (let k = 0; k < n; k++) {
      const swapped = exchange[k];
      const held = b[swapped];
      b[swapped] = b[k];
      b[k] = held;
    }
    for (let i = 1; i < n; i++) {
      let sum = b[i];
      for (let j = 0; j < i; j++) sum -= matrix[i * n + j] * b[j];
      b[i] = sum;
    }
    for (let i = n - 1; i >= 0; i--) {
      let sum = b[i];
      for (let j = i + 1; j < n; j++) sum -= matrix[i * n + j] * b[j];
      b[i] = sum / matrix[i * n + i];
    }
  }

  return { n, matrix, factor, solve };
}

/**
 * Dense `shift*M - J` with row exchanges, for small problems and as the reference for the sparse solver.
 *
 * @param pattern - Where J has entries; values come in its order.
 * @param mass - Diagonal of M, length n; all ones when absent.
 */
export function createDenseSolver(n: number, pattern: SparsePattern, mass?: Float64Array): ShiftedSolver {
  const lu = createDenseLu(n);
  const { rowStart, column } = pattern;
  return {
    n,
    factor(shift, jacobian) {
      const { matrix } = lu;
      matrix.fill(0);
      for (let i = 0; i < n; i++) {
        for (let e = rowStart[i]; e < rowStart[i + 1]; e++) matrix[i * n + column[e]] = -jacobian[e];
        matrix[i * n + i] += mass === undefined ? shift : shift * mass[i];
      }
      return lu.factor();
    },
    solve: (b) => lu.solve(b),
  };
}
