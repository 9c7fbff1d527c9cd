// Pressure drop at flooding from the packing factor alone.

/** Pa/m for an inch of water per foot. */
const GRADIENT = 249.08891 / 0.3048;
const FOOT = 0.3048;
/** Packing factor up to which the law holds, 1/ft. */
const LARGEST_FACTOR = 60;
/** Value above it, inH2O/ft. */
const SMALL_PACKING_VALUE = 2;

/**
 * Flood pressure drop of random packing.
 *
 *   dp / (inH2O/ft) = 0.115 Fp^0.7, Fp in 1/ft, 10-60;  above 60: 2.0
 *
 * @param Fp - Packing factor, 1/m.
 * @returns Pressure gradient, Pa/m.
 * @remarks Range: Fp 33-200 1/m (10-60 1/ft), air-water like systems. Error: 10-20 % (common practice, no source). The two branches
 *   meet within 1 % at 60 1/ft. Another restatement has 0.12 instead of 0.115.
 * Source: [Kister1991], from memory. Departs: SI at the edges.
 */
export function kisterGillFloodPressureDrop(Fp: number): number {
  const perFoot = Fp * FOOT;
  const inches = perFoot > LARGEST_FACTOR ? SMALL_PACKING_VALUE : 0.115 * Math.exp(0.7 * Math.log(perFoot));
  return inches * GRADIENT;
}
