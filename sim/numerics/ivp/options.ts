/** What a user of an integrator may set, checked and completed once. */

import { invariant } from '../../errors.ts';
import type { ShiftedSolver } from '../shifted-solver.ts';

/** Options of every stepper. */
export interface StepperOptions {
  /** Relative tolerance of the local error, one for all or one for each state; default 1e-6. Smaller: more, shorter steps. */
  readonly rtol?: number | ArrayLike<number>;
  /** Absolute tolerance, in the unit of the state; default 1e-9. Smaller: small components are resolved too. */
  readonly atol?: number | ArrayLike<number>;
  /** Longest step, in the unit of t; default none. Smaller: inputs that the error estimate cannot see are not stepped over. */
  readonly maxStep?: number;
  /** Steps tried, accepted or not, before a run is given up; default 100 000. Counted over the stepper's whole life. */
  readonly maxSteps?: number;
  /** First step after a start that names none; default: chosen from f. */
  readonly initialStep?: number;
  /** Linear algebra for `shift*M - J`; default: dense with row exchanges for small problems, else sparse. */
  readonly solver?: ShiftedSolver;
}

/** The complete form. */
export interface ResolvedOptions {
  /** Length `size`. */
  readonly rtol: Float64Array;
  /** Length `size`. */
  readonly atol: Float64Array;
  readonly maxStep: number;
  readonly maxSteps: number;
  /** 0: chosen from f. */
  readonly initialStep: number;
}

const DEFAULT_RTOL = 1e-6;
const DEFAULT_ATOL = 1e-9;
const DEFAULT_MAX_STEPS = 100_000;

/** Checks the options and completes them for `size` states; throws when one makes no sense. */
export function resolveOptions(options: StepperOptions, size: number): ResolvedOptions {
  const rtol = perComponent(options.rtol ?? DEFAULT_RTOL, size, 'rtol');
  const atol = perComponent(options.atol ?? DEFAULT_ATOL, size, 'atol');
  for (let i = 0; i < size; i++) {
    invariant(rtol[i] >= 0 && atol[i] >= 0, `the tolerances of component ${i} are not negative`);
    invariant(rtol[i] + atol[i] > 0, `component ${i} has a tolerance above zero`);
  }
  const maxStep = options.maxStep ?? Infinity;
  const maxSteps = options.maxSteps ?? DEFAULT_MAX_STEPS;
  const initialStep = options.initialStep ?? 0;
  invariant(maxStep > 0, 'maxStep is positive');
  invariant(maxSteps > 0, 'maxSteps is positive');
  invariant(initialStep >= 0 && initialStep < Infinity, 'initialStep is finite and not negative');
  return { rtol, atol, maxStep, maxSteps, initialStep };
}

function perComponent(value: number | ArrayLike<number>, size: number, name: string): Float64Array {
  if (typeof value === 'number') return new Float64Array(size).fill(value);
  invariant(value.length === size, `${name} has one entry for each of ${size} states`);
  return Float64Array.from(value);
}
