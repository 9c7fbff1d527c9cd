/** PI controller: output and the rate of its integral part. */

/** Tracking time over the integral time: how fast the integral follows an output that is held at its end. */
const TRACKING = 0.1;

export interface PiSettings {
  /** Output per unit of the measurement, positive. */ readonly gain: number;
  /** s */ readonly integralTime: number;
  /** +1: output rises with the measurement (direct), -1: reverse. */ readonly sign: 1 | -1;
  readonly outputRange: readonly [number, number];
}

/** Error as the output sees it: positive raises the output. */
export function controlError(settings: PiSettings, setpoint: number, measured: number): number {
  return settings.sign * (measured - setpoint);
}

/** Output in automatic, held in its range. */
export function piOutput(settings: PiSettings, integral: number, error: number): number {
  const u = settings.gain * error + integral;
  const [low, high] = settings.outputRange;
  return u < low ? low : u > high ? high : u;
}

/**
 * Rate of the integral part, 1/s.
 *
 *   dI/dt = (K/Ti) e + (u_held - u)/(0.1 Ti)   automatic
 *   dI/dt = (u_manual - K e - I)/(0.1 Ti)      manual: the integral follows, so that the change to automatic is bumpless
 *
 * @remarks Anti-windup by tracking (back-calculation), [Astrom1995] section 3.5; its time 0.1 Ti is judgement.
 */
export function integralRate(
  settings: PiSettings,
  integral: number,
  error: number,
  isAutomatic: boolean,
  manualOutput: number,
): number {
  const tracking = TRACKING * settings.integralTime;
  const raw = settings.gain * error + integral;
  if (!isAutomatic) return (manualOutput - raw) / tracking;
  return (settings.gain * error) / settings.integralTime + (piOutput(settings, integral, error) - raw) / tracking;
}
