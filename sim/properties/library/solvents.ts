// Solvents: functions of temperature that the column samples into tables, with their origin.
// A dissolved solute's effect on them is left out: it stays below 1 % in the dilute liquids meant here.

import { antoinePressure, antoineSlope } from '../antoine.ts';
import type { TemperatureFunction } from '../equilibrium/law.ts';
import { WATER_ASSOCIATION } from '../liquid-diffusivity.ts';
import { demo, seen } from '../provenance.ts';
import type { Sourced } from '../provenance.ts';
import { waterDensity, waterDensitySlope } from '../water-density.ts';
import { waterHeatCapacity } from '../water-heat-capacity.ts';
import { waterSaturationPressure, waterSaturationSlope } from '../water-saturation-pressure.ts';
import { waterSurfaceTension } from '../water-surface-tension.ts';
import { waterThermalConductivity } from '../water-thermal-conductivity.ts';
import { waterViscosity } from '../water-viscosity.ts';

/** A solvent. Every function takes T in K and returns SI. */
export interface Solvent {
  readonly id: string;
  readonly name: string;
  /** kg/mol. */
  readonly molarMass: number;
  /** kg/m3. */
  density(T: number): number;
  /** d ln rho / dT, 1/K. */
  densitySlope(T: number): number;
  /** Pa s. */
  viscosity(T: number): number;
  /** N/m. */
  surfaceTension(T: number): number;
  /** J/(kg K). */
  heatCapacity(T: number): number;
  /** W/(m K). */
  thermalConductivity(T: number): number;
  /** Vapour pressure, Pa; 0 for a solvent taken as not volatile. */
  saturationPressure(T: number): number;
  /** d ln psat / dT, 1/K; 0 where the pressure is 0. */
  saturationSlope(T: number): number;
  /** Whether the solvent evaporates into the gas and needs a vapour balance. */
  readonly volatile: boolean;
  /** Association factor for liquid diffusivities. */
  readonly association: number;
  /** Range in which all functions hold, K. */
  readonly TMin: number;
  readonly TMax: number;
  /** Origin of each group of numbers, for results. */
  readonly provenance: Readonly<Record<string, Sourced<string>>>;
}

/** Molar mass of water, kg/mol [IF97]. */
export const WATER_MOLAR_MASS = 0.018015268;

/** Water, 273.15-373.15 K at about atmospheric pressure. */
export const water: Solvent = {
  id: 'water',
  name: 'water',
  molarMass: WATER_MOLAR_MASS,
  density: waterDensity,
  densitySlope: waterDensitySlope,
  viscosity: waterViscosity,
  surfaceTension: waterSurfaceTension,
  heatCapacity: waterHeatCapacity,
  thermalConductivity: waterThermalConductivity,
  saturationPressure: waterSaturationPressure,
  saturationSlope: waterSaturationSlope,
  volatile: true,
  association: WATER_ASSOCIATION,
  TMin: 273.15,
  TMax: 373.15,
  provenance: {
    saturation: seen('IAPWS-IF97 region 4', '[IF97] equation 30'),
    liquid: seen('density, heat capacity, viscosity, conductivity at 0.1 MPa', '[SR6-08]'),
    surfaceTension: seen('IAPWS R1-76', '[R1-76] equation 1'),
  },
};

/** Numbers of an oil; every one may be overridden by a case. */
interface OilData {
  /** kg/mol. */
  readonly molarMass: Sourced;
  /** Temperature at which density, viscosity and surface tension are given, K. */
  readonly TRef: Sourced;
  /** kg/m3. */
  readonly density: Sourced;
  /** d rho/dT, kg/(m3 K); negative. */
  readonly densitySlope: Sourced;
  /** Pa s. */
  readonly viscosity: Sourced;
  /** b of mu = muRef exp[b (1/T - 1/TRef)], K (Andrade). */
  readonly viscosityExponent: Sourced;
  /** N/m. */
  readonly surfaceTension: Sourced;
  /** d sigma/dT, N/(m K); negative. */
  readonly surfaceTensionSlope: Sourced;
  /** J/(kg K) at TRef. */
  readonly heatCapacity: Sourced;
  /** d cp/dT, J/(kg K2). */
  readonly heatCapacitySlope: Sourced;
  /** W/(m K). */
  readonly thermalConductivity: Sourced;
}

/**
 * A heavy hydrocarbon oil as used to wash benzene out of gas: M 260, density, viscosity and surface
 * tension near 300 K are those of the textbook example; how they move with temperature is demo data.
 */
const HEAVY_OIL_DATA: OilData = {
  molarMass: seen(0.26, '[Treybal1980] illustrations 6.6 and 8.2'),
  TRef: seen(300, '[Treybal1980] illustration 6.6'),
  density: seen(840, '[Treybal1980] illustration 6.6'),
  densitySlope: demo(-0.65, 'order of a mineral oil; override with your oil'),
  viscosity: seen(2e-3, '[Treybal1980] illustration 6.6'),
  viscosityExponent: demo(2000, 'order of a thin mineral oil; override with your oil'),
  surfaceTension: seen(0.03, '[Treybal1980] illustration 6.6'),
  surfaceTensionSlope: demo(-8e-5, 'order of a hydrocarbon oil; override with your oil'),
  heatCapacity: demo(1900, 'order of a mineral oil; override with your oil'),
  heatCapacitySlope: demo(4, 'order of a mineral oil; override with your oil'),
  thermalConductivity: demo(0.13, 'order of a mineral oil; override with your oil'),
};

/**
 * A not volatile oil from its data.
 *
 *   rho = rho0 + s (T - TRef),  mu = mu0 exp[b (1/T - 1/TRef)],  sigma and cp linear
 *
 * @param data - The oil's numbers; see `HEAVY_OIL_DATA`.
 * @returns A solvent, 283-343 K. Vapour pressure zero: an oil of M 260 has some Pa at most.
 * Source: viscosity [Andrade1934]; the rest linear by definition.
 */
function oilSolvent(data: OilData, id = 'heavy-oil', name = 'heavy absorption oil'): Solvent {
  const TRef = data.TRef.value;
  const density = (T: number): number => data.density.value + data.densitySlope.value * (T - TRef);
  return {
    id,
    name,
    molarMass: data.molarMass.value,
    density,
    densitySlope: (T) => data.densitySlope.value / density(T),
    viscosity: (T) => data.viscosity.value * Math.exp(data.viscosityExponent.value * (1 / T - 1 / TRef)),
    surfaceTension: (T) => data.surfaceTension.value + data.surfaceTensionSlope.value * (T - TRef),
    heatCapacity: (T) => data.heatCapacity.value + data.heatCapacitySlope.value * (T - TRef),
    thermalConductivity: () => data.thermalConductivity.value,
    saturationPressure: () => 0,
    saturationSlope: () => 0,
    volatile: false,
    association: 1,
    TMin: 283,
    TMax: 343,
    provenance: Object.fromEntries(
      Object.entries(data).map(([key, entry]: [string, Sourced]) => [
        key,
        { value: String(entry.value), source: entry.source, verified: entry.verified },
      ]),
    ),
  };
}

/** The generic heavy oil. */
export const heavyOil: Solvent = oilSolvent(HEAVY_OIL_DATA);

/** Solvents by the word a case uses. */
export const SOLVENTS: Readonly<Record<string, Solvent>> = { water, 'heavy-oil': heavyOil };

/** Molar concentration of a pure solvent, mol/m3, with its relative slope, for Henry's law. */
export function solventConcentration(solvent: Solvent): TemperatureFunction {
  return {
    value: (T) => solvent.density(T) / solvent.molarMass,
    relativeSlope: (T) => solvent.densitySlope(T),
  };
}

/** Vapour pressure of a volatile solvent with its relative slope, for Raoult's law. */
export function solventSaturation(solvent: Solvent): TemperatureFunction {
  return {
    value: (T) => solvent.saturationPressure(T),
    relativeSlope: (T) => solvent.saturationSlope(T),
  };
}

/** Antoine vapour pressure with its relative slope, for a pure solute. */
export function antoineSaturation(constants: Parameters<typeof antoinePressure>[0]): TemperatureFunction {
  return {
    value: (T) => antoinePressure(constants, T),
    relativeSlope: (T) => antoineSlope(constants, T),
  };
}
