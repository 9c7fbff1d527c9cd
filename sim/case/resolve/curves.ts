// Curves from their text form: a value, points, or a library substance's function.

import { libraryCurve } from '../../properties/library/curves.ts';
import { CARRIERS } from '../../properties/library/carriers.ts';
import { SOLVENTS } from '../../properties/library/solvents.ts';
import type { Curve } from '../case.ts';
import { join } from '../issues.ts';
import type { Reading } from '../reading.ts';

/** A curve as the schema gives it, SI. */
export type CurveText =
  | number
  | {
      readonly temperature: readonly number[];
      readonly value: readonly number[];
      readonly interpolation?: 'linear' | 'log' | undefined;
    }
  | { readonly library: string };

/** Properties by which the library names its functions. */
export type CurveProperty =
  'density' | 'viscosity' | 'surface-tension' | 'molar-heat-capacity' | 'vapour-pressure' | 'conductivity';

/** The curve, or undefined after noting the issue. */
export function readCurve(
  reading: Reading,
  path: string,
  given: CurveText,
  property: CurveProperty,
): Curve | undefined {
  if (typeof given === 'number') return { kind: 'constant', value: given };
  if ('library' in given) {
    const known = [...Object.keys(SOLVENTS), ...Object.keys(CARRIERS)].filter(
      (name) => libraryCurve(`${name}.${property}`) !== undefined,
    );
    if (known.includes(given.library)) return { kind: 'library', id: `${given.library}.${property}` };
    reading.unknown(join(path, 'library'), `a library substance with a ${property}`, given.library, known);
    return undefined;
  }
  const { temperature, value } = given;
  if (temperature.length < 2 || temperature.length !== value.length) {
    reading.object(
      'contradiction',
      path,
      'two or more temperatures and as many values',
      `${temperature.length} temperatures and ${value.length} values`,
    );
    return undefined;
  }
  if (!isAscending(temperature)) {
    reading.object(
      'contradiction',
      join(path, 'temperature'),
      'ascending temperatures',
      'temperatures in another order',
    );
    return undefined;
  }
  return { kind: 'points', temperature, value, interpolation: given.interpolation ?? 'linear' };
}

/** Whether each number is larger than the one before. */
export function isAscending(values: readonly number[]): boolean {
  return values.every((value, i) => i === 0 || value > (values[i - 1] ?? value));
}
