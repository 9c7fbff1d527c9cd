/**
 * The whole column as an initial-value problem: chains of cells, the plant around them, and the order of evaluation.
 * Knows no integrator; implements the interface that integrators ask for.
 */
import type { Case } from '../case/case.ts';
import { createHermiteTable, readHermiteColumn } from '../numerics/hermite-table.ts';
import type { IvpProblem } from '../numerics/ivp/problem.ts';
import type { ShiftedSolver } from '../numerics/shifted-solver.ts';
import { createBorderedSolver } from './bordered-solver.ts';
import { createCell } from './cell.ts';
import { chainSettings, createChain, type Chain } from './chain.ts';
import { createColumnJacobian } from './column-jacobian.ts';
import { leafStates } from './column-pattern.ts';
import { createFluids, LIQUID_SOLUTE, SOLUTE_COLUMNS, type Fluids } from './fluids.ts';
import { createLayout, type Layout } from './layout.ts';
import { designModes, type PlantModes } from './modes.ts';
import { createPlant, PRESSURE_LAG, type Plant, type ShownValues } from './plant.ts';
import { inputPorts, outputPorts, type InputPorts, type OutputPorts } from './ports.ts';
import { primitivesFor, type Primitives } from './primitives.ts';
import { stateScales } from './scales.ts';

/** Span and spacing of the solvent's molar volume table, K: wide enough for any temperature a solver strays to. */
const VOLUME_TABLE = { lower: 233.15, upper: 433.15, intervals: 160 };

/** Sets the channels (and nothing else) to their values at a time. */
type ChannelSetter = (t: number) => void;

export interface Column extends IvpProblem {
  readonly plant: Case;
  readonly layout: Layout;
  readonly fluids: Fluids;
  readonly modes: PlantModes;
  readonly machinery: Plant;
  /** By bed, then zone. */ readonly chains: readonly (readonly Chain[])[];
  readonly index: Primitives;
  readonly inputs: InputPorts;
  readonly outputs: OutputPorts;
  /** Typical magnitude of each state, for tolerances and differences. */ readonly scales: Float64Array;
  /** The Jacobian where the column has just been evaluated; saves one evaluation. */
  jacobianHere(t: number, y: Float64Array, values: Float64Array): void;
  /** Makes the linear solver that fits the structure. */
  createSolver(): ShiftedSolver;
  /** Replaces what moves the channels; `varies` says whether they depend on time in the present piece. */
  setChannels(setter: ChannelSetter, varies: boolean): void;
  /** Calls of the right-hand side so far. */ readonly calls: { rhs: number };
}

/** What the column asks of the outside: how instruments show. */
export interface ColumnOptions {
  readonly signals?: ShownValues;
}

const plainSignals: ShownValues = { shown: (_i, _t, value) => value };

/** Builds the column of a case. */
export function createColumn(plant: Case, options: ColumnOptions = {}): Column {
  const layout = createLayout(plant);
  const fluids = createFluids(plant);
  const index = primitivesFor(layout.solutes, LIQUID_SOLUTE + SOLUTE_COLUMNS * layout.solutes);
  const inputs = inputPorts(layout.solutes);
  const outputs = outputPorts(layout.solutes);
  const modes = designModes(plant);
  const M0 = plant.solvent.molarMass;
  const volumeTable = createHermiteTable(
    [(T: number): number => M0 / fluids.solventDensity(T)],
    VOLUME_TABLE.lower,
    VOLUME_TABLE.upper,
    VOLUME_TABLE.intervals,
  );
  const settings = chainSettings(plant);
  const { distribution } = plant.column;
  const chains: Chain[][] = plant.column.beds.map(() => []);
  for (const chain of layout.chains) {
    const share =
      distribution === undefined ? 1 : chain.zone === 0 ? distribution.areaShare : 1 - distribution.areaShare;
    const cell = createCell(plant, fluids, plant.column.beds[chain.bed], share, index);
    chains[chain.bed].push(
      createChain({ ...settings, layout: chain, cell, fluids, index, inputs, outputs, molarVolume: volumeTable }),
    );
  }
  const machinery = createPlant({
    plant,
    layout,
    fluids,
    chains,
    inputs,
    outputs,
    molarVolumeTable: volumeTable,
    modes,
    signals: options.signals ?? plainSignals,
  });
  const beds = chains.length;
  const { components } = layout;
  const gather = new Float64Array(components + 2);
  let setter: ChannelSetter = () => undefined;
  let varies = false;
  const calls = { rhs: 0 };

  const setConditions = (): void => {
    const { channels } = modes;
    for (const zones of chains) {
      for (const chain of zones) {
        const c = chain.cell.conditions;
        c.fouling = channels.fouling;
        c.foaming = channels.foaming;
        c.ambient = channels.ambientTemperature;
      }
    }
  };

  /** Inputs of all chains and the first sweep, bottom bed first. */
  const evaluateCells = (t: number, y: Float64Array): void => {
    setter(t);
    setConditions();
    machinery.prepare(t, y);
    for (let b = beds - 1; b >= 0; b--) {
      if (b < beds - 1) {
        let flow = 0;
        for (const chain of chains[b + 1]) flow += chain.work.topFlow;
        shareGas(y, b, flow);
      }
      for (const chain of chains[b]) chain.evaluateCells(y);
    }
  };

  const shareGas = (y: Float64Array, b: number, flow: number): void => {
    const zones = chains[b];
    for (let z = 0; z < zones.length; z++) {
      const share = zones.length === 1 ? 1 : z === 0 ? y[layout.gasShare[b]] : 1 - y[layout.gasShare[b]];
      zones[z].work.inputs[inputs.gasFlow] = flow * share;
    }
  };

  const setPressureRates = (y: Float64Array): void => {
    const topRate = (modes.channels.topPressure - y[layout.topPressure]) / PRESSURE_LAG;
    let above = topRate;
    for (let b = 0; b < beds; b++) {
      let drop = 0;
      const zones = chains[b];
      for (let z = 0; z < zones.length; z++) {
        const share = distribution === undefined ? 1 : z === 0 ? distribution.areaShare : 1 - distribution.areaShare;
        drop += share * zones[z].work.outputs[outputs.pressureDrop];
      }
      const rate = (drop - y[layout.pressureDrop[b]]) / PRESSURE_LAG;
      for (const chain of zones) {
        chain.work.inputs[inputs.topPressureRate] = above;
        chain.work.inputs[inputs.pressureDropRate] = rate;
      }
      above += rate;
    }
  };

  /** Gas outflow of bed `b + 1` into the space under bed b, then the space's own outflow with its storage. */
  const passGas = (y: Float64Array, b: number): void => {
    const plenum = machinery.plenums[b + 1];
    if (plenum === undefined) return;
    gather.fill(0);
    for (const chain of chains[b + 1]) {
      const o = chain.work.outputs;
      const G = o[outputs.gasFlow];
      const theta = o[outputs.TG] - 273.15;
      let inert = 1;
      let h = 0;
      for (let k = 0; k < components; k++) {
        const yk = o[outputs.y + k];
        inert -= yk;
        gather[k] += G * yk;
        h += yk * (fluids.vaporisation[k] + fluids.vapourHeat[k] * theta);
      }
      gather[components] += G * (h + inert * fluids.carrierHeat * theta);
      gather[components + 1] += G * inert;
    }
    const rate = chains[b + 1][0].work.inputs[inputs.topPressureRate];
    shareGas(y, b, plenum.outflow(gather, rate));
  };

  const rhs = (t: number, y: Float64Array, dydt: Float64Array): void => {
    calls.rhs += 1;
    evaluateCells(t, y);
    setPressureRates(y);
    for (let b = beds - 1; b >= 0; b--) {
      passGas(y, b);
      for (const chain of chains[b]) chain.balance(y, dydt);
    }
    machinery.rates(y, dydt);
  };

  const base = new Float64Array(layout.size);
  const scales = stateScales(plant, layout, fluids, machinery, chains);
  const jacobian = createColumnJacobian({
    plant,
    layout,
    fluids,
    chains,
    machinery,
    index,
    inputs,
    outputs,
    molarVolume: (T) => readHermiteColumn(volumeTable, 0, T),
    scales,
  });
  return {
    plant,
    layout,
    fluids,
    modes,
    machinery,
    chains,
    index,
    inputs,
    outputs,
    scales,
    calls,
    size: layout.size,
    auxiliary: layout.auxiliary,
    pattern: jacobian.pattern,
    rhs,
    jacobian(t, y, values) {
      rhs(t, y, base);
      jacobian.fill(t, y, values);
    },
    jacobianHere: jacobian.fill,
    timeDerivative(t, y, out) {
      if (!varies) return false;
      const h = 1e-6 * Math.max(1, Math.abs(t));
      rhs(t, y, base);
      rhs(t + h, y, out);
      for (let i = 0; i < out.length; i++) out[i] = (out[i] - base[i]) / h;
      setter(t);
      return true;
    },
    createSolver: () => createBorderedSolver(jacobian.pattern, layout, leafStates(plant, layout)),
    setChannels(next, isVarying) {
      setter = next;
      varies = isVarying;
    },
  };
}
