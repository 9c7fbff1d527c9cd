/** What an implicit integrator asks of linear algebra; the dense and the sparse solver both give it. */
export interface ShiftedSolver {
  readonly n: number;
  /**
   * Factors W = shift*M - J, M = diag(mass): 1 for a state, 0 for an auxiliary unknown.
   *
   * @param jacobian - Values of J in pattern order; only read.
   * @returns False when W is singular to working precision or not finite; then `solve` must not be called.
   */
  factor(shift: number, jacobian: Float64Array): boolean;
  /** Replaces b, length n, by W^-1 b. */
  solve(b: Float64Array): void;
}
