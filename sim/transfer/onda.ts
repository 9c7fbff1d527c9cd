// Wetted area and film coefficients in random packing after Onda, Takeuchi and Okumoto. The three
// are coupled one way: the wetted area enters the liquid Reynolds number of the liquid coefficient.

import { STANDARD_GRAVITY } from '../properties/constants.ts';
import type { PackingGeometry } from './packing.ts';

/** Nominal size below which the gas coefficient takes its smaller constant, m [Onda1968]. */
const SMALL_PACKING = 0.015;
/** Gas-side constant at and above that size, [Onda1968] equation 3. */
const GAS_CONSTANT_LARGE = 5.23;
/** Gas-side constant below it, [Onda1968] p 58. */
const GAS_CONSTANT_SMALL = 2.0;

/** A dimensionless group with the range of the data behind the fit. */
export interface GroupRange {
  readonly name: string;
  readonly min: number;
  readonly max: number;
}

/** Ranges of the wetted-area correlation; from memory, [Onda1968] after [Onda1967]. */
const ONDA_RANGES: readonly GroupRange[] = [
  { name: 'ReL', min: 0.04, max: 500 },
  { name: 'FrL', min: 2.5e-9, max: 1.8e-2 },
  { name: 'WeL', min: 1.2e-8, max: 0.27 },
  { name: 'sigmaC/sigma', min: 0.3, max: 2 },
];

/** Liquid Reynolds number on the dry area, L/(a muL); L in kg/(m2 s). */
function ondaReynolds(a: number, L: number, muL: number): number {
  return L / (a * muL);
}

/** Liquid Froude number, L^2 a/(rhoL^2 g). */
function ondaFroude(a: number, L: number, rhoL: number): number {
  return (L * L * a) / (rhoL * rhoL * STANDARD_GRAVITY);
}

/** Liquid Weber number, L^2/(rhoL sigma a). */
function ondaWeber(a: number, L: number, rhoL: number, sigma: number): number {
  return (L * L) / (rhoL * sigma * a);
}

/**
 * Wetted area.
 *
 *   aw/a = 1 - exp[-1.45 (sigmaC/sigma)^0.75 Re^0.1 Fr^-0.05 We^0.2]
 *   Re = L/(a muL),  Fr = L^2 a/(rhoL^2 g),  We = L^2/(rhoL sigma a)
 *
 * @param packing - Area; voidage is not used.
 * @param sigmaC - Critical surface tension of the packing material, N/m.
 * @param L - Superficial liquid mass flux, kg/(m2 s); scalar, not negative.
 * @param rhoL - Liquid density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @param sigma - Surface tension of the liquid, N/m.
 * @param LSmooth - Flux below which the area falls linearly instead of as L^0.4, kg/(m2 s); default 0,
 *   the published form. With L^0.4 replaced by L (L^2 + LSmooth^2)^-0.3 the slope at zero is finite and
 *   the area at L = 10 LSmooth is at most 0.3 % lower.
 * @returns Wetted area, m2/m3; 0 at L = 0, below a.
 * @remarks Range: `ONDA_RANGES`; outside, extrapolates between 0 and a. Error: 20 % (from memory).
 * Source: [Onda1968], equation 1. Departs: g = 9.80665; the optional smoothing.
 */
export function ondaWettedArea(
  packing: PackingGeometry,
  sigmaC: number,
  L: number,
  rhoL: number,
  muL: number,
  sigma: number,
  LSmooth = 0,
): number {
  if (L <= 0) return 0;
  const { a } = packing;
  const logWetting = 0.75 * Math.log(sigmaC / sigma);
  // Re^0.1 Fr^-0.05 We^0.2 per unit of L^0.4: the powers of L collect to 0.1 - 0.1 + 0.4.
  const logGroups =
    -0.1 * Math.log(a * muL) - 0.05 * Math.log(a / (rhoL * rhoL * STANDARD_GRAVITY)) - 0.2 * Math.log(rhoL * sigma * a);
  const logFlux = LSmooth > 0 ? Math.log(L) - 0.3 * Math.log(L * L + LSmooth * LSmooth) : 0.4 * Math.log(L);
  return -a * Math.expm1(-1.45 * Math.exp(logWetting + logGroups + logFlux));
}

/**
 * Liquid film coefficient.
 *
 *   kL [rhoL/(muL g)]^(1/3) = 0.0051 [L/(aw muL)]^(2/3) [muL/(rhoL DL)]^(-1/2) (a dp)^0.4
 *
 * @param packing - Area; voidage is not used.
 * @param dp - Nominal size of the packing, m.
 * @param aw - Wetted area, m2/m3; positive.
 * @param L - Superficial liquid mass flux, kg/(m2 s); scalar.
 * @param rhoL - Liquid density, kg/m3.
 * @param muL - Liquid viscosity, Pa s.
 * @param DL - Diffusivity of the component in the liquid, m2/s.
 * @returns Coefficient, m/s; 0 at L = 0 or aw = 0.
 * @remarks Range: random packing 4-50 mm. Error: 20 % (from memory). kL goes as DL^0.5: evaluate once, scale for others.
 * Source: [Onda1968], equation 2 (wetted, not total, area in the Reynolds number). Departs: nothing.
 */
export function ondaLiquidCoefficient(
  packing: PackingGeometry,
  dp: number,
  aw: number,
  L: number,
  rhoL: number,
  muL: number,
  DL: number,
): number {
  if (L <= 0 || aw <= 0) return 0;
  const film = Math.cbrt((muL * STANDARD_GRAVITY) / rhoL);
  const Re = L / (aw * muL);
  const size = Math.exp(0.4 * Math.log(packing.a * dp));
  return 0.0051 * film * Math.cbrt(Re * Re) * Math.sqrt((rhoL * DL) / muL) * size;
}

/**
 * Gas film coefficient on the concentration scale.
 *
 *   kc = kG R T = C a DG [G/(a muG)]^0.7 [muG/(rhoG DG)]^(1/3) (a dp)^-2
 *
 * @param packing - Area; voidage is not used.
 * @param dp - Nominal size of the packing, m; C = 5.23 from 15 mm on, 2.00 below.
 * @param G - Superficial gas mass flux, kg/(m2 s); scalar, its size is used.
 * @param rhoG - Gas density, kg/m3.
 * @param muG - Gas viscosity, Pa s.
 * @param DG - Diffusivity of the component in the gas, m2/s.
 * @returns Coefficient, m/s; divide by R T for mol/(m2 s Pa). 0 at G = 0, with infinite slope.
 * @remarks Range: random packing 4-50 mm. Error: 30 % (from memory). kc goes as DG^(2/3): evaluate once, scale.
 * Source: [Onda1968], equation 3 and p 58. Departs: nothing.
 */
export function ondaGasCoefficient(
  packing: PackingGeometry,
  dp: number,
  G: number,
  rhoG: number,
  muG: number,
  DG: number,
): number {
  const flux = Math.abs(G);
  if (flux === 0) return 0;
  const { a } = packing;
  const C = dp < SMALL_PACKING ? GAS_CONSTANT_SMALL : GAS_CONSTANT_LARGE;
  const Re = Math.exp(0.7 * Math.log(flux / (a * muG)));
  const shape = a * dp;
  return (C * a * DG * Re * Math.cbrt(muG / (rhoG * DG))) / (shape * shape);
}

/**
 * First group that has left its range, or undefined.
 *
 * @param sigmaC - Critical surface tension of the packing material, N/m.
 * @returns The range that was left and the value, for a run's report; allocates, so not for hot loops.
 */
export function ondaRangeLeft(
  packing: PackingGeometry,
  sigmaC: number,
  L: number,
  rhoL: number,
  muL: number,
  sigma: number,
): { readonly range: GroupRange; readonly value: number } | undefined {
  const values = [
    ondaReynolds(packing.a, L, muL),
    ondaFroude(packing.a, L, rhoL),
    ondaWeber(packing.a, L, rhoL, sigma),
    sigmaC / sigma,
  ];
  for (const [k, range] of ONDA_RANGES.entries()) {
    const value = values[k];
    if (value < range.min || value > range.max) return { range, value };
  }
  return undefined;
}
