/** What a method must offer to the stepping loop (adaptive-stepper.ts): one attempt, one commit, one interpolant. */

import type { MethodMemory, StepperStats } from './stepper.ts';

/** How an attempt ended. */
export type Verdict = 'accepted' | 'rejected' | 'not-finite' | 'newton-diverged' | 'singular-matrix';

/** A one-step method with its own error estimate and step-size memory. */
export interface OneStepMethod {
  /** Order used for the starting step. */
  readonly startingOrder: number;
  /** Counters, written by method and loop. */
  readonly stats: StepperStats;
  /** Solution at the end of an accepted attempt, length `size`. */
  readonly next: Float64Array;
  /** After `accepted`: size of the next step. After `rejected`: size to try again. Else: not to be read. */
  readonly proposal: number;
  /** Component that weighed most in the last attempt. */
  readonly worst: number;
  /** Forgets the past: the problem or the state has been replaced. */
  reset(): void;
  /** f(t, y), which the attempt from (t, y) will use again; owned by the method. */
  derivative(t: number, y: Float64Array): Float64Array;
  /**
   * Tries a step from (t, y), which stay as they are.
   * @param clipped - The size was cut to meet a stop and says nothing about the error: leave it out of the memory.
   */
  attempt(t: number, y: Float64Array, h: number, clipped: boolean): Verdict;
  /** Called once after an accepted attempt with the same arguments, before y is overwritten by `next`. */
  commit(t: number, y: Float64Array, h: number): void;
  /** Component i of the continuous solution at t + theta*h of the committed step; `y` is the state at its end. */
  interpolate(i: number, theta: number, y: Float64Array): number;
  /** Everything the method remembers between steps. */
  save(): MethodMemory;
  restore(memory: MethodMemory): void;
}

/** Counters at zero. */
export function freshStats(): StepperStats {
  return { steps: 0, rejected: 0, rightHandSides: 0, jacobians: 0, factorisations: 0, solves: 0 };
}
