/**
 * Root of a continuous function between two points of opposite sign: the ITP method, which never needs more than
 * one evaluation beyond bisection and converges superlinearly where it can [OliveiraTakahashi2021].
 */

import { invariant } from '../errors.ts';

/** Truncation of the secant point towards the middle: kappa_1 times (b - a)^kappa_2 [OliveiraTakahashi2021, suggested values]. */
const KAPPA_1 = 0.2;
const KAPPA_2 = 2;
/** Evaluations allowed beyond those of bisection. */
const SLACK = 1;

/** The last bracket: g(before) has the sign it had at a, g(after) is zero or has the sign it had at b. */
export interface Bracket {
  readonly before: number;
  readonly after: number;
}

/**
 * Narrows [a, b] around a change of sign.
 *
 * @param ga - g(a), not zero.
 * @param gb - g(b), zero or of the other sign.
 * @param tolerance - Width at which to stop, in the unit of a; never below four roundings of the larger end.
 * @returns Ends no further apart than the tolerance. Same arguments, same bits.
 */
export function bracketedRoot(
  g: (x: number) => number,
  a: number,
  b: number,
  ga: number,
  gb: number,
  tolerance: number,
): Bracket {
  invariant((ga < 0 && gb >= 0) || (ga > 0 && gb <= 0), 'the ends of a bracket differ in sign');
  if (gb === 0) return narrowToZero(g, a, b, tolerance);
  const rising = ga < 0 ? 1 : -1;
  const width = Math.abs(b - a);
  const half = 0.5 * Math.max(tolerance, 4 * Number.EPSILON * Math.max(Math.abs(a), Math.abs(b)));
  const budget = Math.max(0, Math.ceil(Math.log2(width / (2 * half)))) + SLACK;
  let before = a;
  let after = b;
  let gBefore = rising * ga;
  let gAfter = rising * gb;
  for (let j = 0; Math.abs(after - before) > 2 * half; j++) {
    const span = after - before;
    const middle = before + 0.5 * span;
    const radius = half * 2 ** (budget - j) - 0.5 * Math.abs(span);
    const secant = before + (span * gBefore) / (gBefore - gAfter);
    const towards = Math.sign(middle - secant);
    const pull = KAPPA_1 * Math.abs(span) * Math.pow(Math.abs(span) / width, KAPPA_2 - 1);
    const truncated = pull <= Math.abs(middle - secant) ? secant + towards * pull : middle;
    const x = Math.abs(truncated - middle) <= radius ? truncated : middle - towards * radius;
    const value = rising * g(x);
    if (value < 0) {
      before = x;
      gBefore = value;
    } else {
      after = x;
      gAfter = value;
      if (value === 0) return narrowToZero(g, before, after, 2 * half);
    }
  }
  return { before, after };
}

/** A zero was hit exactly at `after`: the point before it lies one tolerance back, if g has its old sign there. */
function narrowToZero(g: (x: number) => number, a: number, zero: number, tolerance: number): Bracket {
  const span = zero - a;
  const back = Math.min(Math.abs(span), Math.max(tolerance, 4 * Number.EPSILON * Math.abs(zero)));
  const near = zero - Math.sign(span) * back;
  if (near === a || Math.sign(g(near)) === Math.sign(g(a))) return { before: near, after: zero };
  return bracketedRoot(g, a, near, g(a), g(near), tolerance);
}
