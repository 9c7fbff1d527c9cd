// What a packing is to the correlations. Constants of an author belong to that author's own area and
// voidage; a set that is not known is absent, never guessed.

/** Friction constants of Stichlmair, Bravo and Fair: f0 = C1/Re + C2/Re^0.5 + C3. */
export interface StichlmairConstants {
  readonly C1: number;
  readonly C2: number;
  readonly C3: number;
}

/** Constants of Billet and Schultes; each may be missing in the published tables. */
export interface BilletConstants {
  /** Hold-up. */
  readonly Ch?: number;
  /** Dry pressure drop. */
  readonly Cp0?: number;
  /** Liquid-side transfer. */
  readonly CL?: number;
  /** Gas-side transfer. */
  readonly CV?: number;
  /** Loading point. */
  readonly CS?: number;
  /** Flooding point. */
  readonly CFl?: number;
}

/** Geometry that every correlation shares. */
export interface PackingGeometry {
  /** Specific area, m2/m3. */
  readonly a: number;
  /** Void fraction, 0..1. */
  readonly eps: number;
}

/** Hydraulic diameter of a packing element's sphere with the same surface: 6 (1 - eps)/a, m. */
export function particleDiameter(packing: PackingGeometry): number {
  return (6 * (1 - packing.eps)) / packing.a;
}
