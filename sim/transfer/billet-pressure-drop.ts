// Pressure drop after Billet and Schultes. Form and constants from memory; compare with the paper
// before relying on it.

import { STANDARD_GRAVITY } from '../properties/constants.ts';
import type { PackingGeometry } from './packing.ts';
import { particleDiameter } from './packing.ts';

/**
 * Wall factor.
 *
 *   1/K = 1 + (2/3) dP/[(1 - eps) DS],  dP = 6 (1 - eps)/a
 *
 * @param packing - Area and voidage.
 * @param DS - Column diameter, m; Infinity for no wall.
 * @returns 1/K, at least 1.
 * Source: [Billet1999].
 */
export function billetWallFactor(packing: PackingGeometry, DS: number): number {
  return 1 + (2 * particleDiameter(packing)) / (3 * (1 - packing.eps) * DS);
}

/**
 * Dry pressure drop.
 *
 *   dp/dz = psi0 (a/eps^3)(rhoV uV^2/2)(1/K),  psi0 = Cp0 (64/Re + 1.8/Re^0.08),
 *   Re = uV dP rhoV K/[(1 - eps) muV]
 *
 * @param packing - Area and voidage.
 * @param Cp0 - Pressure-drop constant of the packing.
 * @param uV - Superficial gas velocity, m/s; scalar, its size is used.
 * @param rhoV - Gas density, kg/m3.
 * @param muV - Gas viscosity, Pa s.
 * @param DS - Column diameter, m; Infinity for no wall.
 * @returns Pressure gradient, Pa/m; 0 at uV = 0.
 * @remarks Range: random and structured packing. Error: order of 10 % with its own constants (common practice, no source).
 * Source: [Billet1999].
 */
export function billetDryPressureDrop(
  packing: PackingGeometry,
  Cp0: number,
  uV: number,
  rhoV: number,
  muV: number,
  DS: number,
): number {
  const wall = billetWallFactor(packing, DS);
  const u = Math.abs(uV);
  if (u === 0) return 0;
  const ReOverU = (particleDiameter(packing) * rhoV) / ((1 - packing.eps) * muV * wall);
  const drag = (64 * u) / ReOverU + 1.8 * u * u * Math.exp(-0.08 * Math.log(ReOverU * u));
  const { a, eps } = packing;
  return (Cp0 * drag * a * rhoV * wall) / (2 * eps * eps * eps);
}

/**
 * Factor by which the liquid raises the dry pressure drop.
 *
 *   F = [eps/(eps - h)]^3 [(eps - h)/eps]^1.5 (h/hS)^0.3 exp(C1 Fr^0.5),  C1 = 13300/a^1.5, Fr = uL^2 a/g
 *
 * @param packing - Area and voidage.
 * @param h - Actual hold-up, m3/m3; below eps.
 * @param hS - Hold-up below loading at this liquid rate, m3/m3; 0 gives the dry bed.
 * @param uL - Superficial liquid velocity, m/s.
 * @returns Factor; 1 for a dry bed.
 * @remarks Explicit in the actual hold-up. NaN for h beyond the voids: this law has no form there.
 *   At uL -> 0 with liquid still held, h/hS has no limit: hand over the hold-up law's own h there.
 * Source: [Billet1999]. The form of 1993 has exp(Re/200) instead and no power 1.5.
 */
export function billetWetFactor(packing: PackingGeometry, h: number, hS: number, uL: number): number {
  if (hS <= 0) return 1;
  const { a, eps } = packing;
  const C1 = 13_300 / (a * Math.sqrt(a));
  const root = uL * Math.sqrt(a / STANDARD_GRAVITY);
  return Math.exp(1.5 * Math.log(eps / (eps - h)) + 0.3 * Math.log(h / hS) + C1 * root);
}
