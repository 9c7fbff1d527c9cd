// Film coefficients of Shulman and co-workers as printed by Treybal: an independent check on the default
// ones. Hold-up and interfacial area are inputs, as the printed fits hold for single packings only.

/**
 * Gas film coefficient.
 *
 *   FG Sc^(2/3) M/G = 1.195 [Ds G/(mu (1 - epsLo))]^-0.36
 *
 * @param Ds - Diameter of the sphere with the packing element's surface, m.
 * @param G - Superficial gas mass flux, kg/(m2 s).
 * @param M - Molar mass of the gas, kg/mol.
 * @param rhoG - Gas density, kg/m3.
 * @param muG - Gas viscosity, Pa s.
 * @param DG - Diffusivity in the gas, m2/s.
 * @param epsLo - Void fraction left by the liquid, 0..1.
 * @returns Coefficient FG, mol/(m2 s); equals kG p for a trace.
 * @remarks Range: rings 13-50 mm, saddles 13-38 mm. Source: [Shulman1955], as printed in [Treybal1980] chapter 6.
 */
export function shulmanGasCoefficient(
  Ds: number,
  G: number,
  M: number,
  rhoG: number,
  muG: number,
  DG: number,
  epsLo: number,
): number {
  const Re = (Ds * G) / (muG * (1 - epsLo));
  const Sc = muG / (rhoG * DG);
  return (1.195 * Math.exp(-0.36 * Math.log(Re)) * (G / M)) / Math.cbrt(Sc * Sc);
}

/**
 * Liquid film coefficient.
 *
 *   kL Ds/DL = 25.1 (Ds L/muL)^0.45 Sc^0.5
 *
 * @param Ds - Diameter of the sphere with the packing element's surface, m.
 * @param L - Superficial liquid mass flux, kg/(m2 s).
 * @param rhoL - Liquid density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @param DL - Diffusivity in the liquid, m2/s.
 * @returns Coefficient, m/s.
 * @remarks Range as above. Source: [Shulman1955], as printed in [Treybal1980] chapter 6.
 */
export function shulmanLiquidCoefficient(Ds: number, L: number, rhoL: number, muL: number, DL: number): number {
  const Re = (Ds * L) / muL;
  const Sc = muL / (rhoL * DL);
  return (25.1 * Math.exp(0.45 * Math.log(Re)) * Math.sqrt(Sc) * DL) / Ds;
}
