// Saturation line of ordinary water, IAPWS-IF97 region 4, in both directions and with its slope.

// Coefficients n1..n10 of [IF97] table 34; dimensionless, T in K, p in MPa.
const N1 = 0.11670521452767e4;
const N2 = -0.72421316703206e6;
const N3 = -0.17073846940092e2;
const N4 = 0.1202082470247e5;
const N5 = -0.32325550322333e7;
const N6 = 0.1491510861353e2;
const N7 = -0.48232657361591e4;
const N8 = 0.40511340542057e6;
const N9 = -0.23855557567849;
const N10 = 0.65017534844798e3;

/**
 * Saturation pressure of water over liquid.
 *
 *   p / MPa = [2 C / (-B + (B^2 - 4 A C)^(1/2))]^4,  theta = T + n9 / (T - n10)
 *   A = theta^2 + n1 theta + n2,  B = n3 theta^2 + n4 theta + n5,  C = n6 theta^2 + n7 theta + n8
 *
 * @param T - Temperature, K; scalar.
 * @returns Pressure, Pa.
 * @remarks Range 273.15-647.096 K; outside, extrapolates and stays monotonic from 240 K to the
 *   critical point (below 273.15 K: undercooled liquid, not ice). Error: 0.025 % of p.
 * Source: [IF97], equation 30. Departs: nothing; result in Pa.
 */
export function waterSaturationPressure(T: number): number {
  const theta = T + N9 / (T - N10);
  const A = (theta + N1) * theta + N2;
  const B = (N3 * theta + N4) * theta + N5;
  const C = (N6 * theta + N7) * theta + N8;
  const root = (2 * C) / (-B + Math.sqrt(B * B - 4 * A * C));
  const square = root * root;
  return 1e6 * square * square;
}

/**
 * Relative slope of the saturation line, the exact derivative of the formula above.
 *
 *   d ln p / dT = 4 (C'/C - D'/D) theta',  D = -B + (B^2 - 4 A C)^(1/2),  theta' = 1 - n9/(T - n10)^2
 *
 * @param T - Temperature, K; scalar.
 * @returns Slope, 1/K; positive.
 * @remarks Range and error as the pressure; R T^2 times the slope is the ideal heat of vaporisation,
 *   0.1 % from the tabulated one at 298.15 K.
 * Source: derivative of [IF97], equation 30.
 */
export function waterSaturationSlope(T: number): number {
  const gap = T - N10;
  const theta = T + N9 / gap;
  const A = (theta + N1) * theta + N2;
  const B = (N3 * theta + N4) * theta + N5;
  const C = (N6 * theta + N7) * theta + N8;
  const dA = 2 * theta + N1;
  const dB = 2 * N3 * theta + N4;
  const dC = 2 * N6 * theta + N7;
  const root = Math.sqrt(B * B - 4 * A * C);
  const D = -B + root;
  const dD = -dB + (B * dB - 2 * (dA * C + A * dC)) / root;
  return 4 * (dC / C - dD / D) * (1 - N9 / (gap * gap));
}

/**
 * Boiling temperature of water.
 *
 *   T = [n10 + D - ((n10 + D)^2 - 4 (n9 + n10 D))^(1/2)] / 2,  D = 2 G / (-F - (F^2 - 4 E G)^(1/2))
 *   E = b^2 + n3 b + n6,  F = n1 b^2 + n4 b + n7,  G = n2 b^2 + n5 b + n8,  b = (p / MPa)^(1/4)
 *
 * @param p - Pressure, Pa; scalar.
 * @returns Temperature, K.
 * @remarks Range 611.213 Pa - 22.064 MPa; inverts the pressure to 1e-9 K inside it.
 * Source: [IF97], equation 31 (the same quadratic, solved for the temperature).
 */
export function waterBoilingTemperature(p: number): number {
  const b = Math.sqrt(Math.sqrt(p / 1e6));
  const E = (b + N3) * b + N6;
  const F = (N1 * b + N4) * b + N7;
  const G = (N2 * b + N5) * b + N8;
  const D = (2 * G) / (-F - Math.sqrt(F * F - 4 * E * G));
  const sum = N10 + D;
  return 0.5 * (sum - Math.sqrt(sum * sum - 4 * (N9 + N10 * D)));
}
