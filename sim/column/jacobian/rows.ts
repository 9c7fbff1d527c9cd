/** Adding a row of local slopes of one cell to a row of the Jacobian: a cell's own, a neighbour's, a gas flow's. */
import type { Chain } from '../chain.ts';
import { REACH, type ChainPositions } from './positions.ts';
import type { Shape } from './shape.ts';

export interface RowWriter {
  /**
   * Adds `factor` times the slopes of cell j from `from` on to row r of cell c; nothing where the row reads no such cell.
   */
  addToCell(
    values: Float64Array,
    c: number,
    r: number,
    j: number,
    slopes: Float64Array,
    from: number,
    factor: number,
  ): void;
  /** The same to the row of the gas flow through face f. */
  addToFlow(values: Float64Array, f: number, j: number, slopes: Float64Array, from: number, factor: number): void;
}

export function createRowWriter(shape: Shape, chain: Chain, where: ChainPositions): RowWriter {
  const { flowColumn, pressureColumn } = shape;
  const { block } = shape.layout;
  const { bed, cells } = chain.layout;
  const pressures = bed + 2;
  const { block: cellBlock, flow: cellFlow, pressure: cellPressure, flowBlock, flowInto, flowPressure } = where;

  /** A cell's pressure is the top pressure, the drops of the beds above, and its share of its own bed's. */
  const addPressure = (values: Float64Array, at: Int32Array, row: number, share: number, slope: number): void => {
    const o = row * pressures;
    for (let b = 0; b <= bed; b++) values[at[o + b]] += slope;
    values[at[o + bed + 1]] += slope * share;
  };

  return {
    addToCell(values, c, r, j, slopes, from, factor) {
      const row = c * block + r;
      const o = row * REACH + j - c + 2;
      const b = cellBlock[o];
      if (b < 0) return;
      for (let s = 0; s < block; s++) values[b + s] += factor * slopes[from + s];
      values[cellFlow[o]] += factor * slopes[from + flowColumn];
      addPressure(values, cellPressure, row, (j + 0.5) / cells, factor * slopes[from + pressureColumn]);
    },
    addToFlow(values, f, j, slopes, from, factor) {
      if (factor === 0) return;
      const o = f * REACH + j - f + 2;
      const b = flowBlock[o];
      for (let s = 0; s < block; s++) values[b + s] += factor * slopes[from + s];
      values[flowInto[o]] += factor * slopes[from + flowColumn];
      addPressure(values, flowPressure, f, (j + 0.5) / cells, factor * slopes[from + pressureColumn]);
    },
  };
}
