// Equilibrium from a table of measured partial pressures: one curve over x for each temperature,
// and between the temperatures a straight line of ln p* over 1/T, as Clausius and Clapeyron have it.

import { GAS_CONSTANT } from '../constants.ts';
import { curveSlope, curveValue, monotoneCubic } from './monotone-cubic.ts';
import type { MonotoneCurve } from './monotone-cubic.ts';
import type { EquilibriumLaw } from './law.ts';

/** A table as a user types it. */
export interface EquilibriumTable {
  /** Temperatures, K, strictly increasing; at least one. */
  readonly T: readonly number[];
  /** Mole fractions of the component in the liquid, strictly increasing, positive, at most 1. */
  readonly x: readonly number[];
  /** Partial pressures, Pa, positive, not falling with x: `p[row of T][column of x]`. */
  readonly p: readonly (readonly number[])[];
  /** Heat of vaporisation from solution, J/mol: used with a single temperature, else computed. */
  readonly heat?: number;
}

/**
 * Law through a table.
 *
 *   at a tabulated T: p* = monotone cubic through (0, 0) and the points;
 *   between:          p* = pLow^(1-w) pHigh^w,  w = (1/TLow - 1/T)/(1/TLow - 1/THigh)
 *
 * @param table - Temperatures, mole fractions and pressures.
 * @returns The law. It passes through every point, p* = 0 at x = 0, never overshoots in x; its heat is
 *   R T^2 d ln(p*) / dT at the lowest tabulated x (constant in each temperature interval in units of R).
 * @remarks Range: the table. Outside, in x a straight line with the end slope, in T the nearest
 *   interval's exponent: smooth in x and continuous in T, for a solver that strays; a run reports that
 *   it left the table, a case that starts outside is refused by `tableCovers`. Error: third order in x.
 *   At T between tabulated values the slope in x is exact; d p* /dT jumps at tabulated temperatures.
 *   At and below x = 0 the mixing works on the slopes there, so p* passes linearly through zero.
 * Source: [FritschCarlson1980]; ln p over 1/T is the Clausius-Clapeyron relation.
 */
export function tableLaw(table: EquilibriumTable): EquilibriumLaw {
  const curves = table.p.map((row) => monotoneCubic([0, ...table.x], [0, ...row]));
  const temperatures = Float64Array.from(table.T);
  const xLow = table.x[0];
  return {
    kind: 'table',
    partialPressure: (T, x) => mixed(temperatures, curves, T, x, false),
    slope: (T, x) => mixed(temperatures, curves, T, x, true),
    vaporisationEnthalpy: (T) => {
      if (curves.length === 1) return table.heat ?? 0;
      const k = rowBelow(temperatures, T);
      const rise = Math.log(curveValue(curves[k + 1], xLow) / curveValue(curves[k], xLow));
      return (GAS_CONSTANT * rise) / (1 / temperatures[k] - 1 / temperatures[k + 1]);
    },
  };
}

/** Whether a state lies inside the table (x from 0 to the last column). */
export function tableCovers(table: EquilibriumTable, T: number, x: number): boolean {
  const lastT = table.T[table.T.length - 1];
  const lastX = table.x[table.x.length - 1];
  return T >= table.T[0] && T <= lastT && x >= 0 && x <= lastX;
}

function rowBelow(temperatures: Float64Array, T: number): number {
  let k = 0;
  while (k < temperatures.length - 2 && T > temperatures[k + 1]) k++;
  return k;
}

/** Pressure (or its slope in x) between two temperature rows, by a geometric mean of both rows. */
function mixed(
  temperatures: Float64Array,
  curves: readonly MonotoneCurve[],
  T: number,
  x: number,
  wantSlope: boolean,
): number {
  if (curves.length === 1) return wantSlope ? curveSlope(curves[0], x) : curveValue(curves[0], x);
  const k = rowBelow(temperatures, T);
  const inverseLow = 1 / temperatures[k];
  const w = (inverseLow - 1 / T) / (inverseLow - 1 / temperatures[k + 1]);
  const slopeLow = curveSlope(curves[k], x);
  const slopeHigh = curveSlope(curves[k + 1], x);
  // So close to zero that the curves are straight lines: mix the slopes, 0/0 otherwise.
  const atZero = x <= 1e-9 * curves[k].x[1];
  const low = atZero ? slopeLow : curveValue(curves[k], x);
  const high = atZero ? slopeHigh : curveValue(curves[k + 1], x);
  const mean = low * Math.exp(w * Math.log(high / low));
  if (atZero) return wantSlope ? mean : mean * x;
  return wantSlope ? mean * (((1 - w) * slopeLow) / low + (w * slopeHigh) / high) : mean;
}
