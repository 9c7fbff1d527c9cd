// Liquid that stays in a drained bed, and how it is carved out of a total hold-up law.

import { STANDARD_GRAVITY } from '../properties/constants.ts';

/**
 * Static hold-up.
 *
 *   hs = 0.033 exp[-0.22 rhoL g/(sigma a^2)]
 *
 * @param a - Specific area, m2/m3.
 * @param rhoL - Liquid density, kg/m3.
 * @param sigma - Surface tension, N/m.
 * @returns Hold-up, m3/m3; between 0 and 0.033.
 * @remarks Range: random and structured packing, a 50-500 m2/m3. Error: not stated; constants from
 *   memory.
 * Source: [Engel2001]. Departs: nothing known.
 */
export function staticHoldup(a: number, rhoL: number, sigma: number): number {
  return 0.033 * Math.exp((-0.22 * rhoL * STANDARD_GRAVITY) / (sigma * a * a));
}

/**
 * Hold-up that a total hold-up law should be asked for, so that nothing drains at or below the static
 * hold-up and a running bed is not changed.
 *
 *   hEff = h (1 - exp[-(s/w)^2]),  s = max(0, h - hs)/hs
 *
 * @param h - Total hold-up, m3/m3; scalar.
 * @param hs - Static hold-up, m3/m3; scalar, not negative.
 * @param w - Width of the fade in units of hs; default 0.5.
 * @returns Effective hold-up, m3/m3; 0 at h <= hs, smooth above, within 2 % of h from h = 2 hs.
 * @remarks The law is the total hold-up's for all flows well above the static hold-up: at h = 3 hs the
 *   difference is below 1e-6 of h. Source: common practice, no source; the paper gives the amount only.
 */
export function drainableHoldup(h: number, hs: number, w = 0.5): number {
  if (h <= hs) return 0;
  if (hs <= 0) return h;
  const s = (h - hs) / (hs * w);
  return -h * Math.expm1(-s * s);
}
