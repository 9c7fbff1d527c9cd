/** Typical magnitudes of a chain's outputs, below which a difference's step does not follow them down. */
import type { Shape } from './shape.ts';

/** By output port, SI. Solutes at the gas feed's strength; the rest round figures of the size met in columns. */
export function portScales(shape: Shape): Float64Array {
  const { outputs: op, plant } = shape;
  const { solutes: K } = shape.layout;
  const scales = new Float64Array(op.size).fill(0.1);
  scales[op.gasFlow] = plant.gas.feed.rate;
  scales[op.y] = 0.01;
  for (let k = 0; k < K; k++) {
    scales[op.y + 1 + k] = Math.max(plant.gas.feed.composition[k], 1e-9);
    scales[op.concentration + k] = 1;
  }
  scales[op.TG] = 10;
  scales[op.TL] = 10;
  scales[op.liquidFlow] = plant.liquid.feed.rate;
  scales[op.accepted] = plant.liquid.feed.rate;
  scales[op.molarVolume] = 1e-5;
  scales[op.pressureDrop] = 1e3;
  scales[op.heatLoss] = 1e3;
  return scales;
}
