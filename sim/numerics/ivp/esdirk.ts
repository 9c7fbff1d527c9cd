/**
 * ESDIRK methods: stages solved one after the other with the same matrix by simplified Newton; the last stage is
 * the solution and its slope the first stage of the next step. Slopes are taken from the solved equations, not
 * from f, so that stiff components are not multiplied by J once more [Shampine1980].
 */

import { createAdaptiveStepper } from './adaptive-stepper.ts';
import { errorWeights, firstNotFinite, weightedRms, worstComponent } from './error-norm.ts';
import type { EsdirkTableau } from './esdirk-tableau.ts';
import { continuousCorrection, errorCoefficients, stagePredictors } from './esdirk-tableau.ts';
import { createJacobianPolicy } from './jacobian-policy.ts';
import { restoreArray, restoreNumber } from './memory.ts';
import type { OneStepMethod, Verdict } from './one-step-method.ts';
import { freshStats } from './one-step-method.ts';
import type { StepperOptions } from './options.ts';
import { resolveOptions } from './options.ts';
import type { IvpProblem } from './problem.ts';
import { createStageNewton } from './stage-newton.ts';
import { stageSolver } from './stage-solver.ts';
import type { StepHistory } from './step-size.ts';
import { KEEP_STEP_BELOW, NO_HISTORY, proposedStep, remember } from './step-size.ts';
import type { MethodMemory, Stepper } from './stepper.ts';

/**
 * The Jacobian serves another step while no stage converged more slowly than this. Between the 0.001 and 0.1 of
 * [HairerWanner1996, IV.8]: measured for a Jacobian at the price of 7 right-hand sides, flat from 0.02 to 0.1.
 */
const KEEP_JACOBIAN_BELOW = 0.05;
/** The last step's interpolant predicts the second stage unless the step has grown more than this; common practice, no source. */
const EXTRAPOLATE_UP_TO = 2;

/** A stepper of the given ESDIRK method; all memory is taken here. */
export function createEsdirkStepper(
  problem: IvpProblem,
  tableau: EsdirkTableau,
  options: StepperOptions = {},
): Stepper {
  const resolved = resolveOptions(options, problem.size);
  return createAdaptiveStepper(problem, createEsdirkMethod(problem, tableau, options), resolved);
}

function createEsdirkMethod(problem: IvpProblem, tableau: EsdirkTableau, options: StepperOptions): OneStepMethod {
  const { size } = problem;
  const { a, c, gamma, order, embeddedOrder, filtersError } = tableau;
  const stages = c.length;
  const errorWeightsOfStages = errorCoefficients(tableau);
  const correctionWeights = continuousCorrection(tableau);
  const predictors = stagePredictors(tableau);
  const { rtol, atol } = resolveOptions(options, size);
  const solver = options.solver ?? stageSolver(problem);
  const stats = freshStats();
  const policy = createJacobianPolicy(problem, solver, stats);
  const newton = createStageNewton(problem, solver, stats);
  const estimateOrder = Math.min(order, embeddedOrder) + 1; // power of h in the error estimate

  const k = c.map(() => new Float64Array(size)); // slopes of the stages
  const known = new Float64Array(size); // h sum_{j<i} a_ij k_j
  const z = new Float64Array(size);
  const next = new Float64Array(size);
  const error = new Float64Array(solver.n);
  const weights = new Float64Array(size);
  // Continuous solution of the committed step: state, h times slope at both ends, and the order-4 correction.
  const previous = new Float64Array(size);
  const slopeLeft = new Float64Array(size);
  const slopeRight = new Float64Array(size);
  const lift = new Float64Array(size);
  const history: StepHistory = { h: 0, error: 1 };
  let haveSlope = false; // k[0] belongs to the present (t, y)
  let committedStep = 0; // 0: no continuous solution to extrapolate
  let stepNewton = 0; // slowest convergence in the last accepted attempt
  let proposal = 0;
  let worst = 0;

  function derivative(t: number, y: Float64Array): Float64Array {
    if (!haveSlope) {
      problem.rhs(t, y, k[0]);
      stats.rightHandSides += 1;
      haveSlope = true;
    }
    return k[0];
  }

  /** Prediction of stage s, written to z relative to y. */
  function predict(s: number, y: Float64Array, h: number): void {
    if (s === 1 && committedStep > 0 && h <= EXTRAPOLATE_UP_TO * committedStep) {
      const theta = 1 + (c[1] * h) / committedStep;
      for (let i = 0; i < size; i++) z[i] = interpolate(i, theta, y) - y[i];
      return;
    }
    z.fill(0);
    predictors[s].forEach((weight, j) => addScaled(z, h * weight, k[j]));
  }

  /** Solves stage s; on success k[s] is its slope and z its state relative to y. */
  function solveStage(s: number, t: number, y: Float64Array, h: number): Verdict {
    const shift = 1 / (h * gamma);
    known.fill(0);
    for (let j = 0; j < s; j++) addScaled(known, h * a[s][j], k[j]);
    predict(s, y, h);
    let outcome = newton.solve(t + c[s] * h, y, known, shift, weights, z);
    if (outcome === 'not-finite') {
      // The prediction may have left the domain of f, which y has not.
      z.fill(0);
      outcome = newton.solve(t + c[s] * h, y, known, shift, weights, z);
    }
    worst = newton.worst;
    if (outcome !== 'solved') return outcome === 'diverged' ? 'newton-diverged' : 'not-finite';
    for (let i = 0; i < size; i++) k[s][i] = (z[i] - known[i]) * shift;
    return 'accepted';
  }

  function solveStages(t: number, y: Float64Array, h: number): Verdict {
    policy.prepare(t, y);
    if (!policy.factorFor(1 / (h * gamma))) return 'singular-matrix';
    newton.slowest = 0;
    for (let s = 1; s < stages; s++) {
      const verdict = solveStage(s, t, y, h);
      if (verdict !== 'accepted') return verdict;
    }
    return 'accepted';
  }

  function attempt(t: number, y: Float64Array, h: number, clipped: boolean): Verdict {
    worst = firstNotFinite(derivative(t, y), size);
    if (worst >= 0) return 'not-finite';
    errorWeights(y, y, rtol, atol, weights);
    let verdict = solveStages(t, y, h);
    if (verdict !== 'accepted' && !policy.isFresh) {
      policy.discard();
      verdict = solveStages(t, y, h);
    }
    if (verdict !== 'accepted') {
      newton.factor = 1;
      return verdict;
    }
    for (let i = 0; i < size; i++) next[i] = y[i] + z[i]; // stiffly accurate: the last stage
    return judge(y, h, clipped);
  }

  function judge(y: Float64Array, h: number, clipped: boolean): Verdict {
    error.fill(0);
    for (let s = 0; s < stages; s++) {
      if (errorWeightsOfStages[s] !== 0) addScaled(error, h * errorWeightsOfStages[s], k[s]);
    }
    if (filtersError) {
      // (I - h gamma J)^-1 e = W^-1 e / (h gamma)
      solver.solve(error);
      stats.solves += 1;
      for (let i = 0; i < size; i++) error[i] /= h * gamma;
    }
    errorWeights(y, next, rtol, atol, weights);
    const norm = weightedRms(error, weights);
    worst = worstComponent(error, weights);
    if (!Number.isFinite(norm) || firstNotFinite(next, size) >= 0) return 'not-finite';
    proposal = proposedStep(h, norm, estimateOrder, clipped ? NO_HISTORY : history);
    if (norm > 1) return 'rejected';
    stepNewton = newton.slowest;
    if (stepNewton <= KEEP_JACOBIAN_BELOW && proposal >= h && proposal < KEEP_STEP_BELOW * h) proposal = h;
    if (!clipped) remember(history, h, norm);
    return 'accepted';
  }

  function commit(_t: number, y: Float64Array, h: number): void {
    previous.set(y);
    lift.fill(0);
    for (let s = 0; s < stages; s++) {
      if (correctionWeights[s] !== 0) addScaled(lift, h * correctionWeights[s], k[s]);
    }
    const last = k[stages - 1];
    for (let i = 0; i < size; i++) {
      slopeLeft[i] = h * k[0][i];
      slopeRight[i] = h * last[i];
      k[0][i] = last[i] + 0; // -0 does not survive text
    }
    committedStep = h;
    policy.stepDone(stepNewton <= KEEP_JACOBIAN_BELOW);
  }

  /** Cubic Hermite polynomial plus theta^2 (1 - theta)^2 times the correction. */
  function interpolate(i: number, theta: number, y: Float64Array): number {
    const rest = 1 - theta;
    const rise = y[i] - previous[i];
    const inner = rest * (slopeLeft[i] - rise) + theta * (rise - slopeRight[i]) + theta * rest * lift[i];
    return previous[i] + theta * rise + theta * rest * inner;
  }

  function reset(): void {
    haveSlope = false;
    committedStep = 0;
    history.h = 0;
    newton.factor = 1;
    policy.discard();
  }

  function save(): MethodMemory {
    return {
      ...policy.save(),
      historyStep: history.h,
      historyError: history.error,
      newtonFactor: newton.factor,
      committedStep,
      haveSlope: haveSlope ? 1 : 0,
      slope: [...k[0]],
      previous: [...previous],
      slopeLeft: [...slopeLeft],
      slopeRight: [...slopeRight],
      lift: [...lift],
    };
  }

  function restore(memory: MethodMemory): void {
    policy.restore(memory);
    history.h = restoreNumber(memory, 'historyStep');
    history.error = restoreNumber(memory, 'historyError');
    newton.factor = restoreNumber(memory, 'newtonFactor');
    committedStep = restoreNumber(memory, 'committedStep');
    haveSlope = restoreNumber(memory, 'haveSlope') === 1;
    restoreArray(memory, 'slope', k[0]);
    restoreArray(memory, 'previous', previous);
    restoreArray(memory, 'slopeLeft', slopeLeft);
    restoreArray(memory, 'slopeRight', slopeRight);
    restoreArray(memory, 'lift', lift);
  }

  return {
    startingOrder: order,
    stats,
    next,
    get proposal() {
      return proposal;
    },
    get worst() {
      return worst;
    },
    reset,
    derivative,
    attempt,
    commit,
    interpolate,
    save,
    restore,
  };
}

function addScaled(out: Float64Array, factor: number, v: Float64Array): void {
  for (let i = 0; i < v.length; i++) out[i] += factor * v[i];
}
