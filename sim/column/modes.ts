/**
 * What stands still between events: commands to machines and valves, controller modes, and the values that a scenario
 * sets over time. The run changes them; the plant's equations read them.
 */
import type { Case, ValveName } from '../case/case.ts';

/** Values of the channels that a scenario can change, at one time. */
export interface ChannelValues {
  gasRate: number;
  gasTemperature: number;
  gasHumidity: number;
  readonly gasComposition: Float64Array;
  liquidTemperature: number;
  readonly liquidComposition: Float64Array;
  pumpSpeed: number;
  makeUpTemperature: number;
  readonly makeUpComposition: Float64Array;
  cooling: number;
  coolantTemperature: number;
  fouling: number;
  foaming: number;
  liquidShare: number;
  ambientTemperature: number;
  topPressure: number;
  nonReturnValveLeak: number;
}

interface ControllerMode {
  automatic: boolean;
  setpoint: number;
  manualOutput: number;
}

/** Discrete state of the plant. */
export interface PlantModes {
  readonly channels: ChannelValues;
  /** Duty and standby: running, and whether a start is possible. */
  readonly pumpRunning: [boolean, boolean];
  readonly pumpAvailable: [boolean, boolean];
  fanRunning: boolean;
  fanAvailable: boolean;
  readonly valveCommand: Record<ValveName, number>;
  readonly valveStuck: Record<ValveName, boolean>;
  readonly controllers: ControllerMode[];
}

/** Values that the case gives for every channel. */
export function designChannels(plant: Case): ChannelValues {
  const { gas, liquid, column } = plant;
  return {
    gasRate: gas.feed.rate,
    gasTemperature: gas.feed.temperature,
    gasHumidity: gas.feed.humidity,
    gasComposition: Float64Array.from(gas.feed.composition),
    liquidTemperature: liquid.feed.temperature,
    liquidComposition: Float64Array.from(liquid.feed.composition),
    pumpSpeed: 1,
    makeUpTemperature: liquid.makeUp?.temperature ?? liquid.feed.temperature,
    makeUpComposition: Float64Array.from(liquid.makeUp?.composition ?? liquid.feed.composition),
    cooling: 1,
    coolantTemperature: liquid.cooler?.coolantTemperature ?? column.ambientTemperature,
    fouling: 0,
    foaming: 1,
    liquidShare: column.distribution?.liquidShare ?? 1,
    ambientTemperature: column.ambientTemperature,
    topPressure: column.topPressure,
    nonReturnValveLeak: 0,
  };
}

/** Modes of normal running. */
export function designModes(plant: Case): PlantModes {
  const { liquid } = plant;
  return {
    channels: designChannels(plant),
    pumpRunning: [true, false],
    pumpAvailable: [true, liquid.pumps.standby !== undefined],
    fanRunning: true,
    fanAvailable: true,
    valveCommand: {
      'gas-inlet': 1,
      diversion: 0,
      solvent: 1,
      drain: Math.min(1, liquid.feed.rate / liquid.sump.drain.capacity),
      'make-up': liquid.makeUp === undefined ? 0 : liquid.makeUp.rate / liquid.makeUp.capacity,
      bleed: liquid.bleed === undefined ? 0 : liquid.bleed.rate / liquid.bleed.capacity,
      'emergency-water': 0,
      'gas-damper': 1,
    },
    valveStuck: {
      'gas-inlet': false,
      diversion: false,
      solvent: false,
      drain: false,
      'make-up': false,
      bleed: false,
      'emergency-water': false,
      'gas-damper': false,
    },
    controllers: plant.controllers.map((c) => ({
      automatic: c.mode === 'automatic',
      setpoint: c.setpoint,
      manualOutput: c.manualOutput,
    })),
  };
}
