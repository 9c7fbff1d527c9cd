/**
 * Cases for the tests of the column, built in code: a plant with everything in it, and a bed whose coefficients are
 * constant, which has exact solutions. Figures are demo data unless a source is named.
 */
import type { Bed, Case, ColumnSpec, LiquidSupply, Packing, Solute, Solvent } from '../../sim/case/case.ts';
import { readCase } from '../../sim/case/read.ts';
import { GAS_CONSTANT } from '../../sim/properties/constants.ts';
import { CARRIERS } from '../../sim/properties/library/carriers.ts';
import { WATER_MOLAR_MASS } from '../../sim/properties/library/solvents.ts';

const constant = (value: number) => ({ kind: 'constant', value }) as const;
const library = (id: string) => ({ kind: 'library', id }) as const;

const waterSolvent: Solvent = {
  id: 'water',
  name: 'water',
  molarMass: WATER_MOLAR_MASS,
  density: library('water.density'),
  viscosity: library('water.viscosity'),
  surfaceTension: library('water.surface-tension'),
  heatCapacity: library('water.molar-heat-capacity'),
  vapourPressure: library('water.vapour-pressure'),
  vapourHeatCapacity: library('steam.molar-heat-capacity'),
  association: 2.6,
  diffusionVolume: 13.1,
};

export const airCarrier: Case['carrier'] = {
  id: 'air',
  name: 'air',
  molarMass: 0.0289647,
  viscosity: library('air.viscosity'),
  heatCapacity: library('air.molar-heat-capacity'),
  conductivity: library('air.conductivity'),
  diffusionVolume: 19.7,
};

/** Henry's constant of [Sander2023]; heat capacities and volumes demo data. */
const acetoneSolute: Solute = {
  id: 'acetone',
  name: 'acetone',
  molarMass: 0.05808,
  vapourHeatCapacity: constant(75),
  heatCapacity: 125,
  molarVolume: 7.4e-5,
  liquidDiffusivity: { value: 1.28e-9, temperature: 298.15 },
  boilingVolume: 74,
  gasDiffusivity: undefined,
  diffusionVolume: 66.86,
  equilibrium: { model: 'henry', solubility: 0.27, temperatureFactor: 5500 },
  heatOfAbsorption: undefined,
};

/** 35 mm metal ring; geometry and Billet's constants [Billet1999], friction constants [Stichlmair1989], from memory. */
export const metalRing35: Packing = {
  id: 'PR-MET-35',
  shape: 'Pall ring',
  material: 'metal',
  nominalSize: 0.035,
  area: 139.4,
  voidFraction: 0.965,
  packingFactor: 92,
  friction: { C1: 0.1, C2: 0.1, C3: 2.1 },
  billet: { CL: 1.012, CV: 0.341, Ch: 0.644, Cp0: 0.967, CS: 2.629, CFl: 1.679 },
  criticalSurfaceTension: 0.075,
  solidHeatCapacity: 3.8e6,
};

/** 25 mm ceramic saddle of the worked example in [Stichlmair1989]. */
export const ceramicSaddle25: Packing = {
  ...metalRing35,
  id: 'BS-CER-25',
  shape: 'Berl saddle',
  material: 'ceramic',
  nominalSize: 0.025,
  area: 260,
  voidFraction: 0.68,
  packingFactor: 360,
  friction: { C1: 32, C2: 7, C3: 1 },
  billet: undefined,
  criticalSurfaceTension: 0.061,
  solidHeatCapacity: 2e6,
};

const acetoneBed: Bed = { packing: metalRing35, height: 5, segments: 40, redistributorVolume: 0 };

/** A vent absorber: acetone from air into water, once through, level control in the sump. */
export const absorber: Case = {
  formatVersion: 1,
  title: 'vent absorber',
  shows: '',
  solvent: waterSolvent,
  carrier: airCarrier,
  solutes: [acetoneSolute],
  column: {
    diameter: 0.82,
    shellHeight: undefined,
    topPressure: 101_325,
    beds: [acetoneBed],
    hydraulics: { model: 'stichlmair-bravo-fair', holdupFactor: 0.555, loadingFactor: 20, staticHoldup: undefined },
    transfer: {
      model: 'onda',
      kLFactor: 0.0051,
      kGFactor: undefined,
      areaFactor: 1.45,
      scaleArea: 1,
      scaleKL: 1,
      scaleKG: 1,
    },
    flooding: { deflooding: 0.85, transferLeft: 0.3, fullShare: 0.9 },
    staticAreaShare: 0.05,
    heatLoss: { coefficient: 0 },
    ambientTemperature: 288,
    distribution: undefined,
    axialMixing: { gas: undefined, liquid: undefined },
    isothermal: false,
    evaporation: true,
  },
  gas: {
    feed: { rate: 48, temperature: 303, humidity: 0.5, composition: [0.004] },
    range: undefined,
    source: { kind: 'forced', lag: 3 },
    inletValve: { tag: 'XV-301', stroke: 5 },
    diversion: { tag: 'XV-302', stroke: 5 },
  },
  liquid: {
    mode: 'once-through',
    feed: { rate: 0.0024, temperature: 288, composition: [0] },
    pumps: {
      duty: 'P-310A',
      standby: 'P-310B',
      staticHeadShare: 0.5,
      coastDown: 0.6,
      runUp: 1.5,
      minimumLevel: 0.1,
    },
    valve: { tag: 'FV-311', stroke: 3 },
    distributorVolume: 0.02,
    sump: {
      area: 1,
      normalLevel: 0.6,
      overflowLevel: 1,
      drain: { tag: 'LV-312', capacity: 0.0048, stroke: 6 },
    },
    cooler: undefined,
    makeUp: undefined,
    bleed: undefined,
    emergencyWater: undefined,
  },
  instruments: [
    instrument('AT-310', { quantity: 'gas-outlet', solute: 0 }, 15),
    instrument('LT-312', { quantity: 'sump-level' }, 1),
    instrument('PDT-310', { quantity: 'bed-dp' }, 1),
  ],
  alarms: [],
  interlocks: [],
  controllers: [
    {
      tag: 'LIC-312',
      instrument: 'LT-312',
      output: 'drain',
      setpoint: 0.6,
      gain: 2,
      integralTime: 120,
      action: 'direct',
      outputRange: [0, 1],
      mode: 'automatic',
      manualOutput: 0.5,
    },
  ],
  limits: [],
  scenarios: [],
  uncertainty: [],
  run: {
    rtol: 1e-6,
    method: 'rodas4',
    axialScheme: 'exponential',
    recordEvery: 1,
    maxSteps: 100_000,
    seed: 1,
    noise: false,
  },
  provenance: [],
};

function instrument(
  tag: string,
  measured: Case['instruments'][number]['measured'],
  lag: number,
): Case['instruments'][number] {
  return {
    tag,
    measured,
    unit: '',
    lag,
    deadTime: 0,
    bias: 0,
    drift: 0,
    noise: undefined,
    range: undefined,
    sampleInterval: undefined,
  };
}

/** The plant with some of its column's settings replaced. */
export function withColumn(plant: Case, column: Partial<ColumnSpec>): Case {
  return { ...plant, column: { ...plant.column, ...column } };
}

/** The plant with every bed's segments (and more) replaced. */
export function withBeds(plant: Case, bed: Partial<Bed>): Case {
  return withColumn(plant, { beds: plant.column.beds.map((b) => ({ ...b, ...bed })) });
}

/** The plant with some of its liquid side replaced. */
export function withLiquid(plant: Case, liquid: Partial<LiquidSupply>): Case {
  return { ...plant, liquid: { ...plant.liquid, ...liquid } };
}

/** The plant with gas at another rate, mol/s, or other feed properties. */
export function withGas(plant: Case, feed: Partial<Case['gas']['feed']>): Case {
  return { ...plant, gas: { ...plant.gas, feed: { ...plant.gas.feed, ...feed } } };
}

/** No controllers and no instruments: nothing but bed, vessels and machines. */
export function bare(plant: Case): Case {
  return { ...plant, instruments: [], controllers: [] };
}

/** What a linear bed is built from. */
export interface LinearBed {
  /** Overall gas transfer units, and absorption factor L/(m G). */
  readonly NOG: number;
  readonly A: number;
  readonly segments?: number;
  /** Plug-flow residence times of gas and liquid, s. */
  readonly tauG?: number;
  readonly tauL?: number;
  readonly scheme?: 'exponential' | 'well-mixed';
  readonly peclet?: { readonly gas: number | undefined; readonly liquid: number | undefined };
  /** Feed strengths; the gas carries this by default. */
  readonly yIn?: number;
  readonly xIn?: number;
  /** Coefficients stated otherwise than as NOG. */
  readonly statedAs?: Extract<ColumnSpec['transfer'], { model: 'measured' }>['statedAs'];
  /** Height, m, gas, mol/s. */
  readonly height?: number;
}

/** Strength of the linear bed's feed: so small that transfer moves no flow. */
export const TRACE = 1e-8;

/**
 * A bed with constant coefficients: isothermal, no evaporation, prescribed hold-up, y* = m x, liquid that passes
 * straight through the distributor. With the feed at `TRACE` its balances are
 * tauG y_t + y_z = -N (y - X), tauL X_t - X_z = (N/A)(y - X), X = m x.
 */
export function linearBed(bed: LinearBed): Case {
  const { NOG, A, segments = 40, tauG = 1, tauL = 40, scheme = 'exponential', yIn = TRACE, xIn = 0, height = 5 } = bed;
  const R = 8.314462618;
  const T = 298.15;
  const P = 101_325;
  const diameter = 0.8;
  const volume = 0.25 * Math.PI * diameter ** 2 * height;
  const holdup = 0.05;
  const density = 1000;
  const gasRate = (P * (metalRing35.voidFraction - holdup) * volume) / (R * T * tauG);
  const liquidRate = (holdup * volume) / tauL;
  const m = (liquidRate * density) / WATER_MOLAR_MASS / (A * gasRate);
  const plant = withColumn(absorber, {
    diameter,
    topPressure: P,
    beds: [{ ...acetoneBed, height, segments }],
    hydraulics: { model: 'prescribed', holdup },
    transfer: {
      model: 'measured',
      statedAs: bed.statedAs ?? { kind: 'NOG', value: NOG },
      gasExponent: 0,
      liquidExponent: 0,
    },
    isothermal: true,
    evaporation: false,
    axialMixing: bed.peclet ?? { gas: undefined, liquid: undefined },
  });
  return {
    ...bare(plant),
    solvent: { ...waterSolvent, density: constant(density) },
    solutes: [{ ...acetoneSolute, equilibrium: { model: 'constant-ratio', m } }],
    gas: {
      ...plant.gas,
      feed: { rate: gasRate, temperature: T, humidity: 0, composition: [yIn] },
      source: { kind: 'forced', lag: 0 },
    },
    liquid: {
      ...plant.liquid,
      feed: { rate: liquidRate, temperature: T, composition: [xIn] },
      distributorVolume: 0,
    },
    run: { ...plant.run, axialScheme: scheme },
  };
}

/** Slope m of the linear bed's equilibrium. */
export function linearSlope(plant: Case): number {
  const equilibrium = plant.solutes[0]?.equilibrium;
  if (equilibrium?.model !== 'constant-ratio') throw new Error('not a linear bed');
  return equilibrium.m;
}

/** Gas and liquid of a column in another atmosphere, as a case file would state them. */
export interface Atmosphere {
  readonly solvent: 'water' | 'heavy-oil';
  readonly carrier: 'air' | 'nitrogen' | 'carbon-dioxide' | 'steam';
  readonly solutes: readonly unknown[];
  /** Pa */ readonly pressure: number;
  /** K */ readonly gasTemperature: number;
  readonly liquidTemperature: number;
  /** Mole fractions by solute. */
  readonly gas: Readonly<Record<string, number>>;
  readonly liquid?: Readonly<Record<string, number>>;
  /** Gas load u_G rho_G^(1/2), Pa^(1/2), and liquid velocity, m/s. */
  readonly load: number;
  readonly uL: number;
  readonly humidity?: number;
  readonly height?: number;
  /** Nothing but dilute transfer: isothermal, no evaporation. */
  readonly still?: boolean;
}

/** Reads a case of the given atmosphere: the ring packing, 0.8 m, forced gas, once-through liquid, no control. */
export function atmosphere(given: Atmosphere): Case {
  const { pressure: p, gasTemperature: T, height = 5, still = false } = given;
  const diameter = 0.8;
  const A = 0.25 * Math.PI * diameter ** 2;
  const M = CARRIERS[given.carrier]!.molarMass.value;
  const rate = given.load * A * Math.sqrt(p / (GAS_CONSTANT * T * M));
  const fractions = (x: Readonly<Record<string, number>>) =>
    Object.fromEntries(Object.entries(x).map(([id, value]) => [id, `${value} mol/mol`]));
  const text = {
    formatVersion: 1,
    invented: true,
    title: 'column in another atmosphere',
    shows: 'that the same equations hold there',
    solvent: given.solvent,
    carrier: given.carrier,
    solutes: given.solutes,
    column: {
      diameter: `${diameter} m`,
      topPressure: `${p} Pa(a)`,
      beds: [{ packing: 'PR-MET-35', height: `${height} m`, segments: 20 }],
      isothermal: still,
      evaporation: !still && given.solvent === 'water',
    },
    gas: {
      feed: {
        rate: `${rate} mol/s`,
        temperature: `${T} K`,
        humidity: `${100 * (given.humidity ?? 0)} %`,
        composition: fractions(given.gas),
      },
      source: { kind: 'forced', lag: '3 s' },
      inletValve: { tag: 'HV-1' },
    },
    liquid: {
      mode: 'once-through',
      feed: {
        rate: `${given.uL * A} m3/s`,
        temperature: `${given.liquidTemperature} K`,
        composition: fractions(given.liquid ?? {}),
      },
      pumps: { duty: 'P-1' },
      valve: { tag: 'FV-1' },
      distributorVolume: '20 L',
      sump: {
        area: '1 m2',
        normalLevel: '0.6 m',
        overflowLevel: '1 m',
        drain: { tag: 'LV-1', capacity: `${2 * given.uL * A} m3/s` },
      },
    },
  };
  const result = readCase(JSON.stringify(text));
  if (!result.ok) throw new Error(JSON.stringify(result.issues));
  return result.value;
}
