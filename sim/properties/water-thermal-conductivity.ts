// Thermal conductivity of liquid water at 0.1 MPa, IAPWS SR6-08.

/**
 * Thermal conductivity of liquid water at 0.1 MPa.
 *
 *   k / (W/(m K)) = 1.6630 Tr^-1.15 - 1.7781 Tr^-3.4 + 1.1567 Tr^-6.0 - 0.432115 Tr^-7.6,  Tr = T/300 K
 *
 * @param T - Temperature, K; scalar.
 * @returns Conductivity, W/(m K).
 * @remarks Range 273.15-383.15 K; outside, extrapolates smoothly. Error: 1.5 %.
 * Source: [SR6-08], equation 8. Departs: nothing.
 */
export function waterThermalConductivity(T: number): number {
  const logTr = Math.log(T / 300);
  return (
    1.663 * Math.exp(-1.15 * logTr) -
    1.7781 * Math.exp(-3.4 * logTr) +
    1.1567 * Math.exp(-6 * logTr) -
    0.432115 * Math.exp(-7.6 * logTr)
  );
}
