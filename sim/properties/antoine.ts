// Vapour pressure of a pure liquid by Antoine's equation, natural logarithm and kilopascal.

/** Constants of ln(p/kPa) = A - B/(t/degC + C). */
export interface AntoineConstants {
  /** Dimensionless. */
  readonly A: number;
  /** degC. */
  readonly B: number;
  /** degC. */
  readonly C: number;
  /** Range of the fit, K. */
  readonly TMin: number;
  readonly TMax: number;
}

const KELVIN_OFFSET = 273.15;
const LN_THOUSAND = Math.log(1000);

/**
 * Vapour pressure by Antoine's equation.
 *
 *   ln(p / kPa) = A - B / (t / degC + C)
 *
 * @param constants - A, B, C of the substance.
 * @param T - Temperature, K; scalar.
 * @returns Pressure, Pa.
 * @remarks Range as in the constants; outside, extrapolates and stays monotonic for t > -C. Error:
 *   about 1 % inside the range of most fits, more below it.
 * Source: [Smith2018], appendix B, table B.2. Departs: result in Pa.
 */
export function antoinePressure(constants: AntoineConstants, T: number): number {
  return Math.exp(constants.A + LN_THOUSAND - constants.B / (T - KELVIN_OFFSET + constants.C));
}

/**
 * Relative slope of Antoine's equation.
 *
 *   d ln p / dT = B / (t + C)^2
 *
 * @param constants - A, B, C of the substance.
 * @param T - Temperature, K; scalar.
 * @returns Slope, 1/K; positive.
 * @remarks Range as the pressure.
 * Source: derivative of the equation above.
 */
export function antoineSlope(constants: AntoineConstants, T: number): number {
  const gap = T - KELVIN_OFFSET + constants.C;
  return constants.B / (gap * gap);
}
