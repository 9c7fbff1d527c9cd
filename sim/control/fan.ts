/** Fan against bed and duct: delivery. */

/** Scale of the pressure left for the duct, over the shut-off pressure, on which the square root is rounded. */
const FOOT = 1e-4;

export interface FanCurve {
  /** Pa at no flow and rated speed. */ readonly shutOffPressure: number;
  /** m3/s, and Pa there. */ readonly ratedFlow: number;
  readonly ratedPressure: number;
}

/** Fall of the fan's pressure with the square of its flow, Pa s2/m6: p = p0 w^2 - k Q^2. */
function fall(curve: FanCurve): number {
  return (curve.shutOffPressure - curve.ratedPressure) / curve.ratedFlow ** 2;
}

/**
 * Flow at which fan pressure equals bed and duct.
 *
 *   Q = [(p0 w^2 - dp)/(k + b/z^2)]^(1/2)
 *
 * @param speed - Over rated speed.
 * @param bedDrop - Pressure drop that does not go with this flow's square, Pa.
 * @param duct - b, Pa s2/m6.
 * @param damper - Opening z, 0..1.
 * @returns m3/s, not negative. Affinity laws and a parabola through shut-off and rated point (derivable).
 */
export function fanFlow(curve: FanCurve, speed: number, bedDrop: number, duct: number, damper: number): number {
  const left = (curve.shutOffPressure * speed * speed - bedDrop) / curve.shutOffPressure;
  if (left <= 0 || damper <= 0) return 0;
  const rounded = (left * left) / (left + FOOT); // so that the root's slope stays finite
  return Math.sqrt((rounded * curve.shutOffPressure) / (fall(curve) + duct / (damper * damper)));
}

/** Duct resistance b with which the fan gives `flow` against `bedDrop` at rated speed, damper open; negative: too small a fan. */
export function ductResistance(curve: FanCurve, flow: number, bedDrop: number): number {
  const left = (curve.shutOffPressure - bedDrop) / curve.shutOffPressure;
  const rounded = left > 0 ? (left * left) / (left + FOOT) : left;
  return (rounded * curve.shutOffPressure) / flow ** 2 - fall(curve);
}
