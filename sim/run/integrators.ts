/** The integrators by the name a case uses, set up for the column. The only file that notices a change of method. */
import type { Column } from '../column/column.ts';
import { createEsdirkStepper } from '../numerics/ivp/esdirk.ts';
import { ESDIRK3, ESDIRK4, TR_BDF2 } from '../numerics/ivp/esdirk-tableau.ts';
import { createExtrapolationStepper } from '../numerics/ivp/extrapolation.ts';
import { createRosenbrockStepper } from '../numerics/ivp/rosenbrock.ts';
import { RODAS4, RODAS5P, ROS34PW2 } from '../numerics/ivp/rosenbrock-tableau.ts';
import type { IvpProblem } from '../numerics/ivp/problem.ts';
import type { StepperOptions } from '../numerics/ivp/options.ts';
import type { Stepper } from '../numerics/ivp/stepper.ts';

/** Methods that a case may name; the first is the default. */
export const METHODS = ['rodas4', 'rodas5p', 'ros34pw2', 'esdirk3', 'esdirk4', 'tr-bdf2', 'extrapolation'] as const;

/** Name of a method. */
export type MethodName = (typeof METHODS)[number];

/** Whether a word names a method. */
export function isMethod(name: string): name is MethodName {
  return (METHODS as readonly string[]).includes(name);
}

/** What a run says about its integration. */
export interface IntegrationSettings {
  readonly method: MethodName;
  /** Relative tolerance; the absolute one is this times each state's typical magnitude. */
  readonly rtol: number;
  readonly maxStep: number;
  readonly maxSteps: number;
}

/** Tolerances of the column's states; accumulators carry no error weight, since they only add up. */
export function columnTolerances(column: Column, rtol: number): { rtol: Float64Array; atol: Float64Array } {
  const relative = new Float64Array(column.size).fill(rtol);
  const absolute = Float64Array.from(column.scales, (scale) => scale * rtol);
  for (let i = column.layout.accumulatorFirst; i < column.size; i++) {
    relative[i] = 0;
    absolute[i] = Number.MAX_VALUE;
  }
  return { rtol: relative, atol: absolute };
}

/** Makes the stepper; `problem` is the column, or a wrapping of it. */
export function createColumnStepper(
  column: Column,
  settings: IntegrationSettings,
  problem: IvpProblem = column,
): Stepper {
  const options: StepperOptions = {
    ...columnTolerances(column, settings.rtol),
    maxStep: settings.maxStep,
    maxSteps: settings.maxSteps,
    solver: column.createSolver(),
  };
  switch (settings.method) {
    case 'rodas4':
      return createRosenbrockStepper(problem, RODAS4, options);
    case 'rodas5p':
      return createRosenbrockStepper(problem, RODAS5P, options);
    case 'ros34pw2':
      return createRosenbrockStepper(problem, ROS34PW2, options);
    case 'esdirk3':
      return createEsdirkStepper(problem, ESDIRK3, options);
    case 'esdirk4':
      return createEsdirkStepper(problem, ESDIRK4, options);
    case 'tr-bdf2':
      return createEsdirkStepper(problem, TR_BDF2, options);
    case 'extrapolation':
      return createExtrapolationStepper(problem, options);
  }
}
