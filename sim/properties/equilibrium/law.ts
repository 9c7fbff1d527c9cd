// The one question the transfer model asks of an equilibrium: at this liquid, which partial pressure
// would be in balance, how does it move with the mole fraction, and what heat goes with it?

import { GAS_CONSTANT } from '../constants.ts';

/**
 * Equilibrium of one transferring component between an ideal gas and the liquid.
 *
 * All arguments are scalars; a call allocates nothing and keeps nothing. `x` is the component's mole
 * fraction in the liquid (0..1, may stray slightly outside during an iteration), `p` the total
 * pressure, Pa. The liquid is seen as pseudo-binary: what is not this component counts as solvent, so
 * other solutes act by dilution only.
 */
export interface EquilibriumLaw {
  /** Word of the case file: 'henry', 'van-laar', 'van-laar-henry', 'nrtl', 'raoult', 'ratio', 'table'. */
  readonly kind: string;
  /** Equilibrium partial pressure p*, Pa; 0 at x = 0. */
  partialPressure(T: number, x: number, p: number): number;
  /** dp* /dx at constant T and p, Pa. The limit at x = 0 is the Henry constant in Pa. */
  slope(T: number, x: number, p: number): number;
  /**
   * Heat to take one mole from the solution into the gas, J/mol, in the reference state that the
   * law names: R T^2 (d ln p* /dT) there. The energy balance must use this number and no other, or
   * heat and equilibrium contradict each other.
   */
  vaporisationEnthalpy(T: number): number;
}

/**
 * A law whose temperature and composition factors separate: p* = referencePressure(T) x activity(x).
 * Column code may tabulate the first and evaluate the second.
 */
export interface SeparableLaw extends EquilibriumLaw {
  /** Pressure scale at T, Pa: Henry constant (K x at dilution) or vapour pressure. */
  referencePressure(T: number): number;
  /** x gamma(x) relative to the law's reference state; dimensionless. */
  activity(x: number): number;
  /** d(activity)/dx; dimensionless. */
  activitySlope(x: number): number;
}

/** A function of temperature and its relative slope. */
export interface TemperatureFunction {
  /** Value at T. */
  readonly value: (T: number) => number;
  /** d ln value / dT, 1/K. */
  readonly relativeSlope: (T: number) => number;
}

/** Builds a separable law from its two factors. */
export function separableLaw(
  kind: string,
  scale: TemperatureFunction,
  activity: (x: number) => number,
  activitySlope: (x: number) => number,
): SeparableLaw {
  return {
    kind,
    referencePressure: (T) => scale.value(T),
    activity,
    activitySlope,
    partialPressure: (T, x) => scale.value(T) * activity(x),
    slope: (T, x) => scale.value(T) * activitySlope(x),
    vaporisationEnthalpy: (T) => GAS_CONSTANT * T * T * scale.relativeSlope(T),
  };
}
