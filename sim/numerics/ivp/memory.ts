/** Reading back what a method saved. */

import { invariant } from '../../errors.ts';
import type { MethodMemory } from './stepper.ts';

/** The number saved under `name`; throws when the memory is another method's. */
export function restoreNumber(memory: MethodMemory, name: string): number {
  const value = memory[name];
  invariant(typeof value === 'number', `the saved state holds the number ${name}`);
  return value;
}

/** Copies the array saved under `name` into `out`; throws when it is absent or of another length. */
export function restoreArray(memory: MethodMemory, name: string, out: Float64Array): void {
  const value = memory[name];
  invariant(typeof value === 'object' && value.length === out.length, `the saved state holds ${name}`);
  out.set(value);
}
