/** The initial-value problem as the integrators see it: y' = f(t, y), with the structure of its Jacobian. */

import type { SparsePattern } from '../sparse-pattern.ts';

/**
 * dy/dt = f(t, y) with df/dy on a fixed pattern.
 *
 * With auxiliary unknowns g the Jacobian is that of the larger system (f(t, y, g), 0 = r(y, g)) after r has been
 * solved: the right-hand side still takes y alone, and the linear systems carry g with mass 0.
 * The caller may change f between steps only together with a `start` of the integrator.
 */
export interface IvpProblem {
  /** Number of states. */
  readonly size: number;
  /** Further unknowns that exist only in the linear systems; 0 when absent. They follow the states. */
  readonly auxiliary?: number;
  /** Pattern of the (size + auxiliary)^2 Jacobian. */
  readonly pattern: SparsePattern;
  /** Writes every entry of `dydt`; keeps no reference to either array. */
  rhs(t: number, y: Float64Array, dydt: Float64Array): void;
  /** Writes every entry of `values`, in pattern order. `y` has the states only. */
  jacobian(t: number, y: Float64Array, values: Float64Array): void;
  /** Writes df/dt at fixed y and returns true; absent, or false, where f does not depend on t. */
  timeDerivative?(t: number, y: Float64Array, out: Float64Array): boolean;
}

/** Number of unknowns of the linear systems. */
export function linearSize(problem: IvpProblem): number {
  return problem.size + (problem.auxiliary ?? 0);
}
