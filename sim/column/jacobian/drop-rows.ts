/** Rows of the auxiliary pressure drops: 0 = sum over the cells of a bed's zones, by area, less the drop. */
import { entryIndex, type SparsePattern } from '../../numerics/sparse-pattern.ts';
import type { Chain } from '../chain.ts';
import { grid } from './positions.ts';
import type { Shape } from './shape.ts';

/** Adds a chain's part of its bed's row; zone 0 brings the drop itself. */
export function createDropRow(
  shape: Shape,
  pattern: SparsePattern,
  chain: Chain,
  local: Float64Array,
): (values: Float64Array) => void {
  const { layout, index, columns, flowColumn, pressureColumn } = shape;
  const { block, size } = layout;
  const { bed, zone, cells, first, firstFlow } = chain.layout;
  const { distribution } = shape.plant.column;
  const share = distribution === undefined ? 1 : zone === 0 ? distribution.areaShare : 1 - distribution.areaShare;
  const M = index.differentiated;
  const row = size + layout.firstDrop + bed;
  const own = entryIndex(pattern, row, row);
  const numbers = Array.from({ length: cells }, (_, c) => c);
  const states = grid(
    pattern,
    [row],
    numbers.map((c) => first + c * block),
  );
  const flows = grid(
    pattern,
    [row],
    numbers.map((c) => size + firstFlow + c + 1),
  );
  /** Top pressure, then the drops of beds 0..bed. */
  const pressures = grid(pattern, [row], [layout.topPressure, ...layout.pressureDrop.slice(0, bed + 1)]);
  return (values) => {
    if (zone === 0) values[own] -= 1;
    for (let c = 0; c < cells; c++) {
      const from = (c * M + index.pressureDrop) * columns;
      const b = states[c];
      for (let s = 0; s < block; s++) values[b + s] += share * local[from + s];
      values[flows[c]] += share * local[from + flowColumn];
      const p = share * local[from + pressureColumn];
      for (let j = 0; j <= bed; j++) values[pressures[j]] += p;
      values[pressures[bed + 1]] += (p * (c + 0.5)) / cells;
    }
  };
}
