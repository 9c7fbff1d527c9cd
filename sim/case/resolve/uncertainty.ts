// Uncertain inputs: each names a key of the case by its path; the spread is a factor on the key's value or
// two values in the key's own kind.

import type { Uncertain } from '../case.ts';
import { join, shorten } from '../issues.ts';
import { suggestion } from '../nearest.ts';
import type { Reading } from '../reading.ts';
import type { UncertainText } from '../schema/actions.ts';
import { parseQuantity, KINDS } from '../../units.ts';
import type { Kind } from '../../units.ts';

/**
 * One uncertain input, or undefined after noting why not.
 *
 * @param paths - Keys with a value, stated or default; undefined: not known.
 */
export function readUncertain(
  reading: Reading,
  path: string,
  given: UncertainText,
  paths: readonly string[] | undefined,
): Uncertain | undefined {
  if (paths !== undefined && !paths.includes(given.path)) {
    reading.refuse(
      'reference',
      join(path, 'path'),
      'the path of a number in this case',
      given.path,
      suggestion(given.path, paths),
    );
    return undefined;
  }
  if ((given.times === undefined) === (given.between === undefined)) {
    reading.object(
      'contradiction',
      path,
      'either "times" or "between"',
      given.times === undefined ? 'neither' : 'both',
    );
    return undefined;
  }
  const key = given.times === undefined ? 'between' : 'times';
  const ends = given.times ?? given.between?.map((end, index) => readEnd(reading, `${path}.between[${index}]`, end));
  const [low, high] = ends ?? [];
  if (low === undefined || high === undefined) return undefined;
  if (low >= high) {
    reading.object('contradiction', join(path, key), 'a lower and a higher end', shorten(given.times ?? given.between));
    return undefined;
  }
  return {
    path: given.path,
    distribution: given.distribution,
    as: key === 'times' ? 'factor' : 'value',
    low,
    high,
    source: given.source ?? 'not stated',
  };
}

const KIND_NAMES = Object.keys(KINDS) as Kind[];

/** An end in SI: its unit tells its kind. */
function readEnd(reading: Reading, path: string, end: string | number): number | undefined {
  if (typeof end === 'number') return end;
  for (const kind of KIND_NAMES) {
    const parsed = parseQuantity(end, kind);
    if (parsed.ok) return parsed.value;
  }
  reading.refuse('unit', path, 'a value with a known unit', end);
  return undefined;
}
