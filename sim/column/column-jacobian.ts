/**
 * Jacobian of the column. The local part (what a cell's primitives owe to its own states, gas flow and pressure) is
 * taken by differences; the face part is exact; the plant is differenced through its two halves. One file for each
 * part, in `jacobian/`; here they are put together, in the order in which they need each other.
 */
import type { SparsePattern } from '../numerics/sparse-pattern.ts';
import type { Chain } from './chain.ts';
import { createColumnPattern, type ColumnPattern } from './column-pattern.ts';
import { createBottomFlowRow } from './jacobian/bottom-flow-row.ts';
import { createCellSlopes } from './jacobian/cell-slopes.ts';
import { createCoreSlopes } from './jacobian/core-slopes.ts';
import { createDropRow } from './jacobian/drop-rows.ts';
import { createGasFaceSlopes, createLiquidFaceSlopes } from './jacobian/face-slopes.ts';
import { createFlowRows } from './jacobian/flow-rows.ts';
import { createFluxSlopes } from './jacobian/flux-slopes.ts';
import { createGasFaceRows } from './jacobian/gas-faces.ts';
import { createInlet } from './jacobian/inlet.ts';
import { createLiquidFaceRows } from './jacobian/liquid-faces.ts';
import { coreEntries, createOuterRows } from './jacobian/outer-rows.ts';
import { createPortSlopes } from './jacobian/port-slopes.ts';
import { chainPositions } from './jacobian/positions.ts';
import { createRowWriter } from './jacobian/rows.ts';
import { shapeOf, type ColumnJacobianParts, type Shape } from './jacobian/shape.ts';
import { createTransferRows } from './jacobian/transfer-rows.ts';

export interface ColumnJacobian {
  readonly pattern: SparsePattern;
  /**
   * Fills `values`, in pattern order, at a state that the column has just been evaluated at. A function of t, y and
   * what that evaluation left in the column; y is changed and restored on the way.
   */
  readonly fill: (t: number, y: Float64Array, values: Float64Array) => void;
}

/** One chain's part of the Jacobian. */
interface ChainJacobian {
  /** Rows of its cells and of its gas flows. */
  addRows(y: Float64Array, values: Float64Array): void;
  /** Its part of its bed's pressure drop. */
  addDrop(values: Float64Array): void;
  /** What the outer rates owe to it; needs the slopes that `addRows` took. */
  addOuter(y: Float64Array, values: Float64Array): void;
}

/** Builds the Jacobian of a column. */
export function createColumnJacobian(parts: ColumnJacobianParts): ColumnJacobian {
  const shape = shapeOf(parts);
  const { layout, machinery } = parts;
  const structure = createColumnPattern(parts.plant, layout, machinery.passThrough);
  const entries = coreEntries(shape, structure.pattern);
  const chains = parts.chains.flat();
  const core = createCoreSlopes(shape, chains, entries);
  const own = chains.map((chain, i) =>
    createChainJacobian(shape, structure, chain, core.rates, core.gains[i], entries),
  );
  return {
    pattern: structure.pattern,
    fill(t, y, values) {
      values.fill(0);
      core.take(t, y, values);
      for (const chain of own) chain.addRows(y, values);
      for (const chain of own) chain.addDrop(values);
      for (const chain of own) chain.addOuter(y, values);
    },
  };
}

/**
 * @param rates - Outer rates where the plant has been evaluated.
 * @param gains - Slopes of the chain's inputs to the core's states.
 */
function createChainJacobian(
  shape: Shape,
  structure: ColumnPattern,
  chain: Chain,
  rates: Float64Array,
  gains: Float64Array,
  entries: Int32Array,
): ChainJacobian {
  const { layout, inputs } = shape;
  const { pattern, outerReads } = structure;
  const { bed, cells } = chain.layout;
  const gasColumns = structure.gasInletColumns[bed];
  const liquidColumns = structure.liquidInletColumns[bed];
  const firstGas = layout.components + 1;
  const gasInlet = createInlet(pattern, layout, chain.layout, inputs, gasColumns, cells - 2, firstGas, gains);
  const liquidInlet = createInlet(pattern, layout, chain.layout, inputs, liquidColumns, 0, 0, gains);

  const slopes = createCellSlopes(shape, chain);
  const local = slopes.values;
  const gasFaces = createGasFaceSlopes(shape, chain);
  const liquidFaces = createLiquidFaceSlopes(shape, chain);

  const where = chainPositions(pattern, layout, chain.layout);
  const rows = createRowWriter(shape, chain, where);
  const flux = createFluxSlopes(shape, chain, local, rows);
  const addTransfer = createTransferRows(shape, chain, local, rows);
  const addLiquid = createLiquidFaceRows(shape, chain, liquidFaces, flux, liquidInlet);
  const addGas = createGasFaceRows(shape, chain, gasFaces, flux, gasInlet, where);
  const flowParts = { local, rows, where, gasFaces, liquidFaces, gasInlet, liquidInlet };
  const addFlows = createFlowRows(shape, chain, flowParts);
  const addBottomFlow = createBottomFlowRow(shape, pattern, chain, gasColumns, gasInlet);
  const addDrop = createDropRow(shape, pattern, chain, local);
  const outer = createOuterRows(shape, pattern, chain, outerReads, entries);
  const portParts = { local, outer, coreEntries: entries, rates, gasFaces, liquidFaces, liquidInlet };
  const addOuter = createPortSlopes(shape, chain, portParts);
  return {
    addRows(y, values) {
      slopes.take(y);
      gasFaces.take();
      liquidFaces.take();
      addTransfer(values);
      addLiquid(values);
      addGas(values);
      addFlows(values);
      addBottomFlow(values);
    },
    addDrop,
    addOuter,
  };
}
