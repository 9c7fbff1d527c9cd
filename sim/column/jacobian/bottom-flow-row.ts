/** Row of the auxiliary gas flow into a chain's bottom cell: 0 = (from the core, or from the bed below) - G. */
import type { SparsePattern } from '../../numerics/sparse-pattern.ts';
import { entryIndex } from '../../numerics/sparse-pattern.ts';
import type { Chain } from '../chain.ts';
import type { Inlet } from './inlet.ts';
import { grid } from './positions.ts';
import type { Shape } from './shape.ts';

/**
 * @param columns - State columns that the gas inlet depends on.
 * @param inlet - Of the chain's gas.
 */
export function createBottomFlowRow(
  shape: Shape,
  pattern: SparsePattern,
  chain: Chain,
  columns: readonly number[],
  inlet: Inlet,
): (values: Float64Array) => void {
  const { layout, inputs: ip, chains } = shape;
  const { bed, zone, cells, firstFlow } = chain.layout;
  const row = layout.size + firstFlow + cells;
  const own = entryIndex(pattern, row, row);
  if (bed === chains.length - 1) {
    const states = grid(pattern, [row], columns);
    const from = ip.gasFlow * layout.coreSize;
    return (values) => {
      values[own] -= 1;
      for (let q = 0; q < states.length; q++) values[states[q]] += inlet.gains[from + inlet.states[q]];
    };
  }
  const zones = chains[bed];
  const gasShare = zones.length > 1 ? entryIndex(pattern, row, layout.gasShare[bed]) : -1;
  const below = layout.chains.filter((other) => other.bed === bed + 1).map((other) => layout.size + other.firstFlow);
  const tops = grid(pattern, [row], below);
  return (values) => {
    values[own] -= 1;
    let total = 0;
    for (let z = 0; z < zones.length; z++) total += zones[z].work.flow[cells - 1];
    const share = zones.length === 1 || total === 0 ? 1 : chain.work.flow[cells - 1] / total;
    if (zones.length > 1) values[gasShare] += zone === 0 ? total : -total;
    for (let q = 0; q < tops.length; q++) values[tops[q]] += share;
  };
}
