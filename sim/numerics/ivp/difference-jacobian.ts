/** Jacobian and time derivative by one-sided differences: for small problems whose derivatives nobody wrote down. */

import { densePattern } from '../sparse-pattern.ts';
import type { IvpProblem } from './problem.ts';

/** Relative increment: the square root of the unit rounding balances truncation and cancellation [HairerWanner1996, IV.8]. */
const INCREMENT = Math.sqrt(Number.EPSILON);
/** Smallest increment of a component in units of its own size 1, for components at zero. */
const SMALLEST_SCALE = 1e-5; // the value of the same place in [HairerWanner1996]

/** A right-hand side without derivatives. */
export interface PlainProblem {
  readonly size: number;
  /** True when f does not depend on t; false when absent. */
  readonly autonomous?: boolean;
  rhs(t: number, y: Float64Array, dydt: Float64Array): void;
}

/** The problem with a full Jacobian made of `size` extra right-hand sides, which no statistic counts. */
export function withDifferences(plain: PlainProblem): IvpProblem {
  const { size } = plain;
  const base = new Float64Array(size);
  const moved = new Float64Array(size);
  const shifted = new Float64Array(size);

  function jacobian(t: number, y: Float64Array, values: Float64Array): void {
    plain.rhs(t, y, base);
    shifted.set(y);
    for (let j = 0; j < size; j++) {
      shifted[j] = y[j] + INCREMENT * Math.max(SMALLEST_SCALE, Math.abs(y[j]));
      const increment = shifted[j] - y[j]; // what the addition really added
      plain.rhs(t, shifted, moved);
      for (let i = 0; i < size; i++) values[i * size + j] = (moved[i] - base[i]) / increment;
      shifted[j] = y[j];
    }
  }

  function timeDerivative(t: number, y: Float64Array, out: Float64Array): boolean {
    const later = t + INCREMENT * Math.max(SMALLEST_SCALE, Math.abs(t));
    plain.rhs(t, y, base);
    plain.rhs(later, y, moved);
    for (let i = 0; i < size; i++) out[i] = (moved[i] - base[i]) / (later - t);
    return true;
  }

  return {
    size,
    pattern: densePattern(size),
    rhs: (t, y, dydt) => plain.rhs(t, y, dydt),
    jacobian,
    ...(plain.autonomous === true ? {} : { timeDerivative }),
  };
}
