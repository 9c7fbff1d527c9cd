/**
 * The loop shared by all methods: choose a step, try it, retreat, accept, stop exactly where asked. It knows no
 * formula of any method and no unknown of any problem.
 */

import { invariant } from '../../errors.ts';
import { errorWeights } from './error-norm.ts';
import type { OneStepMethod, Verdict } from './one-step-method.ts';
import type { ResolvedOptions } from './options.ts';
import type { IvpProblem } from './problem.ts';
import { RETREAT, startingStep } from './step-size.ts';
import type { StepFailure, StepOutcome, Stepper, StepperState } from './stepper.ts';

/** Retreats within one step before it is given up: 0.25^60 is 1e-36. Only reached at t = 0, where t resolves any h. */
const MAX_RETRIES = 60;
/** A step that ends this close before the stop is stretched onto it, in shares of the step; 1e-4 in [HairerWanner1996]. */
const STRETCH = 1e-2;

const ADVANCED: StepOutcome = { kind: 'advanced' };
const REACHED_STOP: StepOutcome = { kind: 'reached-stop' };

/** The kind of failure that each verdict becomes when no smaller step is left. */
const FAILURE_OF: Readonly<Record<Exclude<Verdict, 'accepted'>, StepFailure['kind']>> = {
  rejected: 'step-size-underflow',
  'not-finite': 'not-finite',
  'newton-diverged': 'newton-diverged',
  'singular-matrix': 'singular-matrix',
};

/** Wraps a method into a stepper. */
export function createAdaptiveStepper(problem: IvpProblem, method: OneStepMethod, options: ResolvedOptions): Stepper {
  const { size } = problem;
  const { stats } = method;
  const y = new Float64Array(size);
  const weights = new Float64Array(size);
  const work = [new Float64Array(size), new Float64Array(size)] as const;
  let t = 0;
  let tPrevious = 0;
  let stepSize = 0; // 0: to be chosen

  function start(tStart: number, yStart: Float64Array, h?: number): void {
    invariant(yStart.length === size, 'the starting state has one entry for each unknown');
    t = tStart;
    tPrevious = tStart;
    y.set(yStart);
    stepSize = h !== undefined && h > 0 ? h : options.initialStep;
    method.reset();
  }

  function chooseFirstStep(limit: number): void {
    const f0 = method.derivative(t, y);
    errorWeights(y, y, options.rtol, options.atol, weights);
    stats.rightHandSides += 1;
    stepSize = startingStep(problem, t, y, f0, weights, method.startingOrder, limit, work);
  }

  function failed(kind: StepFailure['kind'], h: number): StepOutcome {
    return { kind: 'failed', failure: { kind, t, h, component: method.worst } };
  }

  function step(tStop: number): StepOutcome {
    const remaining = tStop - t;
    if (!(remaining > 0)) return REACHED_STOP;
    if (!(stepSize > 0)) chooseFirstStep(Math.min(options.maxStep, remaining));
    let wanted = Math.min(stepSize, options.maxStep);
    for (let retries = 0; ; retries++) {
      if (stats.steps + stats.rejected >= options.maxSteps) return failed('work-limit', wanted);
      const h = fitStep(wanted, remaining);
      const clipped = h !== wanted;
      const verdict = method.attempt(t, y, h, clipped);
      if (verdict === 'accepted') {
        const proposal = retries > 0 ? Math.min(method.proposal, h) : method.proposal;
        // A clipped step that went well says nothing against the size it was cut from.
        stepSize = clipped && proposal >= h ? Math.max(proposal, wanted) : proposal;
        accept(h, h === remaining ? tStop : t + h);
        return t === tStop ? REACHED_STOP : ADVANCED;
      }
      stats.rejected += 1;
      wanted = verdict === 'rejected' ? method.proposal : h * RETREAT;
      if (retries >= MAX_RETRIES || t + 0.1 * wanted === t) return failed(FAILURE_OF[verdict], h);
    }
  }

  function accept(h: number, tNew: number): void {
    method.commit(t, y, h);
    tPrevious = t;
    t = tNew;
    // Adding 0 turns -0 into 0, which text cannot tell apart: a saved state must not differ from a running one.
    for (let i = 0; i < size; i++) y[i] = method.next[i] + 0;
    stats.steps += 1;
  }

  function interpolateOne(i: number, at: number): number {
    if (at === t || t === tPrevious) return y[i];
    return method.interpolate(i, (at - tPrevious) / (t - tPrevious), y);
  }

  function save(): StepperState {
    return { t, tPrevious, y: [...y], stepSize, stats: { ...stats }, method: method.save() };
  }

  function restore(state: StepperState): void {
    invariant(state.y.length === size, 'a saved state belongs to the same problem');
    ({ t, tPrevious, stepSize } = state);
    y.set(state.y);
    Object.assign(stats, state.stats);
    method.restore(state.method);
  }

  return {
    get t() {
      return t;
    },
    get tPrevious() {
      return tPrevious;
    },
    get stepSize() {
      return stepSize;
    },
    y,
    stats,
    start,
    step,
    interpolateOne,
    interpolate(at, out) {
      for (let i = 0; i < size; i++) out[i] = interpolateOne(i, at);
    },
    save,
    restore,
  };
}

/** The step to try: the wanted one, or onto the stop, or half the way when the stop is less than two steps off. */
function fitStep(wanted: number, remaining: number): number {
  if (wanted * (1 + STRETCH) >= remaining) return remaining;
  if (wanted * 2 > remaining) return 0.5 * remaining;
  return wanted;
}
