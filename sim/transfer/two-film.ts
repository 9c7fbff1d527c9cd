// Two films in series with equilibrium at the interface, in partial pressure.

/**
 * Overall gas-side coefficient.
 *
 *   1/KG = 1/kG + H/kL,  H = (dp* /dx)/cL
 *
 * @param kG - Gas coefficient, mol/(m2 s Pa); scalar, not negative.
 * @param kL - Liquid coefficient, m/s; scalar, not negative; times the enhancement factor if there is one.
 * @param slope - dp* /dx of the equilibrium at the liquid's state, Pa; not negative.
 * @param cL - Molar concentration of the liquid, mol/m3; positive.
 * @returns Coefficient KG, mol/(m2 s Pa); N = KG (p - p*). 0 when either film coefficient is 0.
 * @remarks Range: straight equilibrium between bulk and interface; elsewhere first order in the curvature.
 *   Written without a division by kG or kL, so a stopped phase gives 0, not 0/0.
 * Source: [Whitman1923], [Lewis1924].
 */
export function overallGasCoefficient(kG: number, kL: number, slope: number, cL: number): number {
  const liquid = kL * cL;
  const sum = liquid + kG * slope;
  return sum > 0 ? (kG * liquid) / sum : 0;
}

/** Share of the whole resistance that lies in the gas film, KG/kG; 1 when the liquid offers none. */
export function gasFilmShare(kG: number, kL: number, slope: number, cL: number): number {
  const liquid = kL * cL;
  const sum = liquid + kG * slope;
  return sum > 0 ? liquid / sum : 1;
}

/**
 * Partial pressure at the interface.
 *
 *   pi = p - N/kG with N = KG (p - p*), i.e. pi = p - share (p - p*)
 *
 * @param p - Partial pressure in the gas, Pa.
 * @param pStar - Pressure in equilibrium with the bulk liquid, Pa.
 * @param share - Gas-film share of the resistance, from `gasFilmShare`.
 * @returns Pressure, Pa; between p and p*.
 * Source: [Lewis1924].
 */
export function interfacePressure(p: number, pStar: number, share: number): number {
  return p - share * (p - pStar);
}
