/**
 * The same right-hand side through a method of another family and another author: explicit extrapolation
 * (package `odex`, Gragg-Bulirsch-Stoer [HairerNorsettWanner1993, II.9]). Wrapped so that it always returns: a
 * value that is not finite or too many right-hand sides end it from within, and the time reached is the real one.
 */

import { Outcome, Solver } from 'odex';
import { firstNotFinite } from './error-norm.ts';

/** What is integrated; no Jacobian. */
export interface ExplicitProblem {
  readonly size: number;
  rhs(t: number, y: Float64Array, dydt: Float64Array): void;
}

/** Options of a second opinion. */
export interface ExplicitOptions {
  /** Relative tolerance; default 1e-6. Smaller: more right-hand sides; on stiff problems stability decides instead. */
  readonly rtol?: number;
  /** Absolute tolerance, one for all or one for each state; default 1e-9. */
  readonly atol?: number | ArrayLike<number>;
  /** Longest step; default the whole interval. Smaller: safe where the solution is only known for short steps. */
  readonly maxStep?: number;
  /** Right-hand sides before it gives up; default 1 000 000. */
  readonly maxRightHandSides?: number;
  /** Times at which the solution is wanted, ascending, within (t0, tEnd]; each ends a step. Default tEnd. */
  readonly outputTimes?: readonly number[];
}

/** Why it gave up; `t` is the last time with a good state. */
interface ExplicitFailure {
  readonly kind: 'not-finite' | 'work-limit';
  readonly t: number;
  /** First component that was not finite, or -1. */
  readonly component: number;
}

/** The outcome. Arrays are plain. */
export interface ExplicitResult {
  readonly ok: boolean;
  /** Time reached, and the state there. */
  readonly t: number;
  readonly yEnd: readonly number[];
  /** Output times reached, and the states there. */
  readonly times: readonly number[];
  readonly y: readonly (readonly number[])[];
  readonly rightHandSides: number;
  readonly failure?: ExplicitFailure;
}

const DEFAULT_RTOL = 1e-6;
const DEFAULT_ATOL = 1e-9;
const DEFAULT_MAX_RIGHT_HAND_SIDES = 1_000_000;
/** After NaN the leg is tried again from the last good state with steps this much shorter, and at most so often. */
const RETREAT = 0.1;
const MAX_RETREATS = 8;

/** Thrown through the package from within f; never leaves this module. */
class Interruption extends Error {
  readonly kind: ExplicitFailure['kind'];
  readonly component: number;
  constructor(kind: ExplicitFailure['kind'], component: number) {
    super(kind);
    this.kind = kind;
    this.component = component;
  }
}

/** Integrates from (t0, y0) to tEnd > t0, or as far as it can. */
export function integrateExplicit(
  problem: ExplicitProblem,
  t0: number,
  y0: ArrayLike<number>,
  tEnd: number,
  options: ExplicitOptions = {},
): ExplicitResult {
  const limit = options.maxRightHandSides ?? DEFAULT_MAX_RIGHT_HAND_SIDES;
  const stops = options.outputTimes ?? [tEnd];
  const legs = [...stops.filter((t) => t > t0 && t <= tEnd)];
  const wantsEnd = legs.at(-1) === tEnd;
  if (!wantsEnd) legs.push(tEnd);

  const state = new Float64Array(problem.size);
  const slope = new Float64Array(problem.size);
  let calls = 0;
  let t = t0;
  let y = Array.from(y0); // the package turns a typed array into NaN
  let lastStep = 0;
  let longest = options.maxStep ?? Infinity;

  function f(at: number, values: readonly number[]): number[] {
    if (calls >= limit) throw new Interruption('work-limit', -1);
    state.set(values);
    // A state that is not finite would keep the package looping for ever.
    const badState = firstNotFinite(state, problem.size);
    if (badState >= 0) throw new Interruption('not-finite', badState);
    calls += 1;
    problem.rhs(at, state, slope);
    const badSlope = firstNotFinite(slope, problem.size);
    if (badSlope >= 0) throw new Interruption('not-finite', badSlope);
    return Array.from(slope);
  }

  /** One leg without output on the way; moves t and y with every accepted step. */
  function advance(stop: number): void {
    const solver = new Solver(problem.size);
    const { atol = DEFAULT_ATOL } = options;
    solver.relativeTolerance = options.rtol ?? DEFAULT_RTOL;
    solver.absoluteTolerance = typeof atol === 'number' ? atol : Array.from(atol);
    solver.maxStepSize = Math.min(longest, stop - t);
    solver.maxSteps = limit; // a step takes at least one right-hand side: f stops it first
    if (lastStep > 0) solver.initialStepSize = lastStep;
    const solution = solver.solve(f, t, y, stop, (_step, xOld, x, yNew) => {
      if (yNew.every(Number.isFinite)) {
        // The last step is cut to the stop and says nothing about the size that was possible.
        if (x < stop) lastStep = x - xOld;
        t = x;
        y = yNew;
      }
      return undefined;
    });
    if (solution.outcome !== Outcome.Converged) throw new Interruption('work-limit', -1);
    t = stop;
  }

  /** One leg, retreating to shorter steps when f could not be evaluated. */
  function advanceOrRetreat(stop: number): ExplicitFailure | undefined {
    for (let retreats = 0; ; retreats++) {
      try {
        advance(stop);
        return undefined;
      } catch (thrown) {
        if (!(thrown instanceof Interruption)) throw thrown;
        const { kind, component } = thrown;
        if (kind === 'work-limit' || retreats >= MAX_RETREATS) return { kind, t, component };
        longest = RETREAT * Math.min(longest, lastStep > 0 ? lastStep : stop - t);
        lastStep = longest;
      }
    }
  }

  const times: number[] = [];
  const outputs: number[][] = [];
  for (const stop of legs) {
    const failure = advanceOrRetreat(stop);
    if (failure) {
      return { ok: false, t, yEnd: y, times, y: outputs, rightHandSides: calls, failure };
    }
    if (stop === tEnd && !wantsEnd) break;
    times.push(t);
    outputs.push(y);
  }
  return { ok: true, t, yEnd: y, times, y: outputs, rightHandSides: calls };
}
