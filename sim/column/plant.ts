/**
 * The plant around the bed: gas supply, pumps, distributor and redistributors, sump, cooler, make-up and bleed, valves,
 * controllers, instrument lags, and the accumulators of what crosses the boundary.
 * Two halves, so that slopes can be taken through it by differences: `prepare` turns the core's states into what the
 * chains receive, `rates` turns what the chains give into the core's rates.
 */
import type { Case, ControlledDevice, Instrument } from '../case/case.ts';
import { fanFlow } from '../control/fan.ts';
import { controlError, integralRate, piOutput, type PiSettings } from '../control/pi-controller.ts';
import { pumpDelivery, speedRate } from '../control/pump.ts';
import { readHermiteColumn, type HermiteTable } from '../numerics/hermite-table.ts';
import { GAS_CONSTANT } from '../properties/constants.ts';
import type { Chain } from './chain.ts';
import { DATUM_TEMPERATURE, type Fluids } from './fluids.ts';
import type { Layout } from './layout.ts';
import type { PlantModes } from './modes.ts';
import { createPlenum, type Plenum } from './plenum.ts';
import type { InputPorts, OutputPorts } from './ports.ts';
import { addStream, concentrations, createStream, type LiquidStream } from './stream.ts';
import { gravityOutflow, metalHeat, readVessel, type VesselState } from './vessel.ts';

/** What the control system shows of an instrument: the lagged or direct value after everything else. */
export interface ShownValues {
  /**
   * @param i - Instrument.
   * @param t - s.
   * @param value - Lagged (or true) value, SI.
   */
  shown(i: number, t: number, value: number): number;
}

/** Lag of the pressure profile behind the pressure drop, s: lets pressure act on density without an implicit loop. */
export const PRESSURE_LAG = 0.5;
/** Lag of the gas split between two zones, s. */
const SPLIT_LAG = 1;
/** A lag, stroke or run-up that a case gives as zero acts within this time, s. */
const LEAST_LAG = 1e-3;
/** Share of a stroke time that makes a first-order lag reach 95 % of the travel. */
const STROKE_LAGS = 3;
/** Time in which an overflow takes away what stands above its edge, s. */
const OVERFLOW_TIME = 2;
/** Band above the lowest suction level in which a pump starves, over that level (least 1 cm). */
const STARVING_BAND = 0.2;

/** Streams and flows of the present moment, read by reports and instruments. */
interface PlantFlows {
  /** mol/s from the source, into the bed, diverted. */
  gasSource: number;
  gasToBed: number;
  gasDiverted: number;
  /** Pump delivery into the distributor. */ readonly delivery: LiquidStream;
  /** Drawn from the sump, m3/s at its temperature (recirculated). */ drawn: number;
  readonly emergency: LiquidStream;
  readonly makeUp: LiquidStream;
  /** m3/s */ drain: number;
  bleed: number;
  overflow: number;
  /** m3 of liquid a second sent over the top with the gas. */ carryOver: number;
  /** Offered to bed b, m3/s. */ readonly offered: Float64Array;
  /** W taken out by the cooler. */ coolerDuty: number;
  /** Mole fractions of the gas feed, k = 0..K. */ readonly feedY: Float64Array;
  feedTemperature: number;
}

export interface Plant {
  readonly flows: PlantFlows;
  readonly vessels: readonly VesselState[];
  readonly sump: VesselState;
  readonly sumpLevel: () => number;
  /** Fills the chains' inputs (all but the gas flow of upper beds) and the flows. */
  prepare(t: number, y: Float64Array): void;
  /** Writes the rates of core and accumulators; the chains' outputs must be there. */
  rates(y: Float64Array, dydt: Float64Array): void;
  /** Gas space under bed b - 1 (b >= 1). */ readonly plenums: readonly (Plenum | undefined)[];
  /** Volumes at the design rate, m3. */ readonly vesselVolume: readonly number[];
  readonly vesselMetal: readonly number[];
  readonly sumpVolume: number;
  readonly sumpMetal: number;
  /** Molar volume of the solvent, m3/mol, against K. */ readonly molarVolume: (T: number) => number;
  /** Fan against duct: resistance, Pa s2/m6; set once the steady state is known. */
  ductResistance: number;
  /** True value of an instrument's quantity, SI. */
  trueValue(instrument: Instrument, y: Float64Array): number;
  readonly passThrough: boolean;
}

/** A valve's opening: its position, which the integration may leave a tolerance beyond shut. */
function opening(y: Float64Array, valve: number): number {
  const position = y[valve];
  return position > 0 ? position : 0;
}

/** Everything the plant needs. */
export interface PlantParts {
  readonly plant: Case;
  readonly layout: Layout;
  readonly fluids: Fluids;
  /** By bed, then zone. */ readonly chains: readonly (readonly Chain[])[];
  readonly inputs: InputPorts;
  readonly outputs: OutputPorts;
  readonly molarVolumeTable: HermiteTable;
  readonly modes: PlantModes;
  readonly signals: ShownValues;
}

export function createPlant(parts: PlantParts): Plant {
  const { plant, layout, fluids, chains, inputs: ip, outputs: op, modes, signals } = parts;
  const { liquid, gas, column } = plant;
  const { components } = layout;
  const K = layout.solutes;
  const beds = column.beds.length;
  const { channels } = modes;
  const molarVolume = (T: number): number => readHermiteColumn(parts.molarVolumeTable, 0, T);
  const vesselVolume = column.beds.map((b, i) => (i === 0 ? liquid.distributorVolume : b.redistributorVolume));
  const passThrough = vesselVolume[0] === 0;
  const vesselMetal = vesselVolume.map((v) => metalHeat(fluids, v));
  const sumpVolume = liquid.sump.area * liquid.sump.normalLevel;
  const sumpMetal = metalHeat(fluids, sumpVolume);
  const newVessel = (): VesselState => ({
    volume: 0,
    temperature: liquid.feed.temperature,
    concentration: new Float64Array(K),
    molarVolume: 1,
  });
  const vessels = vesselVolume.map(newVessel);
  const sump = newVessel();
  const plenums = column.beds.map((_, b) => (b === 0 ? undefined : createPlenum(plant, fluids)));
  const zoneShares =
    column.distribution === undefined ? [1] : [column.distribution.areaShare, 1 - column.distribution.areaShare];
  const isRecirculated = liquid.mode === 'recirculated';
  const settings: PiSettings[] = plant.controllers.map((c) => ({
    gain: c.gain,
    integralTime: c.integralTime,
    sign: c.action === 'direct' ? 1 : -1,
    outputRange: c.outputRange,
  }));
  const instrumentOf = plant.controllers.map((c) => plant.instruments.findIndex((i) => i.tag === c.instrument));
  const controllerOf = (device: ControlledDevice): number => plant.controllers.findIndex((c) => c.output === device);
  const speedController = controllerOf('pump-speed');
  const coolerController = controllerOf('cooler');
  const flows: PlantFlows = {
    gasSource: 0,
    gasToBed: 0,
    gasDiverted: 0,
    delivery: createStream(K),
    drawn: 0,
    emergency: createStream(K),
    makeUp: createStream(K),
    drain: 0,
    bleed: 0,
    overflow: 0,
    carryOver: 0,
    offered: new Float64Array(beds),
    coolerDuty: 0,
    feedY: new Float64Array(components),
    feedTemperature: gas.feed.temperature,
  };
  const gather = new Float64Array(components + 2); // one stream's fluxes
  let coolerIn = liquid.feed.temperature;

  const level = (): number => sump.volume / liquid.sump.area;

  /** Controller's output of the last `controllerOutputs`. */
  const outputsNow = new Float64Array(plant.controllers.length);
  const errorsNow = new Float64Array(plant.controllers.length);
  const controllerOutputs = (t: number, y: Float64Array): void => {
    for (let i = 0; i < outputsNow.length; i++) {
      const at = instrumentOf[i];
      const instrument = plant.instruments[at];
      const lag = layout.instruments[at];
      const value = lag >= 0 ? y[lag] : coreValue(instrument, y);
      const error = controlError(settings[i], modes.controllers[i].setpoint, signals.shown(at, t, value));
      errorsNow[i] = error;
      outputsNow[i] = modes.controllers[i].automatic
        ? piOutput(settings[i], y[layout.controllers[i]], error)
        : modes.controllers[i].manualOutput;
    }
  };

  const topPressure = (y: Float64Array): number => y[layout.topPressure];
  const bedTopPressure = (y: Float64Array, b: number): number => {
    let p = topPressure(y);
    for (let i = 0; i < b; i++) p += y[layout.pressureDrop[i]];
    return p;
  };

  const gasSupply = (y: Float64Array): void => {
    flows.gasSource = y[layout.gasFlow];
    const diverted = opening(y, layout.valves.diversion);
    flows.gasDiverted = flows.gasSource * diverted;
    flows.gasToBed = flows.gasSource * (1 - diverted) * opening(y, layout.valves['gas-inlet']);
    const T = channels.gasTemperature;
    flows.feedTemperature = T;
    flows.feedY[0] = fluids.isVolatile
      ? (channels.gasHumidity * fluids.vapourPressure(T)) / bedTopPressure(y, beds)
      : 0;
    for (let k = 0; k < K; k++) flows.feedY[k + 1] = channels.gasComposition[k];
  };

  /** Suction: full above the lowest level, nothing below it. */
  const suction = (): number => {
    const low = liquid.pumps.minimumLevel;
    const x = (level() - low) / Math.max(STARVING_BAND * low, 0.01);
    return x <= 0 ? 0 : x >= 1 ? 1 : x * x * (3 - 2 * x);
  };

  const freshLiquid = (stream: LiquidStream, rate: number, T: number, composition: Float64Array): void => {
    stream.rate = rate;
    stream.temperature = T;
    stream.molarVolume = molarVolume(T);
    concentrations(fluids, composition, stream.molarVolume, stream.concentration);
  };

  const liquidSupply = (y: Float64Array): void => {
    const speed = Math.max(y[layout.pumpSpeed[0]], y[layout.pumpSpeed[1]]);
    const idleLeak = 1 - channels.nonReturnValveLeak;
    let rate =
      liquid.feed.rate *
      pumpDelivery(speed, liquid.pumps.staticHeadShare, opening(y, layout.valves.solvent)) *
      idleLeak;
    if (!isRecirculated) {
      freshLiquid(flows.delivery, rate, channels.liquidTemperature, channels.liquidComposition);
    } else {
      rate *= suction();
      flows.drawn = rate;
      coolerIn = sump.temperature;
      let T = coolerIn;
      if (liquid.cooler !== undefined) {
        const demand = coolerController >= 0 ? outputsNow[coolerController] : 1;
        T -= liquid.cooler.effectiveness * channels.cooling * demand * (T - channels.coolantTemperature);
      }
      // The same moles at another temperature take another volume.
      const v0 = molarVolume(T);
      let solutes = 0;
      for (let k = 0; k < K; k++) solutes += sump.concentration[k] * fluids.soluteVolume[k + 1];
      const swell = ((1 - solutes) * v0) / sump.molarVolume + solutes;
      flows.delivery.rate = rate * swell;
      for (let k = 0; k < K; k++) flows.delivery.concentration[k] = sump.concentration[k] / swell;
      flows.delivery.temperature = T;
      flows.delivery.molarVolume = v0;
    }
    if (liquid.emergencyWater !== undefined) {
      const e = liquid.emergencyWater;
      freshLiquid(
        flows.emergency,
        e.rate * opening(y, layout.valves['emergency-water']),
        e.temperature,
        emergencyComposition,
      );
    }
    if (liquid.makeUp !== undefined) {
      const m = liquid.makeUp;
      freshLiquid(
        flows.makeUp,
        m.capacity * opening(y, layout.valves['make-up']),
        channels.makeUpTemperature,
        channels.makeUpComposition,
      );
    }
    const open = gravityOutflow(level() / liquid.sump.normalLevel);
    flows.drain = isRecirculated ? 0 : liquid.sump.drain.capacity * opening(y, layout.valves.drain) * open;
    flows.bleed =
      liquid.bleed === undefined ? 0 : liquid.bleed.capacity * opening(y, layout.valves.bleed) * Math.min(1, open);
    const above = level() - liquid.sump.overflowLevel;
    flows.overflow = above > 0 ? (above * liquid.sump.area) / OVERFLOW_TIME : 0;
  };
  const emergencyComposition = Float64Array.from(liquid.emergencyWater?.composition ?? []);

  const prepare = (t: number, y: Float64Array): void => {
    for (let b = 0; b < beds; b++) {
      if (vesselVolume[b] > 0)
        readVessel(fluids, molarVolume, y, layout.vessel[b], vesselMetal[b], vesselVolume[b], vessels[b]);
    }
    readVessel(fluids, molarVolume, y, layout.sump, sumpMetal, sumpVolume, sump);
    gasSupply(y);
    controllerOutputs(t, y);
    liquidSupply(y);
    for (let b = 0; b < beds; b++) {
      const design = liquid.feed.rate;
      const vessel = vessels[b];
      if (vesselVolume[b] === 0) {
        flows.offered[b] = flows.delivery.rate + flows.emergency.rate;
        vessel.temperature = flows.delivery.temperature;
        vessel.concentration.set(flows.delivery.concentration);
        vessel.molarVolume = flows.delivery.molarVolume;
      } else {
        flows.offered[b] = design * gravityOutflow(vessel.volume / vesselVolume[b]);
      }
      const zones = chains[b];
      const above = bedTopPressure(y, b);
      const plenum = plenums[b + 1];
      plenum?.read(y, layout.plenum[b + 1], bedTopPressure(y, b + 1));
      for (let z = 0; z < zones.length; z++) {
        const u = zones[z].work.inputs;
        const gasShare = zones.length === 1 ? 1 : z === 0 ? y[layout.gasShare[b]] : 1 - y[layout.gasShare[b]];
        const liquidShare = zones.length === 1 ? 1 : z === 0 ? channels.liquidShare : 1 - channels.liquidShare;
        u[ip.liquidFlow] = flows.offered[b] * liquidShare;
        for (let k = 0; k < K; k++) u[ip.concentration + k] = vessel.concentration[k];
        u[ip.TL] = vessel.temperature;
        u[ip.topPressure] = above;
        u[ip.pressureDrop] = y[layout.pressureDrop[b]];
        if (plenum === undefined) {
          u[ip.gasFlow] = flows.gasToBed * gasShare;
          for (let k = 0; k < components; k++) u[ip.y + k] = flows.feedY[k];
          u[ip.TG] = flows.feedTemperature;
        } else {
          for (let k = 0; k < components; k++) u[ip.y + k] = plenum.y[k];
          u[ip.TG] = plenum.temperature;
        }
      }
    }
  };

  /** Mixed output `i` of a bed's zones, weighted by their gas (or liquid) flow; plain mean where nothing flows. */
  const mixed = (b: number, i: number, flowPort: number): number => {
    const zones = chains[b];
    if (zones.length === 1) return zones[0].work.outputs[i];
    let sum = 0;
    let weight = 0;
    for (let z = 0; z < zones.length; z++) {
      const o = zones[z].work.outputs;
      const w = Math.abs(o[flowPort]) + 1e-12 * zoneShares[z];
      sum += w * o[i];
      weight += w;
    }
    return sum / weight;
  };
  const summed = (b: number, i: number): number => {
    let sum = 0;
    for (const chain of chains[b]) sum += chain.work.outputs[i];
    return sum;
  };
  const bedDrop = (b: number): number => {
    const zones = chains[b];
    let sum = 0;
    for (let z = 0; z < zones.length; z++) sum += zoneShares[z] * zones[z].work.outputs[op.pressureDrop];
    return sum;
  };

  /** Adds a chain's gas outflow (components, carrier, enthalpy) to `gather`. */
  const gatherGas = (chain: Chain): void => {
    const o = chain.work.outputs;
    const G = o[op.gasFlow];
    const theta = o[op.TG] - DATUM_TEMPERATURE;
    let inert = 1;
    let h = 0;
    for (let k = 0; k < components; k++) {
      const yk = o[op.y + k];
      inert -= yk;
      gather[k] += G * yk;
      h += yk * (fluids.vaporisation[k] + fluids.vapourHeat[k] * theta);
    }
    gather[components] += G * (h + inert * fluids.carrierHeat * theta);
    gather[components + 1] += G * inert;
  };

  const bottomStream: LiquidStream = createStream(K);
  const bottomOf = (chain: Chain): LiquidStream => {
    const o = chain.work.outputs;
    bottomStream.rate = o[op.liquidFlow];
    bottomStream.temperature = o[op.TL];
    bottomStream.molarVolume = o[op.molarVolume];
    for (let k = 0; k < K; k++) bottomStream.concentration[k] = o[op.concentration + k];
    return bottomStream;
  };
  const outStream: LiquidStream = createStream(K);
  const fromVessel = (vessel: VesselState, rate: number): LiquidStream => {
    outStream.rate = rate;
    outStream.temperature = vessel.temperature;
    outStream.molarVolume = vessel.molarVolume;
    outStream.concentration.set(vessel.concentration);
    return outStream;
  };

  const valveController = {
    solvent: controllerOf('solvent-valve'),
    drain: controllerOf('drain'),
    'make-up': controllerOf('make-up'),
    bleed: controllerOf('bleed'),
    'gas-damper': controllerOf('gas-damper'),
  };

  const valveRates = (y: Float64Array, dydt: Float64Array): void => {
    const move = (name: keyof typeof layout.valves, stroke: number, controller: number): void => {
      const at = layout.valves[name];
      if (modes.valveStuck[name]) {
        dydt[at] = 0;
        return;
      }
      const target = controller >= 0 ? outputsNow[controller] : modes.valveCommand[name];
      dydt[at] = (STROKE_LAGS * (target - y[at])) / Math.max(stroke, LEAST_LAG);
    };
    move('solvent', liquid.valve.stroke, valveController.solvent);
    move('drain', liquid.sump.drain.stroke, valveController.drain);
    move('gas-inlet', gas.inletValve.stroke, -1);
    move('diversion', gas.diversion?.stroke ?? 1, -1);
    move('make-up', liquid.makeUp?.stroke ?? 1, valveController['make-up']);
    move('bleed', liquid.bleed?.stroke ?? 1, valveController.bleed);
    move('emergency-water', liquid.emergencyWater?.stroke ?? 1, -1);
    move('gas-damper', gas.inletValve.stroke, valveController['gas-damper']);
  };

  const gasRates = (y: Float64Array, dydt: Float64Array): void => {
    const damper = opening(y, layout.valves['gas-damper']);
    const { source } = gas;
    if (source.kind === 'forced') {
      dydt[layout.gasFlow] = (channels.gasRate * damper - y[layout.gasFlow]) / Math.max(source.lag, LEAST_LAG);
      dydt[layout.fanSpeed] = 0;
      return;
    }
    let drop = 0;
    for (let b = 0; b < beds; b++) drop += y[layout.pressureDrop[b]];
    const speed = y[layout.fanSpeed];
    const Q = fanFlow(source, speed, drop, self.ductResistance, damper);
    const pressure = topPressure(y) + drop;
    const target = ((Q * pressure) / (GAS_CONSTANT * channels.gasTemperature)) * (channels.gasRate / gas.feed.rate);
    dydt[layout.gasFlow] = (target - y[layout.gasFlow]) / Math.max(source.lag, LEAST_LAG);
    dydt[layout.fanSpeed] = speedRate(
      speed,
      1,
      modes.fanRunning,
      Math.max(source.coastDown, LEAST_LAG),
      Math.max(source.runUp, LEAST_LAG),
    );
  };

  const pumpRates = (y: Float64Array, dydt: Float64Array): void => {
    const target = speedController >= 0 ? outputsNow[speedController] : channels.pumpSpeed;
    const coastDown = Math.max(liquid.pumps.coastDown, LEAST_LAG);
    const runUp = Math.max(liquid.pumps.runUp, LEAST_LAG);
    for (let i = 0; i < 2; i++) {
      const at = layout.pumpSpeed[i];
      dydt[at] = speedRate(y[at], target, modes.pumpRunning[i], coastDown, runUp);
    }
  };

  const vesselRates = (y: Float64Array, dydt: Float64Array): void => {
    for (let b = 0; b < beds; b++) {
      const at = layout.vessel[b];
      for (let k = 0; k <= components; k++) dydt[at + k] = 0;
      if (vesselVolume[b] === 0) continue;
      if (b === 0) {
        addStream(fluids, flows.delivery, 1, dydt, at);
        addStream(fluids, flows.emergency, 1, dydt, at);
        addStream(fluids, fromVessel(vessels[0], flows.offered[0]), -1, dydt, at);
      } else {
        for (const chain of chains[b - 1]) addStream(fluids, bottomOf(chain), 1, dydt, at);
        addStream(fluids, fromVessel(vessels[b], summed(b, op.accepted)), -1, dydt, at);
      }
    }
    const at = layout.sump;
    for (let k = 0; k <= components; k++) dydt[at + k] = 0;
    for (const chain of chains[beds - 1]) addStream(fluids, bottomOf(chain), 1, dydt, at);
    addStream(fluids, fromVessel(sump, flows.drain + flows.bleed + flows.overflow + flows.drawn), -1, dydt, at);
    if (liquid.makeUp !== undefined) addStream(fluids, flows.makeUp, 1, dydt, at);
  };

  const plenumRates = (dydt: Float64Array): void => {
    for (let b = 1; b < beds; b++) {
      const plenum = plenums[b];
      if (plenum === undefined) continue;
      gather.fill(0);
      for (const chain of chains[b]) gatherGas(chain);
      let out = 0;
      for (const chain of chains[b - 1]) out += chain.work.inputs[ip.gasFlow];
      plenum.rates(gather, out, dydt, layout.plenum[b]);
    }
  };

  const instrumentRates = (y: Float64Array, dydt: Float64Array): void => {
    for (let i = 0; i < plant.instruments.length; i++) {
      const at = layout.instruments[i];
      if (at < 0) continue;
      const instrument = plant.instruments[i];
      dydt[at] = (trueValue(instrument, y) - y[at]) / instrument.lag;
    }
  };

  const accumulate = (dydt: Float64Array): void => {
    const { netIn, grossIn, stack, diverted } = layout;
    for (let k = 0; k < layout.accumulatorSize; k++) dydt[layout.accumulatorFirst + k] = 0;
    // Gas in.
    const G = flows.gasToBed;
    const theta = flows.feedTemperature - DATUM_TEMPERATURE;
    let inert = 1;
    let h = 0;
    for (let k = 0; k < components; k++) {
      const yk = flows.feedY[k];
      inert -= yk;
      dydt[grossIn + k] += G * yk;
      dydt[diverted + k] = flows.gasDiverted * yk;
      h += yk * (fluids.vaporisation[k] + fluids.vapourHeat[k] * theta);
    }
    const E = components; // offsets after the components: carrier, energy
    const carrier = netIn + E;
    const energy = netIn + E + 1;
    dydt[grossIn + E] = G * inert;
    const gasEnthalpy = G * (h + inert * fluids.carrierHeat * theta);
    // Liquid in, gathered with its enthalpy at index K + 1.
    gather.fill(0);
    if (!isRecirculated) addStream(fluids, flows.delivery, 1, gather, 0);
    if (liquid.emergencyWater !== undefined) addStream(fluids, flows.emergency, 1, gather, 0);
    if (liquid.makeUp !== undefined) addStream(fluids, flows.makeUp, 1, gather, 0);
    for (let k = 0; k < components; k++) dydt[grossIn + k] += gather[k];
    dydt[grossIn + E + 1] = Math.abs(gasEnthalpy) + Math.abs(gather[components]);
    for (let k = 0; k < components; k++) dydt[netIn + k] = dydt[grossIn + k];
    dydt[carrier] = dydt[grossIn + E];
    dydt[energy] = gasEnthalpy + gather[components];
    // Gas out at the top.
    gather.fill(0);
    for (const chain of chains[0]) gatherGas(chain);
    for (let k = 0; k < components; k++) {
      dydt[stack + k] = gather[k];
      dydt[netIn + k] -= gather[k];
    }
    dydt[carrier] -= gather[components + 1];
    dydt[energy] -= gather[components];
    // Liquid out, carried over, heat lost.
    gather.fill(0);
    addStream(fluids, fromVessel(sump, flows.drain + flows.bleed + flows.overflow), 1, gather, 0);
    // Not negative, since a chain accepts at most what is offered; no bound here, so that slopes stay exact.
    flows.carryOver = flows.offered[0] - summed(0, op.accepted);
    addStream(fluids, fromVessel(vessels[0], flows.carryOver), 1, gather, 0);
    if (isRecirculated) coolerHeat();
    for (let k = 0; k < components; k++) dydt[netIn + k] -= gather[k];
    dydt[energy] -= gather[components] + flows.coolerDuty;
    for (let b = 0; b < beds; b++) dydt[energy] -= summed(b, op.heatLoss);
    dydt[layout.carryOver] = flows.carryOver;
  };

  /** Heat that the cooler takes: enthalpy of the circulating liquid before less after. */
  const coolerHeat = (): void => {
    const before = flows.delivery.temperature;
    // The same moles leave the sump at its temperature and reach the distributor colder.
    let capacityFlow = 0;
    let free = 1;
    for (let k = 1; k < components; k++) {
      const c = flows.delivery.concentration[k - 1];
      free -= c * fluids.soluteVolume[k];
      capacityFlow += c * fluids.liquidHeat[k];
    }
    capacityFlow += (free / flows.delivery.molarVolume) * fluids.liquidHeat[0];
    flows.coolerDuty = flows.delivery.rate * capacityFlow * (coolerIn - before);
  };

  /** Quantities that controllers read without a lag come from the core alone, before the chains are evaluated. */
  const coreValue = (instrument: Instrument, y: Float64Array): number => {
    const { quantity } = instrument.measured;
    if (quantity === 'sump-level') return level();
    if (quantity === 'sump-temperature') return sump.temperature;
    if (quantity === 'gas-flow') return flows.gasToBed;
    if (quantity === 'liquid-flow') return flows.delivery.rate;
    return trueValue(instrument, y);
  };

  const liquidFraction = (vessel: { concentration: Float64Array; molarVolume: number }, k: number): number => {
    let free = 1;
    let sum = 0;
    for (let i = 0; i < K; i++) {
      free -= vessel.concentration[i] * fluids.soluteVolume[i + 1];
      sum += vessel.concentration[i];
    }
    return vessel.concentration[k] / (sum + free / vessel.molarVolume);
  };

  const trueValue = (instrument: Instrument, y: Float64Array): number => {
    const { measured } = instrument;
    const last = beds - 1;
    switch (measured.quantity) {
      case 'gas-outlet':
        return mixed(0, op.y + 1 + measured.solute, op.gasFlow);
      case 'gas-inlet':
        return flows.feedY[measured.solute + 1];
      case 'liquid-outlet': {
        for (let k = 0; k < K; k++) bottomStream.concentration[k] = mixed(last, op.concentration + k, op.liquidFlow);
        bottomStream.molarVolume = mixed(last, op.molarVolume, op.liquidFlow);
        return liquidFraction(bottomStream, measured.solute);
      }
      case 'sump-strength':
        return liquidFraction(sump, measured.solute);
      case 'bed-dp': {
        let sum = 0;
        for (let b = 0; b < beds; b++) sum += bedDrop(b);
        return sum;
      }
      case 'liquid-flow':
        return flows.delivery.rate;
      case 'gas-flow':
        return flows.gasToBed;
      case 'sump-level':
        return level();
      case 'sump-temperature':
        return sump.temperature;
      case 'liquid-inlet-temperature':
        return flows.delivery.temperature;
      case 'gas-outlet-temperature':
        return mixed(0, op.TG, op.gasFlow);
      case 'gas-inlet-temperature':
        return flows.feedTemperature;
      case 'liquid-outlet-temperature':
        return mixed(last, op.TL, op.liquidFlow);
      case 'distributor-volume':
        return vessels[0].volume;
      case 'carry-over':
        return flows.offered[0] - summed(0, op.accepted);
      case 'pump-speed':
        return Math.max(y[layout.pumpSpeed[0]], y[layout.pumpSpeed[1]]);
      case 'make-up-flow':
        return flows.makeUp.rate;
      case 'bleed-flow':
        return flows.bleed;
      case 'holdup': {
        let held = 0;
        let volume = 0;
        for (let b = 0; b < beds; b++) {
          held += summed(b, op.liquidHeld);
          volume += 0.25 * Math.PI * column.diameter ** 2 * column.beds[b].height;
        }
        return held / volume;
      }
      case 'flood-approach':
        return Number.NaN; // found by the recorder, not part of the state
    }
  };

  const rates = (y: Float64Array, dydt: Float64Array): void => {
    vesselRates(y, dydt);
    plenumRates(dydt);
    for (let b = 0; b < beds; b++) {
      dydt[layout.pressureDrop[b]] = (bedDrop(b) - y[layout.pressureDrop[b]]) / PRESSURE_LAG;
      if (layout.gasShare[b] >= 0) {
        const [zone0, zone1] = chains[b];
        const d0 = zone0.work.outputs[op.pressureDrop];
        const d1 = zone1.work.outputs[op.pressureDrop];
        dydt[layout.gasShare[b]] =
          (y[layout.gasShare[b]] * (1 - y[layout.gasShare[b]]) * (d1 - d0)) / ((d0 + d1 + 1) * SPLIT_LAG);
      }
    }
    dydt[layout.topPressure] = (channels.topPressure - y[layout.topPressure]) / PRESSURE_LAG;
    gasRates(y, dydt);
    pumpRates(y, dydt);
    valveRates(y, dydt);
    for (let i = 0; i < plant.controllers.length; i++) {
      const mode = modes.controllers[i];
      dydt[layout.controllers[i]] = integralRate(
        settings[i],
        y[layout.controllers[i]],
        errorsNow[i],
        mode.automatic,
        mode.manualOutput,
      );
    }
    instrumentRates(y, dydt);
    accumulate(dydt);
  };

  const self: Plant = {
    flows,
    vessels,
    sump,
    sumpLevel: level,
    prepare,
    rates,
    plenums,
    vesselVolume,
    vesselMetal,
    sumpVolume,
    sumpMetal,
    molarVolume,
    ductResistance: 0,
    trueValue,
    passThrough,
  };
  return self;
}
