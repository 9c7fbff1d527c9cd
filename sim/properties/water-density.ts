// Volume of liquid water at 0.1 MPa, IAPWS SR6-08: one Gibbs-type polynomial in two reduced
// temperatures, alpha = 10 K/(593 K - T) and beta = 10 K/(T - 232 K).

// Specific gas constant of water, J/(kg K), and reference pressure, Pa, [SR6-08] section 2.
const R_WATER = 461.51805;
const P_REFERENCE = 1e5;
const T_REFERENCE = 10;
const VOLUME_SCALE = (R_WATER * T_REFERENCE) / P_REFERENCE;

// a5..a10 and b5..b10 of [SR6-08] table 1; dimensionless.
const A5 = 1.93763157e-2;
const A6 = 6.74458446e3;
const A7 = -2.22521604e5;
const A8 = 1.00231247e8;
const A9 = -1.63552118e9;
const A10 = 8.32299658e9;
const B5 = 5.78545292e-3;
const B6 = -1.53195665e-2;
const B7 = 3.11337859e-2;
const B8 = -4.23546241e-2;
const B9 = 3.38713507e-2;
const B10 = -1.19946761e-2;

/**
 * Density of liquid water at 0.1 MPa.
 *
 *   1/rho = (R T0 / p0) [a5 + sum a_i alpha^n_i + sum b_i beta^m_i],  n = 4,5,7,8,9,  m = 1..6
 *
 * @param T - Temperature, K; scalar.
 * @returns Density, kg/m3.
 * @remarks Range 253.15-383.15 K; outside, extrapolates smoothly between 240 and 450 K. Error: 1e-6
 *   relative from 273 to 373 K. The pressure's effect (4.5e-5 for each MPa) is left out.
 * Source: [SR6-08], density equation and table 1. Departs: nothing.
 */
export function waterDensity(T: number): number {
  const alpha = T_REFERENCE / (593 - T);
  const beta = T_REFERENCE / (T - 232);
  const alpha2 = alpha * alpha;
  const alpha4 = alpha2 * alpha2;
  const gas = A5 + alpha4 * (A6 + alpha * (A7 + alpha2 * (A8 + alpha * (A9 + alpha * A10))));
  const cold = beta * (B5 + beta * (B6 + beta * (B7 + beta * (B8 + beta * (B9 + beta * B10)))));
  return 1 / (VOLUME_SCALE * (gas + cold));
}

/**
 * Relative slope of the density, the exact derivative of the formula above.
 *
 *   d ln rho / dT = -(dv/dT)/v,  d alpha/dT = alpha^2/T0,  d beta/dT = -beta^2/T0
 *
 * @param T - Temperature, K; scalar.
 * @returns Slope, 1/K; changes sign at 277.13 K.
 * @remarks Range as the density.
 * Source: derivative of the form above.
 */
export function waterDensitySlope(T: number): number {
  const alpha = T_REFERENCE / (593 - T);
  const beta = T_REFERENCE / (T - 232);
  const alpha2 = alpha * alpha;
  const alpha3 = alpha2 * alpha;
  const dGas = alpha3 * (4 * A6 + alpha * (5 * A7 + alpha2 * (7 * A8 + alpha * (8 * A9 + alpha * 9 * A10))));
  const dCold = B5 + beta * (2 * B6 + beta * (3 * B7 + beta * (4 * B8 + beta * (5 * B9 + beta * 6 * B10))));
  const dVolume = (VOLUME_SCALE * (dGas * alpha2 - dCold * beta * beta)) / T_REFERENCE;
  return -dVolume * waterDensity(T);
}
