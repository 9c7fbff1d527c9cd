/** What passes between the phases of a cell, and to the surroundings, in its balances. */
import type { Chain } from '../chain.ts';
import { DATUM_TEMPERATURE } from '../fluids.ts';
import type { RowWriter } from './rows.ts';
import type { Shape } from './shape.ts';

/** Adds transfer, its enthalpy, sensible heat and heat loss to the rows of a chain's cells. */
export function createTransferRows(
  shape: Shape,
  chain: Chain,
  local: Float64Array,
  rows: RowWriter,
): (values: Float64Array) => void {
  const { index, columns, isothermal } = shape;
  const { components } = shape.layout;
  const { vapourHeat, vaporisation } = shape.fluids;
  const { cells } = chain.layout;
  const { heatLoss } = chain.cell;
  const q = chain.work.primitives;
  const P = index.size;
  const M = index.differentiated;
  const firstGas = components + 1;
  const liquidEnthalpy = components;
  const gasEnthalpy = firstGas + components;

  const addCell = (values: Float64Array, c: number): void => {
    const first = c * M;
    const theta = q[c * P + index.TL] - DATUM_TEMPERATURE;
    const TL = (first + index.TL) * columns;
    for (let k = 0; k < components; k++) {
      const transfer = (first + index.transfer + k) * columns;
      rows.addToCell(values, c, k, c, local, transfer, 1);
      rows.addToCell(values, c, firstGas + k, c, local, transfer, -1);
      if (isothermal) continue;
      const enthalpy = vaporisation[k] + vapourHeat[k] * theta;
      const w = q[c * P + index.transfer + k];
      rows.addToCell(values, c, liquidEnthalpy, c, local, transfer, enthalpy);
      rows.addToCell(values, c, liquidEnthalpy, c, local, TL, w * vapourHeat[k]);
      rows.addToCell(values, c, gasEnthalpy, c, local, transfer, -enthalpy);
      rows.addToCell(values, c, gasEnthalpy, c, local, TL, -w * vapourHeat[k]);
    }
    if (isothermal) return;
    const heat = (first + index.heat) * columns;
    rows.addToCell(values, c, liquidEnthalpy, c, local, heat, 1);
    rows.addToCell(values, c, gasEnthalpy, c, local, heat, -1);
    if (heatLoss > 0) rows.addToCell(values, c, liquidEnthalpy, c, local, TL, -heatLoss);
  };

  return (values) => {
    for (let c = 0; c < cells; c++) addCell(values, c);
  };
}
