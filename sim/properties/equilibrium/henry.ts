// Henry's law with the compiled constant Hscp = c/p and its temperature dependence.

import { REFERENCE_TEMPERATURE } from '../constants.ts';
import { separableLaw } from './law.ts';
import type { SeparableLaw, TemperatureFunction } from './law.ts';

/** A compiled Henry constant. */
export interface HenryConstant {
  /** Hscp at 298.15 K, mol/(m3 Pa): concentration in the liquid over partial pressure. */
  readonly H: number;
  /** d ln Hscp / d(1/T), K; positive for all gases that dissolve with release of heat. */
  readonly B: number;
}

/**
 * Henry solubility at a temperature.
 *
 *   Hscp(T) = Hscp(298.15 K) exp[B (1/T - 1/298.15 K)]
 *
 * @param constant - H and B of the solute.
 * @param T - Temperature, K; scalar.
 * @returns Solubility, mol/(m3 Pa).
 * @remarks Range: some 30 K about 298.15 K; outside, extrapolates monotonically. Error: compiled values
 *   spread by 10-30 % between authors.
 * Source: [Sander2023]. Departs: nothing.
 */
export function henrySolubility(constant: HenryConstant, T: number): number {
  return constant.H * Math.exp(constant.B * (1 / T - 1 / REFERENCE_TEMPERATURE));
}

/**
 * Henry constant on the mole-fraction scale.
 *
 *   K = c_solvent / Hscp,  so that p* = K x at infinite dilution
 *
 * @param constant - H and B of the solute.
 * @param solvent - Molar concentration of the pure solvent, mol/m3, with its relative slope.
 * @returns Pressure scale, Pa, and d ln K/dT = B/T^2 + d ln c/dT, 1/K.
 * @remarks Range and error as the solubility. Source: [Sander2023] (x = c/c_solvent).
 */
export function henryPressure(constant: HenryConstant, solvent: TemperatureFunction): TemperatureFunction {
  return {
    value: (T) => solvent.value(T) / henrySolubility(constant, T),
    relativeSlope: (T) => constant.B / (T * T) + solvent.relativeSlope(T),
  };
}

/**
 * Henry's law: p* = K(T) x at any x.
 *
 * @param constant - H and B of the solute.
 * @param solvent - Molar concentration of the pure solvent, mol/m3, with its relative slope.
 * @returns The law; its reference state is infinite dilution, its heat R (B + T^2 d ln c/dT).
 * @remarks Range: x below about 0.01 for miscible organics. Error: for acetone in water at x = 0.05 the
 *   law is some 20 % high.
 * Source: [Sander2023]. Departs: nothing.
 */
export function henryLaw(constant: HenryConstant, solvent: TemperatureFunction): SeparableLaw {
  return separableLaw(
    'henry',
    henryPressure(constant, solvent),
    (x) => x,
    () => 1,
  );
}
