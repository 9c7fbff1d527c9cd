/** Small underdetermined systems, solved once when a table of coefficients is made. */

import { invariant } from '../errors.ts';
import { createDenseLu } from './dense-lu.ts';

/**
 * The shortest w with sum_j rows[i][j] w_j = right[i]: w = R^T (R R^T)^-1 r [GolubVanLoan2013, 5.6.2].
 *
 * @param rows - m rows of n entries, m <= n, linearly independent.
 */
export function minimumNorm(rows: readonly (readonly number[])[], right: readonly number[]): number[] {
  const m = rows.length;
  const lu = createDenseLu(m);
  rows.forEach((row, i) =>
    rows.forEach((other, k) => {
      lu.matrix[i * m + k] = row.reduce((sum, x, j) => sum + x * other[j], 0);
    }),
  );
  invariant(lu.factor(), 'the conditions on the coefficients are independent');
  const multipliers = Float64Array.from(right);
  lu.solve(multipliers);
  return rows[0].map((_, j) => rows.reduce((sum, row, i) => sum + multipliers[i] * row[j], 0));
}
