// Area and film coefficients after Billet and Schultes, below the loading point. Form and constants from
// memory; compare with the paper before relying on it.

import { STANDARD_GRAVITY } from '../properties/constants.ts';
import type { PackingGeometry } from './packing.ts';

/** Hydraulic diameter 4 eps/a, m. */
function hydraulicDiameter(packing: PackingGeometry): number {
  return (4 * packing.eps) / packing.a;
}

/**
 * Effective area.
 *
 *   aPh/a = 1.5 (a dh)^-0.5 (uL dh rhoL/muL)^-0.2 (uL^2 rhoL dh/sigma)^0.75 [uL^2/(g dh)]^-0.45
 *
 * @param packing - Area and voidage.
 * @param uL - Superficial liquid velocity, m/s; scalar, not negative.
 * @param rhoL - Liquid density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @param sigma - Surface tension, N/m.
 * @returns Area, m2/m3; 0 at uL = 0, goes as uL^0.4.
 * @remarks Range: below loading. Not capped at a: drops and ripples may exceed the packing's own surface,
 *   and do by this form for organic liquids. From loading to flooding the authors let it grow further; not
 *   included, as that part could not be compared with print.
 * Source: [Billet1999]. Departs: ends at the loading point.
 */
export function billetArea(packing: PackingGeometry, uL: number, rhoL: number, muL: number, sigma: number): number {
  if (uL <= 0) return 0;
  const dh = hydraulicDiameter(packing);
  const logArea =
    -0.5 * Math.log(packing.a * dh) -
    0.2 * Math.log((uL * dh * rhoL) / muL) +
    0.75 * Math.log((uL * uL * rhoL * dh) / sigma) -
    0.45 * Math.log((uL * uL) / (STANDARD_GRAVITY * dh));
  return 1.5 * packing.a * Math.exp(logArea);
}

/**
 * Liquid film coefficient.
 *
 *   kL = CL 12^(1/6) (uL/h)^(1/2) (DL/dh)^(1/2)
 *
 * @param packing - Area and voidage.
 * @param CL - Liquid-side constant of the packing.
 * @param uL - Superficial liquid velocity, m/s.
 * @param h - Hold-up, m3/m3; positive.
 * @param DL - Diffusivity of the component in the liquid, m2/s.
 * @returns Coefficient, m/s.
 * Source: [Billet1999]; penetration theory of [Higbie1935] with the residence time of the film.
 */
export function billetLiquidCoefficient(
  packing: PackingGeometry,
  CL: number,
  uL: number,
  h: number,
  DL: number,
): number {
  if (uL <= 0 || h <= 0) return 0;
  const twelfth = Math.exp(Math.log(12) / 6);
  return CL * twelfth * Math.sqrt((uL * DL) / (h * hydraulicDiameter(packing)));
}

/**
 * Gas film coefficient on the concentration scale.
 *
 *   kc = CV (eps - h)^(-1/2) (a/dh)^(1/2) DV [uV rhoV/(a muV)]^(3/4) [muV/(rhoV DV)]^(1/3)
 *
 * @param packing - Area and voidage.
 * @param CV - Gas-side constant of the packing.
 * @param uV - Superficial gas velocity, m/s; scalar, its size is used.
 * @param h - Hold-up, m3/m3; below eps.
 * @param rhoV - Gas density, kg/m3.
 * @param muV - Gas viscosity, Pa s.
 * @param DV - Diffusivity of the component in the gas, m2/s.
 * @returns Coefficient, m/s; divide by R T for mol/(m2 s Pa).
 * Source: [Billet1999].
 */
export function billetGasCoefficient(
  packing: PackingGeometry,
  CV: number,
  uV: number,
  h: number,
  rhoV: number,
  muV: number,
  DV: number,
): number {
  const u = Math.abs(uV);
  if (u === 0) return 0;
  const Re = (u * rhoV) / (packing.a * muV);
  return (
    CV *
    Math.sqrt(packing.a / (hydraulicDiameter(packing) * (packing.eps - h))) *
    DV *
    Math.exp(0.75 * Math.log(Re)) *
    Math.cbrt(muV / (rhoV * DV))
  );
}
