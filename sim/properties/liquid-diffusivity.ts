// Diffusivity of a dilute solute in a liquid: an estimate, a measured value carried to another
// temperature, and the published Arrhenius form for carbon dioxide in water.

/** Association factor of water in the equation of Wilke and Chang, [Wilke1955]. */
export const WATER_ASSOCIATION = 2.6;

/**
 * Liquid diffusivity by Wilke and Chang.
 *
 *   D / (cm2/s) = 7.4e-8 (phi M)^(1/2) T / (mu v^0.6), M in g/mol, mu in cP, v in cm3/mol
 *
 * @param T - Temperature, K; scalar.
 * @param mu - Viscosity of the solvent, Pa s; scalar.
 * @param M - Molar mass of the solvent, kg/mol.
 * @param phi - Association factor of the solvent: water 2.6, not associated 1.
 * @param v - Molar volume of the solute at its boiling point, m3/mol.
 * @returns Diffusivity, m2/s.
 * @remarks Range: dilute, 273-313 K by the data of the fit. Error: 11 % in water; phi = 2.26 for water
 *   gives 7 % less [Hayduk1974]; poor for ammonia (47 % high).
 * Source: [Wilke1955]. Departs: SI units.
 */
export function wilkeChangDiffusivity(T: number, mu: number, M: number, phi: number, v: number): number {
  const volume = Math.exp(0.6 * Math.log(v * 1e6));
  return (1e-4 * 7.4e-8 * Math.sqrt(phi * M * 1e3) * T) / (mu * 1e3 * volume);
}

/**
 * A measured liquid diffusivity carried to another temperature.
 *
 *   D = DRef (T/TRef) (muRef/mu)
 *
 * @param DRef - Measured diffusivity, m2/s.
 * @param TRef - Temperature of the measurement, K.
 * @param muRef - Viscosity of the solvent at TRef, Pa s.
 * @param T - Temperature, K; scalar.
 * @param mu - Viscosity of the solvent at T, Pa s; scalar.
 * @returns Diffusivity, m2/s; equals DRef at TRef.
 * @remarks Range: the same solvent, dilute. Error: a few per cent over 40 K in water.
 * Source: constancy of D mu/T, [Wilke1955] after Stokes and Einstein [Einstein1905].
 */
export function scaledDiffusivity(DRef: number, TRef: number, muRef: number, T: number, mu: number): number {
  return (DRef * T * muRef) / (TRef * mu);
}

/**
 * Diffusivity of carbon dioxide in water.
 *
 *   D / (m2/s) = 2.35e-6 exp(-2119 K/T)
 *
 * @param T - Temperature, K; scalar.
 * @returns Diffusivity, m2/s.
 * @remarks Range 273-368 K; outside, extrapolates monotonically. Error: order of 5 % (common practice, no source).
 * Source: [Versteeg1988]. Departs: nothing.
 */
export function carbonDioxideDiffusivity(T: number): number {
  return 2.35e-6 * Math.exp(-2119 / T);
}
