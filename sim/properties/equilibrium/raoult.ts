// Raoult's law: the solvent itself, and solutes that resemble it.

import { separableLaw } from './law.ts';
import type { SeparableLaw, TemperatureFunction } from './law.ts';

/**
 * Raoult's law: p* = psat(T) x.
 *
 * @param saturation - Vapour pressure of the pure component, Pa, with its relative slope, 1/K.
 * @returns The law; its reference state is the pure liquid, its heat that of vaporisation.
 * @remarks Range: the solvent at high purity; benzene or toluene in a hydrocarbon oil within about
 *   10 %. Linear in x, also beyond 1.
 * Source: [Raoult1887].
 */
export function raoultLaw(saturation: TemperatureFunction): SeparableLaw {
  return separableLaw(
    'raoult',
    saturation,
    (x) => x,
    () => 1,
  );
}
