// Heat transfer in the gas from mass transfer in the gas.

/**
 * Gas-side heat coefficient by the analogy of Chilton and Colburn.
 *
 *   h = kc rhoG cp (Sc/Pr)^(2/3) = kc rhoG cp Le^(2/3),  Le = k/(rhoG cp D)
 *
 * @param kc - Gas coefficient on the concentration scale, m/s; scalar.
 * @param rhoG - Gas density, kg/m3.
 * @param cp - Heat capacity of the gas, J/(kg K).
 * @param kG - Thermal conductivity of the gas, W/(m K).
 * @param DG - Diffusivity of the component whose kc it is, m2/s.
 * @returns Heat coefficient, W/(m2 K); acts on the dry area, a dry bed warms too.
 * @remarks Range: Pr and Sc 0.6-3000. Error: air-water h/(kY cs) within 5 % of Le^(2/3).
 * Source: [Chilton1934].
 */
export function gasHeatCoefficient(kc: number, rhoG: number, cp: number, kG: number, DG: number): number {
  const Le = kG / (rhoG * cp * DG);
  return kc * rhoG * cp * Math.cbrt(Le * Le);
}
