/**
 * Linear systems of the column: cells first, from the top, each with its gas flow; then the plant; and apart the states
 * that nothing reads, which follow from the rest row by row.
 */
import type { ShiftedSolver } from '../numerics/shifted-solver.ts';
import { createSparseSolver } from '../numerics/sparse-lu.ts';
import { createPatternBuilder, entryIndex, type SparsePattern } from '../numerics/sparse-pattern.ts';
import type { Layout } from './layout.ts';

/** Order of elimination: unknown by position; leaves left out. */
function eliminationOrder(layout: Layout, leaves: ReadonlySet<number>): number[] {
  const order: number[] = [];
  for (const chain of layout.chains) {
    order.push(layout.size + chain.firstFlow);
    for (let c = 0; c < chain.cells; c++) {
      for (let s = 0; s < layout.block; s++) order.push(chain.first + c * layout.block + s);
      order.push(layout.size + chain.firstFlow + c + 1);
    }
  }
  for (let j = layout.firstDrop; j < layout.auxiliary; j++) order.push(layout.size + j);
  for (let j = 0; j < layout.coreSize; j++) {
    if (!leaves.has(layout.coreFirst + j)) order.push(layout.coreFirst + j);
  }
  return order;
}

/**
 * @param pattern - Of the whole Jacobian, states then auxiliary unknowns.
 * @param leaves - States whose columns hold their own diagonal alone.
 */
export function createBorderedSolver(
  pattern: SparsePattern,
  layout: Layout,
  leaves: ReadonlySet<number>,
): ShiftedSolver {
  const order = eliminationOrder(layout, leaves);
  const count = order.length;
  const place = new Int32Array(pattern.n).fill(-1);
  order.forEach((unknown, i) => {
    place[unknown] = i;
  });
  const builder = createPatternBuilder(count);
  for (let i = 0; i < count; i++) {
    const row = order[i];
    for (let e = pattern.rowStart[row]; e < pattern.rowStart[row + 1]; e++) {
      const j = place[pattern.column[e]];
      if (j >= 0) builder.add(i, j);
    }
  }
  const inner = builder.build();
  /** Entry of the whole pattern behind each entry of the inner one. */
  const source = new Int32Array(inner.column.length);
  for (let i = 0; i < count; i++) {
    for (let e = inner.rowStart[i]; e < inner.rowStart[i + 1]; e++) {
      source[e] = entryIndex(pattern, order[i], order[inner.column[e]]);
    }
  }
  const mass = Float64Array.from(order, (unknown) => (unknown < layout.size ? 1 : 0));
  const solver = createSparseSolver(inner, mass);
  const values = new Float64Array(source.length);
  const right = new Float64Array(count);
  const leaf = Int32Array.from([...leaves].sort((a, b) => a - b));
  let leafValues: Float64Array = new Float64Array(0);
  let leafShift = 1;
  const leafDiagonal = new Float64Array(leaf.length);
  return {
    n: pattern.n,
    factor(shift, jacobian) {
      for (let e = 0; e < source.length; e++) values[e] = source[e] < 0 ? 0 : jacobian[source[e]];
      leafShift = shift;
      if (leafValues.length !== jacobian.length) leafValues = new Float64Array(jacobian.length);
      for (let i = 0; i < leaf.length; i++) {
        const row = leaf[i];
        for (let e = pattern.rowStart[row]; e < pattern.rowStart[row + 1]; e++) {
          leafValues[e] = jacobian[e];
          if (pattern.column[e] === row) leafDiagonal[i] = leafShift - jacobian[e];
        }
      }
      return solver.factor(shift, values);
    },
    solve(b) {
      for (let i = 0; i < count; i++) right[i] = b[order[i]];
      solver.solve(right);
      for (let i = 0; i < count; i++) b[order[i]] = right[i];
      for (let i = 0; i < leaf.length; i++) {
        const row = leaf[i];
        let sum = b[row];
        for (let e = pattern.rowStart[row]; e < pattern.rowStart[row + 1]; e++) {
          const column = pattern.column[e];
          if (column !== row) sum += leafValues[e] * b[column];
        }
        b[row] = sum / leafDiagonal[i];
      }
    },
  };
}
