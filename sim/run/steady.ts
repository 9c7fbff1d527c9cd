/**
 * The steady state: integrated until nothing moves, then polished by Newton steps on f(y) = 0 with a weak hold on time.
 * Where no steady state exists (above flooding) the search says so instead of returning one.
 */
import type { Column } from '../column/column.ts';
import { fillColumn, settleInstruments, type StartingState } from '../column/initial.ts';
import type { StepFailure } from '../numerics/ivp/stepper.ts';
import { createColumnStepper } from './integrators.ts';

/** Plant time that is enough for the slowest inventory here, s (some hundred sump turnovers). */
const LONG = 2e6;
/** Steps allowed on the way. */
const MAX_STEPS = 4000;
/** Newton steps and the weak hold on time, s. */
const POLISH_STEPS = 6;
const POLISH_TIME = 1e9;
/** Largest rate over typical magnitude that counts as standing still, 1/s. */
const STILL = 1e-7;

export type SteadyOutcome =
  | {
      readonly kind: 'steady';
      readonly y: Float64Array;
      /** Largest rate over typical magnitude, 1/s. */ readonly residual: number;
    }
  | { readonly kind: 'not-steady'; readonly y: Float64Array; readonly residual: number; readonly state: number }
  | { readonly kind: 'failed'; readonly y: Float64Array; readonly failure: StepFailure };

/** Largest rate over typical magnitude of the states that must stand still, and which. */
function residualOf(column: Column, rates: Float64Array): { residual: number; state: number } {
  let residual = 0;
  let state = 0;
  for (let i = 0; i < column.layout.accumulatorFirst; i++) {
    const r = Math.abs(rates[i]) / column.scales[i];
    if (!(r <= residual)) {
      residual = r;
      state = i;
    }
  }
  return { residual, state };
}

/**
 * @param column - Its modes and channels say what is held.
 * @param start - How to fill it first.
 */
export function findSteady(column: Column, start: StartingState): SteadyOutcome {
  const y = new Float64Array(column.size);
  fillColumn(column, start, y);
  const stepper = createColumnStepper(column, { method: 'rodas4', rtol: 1e-4, maxStep: Infinity, maxSteps: MAX_STEPS });
  stepper.start(0, y);
  for (;;) {
    const outcome = stepper.step(LONG);
    if (outcome.kind === 'failed') {
      y.set(stepper.y);
      const rates = new Float64Array(column.size);
      column.rhs(stepper.t, y, rates);
      if (outcome.failure.kind === 'work-limit') return { kind: 'not-steady', y, ...residualOf(column, rates) };
      return { kind: 'failed', y, failure: outcome.failure };
    }
    if (outcome.kind === 'reached-stop') break;
  }
  y.set(stepper.y);
  return polish(column, y);
}

/** Newton steps with the state's own Jacobian; keeps the best state found. */
function polish(column: Column, y: Float64Array): SteadyOutcome {
  const rates = new Float64Array(column.size);
  const values = new Float64Array(column.pattern.column.length);
  const correction = new Float64Array(column.size + (column.auxiliary ?? 0));
  const trial = Float64Array.from(y);
  const solver = column.createSolver();
  column.rhs(0, y, rates);
  let best = residualOf(column, rates);
  for (let k = 0; k < POLISH_STEPS; k++) {
    column.jacobian(0, trial, values);
    column.rhs(0, trial, rates);
    correction.fill(0);
    correction.set(rates);
    if (!solver.factor(1 / POLISH_TIME, values)) break;
    solver.solve(correction);
    for (let i = 0; i < column.layout.accumulatorFirst; i++) trial[i] += correction[i];
    column.rhs(0, trial, rates);
    const now = residualOf(column, rates);
    if (!(now.residual < best.residual)) break;
    best = now;
    y.set(trial);
  }
  settleInstruments(column, y);
  for (let i = column.layout.accumulatorFirst; i < column.size; i++) y[i] = 0;
  if (!(best.residual <= STILL)) return { kind: 'not-steady', y, ...best };
  return { kind: 'steady', y, residual: best.residual };
}
