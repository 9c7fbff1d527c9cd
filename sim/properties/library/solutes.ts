// Solutes: molecular properties and what is published of each in water. A field that is not known is
// absent. Acids and bases are listed as the un-ionised molecule; dissociation belongs elsewhere.

import type { AntoineConstants } from '../antoine.ts';
import type { HenryConstant } from '../equilibrium/henry.ts';
import type { NrtlConstants } from '../equilibrium/nrtl.ts';
import type { VanLaarConstants } from '../equilibrium/van-laar.ts';
import { diffusionVolume } from '../gas-diffusivity.ts';
import type { HeatCapacityPolynomial } from '../ideal-gas.ts';
import { idealGasHeatCapacity } from '../ideal-gas.ts';
import { computed, fromMemory, seen } from '../provenance.ts';
import type { Sourced } from '../provenance.ts';

/** A liquid diffusivity with the state it belongs to; D mu/T carries it elsewhere. */
interface LiquidDiffusivity {
  /** m2/s. */
  readonly D: number;
  /** K. */
  readonly T: number;
  /** Viscosity of the solvent in that state, Pa s. */
  readonly mu: number;
}

/** A transferring component. */
export interface Solute {
  readonly id: string;
  readonly name: string;
  readonly cas: string;
  /** kg/mol. */
  readonly molarMass: Sourced;
  /** Solubility of the molecule in water at 298.15 K and its temperature dependence. */
  readonly henryInWater?: Sourced<HenryConstant>;
  /** Diffusion volume, 1969 set; dimensionless. */
  readonly diffusionVolume: Sourced;
  /** Molar volume at the normal boiling point, m3/mol, for Wilke and Chang. */
  readonly boilingVolume: Sourced;
  /** Diffusivity in water at 298.15 K, m2/s. */
  readonly diffusivityInWater?: Sourced;
  /** Diffusivity in other solvents, by the solvent's id. */
  readonly liquidDiffusivity?: Readonly<Record<string, Sourced<LiquidDiffusivity>>>;
  /** Volume that one mole adds to the liquid, m3/mol. */
  readonly liquidVolume: Sourced;
  /** Ideal-gas heat capacity, J/(mol K). */
  readonly gasHeatCapacity: Sourced<HeatCapacityPolynomial>;
  /** Heat capacity in the liquid, J/(mol K). */
  readonly liquidHeatCapacity: Sourced;
  /** Vapour pressure of the pure liquid. */
  readonly antoine?: Sourced<AntoineConstants>;
  /** van Laar constants with water (1 = solute), fitted at 1 atm. */
  readonly vanLaarInWater?: Sourced<VanLaarConstants>;
  /** NRTL constants with water (1 = solute), fitted at 1 atm. */
  readonly nrtlInWater?: Sourced<NrtlConstants>;
  /** What a user must know before trusting a result. */
  readonly note?: string;
}

const KYLE = '[Kyle1984] ideal-gas heat capacities, as reprinted in open course tables';
const HIMMELBLAU = '[Himmelblau2022] table F.1';
const REID = '[Reid1987] property data bank';
const SVN = '[Smith2018] table B.2';
const PERRY_VLE = '[Perry2008] table 13-3, after [Gmehling1977]';
const FULLER_ATOMS = 'sum of atomic volumes of [Fuller1969]';
const FULLER = '[Fuller1969], as restated in [Poling2001] table 11-1';
const LE_BAS = '[LeBas1915] increments, as in [Poling2001] table 4-8';
const DENSITY = 'molar mass over liquid density near 298 K, [CRC2004]';
const CRC_CP = '[CRC2004] liquid heat capacity at 298 K';

/** Rise over the ideal gas taken where no heat capacity in the liquid was found, J/(mol K). */
const LIQUID_EXCESS = 40;

function kelvin(a: number, b: number, c: number, d: number, TMax = 1500): HeatCapacityPolynomial {
  return { a, b, c, d, offset: 0, TMin: 273, TMax };
}

function celsius(a: number, b: number, c: number, d: number): HeatCapacityPolynomial {
  return { a, b, c, d, offset: 273.15, TMin: 273, TMax: 1473 };
}

function estimatedLiquid(gas: HeatCapacityPolynomial): Sourced {
  return computed(
    Math.round(idealGasHeatCapacity(gas, 298.15) + LIQUID_EXCESS),
    'ideal gas at 298 K plus 40 J/(mol K): common practice, no source',
  );
}

/** Constants of log10(p/mmHg) = A - B/(t + C) in the form used here. */
function fromDecadic(A: number, B: number, C: number, TMin: number, TMax: number): AntoineConstants {
  return { A: A * Math.LN10 + Math.log(0.1333224), B: B * Math.LN10, C, TMin, TMax };
}

const CALORIE = 4.184;
function nrtlCalories(b12: number, b21: number, alpha: number): NrtlConstants {
  return { b12: b12 * CALORIE, b21: b21 * CALORIE, alpha };
}

export const acetone: Solute = {
  id: 'acetone',
  name: 'acetone',
  cas: '67-64-1',
  molarMass: seen(58.08e-3, HIMMELBLAU),
  henryInWater: seen({ H: 0.27, B: 5500 }, '[Sander2015], entry of Sander et al. 2011'),
  diffusionVolume: computed(diffusionVolume({ C: 3, H: 6, O: 1 }), FULLER_ATOMS),
  boilingVolume: fromMemory(74.0e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.28e-9, 'measured values 1.16-1.28e-9; Wilke-Chang gives 1.28e-9'),
  liquidVolume: fromMemory(74.0e-6, DENSITY),
  gasHeatCapacity: seen(celsius(71.96, 20.1e-2, -12.78e-5, 34.76e-9), HIMMELBLAU),
  liquidHeatCapacity: fromMemory(126.3, CRC_CP),
  antoine: seen({ A: 14.3145, B: 2756.22, C: 228.06, TMin: 247, TMax: 350 }, SVN),
  vanLaarInWater: fromMemory({ A12: 2.1041, A21: 1.5555 }, PERRY_VLE),
  nrtlInWater: fromMemory(nrtlCalories(631.05, 1197.41, 0.5343), PERRY_VLE),
  note: 'above x = 0.01 use van Laar anchored on the Henry constant',
};

export const methanol: Solute = {
  id: 'methanol',
  name: 'methanol',
  cas: '67-56-1',
  molarMass: seen(32.042e-3, '[Cengel2002] table A-1'),
  henryInWater: seen({ H: 2.0, B: 5600 }, '[Sander1999] list and open species table (203 M/atm)'),
  diffusionVolume: computed(diffusionVolume({ C: 1, H: 4, O: 1 }), FULLER_ATOMS),
  boilingVolume: fromMemory(37.0e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.6e-9, 'measured about 1.57-1.6e-9; a handbook prints 0.84e-9'),
  liquidVolume: fromMemory(40.7e-6, DENSITY),
  gasHeatCapacity: seen(kelvin(19, 9.152e-2, -1.22e-5, -8.039e-9, 1000), KYLE),
  liquidHeatCapacity: fromMemory(81.1, CRC_CP),
  antoine: seen({ A: 16.5785, B: 3638.27, C: 239.5, TMin: 262, TMax: 356 }, SVN),
  vanLaarInWater: fromMemory({ A12: 0.8041, A21: 0.5619 }, PERRY_VLE),
  nrtlInWater: fromMemory(nrtlCalories(-48.67, 610.4, 0.3001), PERRY_VLE),
};

export const ethanol: Solute = {
  id: 'ethanol',
  name: 'ethanol',
  cas: '64-17-5',
  molarMass: seen(46.07e-3, '[Cengel2002] table A-1'),
  henryInWater: seen({ H: 1.9, B: 6400 }, '[Sander1999] list and open species table (193 M/atm)'),
  diffusionVolume: computed(diffusionVolume({ C: 2, H: 6, O: 1 }), FULLER_ATOMS),
  boilingVolume: fromMemory(59.2e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.24e-9, 'measured 1.24e-9; a handbook prints 0.84e-9'),
  liquidVolume: fromMemory(58.7e-6, DENSITY),
  gasHeatCapacity: fromMemory(kelvin(9.014, 2.141e-1, -8.39e-5, 1.373e-9), REID),
  liquidHeatCapacity: fromMemory(112.3, CRC_CP),
  antoine: seen({ A: 16.8958, B: 3795.17, C: 230.918, TMin: 276, TMax: 369 }, SVN),
  note: 'two printed polynomials, [Kyle1984] and [Smith2018], give a gas heat capacity 13 % above the measured one: not used',
  vanLaarInWater: seen({ A12: 1.6798, A21: 0.9227 }, '[Perry2008] table 13-3 (seen quoted)'),
  nrtlInWater: fromMemory(nrtlCalories(-109.63, 1332.31, 0.3031), PERRY_VLE),
};

export const propanol: Solute = {
  id: '2-propanol',
  name: '2-propanol',
  cas: '67-63-0',
  molarMass: fromMemory(60.096e-3, 'sum of atomic masses'),
  henryInWater: fromMemory({ H: 1.3, B: 7500 }, '[Snider1985] as listed in [Sander2015]'),
  diffusionVolume: computed(diffusionVolume({ C: 3, H: 8, O: 1 }), FULLER_ATOMS),
  boilingVolume: fromMemory(81.4e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.1e-9, 'measured order; Wilke-Chang gives 1.21e-9'),
  liquidVolume: fromMemory(76.9e-6, DENSITY),
  gasHeatCapacity: fromMemory(kelvin(32.43, 1.885e-1, 6.406e-5, -9.261e-8), REID),
  liquidHeatCapacity: fromMemory(155.0, CRC_CP),
  antoine: fromMemory({ A: 16.6796, B: 3640.2, C: 219.61, TMin: 281, TMax: 373 }, `${SVN}; A and B seen`),
  vanLaarInWater: fromMemory({ A12: 2.4702, A21: 1.0938 }, PERRY_VLE),
  note: 'weakest Henry constant of the list',
};

const ammonia: Solute = {
  id: 'ammonia',
  name: 'ammonia',
  cas: '7664-41-7',
  molarMass: seen(17.031e-3, '[Sander2023]'),
  henryInWater: seen({ H: 0.59, B: 4200 }, '[Sander2023], entries of Burkholder et al. 2019 and Sander et al. 2011'),
  diffusionVolume: seen(20.7, FULLER),
  boilingVolume: fromMemory(25.8e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.64e-9, 'handbook 1.5-1.64e-9; Wilke-Chang 2.41e-9 is poor here'),
  liquidVolume: fromMemory(24.7e-6, 'partial molar volume in water'),
  gasHeatCapacity: seen(kelvin(27.568, 2.563e-2, 0.99072e-5, -6.6909e-9), KYLE),
  liquidHeatCapacity: fromMemory(80, 'order of the aqueous molecule'),
  note: 'molecular NH3: ionisation is negligible above 0.01 mol/L; the real solution exceeds Henry by 29 % at 8.8 mol/kg',
};

const sulphurDioxide: Solute = {
  id: 'sulphur-dioxide',
  name: 'sulphur dioxide',
  cas: '7446-09-5',
  molarMass: seen(64.063e-3, '[Cengel2002] table A-1'),
  henryInWater: seen({ H: 0.012, B: 3100 }, '[Sander2015] list, 1.2-1.3e-2 and 2900-3200 K'),
  diffusionVolume: seen(41.8, FULLER),
  boilingVolume: fromMemory(44.8e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.83e-9, '[CRC2004]'),
  liquidVolume: computed(44.8e-6, 'taken as the volume at the boiling point'),
  gasHeatCapacity: seen(kelvin(25.78, 5.795e-2, -3.812e-5, 8.612e-9, 1800), KYLE),
  liquidHeatCapacity: computed(195, 'ideal gas 40 plus dCp 155 J/(mol K) of solution, [Goldberg1985]'),
  note: 'molecular SO2 only: in pure water most of a dilute solution is ionised',
};

const hydrogenSulphide: Solute = {
  id: 'hydrogen-sulphide',
  name: 'hydrogen sulphide',
  cas: '7783-06-4',
  molarMass: seen(34.082e-3, '[Sander2023]'),
  henryInWater: seen({ H: 0.001, B: 2100 }, '[Sander2023], entry of Burkholder et al. 2019'),
  diffusionVolume: computed(diffusionVolume({ H: 2, S: 1 }), FULLER_ATOMS),
  boilingVolume: fromMemory(32.9e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.4e-9, '[CRC2004], 1.36-1.41e-9'),
  liquidVolume: computed(32.9e-6, 'taken as the volume at the boiling point'),
  gasHeatCapacity: fromMemory(kelvin(31.94, 1.436e-3, 2.432e-5, -1.176e-8), REID),
  liquidHeatCapacity: estimatedLiquid(kelvin(31.94, 1.436e-3, 2.432e-5, -1.176e-8)),
  note: 'molecular H2S only',
};

const carbonDioxide: Solute = {
  id: 'carbon-dioxide',
  name: 'carbon dioxide',
  cas: '124-38-9',
  molarMass: seen(44.01e-3, '[Cengel2002] table A-1'),
  henryInWater: seen({ H: 3.4e-4, B: 2300 }, '[Sander2023], entries of Burkholder et al. 2019 and Carroll et al. 1991'),
  diffusionVolume: seen(26.9, FULLER),
  boilingVolume: fromMemory(34.0e-6, LE_BAS),
  diffusivityInWater: seen(1.925e-9, '[Versteeg1988] at 298.15 K (seen quoted)'),
  liquidVolume: fromMemory(34e-6, 'partial molar volume in water'),
  gasHeatCapacity: seen(kelvin(22.26, 5.981e-2, -3.501e-5, 7.469e-9, 1800), KYLE),
  liquidHeatCapacity: estimatedLiquid(kelvin(22.26, 5.981e-2, -3.501e-5, 7.469e-9, 1800)),
  note: 'molecular CO2 only',
};

const chlorine: Solute = {
  id: 'chlorine',
  name: 'chlorine',
  cas: '7782-50-5',
  molarMass: seen(70.906e-3, '[Cengel2002] table A-1'),
  henryInWater: seen({ H: 9.2e-4, B: 2000 }, '[Sander2015], entry of Sander et al. 2011'),
  diffusionVolume: seen(38.4, FULLER),
  boilingVolume: fromMemory(48.4e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.4e-9, 'handbooks disagree: 1.25, 1.5, 1.9e-9'),
  liquidVolume: computed(48.4e-6, 'taken as the volume at the boiling point'),
  gasHeatCapacity: fromMemory(kelvin(26.93, 3.384e-2, -3.869e-5, 1.547e-8), REID),
  liquidHeatCapacity: estimatedLiquid(kelvin(26.93, 3.384e-2, -3.869e-5, 1.547e-8)),
  note: 'molecular Cl2 only: hydrolysis is not in it',
};

/** A strong acid has no linear Henry constant; the entry serves gas-side control only. */
const hydrogenChloride: Solute = {
  id: 'hydrogen-chloride',
  name: 'hydrogen chloride',
  cas: '7647-01-0',
  molarMass: seen(36.461e-3, '[Sander2023]'),
  diffusionVolume: computed(diffusionVolume({ H: 1, Cl: 1 }), FULLER_ATOMS),
  boilingVolume: fromMemory(30.6e-6, LE_BAS),
  diffusivityInWater: fromMemory(3.07e-9, '[CRC2004]'),
  liquidVolume: computed(30.6e-6, 'taken as the volume at the boiling point'),
  gasHeatCapacity: seen(kelvin(30.33, -0.762e-2, 1.327e-5, -4.338e-9), KYLE),
  liquidHeatCapacity: estimatedLiquid(kelvin(30.33, -0.762e-2, 1.327e-5, -4.338e-9)),
  note: 'never use a linear Henry law; use a table of p over the acid',
};

export const chloroform: Solute = {
  id: 'chloroform',
  name: 'chloroform',
  cas: '67-66-3',
  molarMass: seen(119.38e-3, '[Cengel2002] table A-1'),
  henryInWater: seen({ H: 0.0025, B: 4500 }, '[Staudinger1996] in the list of [Sander1999]'),
  diffusionVolume: computed(diffusionVolume({ C: 1, H: 1, Cl: 3 }), FULLER_ATOMS),
  boilingVolume: fromMemory(92.3e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.05e-9, 'Wilke-Chang 1.05-1.12e-9'),
  liquidVolume: fromMemory(80.7e-6, DENSITY),
  gasHeatCapacity: fromMemory(kelvin(24.0, 1.893e-1, -1.841e-4, 6.657e-8), REID),
  liquidHeatCapacity: fromMemory(114.2, CRC_CP),
  antoine: seen({ A: 13.7324, B: 2548.74, C: 218.552, TMin: 250, TMax: 357 }, SVN),
};

export const benzene: Solute = {
  id: 'benzene',
  name: 'benzene',
  cas: '71-43-2',
  molarMass: seen(78.11e-3, HIMMELBLAU),
  henryInWater: seen({ H: 0.0017, B: 4200 }, '[Sander2015], entry of Staudinger and Roberts 2001'),
  diffusionVolume: computed(diffusionVolume({ C: 6, H: 6 }, 1), FULLER_ATOMS),
  boilingVolume: fromMemory(96.0e-6, LE_BAS),
  diffusivityInWater: fromMemory(1.05e-9, 'measured 1.02-1.1e-9'),
  liquidDiffusivity: {
    'heavy-oil': seen({ D: 4.71e-10, T: 300, mu: 2e-3 }, '[Treybal1980] illustration 6.6'),
  },
  liquidVolume: fromMemory(89.4e-6, DENSITY),
  gasHeatCapacity: seen(kelvin(-36.22, 48.475e-2, -31.57e-5, 77.62e-9), KYLE),
  liquidHeatCapacity: fromMemory(136.0, CRC_CP),
  antoine: seen({ A: 13.7819, B: 2726.81, C: 217.572, TMin: 279, TMax: 377 }, SVN),
};

export const toluene: Solute = {
  id: 'toluene',
  name: 'toluene',
  cas: '108-88-3',
  molarMass: fromMemory(92.14e-3, 'sum of atomic masses'),
  henryInWater: seen({ H: 0.0015, B: 4300 }, '[Sander2023], entry of Staudinger and Roberts 2001'),
  diffusionVolume: computed(diffusionVolume({ C: 7, H: 8 }, 1), FULLER_ATOMS),
  boilingVolume: fromMemory(118.2e-6, LE_BAS),
  diffusivityInWater: computed(0.95e-9, 'Wilke-Chang 0.90-0.97e-9'),
  liquidVolume: fromMemory(106.9e-6, DENSITY),
  gasHeatCapacity: fromMemory(celsius(94.18, 38.0e-2, -27.86e-5, 80.33e-9), HIMMELBLAU),
  liquidHeatCapacity: fromMemory(157.0, CRC_CP),
  antoine: fromMemory({ A: 13.932, B: 3056.96, C: 217.625, TMin: 286, TMax: 409 }, `${SVN}; A and B seen`),
};

export const trichloroethylene: Solute = {
  id: 'trichloroethylene',
  name: 'trichloroethylene',
  cas: '79-01-6',
  molarMass: fromMemory(131.39e-3, 'sum of atomic masses'),
  henryInWater: seen({ H: 0.001, B: 4300 }, '[Sander2023], entry of Fogg and Sangster 2003'),
  diffusionVolume: computed(diffusionVolume({ C: 2, H: 1, Cl: 3 }), FULLER_ATOMS),
  boilingVolume: fromMemory(107.1e-6, LE_BAS),
  liquidVolume: fromMemory(90.2e-6, DENSITY),
  gasHeatCapacity: fromMemory(kelvin(30.17, 2.287e-1, -2.229e-4, 8.244e-8), REID),
  liquidHeatCapacity: fromMemory(124, CRC_CP),
  antoine: fromMemory(fromDecadic(6.5183, 1018.6, 192.7, 290, 360), '[Dean1999] table of vapour pressures'),
};

/** Solutes by the word a case uses. */
export const SOLUTES: Readonly<Record<string, Solute>> = Object.fromEntries(
  [
    acetone,
    methanol,
    ethanol,
    propanol,
    ammonia,
    sulphurDioxide,
    hydrogenSulphide,
    carbonDioxide,
    chlorine,
    hydrogenChloride,
    chloroform,
    benzene,
    toluene,
    trichloroethylene,
  ].map((solute) => [solute.id, solute]),
);
