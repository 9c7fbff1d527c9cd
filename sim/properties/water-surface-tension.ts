// Surface tension of ordinary water against its vapour, IAPWS R1-76.

/** Critical temperature of water, K [R1-76]. */
const WATER_CRITICAL_TEMPERATURE = 647.096;

/**
 * Surface tension of water.
 *
 *   sigma = 0.2358 N/m tau^1.256 (1 - 0.625 tau),  tau = 1 - T/Tc
 *
 * @param T - Temperature, K; scalar.
 * @returns Surface tension, N/m.
 * @remarks Range 273.16-647.096 K (reasonable down to 248 K); above the critical point NaN. Error:
 *   0.4 % at 298 K. A dissolved organic lowers it: not modelled here.
 * Source: [R1-76], equation 1. Departs: nothing.
 */
export function waterSurfaceTension(T: number): number {
  const tau = 1 - T / WATER_CRITICAL_TEMPERATURE;
  return 0.2358 * Math.exp(1.256 * Math.log(tau)) * (1 - 0.625 * tau);
}
