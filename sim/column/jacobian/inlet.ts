/**
 * The two ends where a chain is fed: slopes to its inputs become slopes to the core's states on which the inputs
 * depend. Pressures are left out here, since they act through the cells.
 */
import type { SparsePattern } from '../../numerics/sparse-pattern.ts';
import type { ChainLayout, Layout } from '../layout.ts';
import type { InputPorts } from '../ports.ts';
import { grid } from './positions.ts';

/** Rows that an inlet reaches: those of the two cells next to it. */
const INLET_CELLS = 2;

/** One inlet of one chain. */
export interface Inlet {
  /** Core states that it depends on, as offsets in the core. */ readonly states: Int32Array;
  /** First cell whose rows it reaches. */ readonly firstCell: number;
  /** Entries of cell rows, [((cell - firstCell) fluxes + flux) states + state]. */ readonly cellRows: Int32Array;
  /** Entries of flow rows, [(face - firstCell) states + state]. */ readonly flowRows: Int32Array;
  /** d(input u)/d(core state j), [u coreSize + j]; shared by a chain's inlets and filled by the core's differences. */
  readonly gains: Float64Array;
  readonly coreSize: number;
  readonly inputs: number;
}

/**
 * @param columns - State columns that the inlet depends on.
 * @param firstCell - 0 for the liquid, N - 2 for the gas.
 * @param firstRow - First row of its phase in a cell.
 */
export function createInlet(
  pattern: SparsePattern,
  layout: Layout,
  chain: ChainLayout,
  ports: InputPorts,
  columns: readonly number[],
  firstCell: number,
  firstRow: number,
  gains: Float64Array,
): Inlet {
  const fluxes = layout.components + 1;
  const cellRows: number[] = [];
  const flowRows: number[] = [];
  for (let c = firstCell; c < firstCell + INLET_CELLS; c++) {
    for (let n = 0; n < fluxes; n++) cellRows.push(chain.first + c * layout.block + firstRow + n);
    flowRows.push(layout.size + chain.firstFlow + c);
  }
  return {
    states: Int32Array.from(columns, (column) => column - layout.coreFirst),
    firstCell,
    cellRows: grid(pattern, cellRows, columns),
    flowRows: grid(pattern, flowRows, columns),
    gains,
    coreSize: layout.coreSize,
    inputs: ports.differentiated,
  };
}

/** Adds `factor` times a row of slopes to all inputs, from `from` on, to the row of flux n of cell c. */
export function addInputs(
  values: Float64Array,
  inlet: Inlet,
  c: number,
  n: number,
  slopes: Float64Array,
  from: number,
  factor: number,
): void {
  const { states, gains, coreSize, inputs, cellRows } = inlet;
  const fluxes = cellRows.length / (INLET_CELLS * states.length);
  const row = ((c - inlet.firstCell) * fluxes + n) * states.length;
  for (let q = 0; q < states.length; q++) {
    let sum = 0;
    for (let u = 0; u < inputs; u++) sum += slopes[from + u] * gains[u * coreSize + states[q]];
    if (sum !== 0) values[cellRows[row + q]] += factor * sum;
  }
}

/** Adds `factor` times d(input) to the row of the gas flow through face f. */
export function addInputToFlow(values: Float64Array, inlet: Inlet, f: number, input: number, factor: number): void {
  const { states, gains, coreSize, flowRows } = inlet;
  const row = (f - inlet.firstCell) * states.length;
  for (let q = 0; q < states.length; q++) {
    const gain = gains[input * coreSize + states[q]];
    if (gain !== 0) values[flowRows[row + q]] += factor * gain;
  }
}
