/**
 * Extrapolation of the linearly implicit Euler method with control of order and step size
 * [Deuflhard1985; HairerWanner1996, IV.9]. Row j of the table makes n_j Euler steps over the whole step h,
 *
 *   (I/h_j - J) delta = f(t + (m+1) h_j, y_m),   y_{m+1} = y_m + delta,   h_j = h/n_j,
 *
 * and Aitken-Neville's scheme removes one power of h with each further row. A fresh Jacobian each step, one
 * factorisation each row, no iteration. The continuous solution is a polynomial through the left state and through
 * the state and extrapolated derivatives at the right end [HairerOstermann1990; HairerWanner1996, IV.9]; its degree is
 * the number of rows, its error is not controlled (seen: up to 25 tolerances).
 */

import { createAdaptiveStepper } from './adaptive-stepper.ts';
import { errorWeights, firstNotFinite, weightedRms, worstComponent } from './error-norm.ts';
import { restoreArray, restoreNumber } from './memory.ts';
import type { OneStepMethod, Verdict } from './one-step-method.ts';
import { freshStats } from './one-step-method.ts';
import type { StepperOptions } from './options.ts';
import { resolveOptions } from './options.ts';
import type { IvpProblem } from './problem.ts';
import { linearSize } from './problem.ts';
import { stageSolver } from './stage-solver.ts';
import type { MethodMemory, Stepper } from './stepper.ts';

/** Numbers of Euler steps of the rows [HairerWanner1996, IV.9, default sequence of the code there]. */
const SEQUENCE = [2, 3, 4, 6, 8, 12, 16, 24, 32];
const ROWS = SEQUENCE.length;
/** Work units of a Jacobian and of a factorisation, in right-hand sides plus solves; as in [HairerWanner1996, IV.9]. */
const JACOBIAN_WORK = 5;
const FACTOR_WORK = 1;
const STEP_WORK = 2; // one right-hand side, one solve
/** Step size rule of a row [HairerWanner1996, IV.9, defaults of the code there]. */
const SAFETY_ON_ERROR = 0.6;
const SAFETY_ON_STEP = 0.93;
const LEAST_FACTOR = 0.1; // to the power 1/j: bound of growth
const SHRINK_BOUND = 4; // shrinks at most to the growth bound's inverse over 4
/** The order falls when the row before costs less than this share, and rises when the last did [ibid.]. */
const LOWER_ORDER_BELOW = 0.7;
const RAISE_ORDER_BELOW = 0.9;
/** Highest weighted error of a row over which the next could still converge: 4 n_k n_{k+1} and 2 n_{k+1} [ibid.]. */
const HOPE_TWO_ROWS = 4;
const HOPE_ONE_ROW = 2;

/** Work up to and including each row, in the units above. */
const WORK = SEQUENCE.map((_, j) =>
  SEQUENCE.slice(0, j + 1).reduce((sum, n) => sum + (n - 1) * STEP_WORK + FACTOR_WORK, JACOBIAN_WORK + STEP_WORK),
);

/** A stepper of the extrapolated linearly implicit Euler method; all memory is taken here. */
export function createExtrapolationStepper(problem: IvpProblem, options: StepperOptions = {}): Stepper {
  const resolved = resolveOptions(options, problem.size);
  return createAdaptiveStepper(problem, createExtrapolationMethod(problem, options), resolved);
}

/** First target row from the tolerance: more digits, higher order [HairerWanner1996, IV.9]. */
function firstTarget(rtol: number, atol: number): number {
  return Math.max(2, Math.min(ROWS - 2, Math.trunc(1.5 - 0.6 * Math.log10(rtol + atol))));
}

function createExtrapolationMethod(problem: IvpProblem, options: StepperOptions): OneStepMethod {
  const { size } = problem;
  const total = linearSize(problem);
  const { rtol, atol } = resolveOptions(options, size);
  const solver = options.solver ?? stageSolver(problem);
  const stats = freshStats();
  const startTarget = firstTarget(rtol[0], atol[0]);

  const f0 = new Float64Array(size);
  const ft = new Float64Array(size); // only asked for whether f depends on t
  const f = new Float64Array(size);
  const jacobian = new Float64Array(problem.pattern.column.length);
  const weights = new Float64Array(size);
  const walker = new Float64Array(size); // y_m of a row
  const delta = new Float64Array(total);
  const probe = new Float64Array(total);
  const error = new Float64Array(size);
  const next = new Float64Array(size);
  // table[l]: entry T_{j,j-l} of the last row j, so that table[0] is the most extrapolated after row j.
  const table = SEQUENCE.map(() => new Float64Array(size));
  // increments[j][q]: q-th of the last j + 1 increments of row j.
  const increments = SEQUENCE.map((_, j) => Array.from({ length: j + 1 }, () => new Float64Array(size)));
  const wantedStep = new Float64Array(ROWS); // step that row j would allow
  const workPerTime = new Float64Array(ROWS);
  workPerTime[0] = Infinity; // one row has no error estimate and is never aimed at
  const taylor = SEQUENCE.map(() => new Float64Array(size)); // coefficients of (theta - 1)^1, ...
  let degree = 0; // of the continuous solution
  let target = startTarget; // rows aimed at, counted from 1
  let isFirst = true;
  let afterReject = false;
  let acceptedRows = 0;
  let haveDerivative = false;
  let haveJacobian = false;
  let timeDependent = false;
  let rowError = 0;
  let lastError = 0;
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

  /** right := W^-1 right, with zeros for the auxiliary unknowns. */
  function solve(right: Float64Array): void {
    right.fill(0, size);
    solver.solve(right);
    stats.solves += 1;
  }

  function slope(t: number, y: Float64Array): boolean {
    problem.rhs(t, y, f);
    stats.rightHandSides += 1;
    const bad = firstNotFinite(f, size);
    if (bad >= 0) worst = bad;
    return bad < 0;
  }

  /** Row j (from 0) of the table: Euler steps, then extrapolation. */
  function computeRow(j: number, t: number, y: Float64Array, h: number): Verdict {
    const n = SEQUENCE[j];
    const step = h / n;
    stats.factorisations += 1;
    if (!solver.factor(1 / step, jacobian)) return 'singular-matrix';
    walker.set(y);
    if (timeDependent) {
      if (!slope(t + step, y)) return 'not-finite';
      delta.set(f);
    } else delta.set(f0);
    solve(delta);
    for (let m = 1; m < n; m++) {
      keepIncrement(j, n, m - 1);
      for (let i = 0; i < size; i++) walker[i] += delta[i];
      if (m === 1 && j < 2 && !isContractive(t + step, step)) return 'rejected';
      if (!slope(t + (m + 1) * step, walker)) return 'not-finite';
      delta.set(f);
      solve(delta);
    }
    keepIncrement(j, n, n - 1);
    const row = table[j];
    for (let i = 0; i < size; i++) row[i] = walker[i] + delta[i];
    if (j > 0) extrapolate(j);
    return judgeRow(j, h);
  }

  /** Keeps the last j + 1 increments of row j for the continuous solution. */
  function keepIncrement(j: number, n: number, m: number): void {
    const at = m - (n - 1 - j);
    if (at >= 0) increments[j][at].set(delta.subarray(0, size));
  }

  /** The implicit Euler step, tried by one Newton correction, must contract [HairerWanner1996, IV.9]; `walker` is y_1. */
  function isContractive(t: number, step: number): boolean {
    if (!slope(t, walker)) return false;
    for (let i = 0; i < size; i++) probe[i] = f[i] - delta[i] / step;
    solve(probe);
    return weightedRms(probe, weights) <= Math.max(1 / Math.sqrt(size), weightedRms(delta, weights));
  }

  function extrapolate(j: number): void {
    for (let l = j; l >= 1; l--) {
      const divisor = SEQUENCE[j] / SEQUENCE[l - 1] - 1;
      const finer = table[l];
      const coarser = table[l - 1];
      for (let i = 0; i < size; i++) coarser[i] = finer[i] + (finer[i] - coarser[i]) / divisor;
    }
  }

  function judgeRow(j: number, h: number): Verdict {
    if (j === 0) return 'accepted';
    for (let i = 0; i < size; i++) error[i] = table[0][i] - table[1][i];
    rowError = weightedRms(error, weights);
    worst = worstComponent(error, weights);
    if (!Number.isFinite(rowError)) return 'not-finite';
    if (j > 1 && rowError >= lastError) return 'rejected'; // the table diverges
    lastError = Math.max(4 * rowError, 1);
    const power = 1 / (j + 1);
    const least = Math.pow(LEAST_FACTOR, power);
    const shrink = Math.pow(rowError / SAFETY_ON_ERROR, power) / SAFETY_ON_STEP;
    const factor = Math.min(SHRINK_BOUND / least, Math.max(least, shrink));
    wantedStep[j] = h / factor;
    workPerTime[j] = WORK[j] / wantedStep[j];
    return 'accepted';
  }

  /** What to do after `rows` rows have been computed. */
  function rowDecision(rows: number, patient: boolean): 'accept' | 'reject' | 'continue' {
    if (rows < 2) return 'continue';
    if (rows > target) return rowError <= 1 ? 'accept' : 'reject';
    const mayStopEarly = patient || rows === target || (rows === target - 1 && target > 2 && !afterReject);
    if (!mayStopEarly) return 'continue';
    if (rowError <= 1) return 'accept';
    if (rows === target) return rowError > HOPE_ONE_ROW * SEQUENCE[target] ? 'reject' : 'continue';
    if (patient) return 'continue';
    return rowError > HOPE_TWO_ROWS * SEQUENCE[target] * SEQUENCE[target - 1] ? 'reject' : 'continue';
  }

  function attempt(t: number, y: Float64Array, h: number, clipped: boolean): Verdict {
    worst = firstNotFinite(derivative(t, y), size);
    if (worst >= 0) return 'not-finite';
    worst = 0;
    linearise(t, y);
    errorWeights(y, y, rtol, atol, weights);
    const patient = isFirst || clipped;
    for (let rows = 1; ; rows++) {
      const verdict = computeRow(rows - 1, t, y, h);
      if (verdict !== 'accepted') {
        afterReject = true;
        proposal = 0.5 * h;
        return verdict;
      }
      const decision = rowDecision(rows, patient);
      if (decision === 'accept') {
        accept(rows, h, clipped);
        return 'accepted';
      }
      if (decision === 'reject') {
        reject(rows);
        return 'rejected';
      }
    }
  }

  function accept(rows: number, h: number, clipped: boolean): void {
    next.set(table[0]);
    acceptedRows = rows;
    if (clipped) {
      proposal = wantedStep[rows - 1];
      return;
    }
    const best = bestRows(rows);
    if (afterReject) {
      target = Math.min(best, rows);
      proposal = Math.min(h, wantedStep[target - 1]);
      return;
    }
    if (best <= rows) {
      proposal = wantedStep[best - 1];
    } else {
      const rising = rows < target && workPerTime[rows - 1] < workPerTime[rows - 2] * RAISE_ORDER_BELOW;
      const aimed = rising ? Math.min(best + 1, ROWS) : best;
      proposal = (wantedStep[rows - 1] * WORK[aimed - 1]) / WORK[rows - 1];
    }
    target = best;
  }

  /** Rows to aim at next: the count with the least work per unit of time, at most one more than was computed. */
  function bestRows(rows: number): number {
    if (rows === 2) return afterReject ? 2 : 3;
    const work = (count: number): number => workPerTime[count - 1];
    if (rows <= target) {
      if (work(rows) < work(rows - 1) * RAISE_ORDER_BELOW) return Math.min(rows + 1, ROWS - 1);
      return work(rows - 1) < work(rows) * LOWER_ORDER_BELOW ? rows - 1 : rows;
    }
    let best = rows - 1;
    if (rows > 3 && work(rows - 2) < work(rows - 1) * LOWER_ORDER_BELOW) best = rows - 2;
    return work(rows) < work(best) * RAISE_ORDER_BELOW ? Math.min(rows, ROWS - 1) : best;
  }

  function reject(rows: number): void {
    target = Math.min(target, rows, ROWS - 1);
    if (target > 2 && workPerTime[target - 2] < workPerTime[target - 1] * LOWER_ORDER_BELOW) target -= 1;
    proposal = wantedStep[target - 1];
    afterReject = true;
  }

  function commit(_t: number, y: Float64Array): void {
    prepareInterpolant(y);
    isFirst = false;
    afterReject = false;
    haveDerivative = false;
    haveJacobian = false;
  }

  /** Taylor coefficients about the right end by extrapolated backward differences; the last one meets the left state. */
  function prepareInterpolant(y: Float64Array): void {
    degree = acceptedRows;
    let scale = 1; // order!
    for (let order = 1; order < degree; order++) {
      scale *= order;
      if (order > 1) differenceOnce(order);
      for (let j = order - 1; j < degree; j++) {
        // The increment is h_j y', its differences h_j^2 y'' and so on; times n_j^order: in units of h.
        const factor = Math.pow(SEQUENCE[j], order) / scale;
        const difference = increments[j][j];
        for (let i = 0; i < size; i++) taylor[j][i] = difference[i] * factor;
      }
      for (let j = order; j < degree; j++) {
        for (let l = j; l >= order; l--) {
          const divisor = SEQUENCE[j] / SEQUENCE[l - 1] - 1;
          for (let i = 0; i < size; i++) taylor[l - 1][i] = taylor[l][i] + (taylor[l][i] - taylor[l - 1][i]) / divisor;
        }
      }
    }
    const last = taylor[degree - 1];
    const sign = degree % 2 === 0 ? 1 : -1;
    for (let i = 0; i < size; i++) {
      let sum = next[i];
      let power = -1;
      for (let k = 0; k < degree - 1; k++, power = -power) sum += power * taylor[k][i];
      last[i] = sign * (y[i] - sum);
    }
  }

  /** Replaces the kept increments of each row by their differences, newest last. */
  function differenceOnce(order: number): void {
    for (let j = order - 1; j < degree; j++) {
      for (let q = j; q > order - 2; q--) {
        const newer = increments[j][q];
        const older = increments[j][q - 1];
        for (let i = 0; i < size; i++) newer[i] -= older[i];
      }
    }
  }

  function interpolate(i: number, theta: number, y: Float64Array): number {
    const s = theta - 1;
    let sum = 0;
    for (let k = degree - 1; k >= 0; k--) sum = s * (taylor[k][i] + sum);
    return y[i] + sum;
  }

  function save(): MethodMemory {
    const memory: Record<string, number | readonly number[]> = { target, degree, isFirst: isFirst ? 1 : 0 };
    for (let k = 0; k < degree; k++) memory[`taylor${k}`] = [...taylor[k]];
    return memory;
  }

  function restore(memory: MethodMemory): void {
    target = restoreNumber(memory, 'target');
    degree = restoreNumber(memory, 'degree');
    isFirst = restoreNumber(memory, 'isFirst') === 1;
    for (let k = 0; k < degree; k++) restoreArray(memory, `taylor${k}`, taylor[k]);
    afterReject = false;
    haveDerivative = false;
    haveJacobian = false;
  }

  return {
    startingOrder: 2,
    stats,
    next,
    get proposal() {
      return proposal;
    },
    get worst() {
      return worst;
    },
    reset() {
      target = startTarget;
      isFirst = true;
      afterReject = false;
      degree = 0;
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
