// Curves of a case as numbers: needed here for densities behind mg/L and for what freezes or boils.

import { libraryCurve } from '../properties/library/curves.ts';
import type { Kelvin } from '../units.ts';
import type { Curve } from './case.ts';

/**
 * Value of a curve.
 *
 * @param T - Temperature, K; scalar. Points are held flat outside their range.
 * @returns SI value; NaN when a library name is unknown, which a checked case never has.
 */
export function curveValue(curve: Curve, T: Kelvin): number {
  if (curve.kind === 'constant') return curve.value;
  if (curve.kind === 'library') return libraryCurve(curve.id)?.(T) ?? Number.NaN;
  const { temperature, value, interpolation } = curve;
  const last = temperature.length - 1;
  const j = temperature.findIndex((limit) => T < limit);
  if (j === 0) return value[0] ?? Number.NaN;
  if (j === -1) return value[last] ?? Number.NaN;
  const TLow = temperature[j - 1] ?? T;
  const THigh = temperature[j] ?? T;
  const low = value[j - 1] ?? Number.NaN;
  const high = value[j] ?? Number.NaN;
  if (interpolation === 'linear') return low + ((high - low) * (T - TLow)) / (THigh - TLow);
  const share = (1 / T - 1 / TLow) / (1 / THigh - 1 / TLow);
  return Math.exp(Math.log(low) + share * (Math.log(high) - Math.log(low)));
}
