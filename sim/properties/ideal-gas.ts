// Ideal-gas density and heat capacity. At the pressures of a packed absorber (below 10 bar for
// permanent gases) the compressibility stays within 1 % of one; no correction is made.

import { GAS_CONSTANT } from './constants.ts';

/**
 * Molar concentration of an ideal gas.
 *
 *   c = p / (R T)
 *
 * @param p - Pressure, Pa; scalar.
 * @param T - Temperature, K; scalar.
 * @returns Concentration, mol/m3.
 * @remarks Range: compressibility near one. Source: ideal-gas law.
 */
export function gasConcentration(p: number, T: number): number {
  return p / (GAS_CONSTANT * T);
}

/**
 * Density of an ideal gas.
 *
 *   rho = M p / (R T)
 *
 * @param M - Molar mass of the mixture, kg/mol; scalar.
 * @param p - Pressure, Pa; scalar.
 * @param T - Temperature, K; scalar.
 * @returns Density, kg/m3.
 * @remarks Range: compressibility near one. Source: ideal-gas law.
 */
export function gasDensity(M: number, p: number, T: number): number {
  return (M * p) / (GAS_CONSTANT * T);
}

/** Heat capacity polynomial a + b t + c t^2 + d t^3 with t = T - offset. */
export interface HeatCapacityPolynomial {
  /** J/(mol K). */
  readonly a: number;
  /** J/(mol K2). */
  readonly b: number;
  /** J/(mol K3). */
  readonly c: number;
  /** J/(mol K4). */
  readonly d: number;
  /** K; 0 where the source uses kelvin, 273.15 where it uses degC. */
  readonly offset: number;
  /** Range of the fit, K. */
  readonly TMin: number;
  readonly TMax: number;
}

/**
 * Ideal-gas heat capacity at constant pressure.
 *
 *   cp = a + b t + c t^2 + d t^3,  t = T - offset
 *
 * @param polynomial - Coefficients of the substance.
 * @param T - Temperature, K; scalar.
 * @returns Molar heat capacity, J/(mol K).
 * @remarks Range in the coefficients; outside, extrapolates as the polynomial. Error: below 1 %.
 * Source: form of [Kyle1984] and [Himmelblau2022]; coefficients named with each substance.
 */
export function idealGasHeatCapacity(polynomial: HeatCapacityPolynomial, T: number): number {
  const t = T - polynomial.offset;
  return polynomial.a + t * (polynomial.b + t * (polynomial.c + t * polynomial.d));
}

/**
 * Ideal-gas enthalpy between two temperatures, the exact integral of the heat capacity.
 *
 *   h(T) - h(T0) = integral of cp from T0 to T
 *
 * @param polynomial - Coefficients of the substance.
 * @param T0 - Start, K; scalar.
 * @param T - End, K; scalar.
 * @returns Enthalpy difference, J/mol; zero at T = T0.
 * @remarks Range as the heat capacity. Source: integral of the polynomial.
 */
export function idealGasEnthalpyChange(polynomial: HeatCapacityPolynomial, T0: number, T: number): number {
  return primitive(polynomial, T - polynomial.offset) - primitive(polynomial, T0 - polynomial.offset);
}

function primitive(polynomial: HeatCapacityPolynomial, t: number): number {
  const { a, b, c, d } = polynomial;
  return t * (a + t * (b / 2 + t * (c / 3 + (t * d) / 4)));
}
