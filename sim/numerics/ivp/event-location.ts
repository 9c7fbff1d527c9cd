/** Where a scalar first changes sign between two times, given a continuous solution to evaluate it on. */

import { bracketedRoot } from '../bracketed-root.ts';

/** Which changes of sign count: upward (to zero or above), downward (to zero or below), both. */
export type CrossingDirection = 'rising' | 'falling' | 'either';

/** What to look for, and how finely. */
export interface CrossingSearch {
  readonly direction: CrossingDirection;
  /** Equal parts of the interval that are looked at; 1 sees only a net change. More: short excursions are found. */
  readonly parts: number;
  /** Width of the final bracket, in the unit of t. */
  readonly tolerance: number;
}

/** The first crossing: g has not yet crossed at `before` and has at `after`. */
export interface Crossing {
  readonly before: number;
  readonly after: number;
  readonly direction: 'rising' | 'falling';
}

/** How g crossed from one value to the next, if it did. A start at zero is no crossing, an end at zero is one. */
function crossingBetween(g0: number, g1: number): 'rising' | 'falling' | undefined {
  if (g0 < 0 && g1 >= 0) return 'rising';
  if (g0 > 0 && g1 <= 0) return 'falling';
  return undefined;
}

/**
 * First crossing of g in (t0, t1], or undefined.
 *
 * @param g - Scalar of time, continuous; evaluated at interior points only.
 * @param g0 - g(t0).
 * @param g1 - g(t1).
 * @returns Depends on the arguments alone: same numbers, same bits.
 */
export function firstCrossing(
  g: (t: number) => number,
  t0: number,
  t1: number,
  g0: number,
  g1: number,
  search: CrossingSearch,
): Crossing | undefined {
  const { direction, parts, tolerance } = search;
  let left = t0;
  let gLeft = g0;
  for (let part = 1; part <= parts; part++) {
    const right = part === parts ? t1 : t0 + ((t1 - t0) * part) / parts;
    const gRight = part === parts ? g1 : g(right);
    const found = crossingBetween(gLeft, gRight);
    if (found !== undefined && (direction === 'either' || direction === found)) {
      return { ...bracketedRoot(g, left, right, gLeft, gRight, tolerance), direction: found };
    }
    left = right;
    gLeft = gRight;
  }
  return undefined;
}
