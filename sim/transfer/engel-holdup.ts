// Dynamic hold-up after Engel, Stichlmair and Geipel, and its inverse. The exponents are from memory with
// low confidence: an alternative to compare with, not a default.

import { STANDARD_GRAVITY } from '../properties/constants.ts';

/** Coefficient of the loading term: h = h0 [1 + (6 P)^2]. */
const LOADING = 36;
/** Exponent of the liquid velocity. */
const POWER = 0.66;

/**
 * Dynamic hold-up without gas.
 *
 *   h0 = 3.6 (uL a^0.5/g^0.5)^0.66 (muL a^1.5/(rhoL g^0.5))^0.25 (sigma a^2/(rhoL g))^0.1
 *
 * @param a - Specific area, m2/m3.
 * @param uL - Superficial liquid velocity, m/s; not negative.
 * @param rhoL - Liquid density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @param sigma - Surface tension, N/m.
 * @returns Dynamic hold-up, m3/m3; the static part comes on top.
 * Source: [Engel2001], from memory.
 */
export function engelDynamicHoldup(a: number, uL: number, rhoL: number, muL: number, sigma: number): number {
  if (uL <= 0) return 0;
  return engelScale(a, rhoL, muL, sigma) * Math.exp(POWER * Math.log(uL));
}

/** Factor by which a pressure gradient, Pa/m, raises the dynamic hold-up: 1 + 36 P^2. */
export function engelLoadingFactor(gradient: number, rhoL: number): number {
  const P = gradient / (rhoL * STANDARD_GRAVITY);
  return 1 + LOADING * P * P;
}

/** Liquid velocity, m/s, at which a dynamic hold-up drains: the two laws above solved for uL. */
export function engelLiquidVelocity(
  a: number,
  h: number,
  gradient: number,
  rhoL: number,
  muL: number,
  sigma: number,
): number {
  if (h <= 0) return 0;
  const unloaded = h / engelLoadingFactor(gradient, rhoL);
  return Math.exp(Math.log(unloaded / engelScale(a, rhoL, muL, sigma)) / POWER);
}

function engelScale(a: number, rhoL: number, muL: number, sigma: number): number {
  const g = STANDARD_GRAVITY;
  return (
    3.6 *
    Math.exp(
      POWER * 0.5 * Math.log(a / g) +
        0.25 * Math.log((muL * a * Math.sqrt(a)) / (rhoL * Math.sqrt(g))) +
        0.1 * Math.log((sigma * a * a) / (rhoL * g)),
    )
  );
}
