/** Rows of the liquid balances: slopes of the liquid fluxes through the faces. Exact, given the cells' slopes. */
import type { Chain } from '../chain.ts';
import { DATUM_TEMPERATURE } from '../fluids.ts';
import { NO_LIMIT } from '../primitives.ts';
import type { FaceSlopes } from './face-slopes.ts';
import type { FluxSlopes } from './flux-slopes.ts';
import type { Inlet } from './inlet.ts';
import type { Shape } from './shape.ts';

/** Adds the liquid fluxes' slopes to the liquid rows of a chain's cells. */
export function createLiquidFaceRows(
  shape: Shape,
  chain: Chain,
  faces: FaceSlopes,
  flux: FluxSlopes,
  inlet: Inlet,
): (values: Float64Array) => void {
  const { index, inputs: ip, fluxes, isothermal, molarVolume } = shape;
  const { components, solutes: K } = shape.layout;
  const { liquidHeat, soluteVolume } = shape.fluids;
  const { isPrescribed } = chain;
  const { cells: N } = chain.layout;
  const { primitives: q, inputs: u, liquidFlow } = chain.work;
  const P = index.size;
  const H = components; // the enthalpy among the fluxes
  /** Places of temperature and flow among the faces' quantities. */
  const TEMPERATURE = K;
  const DEMAND = isothermal ? K : K + 1;
  const mixing = chain.peclet.liquid === undefined ? 0 : N / chain.peclet.liquid;
  const { level } = flux;

  const temperature = (f: number): number => {
    if (f === 0) return u[ip.TL];
    return isothermal ? q[(f - 1) * P + index.TL] : faces.values[f * faces.quantities + TEMPERATURE];
  };

  /** What the stream carries: slopes to its concentrations and temperature; fills `level`. */
  const carry = (f: number, flowHere: number, T: number, v0: number): void => {
    const theta = T - DATUM_TEMPERATURE;
    const expansion = (molarVolume(T + 0.5) - molarVolume(T - 0.5)) / v0;
    let free = 1;
    let cp = 0; // J/(m3 K) of the stream
    for (let k = 1; k <= K; k++) {
      const input = ip.concentration + k - 1;
      const c = f === 0 ? u[input] : faces.values[f * faces.quantities + k - 1];
      free -= c * soluteVolume[k];
      cp += c * liquidHeat[k];
      // Slopes of flux k, of the solvent's, and of the enthalpy to this concentration.
      const solvent = (-flowHere * soluteVolume[k]) / v0;
      const enthalpy = (flowHere * liquidHeat[k] + solvent * liquidHeat[0]) * theta;
      if (f === 0) {
        flux.addInput(k, input, flowHere);
        flux.addInput(0, input, solvent);
        flux.addInput(H, input, enthalpy);
      } else {
        flux.addFace(k, faces, f, k - 1, flowHere);
        flux.addFace(0, faces, f, k - 1, solvent);
        flux.addFace(H, faces, f, k - 1, enthalpy);
      }
      level[k] = c;
    }
    level[0] = free / v0;
    cp += level[0] * liquidHeat[0];
    level[H] = cp * theta;
    if (isothermal) return;
    // Temperature: the solvent's volume and the enthalpy.
    const solventT = -flowHere * level[0] * expansion;
    const enthalpyT = flowHere * cp + solventT * liquidHeat[0] * theta;
    if (f === 0) {
      flux.addInput(0, ip.TL, solventT);
      flux.addInput(H, ip.TL, enthalpyT);
    } else {
      flux.addFace(0, faces, f, TEMPERATURE, solventT);
      flux.addFace(H, faces, f, TEMPERATURE, enthalpyT);
    }
  };

  /** The flow: what is offered, what the cell below takes in, or what the hold-up lets go. */
  const flow = (f: number): void => {
    if (f === 0) {
      const isLimited = q[index.supply] < NO_LIMIT && q[index.supply] <= u[ip.liquidFlow];
      for (let n = 0; n < fluxes; n++) {
        if (isLimited) flux.addCell(n, index.supply, 0, level[n]);
        else flux.addInput(n, ip.liquidFlow, level[n]);
      }
    } else if (isPrescribed) {
      for (let n = 0; n < fluxes; n++) flux.addInput(n, ip.liquidFlow, level[n]);
    } else {
      const isLimited = f < N && q[f * P + index.supply] < faces.values[f * faces.quantities + DEMAND];
      for (let n = 0; n < fluxes; n++) {
        if (isLimited) flux.addCell(n, index.supply, f, level[n]);
        else flux.addFace(n, faces, f, DEMAND, level[n]);
      }
    }
  };

  /** Axial mixing through an inner face; no net volume passes. */
  const mix = (f: number, flowHere: number, v0: number): void => {
    const rate = flowHere * mixing;
    for (let k = 1; k <= K; k++) {
      const m = index.concentration + k - 1;
      flux.addCell(k, m, f - 1, rate);
      flux.addCell(0, m, f - 1, (-rate * soluteVolume[k]) / v0);
      flux.addCell(k, m, f, -rate);
      flux.addCell(0, m, f, (rate * soluteVolume[k]) / v0);
    }
    if (isothermal) return;
    flux.addCell(H, index.TL, f - 1, (rate * liquidHeat[0]) / v0);
    flux.addCell(H, index.TL, f, (-rate * liquidHeat[0]) / v0);
  };

  return (values) => {
    for (let f = 0; f <= N; f++) {
      const flowHere = liquidFlow[f];
      const T = temperature(f);
      const v0 = molarVolume(T);
      flux.begin(Math.max(0, Math.min(f - 2, N - 3)));
      carry(f, flowHere, T, v0);
      flow(f);
      if (mixing > 0 && f > 0 && f < N) mix(f, flowHere, v0);
      const through = f === 0 || (f === 1 && !isPrescribed) ? inlet : undefined;
      if (f < N) flux.addToCell(values, f, 0, 1, through);
      if (f > 0) flux.addToCell(values, f - 1, 0, -1, through);
    }
  };
}
