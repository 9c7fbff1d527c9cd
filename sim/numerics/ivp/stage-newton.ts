/**
 * Simplified Newton iteration for one implicit stage, in the form
 *
 *   W dz = f(t, y + z) - (z - known)/(h gamma),   W = I/(h gamma) - J,
 *
 * with the stopping rule of [HairerWanner1996, IV.8.10-11]. It knows no tableau and no step size rule.
 */

import type { ShiftedSolver } from '../shifted-solver.ts';
import { firstNotFinite, weightedRms, worstComponent } from './error-norm.ts';
import type { IvpProblem } from './problem.ts';
import type { StepperStats } from './stepper.ts';

/** Iteration error allowed, in units of the local error tolerance; 0.1 to 0.01 in [HairerWanner1996, IV.8]; measured, flat from 0.03 to 0.3. */
const NEWTON_SHARE = 0.03;
/** Iterations before a stage is given up; 7 to 10 in [HairerWanner1996, IV.8]. */
const MAX_ITERATIONS = 8;
/** Power by which the convergence factor of the last stage is trusted for the first iteration [HairerWanner1996, IV.8]. */
const TRUST_POWER = 0.8;

/** How a stage ended. */
type StageVerdict = 'solved' | 'diverged' | 'not-finite';

/** Newton's memory and results. */
export interface StageNewton {
  /** theta/(1 - theta) of the last iteration; 1 at a start. */
  factor: number;
  /** Largest theta since it was last set to 0. */
  slowest: number;
  /** Component that weighed most in the last correction, or was not finite. */
  readonly worst: number;
  /** Solves for z in place, from the prediction in `z`. */
  solve(
    t: number,
    y: Float64Array,
    known: Float64Array,
    shift: number,
    weights: Float64Array,
    z: Float64Array,
  ): StageVerdict;
}

/** Newton for a problem; memory is taken here. */
export function createStageNewton(problem: IvpProblem, solver: ShiftedSolver, stats: StepperStats): StageNewton {
  const { size } = problem;
  const argument = new Float64Array(size);
  const residual = new Float64Array(size);
  const correction = new Float64Array(solver.n);
  let worst = 0;

  const newton: StageNewton = {
    factor: 1,
    slowest: 0,
    get worst() {
      return worst;
    },
    solve(t, y, known, shift, weights, z) {
      let previous = 0;
      let factor = Math.pow(Math.max(newton.factor, Number.EPSILON), TRUST_POWER);
      for (let k = 0; k < MAX_ITERATIONS; k++) {
        for (let i = 0; i < size; i++) argument[i] = y[i] + z[i];
        problem.rhs(t, argument, residual);
        stats.rightHandSides += 1;
        const bad = firstNotFinite(residual, size);
        if (bad >= 0) {
          worst = bad;
          return 'not-finite';
        }
        for (let i = 0; i < size; i++) correction[i] = residual[i] - (z[i] - known[i]) * shift;
        correction.fill(0, size);
        solver.solve(correction);
        stats.solves += 1;
        for (let i = 0; i < size; i++) z[i] += correction[i];
        const norm = weightedRms(correction, weights);
        if (!(norm < Infinity)) {
          worst = worstComponent(correction, weights);
          return 'not-finite';
        }
        if (k > 0) {
          const theta = norm / previous;
          if (theta > newton.slowest) newton.slowest = theta;
          const remaining = MAX_ITERATIONS - 1 - k;
          if (theta >= 1 || (Math.pow(theta, remaining) / (1 - theta)) * norm > NEWTON_SHARE) {
            worst = worstComponent(correction, weights);
            return 'diverged';
          }
          factor = theta / (1 - theta);
        }
        previous = norm;
        if (norm === 0 || factor * norm <= NEWTON_SHARE) {
          newton.factor = factor;
          return 'solved';
        }
      }
      worst = worstComponent(correction, weights);
      return 'diverged';
    },
  };
  return newton;
}
