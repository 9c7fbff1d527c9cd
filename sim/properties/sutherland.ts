// Sutherland's law, used for the viscosity and, with other constants, for the conductivity of a gas.

/** Constants of f = f0 (T/T0)^1.5 (T0 + S)/(T + S). */
export interface SutherlandConstants {
  /** Value at T0: Pa s for viscosity, W/(m K) for conductivity. */
  readonly f0: number;
  /** K. */
  readonly T0: number;
  /** K. */
  readonly S: number;
}

/**
 * Transport property of a dilute gas by Sutherland's law.
 *
 *   f = f0 (T/T0)^(3/2) (T0 + S)/(T + S)
 *
 * @param constants - f0, T0, S of the gas.
 * @param T - Temperature, K; scalar.
 * @returns Viscosity, Pa s, or thermal conductivity, W/(m K), as the constants are.
 * @remarks Range for 2-4 % error: about 200-1500 K (steam 360-1500 K); extrapolates monotonically.
 *   Independent of pressure below about 10 bar.
 * Source: [White2006], tables 1-2 and 1-3; form of [Sutherland1893].
 */
export function sutherland(constants: SutherlandConstants, T: number): number {
  const ratio = T / constants.T0;
  return (constants.f0 * ratio * Math.sqrt(ratio) * (constants.T0 + constants.S)) / (T + constants.S);
}
