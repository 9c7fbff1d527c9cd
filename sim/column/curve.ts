/** A property of temperature, given as data, as a function. */
import type { Curve } from '../case/case.ts';
import { invariant } from '../errors.ts';
import { libraryCurve } from '../properties/library/curves.ts';

/**
 * @param curve - Library name, constant, or points.
 * @returns Function of T, K. Points continue with their end slopes outside their span.
 */
export function curveFunction(curve: Curve): (T: number) => number {
  switch (curve.kind) {
    case 'library': {
      const f = libraryCurve(curve.id);
      invariant(f !== undefined, `no library function named ${curve.id}`);
      return f;
    }
    case 'constant':
      return () => curve.value;
    case 'points':
      return interpolated(curve.temperature, curve.value, curve.interpolation === 'log');
  }
}

function interpolated(T: readonly number[], value: readonly number[], log: boolean): (T: number) => number {
  if (T.length === 1) return () => value[0];
  const u = T.map((t) => (log ? 1 / t : t));
  const v = value.map((y) => (log ? Math.log(y) : y));
  return (t) => {
    let k = 0;
    while (k < T.length - 2 && t > T[k + 1]) k++;
    const at = log ? 1 / t : t;
    const y = v[k] + ((v[k + 1] - v[k]) * (at - u[k])) / (u[k + 1] - u[k]);
    return log ? Math.exp(y) : y;
  };
}
