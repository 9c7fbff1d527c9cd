/**
 * Effective area and film coefficients of a bed as its case asks for them, on the local, current rates:
 * Onda, Takeuchi and Okumoto (default), Billet and Schultes, or measured coefficients.
 * A drained film keeps a small area; near flooding area and coefficients fall, below the loading point nothing is taken.
 */
import type { Bed, Case } from '../case/case.ts';
import type { Fluids, FilmConstants } from './fluids.ts';
import { GAS_CONSTANT, STANDARD_GRAVITY } from '../properties/constants.ts';
import { curveFunction } from './curve.ts';
import {
  GAS,
  GAS_FILM,
  LIQUID,
  LIQUID_SOLUTE,
  SOLUTE_COLUMNS,
  SOLUTE_DIFFUSIVITY,
  SOLUTE_FILM,
  TABLE_PRESSURE,
} from './fluids.ts';

/** What the law finds; one object reused. */
export interface FilmState {
  /** Effective area, m2/m3. */
  area: number;
  /** Gas film k_G R T of component k = 0..K, m/s, on the effective area. */
  readonly gas: Float64Array;
  /** Liquid film of solute k = 1..K, m/s (index 0 unused). */
  readonly liquid: Float64Array;
  /** Sensible heat over the dry area, W/(m2 K). */
  heat: number;
  /** Measured overall coefficient K_y a, mol/(m3 s); 0: films decide. */
  overall: number;
  /** Whether the gas film takes the high-flux correction; measured coefficients are used as stated. */
  readonly corrected: boolean;
}

export interface FilmLaw {
  readonly state: FilmState;
  readonly constants: FilmConstants;
  /**
   * @param uL - Superficial liquid velocity that leaves the segment, m/s.
   * @param liquidDensity - kg/m3.
   * @param holdup - m3/m3.
   * @param massFlux - Gas, kg/(m2 s).
   * @param gasDensity - kg/m3.
   * @param liquid - Row of the liquid table.
   * @param gas - Row of the gas table.
   * @param pressure - Pa.
   * @param loading - 0 at low load, 1 at the flood point.
   * @param molarFlow - Gas, mol/s.
   * @param TG - Gas temperature, K.
   */
  evaluate(
    uL: number,
    liquidDensity: number,
    holdup: number,
    massFlux: number,
    gasDensity: number,
    liquid: Float64Array,
    gas: Float64Array,
    pressure: number,
    loading: number,
    molarFlow: number,
    TG: number,
  ): void;
}

/** Onda's constants, [Onda1968] equations 1-3; 2.00 below 15 mm. */
const ONDA_SMALL = 0.015;
/**
 * Liquid mass flux below which the wetted area falls linearly instead of as L^0.4, kg/(m2 s). At 1 kg/(m2 s), a third
 * of the usual minimum, the area moves by 0.006 % of itself.
 */
const WETTING_SMOOTHING = 1e-4;
/**
 * Loading (feedback ratio, 1 at the flood point) at which flooding begins to cost transfer, and at which the cost is
 * full. At nine tenths of the flooding velocity the loading is 0.35 to 0.37 by Stichlmair's law (35 mm metal ring, liquid
 * at 2 to 20 mm/s) and 0.39 by Billet and Schultes'; at seven tenths, 0.11 and 0.04. Common practice that flooding ruins
 * transfer; the width is judgement, no source.
 */
const PENALTY_ONSET = 0.36;
const PENALTY_FULL = 1.6;
/** Gas mass flux below which film coefficients are taken at this flux, kg/(m2 s): stagnant gas still diffuses. */
const LEAST_MASS_FLUX = 1e-4;
/** Share of a design rate below which measured coefficients' powers stop. */
const LEAST_SHARE = 1e-9;
/** Liquid velocity below which Billet and Schultes' area falls linearly, m/s (as `WETTING_SMOOTHING`, over 1000 kg/m3). */
const BILLET_SMOOTHING = 1e-7;

/** Fourth root of the sum of fourth powers: the larger of two, smoothly. */
function larger(a: number, b: number): number {
  const a2 = a * a;
  const b2 = b * b;
  return Math.sqrt(Math.sqrt(a2 * a2 + b2 * b2));
}

/** Share of the transfer that flooding leaves. */
export function floodedShare(loading: number, left: number): number {
  if (loading <= PENALTY_ONSET) return 1;
  const t = Math.min(1, (loading - PENALTY_ONSET) / (PENALTY_FULL - PENALTY_ONSET));
  return 1 - (1 - left) * t * t * (3 - 2 * t);
}

/** Builds the law of one bed's zone. */
export function createFilmLaw(plant: Case, fluids: Fluids, bed: Bed, areaShare: number): FilmLaw {
  const { column } = plant;
  const { packing } = bed;
  const { transfer } = column;
  const a = packing.area;
  const K = fluids.solutes;
  const state: FilmState = {
    area: 0,
    gas: new Float64Array(K + 1),
    liquid: new Float64Array(K + 1),
    heat: 0,
    overall: 0,
    corrected: transfer.model !== 'measured',
  };
  const usual = packing.nominalSize < ONDA_SMALL ? 2 : 5.23;
  const constants: FilmConstants =
    transfer.model === 'onda'
      ? {
          area: transfer.areaFactor,
          liquid: transfer.kLFactor * transfer.scaleKL,
          gas: (transfer.kGFactor ?? usual) * transfer.scaleKG,
        }
      : { area: 1.45, liquid: 0.0051, gas: usual };
  const scaleArea = transfer.model === 'measured' ? 1 : transfer.scaleArea;
  const { staticAreaShare } = column;
  const { transferLeft } = column.flooding;
  const billet = transfer.model === 'billet-schultes' && packing.billet !== undefined ? packing.billet : undefined;
  const billetScale =
    transfer.model === 'billet-schultes' ? { kL: transfer.scaleKL, kG: transfer.scaleKG } : { kL: 1, kG: 1 };
  const dh = (4 * packing.voidFraction) / a;
  const billetLiquid = billet === undefined ? 0 : (billet.CL * Math.pow(12, 1 / 6) * billetScale.kL) / Math.sqrt(dh);
  const billetGas =
    billet === undefined
      ? 0
      : (billet.CV * billetScale.kG * Math.sqrt(a / dh)) / (constants.gas * a * Math.pow(a * packing.nominalSize, -2));
  const totalHeight = column.beds.reduce((sum, b) => sum + b.height, 0);
  const measured = measuredCoefficients(plant, totalHeight);
  const designGas = plant.gas.feed.rate * areaShare;
  const designLiquid = plant.liquid.feed.rate * areaShare;
  const crossSection = 0.25 * Math.PI * column.diameter ** 2 * areaShare;

  return {
    state,
    constants,
    evaluate(uL, liquidDensity, holdup, massFlux, gasDensity, liquid, gas, pressure, loading, molarFlow, TG) {
      const share = floodedShare(loading, transferLeft);
      const logGas = Math.log(massFlux > LEAST_MASS_FLUX ? massFlux : LEAST_MASS_FLUX);
      const gasPower = Math.exp(0.7 * logGas);
      const gasGroup = (gasPower * TABLE_PRESSURE) / pressure;
      state.heat = gas[GAS.heat] * gasPower * share;
      for (let k = 0; k <= K; k++) state.gas[k] = gas[GAS_FILM + k] * gasGroup * share;
      // Onda's area and liquid film.
      const L = liquidDensity * (uL > 0 ? uL : 0);
      const logL = Math.log(L + WETTING_SMOOTHING);
      const spread = Math.exp(0.6 * logL);
      const wetting = liquid[LIQUID.wetting];
      const X = (wetting * L) / spread;
      const filled = X > 1e-8 ? (1 - Math.exp(-X)) / X : 1; // (1 - exp(-X))/X
      const film = holdup > 0 ? holdup / (holdup + 1e-4) : 0;
      const drained = staticAreaShare * a * film;
      state.area = larger(a * X * filled * scaleArea, drained) * share;
      state.overall = 0;
      if (measured !== undefined) {
        const rates =
          share *
          Math.exp(
            measured.gasExponent * Math.log(Math.max(molarFlow, LEAST_SHARE * designGas) / designGas) +
              measured.liquidExponent *
                Math.log(Math.max(uL * crossSection, LEAST_SHARE * designLiquid) / designLiquid),
          );
        state.overall = measured.overall * rates;
        if (measured.overall === 0) {
          // Stated as H_G and H_L; the solvent's film and the heat stay Onda's.
          const perGas = (rates * GAS_CONSTANT * TG) / (pressure * state.area);
          const perLiquid = (rates * liquid[LIQUID.molarVolume]) / state.area;
          for (let k = 1; k <= K; k++) {
            state.gas[k] = measured.gasFilm * perGas;
            state.liquid[k] = measured.liquidFilm * perLiquid;
          }
        }
        return;
      }
      const perDepth = holdup > 1e-6 ? a / holdup : a * 1e6; // area over film volume, 1/m
      if (billet !== undefined) {
        // [Billet1999]: a_Ph/a goes as u^0.4, k_L as (u/h)^0.5; the gas film differs from Onda's by a factor that no
        // component's diffusivity enters, so it scales films and heat alike.
        const nu = liquid[LIQUID.viscosity] / liquidDensity;
        const u = uL > 0 ? uL : 0;
        const power = u * Math.exp(-0.6 * Math.log(u + BILLET_SMOOTHING));
        const groups =
          -0.5 * Math.log(a * dh) -
          0.2 * Math.log(dh / nu) +
          0.75 * Math.log((liquidDensity * dh) / liquid[LIQUID.surfaceTension]) +
          0.45 * Math.log(STANDARD_GRAVITY * dh);
        state.area = larger(scaleArea * a * 1.5 * Math.exp(groups) * power, drained) * share;
        const reynolds = logGas - Math.log(a * gas[GAS.viscosity]);
        const open = Math.max(packing.voidFraction - holdup, 0.05 * packing.voidFraction);
        const ratio = (billetGas * Math.exp(0.05 * reynolds)) / Math.sqrt(open);
        state.heat *= ratio;
        for (let k = 0; k <= K; k++) state.gas[k] *= ratio;
        const velocity = holdup > 1e-6 ? u / holdup : 0;
        for (let k = 1; k <= K; k++) {
          const D = liquid[LIQUID_SOLUTE + SOLUTE_COLUMNS * (k - 1) + SOLUTE_DIFFUSIVITY];
          state.liquid[k] = larger(billetLiquid * Math.sqrt(velocity * D), D * perDepth) * share;
        }
        return;
      }
      const perArea = spread / (a * wetting * filled); // liquid rate over wetted area, finite at no flow
      const liquidPower = Math.exp((2 / 3) * Math.log(perArea));
      for (let k = 1; k <= K; k++) {
        const at = LIQUID_SOLUTE + SOLUTE_COLUMNS * (k - 1);
        const stagnant = liquid[at + SOLUTE_DIFFUSIVITY] * perDepth;
        state.liquid[k] = larger(liquid[at + SOLUTE_FILM] * liquidPower, stagnant) * share;
      }
    },
  };
}

/** Coefficients of a measured transfer at the design rates: overall, or both films, mol/(m3 s). */
function measuredCoefficients(
  plant: Case,
  bedHeight: number,
): { overall: number; gasFilm: number; liquidFilm: number; gasExponent: number; liquidExponent: number } | undefined {
  const { transfer, diameter } = plant.column;
  if (transfer.model !== 'measured') return undefined;
  const { statedAs, gasExponent, liquidExponent } = transfer;
  const crossSection = 0.25 * Math.PI * diameter ** 2;
  const gasFlux = plant.gas.feed.rate / crossSection;
  const density = curveFunction(plant.solvent.density)(plant.liquid.feed.temperature);
  const liquidFlux = (plant.liquid.feed.rate * density) / plant.solvent.molarMass / crossSection;
  const films = { overall: 0, gasFilm: 0, liquidFilm: 0, gasExponent, liquidExponent };
  switch (statedAs.kind) {
    case 'NOG':
      return { ...films, overall: (statedAs.value * gasFlux) / bedHeight };
    case 'HOG':
      return { ...films, overall: gasFlux / statedAs.value };
    case 'KGa':
      return { ...films, overall: statedAs.value * plant.column.topPressure };
    case 'Kya':
      return { ...films, overall: statedAs.value };
    case 'HG-HL':
      return { ...films, gasFilm: gasFlux / statedAs.HG, liquidFilm: liquidFlux / statedAs.HL };
  }
}
