// Isobaric heat capacity of liquid water at 0.1 MPa, IAPWS SR6-08.

// Specific gas constant of water, J/(kg K), [SR6-08] section 2.
const R_WATER = 461.51805;
const T_REFERENCE = 10;

// a1..a3, b1..b4, c3 of [SR6-08] table 1; dimensionless.
const A1 = -1.661470539e5;
const A2 = 2.70878164e6;
const A3 = -1.557191544e8;
const B1 = -8.237426256e-1;
const B2 = 1.908956353;
const B3 = -2.017597384;
const B4 = 8.546361348e-1;
const C3 = -8.983025854;

/**
 * Heat capacity of liquid water at constant pressure, 0.1 MPa.
 *
 *   cp = -R { c3 + tau [sum n (n+1) a alpha^(n+2) + sum m (m+1) b beta^(m+2)] },
 *   tau = T/T0,  n = 4, 5, 7,  m = 2, 3, 4, 5
 *
 * @param T - Temperature, K; scalar.
 * @returns Heat capacity, J/(kg K).
 * @remarks Range 253.15-383.15 K; outside, extrapolates smoothly between 240 and 450 K. Error: 0.1 %.
 * Source: [SR6-08], heat capacity equation and table 1. Departs: nothing.
 */
export function waterHeatCapacity(T: number): number {
  const alpha = T_REFERENCE / (593 - T);
  const beta = T_REFERENCE / (T - 232);
  const tau = T / T_REFERENCE;
  const alpha2 = alpha * alpha;
  const alpha6 = alpha2 * alpha2 * alpha2;
  const beta2 = beta * beta;
  const beta4 = beta2 * beta2;
  const hot = alpha6 * (20 * A1 + alpha * (30 * A2 + alpha2 * 56 * A3));
  const cold = beta4 * (6 * B1 + beta * (12 * B2 + beta * (20 * B3 + beta * 30 * B4)));
  return -R_WATER * (C3 + tau * (hot + cold));
}
