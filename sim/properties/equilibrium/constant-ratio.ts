// A straight equilibrium line with a fixed slope: the case that has exact solutions.

import type { EquilibriumLaw } from './law.ts';

/**
 * Constant ratio: y* = m x, so p* = m p x.
 *
 * @param m - Slope of the equilibrium line, mole fraction over mole fraction; positive.
 * @param heat - Heat of vaporisation from solution, J/mol; 0 for an isothermal model.
 * @returns The law. The ratio does not move with temperature, so the heat is a separate input here and
 *   the only place where the two are not tied: say so where it is used.
 * @remarks Range: dilute, isothermal, constant pressure. Source: definition of m in [Colburn1939].
 */
export function constantRatioLaw(m: number, heat: number): EquilibriumLaw {
  return {
    kind: 'ratio',
    partialPressure: (_T, x, p) => m * p * x,
    slope: (_T, _x, p) => m * p,
    vaporisationEnthalpy: () => heat,
  };
}
