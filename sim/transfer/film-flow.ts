// A laminar film on a vertical wall: the closed form that hold-up and drainage laws are held against.

import { STANDARD_GRAVITY } from '../properties/constants.ts';

/**
 * Thickness of a laminar falling film.
 *
 *   delta = [3 nu Gamma/(rho g)]^(1/3)
 *
 * @param Gamma - Mass flow on unit width, kg/(m s); not negative.
 * @param rho - Density, kg/m3.
 * @param nu - Kinematic viscosity, m2/s.
 * @returns Thickness, m. The mean velocity is Gamma/(rho delta), a wave travels three times as fast.
 * @remarks Range: Re = 4 Gamma/mu below about 1600; waves from 30 on. Source: [Nusselt1916].
 */
export function filmThickness(Gamma: number, rho: number, nu: number): number {
  return Math.cbrt((3 * nu * Gamma) / (rho * STANDARD_GRAVITY));
}

/** Mean velocity of the film, m/s: Gamma/(rho delta). Source: [Nusselt1916]. */
export function filmVelocity(Gamma: number, rho: number, nu: number): number {
  return Gamma > 0 ? Gamma / (rho * filmThickness(Gamma, rho, nu)) : 0;
}

/** Speed at which a small change of the rate travels down the film, m/s: three times the mean velocity. */
export function filmWaveVelocity(Gamma: number, rho: number, nu: number): number {
  return 3 * filmVelocity(Gamma, rho, nu);
}
