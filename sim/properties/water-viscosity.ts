// Viscosity of liquid water at 0.1 MPa, IAPWS SR6-08.

/**
 * Viscosity of liquid water at 0.1 MPa.
 *
 *   mu / uPa s = 280.68 Tr^-1.9 + 511.45 Tr^-7.7 + 61.131 Tr^-19.6 + 0.45903 Tr^-40,  Tr = T/300 K
 *
 * @param T - Temperature, K; scalar.
 * @returns Viscosity, Pa s.
 * @remarks Range 253.15-383.15 K; outside, extrapolates and stays monotonic. Error: 1 % from 273 to
 *   373 K.
 * Source: [SR6-08], equation 7. Departs: nothing.
 */
export function waterViscosity(T: number): number {
  const logTr = Math.log(T / 300);
  return (
    1e-6 *
    (280.68 * Math.exp(-1.9 * logTr) +
      511.45 * Math.exp(-7.7 * logTr) +
      61.131 * Math.exp(-19.6 * logTr) +
      0.45903 * Math.exp(-40 * logTr))
  );
}
