/**
 * Rosenbrock-Wanner methods: one Jacobian and one factorisation a step, no iteration [HairerWanner1996, IV.7].
 * A rejected step keeps the Jacobian, f and f_t.
 */

import { createAdaptiveStepper } from './adaptive-stepper.ts';
import { errorWeights, firstNotFinite, weightedRms, worstComponent } from './error-norm.ts';
import type { OneStepMethod, Verdict } from './one-step-method.ts';
import { freshStats } from './one-step-method.ts';
import type { StepperOptions } from './options.ts';
import { resolveOptions } from './options.ts';
import type { IvpProblem } from './problem.ts';
import { linearSize } from './problem.ts';
import type { RosenbrockTableau } from './rosenbrock-tableau.ts';
import { stageSolver } from './stage-solver.ts';
import type { StepHistory } from './step-size.ts';
import { NO_HISTORY, proposedStep, remember } from './step-size.ts';
import type { MethodMemory, Stepper } from './stepper.ts';
import { restoreArray, restoreNumber } from './memory.ts';

/** A stepper of the given Rosenbrock method; all memory is taken here. */
export function createRosenbrockStepper(
  problem: IvpProblem,
  tableau: RosenbrockTableau,
  options: StepperOptions = {},
): Stepper {
  const resolved = resolveOptions(options, problem.size);
  return createAdaptiveStepper(problem, createRosenbrockMethod(problem, tableau, options), resolved);
}

function createRosenbrockMethod(
  problem: IvpProblem,
  tableau: RosenbrockTableau,
  options: StepperOptions,
): OneStepMethod {
  const { size } = problem;
  const total = linearSize(problem);
  const { gamma, alpha, a, c, d, m, e, dense, order, embeddedOrder } = tableau;
  const stages = alpha.length;
  const sharesArgument = alpha.map((at, s) => s > 0 && at === alpha[s - 1] && sameRow(a[s], a[s - 1]));
  const { rtol, atol } = resolveOptions(options, size);
  const solver = options.solver ?? stageSolver(problem);
  const stats = freshStats();

  const f0 = new Float64Array(size); // f at the start of the step
  const ft = new Float64Array(size); // df/dt there
  const f = new Float64Array(size);
  const argument = new Float64Array(size);
  const next = new Float64Array(size);
  const error = new Float64Array(size);
  const weights = new Float64Array(size);
  const jacobian = new Float64Array(problem.pattern.column.length);
  const u = alpha.map(() => new Float64Array(total)); // stages
  const previous = new Float64Array(size); // y at the start of the committed step
  const slopes = dense.map(() => new Float64Array(size)); // k_p of the continuous solution
  const history: StepHistory = { h: 0, error: 1 };
  let haveDerivative = false; // f0 belongs to the present (t, y)
  let haveJacobian = false; // jacobian and ft belong to it too
  let timeDependent = false;
  let proposal = 0;
  let worst = 0;

  function derivative(t: number, y: Float64Array): Float64Array {
    if (!haveDerivative) {
      problem.rhs(t, y, f0);
      stats.rightHandSides += 1;
      haveDerivative = true;
    }
    return f0;
  }

  function linearise(t: number, y: Float64Array): void {
    if (haveJacobian) return;
    problem.jacobian(t, y, jacobian);
    stats.jacobians += 1;
    timeDependent = problem.timeDerivative?.(t, y, ft) ?? false;
    haveJacobian = true;
  }

  /** Solves for stage s; false when f is not finite at its argument. */
  function solveStage(s: number, t: number, y: Float64Array, h: number): boolean {
    let slope = f0;
    if (s > 0) {
      slope = f;
      if (!sharesArgument[s]) {
        combine(y, a[s], u, argument, size);
        problem.rhs(t + alpha[s] * h, argument, f);
        stats.rightHandSides += 1;
      }
    }
    worst = firstNotFinite(slope, size);
    if (worst >= 0) return false;
    worst = 0;
    const stage = u[s];
    stage.set(slope);
    stage.fill(0, size);
    for (let j = 0; j < s; j++) addScaled(stage, c[s][j] / h, u[j], size);
    if (timeDependent && d[s] !== 0) addScaled(stage, d[s] * h, ft, size);
    solver.solve(stage);
    stats.solves += 1;
    return true;
  }

  function attempt(t: number, y: Float64Array, h: number, clipped: boolean): Verdict {
    derivative(t, y);
    linearise(t, y);
    stats.factorisations += 1;
    if (!solver.factor(1 / (h * gamma), jacobian)) return 'singular-matrix';
    for (let s = 0; s < stages; s++) if (!solveStage(s, t, y, h)) return 'not-finite';
    combine(y, m, u, next, size);
    error.fill(0);
    for (let j = 0; j < stages; j++) if (e[j] !== 0) addScaled(error, e[j], u[j], size);
    errorWeights(y, next, rtol, atol, weights);
    const norm = weightedRms(error, weights);
    worst = worstComponent(error, weights);
    if (!Number.isFinite(norm) || firstNotFinite(next, size) >= 0) return 'not-finite';
    proposal = proposedStep(h, norm, embeddedOrder + 1, clipped ? NO_HISTORY : history);
    if (norm > 1) return 'rejected';
    if (!clipped) remember(history, h, norm);
    return 'accepted';
  }

  function commit(_t: number, y: Float64Array): void {
    previous.set(y);
    slopes.forEach((slope, p) => {
      slope.fill(0);
      for (let j = 0; j < stages; j++) if (dense[p][j] !== 0) addScaled(slope, dense[p][j], u[j], size);
    });
    haveDerivative = false;
    haveJacobian = false;
  }

  function interpolate(i: number, theta: number, y: Float64Array): number {
    let inner = 0;
    for (let p = slopes.length - 1; p >= 0; p--) inner = slopes[p][i] + theta * inner;
    return (1 - theta) * previous[i] + theta * (y[i] + (1 - theta) * inner);
  }

  function save(): MethodMemory {
    const memory: Record<string, number | readonly number[]> = {
      historyStep: history.h,
      historyError: history.error,
      previous: [...previous],
    };
    slopes.forEach((slope, p) => {
      memory[`slope${p}`] = [...slope];
    });
    return memory;
  }

  function restore(memory: MethodMemory): void {
    history.h = restoreNumber(memory, 'historyStep');
    history.error = restoreNumber(memory, 'historyError');
    restoreArray(memory, 'previous', previous);
    slopes.forEach((slope, p) => restoreArray(memory, `slope${p}`, slope));
    haveDerivative = false;
    haveJacobian = false;
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
    reset() {
      history.h = 0;
      haveDerivative = false;
      haveJacobian = false;
    },
    derivative,
    attempt,
    commit,
    interpolate,
    save,
    restore,
  };
}

/** out := y + sum_j weights_j u_j over the first n entries. */
function combine(
  y: Float64Array,
  weights: readonly number[],
  u: readonly Float64Array[],
  out: Float64Array,
  n: number,
): void {
  out.set(y);
  for (let j = 0; j < weights.length; j++) if (weights[j] !== 0) addScaled(out, weights[j], u[j], n);
}

function addScaled(out: Float64Array, factor: number, v: Float64Array, n: number): void {
  for (let i = 0; i < n; i++) out[i] += factor * v[i];
}

/** True when two rows of coefficients differ only by trailing zeros: both stages then ask f at the same place. */
function sameRow(a: readonly number[], b: readonly number[]): boolean {
  const length = Math.max(a.length, b.length);
  for (let j = 0; j < length; j++) if ((a[j] ?? 0) !== (b[j] ?? 0)) return false;
  return true;
}
