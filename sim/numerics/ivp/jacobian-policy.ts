/**
 * When an iterative method renews its Jacobian and when it factors again. After an accepted step the Jacobian is
 * kept while Newton converged fast with it, and the factors are kept while the step size is. A Jacobian found
 * too old in the middle of a step is renewed there, once [HairerWanner1996, IV.8].
 */

import type { ShiftedSolver } from '../shifted-solver.ts';
import { restoreArray, restoreNumber } from './memory.ts';
import type { IvpProblem } from './problem.ts';
import type { MethodMemory, StepperStats } from './stepper.ts';

/** The linear algebra of one method, with its reuse. */
export interface JacobianPolicy {
  /** True when the Jacobian in use was taken at the start of the present step. */
  readonly isFresh: boolean;
  /** Takes the Jacobian at (t, y) unless the one in use may be kept. */
  prepare(t: number, y: Float64Array): void;
  /** Makes the factors those of shift*M - J; false when singular. */
  factorFor(shift: number): boolean;
  /** To be called when Newton failed: the next `prepare` takes a new Jacobian. */
  discard(): void;
  /** To be called after an accepted step; `keep`: the Jacobian may serve the next one. */
  stepDone(keep: boolean): void;
  /** What to save: where the Jacobian was taken and what was factored, not the values. */
  save(): MethodMemory;
  restore(memory: MethodMemory): void;
}

/** The policy for a problem and its solver. */
export function createJacobianPolicy(problem: IvpProblem, solver: ShiftedSolver, stats: StepperStats): JacobianPolicy {
  const values = new Float64Array(problem.pattern.column.length);
  const takenAt = new Float64Array(problem.size); // y of the Jacobian in use
  let takenTime = 0;
  let usable = false; // values hold a Jacobian that may be used
  let fresh = false;
  let factoredShift = 0; // 0: the factors do not belong to `values`

  function take(t: number, y: Float64Array): void {
    problem.jacobian(t, y, values);
    takenTime = t;
    takenAt.set(y);
    usable = true;
    factoredShift = 0;
  }

  return {
    get isFresh() {
      return fresh;
    },
    prepare(t, y) {
      if (usable) return;
      take(t, y);
      fresh = true;
      stats.jacobians += 1;
    },
    factorFor(shift) {
      if (shift === factoredShift) return true;
      stats.factorisations += 1;
      const regular = solver.factor(shift, values);
      factoredShift = regular ? shift : 0;
      return regular;
    },
    discard() {
      usable = false;
    },
    stepDone(keep) {
      usable = keep && usable;
      fresh = false;
    },
    save() {
      if (!usable) return { jacobianUsable: 0 };
      return { jacobianUsable: 1, jacobianTime: takenTime, factoredShift, jacobianAt: [...takenAt] };
    },
    restore(memory) {
      usable = false;
      fresh = false;
      if (restoreNumber(memory, 'jacobianUsable') === 0) return;
      restoreArray(memory, 'jacobianAt', takenAt);
      take(restoreNumber(memory, 'jacobianTime'), takenAt);
      const shift = restoreNumber(memory, 'factoredShift');
      if (shift !== 0 && solver.factor(shift, values)) factoredShift = shift;
    },
  };
}
