/**
 * The local part of the Jacobian: what the primitives of a cell owe to its own states, the gas flow that enters it and
 * its pressure. By differences, one cell at a time: some eight evaluations of a cell instead of the dozens of whole
 * right-hand sides that coloured differences would cost.
 */
import type { Chain } from '../chain.ts';
import { STEP, type Shape } from './shape.ts';

/** Slopes of one chain's primitives. */
export interface CellSlopes {
  /** d(primitive m of cell c)/d(column s), [(c differentiated + m) columns + s]. */
  readonly values: Float64Array;
  /** Takes the differences; the chain must have been evaluated at y. */
  take(y: Float64Array): void;
}

/** Share of a state's typical magnitude below which the step does not follow it down. */
const FLOOR = 0.01;

export function createCellSlopes(shape: Shape, chain: Chain): CellSlopes {
  const { index, scales, columns, flowColumn } = shape;
  const { block } = shape.layout;
  const { cell, work } = chain;
  const { cells, first } = chain.layout;
  const P = index.size;
  const M = index.differentiated;
  const q = work.primitives;
  const leastFlow = FLOOR * shape.plant.gas.feed.rate;
  const values = new Float64Array(cells * M * columns);
  const trial = new Float64Array(block);
  const shifted = new Float64Array(P);

  /** Writes column s of cell c from `shifted`, which a step h has led to. */
  const write = (c: number, s: number, h: number): void => {
    const per = 1 / h;
    const from = c * P;
    let to = c * M * columns + s;
    for (let m = 0; m < M; m++, to += columns) values[to] = (shifted[m] - q[from + m]) * per;
  };

  const takeCell = (y: Float64Array, c: number): void => {
    const p = chain.pressure(c);
    const G = work.flow[c];
    const from = first + c * block;
    for (let s = 0; s < block; s++) trial[s] = y[from + s];
    for (let s = 0; s < block; s++) {
      const kept = trial[s];
      trial[s] = kept + STEP * (Math.abs(kept) + FLOOR * scales[from + s]);
      const h = trial[s] - kept;
      cell.settle(trial, 0, p, shifted, 0);
      cell.exchange(G, p, shifted, 0);
      trial[s] = kept;
      write(c, s, h);
    }
    cell.settle(trial, 0, p + STEP * p, shifted, 0);
    cell.exchange(G, p + STEP * p, shifted, 0);
    write(c, shape.pressureColumn, STEP * p);
    // The gas flow acts in the second half only: what the first one left is there already.
    for (let m = 0; m < P; m++) shifted[m] = q[c * P + m];
    const h = STEP * (Math.abs(G) + leastFlow);
    cell.exchange(G + h, p, shifted, 0);
    write(c, flowColumn, h);
  };

  return {
    values,
    take(y) {
      for (let c = 0; c < cells; c++) takeCell(y, c);
    },
  };
}
