/**
 * Values carried through the faces of a chain, with their slopes to the cells (and the inlet) that they are made of.
 * Each is found once for each evaluation and read by fluxes, auxiliary flows and outputs alike.
 */
import type { Chain } from '../chain.ts';
import { inletFace, interiorFace, outletFace, type FaceValue } from '../face-value.ts';
import type { Shape } from './shape.ts';

/** A place in `FaceSlopes` marks the chain's inlet instead of a cell. */
export const INLET = -1;
/** Values that a face is made of. */
export const FACE_PARTS = 3;

/** Face values of one phase. Quantity v of face f: value at [f quantities + v], slopes at three times that. */
export interface FaceSlopes {
  readonly quantities: number;
  /** Cells that face f is made of, [f FACE_PARTS + e]; `INLET` for the inlet. */ readonly cells: Int32Array;
  readonly values: Float64Array;
  readonly slopes: Float64Array;
  /** Primitive behind quantity v, and the chain's input that is its inlet value. */
  readonly primitives: Int32Array;
  readonly inputs: Int32Array;
  /** Fills values and slopes from the chain's primitives and inputs. */
  take(): void;
}

/** Quantities of the gas: fractions of components 0..K, then temperature unless it is fixed. Faces 0..N - 1. */
export function createGasFaceSlopes(shape: Shape, chain: Chain): FaceSlopes {
  const { index, inputs: ip } = shape;
  const { components } = shape.layout;
  const N = chain.layout.cells;
  const primitives = Array.from({ length: components }, (_, k) => index.y + k);
  const inputs = Array.from({ length: components }, (_, k) => ip.y + k);
  if (!shape.isothermal) {
    primitives.push(index.TG);
    inputs.push(ip.TG);
  }
  const made = (f: number): readonly [number, number, number] => {
    if (chain.scheme === 'well-mixed') return [f, f, f];
    if (f === 0) return [2, 1, 0];
    return f === N - 1 ? [INLET, f, f - 1] : [f + 1, f, f - 1];
  };
  return createFaceSlopes(shape, chain, primitives, inputs, 0, 0, made);
}

/**
 * Quantities of the liquid: concentrations of solutes 1..K, temperature unless it is fixed, last the flow unless the
 * hold-up is prescribed. Faces 1..N.
 */
export function createLiquidFaceSlopes(shape: Shape, chain: Chain): FaceSlopes {
  const { index, inputs: ip } = shape;
  const { solutes } = shape.layout;
  const N = chain.layout.cells;
  const primitives = Array.from({ length: solutes }, (_, k) => index.concentration + k);
  const inputs = Array.from({ length: solutes }, (_, k) => ip.concentration + k);
  if (!shape.isothermal) {
    primitives.push(index.TL);
    inputs.push(ip.TL);
  }
  if (!chain.isPrescribed) {
    primitives.push(index.demand);
    inputs.push(ip.liquidFlow);
  }
  const made = (f: number): readonly [number, number, number] => {
    if (chain.scheme === 'well-mixed') return [f - 1, f - 1, f - 1];
    if (f === N) return [N - 3, N - 2, N - 1];
    return f === 1 ? [INLET, 0, 1] : [f - 2, f - 1, f];
  };
  return createFaceSlopes(shape, chain, primitives, inputs, 1, N, made);
}

/**
 * @param firstFace - First of N faces.
 * @param outlet - Face through which the phase leaves.
 * @param made - Cells that a face is made of, in the order of the face function's arguments.
 */
function createFaceSlopes(
  shape: Shape,
  chain: Chain,
  primitives: readonly number[],
  inputs: readonly number[],
  firstFace: number,
  outlet: number,
  made: (f: number) => readonly [number, number, number],
): FaceSlopes {
  const P = shape.index.size;
  const N = chain.layout.cells;
  const { primitives: q, inputs: u } = chain.work;
  const quantities = primitives.length;
  const cells = new Int32Array((N + 1) * FACE_PARTS).fill(INLET);
  for (let f = firstFace; f < firstFace + N; f++) cells.set(made(f), f * FACE_PARTS);
  const values = new Float64Array((N + 1) * quantities);
  const slopes = new Float64Array((N + 1) * quantities * FACE_PARTS);
  const primitive = Int32Array.from(primitives);
  const input = Int32Array.from(inputs);
  const face: FaceValue = { value: 0, d1: 0, d2: 0, d3: 0 };
  const isWellMixed = chain.scheme === 'well-mixed';

  return {
    quantities,
    cells,
    values,
    slopes,
    primitives: primitive,
    inputs: input,
    take() {
      for (let f = firstFace; f < firstFace + N; f++) {
        const a = cells[f * FACE_PARTS] * P;
        const b = cells[f * FACE_PARTS + 1] * P;
        const c = cells[f * FACE_PARTS + 2] * P;
        for (let v = 0; v < quantities; v++) {
          const m = primitive[v];
          const at = f * quantities + v;
          const to = at * FACE_PARTS;
          if (isWellMixed) {
            values[at] = q[a + m];
            slopes[to] = 1;
            continue;
          }
          if (f === outlet) outletFace(q[a + m], q[b + m], q[c + m], face);
          else if (a < 0) inletFace(u[input[v]], q[b + m], q[c + m], face);
          else interiorFace(q[a + m], q[b + m], q[c + m], face);
          values[at] = face.value;
          slopes[to] = face.d1;
          slopes[to + 1] = face.d2;
          slopes[to + 2] = face.d3;
        }
      }
    },
  };
}
