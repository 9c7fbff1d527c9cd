// A constant with its origin. Results show the mark beside the number, so that a reader knows what
// was compared with a text, what is remembered, what was calculated, and what is only an example.

/**
 * How far a value was verified.
 * - `seen`: read in the named text or in a text that quotes it;
 * - `from memory`: ascribed to the named text, not compared with it;
 * - `computed`: follows from other entries by the named rule;
 * - `demo`: invented for an example, to be overridden.
 */
type Verified = 'seen' | 'from memory' | 'computed' | 'demo';

/** A value, where it comes from, and how far that was checked. */
export interface Sourced<V = number> {
  readonly value: V;
  /** Citation key of the bibliography with table or page, or the rule that computed it. */
  readonly source: string;
  readonly verified: Verified;
}

/** A value read in `source`. */
export function seen<V>(value: V, source: string): Sourced<V> {
  return { value, source, verified: 'seen' };
}

/** A value ascribed to `source` and not compared with it. */
export function fromMemory<V>(value: V, source: string): Sourced<V> {
  return { value, source, verified: 'from memory' };
}

/** A value that follows from others by the rule named in `source`. */
export function computed<V>(value: V, source: string): Sourced<V> {
  return { value, source, verified: 'computed' };
}

/** An invented value for an example. */
export function demo<V>(value: V, source: string): Sourced<V> {
  return { value, source, verified: 'demo' };
}
