// Viscosity of a gas mixture. The two-component form serves a carrier with its solvent vapour; traces
// of a solute change the viscosity by less than the error of the method.

/**
 * Viscosity of a binary gas mixture by Wilke's rule.
 *
 *   mu = y1 mu1/(y1 + y2 phi12) + y2 mu2/(y2 + y1 phi21)
 *   phi_ij = [1 + (mu_i/mu_j)^(1/2) (M_j/M_i)^(1/4)]^2 / [8 (1 + M_i/M_j)]^(1/2)
 *
 * @param y1 - Mole fraction of gas 1, 0..1; scalar. Gas 2 is the rest.
 * @param mu1 - Viscosity of pure gas 1, Pa s.
 * @param mu2 - Viscosity of pure gas 2, Pa s.
 * @param M1 - Molar mass of gas 1, kg/mol.
 * @param M2 - Molar mass of gas 2, kg/mol.
 * @returns Viscosity, Pa s; equals the pure value at either end.
 * @remarks Range: dilute gases, no hydrogen-heavy pairs. Error: about 2 %.
 * Source: [Wilke1950]. Departs: nothing.
 */
export function wilkeViscosity(y1: number, mu1: number, mu2: number, M1: number, M2: number): number {
  const y2 = 1 - y1;
  const root = Math.sqrt(mu1 / mu2);
  const quarter = Math.sqrt(Math.sqrt(M2 / M1));
  const bracket12 = 1 + root * quarter;
  const bracket21 = 1 + 1 / (root * quarter);
  const phi12 = (bracket12 * bracket12) / Math.sqrt(8 * (1 + M1 / M2));
  const phi21 = (bracket21 * bracket21) / Math.sqrt(8 * (1 + M2 / M1));
  return (y1 * mu1) / (y1 + y2 * phi12) + (y2 * mu2) / (y2 + y1 * phi21);
}
