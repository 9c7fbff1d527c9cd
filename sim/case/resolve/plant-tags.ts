// The plant as a directory: which machines, valves and outputs exist, and under which tags.

import type { ColumnSpec, ControlledDevice, GasSupply, LiquidSupply, Solute, Solvent, ValveName } from '../case.ts';
import type { Substances } from './strengths.ts';

/** What the checks of instruments, interlocks and scenarios look up. */
export interface Plant extends Substances {
  readonly solvent: Solvent;
  readonly solutes: readonly Solute[];
  readonly column: ColumnSpec;
  readonly gas: GasSupply;
  readonly liquid: LiquidSupply;
  /** K; strengths of liquid by volume refer to it. */
  readonly liquidTemperature: number;
  /** Tags of pumps and fan. */
  readonly machines: readonly string[];
  /** Valves that exist, with their tag where they have one. */
  readonly valves: ReadonlyMap<ValveName, string | undefined>;
  readonly outputs: ReadonlySet<ControlledDevice>;
}

/** The directory of a plant. */
export function plantOf(substances: Substances, column: ColumnSpec, gas: GasSupply, liquid: LiquidSupply): Plant {
  const machines = [liquid.pumps.duty];
  if (liquid.pumps.standby !== undefined) machines.push(liquid.pumps.standby);
  const valves = new Map<ValveName, string | undefined>([
    ['gas-inlet', gas.inletValve.tag],
    ['solvent', liquid.valve.tag],
    ['drain', liquid.sump.drain.tag],
  ]);
  const outputs = new Set<ControlledDevice>(['drain', 'solvent-valve', 'pump-speed']);
  if (gas.source.kind === 'fan') {
    machines.push(gas.source.tag);
    valves.set('gas-damper', undefined);
    outputs.add('gas-damper');
  }
  if (gas.diversion !== undefined) valves.set('diversion', gas.diversion.tag);
  if (liquid.makeUp !== undefined) {
    valves.set('make-up', liquid.makeUp.tag);
    outputs.add('make-up');
  }
  if (liquid.bleed !== undefined) {
    valves.set('bleed', liquid.bleed.tag);
    outputs.add('bleed');
  }
  if (liquid.cooler !== undefined) outputs.add('cooler');
  if (liquid.emergencyWater !== undefined) valves.set('emergency-water', liquid.emergencyWater.tag);
  return { ...substances, column, gas, liquid, liquidTemperature: liquid.feed.temperature, machines, valves, outputs };
}
