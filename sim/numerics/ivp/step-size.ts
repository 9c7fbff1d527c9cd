/** Step-size rules shared by the methods with an embedded error estimate. Pure functions of numbers. */

import { weightedRms } from './error-norm.ts';
import type { IvpProblem } from './problem.ts';

/** Share of the step that the error estimate would allow [HairerWanner1996, IV.8, default of the codes there]. */
const SAFETY = 0.8;
/** A step grows at most by this factor; as in the Rosenbrock code of [HairerWanner1996]. */
const MAX_GROWTH = 3;
/** A step shrinks at most to this share; as in the Rosenbrock code of [HairerWanner1996]. */
const MIN_SHRINK = 0.2;
/** Smallest error that the predictive rule divides by [HairerWanner1996, IV.8]. */
const ERROR_FLOOR = 1e-2;
/** Step kept as it is when it would grow less than this, to save factorisations; from 1.0 to 1.2 in [HairerWanner1996, IV.8]. */
export const KEEP_STEP_BELOW = 1.2;
/** Retry after NaN or a Newton failure at this share of the step; common practice, no source. */
export const RETREAT = 0.25;

/** What the predictive rule remembers of the last accepted step. */
export interface StepHistory {
  /** 0: nothing. */
  h: number;
  error: number;
}

/**
 * Next step from the error of this one: the elementary rule, limited by the predictive rule of Gustafsson, which
 * extrapolates the trend of the error over two accepted steps [Gustafsson1994; HairerWanner1996, IV.8.25].
 *
 * @param h - Step tried.
 * @param error - Its weighted error; accepted when at most 1.
 * @param order - Exponent of h in the error estimate (embedded order + 1).
 * @param history - Last accepted step.
 */
export function proposedStep(h: number, error: number, order: number, history: Readonly<StepHistory>): number {
  let factor = error === 0 ? MAX_GROWTH : SAFETY * Math.pow(error, -1 / order);
  if (error <= 1 && history.h > 0 && error > 0) {
    const predicted = SAFETY * (h / history.h) * Math.pow(history.error / (error * error), 1 / order);
    if (predicted < factor) factor = predicted;
  }
  return h * Math.min(MAX_GROWTH, Math.max(MIN_SHRINK, factor));
}

/** The history of a step that was clipped: the trend over steps of unlike size says nothing. */
export const NO_HISTORY: Readonly<StepHistory> = { h: 0, error: 1 };

/** Records an accepted step. */
export function remember(history: StepHistory, h: number, error: number): void {
  history.h = h;
  history.error = Math.max(error, ERROR_FLOOR);
}

/**
 * First step from the size of f and of its change over a small explicit step
 * [HairerNorsettWanner1993, II.4, "starting step size", steps a-f].
 *
 * @param f0 - f(t, y).
 * @param weights - atol + rtol*|y|.
 * @param order - Order of the method.
 * @param limit - Longest step allowed.
 * @param work - Two arrays of length `size`, overwritten.
 * @returns A step in (0, limit]; costs one right-hand side.
 */
export function startingStep(
  problem: IvpProblem,
  t: number,
  y: Float64Array,
  f0: Float64Array,
  weights: Float64Array,
  order: number,
  limit: number,
  work: readonly [Float64Array, Float64Array],
): number {
  const [moved, f1] = work;
  const d0 = weightedRms(y, weights);
  const d1 = weightedRms(f0, weights);
  const guess = Math.min(d0 < 1e-5 || d1 < 1e-5 ? 1e-6 : (0.01 * d0) / d1, limit);
  for (let i = 0; i < moved.length; i++) moved[i] = y[i] + guess * f0[i];
  problem.rhs(t + guess, moved, f1);
  for (let i = 0; i < f1.length; i++) f1[i] -= f0[i];
  const d2 = weightedRms(f1, weights) / guess;
  if (!Number.isFinite(d2)) return guess; // f cannot be had at the guess: the step loop will retreat
  const steepest = Math.max(d1, d2);
  const byCurvature = steepest <= 1e-15 ? Math.max(1e-6, guess * 1e-3) : Math.pow(0.01 / steepest, 1 / (order + 1));
  return Math.min(100 * guess, byCurvature, limit);
}
