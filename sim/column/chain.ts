/**
 * A chain of cells: one zone of one bed. Gas rises through it, liquid falls; face values make the fluxes, fluxes and
 * transfer make the balances. Conserved quantities only, so what goes in equals what comes out plus what is stored.
 *
 * Two sweeps. The first goes up with the gas flow less what transfers and what heating expels, and gives each cell its
 * primitives. The second has the exact gas flow, with what a change of gas space or pressure displaces, so that no
 * carrier is lost; the linear systems know the first flow only (the difference is some 0.1 %).
 */
import type { Case } from '../case/case.ts';
import { readHermiteColumn, readHermiteSlope, type HermiteTable } from '../numerics/hermite-table.ts';
import type { Cell } from './cell.ts';
import { inletFace, interiorFace, outletFace, type FaceValue } from './face-value.ts';
import { DATUM_TEMPERATURE, type Fluids } from './fluids.ts';
import type { ChainLayout } from './layout.ts';
import type { InputPorts, OutputPorts } from './ports.ts';
import type { Primitives } from './primitives.ts';

/** Everything a chain is made of. */
export interface ChainParts {
  readonly layout: ChainLayout;
  readonly cell: Cell;
  readonly fluids: Fluids;
  readonly index: Primitives;
  readonly inputs: InputPorts;
  readonly outputs: OutputPorts;
  /** Molar volume of the solvent against T. */ readonly molarVolume: HermiteTable;
  readonly scheme: 'exponential' | 'well-mixed';
  readonly peclet: { readonly gas: number | undefined; readonly liquid: number | undefined };
  readonly isPrescribed: boolean;
  readonly isothermal: boolean;
}

/** Arrays of one chain, filled by the sweeps and read by the Jacobian. */
interface ChainWork {
  /** Primitives, cell by cell. */ readonly primitives: Float64Array;
  /** Gas flow into each cell from below in the first sweep, and out of the top, mol/s. */
  readonly flow: Float64Array;
  topFlow: number;
  /** The exact flow through faces 0..N. */ readonly faceFlow: Float64Array;
  /** Gas mole fractions and temperature at faces 0..N. */ readonly gasFace: Float64Array;
  /** Gas fluxes through faces 0..N: K + 1 components and enthalpy. */ readonly gasFlux: Float64Array;
  /** Liquid flows, m3/s, and fluxes through faces 0..N. */
  readonly liquidFlow: Float64Array;
  readonly liquidFlux: Float64Array;
  readonly inputs: Float64Array;
  readonly outputs: Float64Array;
}

export interface Chain extends ChainParts {
  readonly work: ChainWork;
  /** Pressure in a cell, Pa. */
  pressure(c: number): number;
  /** First sweep: fills primitives and flows from the states and the inputs; sets the output pressure drop. */
  evaluateCells(y: Float64Array): void;
  /** Second sweep: fills fluxes, the rates of the chain's states and the outputs. */
  balance(y: Float64Array, dydt: Float64Array): void;
}

const face: FaceValue = { value: 0, d1: 0, d2: 0, d3: 0 };

/** Case settings that every chain shares. */
export function chainSettings(plant: Case): Pick<ChainParts, 'scheme' | 'peclet' | 'isPrescribed' | 'isothermal'> {
  const { column } = plant;
  return {
    scheme: plant.run.axialScheme,
    peclet: column.axialMixing,
    isPrescribed: column.hydraulics.model === 'prescribed',
    isothermal: column.isothermal,
  };
}

/** Assembles a chain. */
export function createChain(parts: ChainParts): Chain {
  const { layout, cell, fluids, index, inputs: ip, outputs: op, scheme, peclet, isPrescribed, isothermal } = parts;
  const { cells: N, first } = layout;
  const K = fluids.solutes;
  const components = K + 1;
  const block = 2 * components + 2;
  const fluxes = components + 1;
  const { vapourHeat, vaporisation, liquidHeat, soluteVolume, carrierHeat } = fluids;
  const P = index.size;
  const work: ChainWork = {
    primitives: new Float64Array(N * P),
    flow: new Float64Array(N),
    topFlow: 0,
    gasFace: new Float64Array((N + 1) * (components + 1)),
    faceFlow: new Float64Array(N + 1),
    gasFlux: new Float64Array((N + 1) * fluxes),
    liquidFlow: new Float64Array(N + 1),
    liquidFlux: new Float64Array((N + 1) * fluxes),
    inputs: new Float64Array(ip.size),
    outputs: new Float64Array(op.size),
  };
  const { primitives: q, flow, faceFlow, gasFace, gasFlux, liquidFlow, liquidFlux, inputs: u, outputs: o } = work;
  const exponential = scheme === 'exponential';
  const gasMixing = peclet.gas === undefined ? 0 : N / peclet.gas;
  const liquidMixing = peclet.liquid === undefined ? 0 : N / peclet.liquid;
  // Liquid at faces 0..N: flow, concentrations, temperature.
  const liquidFace = new Float64Array((N + 1) * (K + 2));

  const pressure = (c: number): number => u[ip.topPressure] + (u[ip.pressureDrop] * (c + 0.5)) / N;

  /** Value of primitive `i` leaving cell f upward through face f (f < N), inlet value known. */
  const gasFaceValue = (f: number, i: number, inlet: number): number => {
    const at = f * P + i;
    if (!exponential) return q[at];
    if (f === 0) outletFace(q[at + 2 * P], q[at + P], q[at], face);
    else if (f === N - 1) inletFace(inlet, q[at], q[at - P], face);
    else interiorFace(q[at + P], q[at], q[at - P], face);
    return face.value;
  };
  /** Value of primitive `i` leaving cell f - 1 downward through face f (f > 0). */
  const liquidFaceValue = (f: number, i: number, inlet: number): number => {
    const at = (f - 1) * P + i;
    if (!exponential) return q[at];
    if (f === N) outletFace(q[at - 2 * P], q[at - P], q[at], face);
    else if (f === 1) inletFace(inlet, q[at], q[at + P], face);
    else interiorFace(q[at - P], q[at], q[at + P], face);
    return face.value;
  };

  const evaluateCells = (y: Float64Array): void => {
    let G = u[ip.gasFlow];
    let drop = 0;
    let loss = 0;
    let held = 0;
    cell.conditions.liquidIn = u[ip.liquidFlow];
    for (let c = N - 1; c >= 0; c--) cell.settle(y, first + c * block, pressure(c), q, c * P);
    gasFaces();
    for (let c = N - 1; c >= 0; c--) {
      flow[c] = G;
      cell.exchange(G, pressure(c), q, c * P);
      G = gasOut(c, G, 0);
      drop += q[c * P + index.pressureDrop];
      loss += cell.heatLoss * (q[c * P + index.TL] - cell.conditions.ambient);
      held += q[c * P + index.holdup];
    }
    work.topFlow = G;
    o[op.pressureDrop] = drop;
    o[op.heatLoss] = loss;
    o[op.liquidHeld] = held * cell.crossSection * cell.height;
  };

  const liquidSweep = (): void => {
    const K2 = K + 2;
    const offered = u[ip.liquidFlow];
    for (let f = 0; f <= N; f++) {
      const at = f * K2;
      let flowHere: number;
      let T: number;
      if (f === 0) {
        const limit = q[index.supply];
        flowHere = offered < limit ? offered : limit;
        for (let k = 0; k < K; k++) liquidFace[at + 1 + k] = u[ip.concentration + k];
        T = u[ip.TL];
      } else {
        if (isPrescribed) {
          flowHere = liquidFlow[f - 1];
          const w = (f - 1) * P + index.transfer;
          for (let k = 1; k <= K; k++) flowHere += q[w + k] * soluteVolume[k];
        } else {
          flowHere = liquidFaceValue(f, index.demand, offered);
          if (f < N) {
            const limit = q[f * P + index.supply];
            if (flowHere > limit) flowHere = limit;
          }
        }
        for (let k = 0; k < K; k++) {
          liquidFace[at + 1 + k] = liquidFaceValue(f, index.concentration + k, u[ip.concentration + k]);
        }
        T = isothermal ? q[(f - 1) * P + index.TL] : liquidFaceValue(f, index.TL, u[ip.TL]);
      }
      liquidFace[at] = flowHere;
      liquidFace[at + K + 1] = T;
      liquidFlow[f] = flowHere;
      // Fluxes: the solutes by concentration, the solvent fills the rest of the volume.
      const v0 = readHermiteColumn(parts.molarVolume, 0, T);
      const theta = T - DATUM_TEMPERATURE;
      const fx = f * fluxes;
      let free = 1;
      let heat = 0;
      for (let k = 1; k <= K; k++) {
        const c = liquidFace[at + k];
        free -= c * soluteVolume[k];
        const flux = flowHere * c;
        liquidFlux[fx + k] = flux;
        heat += flux * liquidHeat[k];
      }
      liquidFlux[fx] = (flowHere * free) / v0;
      liquidFlux[fx + components] = (heat + liquidFlux[fx] * liquidHeat[0]) * theta;
      if (liquidMixing > 0 && f > 0 && f < N) mixLiquid(f, flowHere, v0);
    }
    o[op.accepted] = liquidFlow[0];
    o[op.liquidFlow] = liquidFlow[N];
    for (let k = 0; k < K; k++) o[op.concentration + k] = liquidFace[N * K2 + 1 + k];
    const T = liquidFace[N * K2 + K + 1];
    o[op.TL] = T;
    o[op.molarVolume] = readHermiteColumn(parts.molarVolume, 0, T);
  };

  /** Axial mixing of the liquid through an inner face; no net volume passes. */
  const mixLiquid = (f: number, flowHere: number, v0: number): void => {
    const fx = f * fluxes;
    const above = (f - 1) * P;
    const below = f * P;
    const rate = flowHere * liquidMixing;
    for (let k = 1; k <= K; k++) {
      const i = index.concentration + k - 1;
      const flux = rate * (q[above + i] - q[below + i]);
      liquidFlux[fx + k] += flux;
      liquidFlux[fx] -= (flux * soluteVolume[k]) / v0;
    }
    if (!isothermal) {
      liquidFlux[fx + components] += ((rate * liquidHeat[0]) / v0) * (q[above + index.TL] - q[below + index.TL]);
    }
  };

  /** Fluxes through face f for a flow G and the face values in `gasFace`. */
  const gasFluxes = (f: number, G: number): void => {
    const at = f * (components + 1);
    const fx = f * fluxes;
    const theta = gasFace[at + components] - DATUM_TEMPERATURE;
    let inert = 1;
    let h = 0;
    for (let k = 0; k < components; k++) {
      const yk = gasFace[at + k];
      inert -= yk;
      gasFlux[fx + k] = G * yk;
      h += yk * (vaporisation[k] + vapourHeat[k] * theta);
    }
    gasFlux[fx + components] = G * (h + inert * carrierHeat * theta);
    if (gasMixing > 0 && f > 0 && f < N && G > 0) {
      const above = (f - 1) * P;
      const below = f * P;
      for (let k = 0; k < components; k++) {
        const flux = G * gasMixing * (q[below + index.y + k] - q[above + index.y + k]);
        gasFlux[fx + k] += flux;
        gasFlux[fx + components] += flux * (vaporisation[k] + (vapourHeat[k] - carrierHeat) * theta);
      }
      gasFlux[fx + components] += G * gasMixing * carrierHeat * (q[below + index.TG] - q[above + index.TG]);
    }
  };

  /** Mole fractions and temperature at all faces, for rising gas. */
  const gasFaces = (): void => {
    const stride = components + 1;
    for (let k = 0; k < components; k++) gasFace[N * stride + k] = u[ip.y + k];
    gasFace[N * stride + components] = u[ip.TG];
    for (let c = N - 1; c >= 0; c--) {
      const at = c * stride;
      for (let k = 0; k < components; k++) gasFace[at + k] = gasFaceValue(c, index.y + k, u[ip.y + k]);
      gasFace[at + components] = isothermal ? q[c * P + index.TG] : gasFaceValue(c, index.TG, u[ip.TG]);
    }
  };

  const gasSweep = (y: Float64Array, dydt: Float64Array): void => {
    const stride = components + 1;
    let G = u[ip.gasFlow];
    faceFlow[N] = G;
    gasFluxes(N, G);
    for (let c = N - 1; c >= 0; c--) {
      const at = c * stride;
      const taken = displaced(y, dydt, c);
      const entering = G;
      G = gasOut(c, entering, taken);
      if (G < 0) {
        // Drawn back: the gas above (the cell's own at the top) comes down.
        const from = c > 0 ? c - 1 : 0;
        for (let k = 0; k < components; k++) gasFace[at + k] = q[from * P + index.y + k];
        gasFace[at + components] = q[from * P + index.TG];
        G = gasOut(c, entering, taken);
      }
      faceFlow[c] = G;
      gasFluxes(c, G);
    }
    o[op.gasFlow] = G;
    for (let k = 0; k < components; k++) o[op.y + k] = gasFace[k];
    o[op.TG] = gasFace[components];
  };

  /**
   * Gas that leaves cell c:
   *   G_out = [G_in - sum N - displaced + n X/(T C)] / (1 + n phi_out/(T C)),
   * from dn/dt with n = P V/(R T), and T's own rate C dT/dt = X - G_out phi_out (X: heat that the inflow, the exchange
   * and the transfer bring above the cell's own level).
   */
  const gasOut = (c: number, G: number, taken: number): number => {
    const p = c * P;
    const T = q[p + index.TG];
    const below = (c + 1) * (components + 1);
    const above = c * (components + 1);
    let transfer = 0;
    let carried = 0;
    let mixIn = carrierHeat;
    let mixOut = carrierHeat;
    for (let k = 0; k < components; k++) {
      const w = q[p + index.transfer + k];
      transfer += w;
      carried += w * vapourHeat[k];
      const excess = vapourHeat[k] - carrierHeat;
      mixIn += gasFace[below + k] * excess;
      mixOut += gasFace[above + k] * excess;
    }
    if (isothermal) return G - transfer - taken;
    const perTC = q[p + index.gasMoles] / (T * q[p + index.gasHeat]);
    const X = G * mixIn * (gasFace[below + components] - T) - q[p + index.heat] - carried * (q[p + index.TL] - T);
    const phi = mixOut * (gasFace[above + components] - T);
    return (G - transfer - taken + perTC * X) / (1 + perTC * phi);
  };

  /** Gas that a growing gas space and a rising pressure keep in cell c, mol/s. Liquid rates must be in `dydt` already. */
  const displaced = (y: Float64Array, dydt: Float64Array, c: number): number => {
    const p = c * P;
    const TL = q[p + index.TL];
    const at = first + c * block;
    const v0 = q[p + index.liquidRow];
    let volumeRate = -dydt[at] * v0;
    for (let k = 1; k < components; k++) volumeRate -= dydt[at + k] * soluteVolume[k];
    if (!isothermal) volumeRate -= y[at] * expansion(TL) * liquidTemperatureRate(y, dydt, at, TL);
    const pressureRate = u[ip.topPressureRate] + (u[ip.pressureDropRate] * (c + 0.5)) / N;
    return q[p + index.gasMoles] * (volumeRate / q[p + index.gasVolume] + pressureRate / pressure(c));
  };

  /** d(molar volume)/dT, m3/(mol K). */
  const expansion = (T: number): number => readHermiteSlope(parts.molarVolume, 0, T);
  const liquidTemperatureRate = (y: Float64Array, dydt: Float64Array, at: number, TL: number): number => {
    let capacity = cell.packingHeat;
    let carried = 0;
    for (let k = 0; k < components; k++) {
      capacity += y[at + k] * liquidHeat[k];
      carried += dydt[at + k] * liquidHeat[k];
    }
    return (dydt[at + components] - carried * (TL - DATUM_TEMPERATURE)) / capacity;
  };

  const balance = (y: Float64Array, dydt: Float64Array): void => {
    liquidSweep();
    for (let c = 0; c < N; c++) {
      const at = first + c * block;
      const p = c * P;
      const inn = c * fluxes;
      const out = inn + fluxes;
      const theta = q[p + index.TL] - DATUM_TEMPERATURE;
      let exchange = q[p + index.heat] - cell.heatLoss * (q[p + index.TL] - cell.conditions.ambient);
      for (let k = 0; k < components; k++) {
        const w = q[p + index.transfer + k];
        dydt[at + k] = liquidFlux[inn + k] - liquidFlux[out + k] + w;
        exchange += w * (vaporisation[k] + vapourHeat[k] * theta);
      }
      dydt[at + components] = isothermal ? 0 : liquidFlux[inn + components] - liquidFlux[out + components] + exchange;
    }
    gasSweep(y, dydt);
    for (let c = 0; c < N; c++) {
      const at = first + c * block + components + 1;
      const p = c * P;
      const out = c * fluxes;
      const inn = out + fluxes;
      const theta = q[p + index.TL] - DATUM_TEMPERATURE;
      let exchange = q[p + index.heat];
      for (let k = 0; k < components; k++) {
        const w = q[p + index.transfer + k];
        dydt[at + k] = gasFlux[inn + k] - gasFlux[out + k] - w;
        exchange += w * (vaporisation[k] + vapourHeat[k] * theta);
      }
      dydt[at + components] = isothermal ? 0 : gasFlux[inn + components] - gasFlux[out + components] - exchange;
    }
  };

  return { ...parts, work, pressure, evaluateCells, balance };
}
