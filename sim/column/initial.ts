/** First states: a column filled with given liquid and gas, cell by cell; the steady state is found from there. */
import { GAS_CONSTANT } from '../properties/constants.ts';
import type { Chain } from './chain.ts';
import type { Column } from './column.ts';
import { DATUM_TEMPERATURE, type Fluids } from './fluids.ts';
import { fillVessel, gravityVolume } from './vessel.ts';

/** What a cell is filled with. */
interface CellFill {
  /** m3/m3 */ readonly holdup: number;
  /** K */ readonly TL: number;
  /** Mole fractions of the solutes in the liquid. */ readonly x: Float64Array;
  /** K */ readonly TG: number;
  /** Mole fractions in the gas, k = 0..K. */ readonly y: Float64Array;
  /** Pa */ readonly pressure: number;
}

/** Writes one cell's states. */
function fillCell(
  fluids: Fluids,
  chain: Chain,
  molarVolume: (T: number) => number,
  block: number,
  c: number,
  fill: CellFill,
  y: Float64Array,
): void {
  const { components, liquidHeat, soluteVolume, vapourHeat, vaporisation, carrierHeat } = fluids;
  const { cell, layout } = chain;
  const at = layout.first + c * block;
  const volume = cell.crossSection * cell.height * fill.holdup;
  const v0 = molarVolume(fill.TL);
  let solvent = 1;
  let perMole = 0;
  for (let k = 1; k < components; k++) {
    solvent -= fill.x[k - 1];
    perMole += fill.x[k - 1] * soluteVolume[k];
  }
  const moles = volume / (solvent * v0 + perMole);
  let capacity = cell.packingHeat;
  for (let k = 0; k < components; k++) {
    y[at + k] = moles * (k === 0 ? solvent : fill.x[k - 1]);
    capacity += y[at + k] * liquidHeat[k];
  }
  y[at + components] = capacity * (fill.TL - DATUM_TEMPERATURE);
  const gasMoles = (fill.pressure * (cell.voidVolume - volume)) / (GAS_CONSTANT * fill.TG);
  const theta = fill.TG - DATUM_TEMPERATURE;
  let inert = 1;
  let h = 0;
  for (let k = 0; k < components; k++) {
    y[at + components + 1 + k] = gasMoles * fill.y[k];
    inert -= fill.y[k];
    h += fill.y[k] * (vaporisation[k] + vapourHeat[k] * theta);
  }
  y[at + 2 * components + 1] = gasMoles * (h + inert * carrierHeat * theta);
}

/** Gas in the column before anything runs: carrier with ambient moisture. */
function restingGas(column: Column, temperature: number, humidity: number): Float64Array {
  const { fluids, plant } = column;
  const y = new Float64Array(fluids.components);
  if (fluids.isVolatile) y[0] = (humidity * fluids.vapourPressure(temperature)) / plant.column.topPressure;
  return y;
}

/** Fills every instrument's lag with its true value. */
export function settleInstruments(column: Column, y: Float64Array): void {
  const { layout, plant, machinery } = column;
  const rates = new Float64Array(layout.size);
  column.rhs(0, y, rates);
  plant.instruments.forEach((instrument, i) => {
    const at = layout.instruments[i];
    if (at >= 0) y[at] = machinery.trueValue(instrument, y);
  });
}

/** How the machines stand at the start. */
export interface StartingState {
  /** Liquid runs, gas runs. */
  readonly liquidOn: boolean;
  readonly gasOn: boolean;
  /** Hold-up to begin with, m3/m3 (steady search: a guess). */ readonly holdup: number;
}

/**
 * Writes a whole state: beds at one temperature and hold-up, vessels at their design levels (empty distributor when the
 * liquid is off), machines at rest or at speed, valves and controllers where the modes put them.
 */
export function fillColumn(column: Column, start: StartingState, y: Float64Array): void {
  const { plant, layout, fluids, machinery, modes } = column;
  const { liquid, gas } = plant;
  y.fill(0);
  const cold = plant.column.ambientTemperature;
  const TL = plant.column.isothermal || start.liquidOn ? liquid.feed.temperature : cold;
  const TG = plant.column.isothermal || start.gasOn ? gas.feed.temperature : TL;
  const x = Float64Array.from(liquid.feed.composition);
  const yGas = restingGas(column, TG, start.gasOn ? gas.feed.humidity : Math.min(gas.feed.humidity, 0.5));
  if (start.gasOn) for (let k = 1; k < yGas.length; k++) yGas[k] = gas.feed.composition[k - 1];
  const topPressure = modes.channels.topPressure;
  const { hydraulics } = plant.column;
  const holdup = hydraulics.model === 'prescribed' ? hydraulics.holdup : start.holdup;
  for (const zones of column.chains) {
    for (const chain of zones) {
      for (let c = 0; c < chain.layout.cells; c++) {
        fillCell(
          fluids,
          chain,
          machinery.molarVolume,
          layout.block,
          c,
          { holdup, TL, x, TG, y: yGas, pressure: topPressure },
          y,
        );
      }
    }
  }
  layout.vessel.forEach((at, b) => {
    const normal = machinery.vesselVolume[b];
    if (normal > 0) {
      const volume = start.liquidOn ? normal * gravityVolume(1) : 0;
      fillVessel(fluids, machinery.molarVolume, y, at, machinery.vesselMetal[b], volume, TL, x);
    }
  });
  layout.plenum.forEach((at, b) => {
    machinery.plenums[b]?.fill(y, at, topPressure, TG, yGas);
  });
  fillVessel(fluids, machinery.molarVolume, y, layout.sump, machinery.sumpMetal, machinery.sumpVolume, TL, x);
  y[layout.topPressure] = topPressure;
  layout.gasShare.forEach((at) => {
    if (at >= 0) y[at] = plant.column.distribution?.areaShare ?? 1;
  });
  y[layout.gasFlow] = start.gasOn ? modes.channels.gasRate : 0;
  y[layout.fanSpeed] = start.gasOn && modes.fanRunning ? 1 : 0;
  y[layout.pumpSpeed[0]] = modes.pumpRunning[0] ? modes.channels.pumpSpeed : 0;
  y[layout.pumpSpeed[1]] = modes.pumpRunning[1] ? modes.channels.pumpSpeed : 0;
  for (const name of Object.keys(layout.valves) as (keyof typeof layout.valves)[])
    y[layout.valves[name]] = modes.valveCommand[name];
  plant.controllers.forEach((controller, i) => {
    y[layout.controllers[i]] = controller.manualOutput;
    const valve = controller.output === 'solvent-valve' ? 'solvent' : controller.output;
    if (valve in layout.valves) y[layout.valves[valve as keyof typeof layout.valves]] = controller.manualOutput;
  });
  settleInstruments(column, y);
}
