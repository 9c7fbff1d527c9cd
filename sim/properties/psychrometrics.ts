// Humid air and other carriers with water vapour: from what a case states to mole fractions, and the
// wet-bulb and adiabatic-saturation temperatures that simultaneous heat and mass transfer must reproduce.

import { GAS_CONSTANT } from './constants.ts';
import { waterBoilingTemperature, waterSaturationPressure } from './water-saturation-pressure.ts';

/** Molar mass of water over that of dry air, [ASHRAE2017] chapter 1, equation 20. */
const RATIO = 0.621945;
/** Molar mass of dry air, kg/mol, [ASHRAE2017] chapter 1, section 1. */
const M_AIR = 0.028966;
// Heat balance of humid air, [ASHRAE2017] chapter 1, equations 30 and 33; J/kg, J/(kg K), degC.
const CP_AIR = 1006;
const CP_VAPOUR = 1860;
const LATENT = 2_501_000;
const CP_WATER = 4186;
/** The same equations' latent heat falls by cp(water) - cp(vapour) for each degree. */
const LATENT_SLOPE = CP_WATER - CP_VAPOUR;

const CELSIUS = 273.15;
const MAX_STEPS = 200;

/**
 * Mole fraction of water vapour at a relative humidity.
 *
 *   y = RH psat(T)/p
 *
 * @param RH - Relative humidity, 0..1.
 * @param T - Temperature, K; scalar.
 * @param p - Total pressure, Pa.
 * @returns Mole fraction; above 1 where the gas cannot hold that humidity.
 * @remarks No enhancement factor (0.4 % at 1 atm). Source: definition; saturation of [IF97].
 */
export function vapourFraction(RH: number, T: number, p: number): number {
  return (RH * waterSaturationPressure(T)) / p;
}

/** Relative humidity of a mole fraction of water vapour, the inverse of `vapourFraction`. */
export function relativeHumidity(y: number, T: number, p: number): number {
  return (y * p) / waterSaturationPressure(T);
}

/**
 * Dew point of a mole fraction of water vapour.
 *
 *   psat(Td) = y p
 *
 * @param y - Mole fraction; positive.
 * @param p - Total pressure, Pa.
 * @returns Temperature, K. Source: [IF97], equation 31.
 */
export function dewPoint(y: number, p: number): number {
  return waterBoilingTemperature(y * p);
}

/**
 * Humidity ratio of air.
 *
 *   W = 0.621945 y/(1 - y)
 *
 * @param y - Mole fraction of water vapour; below 1.
 * @returns kg of vapour in the gas with 1 kg of dry air.
 * Source: [ASHRAE2017], chapter 1, equation 20.
 */
export function humidityRatio(y: number): number {
  return (RATIO * y) / (1 - y);
}

/** Mole fraction of water vapour of a humidity ratio, the inverse of `humidityRatio`. */
export function vapourFractionOfRatio(W: number): number {
  return W / (RATIO + W);
}

/** Humidity ratio of air saturated at a temperature, kg/kg. */
export function saturatedHumidityRatio(T: number, p: number): number {
  return humidityRatio(vapourFraction(1, T, p));
}

/**
 * Enthalpy of humid air on 1 kg of dry air, from dry air and liquid water at 0 degC.
 *
 *   h = 1006 t + W (2501000 + 1860 t)
 *
 * @param T - Temperature, K.
 * @param W - Humidity ratio, kg/kg.
 * @returns Enthalpy, J/kg of dry air.
 * Source: [ASHRAE2017], chapter 1, equation 30.
 */
export function humidAirEnthalpy(T: number, W: number): number {
  const t = T - CELSIUS;
  return CP_AIR * t + W * (LATENT + CP_VAPOUR * t);
}

/** Volume of humid air on 1 kg of dry air, m3/kg: (R T/p)(1/M_air)(1 + W/0.621945). Source: ideal gas. */
export function humidAirVolume(T: number, W: number, p: number): number {
  return (GAS_CONSTANT * T * (1 + W / RATIO)) / (M_AIR * p);
}

/**
 * Humidity ratio from dry and wet bulb, the thermodynamic wet bulb of the handbook.
 *
 *   W = [(2501 - 2.326 tw) Ws - 1.006 (t - tw)]/(2501 + 1.86 t - 4.186 tw)
 *
 * @param T - Dry bulb, K.
 * @param TWet - Wet bulb, K; at or above freezing.
 * @param p - Total pressure, Pa.
 * @returns Humidity ratio, kg/kg.
 * Source: [ASHRAE2017], chapter 1, equation 33.
 */
export function ratioFromWetBulb(T: number, TWet: number, p: number): number {
  const t = T - CELSIUS;
  const tw = TWet - CELSIUS;
  const Ws = saturatedHumidityRatio(TWet, p);
  return ((LATENT - LATENT_SLOPE * tw) * Ws - CP_AIR * (t - tw)) / (LATENT + CP_VAPOUR * t - CP_WATER * tw);
}

/**
 * Wet-bulb temperature with a Lewis factor.
 *
 *   (Ws - W)(2501000 - 2326 tw) = f (1006 + 1860 W)(t - tw),  f = h/(kY cs) = Le^(2/3)
 *
 * @param T - Dry bulb, K.
 * @param W - Humidity ratio, kg/kg; at or below saturation.
 * @param p - Total pressure, Pa.
 * @param f - Lewis factor; 1 gives the adiabatic saturation temperature, 0.90 air-water.
 * @returns Temperature, K; at or above 273.15 K (ice is not in it).
 * @remarks The balance is increasing in tw: one root, found by bisection.
 * Source: [Treybal1980], chapter 7, with the constants of [ASHRAE2017]; f = 1 is equation 33 there.
 */
export function wetBulbTemperature(T: number, W: number, p: number, f = 1): number {
  const t = T - CELSIUS;
  let low = 0;
  let high = Math.min(t, waterBoilingTemperature(p) - CELSIUS - 1e-6);
  for (let k = 0; k < MAX_STEPS && high - low > 1e-11; k++) {
    const tw = 0.5 * (low + high);
    const Ws = saturatedHumidityRatio(tw + CELSIUS, p);
    const gain = (Ws - W) * (LATENT - LATENT_SLOPE * tw) - f * (CP_AIR + CP_VAPOUR * W) * (t - tw);
    if (gain < 0) low = tw;
    else high = tw;
  }
  return 0.5 * (low + high) + CELSIUS;
}

/** Adiabatic saturation temperature of air, K: the wet bulb with a Lewis factor of one. */
export function adiabaticSaturationTemperature(T: number, W: number, p: number): number {
  return wetBulbTemperature(T, W, p, 1);
}
