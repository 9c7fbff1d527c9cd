// Correction of a gas coefficient for the flow that the transfer itself makes through a stagnant gas.

/** Relative difference below which the logarithmic mean is taken by its series. */
const SERIES = 1e-3;

/**
 * Logarithmic mean.
 *
 *   m = (a - b)/ln(a/b)
 *
 * @param a - Positive; scalar.
 * @param b - Positive; scalar, in the same unit.
 * @returns Mean, between a and b; a = b without a singularity (series to fourth order, error 1e-16).
 * Source: definition.
 */
export function logarithmicMean(a: number, b: number): number {
  const sum = a + b;
  const r = (a - b) / sum;
  if (Math.abs(r) < SERIES) {
    // ln(a/b) = 2 (r + r^3/3 + r^5/5 + ...)
    const r2 = r * r;
    return (0.5 * sum) / (1 + r2 * (1 / 3 + r2 / 5));
  }
  return (a - b) / Math.log(a / b);
}

/**
 * Factor on a gas coefficient for transfer through a stagnant carrier.
 *
 *   kG = (kc/(R T)) (p/pBM),  pBM = logarithmic mean of the carrier's partial pressures
 *
 * @param p - Total pressure, Pa.
 * @param inertBulk - Partial pressure of what does not transfer, in the bulk gas, Pa; positive.
 * @param inertInterface - The same at the interface, Pa; positive.
 * @returns Factor p/pBM; at least 1 where the partial pressures are within the total, 1 for a trace.
 * @remarks Range: one direction of transfer through a carrier that stands still. A carrier pressure at or
 *   below zero has no meaning here (pure vapour): the caller bounds it.
 * Source: [Stefan1874]; [Colburn1934].
 */
export function driftFactor(p: number, inertBulk: number, inertInterface: number): number {
  return p / logarithmicMean(inertBulk, inertInterface);
}

/**
 * Factor on a heat coefficient for the enthalpy that transfer carries through the film (Ackermann).
 *
 *   f = phi/(1 - exp(-phi)),  phi = sum(N cp)/h
 *
 * @param phi - Sum of molar fluxes towards the interface times heat capacities, over the dry heat
 *   coefficient; dimensionless, positive for condensation.
 * @returns Factor on h at the interface; 1 at phi = 0, above 1 for condensation.
 * @remarks Smooth through zero. Source: [Ackermann1937].
 */
export function ackermannFactor(phi: number): number {
  if (Math.abs(phi) < 1e-5) return 1 + phi / 2 + (phi * phi) / 12;
  return -phi / Math.expm1(-phi);
}
