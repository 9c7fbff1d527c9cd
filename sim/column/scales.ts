/** Typical magnitudes of the states: the scale of absolute tolerances and of differences. */
import type { Case } from '../case/case.ts';
import type { Chain } from './chain.ts';
import { TABLE_PRESSURE, type Fluids } from './fluids.ts';
import type { Layout } from './layout.ts';
import type { Plant } from './plant.ts';
import { GAS_CONSTANT } from '../properties/constants.ts';

/** Typical hold-up, m3/m3, and temperature span, K, that scale a cell's inventory. */
const TYPICAL_HOLDUP = 0.05;
const TYPICAL_SPAN = 20;

/**
 * @returns One positive magnitude for each state. Solutes scale with the feed's strength and what the liquid holds at
 *   balance with a tenth of it; accumulators scale with hours of feed and carry no error weight.
 */
export function stateScales(
  plant: Case,
  layout: Layout,
  fluids: Fluids,
  machinery: Plant,
  chains: readonly (readonly Chain[])[],
): Float64Array {
  const scale = new Float64Array(layout.size).fill(1);
  const { components, block } = layout;
  const T = fluids.meanTemperature;
  const perVolume = fluids.solventDensity(T) / fluids.molarMass[0];
  const gasFraction = (k: number): number => {
    if (k === 0) return Math.max(fluids.isVolatile ? fluids.vapourPressure(T) / plant.column.topPressure : 0, 1e-6);
    return Math.max(plant.gas.feed.composition[k - 1], 0.01 * liquidBalance(k), 1e-12);
  };
  /** Gas fraction in balance with the liquid feed. */
  const liquidBalance = (k: number): number => {
    const e = fluids.equilibrium[k - 1];
    const x = plant.liquid.feed.composition[k - 1];
    return e.kind === 'ratio' ? e.pressureScale(T) * x : e.partialPressure(T, x) / plant.column.topPressure;
  };
  const liquidFraction = (k: number): number => {
    const e = fluids.equilibrium[k - 1];
    const slope = e.kind === 'ratio' ? e.pressureScale(T) : e.slope(T, 0) / plant.column.topPressure;
    const fromGas = Math.min(
      plant.gas.feed.composition[k - 1] / Math.max(slope, 1e-12),
      (plant.gas.feed.composition[k - 1] * plant.gas.feed.rate) / (plant.liquid.feed.rate * perVolume),
    );
    return Math.max(fromGas, plant.liquid.feed.composition[k - 1], 1e-14);
  };
  for (const zones of chains) {
    for (const chain of zones) {
      const { cell, layout: at } = chain;
      const volume = cell.crossSection * cell.height;
      const liquidMoles = volume * TYPICAL_HOLDUP * perVolume;
      const gasMoles = (plant.column.topPressure * cell.voidVolume) / (GAS_CONSTANT * T);
      for (let c = 0; c < at.cells; c++) {
        const o = at.first + c * block;
        scale[o] = liquidMoles;
        for (let k = 1; k < components; k++) scale[o + k] = liquidMoles * liquidFraction(k);
        scale[o + components] = (liquidMoles * fluids.liquidHeat[0] + cell.packingHeat) * TYPICAL_SPAN;
        const g = o + components + 1;
        for (let k = 0; k < components; k++) scale[g + k] = gasMoles * gasFraction(k);
        scale[g + components] =
          gasMoles * (fluids.carrierHeat * TYPICAL_SPAN + gasFraction(0) * Math.abs(fluids.vaporisation[0]));
      }
    }
  }
  const vessel = (at: number, volume: number, metal: number): void => {
    const moles = Math.max(volume, 1e-6) * perVolume;
    scale[at] = moles;
    for (let k = 1; k < components; k++) scale[at + k] = moles * liquidFraction(k);
    scale[at + components] = (moles * fluids.liquidHeat[0] + metal) * TYPICAL_SPAN;
  };
  layout.vessel.forEach((at, b) => {
    vessel(at, machinery.vesselVolume[b], machinery.vesselMetal[b]);
  });
  vessel(layout.sump, machinery.sumpVolume, machinery.sumpMetal);
  layout.plenum.forEach((at, b) => {
    const plenum = machinery.plenums[b];
    if (at < 0 || plenum === undefined) return;
    const moles = (plant.column.topPressure * plenum.volume) / (GAS_CONSTANT * T);
    for (let k = 0; k < components; k++) scale[at + k] = moles * gasFraction(k);
    scale[at + components] = moles * fluids.carrierHeat * TYPICAL_SPAN;
  });
  for (const at of layout.pressureDrop) scale[at] = Math.max(1e-3 * plant.column.topPressure, 1);
  scale[layout.topPressure] = Math.min(plant.column.topPressure, TABLE_PRESSURE);
  scale[layout.gasFlow] = plant.gas.feed.rate;
  plant.instruments.forEach((instrument, i) => {
    const at = layout.instruments[i];
    if (at >= 0) scale[at] = instrumentScale(plant, instrument.measured);
  });
  const hours = 3600;
  for (let k = 0; k < components; k++) {
    const flow = k === 0 ? plant.liquid.feed.rate * perVolume : plant.gas.feed.rate * gasFraction(k);
    for (const group of [layout.netIn, layout.grossIn, layout.stack, layout.diverted]) {
      scale[group + k] = flow * hours;
    }
  }
  const heatFlow =
    plant.gas.feed.rate * fluids.carrierHeat * TYPICAL_SPAN +
    plant.liquid.feed.rate * perVolume * fluids.liquidHeat[0] * TYPICAL_SPAN;
  for (const group of [layout.netIn, layout.grossIn]) {
    scale[group + components] = plant.gas.feed.rate * hours;
    scale[group + components + 1] = heatFlow * hours;
  }
  return scale;
}

function instrumentScale(plant: Case, measured: Case['instruments'][number]['measured']): number {
  const { gas, liquid, column } = plant;
  switch (measured.quantity) {
    case 'gas-outlet':
    case 'gas-inlet':
      return Math.max(gas.feed.composition[measured.solute], 1e-9);
    case 'liquid-outlet':
    case 'sump-strength':
      return Math.max(liquid.feed.composition[measured.solute], 1e-6);
    case 'bed-dp':
      return Math.max(1e-3 * column.topPressure, 1);
    case 'liquid-flow':
    case 'carry-over':
    case 'make-up-flow':
    case 'bleed-flow':
      return liquid.feed.rate;
    case 'gas-flow':
      return gas.feed.rate;
    case 'sump-level':
      return liquid.sump.normalLevel;
    case 'distributor-volume':
      return Math.max(liquid.distributorVolume, 1e-6);
    case 'holdup':
      return TYPICAL_HOLDUP;
    case 'pump-speed':
    case 'flood-approach':
      return 1;
    case 'sump-temperature':
    case 'liquid-inlet-temperature':
    case 'liquid-outlet-temperature':
    case 'gas-inlet-temperature':
    case 'gas-outlet-temperature':
      return TYPICAL_SPAN;
  }
}
