/**
 * The fluids of a case as the cells read them: constants, and tables of everything that depends on temperature alone.
 * The tables group properties with the packing's constants so that a cell pays one look-up instead of some twenty
 * powers; `tests/column/fluids.test.ts` holds their error against the functions they were made of.
 */
import type { Bed, Case } from '../case/case.ts';
import { createHermiteTable, type HermiteTable } from '../numerics/hermite-table.ts';
import { fullerDiffusivity } from '../properties/gas-diffusivity.ts';
import { GAS_CONSTANT, STANDARD_GRAVITY } from '../properties/constants.ts';
import { wilkeChangDiffusivity, scaledDiffusivity } from '../properties/liquid-diffusivity.ts';
import { curveFunction } from './curve.ts';
import { equilibriumOf, type SoluteEquilibrium } from './equilibrium.ts';

/** Datum of all enthalpies, K: liquid solvent, dissolved solutes and carrier gas are zero here. */
export const DATUM_TEMPERATURE = 273.15;
/** Pressure at which the gas tables are made, Pa. */
export const TABLE_PRESSURE = 101_325;
/** Span and spacing of the tables, K. */
const TABLE_LOWER = 233.15;
const TABLE_UPPER = 433.15;
const TABLE_SPACING = 1.25;

/** Columns of the liquid table; solute k = 1..K adds the three below at LIQUID_SOLUTE + 3 (k - 1). */
export const LIQUID = { molarVolume: 0, viscosity: 1, surfaceTension: 2, vapourPressure: 3, wetting: 4 } as const;
export const LIQUID_SOLUTE = 5;
/** Pressure scale of the equilibrium (Henry's constant per mole fraction, or vapour pressure), Pa. */
export const SOLUTE_PRESSURE = 0;
/** Group of the liquid film coefficient. */
export const SOLUTE_FILM = 1;
/** Diffusivity in the liquid, m2/s. */
export const SOLUTE_DIFFUSIVITY = 2;
/** Columns of a solute. */
export const SOLUTE_COLUMNS = 3;
/** Columns of the gas table; component k = 0..K adds one at GAS_FILM + k. */
export const GAS = { viscosity: 0, heat: 1 } as const;
export const GAS_FILM = 2;

export interface Fluids {
  readonly solutes: number;
  readonly components: number;
  /** kg/mol, k = 0..K; carrier apart. */ readonly molarMass: Float64Array;
  readonly carrierMass: number;
  /** Liquid and vapour heat capacities, J/(mol K), k = 0..K; taken constant at the case's mean temperature. */
  readonly liquidHeat: Float64Array;
  readonly vapourHeat: Float64Array;
  readonly carrierHeat: number;
  /** Enthalpy of the vapour over the liquid at the datum, J/mol, k = 0..K. */
  readonly vaporisation: Float64Array;
  /** Partial molar volumes of the solutes, m3/mol, index k (0 unused). */
  readonly soluteVolume: Float64Array;
  readonly equilibrium: readonly SoluteEquilibrium[];
  readonly isVolatile: boolean;
  /** Mean temperature at which heat capacities were taken, K. */ readonly meanTemperature: number;
  /** Functions of T for reports and checks. */
  readonly solventDensity: (T: number) => number;
  readonly solventViscosity: (T: number) => number;
  readonly surfaceTension: (T: number) => number;
  readonly vapourPressure: (T: number) => number;
  readonly gasViscosity: (T: number) => number;
  readonly liquidDiffusivity: readonly ((T: number) => number)[];
  /** At 101 325 Pa, k = 0..K. */ readonly gasDiffusivity: readonly ((T: number) => number)[];
  readonly gasConductivity: (T: number) => number;
}

/** Slope R T^2 d ln p / dT of a pressure curve: its heat of vaporisation, J/mol. */
function heatFromSlope(pressure: (T: number) => number, T: number): number {
  const d = 0.05;
  return (GAS_CONSTANT * T * T * (Math.log(pressure(T + d)) - Math.log(pressure(T - d)))) / (2 * d);
}

function isVolatileCurve(plant: Case): boolean {
  return plant.column.evaporation && plant.solvent.vapourPressure !== undefined;
}

/** Gathers constants and property functions; the heat of vaporisation agrees with the slope of the equilibrium. */
export function createFluids(plant: Case): Fluids {
  const { solvent, carrier, solutes } = plant;
  const components = solutes.length + 1;
  const meanTemperature = 0.5 * (plant.liquid.feed.temperature + plant.gas.feed.temperature);
  const solventDensity = curveFunction(solvent.density);
  const solventViscosity = curveFunction(solvent.viscosity);
  const surfaceTension = curveFunction(solvent.surfaceTension);
  const isVolatile = isVolatileCurve(plant);
  const vapourPressure = solvent.vapourPressure === undefined ? (): number => 0 : curveFunction(solvent.vapourPressure);
  const gasViscosity = curveFunction(carrier.viscosity);
  const gasConductivity = curveFunction(carrier.conductivity);

  const molarMass = Float64Array.of(solvent.molarMass, ...solutes.map((k) => k.molarMass));
  const liquidHeat = Float64Array.of(
    curveFunction(solvent.heatCapacity)(meanTemperature),
    ...solutes.map((k) => k.heatCapacity),
  );
  const vapourHeat = Float64Array.of(
    curveFunction(solvent.vapourHeatCapacity)(meanTemperature),
    ...solutes.map((k) => curveFunction(k.vapourHeatCapacity)(meanTemperature)),
  );
  const equilibrium = solutes.map((k) => equilibriumOf(k.equilibrium, solventDensity, solvent.molarMass));
  const vaporisation = new Float64Array(components);
  const toDatum = (k: number): number => (vapourHeat[k] - liquidHeat[k]) * (meanTemperature - DATUM_TEMPERATURE);
  if (isVolatile) vaporisation[0] = heatFromSlope(vapourPressure, meanTemperature) - toDatum(0);
  solutes.forEach((solute, i) => {
    const k = i + 1;
    const heat = solute.heatOfAbsorption ?? heatFromSlope(equilibrium[i].pressureScale, meanTemperature);
    vaporisation[k] = heat - toDatum(k);
  });
  const liquidDiffusivity = solutes.map((k) => {
    const measured = k.liquidDiffusivity;
    if (measured !== undefined) {
      const mu = solventViscosity(measured.temperature);
      return (T: number): number => scaledDiffusivity(measured.value, measured.temperature, mu, T, solventViscosity(T));
    }
    return (T: number): number =>
      wilkeChangDiffusivity(T, solventViscosity(T), solvent.molarMass, solvent.association, k.boilingVolume * 1e-6);
  });
  const fuller =
    (M: number, volume: number) =>
    (T: number): number =>
      fullerDiffusivity(T, TABLE_PRESSURE, M, carrier.molarMass, volume, carrier.diffusionVolume);
  const gasDiffusivity = [
    fuller(solvent.molarMass, solvent.diffusionVolume),
    ...solutes.map((k) => {
      const measured = k.gasDiffusivity;
      if (measured === undefined) return fuller(k.molarMass, k.diffusionVolume);
      const at = (measured.value * measured.pressure) / TABLE_PRESSURE;
      return (T: number): number => at * Math.exp(1.75 * Math.log(T / measured.temperature)); // Fuller's exponent
    }),
  ];
  return {
    solutes: solutes.length,
    components,
    molarMass,
    carrierMass: carrier.molarMass,
    liquidHeat,
    vapourHeat,
    carrierHeat: curveFunction(carrier.heatCapacity)(meanTemperature),
    vaporisation,
    soluteVolume: Float64Array.of(0, ...solutes.map((k) => k.molarVolume)),
    equilibrium,
    isVolatile,
    meanTemperature,
    solventDensity,
    solventViscosity,
    surfaceTension,
    vapourPressure,
    gasViscosity,
    liquidDiffusivity,
    gasDiffusivity,
    gasConductivity,
  };
}

/** Onda's constants, which go into the tables. */
export interface FilmConstants {
  /** Onda's 1.45, 0.0051 and 5.23 or 2.00. */
  readonly area: number;
  readonly liquid: number;
  readonly gas: number;
}

/** Liquid and gas tables of one bed's packing. */
export interface FluidTables {
  readonly liquid: HermiteTable;
  readonly gas: HermiteTable;
}

/** Makes the tables of one packing. */
export function createFluidTables(fluids: Fluids, bed: Bed, film: FilmConstants): FluidTables {
  const { area, nominalSize, criticalSurfaceTension } = bed.packing;
  const g = STANDARD_GRAVITY;
  const M0 = fluids.molarMass[0];
  const rho = fluids.solventDensity;
  const mu = fluids.solventViscosity;
  const sigma = fluids.surfaceTension;
  const wetting = (T: number): number =>
    film.area *
    Math.pow(criticalSurfaceTension / sigma(T), 0.75) *
    Math.pow(area * mu(T), -0.1) *
    Math.pow(area / (rho(T) ** 2 * g), -0.05) *
    Math.pow(rho(T) * sigma(T) * area, -0.2);
  const liquidFilm =
    (D: (T: number) => number) =>
    (T: number): number =>
      film.liquid *
      Math.pow(area * nominalSize, 0.4) *
      Math.pow(mu(T), -2 / 3) *
      Math.pow(mu(T) / (rho(T) * D(T)), -0.5) *
      Math.cbrt((mu(T) * g) / rho(T));
  const gasGroup = film.gas * area * Math.pow(area * nominalSize, -2);
  const muG = fluids.gasViscosity;
  const density = (T: number): number => (TABLE_PRESSURE * fluids.carrierMass) / (GAS_CONSTANT * T);
  const gasFilm =
    (D: (T: number) => number) =>
    (T: number): number =>
      gasGroup * D(T) * Math.pow(area * muG(T), -0.7) * Math.cbrt(muG(T) / (density(T) * D(T)));
  const heat = (T: number): number => {
    const cp = fluids.carrierHeat / fluids.carrierMass;
    const prandtl = (muG(T) * cp) / fluids.gasConductivity(T);
    return gasGroup * Math.pow(area * muG(T), -0.7) * muG(T) * cp * Math.pow(prandtl, -2 / 3);
  };
  const intervals = Math.round((TABLE_UPPER - TABLE_LOWER) / TABLE_SPACING);
  const liquidColumns = [
    (T: number): number => M0 / rho(T),
    mu,
    sigma,
    fluids.isVolatile ? fluids.vapourPressure : (): number => 0,
    wetting,
    ...fluids.equilibrium.flatMap((e, i) => [
      e.pressureScale,
      liquidFilm(fluids.liquidDiffusivity[i]),
      fluids.liquidDiffusivity[i],
    ]),
  ];
  const gasColumns = [muG, heat, ...fluids.gasDiffusivity.map(gasFilm)];
  return {
    liquid: createHermiteTable(liquidColumns, TABLE_LOWER, TABLE_UPPER, intervals),
    gas: createHermiteTable(gasColumns, TABLE_LOWER, TABLE_UPPER, intervals),
  };
}
