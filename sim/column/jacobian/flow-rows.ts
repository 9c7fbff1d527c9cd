/**
 * Rows of the auxiliary gas flows. Through face f, out of cell f:
 *   0 = [G_in - transfer - displaced + n X/(T C)] - G_out (1 + n phi/(T C)),
 * as `chain.ts` has it. The slopes of n/(T C) itself act on the small storage term only and are left out, as are those
 * of the mixture's heat capacity and the thermal expansion of the liquid that takes gas space.
 */
import type { Chain } from '../chain.ts';
import { PRESSURE_LAG } from '../plant.ts';
import { FACE_PARTS, INLET, type FaceSlopes } from './face-slopes.ts';
import { addInputToFlow, type Inlet } from './inlet.ts';
import { REACH, type ChainPositions } from './positions.ts';
import type { RowWriter } from './rows.ts';
import type { Shape } from './shape.ts';

/** What the rows of a chain's flows are made of. */
export interface FlowRowParts {
  readonly local: Float64Array;
  readonly rows: RowWriter;
  readonly where: ChainPositions;
  readonly gasFaces: FaceSlopes;
  readonly liquidFaces: FaceSlopes;
  readonly gasInlet: Inlet;
  readonly liquidInlet: Inlet;
}

/** Adds the rows of the flows through faces 0..N - 1 of a chain. */
export function createFlowRows(shape: Shape, chain: Chain, parts: FlowRowParts): (values: Float64Array) => void {
  const { index, inputs: ip, columns, isothermal } = shape;
  const { components, solutes } = shape.layout;
  const { vapourHeat, soluteVolume, carrierHeat } = shape.fluids;
  const { local, rows, where, gasFaces, liquidFaces, gasInlet, liquidInlet } = parts;
  const { work, isPrescribed } = chain;
  const { cells: N, bed } = chain.layout;
  const { primitives: q, inputs: u } = work;
  const P = index.size;
  const M = index.differentiated;
  const DEMAND = isothermal ? solutes : solutes + 1;

  /** Adds factor * d(primitive m of cell c). */
  const addCell = (values: Float64Array, f: number, c: number, m: number, factor: number): void => {
    rows.addToFlow(values, f, c, local, (c * M + m) * columns, factor);
  };

  /** Adds factor * d(quantity v at face g). */
  const addFace = (
    values: Float64Array,
    f: number,
    faces: FaceSlopes,
    g: number,
    v: number,
    inlet: Inlet,
    factor: number,
  ): void => {
    const from = (g * faces.quantities + v) * FACE_PARTS;
    for (let e = 0; e < FACE_PARTS; e++) {
      const slope = faces.slopes[from + e];
      if (slope === 0) continue;
      const c = faces.cells[g * FACE_PARTS + e];
      if (c === INLET) addInputToFlow(values, inlet, f, faces.inputs[v], factor * slope);
      else addCell(values, f, c, faces.primitives[v], factor * slope);
    }
  };

  const addGasTemperature = (values: Float64Array, f: number, g: number, factor: number): void => {
    if (g < N) addFace(values, f, gasFaces, g, components, gasInlet, factor);
    else addInputToFlow(values, gasInlet, f, ip.TG, factor);
  };

  /** Adds factor * d(liquid flow through face g). */
  const addLiquidFlow = (values: Float64Array, f: number, g: number, factor: number): void => {
    if (g === 0) {
      if (q[index.supply] <= u[ip.liquidFlow]) addCell(values, f, 0, index.supply, factor);
      else addInputToFlow(values, liquidInlet, f, ip.liquidFlow, factor);
    } else if (g < N && q[g * P + index.supply] < liquidFaces.values[g * liquidFaces.quantities + DEMAND]) {
      addCell(values, f, g, index.supply, factor);
    } else {
      addFace(values, f, liquidFaces, g, DEMAND, liquidInlet, factor);
    }
  };

  /** Rising pressure keeps gas back: n (dP/dt)/P, with dP/dt = (target - P)/lag. */
  const addPressure = (values: Float64Array, f: number): void => {
    const kept = q[f * P + index.gasMoles] / (chain.pressure(f) * PRESSURE_LAG);
    const share = (f + 0.5) / N;
    const lagged = f * (bed + 2); // top pressure, then drops
    const drops = f * (bed + 1);
    for (let b = 0; b <= bed; b++) values[where.flowPressure[lagged + b]] += kept;
    values[where.flowPressure[lagged + bed + 1]] += kept * share;
    for (let b = 0; b < bed; b++) values[where.flowDrop[drops + b]] -= kept;
    values[where.flowDrop[drops + bed]] -= (kept * (f + 0.5)) / N;
  };

  /** Liquid that comes takes gas space: n/V times its net flow and what condenses. */
  const addDisplaced = (values: Float64Array, f: number): void => {
    const p = f * P;
    const perVolume = q[p + index.gasMoles] / q[p + index.gasVolume];
    addLiquidFlow(values, f, f, perVolume);
    addLiquidFlow(values, f, f + 1, -perVolume);
    for (let k = 0; k < components; k++) {
      const v = k === 0 ? q[p + index.liquidRow] : soluteVolume[k];
      addCell(values, f, f, index.transfer + k, perVolume * v);
    }
  };

  /** What comes, less what transfers, and what heating expels. */
  const addThrough = (values: Float64Array, f: number): void => {
    if (isothermal) {
      values[where.flowOwn[f]] -= 1;
      values[where.flowInto[f * REACH + 2]] += 1;
      for (let k = 0; k < components; k++) addCell(values, f, f, index.transfer + k, -1);
      return;
    }
    const p = f * P;
    const T = q[p + index.TG];
    const TL = q[p + index.TL];
    const perTC = q[p + index.gasMoles] / (T * q[p + index.gasHeat]);
    const stride = components + 1;
    const inn = (f + 1) * stride;
    const out = f * stride;
    let mixIn = carrierHeat;
    let mixOut = carrierHeat;
    let carried = 0;
    for (let k = 0; k < components; k++) {
      const excess = vapourHeat[k] - carrierHeat;
      mixIn += work.gasFace[inn + k] * excess;
      mixOut += work.gasFace[out + k] * excess;
      carried += q[p + index.transfer + k] * vapourHeat[k];
    }
    const Gin = work.flow[f];
    const Gout = f === 0 ? work.topFlow : work.flow[f - 1];
    values[where.flowOwn[f]] -= 1 + perTC * mixOut * (work.gasFace[out + components] - T);
    values[where.flowInto[f * REACH + 2]] += 1 + perTC * mixIn * (work.gasFace[inn + components] - T);
    for (let k = 0; k < components; k++) {
      addCell(values, f, f, index.transfer + k, -1 - perTC * vapourHeat[k] * (TL - T));
    }
    addCell(values, f, f, index.heat, -perTC);
    addCell(values, f, f, index.TL, -perTC * carried);
    addCell(values, f, f, index.TG, perTC * (carried - Gin * mixIn + Gout * mixOut));
    addGasTemperature(values, f, f + 1, perTC * Gin * mixIn);
    addGasTemperature(values, f, f, -perTC * Gout * mixOut);
  };

  return (values) => {
    for (let f = 0; f < N; f++) {
      addPressure(values, f);
      if (!isPrescribed) addDisplaced(values, f);
      addThrough(values, f);
    }
  };
}
