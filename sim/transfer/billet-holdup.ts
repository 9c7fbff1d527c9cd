// Liquid hold-up after Billet and Schultes, and its inverse for drainage. Form and constants from
// memory; compare with the paper before relying on it.

import { STANDARD_GRAVITY } from '../properties/constants.ts';
import type { PackingGeometry } from './packing.ts';

/** Factor and exponent of the hydraulic area below and above the switch, [Billet1999]. */
const LOW = { factor: 1, power: 0.15 };
const HIGH = { factor: 0.85, power: 0.25 };
/** Where the two branches meet: 0.85 Re^0.1 = 1, Re = 5.08. */
const SWITCH = Math.exp(10 * Math.log(1 / HIGH.factor));
/** Exponent of the gas velocity between loading and flooding, [Billet1999]. */
const LOADING_POWER = 13;

/**
 * Hold-up below the loading point.
 *
 *   h = (12 muL uL a^2/(rhoL g))^(1/3) (ah/a)^(2/3)
 *   ah/a = Ch Re^0.15 Fr^0.1 (Re < 5), 0.85 Ch Re^0.25 Fr^0.1 (Re >= 5),  Re = uL rhoL/(a muL), Fr = uL^2 a/g
 *
 * @param packing - Area; voidage is not used.
 * @param Ch - Hold-up constant of the packing.
 * @param uL - Superficial liquid velocity, m/s; scalar, not negative.
 * @param rhoL - Liquid density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @returns Hold-up, m3/m3; total. Goes as uL^0.57 or uL^0.63: infinite slope at 0.
 * @remarks Range: random and structured packing, uL to 0.06 m/s. Error: order of 10 % with its own constants (common practice, no source).
 * Source: [Billet1999]. Departs: branches change at Re = 5.08, where they meet, not at 5, where they jump
 *   by 0.1 %; so the law is continuous and can be inverted.
 */
export function billetHoldup(packing: PackingGeometry, Ch: number, uL: number, rhoL: number, muL: number): number {
  if (uL <= 0) return 0;
  const Re = (uL * rhoL) / (packing.a * muL);
  const branch = Re < SWITCH ? LOW : HIGH;
  return branchScale(packing.a, Ch, rhoL, muL, branch) * Math.exp(branchExponent(branch) * Math.log(uL));
}

/**
 * Rate at which a hold-up drains below the loading point, the law above solved for uL.
 *
 *   uL = (h/K)^(1/n),  n = 1/3 + (2/3)(p + 0.2),  p the branch's power of Re
 *
 * @param packing - Area; voidage is not used.
 * @param Ch - Hold-up constant of the packing.
 * @param h - Hold-up, m3/m3; scalar. Zero or less drains nothing.
 * @param rhoL - Liquid density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @returns Superficial liquid velocity, m/s; continuous and increasing.
 * Source: [Billet1999], inverted branch by branch.
 */
export function billetLiquidVelocity(
  packing: PackingGeometry,
  Ch: number,
  h: number,
  rhoL: number,
  muL: number,
): number {
  if (h <= 0) return 0;
  const uSwitch = (SWITCH * packing.a * muL) / rhoL;
  const low = branchScale(packing.a, Ch, rhoL, muL, LOW);
  const hSwitch = low * Math.exp(branchExponent(LOW) * Math.log(uSwitch));
  const branch = h < hSwitch ? LOW : HIGH;
  const scale = branch === LOW ? low : branchScale(packing.a, Ch, rhoL, muL, HIGH);
  return Math.exp(Math.log(h / scale) / branchExponent(branch));
}

/**
 * Hold-up between loading and flooding.
 *
 *   h = hS + (hFl - hS)(uV/uVFl)^13
 *
 * @param hS - Hold-up below loading at this liquid rate, m3/m3.
 * @param hFl - Hold-up at flooding, m3/m3.
 * @param gasShare - uV/uVFl; not negative.
 * @returns Hold-up, m3/m3; hS without gas, hFl at flooding.
 * Source: [Billet1999].
 */
export function billetLoadedHoldup(hS: number, hFl: number, gasShare: number): number {
  return hS + (hFl - hS) * loadingWeight(gasShare);
}

/** The hold-up below loading that a loaded hold-up corresponds to, the law above solved for hS. */
export function billetUnloadedHoldup(h: number, hFl: number, gasShare: number): number {
  const w = loadingWeight(gasShare);
  return (h - hFl * w) / (1 - w);
}

function loadingWeight(gasShare: number): number {
  return gasShare > 0 ? Math.exp(LOADING_POWER * Math.log(gasShare)) : 0;
}

function branchExponent(branch: typeof LOW): number {
  return 1 / 3 + (2 / 3) * (branch.power + 0.2);
}

/** Hold-up at uL = 1 m/s if the branch held there. */
function branchScale(a: number, Ch: number, rhoL: number, muL: number, branch: typeof LOW): number {
  const film = Math.cbrt((12 * muL * a * a) / (STANDARD_GRAVITY * rhoL));
  const area =
    branch.factor * Ch * Math.exp(branch.power * Math.log(rhoL / (a * muL)) + 0.1 * Math.log(a / STANDARD_GRAVITY));
  return film * Math.cbrt(area * area);
}
