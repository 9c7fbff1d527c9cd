/** What a controller puts out at a moment, so that it can be put in manual without a bump. */
import type { Column } from '../column/column.ts';
import { controlError, piOutput } from '../control/pi-controller.ts';

/**
 * @param i - Controller, by its place in the case.
 * @param y - State of the column.
 * @param shown - What its instrument shows, SI.
 * @returns Output, 0..1 of the valve it moves.
 */
export function controllerOutput(column: Column, i: number, y: Float64Array, shown: number): number {
  const controller = column.plant.controllers[i];
  const mode = column.modes.controllers[i];
  if (!mode.automatic) return mode.manualOutput;
  const settings = {
    gain: controller.gain,
    integralTime: controller.integralTime,
    sign: controller.action === 'direct' ? 1 : -1,
    outputRange: controller.outputRange,
  } as const;
  return piOutput(settings, y[column.layout.controllers[i]], controlError(settings, mode.setpoint, shown));
}
