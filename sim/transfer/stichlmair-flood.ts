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

/** Relative widths at which the roots are taken as found. */
const TOLERANCE = 1e-13;
/** Share by which a bracket stays clear of its bounds. */
const MARGIN = 1e-9;

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
  const friction = (40 * (2 + c) * h0) / 3;
  const right = (h: number): number => friction / (1 - eps + h) + (186 * h0) / (eps - h);
  const holdup = (P: number): number => h0 * (1 + 20 * P * P);
  // The first term falls with h and the second rises: their extremes bound the right side, and so P.
  const fills = Math.sqrt((eps / h0 - 1) / 20);
  const high = Math.min(1 / Math.sqrt(friction + (186 * h0) / (eps - h0)), (1 - MARGIN) * fills);
  const low = (1 - MARGIN) / Math.sqrt(friction / (1 - eps + h0) + (186 * h0) / (eps - holdup(high)));
  const surplus = (P: number): number => right(holdup(P)) * P * P - 1;
  const { before, after } = bracketedRoot(surplus, low, high, surplus(low), surplus(high), TOLERANCE * high);
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
  const over = (logU: number): number => excess(packing, h0, Math.exp(logU), rhoL, rhoG, muG);
  // From 1 m/s outwards to a change of sign.
  const first = over(0);
  if (first === 0) return 1;
  const outwards = first < 0 ? 1 : -1;
  let near = 0;
  let atNear = first;
  let far = outwards;
  let atFar = over(far);
  while (atFar < 0 === first < 0) {
    near = far;
    atNear = atFar;
    far += outwards;
    atFar = over(far);
  }
  const { before, after } = bracketedRoot(over, near, far, atNear, atFar, TOLERANCE);
  return Math.exp(0.5 * (before + after));
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

/** Logarithm of the friction at velocity u over what the flood condition allows; increases with u. */
function excess(packing: StichlmairPacking, h0: number, u: number, rhoL: number, rhoG: number, muG: number): number {
  const c = stichlmairExponent(packing, stichlmairReynolds(packing, u, rhoG, muG));
  const P = stichlmairFloodPressure(packing.eps, h0, c);
  const h = h0 * (1 + 20 * P * P);
  const dry = stichlmairDryPressureDrop(packing, u, rhoG, muG);
  return Math.log((dry * stichlmairWetFactor(packing.eps, c, h)) / (P * rhoL * STANDARD_GRAVITY));
}
