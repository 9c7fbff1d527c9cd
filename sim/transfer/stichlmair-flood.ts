// Flooding after Stichlmair, Bravo and Fair: the gas velocity at which the pressure drop has an
// infinite slope, at a given liquid velocity.

import { bracketedRoot } from '../numerics/bracketed-root.ts';
import { STANDARD_GRAVITY } from '../properties/constants.ts';
import { stichlmairPreloadHoldup } from './stichlmair-holdup.ts';
import {
  stichlmairDryPressureDrop,
  stichlmairExponent,
  stichlmairReynolds,
  stichlmairWetFactor,
} from './stichlmair-pressure-drop.ts';
import type { StichlmairPacking } from './stichlmair-pressure-drop.ts';

/** Widths at which the roots are taken as found, of the pressure ratio and of the velocity, relative to the upper end. */
const TOLERANCE = 1e-13;

/**
 * Relative pressure drop at the flood point.
 *
 *   P^-2 = 40 (2 + c)/3 h0/(1 - eps + h) + 186 h0/(eps - h),  h = h0 (1 + 20 P^2),  P = (dp/dz)/(rhoL g)
 *
 * @param eps - Void fraction.
 * @param h0 - Preload hold-up, m3/m3; below eps.
 * @param c - Exponent of the friction factor at the flood point.
 * @returns P; dimensionless, usually 0.1-0.3. 0 when h0 alone fills the voids.
 * @remarks The left side falls with P and the right side rises: one root.
 * Source: [Stichlmair1989] (= slope of one in the implicit pressure drop).
 */
function stichlmairFloodPressure(eps: number, h0: number, c: number): number {
  if (h0 >= eps) return 0;
  const high = Math.sqrt((eps / h0 - 1) / 20);
  const surplus = (P: number): number => {
    const h = h0 * (1 + 20 * P * P);
    return ((40 * (2 + c) * h0) / (3 * (1 - eps + h)) + (186 * h0) / (eps - h)) * P * P - 1;
  };
  // At the upper end the hold-up fills the voids and the surplus is infinite; a hair below it is merely large.
  const last = high * (1 - 1e-6);
  const { before, after } = bracketedRoot(surplus, 0, last, -1, surplus(last), TOLERANCE * high);
  return 0.5 * (before + after);
}

/**
 * Gas velocity at flooding.
 *
 *   (dp/dz)_dry(uG) F(h) = P rhoL g at the flood condition
 *
 * @param packing - Area, voidage, C1..C3.
 * @param uL - Superficial liquid velocity, m/s; positive.
 * @param rhoL - Liquid density, kg/m3.
 * @param rhoG - Gas density, kg/m3.
 * @param muG - Gas viscosity, Pa s.
 * @returns Superficial gas velocity, m/s; 0 when the liquid alone fills the bed, infinite at uL = 0.
 * @remarks Range: as the pressure drop. Error: order of 15 % of the velocity (common practice, no source).
 * Source: [Stichlmair1989].
 */
export function stichlmairFloodVelocity(
  packing: StichlmairPacking,
  uL: number,
  rhoL: number,
  rhoG: number,
  muG: number,
): number {
  const h0 = stichlmairPreloadHoldup(packing, uL);
  if (h0 <= 0) return Infinity;
  if (h0 >= packing.eps) return 0;
  const over = (u: number): number => excess(packing, h0, u, rhoL, rhoG, muG);
  let low = 0;
  let high = 1;
  let below = -1; // with no gas there is only the allowance
  let above = over(high);
  while (above < 0) {
    low = high;
    below = above;
    high *= 2;
    above = over(high);
  }
  const { before, after } = bracketedRoot(over, low, high, below, above, TOLERANCE * high);
  return 0.5 * (before + after);
}

/** Pressure gradient at the flood point of this liquid rate, Pa/m, given the flood velocity. */
export function stichlmairFloodPressureDrop(
  packing: StichlmairPacking,
  uL: number,
  uGFlood: number,
  rhoL: number,
  rhoG: number,
  muG: number,
): number {
  const c = stichlmairExponent(packing, stichlmairReynolds(packing, uGFlood, rhoG, muG));
  const h0 = stichlmairPreloadHoldup(packing, uL);
  return stichlmairFloodPressure(packing.eps, h0, c) * rhoL * STANDARD_GRAVITY;
}

/** Friction at velocity u less what the flood condition allows, Pa/m; increases with u. */
function excess(packing: StichlmairPacking, h0: number, u: number, rhoL: number, rhoG: number, muG: number): number {
  const c = stichlmairExponent(packing, stichlmairReynolds(packing, u, rhoG, muG));
  const P = stichlmairFloodPressure(packing.eps, h0, c);
  const h = h0 * (1 + 20 * P * P);
  const dry = stichlmairDryPressureDrop(packing, u, rhoG, muG);
  return dry * stichlmairWetFactor(packing.eps, c, h) - P * rhoL * STANDARD_GRAVITY;
}
