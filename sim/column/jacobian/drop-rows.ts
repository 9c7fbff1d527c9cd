/**
 * Rows of the auxiliary pressure drops: 0 = sum over the cells of a bed's zones, by area, less the drop. The drop is that
 * of the flows before the gas is taken off that a rising pressure keeps back (the right-hand side needs the drop to know
 * that gas), while the auxiliary flows are those after: so what the cells below keep back is added again. Left in, it
 * makes a drop that answers itself; where the drop is a tenth of the pressure, steps shrink to milliseconds. The gas that
 * liquid displaces, and what the beds below keep back, are left as they are.
 */
import { entryIndex, type SparsePattern } from '../../numerics/sparse-pattern.ts';
import type { Chain } from '../chain.ts';
import { PRESSURE_LAG } from '../plant.ts';
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
  /** Auxiliary drops of beds 0..bed. */
  const drops = grid(
    pattern,
    [row],
    Array.from({ length: bed + 1 }, (_, b) => size + layout.firstDrop + b),
  );
  const q = chain.work.primitives;
  return (values) => {
    if (zone === 0) values[own] -= 1;
    let kept = 0; // by the cells below, mol/s per Pa of what the pressures are short of their targets
    let keptByShare = 0;
    for (let c = cells - 1; c >= 0; c--) {
      const byFlow = share * local[(c * M + index.pressureDrop) * columns + flowColumn];
      for (let j = 0; j <= bed; j++) values[pressures[j]] -= byFlow * kept;
      values[pressures[bed + 1]] -= byFlow * keptByShare;
      for (let b = 0; b < bed; b++) values[drops[b]] += byFlow * kept;
      values[drops[bed]] += byFlow * keptByShare;
      const here = q[c * index.size + index.gasMoles] / (chain.pressure(c) * PRESSURE_LAG);
      kept += here;
      keptByShare += (here * (c + 0.5)) / cells;
    }
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
