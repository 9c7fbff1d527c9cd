// Pressure drop of a packed bed after Stichlmair, Bravo and Fair: dry friction, and its increase at
// the hold-up that the bed actually has. Explicit in the hold-up: flooding is left to the balances.

import { particleDiameter } from './packing.ts';
import type { PackingGeometry, StichlmairConstants } from './packing.ts';

/** Geometry with its friction constants. */
export type StichlmairPacking = PackingGeometry & StichlmairConstants;

/** Exponent of the voidage, [Stichlmair1989]. */
export const VOIDAGE_EXPONENT = 4.65;

/** Share of the voids beyond which the void factor continues as an exponential, see below. */
const FULL_SHARE = 0.98;

/**
 * Gas Reynolds number of the dry bed.
 *
 *   Re = uG rhoG dp/muG,  dp = 6 (1 - eps)/a
 *
 * @param packing - Area and voidage.
 * @param uG - Superficial gas velocity, m/s; scalar, its size is used.
 * @param rhoG - Gas density, kg/m3.
 * @param muG - Gas viscosity, Pa s.
 * @returns Reynolds number.
 * Source: [Stichlmair1989].
 */
export function stichlmairReynolds(packing: PackingGeometry, uG: number, rhoG: number, muG: number): number {
  return (Math.abs(uG) * rhoG * particleDiameter(packing)) / muG;
}

/**
 * Dry pressure drop.
 *
 *   dp/dz = 0.75 f0 (1 - eps)/eps^4.65 rhoG uG^2/dp,  f0 = C1/Re + C2/Re^(1/2) + C3
 *
 * @param packing - Area, voidage, C1..C3.
 * @param uG - Superficial gas velocity, m/s; scalar, signed.
 * @param rhoG - Gas density, kg/m3.
 * @param muG - Gas viscosity, Pa s.
 * @returns Pressure gradient, Pa/m; odd in uG.
 * @remarks Range: the constants' (turbulent gas flow in random and structured packing). Written as a sum
 *   of powers of uG, so that it is finite, zero and differentiable at uG = 0 (slope of the C1 term).
 *   Error: order of 10 % with constants of the same packing (common practice, no source).
 * Source: [Stichlmair1989]. Departs: nothing.
 */
export function stichlmairDryPressureDrop(packing: StichlmairPacking, uG: number, rhoG: number, muG: number): number {
  const dp = particleDiameter(packing);
  const u = Math.abs(uG);
  const viscous = muG / (rhoG * dp);
  const friction = packing.C1 * viscous * u + packing.C2 * Math.sqrt(viscous * u) * u + packing.C3 * u * u;
  const voids = Math.exp(VOIDAGE_EXPONENT * Math.log(packing.eps));
  const gradient = (0.75 * (1 - packing.eps) * rhoG * friction) / (voids * dp);
  return uG < 0 ? -gradient : gradient;
}

/**
 * Exponent c, the logarithmic slope of the friction factor over the Reynolds number.
 *
 *   c = -[C1/Re + C2/(2 Re^(1/2))]/f0
 *
 * @param constants - C1..C3.
 * @param Re - Gas Reynolds number; not negative.
 * @returns Exponent between -1 and 0; at Re = 0 the limit of the leading term.
 * Source: [Stichlmair1989].
 */
export function stichlmairExponent(constants: StichlmairConstants, Re: number): number {
  const root = Math.sqrt(Re);
  const total = constants.C1 + constants.C2 * root + constants.C3 * Re;
  if (total === 0) return constants.C2 > 0 ? -0.5 : 0;
  return -(constants.C1 + 0.5 * constants.C2 * root) / total;
}

/**
 * Factor by which a hold-up raises the dry pressure drop.
 *
 *   F = [(1 - eps + h)/(1 - eps)]^((2 + c)/3) [eps/(eps - h)]^4.65
 *
 * @param eps - Void fraction.
 * @param c - Exponent of the friction factor, from `stichlmairExponent`.
 * @param h - Liquid hold-up, m3/m3; the actual one, not the steady one.
 * @returns Factor; 1 at h = 0, increasing in h.
 * @remarks Range: h below the voids. Beyond 98 % of the voids (a bed full of liquid, outside any
 *   correlation) ln F continues along its tangent: finite, increasing and smooth for a solver that
 *   strays; what flows in a flooded segment is the column model's decision.
 * Source: [Piche2001], restating [Stichlmair1989]. Departs: the exponent as printed in 1989
 *   does not reproduce that paper's own example; this form does.
 */
export function stichlmairWetFactor(eps: number, c: number, h: number): number {
  const solid = 1 - eps;
  const swelling = ((2 + c) / 3) * Math.log((solid + h) / solid);
  const share = h / eps;
  const logVoids =
    share <= FULL_SHARE ? Math.log(1 - share) : Math.log(1 - FULL_SHARE) - (share - FULL_SHARE) / (1 - FULL_SHARE);
  return Math.exp(swelling - VOIDAGE_EXPONENT * logVoids);
}

/** d ln F / dh of the factor above, 1. Positive. */
export function stichlmairWetFactorSlope(eps: number, c: number, h: number): number {
  const free = Math.max(eps - h, (1 - FULL_SHARE) * eps);
  return (2 + c) / (3 * (1 - eps + h)) + VOIDAGE_EXPONENT / free;
}

/**
 * Irrigated pressure drop at an actual hold-up.
 *
 *   dp/dz = (dp/dz)_dry F(h)
 *
 * @param packing - Area, voidage, C1..C3.
 * @param uG - Superficial gas velocity, m/s; scalar, signed.
 * @param rhoG - Gas density, kg/m3.
 * @param muG - Gas viscosity, Pa s.
 * @param h - Liquid hold-up, m3/m3; total, static part included.
 * @returns Pressure gradient, Pa/m.
 * @remarks As the two factors. Source: [Stichlmair1989] in the form of [Piche2001].
 */
export function stichlmairPressureDrop(
  packing: StichlmairPacking,
  uG: number,
  rhoG: number,
  muG: number,
  h: number,
): number {
  const c = stichlmairExponent(packing, stichlmairReynolds(packing, uG, rhoG, muG));
  return stichlmairDryPressureDrop(packing, uG, rhoG, muG) * stichlmairWetFactor(packing.eps, c, h);
}
