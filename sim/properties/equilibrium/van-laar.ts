// Activity coefficients by van Laar's equation, as a law on the vapour pressure of the pure component
// and as a law tied to a measured infinite dilution.

import { separableLaw } from './law.ts';
import type { SeparableLaw, TemperatureFunction } from './law.ts';

/** Constants of van Laar's equation; the component is 1, the solvent 2. */
export interface VanLaarConstants {
  /** ln gamma1 at infinite dilution; dimensionless. */
  readonly A12: number;
  /** ln gamma2 at infinite dilution; dimensionless. */
  readonly A21: number;
}

/**
 * Activity coefficient of component 1 in a binary.
 *
 *   ln gamma1 = A12 [A21 x2/(A12 x1 + A21 x2)]^2,  x2 = 1 - x1
 *
 * @param constants - A12 and A21 of the pair.
 * @param x - Mole fraction of component 1; scalar.
 * @returns ln gamma1; A12 at x = 0, 0 at x = 1.
 * @remarks Range: fitted at one pressure, so at its boiling temperatures; constants taken as independent
 *   of temperature. Smooth for x between 0 and 1. Error: of the boiling fit some 2 %; at 298 K the
 *   infinite dilution is 20-45 % off for alcohols in water, hence the anchored form below.
 * Source: [vanLaar1910]; form and constants as in [Perry2008], section 13 (table 13-3). Departs: nothing.
 */
export function vanLaarLogGamma(constants: VanLaarConstants, x: number): number {
  const share = (constants.A21 * (1 - x)) / (constants.A12 * x + constants.A21 * (1 - x));
  return constants.A12 * share * share;
}

/** d ln gamma1 / dx1 of the equation above; dimensionless. Not positive for A12, A21 > 0. */
function vanLaarLogGammaSlope(constants: VanLaarConstants, x: number): number {
  const { A12, A21 } = constants;
  const sum = A12 * x + A21 * (1 - x);
  const share = (A21 * (1 - x)) / sum;
  return (-2 * A12 * share * A12 * A21) / (sum * sum);
}

function gammaLaw(
  kind: string,
  scale: TemperatureFunction,
  constants: VanLaarConstants,
  logReference: number,
): SeparableLaw {
  const gamma = (x: number): number => Math.exp(vanLaarLogGamma(constants, x) - logReference);
  return separableLaw(
    kind,
    scale,
    (x) => x * gamma(x),
    (x) => gamma(x) * (1 + x * vanLaarLogGammaSlope(constants, x)),
  );
}

/**
 * van Laar with the pure component as reference: p* = psat(T) x gamma(x).
 *
 * @param constants - A12 and A21 of the pair.
 * @param saturation - Vapour pressure of the pure component, Pa, with its relative slope, 1/K.
 * @returns The law; its reference state is the pure liquid, its heat that of vaporisation (no heat of
 *   mixing, as the constants do not depend on temperature).
 * @remarks Range and error as the activity coefficient. Source: [vanLaar1910].
 */
export function vanLaarLaw(constants: VanLaarConstants, saturation: TemperatureFunction): SeparableLaw {
  return gammaLaw('van-laar', saturation, constants, 0);
}

/**
 * van Laar tied to Henry's law at infinite dilution: p* = K(T) x exp[ln gamma(x) - ln gamma(0)].
 *
 * @param constants - A12 and A21 of the pair; only the shape of gamma over x is used.
 * @param henry - Henry constant on the mole-fraction scale, Pa, with its relative slope, 1/K.
 * @returns The law; its reference state is infinite dilution, its heat that of Henry's law.
 * @remarks Range: dilute to moderate x near the temperature of the Henry constant. At x = 1 the law gives
 *   K(T) exp(-A12), not the vapour pressure: not for pure solute. Error: that of the Henry constant at
 *   x -> 0, and a share of the misfit of A12 that grows with x.
 * Source: unsymmetric convention, [Prausnitz1999], chapter 6. Departs: constants of the boiling fit are
 *   kept at all temperatures.
 */
export function vanLaarHenryLaw(constants: VanLaarConstants, henry: TemperatureFunction): SeparableLaw {
  return gammaLaw('van-laar-henry', henry, constants, constants.A12);
}
