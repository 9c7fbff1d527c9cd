// Liquid hold-up after Stichlmair, Bravo and Fair, and its inverse: the rate at which a hold-up drains.

import { STANDARD_GRAVITY } from '../properties/constants.ts';
import type { PackingGeometry } from './packing.ts';
import { VOIDAGE_EXPONENT } from './stichlmair-pressure-drop.ts';

/** Coefficient of the preload hold-up, [Stichlmair1989]. */
const PRELOAD = 0.555;
/** Coefficient of the loading term, [Stichlmair1989]. */
const LOADING = 20;

/**
 * Hold-up below the loading point.
 *
 *   h0 = 0.555 FrL^(1/3),  FrL = uL^2 a/(g eps^4.65)
 *
 * @param packing - Area and voidage.
 * @param uL - Superficial liquid velocity, m/s; scalar, not negative.
 * @returns Hold-up, m3/m3; total, static part included. Goes as uL^(2/3): infinite slope at uL = 0.
 * @remarks Range: uL to about 0.03 m/s, liquids near the viscosity of water (viscosity is not in it).
 *   Error: order of 15 % (common practice, no source).
 * Source: [Stichlmair1989]. Departs: nothing.
 */
export function stichlmairPreloadHoldup(packing: PackingGeometry, uL: number): number {
  const voids = Math.exp(VOIDAGE_EXPONENT * Math.log(packing.eps));
  return PRELOAD * Math.cbrt((uL * uL * packing.a) / (STANDARD_GRAVITY * voids));
}

/**
 * Factor by which the gas raises the hold-up.
 *
 *   h/h0 = 1 + 20 P^2,  P = (dp/dz)/(rhoL g)
 *
 * @param gradient - Pressure gradient of the irrigated bed, Pa/m; its size is used.
 * @param rhoL - Liquid density, kg/m3.
 * @returns Factor, at least 1.
 * Source: [Stichlmair1989].
 */
export function stichlmairLoadingFactor(gradient: number, rhoL: number): number {
  const P = gradient / (rhoL * STANDARD_GRAVITY);
  return 1 + LOADING * P * P;
}

/** Hold-up with gas: h0(uL) times the loading factor at the bed's own pressure gradient, m3/m3. */
export function stichlmairHoldup(packing: PackingGeometry, uL: number, gradient: number, rhoL: number): number {
  return stichlmairPreloadHoldup(packing, uL) * stichlmairLoadingFactor(gradient, rhoL);
}

/**
 * Rate at which a hold-up drains, the hold-up law solved for the liquid velocity.
 *
 *   uL = {h/[0.555 (1 + 20 P^2)]}^(3/2) (g eps^4.65/a)^(1/2)
 *
 * @param packing - Area and voidage.
 * @param h - Total hold-up, m3/m3; scalar. Zero or less drains nothing.
 * @param gradient - Pressure gradient of the bed at this hold-up, Pa/m.
 * @param rhoL - Liquid density, kg/m3.
 * @returns Superficial liquid velocity, m/s; once differentiable at h = 0.
 * @remarks Range and error as the hold-up. The static share does not drain: carve it out with
 *   `drainageVelocity` in static-holdup.ts, which leaves normal flow unchanged.
 * Source: [Stichlmair1989], inverted.
 */
export function stichlmairLiquidVelocity(packing: PackingGeometry, h: number, gradient: number, rhoL: number): number {
  if (h <= 0) return 0;
  const r = h / (PRELOAD * stichlmairLoadingFactor(gradient, rhoL));
  const voids = Math.exp(VOIDAGE_EXPONENT * Math.log(packing.eps));
  return r * Math.sqrt(r) * Math.sqrt((STANDARD_GRAVITY * voids) / packing.a);
}
