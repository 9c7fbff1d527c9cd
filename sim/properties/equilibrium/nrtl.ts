// Activity coefficients by the NRTL equation with energy constants, so that they move with temperature.

import { GAS_CONSTANT } from '../constants.ts';
import type { EquilibriumLaw, TemperatureFunction } from './law.ts';

/** Constants of the NRTL equation; the component is 1, the solvent 2. */
export interface NrtlConstants {
  /** g12 - g22, J/mol. */
  readonly b12: number;
  /** g21 - g11, J/mol. */
  readonly b21: number;
  /** Non-randomness; dimensionless. */
  readonly alpha: number;
}

/**
 * Activity coefficient of component 1 in a binary.
 *
 *   ln gamma1 = x2^2 {tau21 [G21/(x1 + x2 G21)]^2 + tau12 G12/(x2 + x1 G12)^2}
 *   tau_ij = b_ij/(R T),  G_ij = exp(-alpha tau_ij)
 *
 * @param constants - b12, b21 and alpha of the pair.
 * @param T - Temperature, K; scalar.
 * @param x - Mole fraction of component 1; scalar.
 * @returns ln gamma1; 0 at x = 1.
 * @remarks Range: that of the data behind the constants. Error: order of 5 % inside (common practice, no source).
 * Source: [Renon1968]. Departs: nothing.
 */
export function nrtlLogGamma(constants: NrtlConstants, T: number, x: number): number {
  const tau12 = constants.b12 / (GAS_CONSTANT * T);
  const tau21 = constants.b21 / (GAS_CONSTANT * T);
  const G12 = Math.exp(-constants.alpha * tau12);
  const G21 = Math.exp(-constants.alpha * tau21);
  const x2 = 1 - x;
  const near = x + x2 * G21;
  const far = x2 + x * G12;
  return x2 * x2 * ((tau21 * G21 * G21) / (near * near) + (tau12 * G12) / (far * far));
}

/** d ln gamma1 / dx1 of the equation above; dimensionless. */
function nrtlLogGammaSlope(constants: NrtlConstants, T: number, x: number): number {
  const tau12 = constants.b12 / (GAS_CONSTANT * T);
  const tau21 = constants.b21 / (GAS_CONSTANT * T);
  const G12 = Math.exp(-constants.alpha * tau12);
  const G21 = Math.exp(-constants.alpha * tau21);
  const x2 = 1 - x;
  const near = x + x2 * G21;
  const far = x2 + x * G12;
  const first = (tau21 * G21 * G21) / (near * near);
  const second = (tau12 * G12) / (far * far);
  return -2 * x2 * (first + second) - 2 * x2 * x2 * ((first * (1 - G21)) / near + (second * (G12 - 1)) / far);
}

/**
 * NRTL with the pure component as reference: p* = psat(T) x gamma(T, x).
 *
 * @param constants - b12, b21 and alpha of the pair.
 * @param saturation - Vapour pressure of the pure component, Pa, with its relative slope, 1/K.
 * @returns The law; its heat is taken at infinite dilution, vaporisation less the excess enthalpy:
 *   R T^2 (d ln psat/dT + d ln gamma(0)/dT), with ln gamma(0) = tau21 + tau12 exp(-alpha tau12).
 * @remarks Range and error as the activity coefficient. Source: [Renon1968].
 */
export function nrtlLaw(constants: NrtlConstants, saturation: TemperatureFunction): EquilibriumLaw {
  return {
    kind: 'nrtl',
    partialPressure: (T, x) => saturation.value(T) * x * Math.exp(nrtlLogGamma(constants, T, x)),
    slope: (T, x) =>
      saturation.value(T) * Math.exp(nrtlLogGamma(constants, T, x)) * (1 + x * nrtlLogGammaSlope(constants, T, x)),
    vaporisationEnthalpy: (T) => {
      const tau12 = constants.b12 / (GAS_CONSTANT * T);
      const tau21 = constants.b21 / (GAS_CONSTANT * T);
      const dLogGamma = -(tau21 + tau12 * (1 - constants.alpha * tau12) * Math.exp(-constants.alpha * tau12)) / T;
      return GAS_CONSTANT * T * T * (saturation.relativeSlope(T) + dLogGamma);
    },
  };
}
