/**
 * What the outer rates owe to the chains: differences of the rates to what a chain gives (and to the gas flow that
 * enters it), times the slopes of that to the chain's cells.
 */
import type { Chain } from '../chain.ts';
import { FACE_PARTS, INLET, type FaceSlopes } from './face-slopes.ts';
import type { Inlet } from './inlet.ts';
import type { OuterRows } from './outer-rows.ts';
import { portScales } from './port-scales.ts';
import { STEP, type Shape } from './shape.ts';

/** What the slopes of a chain's outputs are made of. */
export interface PortSlopeParts {
  readonly local: Float64Array;
  readonly outer: OuterRows;
  /** Of outer rows at the core's states. */ readonly coreEntries: Int32Array;
  /** Outer rates where the plant has been evaluated, indexed as states. */ readonly rates: Float64Array;
  readonly gasFaces: FaceSlopes;
  readonly liquidFaces: FaceSlopes;
  readonly liquidInlet: Inlet;
}

/** Adds the slopes of the outer rows that read a chain. */
export function createPortSlopes(
  shape: Shape,
  chain: Chain,
  parts: PortSlopeParts,
): (y: Float64Array, values: Float64Array) => void {
  const { layout, machinery, index, inputs: ip, outputs: op, columns, isothermal, molarVolume } = shape;
  const { components, solutes: K, coreFirst, coreSize } = layout;
  const { local, outer, coreEntries, rates, gasFaces, liquidFaces, liquidInlet } = parts;
  const { readers } = outer;
  const { work, cell, isPrescribed } = chain;
  const { cells: N, bed } = chain.layout;
  const { outputs: o, inputs: u, primitives: q } = work;
  const M = index.differentiated;
  const scales = portScales(shape);
  const TEMPERATURE = K; // among the liquid faces' quantities
  const DEMAND = isothermal ? K : K + 1;
  const hasSplit = layout.gasShare[bed] >= 0;
  const moved = new Float64Array(layout.size);
  /** Slope of each outer rate to the port that was moved last. */
  const gains = new Float64Array(shape.outerSize);
  const byVolume = new Float64Array(shape.outerSize);

  /** Slopes of the outer rates to entry n of the chain's outputs or inputs, into `gains`. */
  const difference = (y: Float64Array, ports: Float64Array, n: number, scale: number): void => {
    const kept = ports[n];
    ports[n] = kept + STEP * (Math.abs(kept) + scale);
    const per = 1 / (ports[n] - kept);
    machinery.rates(y, moved);
    ports[n] = kept;
    for (let row = 0; row < gains.length; row++) gains[row] = (moved[coreFirst + row] - rates[coreFirst + row]) * per;
  };

  /** Adds the slopes of quantity v at an end face to the rows that read that end. */
  const addEnd = (values: Float64Array, rows: Int32Array, faces: FaceSlopes, f: number, v: number): void => {
    const from = (f * faces.quantities + v) * FACE_PARTS;
    for (let n = 0; n < rows.length; n++) {
      const row = rows[n];
      if (gains[row] === 0) continue;
      for (let e = 0; e < FACE_PARTS; e++) {
        const slope = faces.slopes[from + e];
        const c = faces.cells[f * FACE_PARTS + e];
        if (slope === 0 || c === INLET) continue;
        outer.addCell(values, row, c, local, (c * M + faces.primitives[v]) * columns, gains[row] * slope);
      }
    }
  };

  /** Adds to the rows the slopes of the liquid flow offered at the top. */
  const addOffered = (values: Float64Array, row: number): void => {
    const { states } = liquidInlet;
    for (let n = 0; n < states.length; n++) {
      const gain = liquidInlet.gains[ip.liquidFlow * coreSize + states[n]];
      values[coreEntries[row * coreSize + states[n]]] += gains[row] * gain;
    }
  };

  const addAt = (values: Float64Array, rows: Int32Array, entries: Int32Array): void => {
    for (let n = 0; n < rows.length; n++) values[entries[rows[n]]] += gains[rows[n]];
  };

  const addTop = (y: Float64Array, values: Float64Array): void => {
    difference(y, o, op.gasFlow, scales[op.gasFlow]);
    addAt(values, readers.top, outer.topFlow);
    for (let k = 0; k < components; k++) {
      difference(y, o, op.y + k, scales[op.y + k]);
      addEnd(values, readers.top, gasFaces, 0, k);
    }
    if (isothermal) return;
    difference(y, o, op.TG, scales[op.TG]);
    addEnd(values, readers.top, gasFaces, 0, components);
  };

  const addBottom = (y: Float64Array, values: Float64Array): void => {
    const rows = readers.bottom;
    difference(y, o, op.liquidFlow, scales[op.liquidFlow]);
    if (isPrescribed) {
      for (let n = 0; n < rows.length; n++) addOffered(values, rows[n]);
    } else {
      addEnd(values, rows, liquidFaces, N, DEMAND);
    }
    for (let k = 0; k < K; k++) {
      difference(y, o, op.concentration + k, scales[op.concentration + k]);
      addEnd(values, rows, liquidFaces, N, k);
    }
    if (isothermal) return;
    // Temperature acts by itself and through the molar volume.
    difference(y, o, op.molarVolume, scales[op.molarVolume]);
    const T = o[op.TL];
    const expansion = molarVolume(T + 0.5) - molarVolume(T - 0.5);
    for (let n = 0; n < rows.length; n++) byVolume[rows[n]] = gains[rows[n]] * expansion;
    difference(y, o, op.TL, scales[op.TL]);
    for (let n = 0; n < rows.length; n++) gains[rows[n]] += byVolume[rows[n]];
    addEnd(values, rows, liquidFaces, N, TEMPERATURE);
  };

  /** Adds the slopes of an output that is the sum of primitive m over the cells, times a factor. */
  const addSum = (y: Float64Array, values: Float64Array, port: number, m: number, factor: number): void => {
    if (factor === 0) return;
    difference(y, o, port, scales[port]);
    for (let n = 0; n < readers.sums.length; n++) {
      const row = readers.sums[n];
      const gain = gains[row] * factor;
      if (gain === 0) continue;
      for (let c = 0; c < N; c++) outer.addCell(values, row, c, local, (c * M + m) * columns, gain);
    }
  };

  const addSums = (y: Float64Array, values: Float64Array): void => {
    // Of the drops, the split between zones alone reads each cell's; the rest read the auxiliary unknown.
    if (hasSplit) addSum(y, values, op.pressureDrop, index.pressureDrop, 1);
    addSum(y, values, op.heatLoss, index.TL, cell.heatLoss);
    addSum(y, values, op.liquidHeld, index.holdup, cell.crossSection * cell.height);
  };

  const addSupply = (y: Float64Array, values: Float64Array): void => {
    difference(y, o, op.accepted, scales[op.accepted]);
    const isLimited = q[index.supply] <= u[ip.liquidFlow];
    for (let n = 0; n < readers.supply.length; n++) {
      const row = readers.supply[n];
      if (gains[row] === 0) continue;
      if (isLimited) outer.addCell(values, row, 0, local, index.supply * columns, gains[row]);
      else addOffered(values, row);
    }
  };

  return (y, values) => {
    if (readers.top.length > 0) addTop(y, values);
    if (readers.bottom.length > 0) addBottom(y, values);
    if (readers.drops.length > 0) {
      // Weighted over the zones the gains add up to one bed's.
      difference(y, o, op.pressureDrop, scales[op.pressureDrop]);
      addAt(values, readers.drops, outer.drop);
    }
    if (readers.sums.length > 0) addSums(y, values);
    if (readers.supply.length > 0) addSupply(y, values);
    if (readers.inflow.length > 0) {
      difference(y, u, ip.gasFlow, shape.plant.gas.feed.rate);
      addAt(values, readers.inflow, outer.bottomFlow);
    }
  };
}
