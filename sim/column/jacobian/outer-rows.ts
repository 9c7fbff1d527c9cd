/**
 * The rows outside the chains (core, then accumulators), numbered from 0: which of them read a chain, and how a row of
 * local slopes of one of its cells is added to them.
 */
import { entryIndex, type SparsePattern } from '../../numerics/sparse-pattern.ts';
import type { Chain } from '../chain.ts';
import type { OuterReads } from '../column-pattern.ts';
import { grid } from './positions.ts';
import type { Shape } from './shape.ts';

/** Outer rows that read one chain, by what they read. */
type OuterReaders = Readonly<Record<keyof OuterReads, Int32Array>>;

/** One chain as outer rows see it. */
export interface OuterRows {
  readonly readers: OuterReaders;
  /** By row, -1 where nothing is read: flow through the top face, into the bottom cell, auxiliary pressure drop. */
  readonly topFlow: Int32Array;
  readonly bottomFlow: Int32Array;
  readonly drop: Int32Array;
  /** Adds gain times the slopes of cell c from `from` on to row o. */
  addCell(values: Float64Array, o: number, c: number, slopes: Float64Array, from: number, gain: number): void;
}

/** Entries of outer rows at the core's states, [row coreSize + state]; -1 where nothing is read. */
export function coreEntries(shape: Shape, pattern: SparsePattern): Int32Array {
  const { layout, outerSize } = shape;
  return grid(pattern, numbers(layout.coreFirst, outerSize), numbers(layout.coreFirst, layout.coreSize));
}

export function createOuterRows(
  shape: Shape,
  pattern: SparsePattern,
  chain: Chain,
  reads: readonly OuterReads[],
  core: Int32Array,
): OuterRows {
  const { layout, outerSize, flowColumn, pressureColumn } = shape;
  const { block, size, coreSize, coreFirst } = layout;
  const { bed, cells, first, firstFlow } = chain.layout;
  const rows = numbers(coreFirst, outerSize);
  const cellNumbers = numbers(0, cells);
  /** [row cells + c]: first state of cell c, and the gas flow into it. */
  const states = grid(
    pattern,
    rows,
    cellNumbers.map((c) => first + c * block),
  );
  const flows = grid(
    pattern,
    rows,
    cellNumbers.map((c) => size + firstFlow + c + 1),
  );
  const column = (at: number): Int32Array => Int32Array.from(rows, (row) => entryIndex(pattern, row, at));
  const readersOf = (what: keyof OuterReads): Int32Array =>
    Int32Array.from(reads.flatMap((read, o) => (read[what].includes(bed) ? [o] : [])));
  /** Top pressure, then the drops of beds 0..bed, as core states. */
  const pressures = [layout.topPressure, ...layout.pressureDrop.slice(0, bed + 1)].map((at) => at - coreFirst);
  return {
    readers: {
      top: readersOf('top'),
      bottom: readersOf('bottom'),
      sums: readersOf('sums'),
      drops: readersOf('drops'),
      supply: readersOf('supply'),
      inflow: readersOf('inflow'),
    },
    topFlow: column(size + firstFlow),
    bottomFlow: column(size + firstFlow + cells),
    drop: column(size + layout.firstDrop + bed),
    addCell(values, o, c, slopes, from, gain) {
      const b = states[o * cells + c];
      for (let s = 0; s < block; s++) values[b + s] += gain * slopes[from + s];
      values[flows[o * cells + c]] += gain * slopes[from + flowColumn];
      const p = gain * slopes[from + pressureColumn];
      if (p === 0) return;
      const row = o * coreSize;
      for (let j = 0; j <= bed; j++) values[core[row + pressures[j]]] += p;
      values[core[row + pressures[bed + 1]]] += (p * (c + 0.5)) / cells;
    },
  };
}

function numbers(first: number, count: number): number[] {
  return Array.from({ length: count }, (_, i) => first + i);
}
