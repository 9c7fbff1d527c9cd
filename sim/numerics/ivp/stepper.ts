/**
 * The interface shared by all integrators: one accepted step at a time, restartable anywhere, with a continuous
 * solution over the last step, and a state that can be saved and resumed bit for bit.
 */

/** Why a step could not be made. `t` and `y` of the stepper stay at the last good state. */
export interface StepFailure {
  readonly kind:
    /** The error estimate stays too large at the smallest step that t can resolve. */
    | 'step-size-underflow'
    /** NaN or infinity at the smallest step. */
    | 'not-finite'
    /** The nonlinear equations of a stage were not solved at the smallest step. */
    | 'newton-diverged'
    /** The matrix of the linear systems was singular at the smallest step. */
    | 'singular-matrix'
    /** `maxSteps` tried. */
    | 'work-limit';
  /** Time of the last good state. */
  readonly t: number;
  /** Step size tried last. */
  readonly h: number;
  /** Component of y with the largest weighted error, or the first that was not finite. */
  readonly component: number;
}

/** How a call of `step` ended. */
export type StepOutcome =
  /** State at the new t, short of the stop. */
  | { readonly kind: 'advanced' }
  /** State exactly at the stop. */
  | { readonly kind: 'reached-stop' }
  /** State untouched. */
  | { readonly kind: 'failed'; readonly failure: StepFailure };

/** Work counters since creation. */
export interface StepperStats {
  /** Accepted steps. */
  steps: number;
  /** Steps tried and not accepted, for whatever reason. */
  rejected: number;
  rightHandSides: number;
  jacobians: number;
  factorisations: number;
  solves: number;
}

/** Everything that decides what comes next, as plain numbers; survives JSON. */
export interface StepperState {
  readonly t: number;
  readonly tPrevious: number;
  readonly y: readonly number[];
  readonly stepSize: number;
  readonly stats: Readonly<StepperStats>;
  /** What the method itself remembers; only the method that wrote it reads it. */
  readonly method: MethodMemory;
}

/** A method's memory by name. */
export type MethodMemory = Readonly<Record<string, number | readonly number[]>>;

/** A one-step integrator. */
export interface Stepper {
  readonly t: number;
  readonly tPrevious: number;
  /** State at t; owned by the stepper, read only, overwritten by the next step. */
  readonly y: Float64Array;
  /** Proposal for the next step. */
  readonly stepSize: number;
  readonly stats: Readonly<StepperStats>;
  /** Begins anew at (t, y), copying y. `h`: first step to try; absent or not positive: chosen from f. */
  start(t: number, y: Float64Array, h?: number): void;
  /** Makes one accepted step, never beyond tStop, and lands on tStop exactly. At tStop already: does nothing. */
  step(tStop: number): StepOutcome;
  /** Writes the continuous solution at t in [tPrevious, t] to `out`. */
  interpolate(t: number, out: Float64Array): void;
  /** Component i of the same. */
  interpolateOne(i: number, t: number): number;
  save(): StepperState;
  /** Resumes a saved state of a stepper of the same method, problem and options. */
  restore(state: StepperState): void;
}
