// Least liquid that keeps a packing wet.

/** Rates on the packing's area, m2/s (0.08 and 0.12 m3/(m h)), [Morris1953]; from memory. */
const SMALL_RATE = 0.08 / 3600;
const LARGE_RATE = 0.12 / 3600;
/** Size above which the larger rate holds, m. */
const LARGE_SIZE = 0.075;

/**
 * Minimum wetting velocity.
 *
 *   uL = a 0.08 m3/(m h) for packing to 75 mm, a 0.12 m3/(m h) above
 *
 * @param a - Specific area, m2/m3.
 * @param size - Nominal size, m.
 * @returns Superficial liquid velocity, m/s.
 * @remarks A warning, not a law: metal and ceramic do with less today, plastic wants more.
 * Source: [Morris1953], from memory.
 */
export function minimumWettingVelocity(a: number, size: number): number {
  return a * (size > LARGE_SIZE ? LARGE_RATE : SMALL_RATE);
}
