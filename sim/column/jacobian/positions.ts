/**
 * Where the entries of one chain's rows lie in the Jacobian's values, found once: the rows of its cells, and those of
 * the auxiliary gas flows through its faces. A row is addressed by its number within the chain, a neighbour cell by
 * its distance: cell j seen from cell c is number j - c + 2 of `REACH`.
 */
import { entryIndex, type SparsePattern } from '../../numerics/sparse-pattern.ts';
import type { ChainLayout, Layout } from '../layout.ts';

/** Cells that a row can read: two above to two below its own. */
export const REACH = 5;

export interface ChainPositions {
  /** Rows of cells, [row REACH + j - c + 2]: first state of cell j, and the gas flow into it; -1 where nothing is read. */
  readonly block: Int32Array;
  readonly flow: Int32Array;
  /** [row pressures + i]: the top pressure (i = 0) and the drops of beds 0..bed. */
  readonly pressure: Int32Array;
  /** Rows of the top cell: the flow through the top face. */ readonly topFlow: Int32Array;
  /** The same for the rows of flows, by face 0..N - 1; own entries by face 0..N. */
  readonly flowBlock: Int32Array;
  readonly flowInto: Int32Array;
  readonly flowPressure: Int32Array;
  readonly flowOwn: Int32Array;
  /** [face drops + b]: auxiliary pressure drop of bed b = 0..bed. */
  readonly flowDrop: Int32Array;
}

/** Positions of a chain's rows. */
export function chainPositions(pattern: SparsePattern, layout: Layout, chain: ChainLayout): ChainPositions {
  const { block, size } = layout;
  const { bed, cells, first } = chain;
  const at = (row: number, column: number): number => entryIndex(pattern, row, column);
  const firstFlow = size + chain.firstFlow;
  const flowRows = Array.from({ length: cells }, (_, f) => firstFlow + f);
  const cellRows = Array.from({ length: cells * block }, (_, r) => first + r);
  const pressures = [layout.topPressure, ...layout.pressureDrop.slice(0, bed + 1)];
  const drops = Array.from({ length: bed + 1 }, (_, b) => size + layout.firstDrop + b);

  /** Positions of each row at a column of each cell within reach; `rowsPerCell` rows have the same own cell. */
  const near = (rows: readonly number[], rowsPerCell: number, columnOf: (j: number) => number): Int32Array =>
    Int32Array.from(
      rows.flatMap((row, r) =>
        Array.from({ length: REACH }, (_, e) => {
          const j = Math.floor(r / rowsPerCell) + e - 2;
          return j < 0 || j >= cells ? -1 : at(row, columnOf(j));
        }),
      ),
    );
  const stateOf = (j: number): number => first + j * block;
  const flowOf = (j: number): number => firstFlow + j + 1;
  return {
    block: near(cellRows, block, stateOf),
    flow: near(cellRows, block, flowOf),
    pressure: grid(pattern, cellRows, pressures),
    topFlow: grid(pattern, cellRows.slice(0, block), [firstFlow]),
    flowBlock: near(flowRows, 1, stateOf),
    flowInto: near(flowRows, 1, flowOf),
    flowPressure: grid(pattern, flowRows, pressures),
    flowOwn: Int32Array.from({ length: cells + 1 }, (_, f) => at(firstFlow + f, firstFlow + f)),
    flowDrop: grid(pattern, flowRows, drops),
  };
}

/** Positions of a list of rows at a list of columns, [row columns + column]; -1 where the pattern has no entry. */
export function grid(pattern: SparsePattern, rows: readonly number[], columns: readonly number[]): Int32Array {
  return Int32Array.from(rows.flatMap((row) => columns.map((column) => entryIndex(pattern, row, column))));
}
