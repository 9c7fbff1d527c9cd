/**
 * Slopes of the fluxes through one face at a time, to the three cells around it and to the chain's inputs; the gas and
 * the liquid fill them alike, and both cells at the face take them up.
 */
import type { Chain } from '../chain.ts';
import { FACE_PARTS, INLET, type FaceSlopes } from './face-slopes.ts';
import { addInputs, type Inlet } from './inlet.ts';
import type { RowWriter } from './rows.ts';
import type { Shape } from './shape.ts';

/** Cells that the fluxes through a face can depend on. */
const WINDOW = 3;

export interface FluxSlopes {
  /** d(flux n)/d(input u), [n inputs + u]. */ readonly toInputs: Float64Array;
  /** Fluxes per unit of flow. */ readonly level: Float64Array;
  /** Begins a face: no slopes yet; the window of cells starts at `first`. */
  begin(first: number): void;
  /** Adds gain * d(quantity v of face f) to flux n. */
  addFace(n: number, faces: FaceSlopes, f: number, v: number, gain: number): void;
  /** Adds gain * d(primitive m of cell c) to flux n. */
  addCell(n: number, m: number, c: number, gain: number): void;
  /** Adds gain * d(input u) to flux n. */
  addInput(n: number, u: number, gain: number): void;
  /** Adds the fluxes, times `sign`, to the rows from `firstRow` on of cell c; through the inlet if it is given. */
  addToCell(values: Float64Array, c: number, firstRow: number, sign: number, inlet: Inlet | undefined): void;
}

export function createFluxSlopes(shape: Shape, chain: Chain, local: Float64Array, rows: RowWriter): FluxSlopes {
  const { columns, fluxes, isothermal } = shape;
  const M = shape.index.differentiated;
  const inputs = shape.inputs.size;
  const N = chain.layout.cells;
  /** [(n WINDOW + cell - first) columns + s] */
  const toCells = new Float64Array(fluxes * WINDOW * columns);
  const toInputs = new Float64Array(fluxes * inputs);
  /** First cell of the window. */
  const window = { first: 0 };
  // A fixed temperature leaves the enthalpy rows empty.
  const used = isothermal ? fluxes - 1 : fluxes;

  const addCell = (n: number, m: number, c: number, gain: number): void => {
    if (gain === 0) return;
    const from = (c * M + m) * columns;
    const to = (n * WINDOW + c - window.first) * columns;
    for (let s = 0; s < columns; s++) toCells[to + s] += gain * local[from + s];
  };

  return {
    toInputs,
    level: new Float64Array(fluxes),
    begin(first) {
      toCells.fill(0);
      toInputs.fill(0);
      window.first = first;
    },
    addCell,
    addInput(n, u, gain) {
      toInputs[n * inputs + u] += gain;
    },
    addFace(n, faces, f, v, gain) {
      const { cells, slopes } = faces;
      const from = (f * faces.quantities + v) * FACE_PARTS;
      for (let e = 0; e < FACE_PARTS; e++) {
        const w = slopes[from + e] * gain;
        const c = cells[f * FACE_PARTS + e];
        if (c === INLET) toInputs[n * inputs + faces.inputs[v]] += w;
        else addCell(n, faces.primitives[v], c, w);
      }
    },
    addToCell(values, c, firstRow, sign, inlet) {
      const { first } = window;
      const last = Math.min(first + WINDOW, N, c + 3);
      for (let n = 0; n < used; n++) {
        for (let j = Math.max(first, c - 2); j < last; j++) {
          rows.addToCell(values, c, firstRow + n, j, toCells, (n * WINDOW + j - first) * columns, sign);
        }
        if (inlet !== undefined) addInputs(values, inlet, c, n, toInputs, n * inputs, sign);
      }
    },
  };
}
