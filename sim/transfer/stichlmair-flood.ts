// Flooding after Stichlmair, Bravo and Fair: the gas velocity at which the pressure drop has an
// infinite slope, at a given liquid velocity.

import { STANDARD_GRAVITY } from '../properties/constants.ts';
import { stichlmairPreloadHoldup } from './stichlmair-holdup.ts';
import {
  stichlmairDryPressureDrop,
  stichlmairExponent,
  stichlmairReynolds,
  stichlmairWetFactor,
} from './stichlmair-pressure-drop.ts';
import type { StichlmairPacking } from './stichlmair-pressure-drop.ts';

const MAX_STEPS = 200;
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
 * @remarks The left side falls with P and the right side rises: one root, found by bisection.
 * Source: [Stichlmair1989] (= slope of one in the implicit pressure drop).
 */
function stichlmairFloodPressure(eps: number, h0: number, c: number): number {
  if (h0 >= eps) return 0;
  let low = 0;
  let high = Math.sqrt((eps / h0 - 1) / 20);
  for (let k = 0; k < MAX_STEPS && high - low > TOLERANCE * high; k++) {
    const P = 0.5 * (low + high);
    const h = h0 * (1 + 20 * P * P);
    const right = (40 * (2 + c) * h0) / (3 * (1 - eps + h)) + (186 * h0) / (eps - h);
    if (right * P * P < 1) low = P;
    else high = P;
  }
  return 0.5 * (low + high);
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
  let low = 0;
  let high = 1;
  while (excess(packing, h0, high, rhoL, rhoG, muG) < 0) {
    low = high;
    high *= 2;
  }
  for (let k = 0; k < MAX_STEPS && high - low > TOLERANCE * high; k++) {
    const u = 0.5 * (low + high);
    if (excess(packing, h0, u, rhoL, rhoG, muG) < 0) low = u;
    else high = u;
  }
  return 0.5 * (low + high);
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
