/**
 * Where a square matrix may be non-zero. Compressed rows, columns ascending, diagonal always present, so that
 * `shift*M - J` lives on the pattern of `J`. Values travel in a separate array, in pattern order.
 */

import { invariant } from '../errors.ts';

/** Compressed-row pattern of an n x n matrix; row i owns entries rowStart[i] .. rowStart[i+1]-1 of `column`. */
export interface SparsePattern {
  readonly n: number;
  /** Length n + 1. */
  readonly rowStart: Int32Array;
  /** Column of each entry, ascending within a row. */
  readonly column: Int32Array;
}

/** Collects entries in any order; `add` may be called twice for the same entry. */
export interface PatternBuilder {
  add(row: number, col: number): void;
  build(): SparsePattern;
}

/** A builder that already holds the diagonal of an n x n pattern; `add` throws outside it. */
export function createPatternBuilder(n: number): PatternBuilder {
  const rows = Array.from({ length: n }, (_, i) => new Set<number>([i]));
  return {
    add(row, col) {
      const columns = rows[row];
      invariant(
        columns !== undefined && Number.isInteger(col) && col >= 0 && col < n,
        `entry (${row}, ${col}) lies in a pattern of ${n} rows`,
      );
      columns.add(col);
    },
    build() {
      const rowStart = new Int32Array(n + 1);
      rows.forEach((columns, i) => {
        rowStart[i + 1] = rowStart[i] + columns.size;
      });
      const column = new Int32Array(rowStart[n]);
      rows.forEach((columns, i) => {
        column.set(
          [...columns].sort((a, b) => a - b),
          rowStart[i],
        );
      });
      return { n, rowStart, column };
    },
  };
}

/** The full n x n pattern, row by row. */
export function densePattern(n: number): SparsePattern {
  const rowStart = Int32Array.from({ length: n + 1 }, (_, i) => i * n);
  const column = Int32Array.from({ length: n * n }, (_, e) => e % n);
  return { n, rowStart, column };
}

/** Place of (row, col) in pattern order, or -1 when the pattern has no such entry. */
export function entryIndex(pattern: SparsePattern, row: number, col: number): number {
  let low = pattern.rowStart[row];
  let high = pattern.rowStart[row + 1] - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    const found = pattern.column[middle];
    if (found === col) return middle;
    if (found < col) low = middle + 1;
    else high = middle - 1;
  }
  return -1;
}
