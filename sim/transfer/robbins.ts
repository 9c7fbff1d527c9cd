// Pressure drop after Robbins, for packings whose dry packing factor is known.

// Conversions to the units of the paper.
const FOOT = 0.3048;
const POUND = 0.45359237;
/** kg/(m2 s) in lb/(h ft2). */
const FLUX = (3600 * FOOT * FOOT) / POUND;
/** kg/m3 in lb/ft3. */
const DENSITY = (FOOT * FOOT * FOOT) / POUND;
/** inH2O/ft in Pa/m; conventional inch of water 249.08891 Pa. */
const GRADIENT = 249.08891 / FOOT;

// C3 and C4 of [Robbins1991].
const C3 = 7.4e-8;
const C4 = 2.7e-5;

/**
 * Irrigated pressure drop.
 *
 *   dp = d + 0.4 (Lf/20000)^0.1 d^4 inH2O/ft,  d = C3 Gf^2 10^(C4 Lf)
 *   Gf = G (0.075/rhoG)^(1/2) (Fpd/20)^(1/2),  Lf = L (62.4/rhoL)(Fpd/20)^(1/2) mu^0.1
 *   G, L in lb/(h ft2), rho in lb/ft3, mu in cP, Fpd in 1/ft
 *
 * @param L - Superficial liquid mass flux, kg/(m2 s); scalar, not negative.
 * @param G - Superficial gas mass flux, kg/(m2 s); scalar.
 * @param rhoL - Liquid density, kg/m3.
 * @param rhoG - Gas density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @param Fpd - Dry packing factor, 1/m: not the packing factor of the flood charts.
 * @returns Pressure gradient, Pa/m; as G^2 for a dry bed.
 * @remarks Range: Fpd 50-650 1/m and about atmospheric pressure; the paper has further rules outside, not
 *   included: do not use it there. Error: order of 20 % (common practice, no source).
 * Source: [Robbins1991]. Departs: SI at the edges.
 */
export function robbinsPressureDrop(
  L: number,
  G: number,
  rhoL: number,
  rhoG: number,
  muL: number,
  Fpd: number,
): number {
  const factor = Math.sqrt((Fpd * FOOT) / 20);
  const Gf = G * FLUX * Math.sqrt(0.075 / (rhoG * DENSITY)) * factor;
  const viscosity = Math.exp(0.1 * Math.log(muL * 1e3));
  const Lf = ((L * FLUX * 62.4) / (rhoL * DENSITY)) * factor * viscosity;
  const dry = C3 * Gf * Gf * Math.exp(Math.LN10 * C4 * Lf);
  const squared = dry * dry;
  const loading = Lf > 0 ? 0.4 * Math.exp(0.1 * Math.log(Lf / 20_000)) * squared * squared : 0;
  return (dry + loading) * GRADIENT;
}
