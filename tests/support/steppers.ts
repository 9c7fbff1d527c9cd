/** All steppers under one signature, for tests and benchmarks that run each of them. */

import { ESDIRK3, ESDIRK4, ESDIRK5, TR_BDF2 } from '../../sim/numerics/ivp/esdirk-tableau.ts';
import type { EsdirkTableau } from '../../sim/numerics/ivp/esdirk-tableau.ts';
import { createEsdirkStepper } from '../../sim/numerics/ivp/esdirk.ts';
import { createExtrapolationStepper } from '../../sim/numerics/ivp/extrapolation.ts';
import type { StepperOptions } from '../../sim/numerics/ivp/options.ts';
import type { IvpProblem } from '../../sim/numerics/ivp/problem.ts';
import { RODAS4, RODAS5P, ROS34PW2 } from '../../sim/numerics/ivp/rosenbrock-tableau.ts';
import type { RosenbrockTableau } from '../../sim/numerics/ivp/rosenbrock-tableau.ts';
import { createRosenbrockStepper } from '../../sim/numerics/ivp/rosenbrock.ts';
import type { StepOutcome, Stepper } from '../../sim/numerics/ivp/stepper.ts';
import type { TestProblem } from './problems.ts';

/** A method ready to be created on any problem. */
export interface NamedStepper {
  readonly name: string;
  /** Classical order; 0 where it varies. */
  readonly order: number;
  /** Power of the tolerance with which the global error falls: order over order of the error estimate. */
  readonly tolerancePower: number;
  create(problem: IvpProblem, options?: StepperOptions): Stepper;
}

const rosenbrock = (tableau: RosenbrockTableau): NamedStepper => ({
  name: tableau.name,
  order: tableau.order,
  tolerancePower: 1,
  create: (problem, options) => createRosenbrockStepper(problem, tableau, options),
});

const esdirk = (tableau: EsdirkTableau): NamedStepper => ({
  name: tableau.name,
  order: tableau.order,
  tolerancePower: tableau.order / (Math.min(tableau.order, tableau.embeddedOrder) + 1),
  create: (problem, options) => createEsdirkStepper(problem, tableau, options),
});

/** Every method. */
export const steppers: readonly NamedStepper[] = [
  rosenbrock(ROS34PW2),
  rosenbrock(RODAS4),
  rosenbrock(RODAS5P),
  esdirk(TR_BDF2),
  esdirk(ESDIRK3),
  esdirk(ESDIRK4),
  esdirk(ESDIRK5),
  { name: 'extrapolated Euler', order: 0, tolerancePower: 1, create: createExtrapolationStepper },
];

/** Steps until the stop is reached or a step fails. */
export function runTo(stepper: Stepper, tStop: number): StepOutcome {
  for (;;) {
    const outcome = stepper.step(tStop);
    if (outcome.kind !== 'advanced') return outcome;
  }
}

/** Runs a test problem at a relative tolerance. */
export function solveProblem(
  method: NamedStepper,
  { problem, start, end, scale }: TestProblem,
  rtol: number,
): { stepper: Stepper; outcome: StepOutcome } {
  const atol = typeof scale === 'number' ? rtol * scale : scale.map((x) => x * rtol);
  const stepper = method.create(problem, { rtol, atol });
  stepper.start(0, Float64Array.from(start));
  return { stepper, outcome: runTo(stepper, end) };
}

/** Largest error at the end, each component relative to its reference plus its scale. */
export function endError({ reference, scale }: TestProblem, y: ArrayLike<number>): number {
  const floor = (i: number): number => (typeof scale === 'number' ? scale : scale[i]!);
  return Math.max(...reference.map((r, i) => Math.abs(y[i]! - r) / (Math.abs(r) + floor(i))));
}
