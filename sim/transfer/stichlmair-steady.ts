// Steady state of an irrigated bed after Stichlmair, Bravo and Fair: the pressure drop whose hold-up
// gives that pressure drop, and the gas velocity at which no such state is left.

import { STANDARD_GRAVITY } from '../properties/constants.ts';
import { stichlmairLoadingFactor, stichlmairPreloadHoldup } from './stichlmair-holdup.ts';
import {
  stichlmairDryPressureDrop,
  stichlmairExponent,
  stichlmairReynolds,
  stichlmairWetFactor,
  stichlmairWetFactorSlope,
} from './stichlmair-pressure-drop.ts';
import type { StichlmairPacking } from './stichlmair-pressure-drop.ts';

/** Newton steps allowed; ten are usual, more only within 1e-6 of flooding. */
const MAX_STEPS = 60;
/** Relative accuracy of the pressure drop. */
const TOLERANCE = 1e-12;

/**
 * Steady irrigated pressure drop, the lower root of
 *
 *   g = (dp/dz)_dry F(h0 [1 + 20 (g/(rhoL g0))^2])
 *
 * @param packing - Area, voidage, C1..C3.
 * @param uL - Superficial liquid velocity, m/s.
 * @param uG - Superficial gas velocity, m/s; not negative.
 * @param rhoL - Liquid density, kg/m3.
 * @param rhoG - Gas density, kg/m3.
 * @param muG - Gas viscosity, Pa s.
 * @returns Pressure gradient, Pa/m; NaN when the bed is flooded and has no steady state.
 * @remarks The right side is convex and increasing, so Newton's method from the dry value climbs to the
 *   lower root without overshoot, or meets a slope of one: then there is none. The upper root has no
 *   physical meaning.
 * Source: [Stichlmair1989] in the form of [Piche2001].
 */
export function stichlmairSteadyPressureDrop(
  packing: StichlmairPacking,
  uL: number,
  uG: number,
  rhoL: number,
  rhoG: number,
  muG: number,
): number {
  const dry = stichlmairDryPressureDrop(packing, uG, rhoG, muG);
  const h0 = stichlmairPreloadHoldup(packing, uL);
  if (dry === 0) return 0;
  const c = stichlmairExponent(packing, stichlmairReynolds(packing, uG, rhoG, muG));
  const scale = 1 / (rhoL * STANDARD_GRAVITY);
  let gradient = dry;
  for (let k = 0; k < MAX_STEPS; k++) {
    const h = h0 * stichlmairLoadingFactor(gradient, rhoL);
    if (h >= packing.eps) return Number.NaN;
    const wet = dry * stichlmairWetFactor(packing.eps, c, h);
    const dh = 40 * h0 * gradient * scale * scale;
    const slope = wet * stichlmairWetFactorSlope(packing.eps, c, h) * dh;
    if (slope >= 1) return Math.abs(wet - gradient) <= TOLERANCE * gradient ? gradient : Number.NaN;
    const step = (wet - gradient) / (1 - slope);
    gradient += step;
    if (Math.abs(step) <= TOLERANCE * gradient) return gradient;
  }
  return gradient;
}

/** Steady total hold-up, m3/m3, at the steady pressure drop; NaN when flooded. */
export function stichlmairSteadyHoldup(
  packing: StichlmairPacking,
  uL: number,
  uG: number,
  rhoL: number,
  rhoG: number,
  muG: number,
): number {
  const gradient = stichlmairSteadyPressureDrop(packing, uL, uG, rhoL, rhoG, muG);
  return stichlmairPreloadHoldup(packing, uL) * stichlmairLoadingFactor(gradient, rhoL);
}
