/** Rows of the gas balances: slopes of the gas fluxes through the faces of a chain. Exact, given the cells' slopes. */
import type { Chain } from '../chain.ts';
import { DATUM_TEMPERATURE } from '../fluids.ts';
import type { FaceSlopes } from './face-slopes.ts';
import type { FluxSlopes } from './flux-slopes.ts';
import type { Inlet } from './inlet.ts';
import { REACH, type ChainPositions } from './positions.ts';
import type { Shape } from './shape.ts';

/** Adds the gas fluxes' slopes to the gas rows of a chain's cells. */
export function createGasFaceRows(
  shape: Shape,
  chain: Chain,
  faces: FaceSlopes,
  flux: FluxSlopes,
  inlet: Inlet,
  where: ChainPositions,
): (values: Float64Array) => void {
  const { index, inputs: ip, fluxes, isothermal } = shape;
  const { block, components } = shape.layout;
  const { vapourHeat, vaporisation, carrierHeat } = shape.fluids;
  const { cells: N } = chain.layout;
  const { primitives: q, inputs: u, faceFlow } = chain.work;
  const P = index.size;
  const H = components; // the enthalpy among the fluxes
  const firstRow = components + 1;
  const mixing = chain.peclet.gas === undefined ? 0 : N / chain.peclet.gas;
  const { level } = flux;

  const temperature = (f: number): number => {
    if (isothermal) return q[Math.min(f, N - 1) * P + index.TG];
    return f === N ? u[ip.TG] : faces.values[f * faces.quantities + components];
  };

  /** Convection: G y_k, and G times the enthalpy of a mole. */
  const convect = (f: number, G: number): void => {
    flux.begin(Math.max(0, Math.min(f - 1, N - 3)));
    const theta = temperature(f) - DATUM_TEMPERATURE;
    let inert = 1;
    let h = 0;
    let cp = carrierHeat;
    for (let k = 0; k < components; k++) {
      const excess = vapourHeat[k] - carrierHeat;
      const e = vaporisation[k] + excess * theta;
      const yk = f === N ? u[ip.y + k] : faces.values[f * faces.quantities + k];
      if (f === N) {
        flux.addInput(k, ip.y + k, G);
        flux.addInput(H, ip.y + k, G * e);
      } else {
        flux.addFace(k, faces, f, k, G);
        flux.addFace(H, faces, f, k, G * e);
      }
      level[k] = yk;
      inert -= yk;
      h += yk * (vaporisation[k] + vapourHeat[k] * theta);
      cp += yk * excess;
    }
    level[H] = h + inert * carrierHeat * theta;
    if (isothermal) return;
    if (f === N) flux.addInput(H, ip.TG, G * cp);
    else flux.addFace(H, faces, f, components, G * cp);
  };

  /** Axial mixing through an inner face. */
  const mix = (f: number, G: number): void => {
    const theta = temperature(f) - DATUM_TEMPERATURE;
    const below = f * P;
    const above = below - P;
    for (let k = 0; k < components; k++) {
      const m = index.y + k;
      const e = vaporisation[k] + (vapourHeat[k] - carrierHeat) * theta;
      const difference = q[below + m] - q[above + m];
      level[k] += mixing * difference;
      level[H] += mixing * difference * e;
      flux.addCell(k, m, f, G * mixing);
      flux.addCell(k, m, f - 1, -G * mixing);
      flux.addCell(H, m, f, G * mixing * e);
      flux.addCell(H, m, f - 1, -G * mixing * e);
    }
    if (isothermal) return;
    level[H] += mixing * carrierHeat * (q[below + index.TG] - q[above + index.TG]);
    flux.addCell(H, index.TG, f, G * mixing * carrierHeat);
    flux.addCell(H, index.TG, f - 1, -G * mixing * carrierHeat);
  };

  /** The auxiliary flow through face f leaves cell f and enters cell f - 1. */
  const addFlow = (values: Float64Array, f: number): void => {
    const used = isothermal ? fluxes - 1 : fluxes;
    for (let n = 0; n < used; n++) {
      const r = firstRow + n;
      if (f < N) values[f === 0 ? where.topFlow[r] : where.flow[(f * block + r) * REACH + 1]] -= level[n];
      if (f > 0) values[where.flow[((f - 1) * block + r) * REACH + 2]] += level[n];
    }
  };

  return (values) => {
    for (let f = 0; f <= N; f++) {
      const G = faceFlow[f];
      convect(f, G);
      if (mixing > 0 && f > 0 && f < N && G > 0) mix(f, G);
      addFlow(values, f);
      const through = f >= N - 1 ? inlet : undefined;
      if (f < N) flux.addToCell(values, f, firstRow, -1, through);
      if (f > 0) flux.addToCell(values, f - 1, firstRow, 1, through);
    }
  };
}
