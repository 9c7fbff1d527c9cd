// Loading and flooding points after Billet and Schultes, at a fixed ratio of liquid to gas or at a fixed
// liquid velocity. Form and constants from memory; compare with the paper before relying on it.

import { STANDARD_GRAVITY } from '../properties/constants.ts';
import type { PackingGeometry } from './packing.ts';

/** Flow parameter at which exponent and constant change, [Billet1999]. */
const X_SWITCH = 0.4;
const MAX_STEPS = 200;
const TOLERANCE = 1e-12;

/** What flows: densities, kg/m3, viscosities, Pa s. */
export interface BilletFluids {
  readonly rhoL: number;
  readonly rhoV: number;
  readonly muL: number;
  readonly muV: number;
}

/** Fixed while the gas velocity is sought: mass of liquid over gas, or the liquid velocity, m/s. */
export type BilletLiquid =
  { readonly kind: 'ratio'; readonly value: number } | { readonly kind: 'velocity'; readonly value: number };

/**
 * Gas velocity at the loading point.
 *
 *   uV = (g/psi)^(1/2) [eps/a^(1/6) - a^(1/2) q^(1/3)] q^(1/6) (rhoL/rhoV)^(1/2),  q = 12 muL uL/(g rhoL)
 *   psi = (g/C^2)[X (muL/muV)^0.4]^(-2n),  X = (L/V)(rhoV/rhoL)^(1/2)
 *   X <= 0.4: n = -0.326, C = CS;  else n = -0.723, C = 0.695 CS (muL/muV)^0.1588
 *
 * @param packing - Area and voidage.
 * @param CS - Loading constant of the packing.
 * @param fluids - Densities and viscosities.
 * @param liquid - Fixed ratio or fixed liquid velocity.
 * @returns Superficial gas velocity, m/s; 0 when the liquid alone fills the film.
 * @remarks Range: random and structured packing. Error: order of 10 % with its own constants (common practice, no source).
 * Source: [Billet1999]. Departs: nothing known.
 */
export function billetLoadingVelocity(
  packing: PackingGeometry,
  CS: number,
  fluids: BilletFluids,
  liquid: BilletLiquid,
): number {
  const { a, eps } = packing;
  const { rhoL, rhoV, muL, muV } = fluids;
  const ratio = muL / muV;
  return crossing((uV) => {
    const uL = liquidVelocity(liquid, fluids, uV);
    const X = (uL / uV) * Math.sqrt(rhoL / rhoV);
    const low = X <= X_SWITCH;
    const C = low ? CS : 0.695 * CS * Math.exp(0.1588 * Math.log(ratio));
    const n = low ? -0.326 : -0.723;
    const rootGOverPsi = C * Math.exp(n * Math.log(X * Math.exp(0.4 * Math.log(ratio))));
    const film = Math.cbrt((12 * muL * uL) / (STANDARD_GRAVITY * rhoL));
    const bracket = eps / Math.exp(Math.log(a) / 6) - Math.sqrt(a) * film;
    return rootGOverPsi * bracket * Math.sqrt(film) * Math.sqrt(rhoL / rhoV) - uV;
  });
}

/**
 * Hold-up at flooding.
 *
 *   h^3 (3 h - eps) = (6/g) a^2 eps (muL/rhoL) uL,  eps/3 <= h <= eps
 *
 * @param packing - Area and voidage.
 * @param uL - Superficial liquid velocity at flooding, m/s.
 * @param rhoL - Liquid density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @returns Hold-up, m3/m3; NaN when no film of that rate fits.
 * Source: [Billet1999].
 */
export function billetFloodHoldup(packing: PackingGeometry, uL: number, rhoL: number, muL: number): number {
  const { a, eps } = packing;
  const right = (6 * a * a * eps * muL * uL) / (STANDARD_GRAVITY * rhoL);
  if (right > 2 * eps * eps * eps * eps) return Number.NaN;
  let low = eps / 3;
  let high = eps;
  for (let k = 0; k < MAX_STEPS && high - low > TOLERANCE * high; k++) {
    const h = 0.5 * (low + high);
    if (h * h * h * (3 * h - eps) < right) low = h;
    else high = h;
  }
  return 0.5 * (low + high);
}

/**
 * Gas velocity at flooding.
 *
 *   uV = 2^(1/2) (g/psi)^(1/2) [(eps - h)^3/eps]^(1/2) (h/a)^(1/2) (rhoL/rhoV)^(1/2),  h from the above
 *   psi = (g/C^2)[X (muL/muV)^0.2]^(-2n)
 *   X <= 0.4: n = -0.194, C = CFl;  else n = -0.708, C = 0.6244 CFl (muL/muV)^0.1028
 *
 * @param packing - Area and voidage.
 * @param CFl - Flooding constant of the packing.
 * @param fluids - Densities and viscosities.
 * @param liquid - Fixed ratio or fixed liquid velocity.
 * @returns Superficial gas velocity, m/s; 0 when the liquid alone floods the bed.
 * @remarks Range: random and structured packing. Error: order of 10 % with its own constants (common practice, no source).
 * Source: [Billet1999]. Departs: nothing known.
 */
export function billetFloodVelocity(
  packing: PackingGeometry,
  CFl: number,
  fluids: BilletFluids,
  liquid: BilletLiquid,
): number {
  const { a, eps } = packing;
  const { rhoL, rhoV, muL, muV } = fluids;
  const ratio = muL / muV;
  return crossing((uV) => {
    const uL = liquidVelocity(liquid, fluids, uV);
    const h = billetFloodHoldup(packing, uL, rhoL, muL);
    if (Number.isNaN(h)) return -uV;
    const X = (uL / uV) * Math.sqrt(rhoL / rhoV);
    const low = X <= X_SWITCH;
    const C = low ? CFl : 0.6244 * CFl * Math.exp(0.1028 * Math.log(ratio));
    const n = low ? -0.194 : -0.708;
    const rootGOverPsi = C * Math.exp(n * Math.log(X * Math.exp(0.2 * Math.log(ratio))));
    const free = eps - h;
    return rootGOverPsi * Math.sqrt(((2 * free * free * free) / eps) * (h / a) * (rhoL / rhoV)) - uV;
  });
}

function liquidVelocity(liquid: BilletLiquid, fluids: BilletFluids, uV: number): number {
  return liquid.kind === 'velocity' ? liquid.value : (liquid.value * fluids.rhoV * uV) / fluids.rhoL;
}

/** Velocity at which a function, positive for a little gas and negative for much, changes sign. */
function crossing(f: (u: number) => number): number {
  let low = 1e-6;
  if (f(low) <= 0) return 0;
  let high = 1;
  while (f(high) > 0) {
    low = high;
    high *= 2;
  }
  for (let k = 0; k < MAX_STEPS && high - low > TOLERANCE * high; k++) {
    const u = 0.5 * (low + high);
    if (f(u) > 0) low = u;
    else high = u;
  }
  return 0.5 * (low + high);
}
