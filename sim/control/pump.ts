/** Centrifugal pump against static head and line friction: speed and delivery. */

/** Scale of (w^2 - s)/(1 - s) on which the square root of the delivery is rounded at its foot. */
const FOOT = 1e-4;

/**
 * Delivery as a share of the rated one.
 *
 *   q/qn = z [(w^2 - s)/(1 - s)]^(1/2),  0 below w^2 = s
 *
 * @param speed - Speed over rated speed, w.
 * @param staticShare - Static head over shut-off head, s; 0 <= s < 1.
 * @param opening - Valve opening, z, 0..1.
 * @returns Share of the rated flow, not negative; exactly z at w = 1.
 * @remarks From the affinity laws with head H0 w^2 - a q^2 against Hs + b q^2 (derivable). The foot is rounded on 1e-4.
 */
export function pumpDelivery(speed: number, staticShare: number, opening: number): number {
  const x = (speed * speed - staticShare) / (1 - staticShare);
  if (x <= 0) return 0;
  return opening * x * Math.sqrt((1 + FOOT) / (x + FOOT));
}

/**
 * Rate of the speed, 1/s.
 *
 *   stopped: dw/dt = -w^2/T  (so w = w0/(1 + w0 t/T));  running: dw/dt = 3 (target - w)/runUp
 *
 * @param coastDown - T, s: moment of inertia times rated speed squared over rated power.
 * @param runUp - Time to 95 % of the target, s.
 * @remarks Coast-down: torque falls as w^2 (derivable); run-up: first order, common practice, no source.
 */
export function speedRate(speed: number, target: number, isRunning: boolean, coastDown: number, runUp: number): number {
  if (isRunning) return (3 * (target - speed)) / runUp;
  return (-speed * Math.abs(speed)) / coastDown;
}
