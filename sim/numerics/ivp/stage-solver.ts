/** The linear algebra of the implicit methods: a solver for the problem's pattern, and its counters. */

import { createDenseSolver } from '../dense-lu.ts';
import type { ShiftedSolver } from '../shifted-solver.ts';
import { createSparseSolver } from '../sparse-lu.ts';
import type { IvpProblem } from './problem.ts';
import { linearSize } from './problem.ts';

/** Up to this many unknowns row exchanges are worth their price, 25 us for 24 full rows: a small problem may have weak diagonals. */
const DENSE_UP_TO = 24;

/** The default solver of a problem: mass 1 for states, 0 for auxiliary unknowns. */
export function stageSolver(problem: IvpProblem): ShiftedSolver {
  const n = linearSize(problem);
  const mass = new Float64Array(n).fill(1, 0, problem.size);
  return n <= DENSE_UP_TO ? createDenseSolver(n, problem.pattern, mass) : createSparseSolver(problem.pattern, mass);
}
